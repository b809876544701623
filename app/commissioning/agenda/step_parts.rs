//! Where a step stands: what was entered, what is missing, whether it waits for isolation.

use super::{StepAgenda, StepState, parameters};
use crate::judge::View;
use crate::plant::{Place, Sheet, fields};
use crate::procedure::{Item, Step, applies};
use crate::record::{EntryPlace, Record, SettledOtherwise};
use std::collections::BTreeSet;

/// The step as it stands.
pub(super) fn of(view: &View<'_>, step: &Step, flags: &BTreeSet<String>) -> StepAgenda {
    let record = view.drive.record.as_ref();
    let missing = missing(view, step, flags);
    let state = match record.and_then(|r| r.otherwise.get(&step.id)) {
        Some(settled) => match &settled.value {
            (SettledOtherwise::NotApplicable, reason) => StepState::NotApplicable(reason.clone()),
            (SettledOtherwise::CouldNotBeDone, reason) => StepState::CouldNotBeDone(reason.clone()),
        },
        None => {
            let anything = begun(view, step);
            let asks =
                step.sheet.is_some() || step.parameters.is_some() || required(step, flags, true).next().is_some();
            match (missing.is_empty(), anything) {
                (true, _) if asks => StepState::Settled,
                // Nothing at this step must be entered: it is settled once somebody was there.
                (true, true) => StepState::Settled,
                (false, true) => StepState::Begun,
                _ => StepState::Open,
            }
        }
    };
    let isolated = record.is_some_and(Record::isolated);
    StepAgenda {
        id: step.id.clone(),
        title: step.title.clone(),
        missing: if state.is_settled() { Vec::new() } else { missing },
        waits_for_isolation: step.needs_isolation && !isolated && !state.is_settled(),
        state,
    }
}

/// The items that must be entered; `alone` tells whether the step is left alone (`not-needed`).
pub(crate) fn required<'a>(step: &'a Step, flags: &'a BTreeSet<String>, alone: bool) -> impl Iterator<Item = &'a Item> {
    step.items.iter().filter(move |i| !may_stay_empty(i, alone) && applies(&i.when, flags))
}

const fn may_stay_empty(item: &Item, alone: bool) -> bool {
    item.optional && (alone || !item.left_alone_only)
}

/// Every place of an item: one, or one a row.
pub(crate) fn places(step: &Step, item: &Item) -> impl Iterator<Item = EntryPlace> {
    let rows = u16::try_from(step.rows.len().max(1)).unwrap_or(u16::MAX);
    let key = item.key.clone();
    (0..rows).map(move |row| EntryPlace::in_row(key.clone(), row))
}

/// The label of a place: the item's, with the row's where there are rows.
pub(crate) fn label(step: &Step, item: &Item, row: u16) -> String {
    match step.rows.get(usize::from(row)) {
        Some(name) => format!("{}, {name}", item.label),
        None => item.label.clone(),
    }
}

fn missing(view: &View<'_>, step: &Step, flags: &BTreeSet<String>) -> Vec<String> {
    let record = view.drive.record.as_ref();
    let mut missing = Vec::new();
    let alone = step
        .left_alone(|item| record.and_then(|r| r.entry(&EntryPlace::new(item))).map(|e| e.value.value.text.as_str()));
    for item in step.items.iter().filter(|i| applies(&i.when, flags)) {
        for place in places(step, item) {
            let label = label(step, item, place.row);
            if record.and_then(|r| r.entries.get(&place)).is_some_and(|s| s.needs_choice()) {
                missing.push(format!("{label}: needs a choice"));
            } else if !may_stay_empty(item, alone) && record.and_then(|r| r.observed(&place)).is_none() {
                missing.push(label);
            }
        }
    }
    if let Some(sheet) = step.sheet.as_deref().and_then(Sheet::from_key) {
        missing.extend(missing_fields(view, sheet));
    }
    if let Some(group) = &step.parameters {
        missing.extend(parameters::left_of_group(record, group));
    }
    missing
}

/// Labels of a sheet's required fields that do not stand. What the drive's supply sheet leaves open, the site's may say.
fn missing_fields(view: &View<'_>, sheet: Sheet) -> Vec<String> {
    let required = fields::of(sheet).iter().chain(fields::in_columns(sheet)).filter(|f| f.required);
    required
        .filter(|field| {
            let place = Place::new(sheet, field.key);
            let own = view.drive.field(&place).is_some();
            let of_site = matches!(sheet, Sheet::Site | Sheet::Supply)
                && view.site.fields.get(&place).and_then(|s| s.current()).is_some_and(|r| r.value.is_some());
            !own && !of_site
        })
        .map(|field| field.label.to_owned())
        .collect()
}

fn begun(view: &View<'_>, step: &Step) -> bool {
    let record = view.drive.record.as_ref();
    let entered = step
        .items
        .iter()
        .flat_map(|i| places(step, i))
        .any(|p| record.and_then(|r| r.entries.get(&p)).is_some_and(|s| !s.standing().is_empty()));
    let sheet = step.sheet.as_deref().and_then(Sheet::from_key);
    let filled = sheet.is_some_and(|sheet| {
        view.drive.fields.iter().any(|(p, s)| p.sheet == sheet && s.current().is_some_and(|r| r.value.is_some()))
    });
    let keyed = match (&step.parameters, record) {
        (Some(group), Some(record)) => parameters::begun(record, group),
        _ => false,
    };
    entered || filled || keyed
}
