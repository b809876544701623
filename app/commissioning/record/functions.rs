//! The generic functions of the parameter record: what a drive is set to, whatever its maker calls it.

use crate::plant::FieldKind;

mod motion;
mod motor;
mod operation;
mod protection;

/// A generic function; the drive's own code for it is free text in the record.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Function {
    /// Stored and used in forms: `acceleration-time`.
    pub key: &'static str,
    /// On screen and in the package.
    pub label: &'static str,
    /// Heading; the steps of the phase “Set” name it.
    pub group: &'static str,
    /// One sentence under the row; may be empty.
    pub hint: &'static str,
    /// What may be entered.
    pub kind: FieldKind,
}

impl Function {
    /// Whether it is set for a test only and put back: it has no place in the list that restores a drive.
    #[must_use]
    pub fn is_for_tests(&self) -> bool {
        self.group == TEST
    }
}

/// The functions to be keyed into a drive that is restored, in the order of the sheet: all but those for tests.
pub fn to_restore() -> impl Iterator<Item = &'static Function> {
    FUNCTIONS.iter().filter(|f| !f.is_for_tests())
}

/// Motor data, as keyed in.
pub const MOTOR: &str = "motor data";
/// Control mode and volts per hertz.
pub const CONTROL: &str = "control";
/// Speed limits and skip bands.
pub const SPEEDS: &str = "speeds";
/// Ramps and stopping.
pub const RAMPS: &str = "ramps and stopping";
/// Current limit, overload, thermal input.
pub const LIMITS: &str = "limits and overload";
/// Commands, references and their loss.
pub const REFERENCES: &str = "commands and references";
/// Restart and catching a spinning load.
pub const RESTART: &str = "restart";
/// Braking.
pub const BRAKING: &str = "braking";
/// Switching frequency, relays, communication, access.
pub const OTHER: &str = "other settings";
/// Settings changed for a test, to be put back.
pub const TEST: &str = "test settings";

/// All groups, in the order of the sheet.
pub const GROUPS: &[&str] = &[MOTOR, CONTROL, SPEEDS, RAMPS, LIMITS, REFERENCES, RESTART, BRAKING, OTHER, TEST];

/// All functions, in the order of the sheet.
pub const FUNCTIONS: &[Function] = &ALL;

const COUNT: usize = motor::ROWS.len() + motion::ROWS.len() + protection::ROWS.len() + operation::ROWS.len();

/// The four files joined, so that the list stays one list for everyone who reads it.
const ALL: [Function; COUNT] = {
    let mut all = [motor::ROWS[0]; COUNT];
    let parts = [motor::ROWS, motion::ROWS, protection::ROWS, operation::ROWS];
    let (mut part, mut at) = (0, 0);
    while part < parts.len() {
        let mut row = 0;
        while row < parts[part].len() {
            all[at] = parts[part][row];
            at += 1;
            row += 1;
        }
        part += 1;
    }
    all
};

/// The function of this key.
#[must_use]
pub fn find(key: &str) -> Option<&'static Function> {
    FUNCTIONS.iter().find(|f| f.key == key)
}

/// The functions of a group, in order; `*` stands for all.
pub fn group(name: &str) -> impl Iterator<Item = &'static Function> {
    FUNCTIONS.iter().filter(move |f| name == "*" || f.group == name)
}

const fn quantity(
    group: &'static str,
    key: &'static str,
    label: &'static str,
    (kind, unit): (engineering::Kind, &'static str),
    (low, high): (f64, f64),
    hint: &'static str,
) -> Function {
    Function { key, label, group, hint, kind: FieldKind::Quantity { kind, unit, low, high } }
}

const fn choice(
    group: &'static str,
    key: &'static str,
    label: &'static str,
    options: &'static [(&'static str, &'static str)],
    hint: &'static str,
) -> Function {
    Function { key, label, group, hint, kind: FieldKind::Choice(options) }
}

const fn flag(group: &'static str, key: &'static str, label: &'static str, hint: &'static str) -> Function {
    Function { key, label, group, hint, kind: FieldKind::Flag }
}

const fn words(group: &'static str, key: &'static str, label: &'static str, hint: &'static str) -> Function {
    Function { key, label, group, hint, kind: FieldKind::Text(200) }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn keys_are_unique_and_units_belong() {
        let mut seen = std::collections::BTreeSet::new();
        for f in FUNCTIONS {
            assert!(seen.insert(f.key), "{} stands twice", f.key);
            assert!(!f.key.starts_with("row-"), "{}: reserved for free rows", f.key);
            if let FieldKind::Quantity { kind, unit, low, high } = f.kind {
                assert!(kind.unit(unit).is_some(), "{}: {unit}", f.key);
                assert!(low < high, "{}", f.key);
            }
        }
    }

    #[test]
    fn groups_stand_together_and_none_is_empty() {
        let order: Vec<&str> = FUNCTIONS.iter().map(|f| f.group).fold(Vec::new(), |mut seen, g| {
            if seen.last() != Some(&g) {
                seen.push(g);
            }
            seen
        });
        assert_eq!(order, GROUPS);
        assert_eq!(group("*").count(), FUNCTIONS.len());
    }

    #[test]
    fn what_is_set_for_tests_is_not_keyed_into_a_restored_drive() {
        let keyed: Vec<&str> = to_restore().map(|f| f.key).collect();
        assert!(keyed.contains(&"current-limit") && !keyed.iter().any(|key| key.starts_with("test-")));
        assert_eq!(keyed.len() + group(TEST).count(), FUNCTIONS.len());
    }

    #[test]
    fn the_access_code_itself_has_no_place() {
        let handed = find("access-code-handed-over").expect("listed");
        assert_eq!(handed.kind, FieldKind::Flag);
        assert!(FUNCTIONS.iter().all(|f| f.key == handed.key || !f.label.contains("access code")));
    }
}
