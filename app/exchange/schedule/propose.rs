//! The proposal: every column with what it seems to be, its unit and some of its values to look at.

use super::header::{Heading, Reader, assign};
use super::mapping::fingerprint;
use super::units::unit_of;
use super::{MappedColumn, Mapping, Target};
use crate::sheets::{Address, Book, CellValue, Sheet};
use commissioning::plant::Field;
use engineering::Kind;

/// How many values stand beside a column to look at.
const SAMPLES: usize = 3;

/// Where a column's unit is from.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum UnitFrom {
    /// The header states it.
    Header,
    /// The cells state it, or their size shows it.
    Cells,
    /// Nothing states it: the field's usual unit is taken, to be confirmed.
    Assumed,
}

/// A column with what it seems to be.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct ProposedColumn {
    /// Column, from 0.
    pub column: u32,
    /// Header as it stands, on one line.
    pub header: String,
    /// Some of its values, as they stand.
    pub samples: Vec<String>,
    /// What it seems to be.
    pub target: Option<Target>,
    /// Other things it may be, best first.
    pub or_else: Vec<Target>,
    /// Unit of cells that state none; empty where there is none.
    pub unit: String,
    /// Where that is from.
    pub unit_from: UnitFrom,
}

/// A sheet's layout as it seems to be.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Proposal {
    /// First and last row of the header, from 0; `None` when none was found.
    pub header_rows: Option<(u32, u32)>,
    /// Its columns; those without header and without values are left out.
    pub columns: Vec<ProposedColumn>,
    /// What tells this layout from another.
    pub fingerprint: String,
}

impl Proposal {
    /// The proposal as a mapping, to use or to correct.
    #[must_use]
    pub fn mapping(&self) -> Mapping {
        let columns = self.columns.iter().map(|c| MappedColumn {
            column: c.column,
            header: c.header.clone(),
            target: c.target.clone(),
            unit: c.unit.clone(),
            decimal: None,
        });
        Mapping { fingerprint: self.fingerprint.clone(), header_rows: self.header_rows, columns: columns.collect() }
    }
}

/// Proposes a layout for a sheet.
#[must_use]
pub fn propose(sheet: &Sheet) -> Proposal {
    let reader = Reader::default();
    let rows = reader.find(sheet);
    proposal(&reader, sheet, rows)
}

/// Proposes a layout with the header in these rows, as a person showed it.
#[must_use]
pub fn propose_at(sheet: &Sheet, header_rows: (u32, u32)) -> Proposal {
    let last = header_rows.1.clamp(header_rows.0, header_rows.0.saturating_add(3));
    proposal(&Reader::default(), sheet, Some((header_rows.0, last)))
}

/// The sheet of a book that most looks like a list of drives; a visible one before a hidden one.
#[must_use]
pub fn best_sheet(book: &Book) -> Option<usize> {
    let reader = Reader::default();
    let ranked = book.sheets.iter().enumerate().map(|(index, sheet)| {
        let given = reader.find(sheet).map_or_else(Vec::new, |rows| assign(&reader.headings(sheet, rows)));
        let tag = given.iter().flatten().any(|t| *t == Target::Tag);
        ((!sheet.hidden, tag, given.iter().flatten().count(), sheet.rows.len().min(3)), index)
    });
    ranked.max_by(|a, b| a.0.cmp(&b.0).then(b.1.cmp(&a.1))).map(|(_, index)| index)
}

fn proposal(reader: &Reader, sheet: &Sheet, rows: Option<(u32, u32)>) -> Proposal {
    let headings = rows.map_or_else(Vec::new, |rows| reader.headings(sheet, rows));
    let given = assign(&headings);
    let first = rows.map_or(0, |(_, last)| last.saturating_add(1));
    let columns = (0..sheet.width()).filter_map(|column| {
        let heading = headings.get(column as usize).cloned().unwrap_or_default();
        let target = given.get(column as usize).cloned().flatten();
        let values: Vec<&CellValue> = (first..sheet.height())
            .map(|row| sheet.cell(Address::new(row, column)))
            .filter(|c| !c.is_empty())
            .collect();
        if heading.text.is_empty() && values.is_empty() {
            return None;
        }
        let (unit, unit_from) =
            target.as_ref().map_or((String::new(), UnitFrom::Assumed), |t| unit(t, &heading, &values));
        let mut samples: Vec<String> = Vec::new();
        for value in values {
            let text = commissioning::typed::shorten(&value.text());
            if !samples.contains(&text) && samples.len() < SAMPLES {
                samples.push(text);
            }
        }
        let or_else = heading.meanings.into_iter().map(|m| m.target).filter(|t| Some(t) != target.as_ref());
        Some(ProposedColumn {
            column,
            header: heading.text,
            samples,
            or_else: or_else.collect(),
            target,
            unit,
            unit_from,
        })
    });
    let fingerprint =
        fingerprint(headings.iter().enumerate().map(|(c, h)| (u32::try_from(c).unwrap_or(u32::MAX), h.text.as_str())));
    Proposal { header_rows: rows, columns: columns.collect(), fingerprint }
}

/// The unit for cells that state none, and where it is from.
fn unit(target: &Target, heading: &Heading, values: &[&CellValue]) -> (String, UnitFrom) {
    let Some((kind, usual)) = target.quantity() else { return (String::new(), UnitFrom::Assumed) };
    if kind == Kind::Percent && target.description().is_some_and(|field| parts_of_one(field, values)) {
        return ("of 1".to_owned(), UnitFrom::Cells);
    }
    match heading.unit.as_deref().and_then(|u| unit_of(kind, u)) {
        Some(unit) => (unit.to_owned(), UnitFrom::Header),
        None if usual.is_empty() => (String::new(), UnitFrom::Header),
        None => {
            let stated = |cell: &&CellValue| !matches!(cell, CellValue::Number(_)) && states_unit(kind, &cell.text());
            let all = !values.is_empty() && values.iter().all(stated);
            (usual.to_owned(), if all { UnitFrom::Cells } else { UnitFrom::Assumed })
        }
    }
}

/// Whether a cell carries its own unit: `75 kW`.
fn states_unit(kind: Kind, text: &str) -> bool {
    let after = text.trim().trim_start_matches(|c: char| c.is_ascii_digit() || ".,' -−".contains(c));
    unit_of(kind, after).is_some()
}

/// Whether a column of percentages is written in parts of one (0.914 for 91.4 %): as percent none of its numbers could
/// be, and as parts of one all can. Where both can be, the heading counts.
fn parts_of_one(field: &Field, values: &[&CellValue]) -> bool {
    let mut found = false;
    for value in values {
        let text = match value {
            CellValue::Number(_) => value.text(),
            CellValue::Text(text) => text.trim().replace(',', "."),
            CellValue::Percent(_) => return false,
            _ => continue,
        };
        if text.parse::<f64>().is_err() {
            continue;
        }
        if field.understand(&text, "%").is_ok() || field.understand(&text, "of 1").is_err() {
            return false;
        }
        found = true;
    }
    found
}
