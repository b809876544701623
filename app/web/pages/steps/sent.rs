//! A step's form as it was sent: plain, or in parts when pictures go along; pictures are kept before anything is recorded.

use super::at::{StepAt, kept, name};
use crate::posted::{Posted, check_token};
use crate::visitor::Visitor;
use crate::{App, PageError, pictures};
use axum::extract::multipart::{Multipart, MultipartError};
use axum::extract::{FromRequest, Request};
use axum::http::{StatusCode, header};
use commissioning::FieldError;
use commissioning::record::{EntryPlace, Photo};
use tokio::sync::SemaphorePermit;

/// What was sent.
#[derive(Debug)]
pub struct Sent {
    posted: Posted,
    /// Field name and bytes of every picture.
    pictures: Vec<(String, Vec<u8>)>,
    /// Held as long as the pictures are.
    _room: Option<SemaphorePermit<'static>>,
}

impl<S: Send + Sync> FromRequest<S> for Sent {
    type Rejection = PageError;

    async fn from_request(request: Request, state: &S) -> Result<Self, Self::Rejection> {
        let kind = request.headers().get(header::CONTENT_TYPE).map(|v| v.as_bytes().to_vec()).unwrap_or_default();
        if !kind.starts_with(b"multipart/form-data") {
            return Ok(Self { posted: Posted::from_request(request, state).await?, pictures: Vec::new(), _room: None });
        }
        let visitor = request
            .extensions()
            .get::<Visitor>()
            .cloned()
            .ok_or_else(|| PageError::broken("the request was not recognised first"))?;
        let parts = Multipart::from_request(request, state).await.map_err(|_| PageError::FormToken)?;
        in_parts(&visitor, parts).await
    }
}

/// The token comes first and is checked before anything else is read.
async fn in_parts(visitor: &Visitor, mut parts: Multipart) -> Result<Sent, PageError> {
    let (mut pairs, mut files) = (Vec::new(), Vec::new());
    let mut known = false;
    let mut room = None;
    while let Some(part) = parts.next_field().await.map_err(cut)? {
        let name = part.name().unwrap_or_default().to_owned();
        let is_file = part.file_name().is_some();
        if !known {
            let token = if name == "token" && !is_file { part.text().await.map_err(cut)? } else { String::new() };
            check_token(visitor, &token)?;
            known = true;
            pairs.push((name, token));
        } else if is_file {
            if room.is_none() {
                room = Some(pictures::room().await?);
            }
            let bytes = part.bytes().await.map_err(cut)?;
            // A browser sends an empty part where no picture was chosen.
            if !bytes.is_empty() {
                files.push((name.trim_end_matches(".file").to_owned(), bytes.to_vec()));
            }
        } else {
            pairs.push((name, part.text().await.map_err(cut)?));
        }
    }
    if !known {
        return Err(PageError::FormToken);
    }
    Ok(Sent { posted: Posted::from_pairs(pairs), pictures: files, _room: room })
}

fn cut(fault: MultipartError) -> PageError {
    match fault.status() {
        StatusCode::PAYLOAD_TOO_LARGE => PageError::TooLarge { most: "15 MB a picture, 32 MB in all" },
        _ => PageError::BadForm { why: "The form did not arrive whole. Send it again.".to_owned() },
    }
}

impl Sent {
    /// The form, its pictures kept and named in it by their hashes, and what was wrong with any.
    ///
    /// # Errors
    /// When the store cannot answer.
    pub async fn keep_pictures(self, app: &App, at: &StepAt) -> Result<(Posted, Vec<FieldError>), PageError> {
        let mut pairs = self.posted.pairs().to_vec();
        // What a form says of a picture is not believed: all of it is said anew from what is kept here.
        pairs.retain(|(name, _)| !name.ends_with(".kept"));
        let mut errors = Vec::new();
        let (_, step) = at.step()?;
        for item in &step.items {
            let field = name(&EntryPlace::new(item.key.clone()));
            let new = self.pictures.iter().find(|(n, _)| *n == field).map(|(_, bytes)| bytes.clone());
            let carried = kept(&self.posted, &field);
            let photo = match (new, carried) {
                (Some(bytes), _) => take(app, bytes).await,
                (None, Some(photo)) => Ok(received(app, photo).await?),
                (None, None) => Ok(None),
            };
            match photo {
                Ok(Some(p)) => pairs.push((format!("{field}.kept"), format!("{} {} {}", p.hash, p.media, p.bytes))),
                Ok(None) => {}
                Err(message) => errors.push(FieldError { field, label: item.label.clone(), message }),
            }
        }
        Ok((Posted::from_pairs(pairs), errors))
    }
}

/// A picture that a form carries on: it must have been received here, and kind and size are those of what is kept.
async fn received(app: &App, carried: Photo) -> Result<Option<Photo>, PageError> {
    let _turn = pictures::turn().await?;
    let kept = app.store.photo(&carried.hash).await?;
    Ok(kept.map(|(bytes, media)| Photo { media, bytes: bytes.len() as u64, ..carried }))
}

async fn take(app: &App, bytes: Vec<u8>) -> Result<Option<Photo>, String> {
    let _turn = pictures::turn().await.map_err(|fault| fault.to_string())?;
    let checked = tokio::task::spawn_blocking(move || pictures::check(&bytes).map(|()| bytes)).await;
    let bytes = checked.map_err(|_| "This picture cannot be read. Take it again.".to_owned())??;
    app.store.keep_photo(bytes, app.now()).await.map(Some).map_err(|fault| fault.to_string())
}
