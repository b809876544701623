//! What happened to the store itself: begun, migrated, restored, backed up.

use crate::fault::Fault;
use commissioning::Timestamp;
use rusqlite::{Connection, named_params};

/// Adds a line to the openings.
pub(crate) fn write_down(connection: &Connection, at: Timestamp, kind: &str, words: &str) -> Result<(), Fault> {
    connection.execute(
        "INSERT INTO openings (number, at, kind, words)
         VALUES (1 + ifnull((SELECT max(number) FROM openings), 0), :at, :kind, :words)",
        named_params! { ":at": at.to_string(), ":kind": kind, ":words": words },
    )?;
    Ok(())
}
