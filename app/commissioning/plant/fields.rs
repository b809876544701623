//! The table of all fields, sheet by sheet.

use super::field::Field;
use super::place::Sheet;

pub mod cable;
pub mod drive;
pub mod drive_plate;
pub mod further;
mod line;
pub mod load;
pub mod motor;
pub mod site;
pub mod supply;

/// The fields of a sheet that stand once.
#[must_use]
pub const fn of(sheet: Sheet) -> &'static [Field] {
    match sheet {
        Sheet::Site => site::FIELDS,
        Sheet::Supply => supply::FIELDS,
        Sheet::Drive => drive::FIELDS,
        Sheet::DrivePlate => drive_plate::FIELDS,
        Sheet::Motor => motor::FIELDS,
        Sheet::Cable => cable::FIELDS,
        Sheet::Load => load::FIELDS,
        Sheet::Further => further::FIELDS,
    }
}

/// The fields of a sheet that stand once in every rating column; only the motor plate has any.
#[must_use]
pub const fn in_columns(sheet: Sheet) -> &'static [Field] {
    match sheet {
        Sheet::Motor => motor::COLUMN_FIELDS,
        _ => &[],
    }
}

/// The description of the field with this key.
#[must_use]
pub fn find(sheet: Sheet, key: &str) -> Option<&'static Field> {
    of(sheet).iter().chain(in_columns(sheet)).find(|f| f.key == key)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::plant::FieldKind;

    fn every() -> impl Iterator<Item = (Sheet, &'static Field)> {
        Sheet::ALL.into_iter().flat_map(|sheet| of(sheet).iter().chain(in_columns(sheet)).map(move |f| (sheet, f)))
    }

    #[test]
    fn keys_are_unique_in_their_sheet_and_fit_an_address() {
        for sheet in Sheet::ALL {
            let mut seen = std::collections::BTreeSet::new();
            for field in of(sheet).iter().chain(in_columns(sheet)) {
                assert!(seen.insert(field.key), "{sheet:?} has {} twice", field.key);
                assert!(
                    field.key.chars().all(|c| c.is_ascii_lowercase() || c.is_ascii_digit() || c == '-'),
                    "{} is no plain key",
                    field.key
                );
            }
        }
    }

    #[test]
    fn fields_of_one_group_stand_together() {
        for sheet in Sheet::ALL {
            let mut left: Vec<&str> = Vec::new();
            for pair in of(sheet).windows(2) {
                if pair[0].group != pair[1].group {
                    left.push(pair[0].group);
                }
                assert!(
                    !left.contains(&pair[1].group),
                    "{sheet:?}: {} comes back to group {}",
                    pair[1].key,
                    pair[1].group
                );
            }
        }
    }

    #[test]
    fn every_quantity_has_a_unit_of_its_kind_and_a_span() {
        for (sheet, field) in every() {
            if let FieldKind::Quantity { kind, unit, low, high } = field.kind {
                assert!(kind.unit(unit).is_some(), "{sheet:?} {}: “{unit}” is no unit of {}", field.key, kind.words());
                assert!(low < high, "{sheet:?} {}", field.key);
            }
            if let FieldKind::Choice(options) = field.kind {
                let keys: std::collections::BTreeSet<_> = options.iter().map(|(key, _)| key).collect();
                assert_eq!(keys.len(), options.len(), "{sheet:?} {}", field.key);
                assert!(options.len() > 1, "{sheet:?} {}", field.key);
            }
        }
    }

    #[test]
    fn what_cannot_be_true_is_refused_and_what_is_out_of_scope_is_not() {
        let motor = |key: &str, text: &str, unit: &str| find(Sheet::Motor, key).expect("listed").understand(text, unit);
        assert!(motor("rpm", "0", "rpm").is_err());
        assert!(motor("power-factor", "1.2", "").is_err());
        assert!(motor("power-factor", "1", "").is_ok());
        assert!(motor("efficiency", "100", "%").is_err());
        assert!(motor("volts", "6600", "V").is_ok(), "above 1000 V the scope sentence answers, not the field");
        assert!(motor("power", "-3", "kW").is_err());
        assert!(motor("inertia", "0", "kg·m²").is_err());
        for odd in ["3", "5", "4.5"] {
            assert!(motor("poles", odd, "").is_err(), "{odd}");
        }
        assert!(motor("poles", "3", "").unwrap_err().contains("poles come in pairs"));
        assert!(motor("poles", "4", "").is_ok() && motor("poles", "2", "").is_ok());
        assert!(motor("machine", "permanent-magnet", "").is_ok());
        assert_eq!(
            motor("power", "25", "hp").expect("a power").expect("typed").number().map(|w| w.round()),
            Some(18642.0)
        );
    }

    #[test]
    fn only_what_nothing_works_without_is_required() {
        let needed: Vec<String> =
            every().filter(|(_, f)| f.required).map(|(s, f)| format!("{}.{}", s.key(), f.key)).collect();
        assert_eq!(
            needed,
            [
                "supply.volts",
                "supply.hertz",
                "drive-plate.continuous-current",
                "motor.machine",
                "motor.volts",
                "motor.amps",
                "motor.hertz",
                "motor.rpm",
                "motor.power",
                "cable.length",
                "load.kind",
            ]
        );
    }
}
