//! A table to be written: headings with their units, and rows of words and numbers.

/// A heading.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Heading {
    /// In words.
    pub words: String,
    /// Unit of the numbers under it; empty where there is none.
    pub unit: String,
}

impl Heading {
    /// Without unit.
    #[must_use]
    pub fn new(words: &str) -> Self {
        Self { words: words.to_owned(), unit: String::new() }
    }

    /// With the unit of its numbers.
    #[must_use]
    pub fn with_unit(words: &str, unit: &str) -> Self {
        Self { words: words.to_owned(), unit: unit.to_owned() }
    }

    /// As written: `amps [A]`.
    #[must_use]
    pub fn text(&self) -> String {
        if self.unit.is_empty() { self.words.clone() } else { format!("{} [{}]", self.words, self.unit) }
    }
}

/// A cell to be written.
#[derive(Clone, Debug, Default, PartialEq)]
pub enum OutCell {
    /// Nothing.
    #[default]
    Empty,
    /// Words, identifiers, codes: they stay words whatever they begin with.
    Text(String),
    /// A number, and how many decimals show it.
    Number(f64, u8),
}

impl OutCell {
    /// Words; empty ones are nothing.
    pub fn text(text: impl Into<String>) -> Self {
        let text = text.into();
        if text.is_empty() { Self::Empty } else { Self::Text(text) }
    }

    /// A count.
    #[must_use]
    pub fn count(count: usize) -> Self {
        u32::try_from(count).map_or_else(|_| Self::Text(count.to_string()), |n| Self::Number(f64::from(n), 0))
    }

    /// A decimal as typed: a number when it is a plain one (`50.0` shows its decimal), words otherwise.
    #[must_use]
    pub fn decimal(text: &str) -> Self {
        let plain = text.trim().replace('−', "-");
        let digits = plain.strip_prefix('-').unwrap_or(&plain);
        let right =
            digits.bytes().any(|b| b.is_ascii_digit()) && digits.bytes().all(|b| b.is_ascii_digit() || b == b'.');
        match plain.parse::<f64>() {
            // A leading nought, or more digits than a spreadsheet keeps, makes an identifier of it.
            Ok(number)
                if right
                    && number.is_finite()
                    && digits.len() <= 15
                    && !(digits.len() > 1 && digits.starts_with('0') && !digits.starts_with("0.")) =>
            {
                let decimals = digits.split_once('.').map_or(0, |(_, d)| d.len());
                Self::Number(number, u8::try_from(decimals.min(9)).unwrap_or(9))
            }
            _ => Self::text(text),
        }
    }
}

/// A table: one sheet of a workbook, or one file.
#[derive(Clone, Debug, PartialEq)]
pub struct Table {
    /// Name of its sheet.
    pub name: String,
    /// Headings, left to right.
    pub headings: Vec<Heading>,
    /// Rows, each as long as the headings.
    pub rows: Vec<Vec<OutCell>>,
}
