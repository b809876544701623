//! Tests of the agenda: what applies, what is missing, what is next.

use super::*;
use crate::journal::Deed;
use crate::plant::{Sheet, fields, flags_of};
use crate::procedure::{Procedure, Step};
use crate::record::SettledOtherwise;
use crate::world::*;

/// A world whose record follows this procedure.
fn following(change: impl FnOnce(&mut Procedure)) -> World {
    let mut world = World::new();
    let mut other = procedure();
    other.version = 2;
    change(&mut other);
    world.attempt(None, Deed::LoadProcedure { procedure: Box::new(other) }).unwrap();
    world.does(ERIN, Deed::BeginRecord { drive: DRIVE });
    world
}

fn bare(id: &str) -> Step {
    let text = format!("id = '{id}'\ntitle = 'T'\ninstruction = 'Do it.'");
    toml::from_str(&text).unwrap()
}

fn state(world: &World, step: &str) -> StepState {
    of(&world.view()).step(step).unwrap().1.state.clone()
}

#[test]
fn only_steps_that_apply_are_counted() {
    let mut world = World::begun();
    let agenda = of(&world.view());
    assert_eq!(agenda.left(), 6, "neither chopper nor exchange");
    world.set_field(ERIN, Sheet::Drive, "brake-chopper", "yes", "").unwrap();
    assert_eq!(of(&world.view()).left(), 7);
    world.set_field(ERIN, Sheet::Drive, "brake-chopper", "no", "").unwrap();
    assert_eq!(of(&world.view()).left(), 6);
    assert!(of(&World::complete().view()).complete());
}

#[test]
fn next_is_the_first_unsettled_step_of_an_open_phase() {
    let mut world = World::begun();
    let next = |world: &World| of(&world.view()).next().map(|s| s.id.clone());
    assert_eq!(next(&world).as_deref(), Some("prove-dead"));
    world.enter(ERIN, "prove-dead", &[("tester-proved", "yes")]);
    assert_eq!(state(&world, "prove-dead"), StepState::Begun);
    assert_eq!(of(&world.view()).step("prove-dead").unwrap().1.missing, ["DC bus"]);
    world.enter(ERIN, "prove-dead", &[("bus-after-waiting", "3")]);
    assert_eq!(next(&world), None, "the hold point waits to be released");
    world.release("inspect");
    assert_eq!(next(&world).as_deref(), Some("terminals"));
    let how = SettledOtherwise::NotApplicable;
    world.does(ERIN, Deed::SettleStep { drive: DRIVE, step: "terminals".into(), how, reason: "Plugged.".into() });
    assert_eq!(next(&world).as_deref(), Some("insulation"));
    assert_eq!(next(&World::complete()), None);
}

#[test]
fn a_table_lacks_its_rows_by_name() {
    let mut world = World::begun();
    let place = crate::record::EntryPlace::in_row("run-current", 1);
    world.enter_at(ERIN, "run", place, "21").unwrap();
    assert_eq!(of(&world.view()).step("run").unwrap().1.missing, ["Current, 50 %"]);
}

#[test]
fn hands_inside_wait_for_isolation() {
    let waits = |world: &World| of(&world.view()).step("terminals").unwrap().1.waits_for_isolation;
    let mut world = World::begun();
    assert!(waits(&world));
    world.enter(ERIN, "prove-dead", &[("tester-proved", "yes"), ("bus-after-waiting", "3")]);
    assert!(!waits(&world));
    assert!(!waits(&World::complete()), "work that is done waits for nothing");
}

#[test]
fn a_sheet_is_settled_when_its_required_fields_stand() {
    let mut world = following(|p| p.phases[0].steps.push(Step { sheet: Some("supply".into()), ..bare("sheet") }));
    let required: Vec<_> = fields::of(Sheet::Supply).iter().filter(|f| f.required).map(|f| f.key).collect();
    assert_eq!(required, ["volts", "hertz"]);
    assert_eq!(state(&world, "sheet"), StepState::Open);
    world.set_field(ERIN, Sheet::Supply, "volts", "400", "V").unwrap();
    assert_eq!(state(&world, "sheet"), StepState::Begun);
    assert_eq!(of(&world.view()).step("sheet").unwrap().1.missing, ["frequency"]);
    // The site's own supply says the rest.
    let hertz = crate::journal::Change {
        place: (0, "hertz".into()),
        text: "50".into(),
        unit: "Hz".into(),
        instrument: None,
        photo: None,
        seen: vec![],
    };
    world.does(
        SUNE,
        Deed::SetSiteFields { site: SITE, sheet: Sheet::Supply, changes: vec![hertz], reason: String::new() },
    );
    assert_eq!(state(&world, "sheet"), StepState::Settled);
}

#[test]
fn a_step_that_asks_for_nothing_is_settled_once_somebody_was_there() {
    let mut world = following(|p| {
        let mut step = Step { items: p.phases[0].steps[0].items.clone(), ..bare("look") };
        step.items.retain(|i| i.optional);
        step.items[0].key = "look-note".into();
        p.phases[0].steps.push(step);
    });
    assert_eq!(state(&world, "look"), StepState::Open);
    world.enter(ERIN, "look", &[("look-note", "Nothing seen.")]);
    assert_eq!(state(&world, "look"), StepState::Settled);
}

#[test]
fn flags_come_from_yes_and_from_choices() {
    let mut world = World::new();
    for (sheet, key, text) in [
        (Sheet::Drive, "bypass", "yes"),
        (Sheet::Drive, "encoder", "no"),
        (Sheet::Drive, "output-filter", "sine"),
        (Sheet::Drive, "motor-sensor", "none"),
        (Sheet::Load, "kind", "fan"),
    ] {
        world.set_field(ERIN, sheet, key, text, "").unwrap();
    }
    let flags = world.drive().flags();
    for flag in ["bypass", "output-filter", "output-filter:sine", "motor-sensor:none", "load:fan"] {
        assert!(flags.contains(flag), "{flag}: {flags:?}");
    }
    assert!(!flags.contains("encoder") && !flags.contains("motor-sensor"), "{flags:?}");
    assert_eq!(flags, flags_of(&world.drive().fields));
    let applies = |when: &[&str]| applies(&when.iter().map(|w| (*w).to_owned()).collect::<Vec<_>>(), &flags);
    assert!(
        applies(&[]) && applies(&["bypass", "!encoder"]) && !applies(&["!bypass"]) && !applies(&["bypass", "encoder"])
    );
}
