//! The conditions of a hold point in words, each once, with where it stands and what it still waits for.

use crate::components::check_title;
use crate::extract::DriveAt;
use crate::links;
use commissioning::agenda::{self, Agenda};
use commissioning::procedure::Condition;
use commissioning::record::{Finding, Severity};
use maud::{Markup, html};

/// All conditions of a hold point.
#[must_use]
pub fn list(at: &DriveAt, agenda: &Agenda, phase: &str, conditions: &[Condition]) -> Markup {
    html! {
        ul.conditions {
            @for condition in conditions {
                @let unmet = agenda::unmet_of(&at.view(), condition, agenda, phase);
                li.met[unmet.is_empty()] {
                    span.box aria-hidden="true" {}
                    span { (words(at, condition)) @if !unmet.is_empty() { (waits_for(at, agenda, condition, &unmet)) } }
                    b { @if unmet.is_empty() { "met" } @else { "not met" } }
                }
            }
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
            Condition::ChecksJudged { checks } => { "Judged, and none outside" (listed(checks)) }
            Condition::NoneOutside { checks } => { "None outside, or accepted by name" (listed(checks)) }
        }
    }
}

/// Few checks by their titles; many folded.
fn listed(checks: &[String]) -> Markup {
    let titles = checks.iter().map(|c| check_title(c)).collect::<Vec<_>>().join(", ");
    html! {
        @if checks.len() < 5 { ": " (titles) }
        @else { details.earlier { summary { (checks.len()) " checks" } (titles) } }
    }
}

/// What a condition that is not met waits for, where that is more than the condition says already.
fn waits_for(at: &DriveAt, agenda: &Agenda, condition: &Condition, unmet: &[String]) -> Markup {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    html! {
        @match condition {
            Condition::PhaseSettled { phase } => @for p in agenda.phases.iter().filter(|p| p.id == *phase && p.left() > 0) {
                br; span.quiet { @if p.left() == 1 { "one step is left" } @else { (p.left()) " steps are left" } }
            },
            Condition::NoFindingStopsStartUp => @for f in stopping(at) {
                br; span.quiet { a href=(links::finding(site, drive, f.id)) { "finding " (f.number) } ": " (f.text) }
            },
            Condition::ChecksJudged { .. } | Condition::NoneOutside { .. } => @for sentence in unmet { br; span.quiet { (sentence) } },
            _ => {}
        }
    }
}

fn stopping(at: &DriveAt) -> Vec<&Finding> {
    let all = at.drive.record.iter().flat_map(|r| r.findings.values());
    let mut open: Vec<_> = all.filter(|f| f.is_open() && f.severity == Severity::StopsStartUp).collect();
    open.sort_by_key(|f| f.number);
    open
}
