//! After a crash: half files go, a whole file whose row was not written yet gets it.

use super::keep::{file_hash, write_row};
use super::kind::media_of;
use crate::fault::Fault;
use commissioning::Timestamp;
use commissioning::record::Photo;
use rusqlite::{Connection, OptionalExtension, named_params};
use std::path::Path;

/// Brings files and rows together again.
pub(crate) fn settle_after_a_crash(connection: &Connection, folder: &Path, now: Timestamp) -> Result<(), Fault> {
    for entry in std::fs::read_dir(folder)? {
        let path = entry?.path();
        let Some(name) = path.file_name().and_then(|n| n.to_str()) else { continue };
        if name.ends_with(".part") {
            std::fs::remove_file(&path)?;
        } else if !has_row(connection, name)? {
            let bytes = std::fs::read(&path)?;
            // A file that is not what its name says is left for the store's check to report.
            if let Some(media) = media_of(&bytes).filter(|_| file_hash(&bytes) == name) {
                let (hash, media) = (name.to_owned(), media.to_owned());
                write_row(connection, &Photo { hash, media, bytes: bytes.len() as u64, caption: String::new() }, now)?;
            }
        }
    }
    Ok(())
}

fn has_row(connection: &Connection, hash: &str) -> Result<bool, Fault> {
    Ok(connection
        .prepare_cached("SELECT 1 FROM photos WHERE hash = :hash")?
        .query_row(named_params! { ":hash": hash }, |_| Ok(()))
        .optional()?
        .is_some())
}
