//! The end of the report: isolation, findings, remarks on the whole, signatures, what happened to the record.

use super::remark;
use super::signature::shortened;
use crate::extract::DriveAt;
use crate::pages::findings::at::state;
use crate::visitor::Signed;
use commissioning::record::{Finding, Record, Turn};
use maud::{Markup, html};

/// All of it.
#[must_use]
pub fn all(signed: &Signed, at: &DriveAt, record: &Record) -> Markup {
    let mut findings: Vec<&Finding> = record.findings.values().collect();
    findings.sort_by_key(|f| f.number);
    html! {
        section {
            h2 { "Isolation" }
            @if record.isolations.is_empty() { p.quiet { "Never entered." } }
            ul { @for i in &record.isolations { li { "in force from " (i.from.shown()) " UTC, " (i.by_name) @match &i.lifted { Some((when, by)) => { "; lifted " (when.shown()) " UTC, " (by) }, None => { "; still in force" } } } } }
            h2 { "Findings" }
            @if findings.is_empty() { p.quiet { "None." } }
            ol.plain-list { @for f in findings { li { b { "Finding " (f.number) } " · " (f.severity.words()) ": " (f.text) " (" (f.by_name) ", " (f.received.shown()) " UTC). " (state(f)) } } }
            h2 { "Remarks on the whole record" }
            (remark::list(at, ""))
            (remark::form(signed, at, ""))
            (signatures(record))
            h2 { "What happened to it" }
            ul { @for turn in &record.history { li { (turn.received.shown()) " UTC, " (turn.by_name) ": " (words(&turn.value)) } } }
        }
    }
}

/// Every signature ever put; superseded ones are struck through, not gone.
#[must_use]
pub fn signatures(record: &Record) -> Markup {
    html! {
        h2 { "Signatures" }
        @if record.signatures.is_empty() { p.quiet { "Not signed yet." } }
        @for s in &record.signatures {
            div.card.signature.superseded[s.superseded] {
                p { b { (s.printed_name) } ", " (s.received.shown()) " UTC" }
                p { "“" (s.meaning.words()) "”, revision " (s.revision) @if s.superseded { " · superseded: the record went on after it" } }
                p.quiet { "digest " code { (shortened(&s.digest)) } " · journal at event " (s.head.sequence) " · checks version " (s.catalogue) }
            }
        }
    }
}

fn words(turn: &Turn) -> String {
    match turn {
        Turn::Signed => "signed as performed and recorded".to_owned(),
        Turn::Returned(reason) => format!("returned: {reason}"),
        Turn::Accepted => "reviewed and accepted".to_owned(),
        Turn::Reopened(reason, revision) => format!("reopened as revision {revision}: {reason}"),
    }
}
