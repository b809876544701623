//! The copy of a picture that pages show: upright, without metadata.

use crate::{App, PageError, pictures};
use axum::extract::{Path, State};
use axum::http::header;
use axum::response::{IntoResponse, Response};

/// Sends it; its address is its content, so that a browser may keep it.
///
/// # Errors
/// When there is no such picture.
pub async fn show(State(app): State<App>, Path(hash): Path<String>) -> Result<Response, PageError> {
    let missing = || PageError::not_found("This picture");
    if !super::original::is_hash(&hash) {
        return Err(missing());
    }
    let _turn = pictures::turn().await?;
    let (bytes, _) = app.store.photo(&hash).await?.ok_or_else(missing)?;
    let copy = tokio::task::spawn_blocking(move || pictures::display_copy(&bytes)).await.map_err(PageError::broken)?;
    let copy = copy.map_err(PageError::broken)?;
    let headers =
        [(header::CONTENT_TYPE, "image/jpeg"), (header::CACHE_CONTROL, "private, max-age=31536000, immutable")];
    Ok((headers, copy).into_response())
}
