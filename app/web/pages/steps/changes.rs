//! What a step's form changes: a field that still holds what it held when the form was shown was not touched.

use super::at::{StepAt, asked_again, items, kept, name, names_instrument, places};
use super::instruments;
use crate::PageError;
use crate::posted::Posted;
use commissioning::journal::Change;
use commissioning::procedure::{Item, ItemKind, Step};
use commissioning::record::{Entry, EntryPlace};
use commissioning::{EventId, InstrumentId};

/// The changes of a step's form.
///
/// # Errors
/// Never for a step that is there.
pub fn of(at: &StepAt, posted: &Posted) -> Result<Vec<Change<EntryPlace>>, PageError> {
    let (_, step) = at.step()?;
    let mut changes = Vec::new();
    for item in items(&at.at, step) {
        changes.extend(
            places(step, item)
                .filter(|place| posted.has(&name(place)))
                .filter_map(|place| one(at, step, item, place, posted)),
        );
    }
    Ok(changes)
}

fn one(at: &StepAt, step: &Step, item: &Item, place: EntryPlace, posted: &Posted) -> Option<Change<EntryPlace>> {
    let field = name(&place);
    let (text, seen) = (posted.text(&field).to_owned(), posted.seen(&field));
    let was = seen_entry(at, &place, &seen);
    let again = asked_again(&at.at, step, &place);
    let photo = kept(posted, &field);
    if text.trim().is_empty() && photo.is_none() && (again || seen.len() != 1) {
        // Nothing typed where nothing stood, where what stood is asked anew, or where a choice is still due.
        return None;
    }
    let unit = unit(item, posted, &field);
    let instrument = if names_instrument(item) { instruments::picked(item, posted, &field, was) } else { None };
    let same = was.is_some_and(|was| {
        let picture = photo.is_none() || was.photo.as_ref().map(|p| &p.hash) == photo.as_ref().map(|p| &p.hash);
        was.value.text == text
            && was.value.unit.as_deref().unwrap_or_default() == unit
            && instrument_of(was) == instrument
            && picture
    });
    (!same || again).then_some(Change { place, text, unit, instrument, photo, seen })
}

/// The entry that stood when the form was shown.
fn seen_entry<'a>(at: &'a StepAt, place: &EntryPlace, seen: &[EventId]) -> Option<&'a Entry> {
    let slot = at.at.drive.record.as_ref()?.entries.get(place)?;
    slot.standing().iter().chain(slot.earlier()).find(|r| seen.contains(&r.event)).map(|r| &r.value)
}

fn instrument_of(entry: &Entry) -> Option<InstrumentId> {
    entry.instrument.as_ref().map(|i| i.0.id)
}

fn unit(item: &Item, posted: &Posted, field: &str) -> String {
    let ItemKind::Reading { quantity, unit, .. } = &item.kind else { return String::new() };
    let sent = format!("{field}.unit");
    if posted.has(&sent) {
        return posted.text(&sent).to_owned();
    }
    unit.clone().unwrap_or_else(|| quantity.usual().symbol.to_owned())
}
