//! Signs a record as reviewed and accepted.

use super::{closing, signature};
use crate::components::{Page, link_button, main_link, notice};
use crate::extract::DriveAt;
use crate::posted::Posted;
use crate::sessions::SessionToken;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use axum::response::Response;
use commissioning::record::{Finding, Meaning, Record, Severity, Status};
use maud::{Markup, html};

/// The form.
///
/// # Errors
/// When the record does not wait for review.
pub async fn show(signed: Signed, at: DriveAt) -> Result<Markup, PageError> {
    let record = at.drive.record.as_ref().filter(|r| matches!(r.status, Status::Signed { .. }));
    let why =
        || PageError::NotNow { why: "Only a record signed as performed and recorded can be accepted.".to_owned() };
    let record = record.ok_or_else(why)?;
    let own = record.contributors.contains(&signed.person.id);
    let holding = holding(record);
    if own || !holding.is_empty() {
        return Ok(blocked(&signed, &at, own, &holding));
    }
    Ok(signature::page(&signed, &at, Meaning::Accepted, None, &[]))
}

/// Open findings that must be closed first, in order.
fn holding(record: &Record) -> Vec<&Finding> {
    let mut holding: Vec<&Finding> =
        record.findings.values().filter(|f| f.is_open() && f.severity != Severity::Information).collect();
    holding.sort_by_key(|f| f.number);
    holding
}

/// What stands in the way and what to do about it; nothing to sign.
fn blocked(signed: &Signed, at: &DriveAt, own: bool, holding: &[&Finding]) -> Markup {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    let body = html! {
        @if own { (notice("You entered something in this record or signed it, so that you cannot accept it. Ask another supervisor.")) }
        @if !holding.is_empty() {
            div.notice {
                p { b { @if holding.len() == 1 { "One finding is" } @else { (holding.len()) " findings are" } " open and must be closed before handover." } " Accept each by name with a reason; to have one settled, return the record." }
                ul { @for f in holding { li { a href=(links::finding(site, drive, f.id)) { "Finding " (f.number) } ", " (f.severity.words()) ": " (f.text) br; a href=(links::accept_form(site, drive, f.id)) { "Accept finding " (f.number) " …" } " · " a href=(links::send_back(site, drive)) { "Return the record to have it settled …" } } } }
            }
        }
        (closing::verdicts(at))
        div.row { (main_link(&links::record(site, drive), "Read the record")) @if !own { (link_button(&links::send_back(site, drive), "Return the record …")) } }
    };
    Page::new("Not to be accepted yet", body).narrow().plate(at.plate()).render(&signed.visitor)
}

/// Signs it.
///
/// # Errors
/// When the store refuses otherwise than at the password.
pub async fn keep(
    State(app): State<App>,
    signed: Signed,
    at: DriveAt,
    token: SessionToken,
    posted: Posted,
) -> Result<Response, PageError> {
    signature::put(&app, &signed, &at, Meaning::Accepted, token, &posted).await
}
