//! The journal of a drive as the event file that packages hold.

use crate::extract::DriveAt;
use crate::pages::packages::download::file_name;
use crate::{App, PageError};
use axum::extract::State;
use axum::http::header;
use axum::response::{IntoResponse, Response};
use commissioning::journal::Chain;

/// Sends it.
///
/// # Errors
/// When the store cannot be read.
pub async fn send(State(app): State<App>, at: DriveAt) -> Result<Response, PageError> {
    let chain = app.store.chain(Chain::Drive(at.drive.id)).await?;
    let headers = [
        (header::CONTENT_TYPE, "text/plain; charset=utf-8".to_owned()),
        (header::CONTENT_DISPOSITION, format!("attachment; filename=\"{}\"", file_name(&at, "journal", "events"))),
    ];
    Ok((headers, handover::write_events(&chain)).into_response())
}
