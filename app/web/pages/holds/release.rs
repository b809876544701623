//! Releases a hold point by name.

use super::show::{HoldAt, page};
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, progress};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::agenda;
use commissioning::journal::Deed;
use commissioning::record::ReleaseRole;

/// Releases it and goes on behind it.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(State(app): State<App>, signed: Signed, hold: HoldAt, posted: Posted) -> Result<Response, PageError> {
    let declare = hold.at.procedure.phase(&hold.phase).and_then(|p| p.hold.as_ref()).map_or(0, |h| h.declare.len());
    let deed = Deed::ReleaseHold {
        drive: hold.at.drive.id,
        phase: hold.phase.clone(),
        role: if posted.text("role") == "witness" { ReleaseRole::Witness } else { ReleaseRole::Engineer },
        printed_name: posted.text("printed_name").to_owned(),
        declared: (0..declare).map(|n| posted.text(&format!("declared.{n}")) == "yes").collect(),
    };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => {
            let (site, drive) = (hold.at.site.tag.as_str(), hold.at.drive.tag.as_str());
            let found = app.store.drive_view(site, drive).await?.ok_or_else(|| PageError::not_found("This drive"))?;
            Ok(Redirect::to(&progress::next(&agenda::of(&found.view())).address(site, drive)).into_response())
        }
        Err(PageError::Fields { errors }) => {
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&signed, &hold, Some(&posted), &errors)?).into_response())
        }
        Err(other) => Err(other),
    }
}
