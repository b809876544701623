//! Takes back that a step was settled otherwise; what it raised stays.

use super::at::StepAt;
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use axum::response::Redirect;
use commissioning::journal::Deed;

/// Takes it back and shows the step.
///
/// # Errors
/// When the store refuses.
pub async fn keep(State(app): State<App>, signed: Signed, at: StepAt, posted: Posted) -> Result<Redirect, PageError> {
    app.perform(&signed, posted.act()?, Deed::ResumeStep { drive: at.at.drive.id, step: at.id.clone() }).await?;
    Ok(Redirect::to(&links::step(&at.at.site.tag, &at.at.drive.tag, &at.id)))
}
