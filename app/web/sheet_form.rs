//! Forms made from the field table: one for every sheet; groups of fields, rating columns side by side, changes read back.

use crate::components::{FieldInput, field, input_id};
use crate::posted::Posted;
use commissioning::journal::Change;
use commissioning::plant::{Field, FieldKind, Place, Sheet, Slot, fields};
use commissioning::{FieldError, Typed};
use maud::{Markup, html};
use std::collections::BTreeMap;

/// The values of a sheet, as a site or a drive holds them.
pub type Values = BTreeMap<Place, Slot<Option<Typed>>>;

/// A form that came back: what was typed, and what was wrong with it.
#[derive(Clone, Copy, Debug, Default)]
pub struct Back<'a> {
    /// As it was sent.
    pub posted: Option<&'a Posted>,
    /// Refused fields.
    pub errors: &'a [FieldError],
}

/// Every field of a sheet with its place, columns up to `columns`.
fn places(sheet: Sheet, columns: u8) -> Vec<(Place, &'static Field)> {
    let in_columns = (0..columns)
        .flat_map(|c| fields::in_columns(sheet).iter().map(move |f| (Place::in_column(sheet, c, f.key), f)));
    let once = fields::of(sheet).iter().map(|f| (Place::new(sheet, f.key), f));
    in_columns.chain(once).collect()
}

/// The columns a sheet shows: those in use, those asked for, at least one.
#[must_use]
pub fn columns(sheet: Sheet, values: &Values, posted: Option<&Posted>, asked: u8) -> u8 {
    let used = values
        .iter()
        .filter(|(p, s)| p.sheet == sheet && s.standing().iter().any(|r| r.value.is_some()))
        .map(|(p, _)| p.column + 1)
        .max();
    let sent = posted.map_or(0, |posted| {
        (0..sheet.columns())
            .filter(|c| {
                fields::in_columns(sheet).iter().any(|f| posted.has(&Place::in_column(sheet, *c, f.key).to_string()))
            })
            .count()
    });
    used.unwrap_or(1).max(asked).max(u8::try_from(sent).unwrap_or(1)).clamp(1, sheet.columns())
}

/// What the person changed: a field that still holds what it held when the form was shown was not touched, whatever
/// others have recorded there since.
#[must_use]
pub fn changes(sheet: Sheet, values: &Values, posted: &Posted) -> Vec<Change<(u8, String)>> {
    places(sheet, sheet.columns())
        .into_iter()
        .filter(|(place, _)| posted.has(&place.to_string()))
        .filter_map(|(place, f)| {
            let name = place.to_string();
            let (text, seen) = (posted.text(&name), posted.seen(&name));
            let unit =
                if matches!(f.kind, FieldKind::Quantity { .. }) { unit_of(f, posted, &name) } else { String::new() };
            let slot = values.get(&place);
            let was = slot
                .and_then(|slot| slot.standing().iter().chain(slot.earlier()).find(|r| seen.contains(&r.event)))
                .map(|r| r.value.as_ref());
            let untouched = match was.flatten() {
                Some(was) => was.text == text && was.unit.as_deref().unwrap_or_default() == unit,
                None => text.trim().is_empty(),
            };
            let chosen = seen.len() > 1;
            (chosen || !untouched).then(|| Change {
                place: (place.column, place.field),
                text: text.to_owned(),
                unit,
                instrument: None,
                photo: None,
                seen,
            })
        })
        .collect()
}

fn unit_of(f: &Field, posted: &Posted, name: &str) -> String {
    let sent = format!("{name}.unit");
    match f.kind {
        FieldKind::Quantity { unit, .. } if !posted.has(&sent) => unit.to_owned(),
        _ => posted.text(&sent).to_owned(),
    }
}

/// All inputs of a sheet, group by group. Rating columns come first: everything else is judged by them.
#[must_use]
pub fn inputs(sheet: Sheet, columns: u8, values: &Values, back: &Back<'_>) -> Markup {
    html! {
        @for (name, of_group) in groups(fields::in_columns(sheet)) {
            fieldset.group.columns data-columns=(columns) {
                legend { (name) }
                @if columns > 1 { div.heads aria-hidden="true" { @for c in 0..columns { span { "column " (c + 1) } } } }
                @for f in of_group {
                    div.across { @for c in 0..columns { (one(f, &Place::in_column(sheet, c, f.key), (columns > 1).then_some(c), values, back)) } }
                }
            }
        }
        @for group in groups(fields::of(sheet)) { (plain_group(sheet, &group, values, back)) }
    }
}

