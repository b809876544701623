//! Setting fields of a site's and of a drive's sheets.

use super::changes::{Form, Weighed, as_typed, same};
use super::writer::Writer;
use super::{Surroundings, in_progress, scope};
use crate::journal::{Act, Chain, Change, Event, Fact};
use crate::plant::{Place, Sheet, Slot, fields};
use crate::{EventId, Refusal, Typed};
use std::collections::{BTreeMap, BTreeSet};

type Values = BTreeMap<Place, Slot<Option<Typed>>>;

/// A field with its new value and what that supersedes.
type Set = (Place, Option<Typed>, Vec<EventId>);

/// Sets fields of a site's sheet.
pub(super) fn of_site(
    act: &Act,
    around: &Surroundings<'_>,
    sheet: Sheet,
    changes: &[Change<(u8, String)>],
    reason: &str,
) -> Result<Vec<Event>, Refusal> {
    let site = around.site(act)?;
    if !matches!(sheet, Sheet::Site | Sheet::Supply) {
        return Err(Refusal::Unknown { what: format!("The sheet “{}” of a site", sheet.words()) });
    }
    let mut writer = Writer::new(act, around);
    for (place, value, supersedes) in weigh(sheet, changes, &site.fields, reason, false)? {
        writer.put(Chain::Site(site.id), Fact::SiteFieldSet { place, value }, supersedes, reason);
    }
    Ok(writer.done())
}

/// Sets fields of a drive's sheet.
pub(super) fn of_drive(
    act: &Act,
    around: &Surroundings<'_>,
    sheet: Sheet,
    changes: &[Change<(u8, String)>],
    reason: &str,
) -> Result<Vec<Event>, Refusal> {
    let drive = around.drive(act)?;
    if sheet == Sheet::Site {
        return Err(Refusal::Unknown { what: "The sheet “Site” of a drive".to_owned() });
    }
    if let Some(record) = &drive.record {
        in_progress(record)?;
    }
    let signed = drive.record.as_ref().is_some_and(|r| r.ever_signed);
    let mut writer = Writer::new(act, around);
    for (place, value, supersedes) in weigh(sheet, changes, &drive.fields, reason, signed)? {
        writer.put(Chain::Drive(drive.id), Fact::FieldSet { place, value }, supersedes, reason);
    }
    Ok(writer.done())
}

/// What the changes of a form do; refused with every error or conflict together.
fn weigh(
    sheet: Sheet,
    changes: &[Change<(u8, String)>],
    values: &Values,
    reason: &str,
    ever_signed: bool,
) -> Result<Vec<Set>, Refusal> {
    let mut form = Form::of(changes.len())?;
    let mut sent = BTreeSet::new();
    let mut done = Vec::new();
    for change in changes {
        let place = Place::in_column(sheet, change.place.0, change.place.1.clone());
        let name = place.to_string();
        let Some(field) = field_at(&place) else {
            form.errors.add(name, place.field, "There is no such field on this sheet. Load the page again.");
            continue;
        };
        let label = label(&place, field.label);
        if !sent.insert(place.clone()) {
            form.errors.add(name, label, "This field was sent twice. Load the page again.");
            continue;
        }
        let (slot, text) = (values.get(&place), as_typed(&change.text));
        if let Some([only]) = slot.map(Slot::standing)
            && same(only.value.as_ref(), &text, &change.unit)
        {
            continue;
        }
        let understood = field.understand(&text, &change.unit);
        let understood = understood.and_then(|value| match value.as_ref().and_then(|v| scope::refused(&place, v)) {
            Some(sentence) => Err(sentence),
            None => Ok(value),
        });
        let Some(value) = form.errors.keep(&name, &label, understood) else { continue };
        let mine = (value.clone(), change.seen.as_slice());
        let weighed = form.weigh(&name, &label, slot, mine, |stands| *stands == value, Clone::clone);
        if let Weighed::Change { supersedes } = weighed {
            let overwrites = slot.is_some_and(|s| s.standing().iter().any(|r| r.value.is_some()));
            if overwrites && ever_signed {
                form.overwrites(&label);
            }
            done.push((place, value, supersedes));
        }
    }
    form.settle(reason)?;
    Ok(done)
}

/// The field of a place, if the place exists: columns belong to the fields of rating columns only.
pub(crate) fn field_at(place: &Place) -> Option<&'static crate::plant::Field> {
    let in_columns = fields::in_columns(place.sheet).iter().find(|f| f.key == place.field);
    match in_columns {
        Some(field) => (place.column < place.sheet.columns()).then_some(field),
        None => fields::of(place.sheet).iter().find(|f| f.key == place.field && place.column == 0),
    }
}

fn label(place: &Place, label: &str) -> String {
    if place.column == 0 { label.to_owned() } else { format!("{label}, rating column {}", place.column + 1) }
}
