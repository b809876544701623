//! Writes a person's row from the event that keeps them.

use crate::fault::Fault;
use commissioning::people::Person;
use rusqlite::{Connection, named_params};

/// Writes a person's row.
pub(crate) fn project(connection: &Connection, person: &Person) -> Result<(), Fault> {
    connection
        .prepare_cached(
            "INSERT INTO people (id, login, active, person) VALUES (:id, :login, :active, :person)
             ON CONFLICT (id) DO UPDATE SET
                 login = excluded.login, active = excluded.active, person = excluded.person",
        )?
        .execute(named_params! {
            ":id": person.id.to_string(),
            ":login": person.login,
            ":active": person.active,
            ":person": serde_json::to_string(person)?,
        })?;
    Ok(())
}
