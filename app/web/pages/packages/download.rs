//! Makes the handover package of a drive and sends it as one file; one package at a time.

use super::material;
use crate::extract::DriveAt;
use crate::{App, PageError};
use axum::extract::State;
use axum::http::header;
use axum::response::{IntoResponse, Response};
use handover::AssembleFault;
use std::sync::Arc;
use tokio::sync::Semaphore;

/// A package is typeset with all its pictures: one at a time, so that reading pages stays quick.
static PACKING: Semaphore = Semaphore::const_new(1);

/// Makes and sends it.
///
/// # Errors
/// When nothing is begun, the installation has no signing key, or the material does not fit together.
pub async fn send(State(app): State<App>, at: DriveAt) -> Result<Response, PageError> {
    let key = app.signing_key.clone().ok_or_else(|| PageError::NotNow {
        why: "This installation has no signing key, so that it makes no packages. Whoever keeps the server sets one."
            .to_owned(),
    })?;
    let _turn = PACKING.acquire().await.map_err(PageError::broken)?;
    let material = material::gather(&app, &at).await?;
    let made = tokio::task::spawn_blocking(move || pack(&material, &key)).await.map_err(PageError::broken)??;
    let headers = [
        (header::CONTENT_TYPE, "application/zip".to_owned()),
        (header::CONTENT_DISPOSITION, format!("attachment; filename=\"{}\"", file_name(&at, "handover", "zip"))),
    ];
    Ok((headers, made).into_response())
}

fn pack(material: &handover::Material, key: &Arc<std::path::Path>) -> Result<Vec<u8>, PageError> {
    let key = handover::key::load_or_create(key).map_err(PageError::broken)?;
    let package = handover::assemble(material, &key).map_err(|fault| match fault {
        AssembleFault::NoRecord => {
            PageError::NotNow { why: "This drive has no record yet. Begin one first.".to_owned() }
        }
        other => PageError::broken(other),
    })?;
    package.to_zip().map_err(PageError::broken)
}

/// A file name of site, tag and what it is; whatever a file name may not hold becomes a dash.
#[must_use]
pub fn file_name(at: &DriveAt, what: &str, ending: &str) -> String {
    let plain = |text: &str| {
        text.chars()
            .map(|c| if c.is_ascii_alphanumeric() || matches!(c, '-' | '_') { c } else { '-' })
            .collect::<String>()
    };
    let revision = at.drive.record.as_ref().map_or(0, |r| r.revision);
    format!("{}-{}-r{revision}-{what}.{ending}", plain(&at.site.tag), plain(&at.drive.tag))
}
