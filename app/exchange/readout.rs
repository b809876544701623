//! Read-outs of a drive: its own codes with their values, joined with the type's code sheet to the generic functions.

mod join;
mod lines;
#[cfg(test)]
mod tests;

pub use crate::code_sheet::Columns;
pub use join::{Joined, join};
pub use lines::{ReadLine, ReadOut, read, table};
