//! Isolation as a state, order, and directions that an exchange of leads makes void.

use crate::agenda::{self, StepState};
use crate::journal::{Change, Deed, Event, Fact};
use crate::plant::Sheet;
use crate::record::{EntryPlace, FindingState, ParameterColumn, ParameterPlace, Severity};
use crate::world::*;

fn has(events: &[Event], is: impl Fn(&Fact) -> bool) -> usize {
    events.iter().filter(|e| is(&e.fact)).count()
}

#[test]
fn isolation_comes_into_force_when_everything_asked_for_is_there() {
    let mut world = World::begun();
    world.enter(ERIN, "prove-dead", &[("tester-proved", "yes")]);
    assert!(!world.record().isolated());
    let events = world.enter(ERIN, "prove-dead", &[("bus-after-waiting", "3")]);
    assert_eq!(has(&events, |f| matches!(f, Fact::IsolationEntered { .. })), 1);
    assert!(world.record().isolated());
    let events = world.enter(ERIN, "lift", &[("isolation-removed", "yes")]);
    assert_eq!(has(&events, |f| matches!(f, Fact::IsolationLifted { .. })), 1);
    assert!(!world.record().isolated());
}

/// A live bus, ticked off as dead, keeps isolation out of force and stops start-up until it is settled.
#[test]
fn a_live_bus_keeps_isolation_out_of_force() {
    let mut world = World::begun();
    let events = world.enter(ERIN, "prove-dead", &[("tester-proved", "yes"), ("bus-after-waiting", "325")]);
    assert_eq!(has(&events, |f| matches!(f, Fact::IsolationEntered { .. })), 0);
    assert_eq!(has(&events, |f| matches!(f, Fact::FindingRaised { severity: Severity::StopsStartUp, .. })), 1);
    assert!(!world.record().isolated());
    let again = vec![world.change(EntryPlace::new("bus-after-waiting"), "3")];
    world.record_changes(ERIN, "prove-dead", again, "isolator was still closed").unwrap();
    assert!(world.record().isolated(), "measured again and dead");
}

/// procedure.md: an entry that can be made again; what proved the first stretch proves nothing for the second.
#[test]
fn a_new_stretch_is_proved_anew_item_by_item() {
    let mut world = World::begun();
    world.enter(ERIN, "prove-dead", &[("tester-proved", "yes"), ("bus-after-waiting", "3")]);
    world.enter(ERIN, "lift", &[("isolation-removed", "yes")]);
    world.enter(ERIN, "prove-dead", &[("isolation-note", "only a note")]);
    assert!(!world.record().isolated(), "a note proves nothing");
    let events = world.enter(ERIN, "prove-dead", &[("tester-proved", "yes")]);
    assert_eq!(has(&events, |f| matches!(f, Fact::EntryMade { .. })), 1, "the same tick again is a new entry");
    assert!(!world.record().isolated(), "the bus was not measured again");
    // The same figure as before, and no reason asked: it is a new reading, not a correction.
    world.enter(ERIN, "prove-dead", &[("bus-after-waiting", "3")]);
    assert!(world.record().isolated());
    assert_eq!(world.record().isolations.len(), 2);
    world.enter(ERIN, "lift", &[("isolation-removed", "yes")]);
    assert!(!world.record().isolated(), "lifted again by the same tick");
    assert_eq!(world.record().isolations.iter().filter(|i| i.lifted.is_some()).count(), 2);
}

#[test]
fn an_entry_before_its_hold_point_is_kept_marked_and_found_once() {
    let mut world = World::begun();
    let events = world.enter(ERIN, "insulation", &[("ir-60s", "812")]);
    assert_eq!(has(&events, |f| matches!(f, Fact::FindingRaised { severity: Severity::BeforeHandover, .. })), 2);
    let entry = &world.record().entry(&EntryPlace::new("ir-60s")).unwrap().value;
    assert!(entry.out_of_order);
    let texts: Vec<_> = world.record().findings.values().map(|f| f.text.clone()).collect();
    assert!(texts.iter().any(|t| t.contains("before its hold point")), "{texts:?}");
    assert!(texts.iter().any(|t| t.contains("not in force")), "{texts:?}");
    let again = vec![world.change(EntryPlace::new("ir-60s"), "815")];
    let events = world.record_changes(ERIN, "insulation", again, "misread").unwrap();
    assert_eq!(events.len(), 1, "a correction finds nothing new");
    world.enter(ERIN, "terminals", &[("terminals-tight", "yes")]);
    assert_eq!(world.record().findings.len(), 4, "another step has its own");
    assert!(world.record().findings.values().all(|f| f.state == FindingState::Open));
    let mut numbers: Vec<_> = world.record().findings.values().map(|f| f.number).collect();
    numbers.sort_unstable();
    assert_eq!(numbers, [1, 2, 3, 4]);
}

#[test]
fn in_order_and_isolated_nothing_is_marked_or_found() {
    let world = World::complete();
    assert!(world.record().findings.is_empty());
    assert!(world.record().entries.values().all(|s| !s.current().unwrap().value.out_of_order));
}

