//! Rows that are no drive: sums, headings, the header again; and marks that mean “not known”.

use crate::schedule::{Mapping, bare, folded};
use crate::sheets::{Address, CellValue, Sheet};

/// Words that begin a row of sums.
const SUMS: &[&str] = &[
    "total",
    "totals",
    "subtotal",
    "sub total",
    "grand total",
    "sum",
    "summe",
    "zwischensumme",
    "gesamt",
    "gesamtsumme",
    "uebertrag",
    "somme",
    "sous total",
    "total general",
    "carried forward",
    "brought forward",
];

/// Words and marks that say a value is not there.
const UNKNOWN: &[&str] = &[
    "n a",
    "na",
    "tbc",
    "tbd",
    "tba",
    "not known",
    "unknown",
    "unbekannt",
    "offen",
    "k a",
    "entfaellt",
    "inconnu",
    "nc",
    "s o",
    "a confirmer",
    "a definir",
    "spaeter",
];

/// Whether a cell only says that a value is not known, or not there.
pub(crate) fn said_unknown(text: &str) -> bool {
    let trimmed = text.trim();
    if trimmed.len() > 20 || trimmed.starts_with(|c: char| c.is_ascii_digit()) {
        return false;
    }
    trimmed.chars().all(|c| matches!(c, '-' | '–' | '—' | '?' | '.' | '/' | '_' | '*') || c.is_whitespace())
        || UNKNOWN.contains(&folded(trimmed).as_str())
}

/// Why a row is no drive, when it is none.
pub(super) fn left_out(sheet: &Sheet, row: u32, mapping: &Mapping, tag_column: u32) -> Option<String> {
    let filled: Vec<(u32, &CellValue)> = (0..)
        .zip(sheet.rows.get(row as usize).map_or(&[][..], Vec::as_slice))
        .filter(|(_, cell)| !cell.is_empty())
        .collect();
    let number = u64::from(row) + 1;
    for (column, cell) in &filled {
        let CellValue::Text(text) = cell else { continue };
        let no_tag = sheet.cell(Address::new(row, tag_column)).is_empty() || *column == tag_column;
        if !no_tag || *column > filled.first().map_or(0, |(c, _)| c + 2) {
            continue;
        }
        let plain = folded(text);
        if SUMS.iter().any(|s| plain == *s || plain.strip_prefix(s).is_some_and(|rest| rest.starts_with(' '))) {
            let text = commissioning::typed::shorten(&bare(text));
            return Some(format!("Row {number} is a sum: “{text}” in {}.", Address::new(row, *column)));
        }
    }
    let mapped = mapping.columns.iter().filter(|c| c.target.is_some() && !c.header.is_empty());
    let (mut same, mut other) = (0, 0);
    for column in mapped {
        let text = bare(&sheet.cell(Address::new(row, column.column)).text());
        match text.is_empty() {
            true => {}
            false if column.header.eq_ignore_ascii_case(&text) || column.header.ends_with(&text) => same += 1,
            false => other += 1,
        }
    }
    if same >= 2 && same > other {
        return Some(format!("Row {number} is the header again."));
    }
    if let [(column, CellValue::Text(text))] = filled.as_slice() {
        let is_tag = *column == tag_column
            && commissioning::decide::drive_tag(text).is_ok()
            && text.contains(|c: char| c.is_ascii_digit());
        if !is_tag {
            let text = commissioning::typed::shorten(&bare(text));
            return Some(format!("Row {number} holds only “{text}”: a heading or a note."));
        }
    }
    None
}
