//! Signs a record as reviewed and accepted.

use super::signature;
use crate::components::notice;
use crate::extract::DriveAt;
use crate::posted::Posted;
use crate::sessions::SessionToken;
use crate::visitor::Signed;
use crate::{App, PageError};
use axum::extract::State;
use axum::response::Response;
use commissioning::record::{Meaning, Severity, Status};
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
    let holding = record.findings.values().filter(|f| f.is_open() && f.severity != Severity::Information).count();
    let before = html! {
        @if record.contributors.contains(&signed.person.id) { (notice("You entered something in this record or signed it, so that you cannot accept it. Ask another supervisor.")) }
        @if holding > 0 { (notice("Findings are open that must be closed before handover. Accept each by name with a reason, or return the record.")) }
    };
    Ok(signature::page(&signed, &at, Meaning::Accepted, &before, None, &[]))
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
