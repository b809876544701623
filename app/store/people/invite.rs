//! Invitations: a one-time code with which a person sets their own password, so that nobody else ever knows it.

use super::hashing::token_hash;
use super::set_up_code::{plain, readable_code};
use super::sign_in::{by_id, person};
use super::{invited, password};
use crate::acts::PerformFault;
use crate::answer::Answer;
use crate::fault::{Fault, ReadFault};
use crate::store::Store;
use commissioning::people::Person;
use commissioning::{PersonId, Timestamp};
use rusqlite::{Connection, OptionalExtension, named_params};
use time::Duration;

const VALID: Duration = Duration::days(7);

impl Store {
    /// A fresh invitation for a person, in place of any before; valid once, for seven days.
    ///
    /// That it was made, and `by` whom, is kept and shown to that person and to everyone at "Who can sign": whoever
    /// holds the code can sign under that name. `None` is the program itself, at the server.
    pub fn invite(&self, person: PersonId, by: Option<PersonId>, now: Timestamp) -> Answer<String, PerformFault> {
        self.recording().give(move |desk| {
            if by_id(&desk.connection, person)?.is_none() {
                return Err(Fault::Broken("There is no such account here.".to_owned()));
            }
            let code = readable_code()?;
            desk.connection
                .prepare_cached(
                    "INSERT INTO invitations (person, code_hash, made) VALUES (:person, :code_hash, :made)
                     ON CONFLICT (person) DO UPDATE SET code_hash = excluded.code_hash, made = excluded.made",
                )?
                .execute(named_params! {
                    ":person": person.to_string(),
                    ":code_hash": token_hash(&plain(&code)),
                    ":made": now.to_string(),
                })?;
            invited::made(&desk.connection, person, by, now)?;
            Ok(Ok(code))
        })
    }

    /// As `invite`, waiting.
    ///
    /// # Errors
    /// When it could not be kept.
    pub fn invite_blocking(
        &self,
        person: PersonId,
        by: Option<PersonId>,
        now: Timestamp,
    ) -> Result<String, PerformFault> {
        self.invite(person, by, now).wait()
    }

    /// Whom a code invites; `None` when it is unknown, used or too old.
    pub fn invited(&self, code: &str, now: Timestamp) -> Answer<Option<Person>, ReadFault> {
        let hash = token_hash(&plain(code));
        self.read(move |desk| invited(&desk.connection, &hash, now))
    }

    /// As `invited`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn invited_blocking(&self, code: &str, now: Timestamp) -> Result<Option<Person>, ReadFault> {
        self.invited(code, now).wait()
    }

    /// Uses an invitation up: the invited person sets their password.
    pub fn redeem(&self, code: &str, new: &str, now: Timestamp) -> Answer<PersonId, password::PasswordFault> {
        let (hash, new) = (token_hash(&plain(code)), new.to_owned());
        self.hash(move |store| redeem(store, hash, &new, now))
    }

    /// As `redeem`, waiting.
    ///
    /// # Errors
    /// When the code or the password will not do.
    pub fn redeem_blocking(&self, code: &str, new: &str, now: Timestamp) -> Result<PersonId, password::PasswordFault> {
        self.redeem(code, new, now).wait()
    }
}

fn redeem(store: &Store, hash: String, new: &str, now: Timestamp) -> Result<PersonId, password::PasswordFault> {
    let asked = hash.clone();
    let found = store
        .read(move |desk| invited(&desk.connection, &asked, now))
        .wait()
        .map_err(|e| password::PasswordFault::Storage(e.to_string()))?;
    let person = found.ok_or(password::PasswordFault::Unknown)?.id;
    password::set(store, person, new, Some(hash), now)?;
    Ok(person)
}

/// Removes an invitation and notes its use; says whether it was still there.
pub(crate) fn use_up(
    connection: &Connection,
    person: PersonId,
    code_hash: &str,
    now: Timestamp,
) -> Result<bool, Fault> {
    let removed = connection
        .prepare_cached("DELETE FROM invitations WHERE person = :person AND code_hash = :code_hash")?
        .execute(named_params! { ":person": person.to_string(), ":code_hash": code_hash })?;
    if removed == 1 {
        invited::redeemed(connection, person, now)?;
    }
    Ok(removed == 1)
}

fn invited(connection: &Connection, hash: &str, now: Timestamp) -> Result<Option<Person>, Fault> {
    Ok(connection
        .prepare_cached(
            "SELECT people.person AS person FROM invitations JOIN people ON people.id = invitations.person
             WHERE invitations.code_hash = :code_hash AND invitations.made > :since AND people.active = 1",
        )?
        .query_row(
            named_params! { ":code_hash": hash, ":since": Timestamp::new(now.moment() - VALID).to_string() },
            person,
        )
        .optional()?)
}
