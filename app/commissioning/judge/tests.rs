//! Every key that a check asks for exists; every check is in the list and at a step of the built-in procedure.

mod case;
mod fuzz;
mod motion;
mod plates;
mod readings;
mod settings;
mod supply;
mod unread;

use super::catalogue::{CATALOGUE, names};
use crate::plant::fields;
use crate::plant::{Place, Sheet};
use crate::procedure::built_in::built_in;
use std::collections::BTreeSet;

const SOURCES: &[&str] = &[
    include_str!("nameplate.rs"),
    include_str!("supply.rs"),
    include_str!("cable.rs"),
    include_str!("windings.rs"),
    include_str!("drive_train.rs"),
    include_str!("motion.rs"),
    include_str!("settings.rs"),
    include_str!("runs.rs"),
    include_str!("take.rs"),
];

/// Every literal that follows one of these openings in the sources.
fn literals(openings: &[&str]) -> BTreeSet<String> {
    let mut found = BTreeSet::new();
    for source in SOURCES {
        for opening in openings {
            for after in source.split(opening).skip(1) {
                if let Some(literal) = after.split('"').next() {
                    found.insert(literal.to_owned());
                }
            }
        }
    }
    assert!(!found.is_empty());
    found
}

#[test]
fn every_item_asked_for_is_in_the_built_in_procedure() {
    let procedure = built_in().expect("the built-in procedure loads");
    let asked = literals(&[
        "view.reading(\"",
        "view.reading_in(\"",
        "view.entered(\"",
        "view.chosen(\"",
        "view.observed(\"",
        "view.entry(\"",
        "per_row(view, \"",
    ]);
    assert!(asked.len() > 20, "{asked:?}");
    for item in asked {
        assert!(procedure.item(&item).is_some(), "no step enters `{item}`");
    }
}

#[test]
fn every_field_asked_for_is_in_its_sheet() {
    let mut asked = 0;
    for sheet in Sheet::ALL {
        let name = format!("{sheet:?}");
        let openings: Vec<String> =
            ["plate", "choice", "flag", "count"].iter().map(|f| format!("view.{f}({name}, \"")).collect();
        for source in SOURCES {
            for opening in &openings {
                for after in source.split(opening.as_str()).skip(1) {
                    let key = after.split('"').next().expect("a literal");
                    assert!(fields::find(sheet, key).is_some(), "sheet {name} has no field `{key}`");
                    asked += 1;
                }
            }
        }
    }
    assert!(asked > 60, "only {asked} found");
    for key in literals(&["view.motor(\""]) {
        assert!(fields::in_columns(Sheet::Motor).iter().any(|f| f.key == key), "no rating column has `{key}`");
    }
}

#[test]
fn every_function_asked_for_is_in_the_parameter_record() {
    for function in literals(&[
        "view.setting(\"",
        "view.in_force(\"",
        "view.set_choice(\"",
        "view.parameter(\"",
        "set.quantity(view, \"",
        "set.choice(view, \"",
        "at(\"",
        "stands(\"",
    ]) {
        assert!(crate::record::functions::find(&function).is_some(), "no function `{function}`");
    }
}

#[test]
fn every_check_of_a_step_is_in_the_list_and_every_listed_one_is_at_a_step() {
    let procedure = built_in().expect("loads");
    let at_steps: BTreeSet<&str> = procedure.steps().flat_map(|(_, s)| s.checks.iter().map(String::as_str)).collect();
    let listed: BTreeSet<&str> = names().collect();
    assert_eq!(listed.len(), CATALOGUE.len(), "a name stands twice");
    for check in &at_steps {
        assert!(listed.contains(check), "step check `{check}` is not in the list");
    }
    for check in &listed {
        assert!(at_steps.contains(check), "`{check}` is at no step");
    }
}

#[test]
fn places_print_as_forms_name_them() {
    assert_eq!(Place::in_column(Sheet::Motor, 1, "amps").to_string(), "motor.1.amps");
}
