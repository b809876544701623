//! A picture as it was received, to take away; never shown in a page.

use crate::{App, PageError};
use axum::extract::{Path, State};
use axum::http::header;
use axum::response::{IntoResponse, Response};

/// Whether a text can name a picture at all.
#[must_use]
pub fn is_hash(text: &str) -> bool {
    text.len() == 64 && text.bytes().all(|b| b.is_ascii_digit() || (b'a'..=b'f').contains(&b))
}

/// Sends it as a file named by its hash.
///
/// # Errors
/// When there is no such picture.
pub async fn send(State(app): State<App>, Path(hash): Path<String>) -> Result<Response, PageError> {
    let missing = || PageError::not_found("This picture");
    if !is_hash(&hash) {
        return Err(missing());
    }
    let (bytes, media) = app.store.photo(&hash).await?.ok_or_else(missing)?;
    let ending = handover::Photograph::ending(&media).ok_or_else(missing)?;
    let named = format!("attachment; filename=\"{}.{ending}\"", hash.get(..16).unwrap_or_default());
    Ok(([(header::CONTENT_TYPE, media), (header::CONTENT_DISPOSITION, named)], bytes).into_response())
}
