//! The limits of what is read: named, in one place, stated in every refusal.

/// How much of a file is read at most.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Limits {
    /// Bytes of the file as sent.
    pub bytes: usize,
    /// Bytes of everything in it, unpacked.
    pub unpacked: u64,
    /// Parts of the archive.
    pub parts: usize,
    /// Sheets.
    pub sheets: usize,
    /// Rows of a sheet.
    pub rows: u32,
    /// Columns of a sheet.
    pub columns: u32,
    /// Cells of all sheets together, from the first of a row to its last filled one.
    pub cells: usize,
    /// Bytes of words in all cells together.
    pub words: usize,
}

impl Limits {
    /// What a project's schedule needs many times over (our own choice; the largest schedules hold some thousand drives).
    pub const USUAL: Self = Self {
        bytes: 10 << 20,
        unpacked: 100 << 20,
        parts: 2000,
        sheets: 60,
        rows: 20_000,
        columns: 400,
        cells: 600_000,
        words: 32 << 20,
    };
}
