//! What a form of the parameter record changes: a field that still holds what it held was not touched.

use super::rows::{self, Row, name};
use crate::extract::DriveAt;
use crate::posted::Posted;
use commissioning::journal::Change;
use commissioning::plant::FieldKind;
use commissioning::record::{ParameterColumn, ParameterPlace};

/// The changes in a group (`*` for all).
#[must_use]
pub fn of(at: &DriveAt, group: &str, posted: &Posted) -> Vec<Change<ParameterPlace>> {
    let rows = rows::of(at, group);
    rows.iter()
        .flat_map(|row| ParameterColumn::ALL.into_iter().filter_map(move |column| one(at, row, column, posted)))
        .collect()
}

fn one(at: &DriveAt, row: &Row, column: ParameterColumn, posted: &Posted) -> Option<Change<ParameterPlace>> {
    let place = row.place(column);
    let field = name(&place);
    if !posted.has(&field) {
        return None;
    }
    let (text, seen) = (posted.text(&field).to_owned(), posted.seen(&field));
    let unit = match row.kind_in(column) {
        FieldKind::Quantity { unit, .. } if !posted.has(&format!("{field}.unit")) => unit.to_owned(),
        FieldKind::Quantity { .. } => posted.text(&format!("{field}.unit")).to_owned(),
        _ => String::new(),
    };
    let slot = row.slot(at, column);
    let was = slot
        .and_then(|s| s.standing().iter().chain(s.earlier()).find(|r| seen.contains(&r.event)))
        .and_then(|r| r.value.as_ref());
    let untouched = match was {
        Some(was) => was.text == text && was.unit.as_deref().unwrap_or_default() == unit,
        None => text.trim().is_empty(),
    };
    // Two that stand beside each other are settled by typing one, never by leaving the field empty.
    let due = seen.len() > 1 && !text.trim().is_empty();
    let left_open = seen.len() > 1 && text.trim().is_empty();
    ((due || !untouched) && !left_open).then_some(Change { place, text, unit, instrument: None, photo: None, seen })
}