#[test]
fn a_correction_after_isolation_was_lifted_is_no_work_without_isolation() {
    let mut world = World::complete();
    let change = vec![world.change(EntryPlace::new("ir-60s"), "815")];
    assert_eq!(world.record_changes(ERIN, "insulation", change, "misread").unwrap().len(), 1);
    assert!(world.record().findings.is_empty());
}

#[test]
fn directions_seen_before_an_exchange_count_as_not_observed() {
    let mut world = World::complete();
    world.set_field(ERIN, Sheet::Drive, "bypass", "yes", "").unwrap();
    let seen = EntryPlace::new("direction-seen");
    assert!(world.record().observed(&seen).is_some());
    let events = world.enter(ERIN, "exchange", &[("exchange-needed", "not-needed")]);
    assert_eq!(events.len(), 1, "nothing was exchanged");
    let events = world.enter(ERIN, "exchange", &[("exchange-needed", "done")]);
    assert_eq!(has(&events, |f| matches!(f, Fact::DirectionsVoided { .. })), 1);
    assert!(world.record().observed(&seen).is_none());
    assert!(world.record().entry(&seen).is_some(), "it stays readable");
    let agenda = agenda::of(&world.view());
    let (_, step) = agenda.step("direction").unwrap();
    assert_eq!((step.state.clone(), step.missing.as_slice()), (StepState::Begun, &["Direction".to_owned()][..]));
    world.enter(ERIN, "direction", &[("direction-seen", "counter")]);
    assert!(world.record().observed(&seen).is_some());
}

/// The shaft may turn the right way after the exchange as it did before: the same again is a new observation.
#[test]
fn a_direction_seen_again_after_an_exchange_counts_with_the_same_value() {
    let mut world = World::complete();
    world.set_field(ERIN, Sheet::Drive, "bypass", "yes", "").unwrap();
    world.enter(ERIN, "exchange", &[("exchange-needed", "done")]);
    let events = world.enter(ERIN, "direction", &[("direction-seen", "clockwise")]);
    assert_eq!(has(&events, |f| matches!(f, Fact::EntryMade { .. })), 1, "no reason asked, nothing called unchanged");
    let seen = EntryPlace::new("direction-seen");
    assert!(world.record().observed(&seen).is_some());
    assert_eq!(agenda::of(&world.view()).step("direction").unwrap().1.state, StepState::Settled);
    assert!(world.enter(ERIN, "direction", &[("direction-seen", "clockwise")]).is_empty(), "now it is the same");
}

fn set_sequence(world: &mut World, column: ParameterColumn, text: &str) -> Vec<Event> {
    let place = ParameterPlace { function: "output-phase-order".into(), column };
    let seen = world.record().parameters.get(&place).map(|s| s.seen()).unwrap_or_default();
    let change = Change { place, text: text.into(), unit: String::new(), instrument: None, photo: None, seen };
    world.does(ERIN, Deed::SetParameters { drive: DRIVE, changes: vec![change], reason: String::new() })
}

#[test]
fn a_changed_output_sequence_makes_directions_void_and_the_same_one_does_not() {
    use ParameterColumn::{AsFound, AsLeft, Intended};
    let voided = |events: &[Event]| has(events, |f| matches!(f, Fact::DirectionsVoided { .. })) == 1;
    let seen = EntryPlace::new("direction-seen");
    let mut world = World::begun();
    assert!(!voided(&set_sequence(&mut world, Intended, "u-w-v")), "nothing was seen yet");
    let mut world = World::complete();
    assert!(!voided(&set_sequence(&mut world, Intended, "u-v-w")), "what a drive gives anyhow");
    assert!(!voided(&set_sequence(&mut world, AsFound, "u-w-v")), "what was found is not in force");
    assert!(voided(&set_sequence(&mut world, AsLeft, "u-w-v")) && world.record().observed(&seen).is_none());
    world.enter(ERIN, "direction", &[("direction-seen", "clockwise")]);
    assert!(!voided(&set_sequence(&mut world, Intended, "u-w-v")), "as left counts, and it stays");
    assert!(voided(&set_sequence(&mut world, AsLeft, "u-v-w")));
    // Where the exchange says that it was made by the setting, writing the setting down changes nothing more.
    world.set_field(ERIN, Sheet::Drive, "bypass", "yes", "").unwrap();
    assert!(voided(&world.enter(ERIN, "exchange", &[("exchange-needed", "by-setting")])));
    world.enter(ERIN, "direction", &[("direction-seen", "clockwise")]);
    assert!(!voided(&set_sequence(&mut world, AsLeft, "u-w-v")) && world.record().observed(&seen).is_some());
    assert!(voided(&set_sequence(&mut world, AsLeft, "u-v-w")), "turned back, it is not what was seen");
}

