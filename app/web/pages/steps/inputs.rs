//! The inputs of a step: the one reading of a screen, a list of items, or rows of a table.

use super::at::{StepAt, asked_again, items, name, places};
use super::{instruments, picture, tick};
use crate::clock_words::moment;
use crate::components::{FieldInput, InputKind, earlier_values, field, state_line};
use crate::links;
use crate::sheet_form::Back;
use crate::visitor::Signed;
use commissioning::FieldError;
use commissioning::plant::{Recorded, Slot};
use commissioning::procedure::{Item, ItemKind, Step};
use commissioning::record::{Entry, EntryPlace};
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
    /// Shown as words to somebody who may not record here.
    pub fixed: bool,
    /// Who and when is said once above, for all of them.
    pub said: bool,
}

/// All inputs.
#[must_use]
pub fn all(i: &Inputs<'_>) -> Markup {
    let items = items(&i.at.at, i.step);
    let alone = |item: &Item| instruments::kind(item).is_some_and(|k| !instruments::shared(i.at, i.step).contains(&k));
    let shared = if i.fixed {
        html! {}
    } else {
        instruments::shared_selects(i.signed, i.at, i.step, i.back.posted)
    };
    let everywhere: Vec<EntryPlace> = items.iter().flat_map(|item| places(i.step, item)).collect();
    let line = same_line(i, &everywhere);
    let i = &Inputs { said: line.is_some(), ..*i };
    html! {
        @if let Some(line) = &line { p.state.for-all { (line) } }
        @if i.step.rows.is_empty() {
            div.items {
                @for side_by_side in groups(&items, &alone) {
                    @match side_by_side.as_slice() {
                        [item] => {
                            @let place = EntryPlace::new(item.key.clone());
                            (one(i, item, &place, is_main(&items, item)))
                            @if alone(item) && !i.fixed { (own_instrument(i, item, &place)) }
                        }
                        several => (in_a_row(i, several)),
                    }
                }
            }
            (shared)
        } @else {
            (shared)
            @for (n, row) in i.step.rows.iter().enumerate() {
                @let cells: Vec<(&Item, EntryPlace)> = items.iter().flat_map(|item| places(i.step, item).filter(|p| usize::from(p.row) == n).map(|p| (*item, p))).collect();
                fieldset.table-row { legend { (row) } (cells_of(i, &cells)) }
            }
        }
    }
}

fn in_a_row(i: &Inputs<'_>, items: &[&Item]) -> Markup {
    let cells: Vec<(&Item, EntryPlace)> = items.iter().map(|item| (*item, EntryPlace::new(item.key.clone()))).collect();
    cells_of(i, &cells)
}

/// Cells beside each other, with who and when once below them where that is the same for all.
fn cells_of(i: &Inputs<'_>, cells: &[(&Item, EntryPlace)]) -> Markup {
    let line = if i.said { None } else { same_line(i, &cells.iter().map(|(_, p)| p.clone()).collect::<Vec<_>>()) };
    let within = Inputs { said: i.said || line.is_some(), ..*i };
    html! {
        div.cells { @for (item, place) in cells { (one(&within, item, place, false)) } }
        @if let Some(line) = line { p.state.for-all { (line) } }
    }
}

fn slot<'a>(i: &Inputs<'a>, place: &EntryPlace) -> Option<&'a Slot<Entry>> {
    i.at.at.drive.record.as_ref().and_then(|r| r.entries.get(place))
}

/// Who recorded what stands at several places and when, where that is the same for all of them.
fn same_line(i: &Inputs<'_>, places: &[EntryPlace]) -> Option<String> {
    let filled: Vec<(&EntryPlace, &Slot<Entry>)> =
        places.iter().filter_map(|p| Some((p, slot(i, p)?))).filter(|(_, s)| !s.standing().is_empty()).collect();
    if filled.len() < 2 || filled.iter().any(|(p, s)| s.needs_choice() || asked_again(&i.at.at, i.step, p)) {
        return None;
    }
    let mut lines = filled.iter().filter_map(|(_, s)| s.current()).map(|r| (moment(r.received), r.by_name.as_str()));
    let first = lines.next()?;
    lines.all(|line| line == first).then(|| format!("recorded {} · {}", first.0, first.1))
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
    if i.fixed {
        return fixed(i, item, place);
    }
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

/// What stands, in words.
fn fixed(i: &Inputs<'_>, item: &Item, place: &EntryPlace) -> Markup {
    let entry = slot(i, place).and_then(|s| s.current()).map(|r| &r.value);
    let mut input = filled(i, item, place, InputKind::Line(0)).fixed();
    input.text = entry.map(|e| words(item, e)).unwrap_or_default();
    html! {
        (field(&input))
        @if let Some(photo) = entry.and_then(|e| e.photo.as_ref()) {
            div.picture { figure {
                img src=(links::photo(&photo.hash)) alt=(format!("Picture for “{}”", item.label)) loading="lazy";
                figcaption { a href=(links::photo_original(&photo.hash)) { "original" } }
            } }
        }
    }
}

/// The field with what stands or what was sent.
pub(super) fn filled(i: &Inputs<'_>, item: &Item, place: &EntryPlace, kind: InputKind) -> FieldInput {
    let mut input = FieldInput::new(name(place), item.label.clone(), kind).hint(&item.hint);
    input.required = !item.optional;
    if let ItemKind::Reading { quantity, unit, .. } = &item.kind {
        input.unit = unit.clone().unwrap_or_else(|| quantity.usual().symbol.to_owned());
    }
    if let Some(slot) = slot(i, place) {
        input.seen = slot.seen();
        let again = asked_again(&i.at.at, i.step, place);
        if let (Some(entry), false) = (slot.current(), again) {
            input.text.clone_from(&entry.value.value.text);
            if let Some(unit) = &entry.value.value.unit {
                input.unit.clone_from(unit);
            }
        }
        input.state = Some(state(i, item, slot, again)).filter(|state| !state.0.trim().is_empty());
    }
    match i.back.posted {
        Some(posted) => input.sent_back(posted, i.back.errors),
        None => input,
    }
}

/// The state line of a place; who and when is left out where one line says it for all.
fn state(i: &Inputs<'_>, item: &Item, slot: &Slot<Entry>, again: bool) -> Markup {
    html! {
        @if again { strong { "asked again: " } @for r in slot.standing() { (words(item, &r.value)) " " } "· " }
        @if i.said { (earlier_values(slot.earlier(), |e| words(item, e))) }
        @else { (state_line(slot.standing(), slot.earlier(), |e| words(item, e))) }
        @if let Some(entry) = slot.current() { (marks(entry)) }
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
