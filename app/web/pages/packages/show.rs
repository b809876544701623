//! What the handover package holds, whether it is a draft, and the way to take it.

use crate::components::{Page, empty, facts, main_link, notice};
use crate::extract::DriveAt;
use crate::visitor::Signed;
use crate::{App, links, packaging};
use axum::extract::State;
use commissioning::record::canonical::RecordFile;
use commissioning::record::{Record, Status};
use maud::{Markup, html};

/// Every file of a package, and what it is for.
const FILES: [(&str, &str); 8] = [
    (
        "handover.pdf",
        "The document: which drive, what was found, what to key in; then everything that was recorded, with the working of every verdict.",
    ),
    ("record.json", "The same as data, from which every verdict can be worked out again."),
    ("parameters.csv", "The parameter list for a spreadsheet."),
    ("events/", "The journals of drive and site, event by event, each linked to the one before by its hash."),
    ("photos/", "Every picture as it was taken."),
    ("SHA256SUMS", "The sums of all files, signed in SHA256SUMS.sig."),
    ("signing-key.pem", "The public key with which the signature is checked."),
    ("how-to-verify.txt", "How to check all of it with common tools, without this program."),
];

/// Shows it.
pub async fn show(State(app): State<App>, signed: Signed, at: DriveAt) -> Markup {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    let body = match &at.drive.record {
        None => empty(
            "No record yet",
            "A package is made from a record. Begin it on the drive’s page.",
            html! { a.b href=(links::drive(site, drive)) { "Back to the drive" } },
        ),
        Some(record) => html! {
            (draft(record))
            p.lead { "Everything that leaves the building for this drive, in one file." }
            (facts([
                ("revision", html! { (record.revision) ", " (record.status.words()) }),
                ("signatures", html! { (record.signatures.iter().filter(|s| !s.superseded).count()) " standing" }),
                ("pictures", html! { (packaging::hashes(&RecordFile::shown(&at.view())).len()) }),
                ("journal", html! { (at.drive.head.sequence) " events, head " code { (at.drive.head.hash.get(..16).unwrap_or_default()) } }),
            ]))
            div.row {
                @if app.signing_key.is_some() { (main_link(&links::package_file(site, drive), "Download the package")) }
                @else { p.notice { "This installation has no signing key, so that it makes no packages. Whoever keeps the server sets one." } }
                a.b href=(links::journal_file(site, drive)) { "Journal only" }
            }
            p.quiet { "Typesetting takes some seconds." }
            h2 { "What is in it" }
            (facts(FILES.map(|(name, what)| (name, html! { (what) }))))
        },
    };
    Page::new("Handover package", body).plate(at.plate()).render(&signed.visitor)
}

fn draft(record: &Record) -> Markup {
    match &record.status {
        Status::Accepted { .. } => html! {},
        Status::Signed { .. } => notice("The record is signed but not accepted: the package is marked as a draft."),
        Status::InProgress { .. } => {
            notice("The record is in progress: the package is marked as a draft, and its verdicts may still change.")
        }
    }
}
