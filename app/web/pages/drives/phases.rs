//! The phases of a record with their steps; a hold point stands between them as a double line that says what it does.

use crate::extract::DriveAt;
use crate::links;
use crate::progress;
use commissioning::agenda::{Agenda, HoldAgenda, PhaseAgenda, StepAgenda, StepState};
use commissioning::judge::Judged;
use maud::{Markup, html};

/// All phases; those that are settled are folded.
#[must_use]
pub fn list(at: &DriveAt, agenda: &Agenda, judged: &[Judged]) -> Markup {
    let here = agenda.phases.iter().position(|p| p.open() && p.left() > 0);
    html! {
        div.phase-list {
            @for (n, phase) in agenda.phases.iter().enumerate() {
                @if let Some(hold) = &phase.hold { (hold_line(at, phase, hold)) }
                details.phase id=(format!("phase-{}", phase.id)) open[here == Some(n)] {
                    summary { b { (n + 1) " · " (phase.title) } span.quiet { (left(phase)) @if let Some((shape, word)) = progress::trouble(at, phase, judged) { " · " span.trouble { span aria-hidden="true" { (shape) } " " (word) } } } }
                    ol { @for step in &phase.steps { (row(at, step)) } }
                }
            }
        }
    }
}

fn left(phase: &PhaseAgenda) -> String {
    match phase.left() {
        0 => "settled".to_owned(),
        left => format!("{left} of {} left", phase.steps.len()),
    }
}

/// The hold point: waits, ready for its release, or released.
fn hold_line(at: &DriveAt, phase: &PhaseAgenda, hold: &HoldAgenda) -> Markup {
    let address = links::hold(&at.site.tag, &at.drive.tag, &phase.id);
    let words = match (&hold.released, hold.open, hold.unmet.len()) {
        (Some(release), true, _) => format!("released {} UTC by {}", release.received.shown(), release.printed_name),
        (Some(_), false, _) => "waits again".to_owned(),
        (None, _, 0) => "ready for its release".to_owned(),
        (None, _, 1) => "waits for one condition".to_owned(),
        (None, _, several) => format!("waits for {several} conditions"),
    };
    html! {
        a.hold.open[hold.open].waits[progress::waits(phase)] href=(address) { b { "Hold point" } span { (hold.title) } span.quiet { (words) } }
    }
}

fn row(at: &DriveAt, step: &StepAgenda) -> Markup {
    let address = links::step(&at.site.tag, &at.drive.tag, &step.id);
    let (class, words) = match &step.state {
        StepState::Open => ("open", String::new()),
        StepState::Begun => ("begun", format!("begun; {} missing", step.missing.len())),
        StepState::Settled => ("settled", "settled".to_owned()),
        StepState::NotApplicable(reason) => ("otherwise", format!("does not apply: {reason}")),
        StepState::CouldNotBeDone(reason) => ("otherwise", format!("could not be done: {reason}")),
    };
    html! {
        li class=(class) {
            a href=(address) {
                span.box aria-hidden="true" {}
                span.title { (step.title) }
                span.quiet { (words) @if step.waits_for_isolation { @if !words.is_empty() { " · " } "asks for isolation" } }
            }
        }
    }
}
