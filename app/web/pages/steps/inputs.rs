//! The inputs of a step: the one reading of a screen, a list of items, or rows of a table.

use super::at::{StepAt, asked_again, items, name, places};
use super::{instruments, picture, tick};
use crate::components::{FieldInput, InputKind, field, state_line};
use crate::sheet_form::Back;
use crate::visitor::Signed;
use commissioning::plant::Recorded;
use commissioning::procedure::{Item, ItemKind, Step};
use commissioning::record::{Entry, EntryPlace};
use commissioning::{FieldError, Timestamp};
use maud::{Markup, html};

/// What the inputs of a step are made from.
#[derive(Clone, Copy, Debug)]
pub struct Inputs<'a> {
    /// For whom.
    pub signed: &'a Signed,
    /// Of which step.
    pub at: &'a StepAt,
    /// The step itself.
    pub step: &'a Step,
    /// A form that came back.
    pub back: Back<'a>,
    /// Now.
    pub now: Timestamp,
}

/// All inputs.
#[must_use]
pub fn all(i: &Inputs<'_>) -> Markup {
    let items = items(&i.at.at, i.step);
    let alone = |item: &Item| instruments::kind(item).is_some_and(|k| !instruments::shared(i.at, i.step).contains(&k));
    let shared = instruments::shared_selects(i.signed, i.at, i.step, i.back.posted);
    html! {
        @if i.step.rows.is_empty() {
            div.items {
                @for side_by_side in groups(&items, &alone) {
                    @match side_by_side.as_slice() {
                        [item] => {
                            @let place = EntryPlace::new(item.key.clone());
                            (one(i, item, &place, is_main(&items, item)))
                            @if alone(item) { (own_instrument(i, item, &place)) }
                        }
                        several => div.cells { @for item in several { (one(i, item, &EntryPlace::new(item.key.clone()), false)) } }
                    }
                }
            }
            (shared)
        } @else {
            (shared)
            @for (n, row) in i.step.rows.iter().enumerate() {
                fieldset.table-row {
                    legend { (row) }
                    div.cells {
                        @for item in &items {
                            @for place in places(i.step, item).filter(|p| usize::from(p.row) == n) { (one(i, item, &place, false)) }
                        }
                    }
                }
            }
        }
    }
}

/// Readings that follow each other and need no select of their own stand side by side.
fn groups<'a>(items: &[&'a Item], alone: &impl Fn(&Item) -> bool) -> Vec<Vec<&'a Item>> {
    let beside = |item: &Item| matches!(item.kind, ItemKind::Reading { .. }) && !alone(item) && !is_main(items, item);
    let mut groups: Vec<Vec<&Item>> = Vec::new();
    for item in items {
        match groups.last_mut() {
            Some(group) if beside(item) && group.last().is_some_and(|last| beside(last)) => group.push(item),
            _ => groups.push(vec![item]),
        }
    }
    groups
}

/// The one reading of the screen: the only one, or the only one that must be there.
fn is_main(items: &[&Item], item: &Item) -> bool {
    let readings: Vec<&&Item> = items.iter().filter(|i| matches!(i.kind, ItemKind::Reading { .. })).collect();
    let needed: Vec<&&&Item> = readings.iter().filter(|i| !i.optional).collect();
    match (readings.as_slice(), needed.as_slice()) {
        ([only], _) => only.key == item.key,
        (_, [only]) => only.key == item.key,
        _ => false,
    }
}

fn error_at<'a>(i: &Inputs<'a>, field: &str) -> Option<&'a FieldError> {
    i.back.errors.iter().find(|e| e.field == field)
}

fn own_instrument(i: &Inputs<'_>, item: &Item, place: &EntryPlace) -> Markup {
    let error = error_at(i, &format!("{}.instrument", name(place))).map(|e| e.message.as_str());
    instruments::own_select(i.signed, i.at, item, place, i.back.posted, error)
}

/// One item at one place.
fn one(i: &Inputs<'_>, item: &Item, place: &EntryPlace, big: bool) -> Markup {
    let kind = match &item.kind {
        ItemKind::Reading { quantity, .. } => InputKind::Quantity(*quantity),
        ItemKind::Choice { options } => {
            InputKind::Choice(options.iter().map(|o| (o.key.clone(), o.label.clone())).collect())
        }
        ItemKind::Confirmation => return tick::input(&filled(i, item, place, InputKind::Flag)),
        ItemKind::Photo => return picture::input(i, item, place),
        ItemKind::Note => InputKind::Lines(4000),
    };
    let mut input = filled(i, item, place, kind);
    input.big = big;
    field(&input)
}

/// The field with what stands or what was sent.
pub(super) fn filled(i: &Inputs<'_>, item: &Item, place: &EntryPlace, kind: InputKind) -> FieldInput {
    let mut input = FieldInput::new(name(place), item.label.clone(), kind).hint(&item.hint);
    input.required = !item.optional;
    if let ItemKind::Reading { quantity, unit, .. } = &item.kind {
        input.unit = unit.clone().unwrap_or_else(|| quantity.usual().symbol.to_owned());
    }
    if let Some(slot) = i.at.at.drive.record.as_ref().and_then(|r| r.entries.get(place)) {
        input.seen = slot.seen();
        let again = asked_again(&i.at.at, i.step, place);
        if let (Some(entry), false) = (slot.current(), again) {
            input.text.clone_from(&entry.value.value.text);
            if let Some(unit) = &entry.value.value.unit {
                input.unit.clone_from(unit);
            }
        }
        let line = state_line(slot.standing(), slot.earlier(), i.now, |e| words(item, e));
        input.state = Some(html! {
            @if again { strong { "asked again: " } @for r in slot.standing() { (words(item, &r.value)) " " } "· " }
            (line)
            @if let Some(entry) = slot.current() { (marks(entry)) }
        });
    }
    match i.back.posted {
        Some(posted) => input.sent_back(posted, i.back.errors),
        None => input,
    }
}

/// What an entry carries besides its value.
fn marks(recorded: &Recorded<Entry>) -> Markup {
    let entry = &recorded.value;
    html! {
        @if entry.out_of_order { " · out of order" }
        @if let Some(because) = &entry.accepted_because { " · believed because: " (because) }
        @else if let Some(reason) = &recorded.reason { " · reason: " (reason) }
    }
}

/// An entry as lists of values show it.
#[must_use]
pub fn words(item: &Item, entry: &Entry) -> String {
    let shown = match &item.kind {
        ItemKind::Choice { options } => {
            options.iter().find(|o| o.key == entry.value.text).map_or_else(|| entry.value.shown(), |o| o.label.clone())
        }
        ItemKind::Confirmation => "confirmed".to_owned(),
        ItemKind::Photo => entry
            .photo
            .as_ref()
            .map(|p| p.caption.clone())
            .filter(|c| !c.is_empty())
            .unwrap_or_else(|| "picture".to_owned()),
        _ => entry.value.shown(),
    };
    match &entry.instrument {
        Some(instrument) => format!("{shown}, {}", instrument.0.mark),
        None => shown,
    }
}
