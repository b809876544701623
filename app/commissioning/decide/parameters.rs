//! The parameter record: setting values, and adding free rows.

use super::Surroundings;
use super::changes::{Form, Weighed, as_typed, same};
use super::directions;
use super::words::{self, Errors};
use super::writer::Writer;
use crate::journal::{Act, Chain, Change, Event, Fact};
use crate::plant::{Field, FieldKind, Slot};
use crate::record::{ParameterColumn, ParameterPlace, Record, functions};
use crate::{Refusal, Typed};
use std::collections::BTreeSet;

/// Most free rows of a parameter record.
const MOST_ROWS: usize = 500;

/// Sets values of the parameter record.
pub(super) fn set(
    act: &Act,
    around: &Surroundings<'_>,
    changes: &[Change<ParameterPlace>],
    reason: &str,
) -> Result<Vec<Event>, Refusal> {
    let (drive, record) = around.record_in_progress(act)?;
    let view = around.view(drive, record)?;
    let mut form = Form::of(changes.len())?;
    let mut sent = BTreeSet::new();
    let mut done = Vec::new();
    for change in changes {
        let place = &change.place;
        let name = name(place);
        let Some((label, _)) = described(record, place) else {
            form.errors.add(
                name,
                place.function.as_str(),
                "There is no such row in the parameter record. Load the page again.",
            );
            continue;
        };
        if !sent.insert(place.clone()) {
            form.errors.add(name, label, "This field was sent twice. Load the page again.");
            continue;
        }
        let slot = record.parameters.get(place);
        if let Some([only]) = slot.map(Slot::standing)
            && same(only.value.as_ref(), &as_typed(&change.text), &change.unit)
        {
            continue;
        }
        let Some(value) = form.errors.keep(&name, &label, understand(record, change)) else { continue };
        let mine = (value.clone(), change.seen.as_slice());
        let weighed = form.weigh(&name, &label, slot, mine, |stands| *stands == value, Clone::clone);
        if let Weighed::Change { supersedes } = weighed {
            let overwrites = slot.is_some_and(|s| s.standing().iter().any(|r| r.value.is_some()));
            if overwrites && record.ever_signed {
                form.overwrites(&label);
            }
            done.push((place.clone(), value, supersedes));
        }
    }
    form.settle(reason)?;
    let mut writer = Writer::new(act, around);
    let set: Vec<_> = done.iter().map(|(place, value, _)| (place, value.as_ref())).collect();
    if let Some(step) = directions::voided_by(&view, record, &set) {
        writer.add(Chain::Drive(drive.id), Fact::DirectionsVoided { step });
    }
    for (place, value, supersedes) in done {
        writer.put(Chain::Drive(drive.id), Fact::ParameterSet { place, value }, supersedes, reason);
    }
    Ok(writer.done())
}

/// Adds a free row.
pub(super) fn add_row(act: &Act, around: &Surroundings<'_>, label: &str) -> Result<Vec<Event>, Refusal> {
    let (drive, record) = around.record_in_progress(act)?;
    let mut errors = Errors::default();
    let label = errors.keep("label", "what it sets", words::line(label, 80)).unwrap_or_default();
    let lower = label.to_lowercase();
    let known = functions::FUNCTIONS.iter().map(|f| f.label).chain(record.free_rows.iter().map(|(_, l)| l.as_str()));
    if known.into_iter().any(|l| l.to_lowercase() == lower) {
        errors.add(
            "label",
            "what it sets",
            "The parameter record has this row already. Use it, or choose another name.",
        );
    }
    errors.none()?;
    if record.free_rows.len() >= MOST_ROWS {
        return Err(Refusal::not_now(format!(
            "A parameter record has at most {MOST_ROWS} free rows. Attach the drive's own file instead."
        )));
    }
    let mut writer = Writer::new(act, around);
    let key = format!("row-{}", record.free_rows.len() + 1);
    writer.add(Chain::Drive(drive.id), Fact::ParameterRowAdded { key, label });
    Ok(writer.done())
}

/// As forms name the place.
pub(crate) fn name(place: &ParameterPlace) -> String {
    format!("{}.{}", place.function, place.column.key())
}

/// The label of a place and the kind of its value; `None` when there is no such row.
fn described(record: &Record, place: &ParameterPlace) -> Option<(String, FieldKind)> {
    let (label, kind) = match functions::find(&place.function) {
        Some(function) => (function.label, function.kind),
        None => (record.free_rows.iter().find(|(k, _)| *k == place.function)?.1.as_str(), FieldKind::Text(120)),
    };
    let kind = match place.column {
        ParameterColumn::Code => FieldKind::Text(40),
        ParameterColumn::Explanation => FieldKind::Text(400),
        ParameterColumn::AsFound | ParameterColumn::Intended | ParameterColumn::AsLeft => kind,
    };
    Some((format!("{label}, {}", place.column.words()), kind))
}

/// Understands what was typed at a place.
pub(crate) fn understand(record: &Record, change: &Change<ParameterPlace>) -> Result<Option<Typed>, String> {
    let (_, kind) = described(record, &change.place).ok_or("There is no such row in the parameter record.")?;
    let label = functions::find(&change.place.function).map_or("this value", |f| f.label);
    let field = Field { key: "", label, hint: "", group: "", kind, required: false };
    field.understand(&as_typed(&change.text), &change.unit)
}
