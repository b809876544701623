//! Beside the phases: verdicts in words, open findings, sheets, and the ways to record, parameters, package, journal.

use crate::components::{counts, link_button};
use crate::extract::DriveAt;
use crate::pages::sheets::frame::SHEETS;
use crate::visitor::Signed;
use crate::{links, verdicts};
use commissioning::agenda::Agenda;
use commissioning::judge::{self, Counts, Judged};
use commissioning::people::Role;
use maud::{Markup, html};

/// All of it.
#[must_use]
pub fn all(signed: &Signed, at: &DriveAt, agenda: &Agenda, judged: Vec<Judged>) -> Markup {
    // What waits for a step that nobody reached says nothing yet; once signed, everything that was frozen counts.
    let is_frozen = at.drive.record.as_ref().is_some_and(|r| r.frozen.is_some());
    let judged = if is_frozen { judged } else { judge::reached(judged, agenda) };
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    html! {
        h2 { "Verdicts" }
        @if judged.is_empty() { p.quiet { "None yet. As soon as a nameplate is filled in, its figures are checked against each other." } }
        p { (counts(&verdicts::numbers(&Counts::of(&judged)))) }
        (verdicts::odd_in_words(&judged, |j| if j.step.is_empty() { links::record(site, drive) } else { links::step(site, drive, &j.step) }))
        @if at.drive.record.is_some() { (findings(at)) }
        h2 { "Sheets" }
        ul.sheets { @for sheet in SHEETS { li { a href=(links::sheet(site, drive, sheet)) { (sheet.words()) } span.quiet { (filled(at, sheet)) } } } }
        div.row.ways {
            @if at.drive.record.is_some() {
                (link_button(&links::record(site, drive), "Record"))
                (link_button(&links::parameters(site, drive), "Parameters"))
                (link_button(&links::package(site, drive), "Package"))
            }
            (link_button(&links::journal(site, drive, 1), "Journal"))
        }
        @if at.drive.record.is_some() && signed.visitor.is_any(&[Role::Engineer]) { p { a href=(links::sign(site, drive)) { "Sign as performed and recorded" } } }
    }
}

fn filled(at: &DriveAt, sheet: commissioning::plant::Sheet) -> String {
    let count = at
        .drive
        .fields
        .iter()
        .filter(|(p, s)| p.sheet == sheet && s.current().is_some_and(|r| r.value.is_some()))
        .count();
    if count == 0 { "empty".to_owned() } else { format!("{count} filled in") }
}

fn findings(at: &DriveAt) -> Markup {
    let mut open: Vec<_> = at.drive.record.iter().flat_map(|r| r.findings.values()).filter(|f| f.is_open()).collect();
    open.sort_by_key(|f| (std::cmp::Reverse(f.severity), f.number));
    let address = links::findings(&at.site.tag, &at.drive.tag);
    html! {
        h2 { "Open findings" }
        @if open.is_empty() { p.quiet { "None." } }
        ul.open-findings {
            @for finding in &open {
                li { a href=(links::finding(&at.site.tag, &at.drive.tag, finding.id)) { "Finding " (finding.number) " · " (finding.severity.words()) } ": " (finding.text) }
            }
        }
        p { a href=(address) { "All findings, and raise one" } }
    }
}
