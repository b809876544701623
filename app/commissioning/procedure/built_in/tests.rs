//! What the phase files must keep to: unique keys, known names, short instructions, every flag with a step.

use super::*;
use crate::plant::fields;
use crate::plant::{FieldKind, Sheet};
use crate::procedure::{Condition, Item, ItemKind, Step};
use crate::record::functions;
use std::collections::BTreeSet;

/// The names of the check catalogue; they are fixed.
pub(super) const CHECKS: &[&str] = &[
    "above-dew-point",
    "acceleration-time",
    "braking",
    "brake-resistor-ohms",
    "bus-discharged",
    "bus-peak",
    "bus-voltage",
    "connection-fit",
    "current-balance",
    "current-limit",
    "deceleration-time",
    "dielectric-absorption",
    "discharge-time",
    "disconnection",
    "drive-current-fit",
    "earth-voltages",
    "efficiency-class",
    "encoder-scaling",
    "full-load-current",
    "harmonic-distortion",
    "identified-resistance",
    "instrument-calibration",
    "insulation-resistance",
    "insulation-test-voltage",
    "joint-resistance",
    "line-current-balance",
    "load-current",
    "load-profile",
    "loss-of-reference",
    "low-speed-cooling",
    "maximum-speed",
    "measured-acceleration",
    "measured-deceleration",
    "minimum-speed",
    "misreading",
    "motor-data-settings",
    "no-load-current",
    "overload-fit",
    "overload-setting",
    "pe-conductor",
    "pe-continuity",
    "polarization-index",
    "pole-pairs",
    "power-balance",
    "precharge",
    "rated-torque",
    "rated-volts-per-hertz",
    "reference-scaling",
    "reflected-wave",
    "restart",
    "rotation",
    "sensor-resistance",
    "short-circuit-rating",
    "skip-bands",
    "slip-at-no-load",
    "stop-time",
    "supply-unbalance",
    "supply-voltage",
    "switching-frequency",
    "temperature-rise",
    "terminal-torque",
    "terminals-dead",
    "test-settings-restored",
    "vibration",
    "voltage-drop",
    "volts-per-hertz",
    "waiting-time",
    "winding-balance",
];

fn procedure() -> Procedure {
    built_in().expect("the phase files are phases")
}

fn every_step(procedure: &Procedure) -> Vec<&Step> {
    procedure.steps().map(|(_, step)| step).collect()
}

fn every_item(procedure: &Procedure) -> Vec<&Item> {
    every_step(procedure).into_iter().flat_map(|s| &s.items).collect()
}

/// Every word that a `when` may use, made from the fields themselves: a flag, an option of a choice, a kind of load.
fn flags() -> BTreeSet<String> {
    let mut flags = BTreeSet::new();
    for field in fields::of(Sheet::Drive) {
        match field.kind {
            FieldKind::Flag => drop(flags.insert(field.key.to_owned())),
            FieldKind::Choice(options) => {
                flags.insert(field.key.to_owned());
                flags.extend(options.iter().map(|(option, _)| format!("{}:{option}", field.key)));
            }
            _ => {}
        }
    }
    let Some(FieldKind::Choice(kinds)) = fields::find(Sheet::Load, "kind").map(|f| f.kind) else {
        panic!("the load has kinds")
    };
    flags.extend(kinds.iter().map(|(kind, _)| format!("load:{kind}")));
    flags
}

#[test]
fn ten_phases_in_the_order_of_the_work() {
    let ids: Vec<String> = procedure().phases.into_iter().map(|p| p.id).collect();
    assert_eq!(
        ids,
        ["make-safe", "identify", "inspect", "insulation", "energise", "set", "turn", "stops", "load-run", "leave"]
    );
}

/// A flattened item cannot refuse unknown keys by itself, so a slip in a phase file would be lost: written back, every key must be there.
#[test]
fn no_key_of_a_phase_file_is_lost() {
    fn walk(path: &str, before: &toml::Value, after: &toml::Value) {
        match (before, after) {
            (toml::Value::Table(left), toml::Value::Table(right)) => {
                for (key, value) in left {
                    let there = right.get(key).unwrap_or_else(|| panic!("{path}.{key} means nothing"));
                    walk(&format!("{path}.{key}"), value, there);
                }
            }
            (toml::Value::Array(left), toml::Value::Array(right)) => {
                assert_eq!(left.len(), right.len(), "{path}");
                left.iter().zip(right).enumerate().for_each(|(n, (l, r))| walk(&format!("{path}[{n}]"), l, r));
            }
            _ => {}
        }
    }
    for (file, text) in PHASES {
        let before: toml::Value = toml::from_str(text).expect("TOML");
        let phase: Phase = toml::from_str(text).expect("a phase");
        walk(file, &before, &toml::Value::try_from(phase).expect("written back"));
    }
}

