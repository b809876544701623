//! Which instrument: one select beside a lone reading, one for all readings of a kind at a step with many.

use super::at::{StepAt, items, name, names_instrument, places};
use crate::posted::Posted;
use crate::visitor::Signed;
use commissioning::InstrumentId;
use commissioning::people::Instrument;
use commissioning::procedure::{Item, ItemKind, Step};
use commissioning::record::{Entry, EntryPlace};
use engineering::Kind;
use maud::{Markup, html};

/// The kind of quantity an item reads.
#[must_use]
pub const fn kind(item: &Item) -> Option<Kind> {
    match &item.kind {
        ItemKind::Reading { quantity, instrument: true, .. } => Some(*quantity),
        _ => None,
    }
}

/// The form's name of the select that serves all readings of a kind.
#[must_use]
pub fn shared_name(kind: Kind) -> String {
    format!("instrument.{}", kind.words().replace(' ', "-"))
}

/// The kinds whose readings share a select at this step: several readings of a kind, or rows.
#[must_use]
pub fn shared(at: &StepAt, step: &Step) -> Vec<Kind> {
    let mut kinds: Vec<Kind> = Vec::new();
    let all: Vec<Kind> = items(&at.at, step).into_iter().filter_map(kind).collect();
    for one in &all {
        let several = all.iter().filter(|k| *k == one).count() > 1 || !step.rows.is_empty();
        if several && !kinds.contains(one) {
            kinds.push(*one);
        }
    }
    kinds
}

/// What a form says for one reading: its own select, else the shared one, which leaves alone what already stands
/// unless it was turned to another instrument.
#[must_use]
pub fn picked(item: &Item, posted: &Posted, field: &str, was: Option<&Entry>) -> Option<InstrumentId> {
    let own = format!("{field}.instrument");
    if posted.has(&own) {
        return posted.text(&own).parse().ok();
    }
    let shared = shared_name(kind(item)?);
    let (now, before) = (posted.text(&shared), posted.text(&format!("{shared}.shown")));
    match was {
        Some(was) if now == before => was.instrument.as_ref().map(|i| i.0.id),
        _ => now.parse().ok(),
    }
}

/// The instrument this person last used at this drive for a kind of quantity.
#[must_use]
pub fn last_used(signed: &Signed, at: &StepAt, kind: Kind) -> Option<InstrumentId> {
    let record = at.at.drive.record.as_ref()?;
    let procedure = &at.at.procedure;
    let of_kind = |place: &EntryPlace| procedure.item(&place.item).is_some_and(|(_, i)| self::kind(i) == Some(kind));
    let used = record
        .entries
        .iter()
        .filter(|(place, _)| of_kind(place))
        .flat_map(|(_, slot)| slot.standing().iter().chain(slot.earlier()));
    let mine =
        used.filter(|r| r.by == signed.person.id).filter_map(|r| Some((r.sequence, r.value.instrument.as_ref()?.0.id)));
    let (_, last) = mine.max_by_key(|(sequence, _)| *sequence)?;
    at.at.installation.instruments.get(&last).filter(|i| i.active && reads(i, kind)).map(|i| i.id)
}

/// Whether its data sheet says how well it reads this kind.
fn reads(instrument: &Instrument, kind: Kind) -> bool {
    instrument.accuracy.iter().any(|row| row.kind == kind)
}

/// The selects that serve several readings, above them.
#[must_use]
pub fn shared_selects(signed: &Signed, at: &StepAt, step: &Step, posted: Option<&Posted>) -> Markup {
    html! {
        @for kind in shared(at, step) {
            @let name = shared_name(kind);
            @let shown = shown_for(signed, at, step, kind);
            @let chosen = posted.filter(|p| p.has(&name)).map_or_else(|| shown.clone(), |p| p.text(&name).to_owned());
            div.field.instrument {
                label for=(crate::components::input_id(&name)) { "Instrument for " (kind.words()) }
                (select(at, kind, &name, &chosen))
                input type="hidden" name=(format!("{name}.shown")) value=(posted.filter(|p| p.has(&name)).map_or(shown, |p| p.text(&format!("{name}.shown")).to_owned()));
            }
        }
    }
}

/// The instrument that stands at the readings of a kind here, else the last used.
fn shown_for(signed: &Signed, at: &StepAt, step: &Step, kind: Kind) -> String {
    let record = at.at.drive.record.as_ref();
    let readings = step.items.iter().filter(|i| self::kind(i) == Some(kind)).flat_map(|i| places(step, i));
    let standing = readings.filter_map(|p| record?.entry(&p)?.value.instrument.as_ref().map(|i| i.0.id)).next();
    standing.or_else(|| last_used(signed, at, kind)).map(|id| id.to_string()).unwrap_or_default()
}

/// The select beside a lone reading.
#[must_use]
pub fn own_select(
    signed: &Signed,
    at: &StepAt,
    item: &Item,
    place: &EntryPlace,
    posted: Option<&Posted>,
    error: Option<&str>,
) -> Markup {
    let Some(kind) = kind(item).filter(|_| names_instrument(item)) else { return html! {} };
    let name = format!("{}.instrument", name(place));
    let entry = at.at.drive.record.as_ref().and_then(|r| r.entry(place));
    let standing = entry.map(|e| e.value.instrument.as_ref().map(|i| i.0.id));
    let shown = standing.unwrap_or_else(|| last_used(signed, at, kind)).map(|id| id.to_string()).unwrap_or_default();
    let chosen = posted.filter(|p| p.has(&name)).map_or(shown, |p| p.text(&name).to_owned());
    html! {
        div.field.instrument.bad[error.is_some()] {
            label for=(crate::components::input_id(&name)) { "Instrument" }
            (select(at, kind, &name, &chosen))
            @if let Some(error) = error { p.error { (error) } }
        }
    }
}

/// Those that read this kind of quantity first, and of those whose calibration stands; then all others, so that one whose
/// accuracy nobody entered yet can be named too.
fn select(at: &StepAt, kind: Kind, name: &str, chosen: &str) -> Markup {
    let mut known: Vec<&Instrument> =
        at.at.installation.instruments.values().filter(|i| i.active || i.id.to_string() == chosen).collect();
    let fits = |i: &Instrument| reads(i, kind);
    let ran_out = |i: &Instrument| !i.due.is_empty() && i.due.as_str() < at.today.as_str();
    known.sort_by(|a, b| (!fits(a), ran_out(a), &a.mark).cmp(&(!fits(b), ran_out(b), &b.mark)));
    html! {
        select.input id=(crate::components::input_id(name)) name=(name) {
            option value="" { "none named" }
            @for i in known {
                option value=(i.id) selected[i.id.to_string() == chosen] {
                    (i.mark) " · " (i.description) @if ran_out(i) { " · calibration ran out on " (i.due) } @else if !i.due.is_empty() { " · due " (i.due) } @if !fits(i) { " · accuracy not known" }
                }
            }
        }
    }
}
