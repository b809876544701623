//! Gives a photo's original bytes by its hash.

use crate::answer::Answer;
use crate::fault::{Fault, ReadFault};
use crate::store::Store;
use rusqlite::{Connection, OptionalExtension, named_params};

impl Store {
    /// A photo's original bytes and media type; `None` when there is no such photo.
    pub fn photo(&self, hash: &str) -> Answer<Option<(Vec<u8>, String)>, ReadFault> {
        let hash = hash.to_owned();
        self.keep(move |store| {
            let asked = hash.clone();
            // The row comes first: only a name that the store gave is ever looked for among the files.
            let Some(media) = store.read(move |desk| media(&desk.connection, &asked)).wait()? else { return Ok(None) };
            let bytes = std::fs::read(store.folder().join("photos").join(&hash)).map_err(Fault::from)?;
            Ok(Some((bytes, media)))
        })
    }

    /// As `photo`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn photo_blocking(&self, hash: &str) -> Result<Option<(Vec<u8>, String)>, ReadFault> {
        self.photo(hash).wait()
    }
}

fn media(connection: &Connection, hash: &str) -> Result<Option<String>, Fault> {
    Ok(connection
        .prepare_cached("SELECT media FROM photos WHERE hash = :hash")?
        .query_row(named_params! { ":hash": hash }, |row| row.get("media"))
        .optional()?)
}

/// Every photo's hash and size.
pub(crate) fn kept(connection: &Connection) -> Result<Vec<(String, u64)>, Fault> {
    let mut statement = connection.prepare("SELECT hash, bytes FROM photos ORDER BY hash")?;
    let rows = statement.query_map([], |row| Ok((row.get("hash")?, row.get::<_, i64>("bytes")?.unsigned_abs())))?;
    Ok(rows.collect::<Result<_, _>>()?)
}