#[test]
fn ids_and_item_keys_are_unique_and_fit_an_address() {
    let procedure = procedure();
    let plain = |id: &str| id.chars().all(|c| c.is_ascii_lowercase() || c.is_ascii_digit() || c == '-');
    let mut steps = BTreeSet::new();
    for step in every_step(&procedure) {
        assert!(plain(&step.id) && steps.insert(&step.id), "step {}", step.id);
    }
    let mut items = BTreeSet::new();
    for item in every_item(&procedure) {
        assert!(plain(&item.key) && items.insert(&item.key), "item {}", item.key);
    }
}

#[test]
fn every_reading_has_a_unit_of_its_kind_and_a_span() {
    for item in every_item(&procedure()) {
        match &item.kind {
            ItemKind::Reading { quantity, unit, low, high, .. } => {
                assert!(unit.as_deref().is_none_or(|u| quantity.unit(u).is_some()), "{}: {unit:?}", item.key);
                let span = low.expect("every reading has a lowest value").total_cmp(&high.expect("and a highest"));
                assert!(span.is_lt(), "{}", item.key);
            }
            ItemKind::Choice { options } => {
                let keys: BTreeSet<_> = options.iter().map(|o| &o.key).collect();
                assert!(keys.len() == options.len() && keys.len() > 1, "{}", item.key);
            }
            _ => {}
        }
    }
}

#[test]
fn everything_a_step_names_exists() {
    let procedure = procedure();
    let flags = flags();
    let known = |when: &[String]| when.iter().all(|f| flags.contains(f.trim_start_matches('!')));
    for step in every_step(&procedure) {
        assert!(known(&step.when) && step.items.iter().all(|i| known(&i.when)), "{}: a flag nobody can set", step.id);
        assert!(step.sheet.as_deref().is_none_or(|s| Sheet::from_key(s).is_some()), "{}: sheet", step.id);
        let group = step.parameters.as_deref();
        assert!(group.is_none_or(|g| functions::group(g).next().is_some()), "{}: parameters {group:?}", step.id);
        for check in &step.checks {
            assert!(CHECKS.contains(&check.as_str()), "{}: no check {check}", step.id);
        }
    }
    for condition in procedure.phases.iter().filter_map(|p| p.hold.as_ref()).flat_map(|h| &h.conditions) {
        match condition {
            Condition::PhaseSettled { phase } => assert!(procedure.phase(phase).is_some(), "{phase}"),
            Condition::StepSettled { step } => assert!(procedure.step(step).is_some(), "{step}"),
            Condition::ChecksJudged { checks } => {
                for check in checks {
                    assert!(
                        every_step(&procedure).iter().any(|s| s.checks.contains(check)),
                        "{check} is shown nowhere"
                    );
                }
            }
            _ => {}
        }
    }
}

#[test]
fn every_flag_every_sheet_every_group_and_every_check_is_served() {
    let procedure = procedure();
    let steps = every_step(&procedure);
    for field in fields::of(Sheet::Drive).iter().filter(|f| matches!(f.kind, FieldKind::Flag | FieldKind::Choice(_))) {
        let of = format!("{}:", field.key);
        assert!(
            steps.iter().any(|s| s.when.iter().any(|w| w == field.key || w.starts_with(&of))),
            "no step for {}",
            field.key
        );
    }
    for sheet in Sheet::ALL.into_iter().filter(|s| *s != Sheet::Site) {
        assert_eq!(steps.iter().filter(|s| s.sheet.as_deref() == Some(sheet.key())).count(), 1, "{sheet:?}");
    }
    for group in functions::GROUPS {
        assert!(steps.iter().any(|s| s.parameters.as_deref() == Some(group)), "{group}");
    }
    for check in CHECKS {
        assert!(steps.iter().any(|s| s.checks.iter().any(|c| c == check)), "{check} is shown at no step");
    }
}

#[test]
fn nothing_is_settled_by_itself() {
    for step in every_step(&procedure()) {
        assert!(step.items.iter().any(|i| !i.optional && i.when.is_empty()), "{} asks for nothing", step.id);
    }
}

/// An entry at a step that its own hold point waits for would always be out of order.
#[test]
fn a_hold_point_waits_only_for_what_stands_before_it() {
    let procedure = procedure();
    for (at, phase) in procedure.phases.iter().enumerate() {
        let before = |id: &str| procedure.phases[..at].iter().any(|p| p.id == id);
        for condition in phase.hold.iter().flat_map(|h| &h.conditions) {
            match condition {
                Condition::PhaseSettled { phase } => assert!(before(phase), "{phase}"),
                Condition::StepSettled { step } => {
                    assert!(procedure.step(step).is_some_and(|(p, _)| before(&p.id)), "{step}")
                }
                _ => {}
            }
        }
    }
}

