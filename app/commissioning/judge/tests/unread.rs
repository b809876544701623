//! A figure that nobody reads is a figure that somebody relied on: every field is read, or is kept for the reader on purpose.

use super::SOURCES;
use crate::plant::Sheet::{self, Cable, Drive, DrivePlate, Further, Load, Motor, Site, Supply};
use crate::plant::{FieldKind, fields};
use crate::procedure::built_in::built_in;

/// Fields that sheets and packages print for whoever reads them, and that no check, step or refusal takes up.
const KEPT_FOR_THE_READER: &[(Sheet, &str)] = &[
    (Site, "ambient-low"),
    (Supply, "hertz"),
    (Supply, "device-rating"),
    (Supply, "device-breaking"),
    (Supply, "residual-current-type"),
    (Supply, "residual-current"),
    (Supply, "other-drives"),
    (DrivePlate, "year"),
    (DrivePlate, "input-hertz-low"),
    (DrivePlate, "input-hertz-high"),
    (DrivePlate, "input-current"),
    (DrivePlate, "reactor"),
    (DrivePlate, "rated-power"),
    (DrivePlate, "output-hertz"),
    (DrivePlate, "switching-low"),
    (DrivePlate, "switching-high"),
    (DrivePlate, "trip-low"),
    (DrivePlate, "discharge-resistor"),
    (DrivePlate, "chopper-current"),
    (DrivePlate, "resistor-energy"),
    (DrivePlate, "resistor-duty"),
    (DrivePlate, "encoder-input-hertz"),
    (DrivePlate, "step-time"),
    (Motor, "service-factor-amps"),
    (Motor, "year"),
    (Motor, "duty"),
    (Motor, "altitude"),
    (Motor, "locked-rotor-current"),
    (Motor, "locked-rotor-torque"),
    (Motor, "mass"),
    (Motor, "direction"),
    (Motor, "winding-resistance"),
    (Motor, "winding-resistance-at"),
    (Motor, "no-load-current"),
    (Motor, "sensor-response"),
    (Motor, "heater-volts"),
    (Motor, "heater-power"),
    (Motor, "fan-volts"),
    (Motor, "fan-amps"),
    (Motor, "terminal-torque"),
    (Cable, "rated-volts"),
    (Cable, "ampacity"),
    (Cable, "peak-measured"),
    (Load, "reverse-harm"),
    (Load, "spinning-start"),
    (Further, "emergency-category"),
    (Further, "stop-category"),
    (Further, "encoder-signal"),
    (Further, "residual-delay"),
    (Further, "design-speed"),
    (Further, "design-current"),
    (Further, "design-output-volts"),
    (Further, "leakage-limit"),
    (Further, "bearing-rise-limit"),
];

/// Whether the sources of the checks take this field, by its sheet's name or, where the key is the only one, by its key.
fn read_by_a_check(sheet: Sheet, key: &str) -> bool {
    let named = |opening: String| SOURCES.iter().any(|source| source.contains(&opening));
    let sheets = Sheet::ALL.iter().filter(|s| fields::find(**s, key).is_some()).count();
    named(format!("{sheet:?}, \"{key}\""))
        || named(format!("{sheet:?}, 0, \"{key}\""))
        || (sheets == 1 && named(format!("\"{key}\"")))
        || (sheet == Motor && (named(format!("view.motor(\"{key}\"")) || named(format!("motor_in(c, \"{key}\""))))
        || (sheet == Motor && named(format!("printed(view, c, \"{key}\"")))
}

/// Whether a step applies by it, or the program refuses what is out of its scope by it.
fn read_otherwise(sheet: Sheet, key: &str) -> bool {
    let procedure = built_in().unwrap();
    let fitted = sheet == Drive
        && procedure.steps().any(|(_, step)| {
            let items = step.items.iter().flat_map(|item| &item.when);
            step.when.iter().chain(items).any(|when| when.trim_start_matches('!') == key)
        });
    let scope = include_str!("../../decide/scope.rs").contains(&format!("\"{key}\""));
    fitted || scope || (sheet == Load && key == "kind")
}

#[test]
fn every_field_is_read_or_kept_for_the_reader_on_purpose() {
    let mut unread = Vec::new();
    for sheet in Sheet::ALL {
        for field in fields::of(sheet).iter().chain(fields::in_columns(sheet)) {
            if matches!(field.kind, FieldKind::Text(_)) {
                continue;
            }
            let kept = KEPT_FOR_THE_READER.contains(&(sheet, field.key));
            if !kept && !read_by_a_check(sheet, field.key) && !read_otherwise(sheet, field.key) {
                unread.push(format!("{}.{}", sheet.key(), field.key));
            }
        }
    }
    assert_eq!(unread, Vec::<String>::new(), "read by nothing");
    for (sheet, key) in KEPT_FOR_THE_READER {
        assert!(fields::find(*sheet, key).is_some(), "there is no field `{key}` to keep");
        assert!(!read_by_a_check(*sheet, key), "`{key}` is read: take it off the list");
    }
}

/// A limit on that list says itself that nothing judges by it.
#[test]
fn a_limit_that_no_check_uses_says_so() {
    for (sheet, key) in KEPT_FOR_THE_READER {
        let field = fields::find(*sheet, key).unwrap();
        let limit = ["largest", "highest", "lowest", "breaking", "carries", "duty", "energy"];
        if matches!(field.kind, FieldKind::Quantity { .. }) && limit.iter().any(|word| field.label.contains(word)) {
            assert!(field.hint.ends_with("No check uses it."), "{}.{key}: {}", sheet.key(), field.hint);
        }
    }
}
