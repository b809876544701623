//! The installation's stream: hashes of events in the order in which they came.

use crate::fault::Fault;
use commissioning::journal::Head;
use commissioning::journal::chain::hexadecimal;
use rusqlite::{Connection, OptionalExtension, named_params};
use sha2::{Digest, Sha256};

/// The end of the stream.
pub(crate) fn stream_head(connection: &Connection) -> Result<Head, Fault> {
    let head = connection
        .prepare_cached("SELECT sequence, stream_hash FROM stream ORDER BY sequence DESC LIMIT 1")?
        .query_row([], |row| {
            Ok(Head { sequence: row.get::<_, i64>("sequence")?.unsigned_abs(), hash: row.get("stream_hash")? })
        })
        .optional()?;
    Ok(head.unwrap_or_else(Head::empty))
}

/// The stream's hash at a place; `None` when it is not so long.
pub(crate) fn stream_hash_at(connection: &Connection, sequence: i64) -> Result<Option<String>, Fault> {
    Ok(connection
        .prepare_cached("SELECT stream_hash FROM stream WHERE sequence = :sequence")?
        .query_row(named_params! { ":sequence": sequence }, |row| row.get("stream_hash"))
        .optional()?)
}

/// SHA-256 over the hash before, a line feed, and the event's hash.
pub(crate) fn link(previous: &str, hash: &str) -> String {
    let mut hasher = Sha256::new();
    hasher.update(previous.as_bytes());
    hasher.update(b"\n");
    hasher.update(hash.as_bytes());
    hexadecimal(&hasher.finalize())
}
