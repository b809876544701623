//! All findings of a record, and the form to raise one.

use super::at::state;
use super::raise;
use crate::components::{Page, empty};
use crate::extract::DriveAt;
use crate::pages::steps::at::may_record;
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{links, progress};
use axum::extract::Query;
use commissioning::record::Finding;
use commissioning::{FieldError, agenda};
use maud::{Markup, html};
use serde::Deserialize;

/// The step a finding is raised at.
#[derive(Debug, Default, Deserialize)]
pub struct Asked {
    #[serde(default)]
    step: String,
}

/// Shows them.
pub async fn show(signed: Signed, at: DriveAt, Query(asked): Query<Asked>) -> Markup {
    page(&signed, &at, &asked.step, None, &[])
}

/// The page, or as it comes back when one was refused.
#[must_use]
pub fn page(signed: &Signed, at: &DriveAt, step: &str, posted: Option<&Posted>, errors: &[FieldError]) -> Markup {
    let mut all: Vec<&Finding> = at.drive.record.iter().flat_map(|r| r.findings.values()).collect();
    all.sort_by_key(|f| (!f.is_open(), std::cmp::Reverse(f.severity), f.number));
    let body = html! {
        @if all.is_empty() { (empty("No findings", "Raise one for anything that is wrong or stays open, so that it is settled or accepted by name before handover.", html! {})) }
        @if at.drive.record.is_none() { p.notice { "The record of this drive has not been begun. " a href=(links::drive(&at.site.tag, &at.drive.tag)) { "Begin it on the drive’s page" } "." } }
        ol.findings { @for finding in &all { (row(at, finding)) } }
        @if may_record(signed, at) { h2 #raise { "Raise a finding" } (raise::form(signed, at, step, posted, errors)) }
    };
    let agenda = agenda::of(&at.view());
    Page::new("Findings", body)
        .plate(at.plate())
        .strip(progress::phase_strip(at, &agenda, None))
        .render(&signed.visitor)
}

fn row(at: &DriveAt, finding: &Finding) -> Markup {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    let step = finding.step.as_deref().and_then(|id| at.procedure.step(id));
    html! {
        li.card.finding.open[finding.is_open()] {
            p.number { b { "Finding " (finding.number) } " · " (finding.severity.words()) }
            p { (finding.text) }
            p.quiet { "raised " (finding.received.shown()) " UTC by " (finding.by_name) @if let Some((_, step)) = step { " at " a href=(links::step(site, drive, &step.id)) { (step.title) } } }
            p { (state(finding)) }
            @if finding.is_open() { a.b href=(links::finding(site, drive, finding.id)) { "Settle or accept …" } }
        }
    }
}
