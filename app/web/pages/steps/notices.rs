//! What a step says before its fields: order, isolation, how it was settled, where the record stands.

use super::at::StepAt;
use crate::components::{button, form};
use crate::links;
use crate::visitor::Signed;
use commissioning::agenda::{Agenda, StepState};
use commissioning::procedure::{IsolationAct, Step};
use commissioning::record::Status;
use maud::{Markup, html};

/// All that hold here.
#[must_use]
pub fn all(signed: &Signed, at: &StepAt, step: &Step, agenda: &Agenda, may: bool) -> Markup {
    let (site, drive) = (at.at.site.tag.as_str(), at.at.drive.tag.as_str());
    let here = agenda.step(&step.id);
    html! {
        @match &at.at.drive.record {
            None => p.notice { "The record of this drive has not been begun. " a href=(links::drive(site, drive)) { "Begin it on the drive’s page" } ", then record here." },
            Some(record) => @match &record.status {
                Status::Signed { .. } => p.notice { "The record is signed and waits for review: nothing can be changed here." },
                Status::Accepted { .. } => p.notice { "The record is accepted: nothing can be changed here." },
                Status::InProgress { .. } => {}
            }
        }
        @match here {
            None => p.notice { "With the options fitted to this drive this step does not apply; it is not counted." },
            Some((phase, now)) => {
                @if !phase.open() && at.at.drive.record.is_some() {
                    p.notice { "Its hold point has not been released. What you record here is kept, marked “out of order”, and raises a finding. " a href=(links::hold(site, drive, &phase.id)) { "See what it waits for" } }
                }
                @if now.waits_for_isolation {
                    p.notice { "Hands inside: “isolated and proved dead” is not in force. What you record is kept and raises a finding. " @if let Some(enter) = entering(at) { a href=(links::step(site, drive, enter)) { "Record isolation first" } } }
                }
                (otherwise(signed, at, &now.state, may))
            }
        }
    }
}

/// The first step that puts isolation in force.
fn entering(at: &StepAt) -> Option<&str> {
    at.at.procedure.steps().find(|(_, s)| s.isolation == Some(IsolationAct::Enter)).map(|(_, s)| s.id.as_str())
}

fn otherwise(signed: &Signed, at: &StepAt, state: &StepState, may: bool) -> Markup {
    let (words, reason) = match state {
        StepState::NotApplicable(reason) => ("Settled as not applicable", reason),
        StepState::CouldNotBeDone(reason) => ("Settled as one that could not be done", reason),
        _ => return html! {},
    };
    html! {
        div.notice {
            p { b { (words) } ": " (reason) }
            @if may { (form(&signed.visitor, &links::resume(&at.at.site.tag, &at.at.drive.tag, &at.id), button("Take this back"))) }
        }
    }
}
