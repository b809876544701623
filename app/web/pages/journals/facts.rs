//! What became true, in words.

use crate::pages::steps::inputs;
use crate::pages::steps::sheet::shown;
use commissioning::Typed;
use commissioning::journal::Fact;
use commissioning::plant::{FieldKind, Place, fields};
use commissioning::procedure::Procedure;
use commissioning::record::{EntryPlace, ParameterPlace, SettledOtherwise, functions};

/// A fact in words, with the labels of the procedure.
#[must_use]
pub fn words(fact: &Fact, procedure: &Procedure) -> String {
    let step = |id: &str| procedure.step(id).map_or_else(|| id.to_owned(), |(_, s)| s.title.clone());
    let phase = |id: &str| procedure.phase(id).map_or_else(|| id.to_owned(), |p| p.title.clone());
    match fact {
        Fact::SetUp { firm } => format!("set up for {firm}"),
        Fact::PersonKept { person } => format!("person {} ({}) kept", person.name, person.login),
        Fact::InstrumentKept { instrument } => format!("instrument {} kept", instrument.mark),
        Fact::ProcedureLoaded { procedure } => format!("procedure version {} loaded", procedure.version),
        Fact::SiteListed { tag, .. } => format!("site {tag} listed"),
        Fact::KeyRotated { .. } => "signing key changed".to_owned(),
        Fact::SiteCreated { tag, name } => format!("site {tag}, {name}, created"),
        Fact::DriveListed { tag, .. } => format!("drive {tag} listed"),
        Fact::DriveCreated { tag, name, .. } => format!("drive {tag}, {name}, created"),
        Fact::SiteFieldSet { place, value } | Fact::FieldSet { place, value } => field(place, value.as_ref()),
        Fact::RecordBegun { procedure } => format!("record begun with procedure version {procedure}"),
        Fact::EntryMade { place, entry, .. } => match procedure.item(&place.item) {
            Some((_, item)) => format!(
                "{}: {}{}",
                at(place, procedure),
                inputs::words(item, entry),
                if entry.out_of_order { ", out of order" } else { "" }
            ),
            None => format!("{}: {}", place.item, entry.value.shown()),
        },
        Fact::EntryTakenBack { place, .. } => format!("{}: taken back", at(place, procedure)),
        Fact::StepSettled { step: id, how: SettledOtherwise::NotApplicable } => {
            format!("step “{}” settled: does not apply", step(id))
        }
        Fact::StepSettled { step: id, how: SettledOtherwise::CouldNotBeDone } => {
            format!("step “{}” settled: could not be done", step(id))
        }
        Fact::StepResumed { step: id } => format!("step “{}” resumed", step(id)),
        Fact::IsolationEntered { .. } => "isolated and proved dead, in force from here on".to_owned(),
        Fact::IsolationLifted { .. } => "isolation lifted".to_owned(),
        Fact::DirectionsVoided { .. } => {
            "leads, channels or output sequence exchanged: directions seen before count as not observed".to_owned()
        }
        Fact::HoldReleased { phase: id, printed_name, .. } => {
            format!("hold point before “{}” released by {printed_name}", phase(id))
        }
        Fact::ParameterSet { place, value } => parameter(place, value.as_ref()),
        Fact::ParameterRowAdded { label, .. } => format!("free row “{label}” added to the parameter record"),
        Fact::FindingRaised { number, severity, text, .. } => {
            format!("finding {number} raised, {}: {text}", severity.words())
        }
        Fact::FindingSettled { how, .. } => format!("finding settled: {how}"),
        Fact::FindingAccepted { .. } => "finding accepted as it is".to_owned(),
        Fact::RemarkMade { step: id, text } if id.is_empty() => format!("remark: {text}"),
        Fact::RemarkMade { step: id, text } => format!("remark at “{}”: {text}", step(id)),
        Fact::Signed { meaning, revision, .. } => format!("signed as {}, revision {revision}", meaning.words()),
        Fact::Returned => "returned".to_owned(),
        Fact::Reopened { revision } => format!("reopened as revision {revision}"),
    }
}

fn at(place: &EntryPlace, procedure: &Procedure) -> String {
    let Some((step, item)) = procedure.item(&place.item) else { return place.item.clone() };
    let row = step.rows.get(usize::from(place.row)).map(|r| format!(", {r}")).unwrap_or_default();
    format!("{}, {}{row}", step.title, item.label)
}

fn field(place: &Place, value: Option<&Typed>) -> String {
    let known = fields::find(place.sheet, &place.field);
    let label = known.map_or(place.field.as_str(), |f| f.label);
    let column = if place.column > 0 { format!(", column {}", place.column + 1) } else { String::new() };
    let kind = known.map_or(FieldKind::Text(0), |f| f.kind);
    format!(
        "{}, {label}{column}: {}",
        place.sheet.words(),
        value.map_or_else(|| "taken back".to_owned(), |v| shown(kind, v))
    )
}

fn parameter(place: &ParameterPlace, value: Option<&Typed>) -> String {
    let label = functions::find(&place.function).map_or(place.function.as_str(), |f| f.label);
    format!(
        "Parameter record, {label}, {}: {}",
        place.column.words(),
        value.map_or_else(|| "taken back".to_owned(), Typed::shown)
    )
}
