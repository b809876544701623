//! The record read from top to bottom like a report, as a supervisor reviews it and a printer prints it.

use super::{changed, closing, report_end, report_settings, report_sheets, report_step, returned};
use crate::components::{Page, counts, link_button, main_link};
use crate::extract::DriveAt;
use crate::visitor::Signed;
use crate::{links, unanswered, verdicts};
use axum::extract::Query;
use commissioning::agenda::{self, Agenda};
use commissioning::judge::{Counts, Judged};
use commissioning::people::Role;
use commissioning::record::{Record, Status};
use maud::{Markup, html};
use serde::Deserialize;

/// How much of it was asked for.
#[derive(Debug, Default, Deserialize)]
pub struct Asked {
    #[serde(default)]
    working: String,
    #[serde(default)]
    whole: String,
}

/// Shows it.
pub async fn show(signed: Signed, at: DriveAt, Query(asked): Query<Asked>) -> Markup {
    let agenda = agenda::of(&at.view());
    let judged = verdicts::all(&at.view());
    let in_full = asked.working == "all";
    let charts = drawing::charts::of(&at.view());
    let shown =
        report_step::Shown { judged: &judged, charts: &charts, in_full, whole: in_full || asked.whole == "yes" };
    let body = html! {
        article.report {
            (opening(&at, &agenda, &judged))
            (ways(&at, shown))
            @if at.drive.record.is_some() { (turns(&at)) }
            (report_sheets::all(&at, shown))
            @for phase in &agenda.phases { (report_step::phase(&signed, &at, phase, shown)) }
            (report_settings::all(&at, shown.whole))
            @if let Some(record) = &at.drive.record { (report_end::all(&signed, &at, record)) }
        }
    };
    let page = Page::new("Record", body).own_heading().plate(at.plate());
    match actions(&signed, &at) {
        Some(actions) => page.actions(actions).render(&signed.visitor),
        None => page.render(&signed.visitor),
    }
}

/// Which drive, where it stands, how the verdicts are, what is odd.
fn opening(at: &DriveAt, agenda: &Agenda, judged: &[Judged]) -> Markup {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    let open = at.drive.record.iter().flat_map(|r| r.findings.values()).filter(|f| f.is_open()).count();
    html! {
        h1 { "Record of " (at.drive.tag) }
        p.lead { (at.drive.name) ", " (at.site.name) }
        @if let Some(record) = &at.drive.record { (returned::notice(record)) }
        @match &at.drive.record {
            None => p.notice { "No record has been begun." },
            Some(record) => p { "Revision " (record.revision) ", " b { (record.status.words()) } ", begun " (record.begun.shown()) " UTC by " (record.begun_by) ", procedure version " (record.procedure) "." }
        }
        p { (agenda.phases.iter().map(agenda::PhaseAgenda::settled).sum::<usize>()) " steps settled, " (agenda.left()) " left · " (open) @if open == 1 { " open finding" } @else { " open findings" } }
        @if at.drive.record.as_ref().is_some_and(|r| !matches!(r.status, Status::Accepted { .. })) { (unanswered::notice(at)) }
        @if at.drive.record.as_ref().is_some_and(|r| r.frozen.is_some()) { p.quiet { "Verdicts as they were frozen at the signature." } }
        p { (counts(&verdicts::numbers(&Counts::of(judged)))) }
        (verdicts::odd_in_words(judged, |j| if j.step.is_empty() { "#plates".to_owned() } else { links::record_at(site, drive, &j.step) }))
    }
}

/// How much of it lies open: folded, whole, or whole with every working. A printer prints what lies open.
fn ways(at: &DriveAt, shown: report_step::Shown<'_>) -> Markup {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    html! {
        div.row.fold-ways {
            @if shown.whole { (link_button(&links::record(site, drive), "Fold the parts")) }
            @if shown.in_full || !shown.whole { (link_button(&links::record_whole(site, drive), "Whole record")) }
            @if !shown.in_full { (link_button(&links::record_in_full(site, drive), "Whole record with every working")) }
        }
    }
}

/// What happened to it so far, and what changed since it was last sent back.
fn turns(at: &DriveAt) -> Markup {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    let list = changed::list(&at.drive, &at.procedure);
    let returned = at.drive.record.as_ref().is_some_and(|r| changed::since(r).is_some());
    html! {
        @if returned {
            section.card.changes {
                h2 { "Changed since it was sent back" }
                @if list.is_empty() { p { "Nothing." } }
                ul { @for (step, words) in &list { li { @if step.is_empty() { (words) } @else { a href=(links::record_at(site, drive, step)) { (words) } } } } }
            }
        }
    }
}

fn actions(signed: &Signed, at: &DriveAt) -> Option<Markup> {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    let record: &Record = at.drive.record.as_ref()?;
    let supervisor = signed.visitor.is_any(&[Role::Supervisor]);
    match record.status {
        Status::Signed { .. } if supervisor => Some(
            html! { (link_button(&links::send_back(site, drive), "Return …")) (main_link(&links::accept(site, drive), "Accept …")) },
        ),
        Status::InProgress { .. } if signed.visitor.is_any(&[Role::Engineer]) && closing::complete(at) => {
            Some(main_link(&links::sign(site, drive), "Sign …"))
        }
        _ => None,
    }
}
