//! Why a step was not left after recording: what is outside here or made outside elsewhere, and what can be done about it.

use super::at::StepAt;
use super::brought;
use crate::components::check_title;
use crate::{links, progress};
use commissioning::agenda::Agenda;
use commissioning::judge::Judged;
use commissioning::procedure::IsolationAct;
use commissioning::record::{Finding, Severity};
use engineering::Verdict;
use maud::{Markup, html};

/// Whether any verdict of the step is outside.
#[must_use]
pub fn any_outside(judged: &[Judged]) -> bool {
    judged.iter().any(|j| j.outcome.verdict == Verdict::Outside)
}

/// What is outside, the ways to deal with it, and the way on.
#[must_use]
pub fn outside(at: &StepAt, agenda: &Agenda, judged: &[Judged], elsewhere: &str) -> Markup {
    let outside: Vec<&Judged> = judged.iter().filter(|j| j.outcome.verdict == Verdict::Outside).collect();
    let open: Vec<&Finding> = at
        .at
        .drive
        .record
        .iter()
        .flat_map(|r| r.findings.values())
        .filter(|f| f.is_open() && f.step.as_deref() == Some(at.id.as_str()))
        .collect();
    // What was to be proved dead is live: the record raised its finding itself, and nobody goes on from here.
    let enters = at.at.procedure.step(&at.id).is_some_and(|(_, s)| s.isolation == Some(IsolationAct::Enter));
    let raised = open.iter().find(|f| f.severity == Severity::StopsStartUp).filter(|_| enters && !outside.is_empty());
    html! {
        div.stay role="alert" tabindex="-1" {
            @if !outside.is_empty() {
                p { b { "Outside here:" } }
                ul { @for j in &outside { li { b { (check_title(&j.outcome.check)) @if !j.of.is_empty() { " · " (j.of) } } ": " (j.outcome.summary) } } }
            }
            (brought::list(at, elsewhere))
            @if let Some(finding) = raised { (live(at, finding)) } @else { (ways(at, agenda, &open, !outside.is_empty())) }
        }
    }
}

/// The one thing to do where something is live.
fn live(at: &StepAt, finding: &Finding) -> Markup {
    let (site, drive) = (at.at.site.tag.as_str(), at.at.drive.tag.as_str());
    html! {
        p { a href=(links::finding(site, drive, finding.id)) { "Finding " (finding.number) } " was raised for this: " (finding.severity.words()) "." }
        div.row { a href="#step" { "Measure again" } }
    }
}

/// Correct it, raise a finding, or go on.
fn ways(at: &StepAt, agenda: &Agenda, open: &[&Finding], here: bool) -> Markup {
    let (site, drive) = (at.at.site.tag.as_str(), at.at.drive.tag.as_str());
    // Where nothing else is left the way on would lead back here.
    let next = progress::after(agenda, &at.id);
    let on = Some(next.address(site, drive)).filter(|address| *address != links::step(site, drive, &at.id));
    html! {
        @if here { p { "If the entry is wrong, correct it below and give a reason. If it is right, raise a finding, so that somebody settles it or accepts it by name." } }
        @for finding in open { p { "Open at this step: " a href=(links::finding(site, drive, finding.id)) { "finding " (finding.number) } ", " (finding.severity.words()) "." } }
        div.row {
            a href=(links::raise_finding_at(site, drive, &at.id)) { "Raise a finding" }
            @if let Some(on) = on { a href=(on) { "Next step: " (next.words()) } }
        }
    }
}
