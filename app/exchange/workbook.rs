//! Workbooks out: plain tables as .xlsx and .csv, the same tables always the same bytes.
//!
//! Whoever knows the store fills the lines; nothing here looks anything up. Words are written as words whatever they
//! begin with, numbers as numbers with their unit in the heading.

mod csv_file;
mod drive_book;
mod plates;
mod site_book;
mod table;
#[cfg(test)]
mod tests;
mod xlsx_file;

pub use csv_file::csv;
pub use drive_book::{DriveBook, ParameterLine, ParameterValue};
pub use site_book::{DriveLine, FindingLine, PlateLine, SiteBook, VerdictLine};
pub use table::{Heading, OutCell, Table};
pub use xlsx_file::{NotWritten, xlsx};

pub(crate) use csv_file::needs_guard;