/// The built-in procedure, with a record begun.
fn with_built_in() -> World {
    let mut world = World::new();
    let procedure = Box::new(crate::procedure::built_in::built_in().unwrap());
    world.attempt(None, Deed::LoadProcedure { procedure }).unwrap();
    world.does(ERIN, Deed::BeginRecord { drive: DRIVE });
    world
}

#[test]
fn the_encoder_sign_is_judged_against_a_direction_and_falls_with_it() {
    let mut world = with_built_in();
    world.set_field(ERIN, Sheet::Drive, "encoder", "yes", "").unwrap();
    world.enter(ERIN, "encoder-sign", &[("encoder-sign", "agrees")]);
    let sign = EntryPlace::new("encoder-sign");
    assert!(world.record().observed(&sign).is_some());
    world.enter(ERIN, "exchange-leads", &[("leads-exchanged", "encoder-channels")]);
    assert!(world.record().observed(&sign).is_none(), "the channels were exchanged since");
    world.enter(ERIN, "encoder-sign", &[("encoder-sign", "agrees")]);
    assert!(world.record().observed(&sign).is_some());
}

/// What the first proof asks for, each with a reading of a dead circuit; the keys of a later one begin otherwise.
const POINTS: [&str; 5] = ["bus-after-waiting", "bus-plus-to-earth", "bus-minus-to-earth", "input-dead", "output-dead"];

fn prove(world: &mut World, step: &str, prefix: &str, ticks: &[(&str, &str)], live: Option<&str>) -> Vec<Event> {
    let keys = POINTS.map(|point| format!("{prefix}{point}"));
    let volts = POINTS.map(|point| match point {
        point if Some(point) == live => "231",
        "bus-minus-to-earth" => "-1.5",
        _ => "2",
    });
    let readings: Vec<(&str, &str)> = keys.iter().map(String::as_str).zip(volts).collect();
    world.enter(ERIN, step, &[ticks, &readings].concat())
}

const FIRST: &[(&str, &str)] =
    &[("tester-proved-before", "yes"), ("tester-proved-after", "yes"), ("isolated-and-proved-dead", "yes")];
const EXCHANGE: &[(&str, &str)] =
    &[("exchange-tester-before", "yes"), ("exchange-tester-after", "yes"), ("exchange-isolation", "isolated")];
const COUPLE: &[(&str, &str)] =
    &[("couple-tester-before", "yes"), ("couple-tester-after", "yes"), ("couple-isolated", "yes")];

/// The three proofs ask for the same points, and a live one keeps isolation out of force at each of them.
#[test]
fn a_live_terminal_or_pole_keeps_isolation_out_of_force_at_every_proof() {
    for (step, prefix, ticks) in [
        ("prove-dead", "", FIRST),
        ("isolate-for-exchange", "exchange-", EXCHANGE),
        ("isolate-to-couple", "couple-", COUPLE),
    ] {
        let mut begun = with_built_in();
        begun.set_field(ERIN, Sheet::Drive, "first-run-uncoupled", "yes", "").unwrap();
        for live in POINTS {
            let mut world = begun.clone();
            let events = prove(&mut world, step, prefix, ticks, Some(live));
            assert!(!world.record().isolated(), "{step}: live at {live}");
            let stops = |f: &Fact| matches!(f, Fact::FindingRaised { severity: Severity::StopsStartUp, text, .. } if text.contains("231 V"));
            assert_eq!(has(&events, stops), 1, "{step}: {live}");
        }
        let mut world = begun.clone();
        let events = prove(&mut world, step, prefix, ticks, None);
        assert!(world.record().isolated(), "{step}: dead");
        assert!(world.record().findings.values().all(|f| f.severity != Severity::StopsStartUp), "{step}");
        let asked = events
            .iter()
            .filter(|e| matches!(&e.fact, Fact::EntryMade { entry, .. } if entry.accepted_because.is_some()));
        assert_eq!(asked.count(), 0, "a pole below earth wants no reason");
        let mut world = begun;
        world.enter(ERIN, step, ticks);
        let (_, stands) = agenda::of(&world.view()).step(step).map(|(p, s)| (p.id.clone(), s.clone())).unwrap();
        assert_eq!(stands.missing.len(), POINTS.len(), "{step} asks for every point: {:?}", stands.missing);
    }
}

#[test]
fn isolation_for_an_exchange_comes_into_force_only_with_its_readings() {
    let mut world = with_built_in();
    let step = |world: &World| agenda::of(&world.view()).step("isolate-for-exchange").unwrap().1.clone();
    world.enter(ERIN, "isolate-for-exchange", &[("exchange-isolation", "isolated")]);
    assert!(!world.record().isolated() && step(&world).state == StepState::Begun, "nothing was measured");
    prove(&mut world, "isolate-for-exchange", "exchange-", &EXCHANGE[..2], None);
    assert!(world.record().isolated() && step(&world).state == StepState::Settled);
    let mut world = with_built_in();
    world.enter(ERIN, "isolate-for-exchange", &[("exchange-isolation", "not-needed")]);
    assert!(!world.record().isolated() && step(&world).state == StepState::Settled);
}
