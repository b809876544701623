//! Why a file was not read: a sentence with the fault and the remedy.

use thiserror::Error;

/// Why a file was not read.
#[derive(Clone, Debug, PartialEq, Eq, Error)]
pub enum Unreadable {
    /// Nothing in it.
    #[error("The file is empty. Choose the file that holds the list.")]
    Empty,
    /// Too many bytes.
    #[error("The file has {} MB; at most {} MB are read. Send only the sheet with the list.", .bytes.div_ceil(1 << 20), .most >> 20)]
    TooLarge {
        /// How many it has.
        bytes: usize,
        /// How many are read.
        most: usize,
    },
    /// It unfolds beyond the limit.
    #[error("The file unpacks to more than {} MB and was not read further. Save only the sheet with the list as a new file.", .most >> 20)]
    Unfolds {
        /// How many bytes are unpacked.
        most: u64,
    },
    /// Too many parts, sheets, cells or words.
    #[error("The file has more than {most} {what}. Save only the sheet with the list as a new file.")]
    TooMany {
        /// Of what.
        what: &'static str,
        /// How many are read.
        most: usize,
    },
    /// A cell beyond the limit.
    #[error(
        "Sheet “{sheet}” has something in {cell}; rows are read up to {rows} and columns up to {columns}. Delete what stands there, or save the list as a new file."
    )]
    TooFar {
        /// Sheet.
        sheet: String,
        /// Cell.
        cell: String,
        /// Last row read.
        rows: u32,
        /// Last column's letters.
        columns: String,
    },
    /// An encrypted package.
    #[error("The file is protected by a password. Open it, take the password off, save it and send it again.")]
    Password,
    /// The binary format of old spreadsheet programs, whatever it is called.
    #[error(
        "This is a spreadsheet in the old binary format (.xls), whatever its name says. Open it and save it as .xlsx or .csv."
    )]
    OldBinary,
    /// Another binary container.
    #[error("This is no spreadsheet but another kind of office file. Save the list as .xlsx or .csv.")]
    OtherOffice,
    /// An archive that is no .xlsx.
    #[error("This archive is {what}. Save the list as .xlsx or .csv.")]
    OtherArchive {
        /// What it seems to be.
        what: &'static str,
    },
    /// Neither archive nor words.
    #[error("This is {what}, not a spreadsheet. Send the list as .xlsx or .csv.")]
    NoSheet {
        /// What it seems to be.
        what: &'static str,
    },
    /// It ends too early.
    #[error("The file ends early: it was cut off on the way. Send it again.")]
    CutOff,
    /// A part cannot be read.
    #[error("{place} of the file is damaged and cannot be read. Open it in a spreadsheet program and save it again.")]
    Damaged {
        /// Which part: "Sheet “Motors”", "The workbook".
        place: String,
    },
    /// A quoted cell that never ends.
    #[error(
        "The quotation mark opened in {cell} is never closed. Open the file in a text editor and close it, or take it out."
    )]
    OpenQuote {
        /// Where.
        cell: String,
    },
}
