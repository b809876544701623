//! The copy of a picture that pages show: upright, without metadata.

use crate::{App, PageError, pictures};
use axum::extract::{Path, State};
use axum::http::header;
use axum::response::{IntoResponse, Response};
use tokio::sync::Semaphore;

/// At most two are made at once: a large picture takes a tenth of a gigabyte while it is unpacked.
static MAKING: Semaphore = Semaphore::const_new(2);

/// Sends it; its address is its content, so that a browser may keep it.
///
/// # Errors
/// When there is no such picture.
pub async fn show(State(app): State<App>, Path(hash): Path<String>) -> Result<Response, PageError> {
    let missing = || PageError::not_found("This picture");
    if !super::original::is_hash(&hash) {
        return Err(missing());
    }
    let (bytes, _) = app.store.photo(&hash).await?.ok_or_else(missing)?;
    let _turn = MAKING.acquire().await.map_err(PageError::broken)?;
    let copy = tokio::task::spawn_blocking(move || pictures::display_copy(&bytes)).await.map_err(PageError::broken)?;
    let copy = copy.map_err(PageError::broken)?;
    let headers =
        [(header::CONTENT_TYPE, "image/jpeg"), (header::CACHE_CONTROL, "private, max-age=31536000, immutable")];
    Ok((headers, copy).into_response())
}
