//! Isolation as a state, order, and directions that an exchange of leads makes void.

use crate::agenda::{self, StepState};
use crate::journal::{Event, Fact};
use crate::plant::Sheet;
use crate::record::{EntryPlace, FindingState, Severity};
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
