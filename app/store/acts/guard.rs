//! What the database itself refuses, said as a refusal.

use crate::fault::Fault;
use crate::work::Desk;
use commissioning::Refusal;
use commissioning::journal::{Event, Fact};
use rusqlite::{Connection, OptionalExtension, named_params};

/// Runs a piece of writing inside a savepoint of its own; what a trigger refuses is undone and becomes a refusal.
pub(crate) fn guarded<T>(
    desk: &Desk,
    write: impl FnOnce(&Desk) -> Result<T, Fault>,
) -> Result<Result<T, Refusal>, Fault> {
    desk.connection.execute_batch("SAVEPOINT guarded")?;
    match write(desk) {
        Ok(written) => {
            desk.connection.execute_batch("RELEASE guarded")?;
            Ok(Ok(written))
        }
        Err(Fault::Guard(words)) if words.contains("does not accept it") => {
            desk.connection.execute_batch("ROLLBACK TO guarded; RELEASE guarded")?;
            Ok(Err(Refusal::not_allowed(
                "Whoever recorded something in this record or signed it cannot accept it. Ask another supervisor.",
            )))
        }
        Err(fault) => Err(fault),
    }
}

/// A photo is never entered without its bytes: refuses an entry whose picture was not kept before.
pub(crate) fn pictures_are_here(connection: &Connection, events: &[Event]) -> Result<Result<(), Refusal>, Fault> {
    for event in events {
        let Fact::EntryMade { entry, .. } = &event.fact else { continue };
        let Some(photo) = &entry.photo else { continue };
        let here = connection
            .prepare_cached("SELECT bytes FROM photos WHERE hash = :hash")?
            .query_row(named_params! { ":hash": photo.hash }, |row| row.get::<_, i64>("bytes"))
            .optional()?;
        if here.is_none() {
            return Ok(Err(Refusal::Unknown { what: "The picture of this entry".to_owned() }));
        }
    }
    Ok(Ok(()))
}
