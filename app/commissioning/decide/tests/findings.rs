//! Findings, and steps settled otherwise.

use crate::agenda::{self, StepState};
use crate::journal::{Deed, Fact};
use crate::record::{FindingState, Meaning, SettledOtherwise, Severity};
use crate::world::*;
use crate::{FindingId, Refusal};
use uuid::Uuid;

fn settle(step: &str, how: SettledOtherwise, reason: &str) -> Deed {
    Deed::SettleStep { drive: DRIVE, step: step.into(), how, reason: reason.into() }
}

#[test]
fn what_could_not_be_done_becomes_a_finding_as_grave_as_its_step() {
    let mut world = World::begun();
    let how = SettledOtherwise::CouldNotBeDone;
    assert_eq!(fields(world.attempt(Some(ERIN), settle("insulation", how, " "))), ["reason"]);
    let events = world.does(ERIN, settle("insulation", how, "No tester here."));
    assert!(matches!(events[1].fact, Fact::FindingRaised { severity: Severity::StopsStartUp, .. }));
    let events = world.does(ERIN, settle("terminals", how, "Cover riveted."));
    assert!(matches!(events[1].fact, Fact::FindingRaised { severity: Severity::BeforeHandover, .. }));
    let state = agenda::of(&world.view()).step("insulation").unwrap().1.state.clone();
    assert_eq!(state, StepState::CouldNotBeDone("No tester here.".into()));
    assert!(why(world.attempt(Some(ERIN), settle("insulation", how, "Again."))).contains("Resume it first"));
    world.does(ERIN, Deed::ResumeStep { drive: DRIVE, step: "insulation".into() });
    assert_eq!(world.record().findings.values().filter(|f| f.is_open()).count(), 2, "the finding stays open");
    assert!(
        why(world.attempt(Some(ERIN), Deed::ResumeStep { drive: DRIVE, step: "run".into() }))
            .contains("nothing to take back")
    );
}

#[test]
fn a_step_that_does_not_apply_is_out_of_the_count() {
    let mut world = World::begun();
    let how = SettledOtherwise::NotApplicable;
    assert!(why(world.attempt(Some(ERIN), settle("chopper", how, "None fitted."))).contains("does not apply"));
    assert!(matches!(world.attempt(Some(ERIN), settle("nowhere", how, "None.")), Err(Refusal::Unknown { .. })));
    assert!(agenda::of(&world.view()).step("chopper").is_none());
    world.set_field(ERIN, crate::plant::Sheet::Drive, "brake-chopper", "yes", "").unwrap();
    assert!(agenda::of(&world.view()).step("chopper").is_some());
    assert_eq!(world.does(ERIN, settle("chopper", how, "Blanked off.")).len(), 1, "no finding");
}

#[test]
fn a_finding_is_settled_or_accepted_once_by_name() {
    let mut world = World::complete();
    let id = |n: u128| FindingId(Uuid::from_u128(n));
    let raise = |n, text: &str, step: Option<&str>| Deed::RaiseFinding {
        drive: DRIVE,
        finding: id(n),
        severity: Severity::BeforeHandover,
        text: text.into(),
        step: step.map(str::to_owned),
    };
    assert_eq!(fields(world.attempt(Some(ERIN), raise(1, "\n", None))), ["text"]);
    assert!(matches!(world.attempt(Some(ERIN), raise(1, "Worn.", Some("nowhere"))), Err(Refusal::Unknown { .. })));
    world.does(ERIN, raise(1, "Label worn.", Some("run")));
    world.does(ERIN, raise(2, "Gland loose.", None));
    assert!(why(world.attempt(Some(ERIN), raise(2, "Again.", None))).contains("already"));
    assert_eq!(
        fields(world.attempt(Some(ERIN), Deed::SettleFinding { drive: DRIVE, finding: id(2), how: String::new() })),
        ["how"]
    );
    world.does(ERIN, Deed::SettleFinding { drive: DRIVE, finding: id(2), how: "Tightened.".into() });
    let accept = |n| Deed::AcceptFinding { drive: DRIVE, finding: id(n), reason: "Ordered; harmless.".into() };
    assert!(why(world.attempt(Some(SUNE), accept(2))).contains("Erin Alder settled"));
    world.sign(ERIN, Meaning::Performed).unwrap();
    world.does(SUNE, accept(1));
    assert!(why(world.attempt(Some(SUNE), accept(1))).contains("Sune Rowan accepted"));
    let FindingState::Accepted { reason, by_name, .. } = &world.record().findings[&id(1)].state else {
        panic!("accepted")
    };
    assert_eq!((reason.as_str(), by_name.as_str()), ("Ordered; harmless.", "Sune Rowan"));
}

