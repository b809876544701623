//! Reading spreadsheets: bytes and a file name become a bounded book of cells, or a sentence that says why not.
//!
//! What is read is decided by the bytes, never by the name. Every limit is counted while reading, so that a small
//! file cannot unfold into a large one.

mod archive;
mod cell;
mod container;
mod delimited;
mod encoding;
mod limits;
mod office;
#[cfg(test)]
mod tests;
mod unreadable;

pub(crate) use cell::decimal;
pub use cell::{Address, CellValue, column_letters};
pub use limits::Limits;
pub use unreadable::Unreadable;

use container::Container;

/// What was read from a file.
#[derive(Clone, Debug, PartialEq)]
pub struct Book {
    /// Its sheets in their order; a text file has one.
    pub sheets: Vec<Sheet>,
    /// What the reader of the screen should know: macros left out, encoding assumed.
    pub notices: Vec<String>,
}

/// One sheet of cells.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Sheet {
    /// Name, as its tab shows it; the file's name for a text file.
    pub name: String,
    /// Whether the spreadsheet program hides it.
    pub hidden: bool,
    /// Rows from the first; each as long as its last filled cell.
    pub rows: Vec<Vec<CellValue>>,
    /// Merged areas: first and last cell.
    pub merged: Vec<(Address, Address)>,
}

impl Sheet {
    /// The cell here; an empty one beyond the filled part.
    #[must_use]
    pub fn cell(&self, at: Address) -> &CellValue {
        self.rows.get(at.row as usize).and_then(|row| row.get(at.column as usize)).unwrap_or(&CellValue::Empty)
    }

    /// The cell here, or the one that a merged area shows here.
    #[must_use]
    pub fn shown(&self, at: Address) -> &CellValue {
        let area = self.merged.iter().find(|(first, last)| {
            (first.row..=last.row).contains(&at.row) && (first.column..=last.column).contains(&at.column)
        });
        self.cell(area.map_or(at, |(first, _)| *first))
    }

    /// How many columns the longest row fills.
    #[must_use]
    pub fn width(&self) -> u32 {
        self.rows.iter().map(Vec::len).max().and_then(|n| u32::try_from(n).ok()).unwrap_or(0)
    }

    /// How many rows there are.
    #[must_use]
    pub fn height(&self) -> u32 {
        u32::try_from(self.rows.len()).unwrap_or(0)
    }
}

/// The lines of a text file, and what to tell about its letters.
type Lines = (Vec<String>, Option<String>);

/// The lines of a text file, as they stand, with what to tell about its letters; `None` when it is no text file.
///
/// # Errors
/// When the file can be neither, with a sentence that says why and what to do.
pub(crate) fn lines(bytes: &[u8], limits: &Limits) -> Result<Option<Lines>, Unreadable> {
    if bytes.len() > limits.bytes {
        return Err(Unreadable::TooLarge { bytes: bytes.len(), most: limits.bytes });
    }
    if container::of(bytes)? == Container::Zip {
        return Ok(None);
    }
    let (text, told) = encoding::decode(bytes)?;
    let most = limits.rows as usize;
    let lines: Vec<String> = text.lines().take(most + 1).map(str::to_owned).collect();
    if lines.len() > most {
        return Err(Unreadable::TooMany { what: "lines", most });
    }
    Ok(Some((lines, told)))
}

/// Reads a file within the usual limits.
///
/// # Errors
/// When the file is no spreadsheet that can be read, with a sentence that says why and what to do.
pub fn read(bytes: &[u8], name: &str) -> Result<Book, Unreadable> {
    read_within(bytes, name, &Limits::USUAL)
}

/// Reads a file within these limits.
///
/// # Errors
/// When the file is no spreadsheet that can be read, with a sentence that says why and what to do.
pub fn read_within(bytes: &[u8], name: &str, limits: &Limits) -> Result<Book, Unreadable> {
    if bytes.len() > limits.bytes {
        return Err(Unreadable::TooLarge { bytes: bytes.len(), most: limits.bytes });
    }
    let book = match container::of(bytes)? {
        Container::Zip => office::read(bytes, limits)?,
        Container::Words => delimited::read(bytes, name, limits)?,
    };
    if book.sheets.iter().all(|s| s.rows.is_empty()) { Err(Unreadable::Empty) } else { Ok(book) }
}
