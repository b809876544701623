//! Outside verdicts: the finding that a stop raises by itself, and the signature that waits for one.

use crate::FindingId;
use crate::agenda;
use crate::journal::{Deed, Event, Fact};
use crate::judge;
use crate::plant::Sheet;
use crate::record::{EntryPlace, Meaning, Severity};
use crate::world::*;
use uuid::Uuid;

const FINDING: FindingId = FindingId(Uuid::from_u128(0xF7));

/// Everything entered but the stop, for which 5 s are specified; top speed is at 50 Hz.
fn before_the_stop(step: &str) -> World {
    let text = format!(
        "id = '{step}'\ntitle = 'Time to standstill'\ninstruction = 'Take it.'\nchecks = ['stop-time']\n\
         item = [{{ key = '{}', label = 'Time', kind = 'reading', quantity = 'time', low = 0.0, high = 7200.0 }}]",
        if step == "stop-time" { "stop-seconds" } else { "stop-seconds-load" }
    );
    let mut world = World::new();
    let mut other = procedure();
    other.version = 2;
    other.phases.last_mut().unwrap().steps.push(toml::from_str(&text).unwrap());
    world.attempt(None, Deed::LoadProcedure { procedure: Box::new(other) }).unwrap();
    world.does(ERIN, Deed::BeginRecord { drive: DRIVE });
    for option in ["brake-chopper", "bypass"] {
        world.set_field(ERIN, Sheet::Drive, option, "no", "").unwrap();
    }
    world.set_field(ERIN, Sheet::Further, "emergency-stop-time", "5", "s").unwrap();
    world.enter(ERIN, "prove-dead", &[("tester-proved", "yes"), ("bus-after-waiting", "3")]);
    world.release("inspect");
    world.enter(ERIN, "terminals", &[("terminals-tight", "yes")]);
    world.enter(ERIN, "insulation", &[("ir-60s", "812")]);
    world.enter(ERIN, "lift", &[("isolation-removed", "yes")]);
    world.release("turn");
    world.enter(ERIN, "direction", &[("direction-seen", "clockwise")]);
    for row in 0..2 {
        world.enter_at(ERIN, "run", EntryPlace::in_row("run-current", row), "21.4").unwrap();
    }
    world
}

const STOP: &str = "stop-time-under-load";

fn stopped(world: &mut World, seconds: &str) -> Vec<Event> {
    let changes = vec![world.change(EntryPlace::new("stop-seconds-load"), seconds)];
    world.record_changes(ERIN, STOP, changes, "Taken again.").unwrap()
}

fn raised(events: &[Event]) -> Vec<(Severity, FindingId, String)> {
    let found = events.iter().filter_map(|e| match &e.fact {
        Fact::FindingRaised { finding, severity, text, step, .. } => {
            assert_eq!(step.as_deref(), Some(STOP));
            Some((*severity, *finding, text.clone()))
        }
        _ => None,
    });
    found.collect()
}

#[test]
fn a_stop_that_takes_too_long_raises_its_finding_before_handover() {
    let mut world = before_the_stop(STOP);
    let events = stopped(&mut world, "14.9");
    let found = raised(&events);
    assert_eq!((found.len(), found[0].0), (1, Severity::BeforeHandover));
    assert!(found[0].2.starts_with("“Stop time” at “Time to standstill” is outside: 14.9 s"), "{}", found[0].2);
    assert!(raised(&stopped(&mut world, "14.8")).is_empty(), "it stands open already");
    world.sign(ERIN, Meaning::Performed).unwrap();
    assert!(why(world.sign(SUNE, Meaning::Accepted)).contains("Findings are open: 1"));
    let mut world = before_the_stop(STOP);
    assert!(raised(&stopped(&mut world, "4")).is_empty());
    world.sign(ERIN, Meaning::Performed).unwrap();
}

/// A stop from a speed below the top says nothing of the longest one, unless it is too long already.
#[test]
fn a_slow_stop_is_outside_wherever_it_began() {
    let mut world = before_the_stop("stop-time");
    let events = world.enter(ERIN, "stop-time", &[("stop-seconds", "4")]);
    assert_eq!(events.len(), 1);
    let said = judge::step(&world.view(), "stop-time")[0].outcome.clone();
    assert_eq!(said.verdict, engineering::Verdict::Figure, "{}", said.summary);
    let changes = vec![world.change(EntryPlace::new("stop-seconds"), "14")];
    let events = world.record_changes(ERIN, "stop-time", changes, "Taken again.").unwrap();
    assert_eq!(events.len(), 2, "entry and finding");
}

