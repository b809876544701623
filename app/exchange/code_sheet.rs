//! Code sheets: for one type of drive, where each generic function is set in it and in which words and units.
//!
//! A firm brings its own code sheets as data; none comes with the program.

mod entry;
mod faults;
mod headings;
mod read;
#[cfg(test)]
mod tests;
mod write;

pub use entry::{CodeEntry, CodeSheet};
pub use read::{CodeProblem, read};

pub use headings::Columns;

pub(crate) use entry::{as_field, same_code, unit_for};
pub(crate) use headings::find as find_headings;