fn plain_group(
    sheet: Sheet,
    (name, of_group): &(&str, Vec<&'static Field>),
    values: &Values,
    back: &Back<'_>,
) -> Markup {
    html! {
        fieldset.group {
            @if !name.is_empty() { legend { (name) } }
            div.fields { @for f in of_group { (one(f, &Place::new(sheet, f.key), None, values, back)) } }
        }
    }
}

fn one(f: &Field, place: &Place, column: Option<u8>, values: &Values, back: &Back<'_>) -> Markup {
    let mut input = FieldInput::of(f, place.to_string()).standing(values.get(place));
    if let Some(column) = column {
        input.label = format!("{}, column {}", input.label, column + 1);
        if column > 0 {
            input.hint.clear();
            input.required = false;
        }
    }
    if let Some(posted) = back.posted {
        input = input.sent_back(posted, back.errors);
    }
    field(&input)
}

/// Fields by group, in the order of the table.
pub(crate) fn groups(fields: &'static [Field]) -> Vec<(&'static str, Vec<&'static Field>)> {
    let mut groups: Vec<(&str, Vec<&Field>)> = Vec::new();
    for f in fields {
        match groups.iter_mut().find(|(name, _)| *name == f.group) {
            Some((_, of_group)) => of_group.push(f),
            None => groups.push((f.group, vec![f])),
        }
    }
    groups
}

/// What a page says after a form was kept: how many `things` of what; nothing for what is no number.
#[must_use]
pub fn saved_words(what: &str, thing: &str, count: &str) -> Option<String> {
    match count.parse::<u16>().ok()? {
        0 => Some(format!("Nothing was changed: {what}.")),
        1 => Some(format!("Saved: {what}, one {thing} changed.")),
        n => Some(format!("Saved: {what}, {n} {thing}s changed.")),
    }
}

/// Whether any field of a sheet has a value, so that a form can overwrite one.
#[must_use]
pub fn has_values(sheet: Sheet, values: &Values) -> bool {
    values.iter().any(|(p, s)| p.sheet == sheet && s.standing().iter().any(|r| r.value.is_some()))
}

/// Why a value is overwritten: asked where a reading is replaced and after a first signature; offered, folded until asked,
/// where an `earlier` value stands.
#[must_use]
pub fn reason(back: &Back<'_>, earlier: bool) -> Markup {
    let none = Posted::default();
    let mut input = FieldInput::new("reason", "Reason for the change", crate::components::InputKind::Lines(500))
        .hint("Needed where a reading is replaced, and for every change once the record was signed; kept beside the earlier value.")
        .sent_back(back.posted.unwrap_or(&none), back.errors);
    input.focus = input.error.is_some();
    // A value that is hard to believe asks for a reason too, at its own field.
    let asked = input.error.is_some() || back.errors.iter().any(|e| e.message.contains("give a reason"));
    if !earlier && !asked && input.text.is_empty() {
        return html! {};
    }
    html! {
        details.reason open[asked || !input.text.is_empty()] { summary { "Give a reason for the change" } (field(&input)) }
    }
}

/// The refused fields, listed above the form with a link to each.
#[must_use]
pub fn summary(errors: &[FieldError]) -> Markup {
    faults(errors, "Nothing was recorded yet; what you typed is still here.")
}

/// A label with a capital, as the list begins with it.
fn titled(label: &str) -> String {
    let mut letters = label.chars();
    letters.next().map_or_else(String::new, |c| c.to_uppercase().collect::<String>() + letters.as_str())
}

/// What was wrong as it follows the label: "Reason: say why this is overwritten: ...".
fn in_list(e: &FieldError) -> String {
    let mut letters = e.message.chars();
    match letters.next() {
        Some(first) if e.field == "reason" => first.to_lowercase().collect::<String>() + letters.as_str(),
        _ => e.message.clone(),
    }
}

/// The same where something else of the form was recorded: `rest` says what became of the form.
#[must_use]
pub fn faults(errors: &[FieldError], rest: &str) -> Markup {
    html! {
        @if !errors.is_empty() {
            div.faults role="alert" tabindex="-1" {
                p { b { @if errors.len() == 1 { "One field needs attention." } @else { (errors.len()) " fields need attention." } } " " (rest) }
                ul { @for e in errors { li { a href=(format!("#{}", input_id(&e.field))) { (titled(&e.label)) } ": " (in_list(e)) } } }
            }
        }
    }
}
