//! Reads a chain and its head.

use crate::fault::Fault;
use commissioning::journal::{Chain, Head, Sealed};
use rusqlite::{Connection, OptionalExtension, Row, named_params};

/// The end of a chain; of an empty one if there is none.
pub(crate) fn head_of(connection: &Connection, chain: Chain) -> Result<Head, Fault> {
    let head = connection
        .prepare_cached("SELECT sequence, hash FROM events WHERE chain = :chain ORDER BY sequence DESC LIMIT 1")?
        .query_row(named_params! { ":chain": chain.to_string() }, |row| {
            Ok(Head { sequence: row.get::<_, i64>("sequence")?.unsigned_abs(), hash: row.get("hash")? })
        })
        .optional()?;
    Ok(head.unwrap_or_else(Head::empty))
}

/// A whole chain, first event first.
pub(crate) fn sealed_of(connection: &Connection, chain: Chain) -> Result<Vec<Sealed>, Fault> {
    let mut statement = connection
        .prepare_cached("SELECT sequence, previous, hash, bytes FROM events WHERE chain = :chain ORDER BY sequence")?;
    let rows = statement.query_map(named_params! { ":chain": chain.to_string() }, sealed)?;
    Ok(rows.collect::<Result<_, _>>()?)
}

fn sealed(row: &Row<'_>) -> rusqlite::Result<Sealed> {
    Ok(Sealed {
        sequence: row.get::<_, i64>("sequence")?.unsigned_abs(),
        previous: row.get("previous")?,
        hash: row.get("hash")?,
        bytes: row.get("bytes")?,
    })
}
