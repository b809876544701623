//! Directions and the setting that turns them: a changed output sequence makes what was seen before void.

use crate::Typed;
use crate::judge::View;
use crate::record::{EntryPlace, ParameterColumn, ParameterPlace, Record, functions};

/// The setting that exchanges two phases at the drive's output.
const SEQUENCE: &str = "output-phase-order";
/// What a drive gives as long as nobody set anything else.
const PLAIN: &str = "u-v-w";
/// The choice at the exchange by which a direction was put right with the setting.
const BY_SETTING: &str = "by-setting";

/// The step at which directions become void because these settings change the output sequence; `None` where they do
/// not, where nothing was seen yet, or where the exchange already says that it was made by this setting.
pub(super) fn voided_by(view: &View<'_>, record: &Record, set: &[(&ParameterPlace, Option<&Typed>)]) -> Option<String> {
    let seen = |place: &EntryPlace| place.is_direction() && record.observed(place).is_some();
    if !record.entries.keys().any(seen) {
        return None;
    }
    let at = |column| ParameterPlace { function: SEQUENCE.to_owned(), column };
    let before = |column| record.parameter(&at(column)).map(|v| v.text.as_str());
    let after = |column| {
        let sent = set.iter().find(|(place, _)| **place == at(column));
        sent.map_or_else(|| before(column), |(_, value)| value.map(|v| v.text.as_str()))
    };
    let was = before(ParameterColumn::AsLeft).or_else(|| before(ParameterColumn::Intended)).unwrap_or(PLAIN);
    let now = after(ParameterColumn::AsLeft).or_else(|| after(ParameterColumn::Intended)).unwrap_or(PLAIN);
    if was == now || (now != PLAIN && noted(view, record)) {
        return None;
    }
    let group = functions::find(SEQUENCE).map(|f| f.group);
    let step = view.procedure.steps().map(|(_, s)| s).find(|s| s.parameters.as_deref() == group);
    Some(step.map(|s| s.id.clone()).unwrap_or_default())
}

/// Whether a step that voids directions says that the exchange was made by the setting: it voided them already.
fn noted(view: &View<'_>, record: &Record) -> bool {
    let exchanges = view.procedure.steps().map(|(_, s)| s).filter(|s| s.voids_directions);
    let chosen = |item: &str| record.entry(&EntryPlace::new(item)).is_some_and(|e| e.value.value.text == BY_SETTING);
    exchanges.flat_map(|s| &s.items).any(|i| chosen(&i.key))
}
