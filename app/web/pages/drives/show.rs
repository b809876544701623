//! Shows a drive: the next step as one large button, then phases with their steps, findings, verdicts, sheets.

use super::{aside, phases};
use crate::components::{Page, form, link_button, main_button, main_link, notice};
use crate::extract::DriveAt;
use crate::pages::records::returned;
use crate::visitor::Signed;
use crate::{links, progress, unanswered, verdicts};
use commissioning::agenda::{self, Agenda};
use commissioning::people::Role;
use commissioning::record::{Record, Status};
use maud::{Markup, html};

/// Shows it.
pub async fn show(signed: Signed, at: DriveAt) -> Markup {
    let view = at.view();
    let agenda = agenda::of(&view);
    let judged = verdicts::all(&view);
    let body = html! {
        div.split.drive {
            section {
                h1 { (at.drive.name) }
                @match &at.drive.record {
                    None => { (beginning(&signed, &at)) }
                    Some(record) => { (standing(record)) (onward(&signed, &at, record, &agenda)) @if matches!(record.status, Status::InProgress { .. }) { (unanswered::notice(&at)) } (phases::list(&at, &agenda, &judged)) }
                }
            }
            aside { (aside::all(&signed, &at, &agenda, judged)) }
        }
    };
    Page::new("Drive", body)
        .own_heading()
        .plate(at.plate())
        .strip(progress::phase_strip(&at, &agenda, None))
        .render(&signed.visitor)
}

fn beginning(signed: &Signed, at: &DriveAt) -> Markup {
    html! {
        div.empty {
            h2 { "The record has not been begun" }
            p { "Sheets can be filled in before. The record keeps the procedure it begins with: version " (at.procedure.version) ", " (at.procedure.steps().count()) " steps in " (at.procedure.phases.len()) " phases, of which those apply that fit the options of this drive." }
            @if signed.visitor.is_any(&[Role::Engineer]) {
                (form(&signed.visitor, &links::begin(&at.site.tag, &at.drive.tag), html! { (main_button("Begin the record")) }))
            } @else { p.quiet { "A startup engineer begins it." } }
        }
    }
}

/// Where the record stands, when that is more than being worked on.
fn standing(record: &Record) -> Markup {
    html! {
        p.quiet { "Revision " (record.revision) " · begun " (record.begun.date()) " by " (record.begun_by) " · procedure version " (record.procedure) }
        @match &record.status {
            Status::InProgress { returned: None } => {}
            Status::InProgress { returned: Some(_) } => { (returned::notice(record)) }
            Status::Signed { at } => { (notice(&format!("Signed {} UTC; waits for review. Nothing can be changed until a supervisor accepts or returns it.", at.shown()))) }
            Status::Accepted { at } => { (notice(&format!("Accepted {} UTC. Reopening it needs a reason and begins the next revision.", at.shown()))) }
        }
    }
}

/// The one thing to do now, for whoever looks.
fn onward(signed: &Signed, at: &DriveAt, record: &Record, agenda: &Agenda) -> Markup {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    let supervisor = signed.visitor.is_any(&[Role::Supervisor]);
    html! {
        div.onward {
            @match &record.status {
                Status::InProgress { .. } if signed.visitor.is_any(&[Role::Engineer]) => {
                    @let next = progress::next(agenda);
                    a.b.go.next href=(next.address(site, drive)) { span { "Next" } b { (next.words()) } }
                }
                Status::Signed { .. } if supervisor => {
                    (main_link(&links::record(site, drive), "Review the record"))
                    (link_button(&links::accept(site, drive), "Accept …"))
                    (link_button(&links::send_back(site, drive), "Return …"))
                }
                Status::Accepted { .. } => {
                    (main_link(&links::package(site, drive), "Handover package"))
                    @if supervisor { (link_button(&links::reopen(site, drive), "Reopen …")) }
                }
                _ => { (main_link(&links::record(site, drive), "Read the record")) }
            }
        }
    }
}
