//! Heads of the stream seen elsewhere: whoever knows a longer or another stream raises an alarm.

use super::stream::{stream_hash_at, stream_head};
use crate::acts::PerformFault;
use crate::answer::Answer;
use crate::fault::Fault;
use crate::store::Store;
use commissioning::Timestamp;
use commissioning::journal::Head;
use rusqlite::{Connection, named_params};

/// What a head seen elsewhere says about this store.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Witnessed {
    /// This store knows it.
    Fits,
    /// It knows more than this store: the store lost its tail. An alarm.
    Ahead,
    /// Another hash at that place: this store's past was changed, or it is another store's. An alarm.
    Other,
}

impl Store {
    /// Compares a head seen at a place (a tablet, a package) with the stream, and keeps it.
    pub fn witness(&self, place: &str, head: Head, now: Timestamp) -> Answer<Witnessed, PerformFault> {
        let place: String = place.chars().take(200).collect();
        self.writing().give(move |desk| {
            let said = compare(&desk.connection, &head)?;
            remember_head(&desk.connection, &place, &head, now)?;
            Ok(Ok(said))
        })
    }

    /// As `witness`, waiting.
    ///
    /// # Errors
    /// When it could not be kept.
    pub fn witness_blocking(&self, place: &str, head: Head, now: Timestamp) -> Result<Witnessed, PerformFault> {
        self.witness(place, head, now).wait()
    }
}

fn compare(connection: &Connection, head: &Head) -> Result<Witnessed, Fault> {
    if head.sequence == 0 {
        return Ok(Witnessed::Fits);
    }
    let Ok(at) = i64::try_from(head.sequence) else { return Ok(Witnessed::Ahead) };
    Ok(match stream_hash_at(connection, at)? {
        Some(hash) if hash == head.hash => Witnessed::Fits,
        Some(_) => Witnessed::Other,
        None => Witnessed::Ahead,
    })
}

/// Keeps a head that left the building.
pub(crate) fn remember_head(connection: &Connection, place: &str, head: &Head, now: Timestamp) -> Result<(), Fault> {
    connection
        .prepare_cached(
            "INSERT INTO witnessed (place, sequence, hash, seen) VALUES (:place, :sequence, :hash, :seen)
             ON CONFLICT (place, sequence, hash) DO UPDATE SET seen = excluded.seen",
        )?
        .execute(named_params! {
            ":place": place,
            ":sequence": i64::try_from(head.sequence).unwrap_or(i64::MAX),
            ":hash": head.hash,
            ":seen": now.to_string(),
        })?;
    Ok(())
}

/// Every head seen elsewhere that this store does not know, in sentences.
pub(crate) fn ahead_of_the_store(connection: &Connection) -> Result<Vec<String>, Fault> {
    let end = stream_head(connection)?;
    let mut statement = connection.prepare("SELECT place, sequence, hash FROM witnessed ORDER BY sequence")?;
    let mut rows = statement.query([])?;
    let mut alarms = Vec::new();
    while let Some(row) = rows.next()? {
        let place: String = row.get("place")?;
        let head = Head { sequence: row.get::<_, i64>("sequence")?.unsigned_abs(), hash: row.get("hash")? };
        match compare(connection, &head)? {
            Witnessed::Fits => {}
            Witnessed::Ahead => alarms.push(format!(
                "{place} has seen event {} of the stream, this store ends at {}",
                head.sequence, end.sequence
            )),
            Witnessed::Other => {
                alarms.push(format!("{place} has seen another hash at event {} of the stream", head.sequence));
            }
        }
    }
    Ok(alarms)
}
