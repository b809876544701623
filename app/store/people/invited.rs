//! What one-time codes were made for a person, by whom, and whether they were used: a code lets its holder sign as them.

use crate::answer::Answer;
use crate::columns::{moment, moment_if_any};
use crate::fault::{Fault, ReadFault};
use crate::store::Store;
use commissioning::{PersonId, Timestamp};
use rusqlite::{Connection, Row, named_params};

/// A one-time code that was made; never the code itself.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct CodeMade {
    /// Printed name of who made it; `None` when it was made with the program at the server.
    pub made_by: Option<String>,
    /// When.
    pub made: Timestamp,
    /// Whether the person had a password already, whose place the new one takes.
    pub had_password: bool,
    /// When a password was set with it.
    pub redeemed: Option<Timestamp>,
}

impl Store {
    /// Every one-time code made for a person, the latest first.
    pub fn codes_made(&self, person: PersonId) -> Answer<Vec<CodeMade>, ReadFault> {
        self.read(move |desk| of(&desk.connection, person))
    }

    /// As `codes_made`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn codes_made_blocking(&self, person: PersonId) -> Result<Vec<CodeMade>, ReadFault> {
        self.codes_made(person).wait()
    }
}

/// Notes that a code was made.
pub(crate) fn made(
    connection: &Connection,
    person: PersonId,
    by: Option<PersonId>,
    now: Timestamp,
) -> Result<(), Fault> {
    connection
        .prepare_cached(
            "INSERT INTO invitations_made (person, made_by, made, had_password)
             VALUES (:person, :by, :made, EXISTS (SELECT 1 FROM passwords WHERE person = :person))",
        )?
        .execute(named_params! {
            ":person": person.to_string(),
            ":by": by.map(|p| p.to_string()),
            ":made": now.to_string(),
        })?;
    Ok(())
}

/// Notes that the person's latest code was used; one made before is worth nothing since.
pub(crate) fn redeemed(connection: &Connection, person: PersonId, now: Timestamp) -> Result<(), Fault> {
    connection
        .prepare_cached(
            "UPDATE invitations_made SET redeemed = :now
             WHERE number = (SELECT max(number) FROM invitations_made WHERE person = :person)",
        )?
        .execute(named_params! { ":now": now.to_string(), ":person": person.to_string() })?;
    Ok(())
}

/// Every code made for a person, the latest first.
pub(crate) fn of(connection: &Connection, person: PersonId) -> Result<Vec<CodeMade>, Fault> {
    let mut statement = connection.prepare_cached(
        "SELECT json_extract(people.person, '$.name') AS made_by, made, had_password, redeemed
         FROM invitations_made LEFT JOIN people ON people.id = invitations_made.made_by
         WHERE invitations_made.person = :person ORDER BY number DESC",
    )?;
    let rows = statement.query_map(named_params! { ":person": person.to_string() }, code_made)?;
    Ok(rows.collect::<Result<_, _>>()?)
}

fn code_made(row: &Row<'_>) -> rusqlite::Result<CodeMade> {
    Ok(CodeMade {
        made_by: row.get("made_by")?,
        made: moment(row, "made")?,
        had_password: row.get("had_password")?,
        redeemed: moment_if_any(row, "redeemed")?,
    })
}
