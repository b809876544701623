//! A finding by itself, to be settled or accepted as it is.

use super::at::{FindingAt, state};
use crate::components::{FieldInput, InputKind, Page, button, field, form, link_button, main_button};
use crate::links;
use crate::pages::steps::at::may_record;
use crate::posted::Posted;
use crate::visitor::Signed;
use commissioning::FieldError;
use commissioning::people::Role;
use commissioning::record::Status;
use maud::{Markup, html};

/// Shows it.
pub async fn show(signed: Signed, at: FindingAt) -> Markup {
    page(&signed, &at, None, &[])
}

/// The page, or as it comes back when something was refused.
#[must_use]
pub fn page(signed: &Signed, at: &FindingAt, posted: Option<&Posted>, errors: &[FieldError]) -> Markup {
    let (site, drive, finding) = (at.at.site.tag.as_str(), at.at.drive.tag.as_str(), &at.finding);
    let none = Posted::default();
    let sent = posted.unwrap_or(&none);
    let accepted = at.at.drive.record.as_ref().is_none_or(|r| matches!(r.status, Status::Accepted { .. }));
    let waits = at.at.drive.record.as_ref().is_some_and(|r| matches!(r.status, Status::Signed { .. }));
    let supervisor = signed.visitor.is_any(&[Role::Supervisor]) && !accepted;
    let body = html! {
        p.lead { (finding.text) }
        p.quiet { (finding.severity.words()) " · raised " (finding.received.shown()) " UTC by " (finding.by_name) }
        p { (state(finding)) }
        @if finding.is_open() && may_record(signed, &at.at) {
            section.card #settle {
                h2 { "Put right" }
                (form(&signed.visitor, &links::settle_finding(site, drive, finding.id), html! {
                    (field(&FieldInput::new("how", "What was done", InputKind::Lines(2000)).needed().sent_back(sent, errors)))
                    (main_button("Settle the finding"))
                }))
            }
        }
        @if finding.is_open() && supervisor {
            section.card #accept {
                h2 { "Accept as it is" }
                (form(&signed.visitor, &links::accept_finding(site, drive, finding.id), html! {
                    (field(&FieldInput::new("reason", "Why it may stay", InputKind::Lines(1000)).needed().sent_back(sent, errors)))
                    (button("Accept the finding"))
                }))
            }
        }
        div.row { @if waits && supervisor { (link_button(&links::accept(site, drive), "Back to accepting the record")) } (link_button(&links::findings(site, drive), "All findings")) (link_button(&links::drive(site, drive), "Back to the drive")) }
    };
    Page::new(format!("Finding {}", finding.number), body).narrow().plate(at.at.plate()).render(&signed.visitor)
}
