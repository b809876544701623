//! A limit is a named entry with its source: check, message, test and printed sheet read the same one.

use crate::source::Source;

/// One published number that a check compares with.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Limit {
    /// What it limits, in the words of the trade.
    pub name: &'static str,
    /// The number.
    pub value: f64,
    /// Its unit's symbol.
    pub unit: &'static str,
    /// Where it comes from.
    pub source: Source,
}
