//! What a signer is shown before signing: counts, open findings, the digest, the sentence that is signed.

use super::signature::shortened;
use crate::components::counts;
use crate::extract::DriveAt;
use crate::verdicts;
use commissioning::agenda;
use commissioning::judge::Counts;
use commissioning::record::canonical::RecordFile;
use commissioning::record::{Finding, Meaning};
use maud::{Markup, html};

/// Whether every step is settled.
#[must_use]
pub fn complete(at: &DriveAt) -> bool {
    agenda::of(&at.view()).complete()
}

/// The digest that a signature put now would bind.
#[must_use]
pub fn digest(at: &DriveAt) -> String {
    RecordFile::shown(&at.view()).digest()
}

/// Counts, and what is odd in words.
#[must_use]
pub fn verdicts(at: &DriveAt) -> Markup {
    let judged = verdicts::all(&at.view());
    html! {
        h2 { "Verdicts" }
        p { (counts(&verdicts::numbers(&Counts::of(&judged)))) }
        (verdicts::odd_in_words(&judged, |j| crate::links::record_at(&at.site.tag, &at.drive.tag, &j.step)))
    }
}

/// Counts, what is odd, open findings, digest, and the sentence.
#[must_use]
pub fn summary(at: &DriveAt, meaning: Meaning, digest: &str, name: &str) -> Markup {
    let mut open: Vec<&Finding> =
        at.drive.record.iter().flat_map(|r| r.findings.values()).filter(|f| f.is_open()).collect();
    open.sort_by_key(|f| f.number);
    let revision = at.drive.record.as_ref().map_or(1, |r| r.revision);
    html! {
        (verdicts(at))
        h2 { "Open findings" }
        @if open.is_empty() { p.quiet { "None." } }
        ul { @for f in open { li { a href=(crate::links::finding(&at.site.tag, &at.drive.tag, f.id)) { "Finding " (f.number) } ", " (f.severity.words()) ": " (f.text) } } }
        h2 { "What you sign" }
        blockquote.statement {
            p { "“I, " b { (name) } ", sign the record of " b { (at.drive.tag) } ", revision " (revision) ", as " b { (meaning.words()) } ".”" }
            p.quiet { "It binds every value, unit, picture, finding and verdict of the record as shown, by the digest " code title=(digest) { (shortened(digest)) } "." }
        }
    }
}
