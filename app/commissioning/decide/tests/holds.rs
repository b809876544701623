//! Hold points: conditions, declarations, names, and what must keep holding.

use crate::agenda;
use crate::journal::Deed;
use crate::record::{FindingState, ReleaseRole, Severity};
use crate::world::*;
use crate::{FindingId, Refusal};
use uuid::Uuid;

fn by(role: ReleaseRole, printed_name: &str, declared: Vec<bool>) -> Deed {
    Deed::ReleaseHold { drive: DRIVE, phase: "inspect".into(), role, printed_name: printed_name.into(), declared }
}

fn isolated() -> World {
    let mut world = World::begun();
    world.enter(ERIN, "prove-dead", &[("tester-proved", "yes"), ("bus-after-waiting", "3")]);
    world
}

fn open(world: &World, phase: &str) -> bool {
    agenda::of(&world.view()).phases.iter().find(|p| p.id == phase).unwrap().open()
}

#[test]
fn a_hold_point_waits_for_its_conditions_and_names_them() {
    let mut world = World::begun();
    let said = why(world.attempt(Some(ERIN), release("inspect")));
    assert!(said.contains("“Make safe” has one step left.") && said.contains("not in force"), "{said}");
    let said = why(world.attempt(Some(ERIN), release("turn")));
    assert!(said.contains("“Insulation” is not settled.") && !said.contains("isolated"), "{said}");
    assert!(why(world.attempt(Some(ERIN), release("make-safe"))).contains("no hold point"));
    assert!(matches!(world.attempt(Some(ERIN), release("nowhere")), Err(Refusal::Unknown { .. })));
    let mut world = isolated();
    let said = why(world.attempt(Some(ERIN), release("turn")));
    assert!(said.contains("still in force"), "{said}");
    world.release("inspect");
    assert!(why(world.attempt(Some(ERIN), release("inspect"))).contains("Erin Alder released"));
}

#[test]
fn every_sentence_is_declared_and_a_witness_has_a_printed_name() {
    let mut world = isolated();
    let deed = by(ReleaseRole::Engineer, "", vec![true]);
    assert_eq!(fields(world.attempt(Some(ERIN), deed)), ["declared.1"]);
    let deed = by(ReleaseRole::Witness, " ", vec![false, true]);
    assert_eq!(fields(world.attempt(Some(ERIN), deed)), ["declared.0", "printed_name"]);
    world.does(ERIN, by(ReleaseRole::Witness, "Wanda Ash", vec![true, true]));
    assert_eq!(world.record().releases["inspect"].printed_name, "Wanda Ash");
    let mut world = isolated();
    world.does(ERIN, by(ReleaseRole::Engineer, "Somebody Else", vec![true, true]));
    assert_eq!(world.record().releases["inspect"].printed_name, "Erin Alder", "in their own name");
}

#[test]
fn a_phase_shuts_again_when_isolation_is_lifted_before_its_work_is_done() {
    let mut world = isolated();
    world.release("inspect");
    assert!(open(&world, "inspect"));
    world.enter(ERIN, "lift", &[("isolation-removed", "yes")]);
    assert!(!open(&world, "inspect"));
    let agenda = agenda::of(&world.view());
    assert_ne!(agenda.next().map(|s| s.id.as_str()), Some("terminals"), "nothing inside is next");
    world.enter(ERIN, "prove-dead", &[("tester-proved", "yes"), ("bus-after-waiting", "2")]);
    assert!(open(&world, "inspect"), "the release stands, and isolation is in force again");
    assert!(open(&World::complete(), "inspect"), "done work waits for nothing");
}

#[test]
fn a_finding_that_stops_start_up_holds_the_first_turn() {
    let mut world = World::complete();
    let finding = FindingId(Uuid::from_u128(0xF1));
    assert!(open(&world, "turn"));
    let raise = Deed::RaiseFinding {
        drive: DRIVE,
        finding,
        severity: Severity::StopsStartUp,
        text: "Guard loose.".into(),
        step: None,
    };
    world.does(ERIN, raise);
    assert!(open(&world, "turn"), "work that is done waits for nothing");
    world
        .record_changes(
            ERIN,
            "run",
            vec![world.change(crate::record::EntryPlace::in_row("run-current", 1), "")],
            "doubtful",
        )
        .unwrap();
    assert!(!open(&world, "turn"));
    let said = why(world.attempt(Some(ERIN), release("turn")));
    assert!(said.contains("Finding 1 stops start-up"), "{said}");
    world.does(ERIN, Deed::SettleFinding { drive: DRIVE, finding, how: "Tightened.".into() });
    assert!(open(&world, "turn"));
    assert!(matches!(world.record().findings[&finding].state, FindingState::Settled { .. }));
}

