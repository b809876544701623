//! Settles a finding: it was put right.

use super::at::FindingAt;
use super::show::page;
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::journal::Deed;

/// Settles it.
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
        Deed::SettleFinding { drive: at.at.drive.id, finding: at.finding.id, how: posted.text("how").to_owned() };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => Ok(Redirect::to(&links::findings(&at.at.site.tag, &at.at.drive.tag)).into_response()),
        Err(PageError::Fields { errors }) => {
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&signed, &at, Some(&posted), &errors)).into_response())
        }
        Err(other) => Err(other),
    }
}
