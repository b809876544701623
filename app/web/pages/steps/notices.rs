//! What a step says before its fields: order, isolation, how it was settled, where the record stands.

use super::at::StepAt;
use crate::clock_words::moment;
use crate::components::{button, form, who_when};
use crate::links;
use crate::visitor::Signed;
use commissioning::agenda::{Agenda, StepState};
use commissioning::procedure::{IsolationAct, Step};
use commissioning::record::{OnceOtherwise, SettledOtherwise, Status};
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
        (once(once_at(at, &step.id)))
    }
}

/// How a step was settled otherwise before, and no longer is, oldest first.
fn once_at<'a>(at: &'a StepAt, step: &str) -> Vec<&'a OnceOtherwise> {
    at.at.drive.record.iter().flat_map(|r| &r.once_otherwise).filter(|o| o.step == step).collect()
}

fn once(earlier: Vec<&OnceOtherwise>) -> Markup {
    html! {
        @if !earlier.is_empty() {
            details.earlier.once {
                summary { "settled otherwise before: " (earlier.len()) }
                ul { @for o in earlier { li { (once_in_words(o)) } } }
            }
        }
    }
}

/// One of them: struck through, with who settled it so, and who took it back.
#[must_use]
pub fn once_in_words(o: &OnceOtherwise) -> Markup {
    let (how, reason) = &o.settled.value;
    let how = match how {
        SettledOtherwise::NotApplicable => "does not apply",
        SettledOtherwise::CouldNotBeDone => "could not be done",
    };
    html! { s { (how) ": " (reason) } " " (who_when(&o.settled)) "; taken back " (moment(o.ended.received)) " · " (o.ended.by_name) }
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
