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
