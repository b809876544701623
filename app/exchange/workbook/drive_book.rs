//! The parameter workbook of one drive: every function with its code, what was intended, found and left.

use super::plates::{number_cell, with_unit};
use super::{Heading, NotWritten, OutCell, Table, csv, xlsx};
use commissioning::plant::FieldKind;
use commissioning::record::functions::{self, Function};
use commissioning::typed::numeral;
use commissioning::{Timestamp, Typed};

/// A value of the parameter record.
pub type ParameterValue = Option<Typed>;

/// A line of the parameter record.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct ParameterLine {
    /// Generic function by key, or a free row's own key.
    pub function: String,
    /// In words; for a free row what was written there.
    pub label: String,
    /// The drive's own code.
    pub code: String,
    /// Intended.
    pub intended: ParameterValue,
    /// As found.
    pub as_found: ParameterValue,
    /// As left.
    pub as_left: ParameterValue,
    /// Why as left differs from intended.
    pub explanation: String,
}

/// Everything the parameter workbook of a drive holds.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct DriveBook {
    /// Plant tag.
    pub tag: String,
    /// Lines, in the order of the sheet.
    pub lines: Vec<ParameterLine>,
}

impl DriveBook {
    /// The table.
    #[must_use]
    pub fn table(&self) -> Table {
        let rows = self.lines.iter().map(|l| cells(l).collect()).collect();
        Table { name: "Parameters".to_owned(), headings: headings().collect(), rows }
    }

    /// The workbook's bytes.
    ///
    /// # Errors
    /// When it is larger than the format allows.
    pub fn xlsx(&self, made: Timestamp) -> Result<Vec<u8>, NotWritten> {
        xlsx(&self.tag, &[self.table()], made)
    }

    /// The same as a text file.
    #[must_use]
    pub fn csv(&self) -> Vec<u8> {
        csv(&self.table())
    }
}

pub(super) fn headings() -> impl Iterator<Item = Heading> {
    ["function", "label", "code", "unit", "as left", "intended", "as found", "explanation"]
        .into_iter()
        .map(Heading::new)
}

/// The cells of a line; the unit stands once, and a value in another unit carries its own.
pub(super) fn cells(line: &ParameterLine) -> impl Iterator<Item = OutCell> {
    let values = [&line.as_left, &line.intended, &line.as_found];
    let unit = values.iter().find_map(|v| v.as_ref()?.unit.clone()).unwrap_or_default();
    let function = functions::find(&line.function);
    let value = |typed: &ParameterValue| typed.as_ref().map_or(OutCell::Empty, |t| cell(function, t, &unit));
    let shown = values.map(value);
    let first = [&line.function, &line.label, &line.code, &unit].map(OutCell::text);
    first.into_iter().chain(shown).chain([OutCell::text(&line.explanation)])
}

fn cell(function: Option<&Function>, typed: &Typed, unit: &str) -> OutCell {
    match function.map(|f| f.kind) {
        Some(FieldKind::Quantity { kind, .. }) => {
            let own = typed.unit.as_deref().unwrap_or_default();
            match (numeral::prefix(&typed.text, kind), numeral::understand(&typed.text, kind)) {
                (None, Ok(number)) if own == unit => number_cell(&typed.text, number),
                _ => OutCell::text(with_unit(typed)),
            }
        }
        // A choice is written by its label, as the record shows it.
        Some(FieldKind::Choice(options)) => OutCell::text(
            options.iter().find(|(key, _)| *key == typed.text).map_or(typed.text.as_str(), |(_, label)| label),
        ),
        _ => OutCell::text(&typed.text),
    }
}