#[test]
fn a_check_that_is_not_judged_holds_unless_its_step_was_settled_otherwise() {
    let mut world = World::new();
    let mut other = procedure();
    other.version = 2;
    other.phases[1].steps[1].checks = vec!["insulation-resistance".into()];
    let judged = crate::procedure::Condition::ChecksJudged { checks: vec!["insulation-resistance".into()] };
    other.phases[2].hold.as_mut().unwrap().conditions = vec![judged];
    world.attempt(None, Deed::LoadProcedure { procedure: Box::new(other) }).unwrap();
    world.does(ERIN, Deed::BeginRecord { drive: DRIVE });
    let said = why(world.attempt(Some(ERIN), release("turn")));
    assert!(said.contains("“Insulation resistance” at “Insulation” is not assessed"), "by its title: {said}");
    let how = crate::record::SettledOtherwise::CouldNotBeDone;
    world.does(
        ERIN,
        Deed::SettleStep { drive: DRIVE, step: "insulation".into(), how, reason: "No tester here.".into() },
    );
    world.release("turn");
}

/// A world whose hold point before turning asks that nothing is outside at “Insulation”: 0.4 MΩ is.
fn with_wet_winding() -> World {
    let mut world = World::new();
    let mut other = procedure();
    other.version = 2;
    other.phases[1].steps[1].checks = vec!["insulation-resistance".into()];
    let none = crate::procedure::Condition::NoneOutside { checks: vec!["insulation-resistance".into()] };
    other.phases[2].hold.as_mut().unwrap().conditions = vec![none];
    let ask = |key: &str| crate::procedure::Item {
        key: key.into(),
        optional: true,
        kind: crate::procedure::ItemKind::Reading {
            quantity: engineering::Kind::Temperature,
            unit: None,
            instrument: true,
            low: Some(-30.0),
            high: Some(120.0),
        },
        ..other.phases[1].steps[1].items[0].clone()
    };
    let temperature = ask("winding-temperature");
    other.phases[1].steps[1].items.push(temperature);
    world.attempt(None, Deed::LoadProcedure { procedure: Box::new(other) }).unwrap();
    world.does(ERIN, Deed::BeginRecord { drive: DRIVE });
    world.set_field(ERIN, crate::plant::Sheet::Motor, "insulation-minimum", "5", "MΩ").unwrap();
    world
}

fn hold_open(world: &World) -> bool {
    let agenda = agenda::of(&world.view());
    agenda.phases.iter().find(|p| p.id == "turn").and_then(|p| p.hold.as_ref()).is_some_and(|h| h.open)
}

/// procedure.md: a hold point waits for what is wrong, until it is put right or a finding about it is accepted by name.
#[test]
fn an_outside_verdict_holds_until_it_is_put_right_or_accepted_by_name() {
    let mut world = with_wet_winding();
    let wet = |world: &mut World, text: &str| {
        world.enter(ERIN, "insulation", &[("ir-60s", text), ("winding-temperature", "40")])
    };
    world.release("turn");
    assert!(hold_open(&world), "what is not assessed does not hold here");
    wet(&mut world, "0.4");
    assert!(!hold_open(&world), "outside after the release, it holds again");
    let said = why(world.attempt(Some(ERIN), release("turn")));
    assert!(said.contains("“Insulation resistance” at “Insulation” is outside: At 40 °C: 0.400 MΩ"), "{said}");
    assert!(said.contains("names “Insulation resistance” and have it accepted by name"), "{said}");

    let raise = |n: u128, text: &str| Deed::RaiseFinding {
        drive: DRIVE,
        finding: FindingId(Uuid::from_u128(n)),
        severity: Severity::BeforeHandover,
        text: text.into(),
        step: Some("insulation".into()),
    };
    let accept = |n: u128| Deed::AcceptFinding {
        drive: DRIVE,
        finding: FindingId(Uuid::from_u128(n)),
        reason: "Dried in service, agreed with the client.".into(),
    };
    world.does(ERIN, raise(0xA, "A lamp is missing."));
    world.does(SUNE, accept(0xA));
    assert!(!hold_open(&world), "a finding about something else releases nothing");
    world.does(ERIN, raise(0xB, "Insulation resistance too low."));
    assert!(!hold_open(&world), "raised is not accepted");
    world.does(SUNE, accept(0xB));
    assert!(hold_open(&world), "accepted by name");
    world.set_field(ERIN, crate::plant::Sheet::Motor, "insulation-minimum", "6", "MΩ").unwrap();
    assert!(!hold_open(&world), "what was accepted was held against another limit");
    let again = vec![world.change(crate::record::EntryPlace::new("ir-60s"), "0.3")];
    world.record_changes(ERIN, "insulation", again, "measured again").unwrap();
    assert!(!hold_open(&world), "what was accepted was another reading");
    let how = crate::record::SettledOtherwise::NotApplicable;
    let reason = "A small motor, it will dry.".to_owned();
    world.does(ERIN, Deed::SettleStep { drive: DRIVE, step: "insulation".into(), how, reason });
    assert!(!hold_open(&world), "a reading is not unmade by calling its step not applicable");
    world.does(ERIN, Deed::ResumeStep { drive: DRIVE, step: "insulation".into() });
    let right = vec![world.change(crate::record::EntryPlace::new("ir-60s"), "900")];
    world.record_changes(ERIN, "insulation", right, "dried").unwrap();
    assert!(hold_open(&world), "put right");
}
