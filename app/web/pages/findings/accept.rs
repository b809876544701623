//! Accepts a finding as it is, by name and with a reason.

use super::at::FindingAt;
use super::show::page;
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::journal::Deed;
use commissioning::record::Status;

/// Where it leads afterwards: to the acceptance of the record while that waits for review, which lists what is left.
fn back(at: &FindingAt) -> String {
    let (site, drive) = (at.at.site.tag.as_str(), at.at.drive.tag.as_str());
    let waits = at.at.drive.record.as_ref().is_some_and(|r| matches!(r.status, Status::Signed { .. }));
    if waits { links::accept(site, drive) } else { links::findings(site, drive) }
}

/// Accepts it.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(
    State(app): State<App>,
    signed: Signed,
    at: FindingAt,
    posted: Posted,
) -> Result<Response, PageError> {
    let deed =
        Deed::AcceptFinding { drive: at.at.drive.id, finding: at.finding.id, reason: posted.text("reason").to_owned() };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => Ok(Redirect::to(&back(&at)).into_response()),
        Err(PageError::Fields { errors }) => {
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&signed, &at, Some(&posted), &errors)).into_response())
        }
        Err(other) => Err(other),
    }
}
