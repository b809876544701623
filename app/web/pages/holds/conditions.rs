//! The conditions of a hold point in words, each with where it stands.

use crate::extract::DriveAt;
use crate::links;
use commissioning::agenda::{Agenda, HoldAgenda};
use commissioning::procedure::Condition;
use maud::{Markup, html};

/// All conditions of a hold point, and below them what it waits for, in sentences.
#[must_use]
pub fn list(at: &DriveAt, agenda: &Agenda, hold: &HoldAgenda, conditions: &[Condition]) -> Markup {
    html! {
        ul.conditions {
            @for condition in conditions {
                @let met = met(at, agenda, hold, condition);
                li.met[met] { span.box aria-hidden="true" {} span { (words(at, condition)) } b { @if met { "met" } @else { "not met" } } }
            }
        }
        @if !hold.unmet.is_empty() {
            div.card { h2 { "It waits for" } ul { @for sentence in &hold.unmet { li { (sentence) } } } }
        }
    }
}

/// A condition in words, with the way to where it is met.
fn words(at: &DriveAt, condition: &Condition) -> Markup {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    html! {
        @match condition {
            Condition::PhaseSettled { phase } => {
                "Every step is settled in "
                a href=(format!("{}#phase-{}", links::drive(site, drive), links::encode(phase))) { (at.procedure.phase(phase).map_or(phase.as_str(), |p| p.title.as_str())) }
            }
            Condition::StepSettled { step } => {
                "This step is settled: "
                a href=(links::step(site, drive, step)) { (at.procedure.step(step).map_or(step.as_str(), |(_, s)| s.title.as_str())) }
            }
            Condition::IsolationInForce => { "“Isolated and proved dead” is in force" }
            Condition::IsolationLifted => { "Isolation has been lifted" }
            Condition::NoFindingStopsStartUp => { "No open " a href=(links::findings(site, drive)) { "finding" } " stops start-up" }
            Condition::ChecksJudged { checks } => { "Judged, and none outside: " (checks.iter().map(|c| commissioning::judge::catalogue::title(c)).collect::<Vec<_>>().join(", ")) }
        }
    }
}

/// Whether it is met, as the agenda sees it.
fn met(at: &DriveAt, agenda: &Agenda, hold: &HoldAgenda, condition: &Condition) -> bool {
    let record = at.drive.record.as_ref();
    match condition {
        Condition::PhaseSettled { phase } => agenda.phases.iter().filter(|p| p.id == *phase).all(|p| p.left() == 0),
        Condition::StepSettled { step } => agenda.step(step).is_none_or(|(_, s)| s.state.is_settled()),
        Condition::IsolationInForce => record.is_some_and(commissioning::record::Record::isolated),
        Condition::IsolationLifted => !record.is_some_and(commissioning::record::Record::isolated),
        Condition::NoFindingStopsStartUp => !hold.unmet.iter().any(|s| s.starts_with("Finding ")),
        Condition::ChecksJudged { checks } => {
            !checks.iter().any(|c| hold.unmet.iter().any(|s| s.starts_with(&format!("The check {c} "))))
        }
    }
}