/// What guards start-up is not talked away: leaving it out is a finding that keeps the hold point shut.
#[test]
fn a_step_that_guards_start_up_is_not_left_out_in_silence() {
    let mut world = World::begun();
    let events = world.does(ERIN, settle("insulation", SettledOtherwise::NotApplicable, "New motor."));
    let Fact::FindingRaised { severity, text, step, .. } = &events[1].fact else { panic!("{events:?}") };
    assert_eq!((*severity, step.as_deref()), (Severity::StopsStartUp, Some("insulation")));
    assert!(text.contains("guards start-up") && text.contains("New motor."), "{text}");
    let waits = |world: &World| {
        let agenda = agenda::of(&world.view());
        let hold = agenda.phases.iter().find(|p| p.id == "turn").unwrap().hold.clone().unwrap();
        hold.unmet.iter().any(|u| u.contains("stops start-up"))
    };
    assert!(waits(&world));
    let finding = world.record().findings.values().next().unwrap().id;
    world.does(SUNE, Deed::AcceptFinding { drive: DRIVE, finding, reason: "Tested at the works.".into() });
    assert!(!waits(&world));
}

/// Tablets choose the identifiers of acts and of findings raised by hand: none of them may stand in for one of these.
#[test]
fn a_finding_of_the_program_cannot_be_swallowed_by_one_raised_before() {
    use crate::decide::writer::finding_about;
    let mut world = World::begun();
    for (what, step) in [("could-not-be-done", "insulation"), ("out-of-order", "terminals")] {
        // The next act raises by hand; the one after it is the one to be caught.
        let act = crate::ActId(Uuid::from_u128(world.acts + 2)).to_string();
        let finding = finding_about(&[what, &act, step, "0"]);
        let severity = Severity::Information;
        world.does(ERIN, Deed::RaiseFinding { drive: DRIVE, finding, severity, text: "Nothing.".into(), step: None });
        let before = world.record().findings.len();
        let events = match what {
            "out-of-order" => world.enter(ERIN, step, &[("terminals-tight", "yes")]),
            _ => world.does(ERIN, settle(step, SettledOtherwise::CouldNotBeDone, "No tester here.")),
        };
        let raised = events.iter().filter(|e| matches!(e.fact, Fact::FindingRaised { .. })).count();
        assert!(raised > 0);
        assert_eq!(world.record().findings.len(), before + raised, "{what}: every one of them is kept");
    }
}

#[test]
fn what_is_done_out_of_order_again_is_found_again_once_the_first_is_settled() {
    let mut world = World::begun();
    let open = |world: &World| world.record().findings.values().filter(|f| f.is_open()).count();
    world.enter(ERIN, "terminals", &[("terminals-tight", "yes")]);
    assert_eq!(open(&world), 2, "before its hold point, and not isolated");
    let ids: Vec<FindingId> = world.record().findings.keys().copied().collect();
    world.does(ERIN, Deed::SettleFinding { drive: DRIVE, finding: ids[0], how: "Done again.".into() });
    let photo =
        crate::record::Photo { hash: "ab".repeat(32), media: "image/jpeg".into(), bytes: 9, caption: String::new() };
    let mut picture = world.change(crate::record::EntryPlace::new("terminal-photo"), "Terminals");
    picture.photo = Some(photo);
    world.record_changes(ERIN, "terminals", vec![picture], "").unwrap();
    assert_eq!((open(&world), world.record().findings.len()), (2, 3), "the open one is not doubled");
}
