//! The parameter record: per function the drive's own code, as found, intended, as left, and why the last two differ.

pub mod add_row;
pub mod changes;
pub mod group;
pub mod inputs;
pub mod list;
pub mod live;
pub mod rows;
