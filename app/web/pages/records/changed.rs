//! What changed since a record was last returned or reopened.

use commissioning::plant::{Recorded, Slot, fields};
use commissioning::procedure::Procedure;
use commissioning::record::{Drive, Record, Turn, functions};

/// The place in the drive's chain of the last return or reopening; `None` when there was none.
#[must_use]
pub fn since(record: &Record) -> Option<u64> {
    record.history.iter().rev().find(|t| matches!(t.value, Turn::Returned(_) | Turn::Reopened(..))).map(|t| t.sequence)
}

/// Whether something was recorded after that place.
#[must_use]
pub fn is_after<T>(recorded: &Recorded<T>, since: Option<u64>) -> bool {
    since.is_some_and(|s| recorded.sequence > s)
}

fn touched<T>(slot: &Slot<T>, since: u64) -> bool {
    slot.standing().iter().any(|r| r.sequence > since) || slot.taken_back().iter().any(|r| r.sequence > since)
}

/// What changed since, in words, each with the step it belongs to (empty: none).
#[must_use]
pub fn list(drive: &Drive, procedure: &Procedure) -> Vec<(String, String)> {
    let Some(record) = &drive.record else { return Vec::new() };
    let Some(since) = since(record) else { return Vec::new() };
    let mut changed = Vec::new();
    for (place, slot) in drive.fields.iter().filter(|(_, s)| touched(s, since)) {
        let label = fields::find(place.sheet, &place.field).map_or(place.field.as_str(), |f| f.label);
        let now = slot
            .current()
            .and_then(|r| r.value.as_ref())
            .map_or_else(|| "empty".to_owned(), commissioning::Typed::shown);
        changed.push((String::new(), format!("{}: {label} {now}", place.sheet.words())));
    }
    for (place, slot) in record.entries.iter().filter(|(_, s)| touched(s, since)) {
        let Some((step, item)) = procedure.item(&place.item) else { continue };
        let row = step.rows.get(usize::from(place.row)).map(|r| format!(", {r}")).unwrap_or_default();
        let now = slot
            .current()
            .map_or_else(|| "taken back".to_owned(), |r| crate::pages::steps::inputs::words(item, &r.value));
        changed.push((step.id.clone(), format!("{}: {}{row} {now}", step.title, item.label)));
    }
    for (place, slot) in record.parameters.iter().filter(|(_, s)| touched(s, since)) {
        let free = record.free_rows.iter().find(|(k, _)| *k == place.function).map(|(_, l)| l.as_str());
        let label = functions::find(&place.function).map(|f| f.label).or(free).unwrap_or(place.function.as_str());
        let now = slot
            .current()
            .and_then(|r| r.value.as_ref())
            .map_or_else(|| "empty".to_owned(), commissioning::Typed::shown);
        changed.push((String::new(), format!("Parameter record: {label}, {} {now}", place.column.words())));
    }
    for (step, settled) in record.otherwise.iter().filter(|(_, s)| s.sequence > since) {
        let title = procedure.step(step).map_or(step.as_str(), |(_, s)| s.title.as_str());
        changed.push((step.clone(), format!("{title}: settled otherwise, {}", settled.value.1)));
    }
    for finding in record.findings.values().filter(|f| f.closed_at().is_some_and(|at| at > since)) {
        changed.push((finding.step.clone().unwrap_or_default(), format!("Finding {} was closed", finding.number)));
    }
    changed
}
