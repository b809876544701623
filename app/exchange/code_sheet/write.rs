//! A code sheet out again, as a table that the reading takes back.

use super::entry::{CodeEntry, CodeSheet};
use crate::workbook::{Heading, NotWritten, OutCell, Table, csv, xlsx};
use commissioning::Timestamp;

const HEADINGS: [&str; 9] =
    ["function", "label", "code", "unit", "resolution", "default", "lowest", "highest", "meanings"];

impl CodeSheet {
    /// The table.
    #[must_use]
    pub fn table(&self) -> Table {
        Table {
            name: "Code sheet".to_owned(),
            headings: HEADINGS.iter().map(|h| Heading::new(h)).collect(),
            rows: self.entries.iter().map(row).collect(),
        }
    }

    /// As a workbook.
    ///
    /// # Errors
    /// When it is larger than the format allows.
    pub fn xlsx(&self, made: Timestamp) -> Result<Vec<u8>, NotWritten> {
        xlsx(&self.drive_type, &[self.table()], made)
    }

    /// As a text file.
    #[must_use]
    pub fn csv(&self) -> Vec<u8> {
        csv(&self.table())
    }
}

fn row(entry: &CodeEntry) -> Vec<OutCell> {
    let meanings: Vec<String> = entry.meanings.iter().map(|(meaning, word)| format!("{meaning} = {word}")).collect();
    let label = entry.generic().map_or("", |f| f.label);
    let words = [entry.function.as_str(), label, &entry.code, &entry.unit].map(OutCell::text);
    let figures = [&entry.resolution, &entry.default, &entry.lowest, &entry.highest].map(|t| OutCell::decimal(t));
    words.into_iter().chain(figures).chain([OutCell::text(meanings.join("; "))]).collect()
}
