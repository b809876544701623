//! Numbers in record.json follow from the text and unit beside them: nobody signs 812 MΩ over another number.

use super::{RecordFile, RecordPart};
use crate::Typed;
use crate::decide::field_at;
use crate::plant::FieldKind;
use crate::procedure::ItemKind;
use crate::record::{ParameterColumn, ParameterPlace, functions};
use engineering::Kind;

/// The first number that does not follow from its text and unit, in a sentence.
pub(super) fn of(file: &RecordFile, part: &RecordPart) -> Option<String> {
    let fields = file
        .site
        .fields
        .iter()
        .map(|f| ("site.fields", f))
        .chain((file.drive.fields.iter()).map(|f| ("drive.fields", f)));
    let fields = fields.flat_map(|(path, f)| {
        let kind = field_at(&f.place).and_then(|field| quantity(field.kind));
        f.slot.all().filter_map(move |r| Some((path, f.place.to_string(), r.value.as_ref()?, kind)))
    });
    let entries = part.entries.iter().flat_map(|e| {
        let kind = file.procedure.item(&e.place.item).and_then(|(_, item)| match item.kind {
            ItemKind::Reading { quantity, .. } => Some(quantity),
            _ => None,
        });
        let place = format!("{}.{}", e.place.item, e.place.row);
        e.slot.all().map(move |r| ("record.entries", place.clone(), &r.value.value, kind))
    });
    let parameters = part.parameters.iter().flat_map(|p| {
        let (kind, place) = (of_parameter(&p.place), crate::decide::parameters::name(&p.place));
        p.slot.all().filter_map(move |r| Some(("record.parameters", place.clone(), r.value.as_ref()?, kind)))
    });
    let mut all = fields.chain(entries).chain(parameters);
    all.find(|(.., typed, kind)| !follows(typed, *kind))
        .map(|(path, place, ..)| format!("{path}: the number at {place} does not follow from its text and unit."))
}

/// Whether the number is what the text means. A field that this version knows as no quantity may have been one, so that
/// any kind which has the unit may explain its number.
fn follows(typed: &Typed, kind: Option<Kind>) -> bool {
    let Some(unit) = typed.unit.as_deref() else { return typed.si.is_none() };
    let means = |kind: Kind| Typed::quantity(&typed.text, unit, kind).is_ok_and(|again| again == *typed);
    kind.map_or_else(|| Kind::ALL.iter().copied().any(means), means)
}

fn of_parameter(place: &ParameterPlace) -> Option<Kind> {
    match place.column {
        ParameterColumn::Code | ParameterColumn::Explanation => None,
        ParameterColumn::AsFound | ParameterColumn::Intended | ParameterColumn::AsLeft => {
            quantity(functions::find(&place.function)?.kind)
        }
    }
}

const fn quantity(kind: FieldKind) -> Option<Kind> {
    match kind {
        FieldKind::Quantity { kind, .. } => Some(kind),
        _ => None,
    }
}
