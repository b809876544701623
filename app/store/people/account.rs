//! Who can sign, since when, and when they were last here.

use super::attempts::{Attempts, Subject, counted};
use super::invited::{self, CodeMade};
use super::sign_in::person;
use crate::answer::Answer;
use crate::columns::moment_if_any;
use crate::fault::{Fault, ReadFault};
use crate::store::Store;
use commissioning::Timestamp;
use commissioning::people::Person;
use rusqlite::{Connection, Row};

/// A person's account.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct AccountRow {
    /// Who.
    pub person: Person,
    /// Since when they have the password they have; `None` when they never set one.
    pub password_set: Option<Timestamp>,
    /// When they last signed in.
    pub last_sign_in: Option<Timestamp>,
    /// Until when signing is, or was last, locked after failures.
    pub signing_locked_until: Option<Timestamp>,
    /// Failed passwords at signing since the last right one.
    pub failed: u32,
    /// One-time codes made for it, the latest first: each lets its holder set a new password and sign under this name.
    pub codes: Vec<CodeMade>,
}

impl Store {
    /// All accounts by sign-in name.
    pub fn accounts(&self) -> Answer<Vec<AccountRow>, ReadFault> {
        self.read(|desk| listed(&desk.connection))
    }

    /// As `accounts`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn accounts_blocking(&self) -> Result<Vec<AccountRow>, ReadFault> {
        self.accounts().wait()
    }
}

fn listed(connection: &Connection) -> Result<Vec<AccountRow>, Fault> {
    let mut statement = connection.prepare_cached(
        "SELECT people.person AS person, passwords.since AS since, passwords.last_sign_in AS last_sign_in
         FROM people LEFT JOIN passwords ON passwords.person = people.id ORDER BY people.login",
    )?;
    let rows = statement.query_map([], account)?.collect::<Result<Vec<_>, _>>()?;
    rows.into_iter()
        .map(|row| {
            let Attempts { failed, locked_until, .. } = counted(connection, &Subject::Signing(row.person.id))?;
            let codes = invited::of(connection, row.person.id)?;
            Ok(AccountRow { failed, signing_locked_until: locked_until, codes, ..row })
        })
        .collect()
}

fn account(row: &Row<'_>) -> rusqlite::Result<AccountRow> {
    Ok(AccountRow {
        person: person(row)?,
        password_set: moment_if_any(row, "since")?,
        last_sign_in: moment_if_any(row, "last_sign_in")?,
        signing_locked_until: None,
        failed: 0,
        codes: Vec::new(),
    })
}
