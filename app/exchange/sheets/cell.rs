//! A cell and where it stands.

use std::fmt;

/// What a cell holds, as the spreadsheet shows it.
#[derive(Clone, Debug, Default, PartialEq)]
pub enum CellValue {
    /// Nothing.
    #[default]
    Empty,
    /// Words, as they stand.
    Text(String),
    /// A number that the spreadsheet kept as one: no comma or point can be mistaken in it.
    Number(f64),
    /// A number shown in percent: 91.4 for a cell that shows 91.4 %.
    Percent(f64),
    /// Yes or no.
    Flag(bool),
    /// A date or time, written year first.
    Date(String),
    /// The spreadsheet's own error: `#REF!`.
    Error(String),
    /// A formula whose result was not stored in the file.
    Unsolved,
}

impl CellValue {
    /// Whether nothing stands here; blanks count as nothing.
    #[must_use]
    pub fn is_empty(&self) -> bool {
        match self {
            Self::Empty => true,
            Self::Text(text) => text.trim().is_empty(),
            _ => false,
        }
    }

    /// As a person would type it.
    #[must_use]
    pub fn text(&self) -> String {
        match self {
            Self::Empty => String::new(),
            Self::Text(text) | Self::Date(text) | Self::Error(text) => text.clone(),
            Self::Number(number) => decimal(*number),
            Self::Percent(number) => format!("{} %", decimal(*number)),
            Self::Flag(yes) => if *yes { "yes" } else { "no" }.to_owned(),
            Self::Unsolved => "(formula)".to_owned(),
        }
    }
}

/// A stored number as text: fifteen digits, which is all a spreadsheet keeps, so that 0.1 + 0.2 is 0.3.
#[must_use]
pub(crate) fn decimal(number: f64) -> String {
    let rounded = engineering::rounding::to_significant(number, 15);
    if rounded == 0.0 { "0".to_owned() } else { format!("{rounded}") }
}

/// Where a cell stands; both count from 0.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Hash, PartialOrd, Ord, serde::Serialize, serde::Deserialize)]
pub struct Address {
    /// Row, from 0.
    pub row: u32,
    /// Column, from 0.
    pub column: u32,
}

impl Address {
    /// At this row and column, both from 0.
    #[must_use]
    pub const fn new(row: u32, column: u32) -> Self {
        Self { row, column }
    }
}

/// As spreadsheets name it: `C12`.
impl fmt::Display for Address {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{}{}", column_letters(self.column), u64::from(self.row) + 1)
    }
}

/// A column's letters: 0 is A, 26 is AA.
#[must_use]
pub fn column_letters(column: u32) -> String {
    let mut letters = Vec::new();
    let mut rest = u64::from(column) + 1;
    while rest > 0 {
        let digit = u8::try_from((rest - 1) % 26).unwrap_or(0);
        letters.push(char::from(b'A' + digit));
        rest = (rest - 1) / 26;
    }
    letters.iter().rev().collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn cells_are_named_as_spreadsheets_name_them() {
        for (row, column, name) in [(0, 0, "A1"), (11, 2, "C12"), (0, 25, "Z1"), (0, 26, "AA1"), (0, 16383, "XFD1")] {
            assert_eq!(Address::new(row, column).to_string(), name);
        }
    }

    #[test]
    fn stored_numbers_read_as_they_were_typed() {
        for (number, text) in [(0.1 + 0.2, "0.3"), (75.0, "75"), (-10.5, "-10.5"), (-0.0, "0"), (1485.0, "1485")] {
            assert_eq!(CellValue::Number(number).text(), text);
        }
        assert_eq!(CellValue::Percent(91.4).text(), "91.4 %");
    }
}
