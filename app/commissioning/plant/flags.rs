//! Fitted options: from the fields of the sheets to the flags that the procedure's `when` names.

use super::{FieldKind, Place, Sheet, Slot, fields};
use crate::Typed;
use std::collections::{BTreeMap, BTreeSet};

/// The flags that these fields set; a field in need of a choice sets none.
#[must_use]
pub fn flags_of(values: &BTreeMap<Place, Slot<Option<Typed>>>) -> BTreeSet<String> {
    let mut flags = BTreeSet::new();
    for (place, slot) in values {
        let Some(value) = slot.current().and_then(|r| r.value.as_ref()) else { continue };
        match fields::find(place.sheet, &place.field).map(|f| f.kind) {
            Some(FieldKind::Flag) if value.text == "yes" => {
                flags.insert(place.field.clone());
            }
            Some(FieldKind::Choice(_)) => {
                flags.insert(format!("{}:{}", place.field, value.text));
                if !matches!(value.text.as_str(), "none" | "no") {
                    flags.insert(place.field.clone());
                }
                if place.sheet == Sheet::Load && place.field == "kind" {
                    flags.insert(format!("load:{}", value.text));
                }
            }
            _ => {}
        }
    }
    flags
}
