//! Unsaved input laid over a drive, so that live verdicts see what is being typed.

use super::{Drive, EntryPlace, ParameterPlace, Record};
use crate::agenda::step_parts;
use crate::decide::{entry_value, field_at, parameters};
use crate::journal::Change;
use crate::judge::View;
use crate::people::Installation;
use crate::plant::{Place, Recorded, Sheet, Slot};
use crate::{EventId, FieldError, PersonId, Timestamp};

/// The drive with these entries of a step as if recorded, and what could not be understood.
#[must_use]
pub fn with_entries(
    drive: &Drive,
    view: &View<'_>,
    step: &str,
    changes: &[Change<EntryPlace>],
    installation: &Installation,
    now: Timestamp,
) -> (Drive, Vec<FieldError>) {
    let (mut draft, mut errors) = (drive.clone(), Vec::new());
    let Some((_, step)) = view.procedure.step(step) else { return (draft, errors) };
    let record = draft.record.get_or_insert_with(|| Record::begun(view.procedure.version, now, ""));
    for change in changes {
        let Some(item) = step.items.iter().find(|i| i.key == change.place.item) else { continue };
        let label = step_parts::label(step, item, change.place.row);
        let standing = record.entry(&change.place).map(|e| e.value.clone());
        match entry_value::understand(item, change, standing.as_ref(), installation) {
            Ok(understood) => {
                let slot = record.entries.entry(change.place.clone()).or_default();
                let seen = slot.seen();
                match understood.entry {
                    Some(entry) => slot.put(unsaved(entry, now), &seen),
                    None => slot.take_back(unsaved((), now), &seen),
                }
            }
            Err((part, message)) => {
                let field = format!("{}.{}{part}", change.place.item, change.place.row);
                errors.push(FieldError { field, label, message });
            }
        }
    }
    (draft, errors)
}

/// The drive with these fields of a sheet as if recorded, and what could not be understood.
#[must_use]
pub fn with_fields(drive: &Drive, sheet: Sheet, changes: &[Change<(u8, String)>]) -> (Drive, Vec<FieldError>) {
    let (mut draft, mut errors) = (drive.clone(), Vec::new());
    for change in changes {
        let place = Place::in_column(sheet, change.place.0, change.place.1.clone());
        let Some(field) = field_at(&place) else { continue };
        match field.understand(&change.text, &change.unit) {
            Ok(value) => over(draft.fields.entry(place).or_default(), value, drive.last_change),
            Err(message) => {
                errors.push(FieldError { field: place.to_string(), label: field.label.to_owned(), message });
            }
        }
    }
    (draft, errors)
}

/// The drive with these parameters as if recorded, and what could not be understood.
#[must_use]
pub fn with_parameters(drive: &Drive, changes: &[Change<ParameterPlace>]) -> (Drive, Vec<FieldError>) {
    let (mut draft, mut errors) = (drive.clone(), Vec::new());
    let Some(record) = draft.record.as_mut() else { return (draft, errors) };
    for change in changes {
        match parameters::understand(record, change) {
            Ok(value) => over(record.parameters.entry(change.place.clone()).or_default(), value, drive.last_change),
            Err(message) => {
                let label = super::functions::find(&change.place.function).map_or("free row", |f| f.label);
                let label = format!("{label}, {}", change.place.column.words());
                errors.push(FieldError { field: parameters::name(&change.place), label, message });
            }
        }
    }
    (draft, errors)
}

fn over<T>(slot: &mut Slot<T>, value: T, now: Timestamp) {
    let seen = slot.seen();
    slot.put(unsaved(value, now), &seen);
}

/// A value that nobody has recorded yet: it stands as the newest of all.
fn unsaved<T>(value: T, now: Timestamp) -> Recorded<T> {
    Recorded {
        value,
        event: EventId("unsaved".to_owned()),
        sequence: u64::MAX,
        by: PersonId(uuid::Uuid::nil()),
        by_name: String::new(),
        received: now,
        tablet: None,
        reason: None,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::record::ParameterColumn;
    use crate::world::*;

    fn change<P>(place: P, text: &str) -> Change<P> {
        Change { place, text: text.into(), unit: String::new(), instrument: None, photo: None, seen: Vec::new() }
    }

    #[test]
    fn what_is_typed_stands_in_the_draft_and_faults_are_told() {
        let world = World::complete();
        let changes = [change(EntryPlace::new("ir-60s"), "7"), change(EntryPlace::new("no-such-item"), "7")];
        let (draft, errors) =
            with_entries(world.drive(), &world.view(), "insulation", &changes, &world.installation, world.now());
        let record = draft.record.unwrap();
        assert_eq!(record.entry(&EntryPlace::new("ir-60s")).unwrap().value.value.shown(), "7 MΩ");
        assert!(errors.is_empty());
        let wrong = [change(EntryPlace::new("ir-60s"), "seven")];
        let (draft, errors) =
            with_entries(world.drive(), &world.view(), "insulation", &wrong, &world.installation, world.now());
        assert_eq!(draft, *world.drive(), "what cannot be understood changes nothing");
        assert_eq!(errors[0].field, "ir-60s.0");
        let emptied = [change(EntryPlace::new("ir-60s"), "")];
        let (draft, _) =
            with_entries(world.drive(), &world.view(), "insulation", &emptied, &world.installation, world.now());
        assert!(draft.record.unwrap().entry(&EntryPlace::new("ir-60s")).is_none());
    }

    #[test]
    fn a_draft_needs_no_record_and_covers_fields_and_parameters() {
        let world = World::new();
        let changes = [change(EntryPlace::new("bus-after-waiting"), "12")];
        let (draft, _) =
            with_entries(world.drive(), &world.view(), "prove-dead", &changes, &world.installation, world.now());
        assert!(draft.record.is_some() && world.drive().record.is_none());
        let fields = [change((0, "volts".to_owned()), "690"), change((0, "amps".to_owned()), "many")];
        let (draft, errors) = with_fields(world.drive(), Sheet::Motor, &fields);
        assert_eq!(draft.field(&Place::new(Sheet::Motor, "volts")).unwrap().shown(), "690 V");
        assert_eq!(errors[0].field, "motor.0.amps");
        let world = World::begun();
        let place = |column| ParameterPlace { function: "acceleration-time".into(), column };
        let changes = [change(place(ParameterColumn::AsLeft), "9"), change(place(ParameterColumn::Intended), "soon")];
        let (draft, errors) = with_parameters(world.drive(), &changes);
        assert!(draft.record.unwrap().parameter(&place(ParameterColumn::AsLeft)).is_some());
        assert_eq!(errors[0].field, "acceleration-time.intended");
    }
}
