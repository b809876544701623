//! What Asleft is not for: said plainly and refused, since its checks would be wrong there.

use crate::Typed;
use crate::plant::{Place, Sheet};

/// Highest voltage of a low-voltage drive, in volts AC.
const LOW_VOLTAGE: f64 = 1_000.0;

/// Why a value puts the drive outside the scope, in a sentence; `None` when it does not.
#[must_use]
pub(super) fn refused(place: &Place, value: &Typed) -> Option<String> {
    let sentence = match (place.sheet, place.field.as_str(), value.text.as_str()) {
        (Sheet::Motor, "machine", "induction")
        | (Sheet::Supply, "feed", "three-phase")
        | (Sheet::DrivePlate, "converter", "diode" | "active") => return None,
        (Sheet::Motor, "machine", _) => {
            "Asleft is for three-phase induction motors: permanent-magnet and reluctance motors generate when turned, \
             and its checks would be wrong for them. Keep this drive's record elsewhere."
        }
        (Sheet::Supply, "feed", "single-phase") => {
            "Asleft is for drives with a three-phase input: its supply and DC-bus checks would be wrong for a \
             single-phase one. Keep this drive's record elsewhere."
        }
        (Sheet::Supply, "feed", _) => {
            "Asleft is for drives with a DC bus of their own: on a common DC bus its bus and braking checks would be \
             wrong. Keep this drive's record elsewhere."
        }
        (Sheet::DrivePlate, "converter", _) => {
            "Asleft is for voltage-source drives with a diode or active input: its DC-bus checks would be wrong for \
             this one. Keep this drive's record elsewhere."
        }
        (Sheet::Motor | Sheet::Supply, "volts", _)
        | (Sheet::DrivePlate, "input-volts-low" | "input-volts-high" | "output-volts", _)
            if value.number().is_some_and(|volts| volts > LOW_VOLTAGE) =>
        {
            "Asleft is for low voltage, at most 1000 V AC: above that its insulation and supply checks would be wrong. \
             Check the figure and its unit."
        }
        _ => return None,
    };
    Some(sentence.to_owned())
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::plant::fields;
    use engineering::Kind;

    /// Every key named here must be a field: a renamed field must not open the scope in silence.
    #[test]
    fn every_field_of_the_scope_exists_and_refuses_what_is_outside() {
        for (sheet, key, right, wrong) in [
            (Sheet::Motor, "machine", "induction", &["permanent-magnet", "reluctance", "other"][..]),
            (Sheet::Supply, "feed", "three-phase", &["single-phase", "common-dc-bus"]),
            (Sheet::DrivePlate, "converter", "diode", &["current-source", "matrix", "other"]),
            (Sheet::DrivePlate, "converter", "active", &[]),
        ] {
            let field = fields::find(sheet, key).expect(key);
            let place = Place::new(sheet, key);
            let value = |text: &str| field.understand(text, "").expect(text).expect(text);
            assert_eq!(refused(&place, &value(right)), None, "{key} {right}");
            for text in wrong {
                assert!(refused(&place, &value(text)).is_some_and(|s| s.contains("elsewhere")), "{key} {text}");
            }
        }
        for (sheet, key) in [
            (Sheet::Motor, "volts"),
            (Sheet::Supply, "volts"),
            (Sheet::DrivePlate, "input-volts-low"),
            (Sheet::DrivePlate, "input-volts-high"),
            (Sheet::DrivePlate, "output-volts"),
        ] {
            assert!(fields::find(sheet, key).is_some(), "{key}");
            let volts = |text: &str| Typed::quantity(text, "V", Kind::Voltage).expect(text);
            assert_eq!(refused(&Place::new(sheet, key), &volts("1000")), None);
            assert!(refused(&Place::new(sheet, key), &volts("1000.1")).is_some());
        }
    }
}
