//! Sets a password: long enough, not one that everyone tries, not the name itself.

use super::hashing::hashed;
use super::well_known::is_well_known;
use crate::answer::Answer;
use crate::fault::Fault;
use crate::store::Store;
use commissioning::{PersonId, Timestamp};
use rusqlite::{Connection, OptionalExtension, named_params};

const SHORTEST: usize = 12;
/// Beyond this it is no password but a burden on the hash.
const LONGEST: usize = 200;

/// Why a password was not set.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum PasswordFault {
    /// Under 12 characters.
    #[error("A password has at least 12 characters. A few words in a row are easy to remember and long enough.")]
    TooShort,
    /// Over 200 characters.
    #[error("A password has at most 200 characters. Shorten it.")]
    TooLong,
    /// Everyone tries it first.
    #[error("This password is among the first that anyone would try. Choose another.")]
    TooCommon,
    /// The sign-in name is in it.
    #[error("The password must not contain the name to sign in with. Choose another.")]
    HoldsLogin,
    /// No such person or invitation.
    #[error("There is no such account or invitation here, or the invitation has been used or is too old.")]
    Unknown,
    /// It could not be kept.
    #[error("The password could not be kept: {0}")]
    Storage(String),
}

impl From<Fault> for PasswordFault {
    fn from(fault: Fault) -> Self {
        Self::Storage(fault.to_string())
    }
}

impl Store {
    /// Sets a person's password and closes their sessions.
    pub fn set_password(&self, person: PersonId, new: &str, now: Timestamp) -> Answer<(), PasswordFault> {
        let new = new.to_owned();
        self.hash(move |store| set(store, person, &new, None, now))
    }

    /// As `set_password`, waiting.
    ///
    /// # Errors
    /// When the password will not do, or could not be kept.
    pub fn set_password_blocking(&self, person: PersonId, new: &str, now: Timestamp) -> Result<(), PasswordFault> {
        self.set_password(person, new, now).wait()
    }
}

/// Sets a password, using up an invitation where one is named; on a thread for hashes.
pub(crate) fn set(
    store: &Store,
    person: PersonId,
    new: &str,
    invitation: Option<String>,
    now: Timestamp,
) -> Result<(), PasswordFault> {
    let login = store
        .read(move |desk| login_of(&desk.connection, person))
        .wait()
        .map_err(|e| PasswordFault::Storage(e.to_string()))?
        .ok_or(PasswordFault::Unknown)?;
    will_do(new, &login)?;
    let hash = hashed(new)?;
    store
        .recording()
        .give(move |desk| {
            // In the same transaction: of two that come with one code, one finds it used.
            if let Some(code) = &invitation
                && !super::invite::use_up(&desk.connection, person, code, now)?
            {
                return Ok(Err(PasswordFault::Unknown));
            }
            keep(&desk.connection, person, &hash, now)?;
            super::session::close_all(&desk.connection, person)?;
            Ok(Ok(()))
        })
        .wait()
}

/// Whether a password will do for this sign-in name.
///
/// # Errors
/// Why it will not.
pub fn will_do(new: &str, login: &str) -> Result<(), PasswordFault> {
    match new.chars().count() {
        count if count < SHORTEST => Err(PasswordFault::TooShort),
        count if count > LONGEST => Err(PasswordFault::TooLong),
        _ if is_well_known(new) => Err(PasswordFault::TooCommon),
        _ if login.chars().count() > 2 && new.to_lowercase().contains(&login.to_lowercase()) => {
            Err(PasswordFault::HoldsLogin)
        }
        _ => Ok(()),
    }
}

fn login_of(connection: &Connection, person: PersonId) -> Result<Option<String>, Fault> {
    Ok(connection
        .prepare_cached("SELECT login FROM people WHERE id = :id")?
        .query_row(named_params! { ":id": person.to_string() }, |row| row.get("login"))
        .optional()?)
}

fn keep(connection: &Connection, person: PersonId, hash: &str, now: Timestamp) -> Result<(), Fault> {
    connection
        .prepare_cached(
            "INSERT INTO passwords (person, hash, since) VALUES (:person, :hash, :since)
             ON CONFLICT (person) DO UPDATE SET hash = excluded.hash, since = excluded.since",
        )?
        .execute(named_params! { ":person": person.to_string(), ":hash": hash, ":since": now.to_string() })?;
    Ok(())
}

/// The hash of a person's password, if they have set one.
pub(crate) fn hash_of(connection: &Connection, person: PersonId) -> Result<Option<String>, Fault> {
    Ok(connection
        .prepare_cached("SELECT hash FROM passwords WHERE person = :person")?
        .query_row(named_params! { ":person": person.to_string() }, |row| row.get("hash"))
        .optional()?)
}
