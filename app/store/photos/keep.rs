//! Keeps a photo: temporary file, sync, renamed to its hash, folder synced, and only then its row.

use super::kind::media_of;
use crate::answer::Answer;
use crate::fault::Fault;
use crate::opening::{random_hex, sync_folder};
use crate::store::Store;
use commissioning::Timestamp;
use commissioning::journal::chain::hexadecimal;
use commissioning::record::Photo;
use rusqlite::{Connection, named_params};
use sha2::{Digest, Sha256};
use std::fs::OpenOptions;
use std::io::Write;
use std::os::unix::fs::OpenOptionsExt;
use std::path::Path;

/// The largest photo in bytes.
pub const LARGEST_PHOTO: usize = 15_000_000;

/// Why a photo was not kept.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum PhotoFault {
    /// Over 15 MB.
    #[error("This picture is over 15 MB. Take it again at a smaller size.")]
    TooLarge,
    /// Not JPEG, PNG or WebP.
    #[error("This is no JPEG, PNG or WebP picture. Save it as one of these and send it again.")]
    UnknownKind,
    /// It could not be kept.
    #[error("The picture could not be kept: {0}")]
    Storage(String),
}

impl From<Fault> for PhotoFault {
    fn from(fault: Fault) -> Self {
        Self::Storage(fault.to_string())
    }
}

impl Store {
    /// Keeps a photo and says by what hash. The same bytes again give the same photo. Call it before the entry.
    pub fn keep_photo(&self, bytes: Vec<u8>, now: Timestamp) -> Answer<Photo, PhotoFault> {
        self.keep(move |store| keep(store, &bytes, now))
    }

    /// As `keep_photo`, waiting.
    ///
    /// # Errors
    /// When it is too large, no picture, or could not be kept.
    pub fn keep_photo_blocking(&self, bytes: Vec<u8>, now: Timestamp) -> Result<Photo, PhotoFault> {
        self.keep_photo(bytes, now).wait()
    }
}

fn keep(store: &Store, bytes: &[u8], now: Timestamp) -> Result<Photo, PhotoFault> {
    if bytes.len() > LARGEST_PHOTO {
        return Err(PhotoFault::TooLarge);
    }
    if store.only_read().is_some() {
        return Err(Fault::ReadOnly.into());
    }
    let media = media_of(bytes).ok_or(PhotoFault::UnknownKind)?;
    let hash = file_hash(bytes);
    write_file(&store.folder().join("photos"), &hash, bytes)?;
    let photo = Photo { hash, media: media.to_owned(), bytes: bytes.len() as u64, caption: String::new() };
    let written = photo.clone();
    store.writing().give(move |desk| Ok(Ok::<_, PhotoFault>(write_row(&desk.connection, &written, now)?))).wait()?;
    Ok(photo)
}

/// The name of a photo's file.
pub(crate) fn file_hash(bytes: &[u8]) -> String {
    hexadecimal(&Sha256::digest(bytes))
}

fn write_file(folder: &Path, hash: &str, bytes: &[u8]) -> Result<(), Fault> {
    let part = folder.join(format!("{}.part", random_hex(8)?));
    let written = OpenOptions::new().create_new(true).write(true).mode(0o600).open(&part).and_then(|mut file| {
        file.write_all(bytes)?;
        file.sync_all()?;
        std::fs::rename(&part, folder.join(hash))?;
        sync_folder(folder)
    });
    if written.is_err() {
        let _ = std::fs::remove_file(&part);
    }
    Ok(written?)
}

/// Writes a photo's row, once.
pub(crate) fn write_row(connection: &Connection, photo: &Photo, now: Timestamp) -> Result<(), Fault> {
    connection
        .prepare_cached(
            "INSERT INTO photos (hash, media, bytes, kept) VALUES (:hash, :media, :bytes, :kept)
             ON CONFLICT (hash) DO NOTHING",
        )?
        .execute(named_params! {
            ":hash": photo.hash,
            ":media": photo.media,
            ":bytes": i64::try_from(photo.bytes).unwrap_or(i64::MAX),
            ":kept": now.to_string(),
        })?;
    Ok(())
}
