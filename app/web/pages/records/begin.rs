//! Begins a drive's record with the newest procedure.

use crate::extract::DriveAt;
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, links, progress};
use axum::extract::State;
use axum::response::Redirect;
use commissioning::agenda;
use commissioning::journal::Deed;

/// Begins it and goes to the first step.
///
/// # Errors
/// When the store refuses.
pub async fn keep(State(app): State<App>, signed: Signed, at: DriveAt, posted: Posted) -> Result<Redirect, PageError> {
    app.perform(&signed, posted.act()?, Deed::BeginRecord { drive: at.drive.id }).await?;
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    let found = app.store.drive_view(site, drive).await?;
    let next = found
        .map_or_else(|| links::drive(site, drive), |f| progress::next(&agenda::of(&f.view())).address(site, drive));
    Ok(Redirect::to(&next))
}
