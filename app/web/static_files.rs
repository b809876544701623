//! The stylesheet, the script and the icon: embedded, named by their content, kept by the browser for a year.

use crate::PageError;
use axum::extract::Path;
use axum::http::header;
use axum::response::{IntoResponse, Response};
use sha2::{Digest, Sha256};
use std::sync::OnceLock;

struct StaticFile {
    name: &'static str,
    media: &'static str,
    text: &'static str,
    hash: String,
}

fn files() -> &'static [StaticFile] {
    static FILES: OnceLock<Vec<StaticFile>> = OnceLock::new();
    FILES.get_or_init(|| {
        [
            (
                "asleft.css",
                "text/css; charset=utf-8",
                concat!(include_str!("static/asleft.css"), include_str!("static/record.css")),
            ),
            ("asleft.js", "text/javascript; charset=utf-8", include_str!("static/asleft.js")),
            ("asleft.svg", "image/svg+xml", include_str!("static/asleft.svg")),
        ]
        .into_iter()
        .map(|(name, media, text)| {
            let digest = commissioning::journal::chain::hexadecimal(&Sha256::digest(text.as_bytes()));
            StaticFile { name, media, text, hash: digest.chars().take(16).collect() }
        })
        .collect()
    })
}

/// Its address with the content's hash.
#[must_use]
pub fn address(name: &str) -> String {
    let hash = files().iter().find(|f| f.name == name).map_or("", |f| f.hash.as_str());
    format!("/static/{hash}/{name}")
}

/// Gives a file; under another hash than its own it is not here, so that nothing stale is kept under a new name.
///
/// # Errors
/// When there is no such file.
pub async fn show(Path((hash, name)): Path<(String, String)>) -> Result<Response, PageError> {
    let file =
        files().iter().find(|f| f.name == name && f.hash == hash).ok_or_else(|| PageError::not_found("This file"))?;
    let headers = [(header::CONTENT_TYPE, file.media), (header::CACHE_CONTROL, "public, max-age=31536000, immutable")];
    Ok((headers, file.text).into_response())
}