#[test]
fn an_outside_verdict_without_a_finding_keeps_the_record_from_being_signed() {
    let mut world = before_the_stop(STOP);
    stopped(&mut world, "4");
    // What is specified changes afterwards: nobody entered anything at the step then.
    let place = crate::plant::Place::new(Sheet::Further, "emergency-stop-time");
    let seen = world.drive().fields[&place].seen();
    let place = (0, "emergency-stop-time".to_owned());
    let change =
        crate::journal::Change { place, text: "3".into(), unit: "s".into(), instrument: None, photo: None, seen };
    let (changes, reason) = (vec![change], "By the new sheet.".to_owned());
    world.does(ERIN, Deed::SetDriveFields { drive: DRIVE, sheet: Sheet::Further, changes, reason });
    let said = why(world.sign(ERIN, Meaning::Performed));
    assert!(said.contains("stands in no finding yet: “Stop time” at “Time to standstill”: 4.00 s"), "{said}");
    let how = crate::record::SettledOtherwise::NotApplicable;
    world.does(ERIN, Deed::SettleStep { drive: DRIVE, step: STOP.into(), how, reason: "The client knows.".into() });
    assert!(why(world.sign(ERIN, Meaning::Performed)).contains("no finding"), "measured is measured");
    world.does(ERIN, Deed::ResumeStep { drive: DRIVE, step: STOP.into() });
    let raise = |finding, severity, text: &str| Deed::RaiseFinding {
        drive: DRIVE,
        finding,
        severity,
        text: text.into(),
        step: Some(STOP.into()),
    };
    world.does(ERIN, raise(FindingId(Uuid::from_u128(1)), Severity::BeforeHandover, "Label worn."));
    assert!(why(world.sign(ERIN, Meaning::Performed)).contains("no finding"), "of something else");
    world.does(ERIN, raise(FINDING, Severity::Information, "The stop time is longer than the sheet says."));
    assert!(why(world.sign(ERIN, Meaning::Performed)).contains("no finding"), "open, and for information only");
    world.does(SUNE, Deed::AcceptFinding { drive: DRIVE, finding: FINDING, reason: "The client agrees.".into() });
    world.sign(ERIN, Meaning::Performed).unwrap();
}

#[test]
fn a_finding_closed_before_the_stop_was_taken_again_does_not_count() {
    let mut world = before_the_stop(STOP);
    let events = stopped(&mut world, "14.9");
    let (_, finding, _) = raised(&events).remove(0);
    world.does(ERIN, Deed::SettleFinding { drive: DRIVE, finding, how: "Ramp shortened.".into() });
    world.sign(ERIN, Meaning::Performed).unwrap();
    world.does(SUNE, Deed::Return { drive: DRIVE, reason: "Take it again.".into() });
    assert_eq!(raised(&stopped(&mut world, "9")).len(), 1, "it is open again");
}

#[test]
fn a_phase_with_an_outside_verdict_or_a_finding_that_stops_start_up_is_in_trouble() {
    let mut world = before_the_stop(STOP);
    let troubled = |world: &World| -> Vec<bool> {
        let agenda = agenda::with_outcomes(&world.view(), &judge::all(&world.view()));
        agenda.phases.iter().map(|p| p.troubled).collect()
    };
    stopped(&mut world, "4");
    assert_eq!(troubled(&world), [false, false, false]);
    stopped(&mut world, "14.9");
    assert_eq!(troubled(&world), [false, false, true]);
    assert!(agenda::of(&world.view()).phases.iter().all(|p| !p.troubled), "nothing was judged");
    let (severity, text, step) = (Severity::StopsStartUp, "Lug loose.".to_owned(), Some("terminals".to_owned()));
    world.does(ERIN, Deed::RaiseFinding { drive: DRIVE, finding: FINDING, severity, text, step });
    assert_eq!(troubled(&world), [false, true, true]);
    assert!(agenda::of(&world.view()).phases[1].troubled);
    world.does(ERIN, Deed::SettleFinding { drive: DRIVE, finding: FINDING, how: "Tightened.".into() });
    assert_eq!(troubled(&world), [false, false, true]);
}