#[test]
fn instructions_are_short_and_promise_nothing() {
    const NEVER: &[&str] = &["safe to ", "!", "it is safe", "harmless", "simply", "don't"];
    let procedure = procedure();
    for step in every_step(&procedure) {
        let sentences = step.instruction.matches(". ").count() + usize::from(step.instruction.ends_with('.'));
        assert!((1..=2).contains(&sentences), "{}: {sentences} sentences", step.id);
        assert!(step.instruction.chars().count() <= 200, "{}: {}", step.id, step.instruction.chars().count());
        assert!(!step.why.is_empty(), "{} does not say why", step.id);
        let said = [&step.instruction, &step.why, &step.title].into_iter().chain(&step.cautions);
        for text in said.chain(step.items.iter().flat_map(|i| [&i.label, &i.hint])) {
            assert!(NEVER.iter().all(|w| !text.to_lowercase().contains(w)), "{}: {text}", step.id);
        }
    }
    for hold in procedure.phases.iter().filter_map(|p| p.hold.as_ref()) {
        assert!(!hold.declare.is_empty() && hold.declare.iter().all(|d| d.ends_with('.')), "{}", hold.title);
    }
}

#[test]
fn a_small_fan_needs_no_polarization_index() {
    let procedure = procedure();
    let (_, run) = procedure.step("ten-minute-run").expect("there");
    assert!(!crate::procedure::applies(&run.when, &BTreeSet::from(["load:fan".to_owned()])));
    let bare =
        every_step(&procedure).into_iter().filter(|s| crate::procedure::applies(&s.when, &BTreeSet::new())).count();
    assert!(bare < every_step(&procedure).len() - 20, "fitted options must bring their own steps");
}

#[test]
fn the_catalogue_has_these_names() {
    let judged: BTreeSet<&str> = crate::judge::catalogue::names().collect();
    assert_eq!(CHECKS.iter().copied().collect::<BTreeSet<_>>(), judged);
}

/// The steps that may turn out to need nothing: only their `not-needed` leaves isolation and directions alone.
#[test]
fn an_exchange_that_is_not_needed_leaves_everything_alone() {
    let procedure = procedure();
    for id in ["isolate-for-exchange", "exchange-leads", "energise-after-exchange", "cable-alone", "phases-alone"] {
        let (_, step) = procedure.step(id).expect("there");
        let chosen = |key: &'static str| move |_: &str| Some(key);
        assert!(step.left_alone(chosen("not-needed")), "{id}");
        assert!(!step.left_alone(chosen("motor")) && !step.left_alone(|_| None), "{id}");
    }
    assert_eq!(every_step(&procedure).iter().filter(|s| s.voids_directions).count(), 1);
}

/// Everything that the rotation check looks at is a direction, so that an exchange makes all of it void together.
#[test]
fn every_direction_falls_with_an_exchange() {
    use crate::record::EntryPlace;
    let procedure = procedure();
    let looked_at = every_step(&procedure).into_iter().filter(|s| s.checks.iter().any(|c| c == "rotation"));
    let seen: Vec<&Item> = looked_at.filter(|s| !s.voids_directions).flat_map(|s| &s.items).collect();
    assert!(seen.len() >= 3, "drive, bypass and encoder");
    for item in seen {
        assert!(EntryPlace::new(item.key.as_str()).is_direction(), "{}", item.key);
    }
}

/// An item that is asked for unless its step is left alone needs a step that can be.
#[test]
fn what_is_optional_only_when_left_alone_stands_at_a_step_that_can_be() {
    let procedure = procedure();
    let mut found = 0;
    for step in every_step(&procedure).into_iter().filter(|s| s.items.iter().any(|i| i.left_alone_only)) {
        assert!(step.left_alone(|_| Some("not-needed")), "{}", step.id);
        found += 1;
    }
    assert!(found > 0, "the isolation for an exchange asks for its reading");
}

/// What is charged by a test is discharged before anyone moves leads: the ohmmeter comes first, the discharge last.
#[test]
fn the_winding_is_discharged_after_the_last_test_voltage_and_no_leads_are_moved_between() {
    let procedure = procedure();
    let phase = procedure.phase("insulation").expect("there");
    let at = |id: &str| phase.steps.iter().position(|s| s.id == id).unwrap_or_else(|| panic!("{id}"));
    let charging = ["insulation-to-earth", "ten-minute-run", "cable-alone", "phases-alone"];
    assert!(charging.iter().all(|id| at("winding-resistance") < at(id)));
    assert_eq!(at("discharge"), charging.iter().map(|id| at(id)).max().expect("four") + 1);
    for step in charging.iter().map(|id| &phase.steps[at(id)]) {
        let told = |c: &String| c.contains("discharge") && c.contains("earth") && c.contains("leads are moved");
        assert!(step.cautions.iter().any(told), "{}: {:?}", step.id, step.cautions);
    }
}

#[test]
fn nothing_is_opened_while_the_waiting_time_is_outside() {
    let procedure = procedure();
    let hold = procedure.phase("inspect").and_then(|p| p.hold.as_ref()).expect("there");
    let asked =
        |c: &Condition| matches!(c, Condition::NoneOutside { checks } if checks.contains(&"waiting-time".to_owned()));
    assert!(hold.conditions.iter().any(asked));
}
