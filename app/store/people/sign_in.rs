//! Proves a person by password: at sign-in, and again at every signing.

use super::attempts::{Subject, failed, forget, locked};
use super::hashing::fits;
use super::password::hash_of;
use crate::acts::PerformFault;
use crate::answer::Answer;
use crate::columns::json;
use crate::fault::{Fault, ReadFault};
use crate::store::Store;
use commissioning::people::Person;
use commissioning::{PersonId, Timestamp};
use rusqlite::{Connection, OptionalExtension, Row, named_params};

/// What a password typed again came to.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum PasswordAnswer {
    /// It fits.
    Right,
    /// It does not.
    Wrong,
    /// Too many failures: not looked at before this moment.
    Locked {
        /// Until when.
        until: Timestamp,
    },
}

/// What a sign-in came to. Unknown people get the same answers in the same time.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum SignIn {
    /// Come in.
    Right(Person),
    /// Name or password do not fit.
    Wrong,
    /// Too many failures: not looked at before this moment.
    Locked {
        /// Until when.
        until: Timestamp,
    },
}

impl From<ReadFault> for PerformFault {
    fn from(fault: ReadFault) -> Self {
        Self::Broken(fault.to_string())
    }
}

impl Store {
    /// Signs a person in by name and password; failures count on the name and on the address.
    pub fn sign_in(&self, login: &str, address: &str, typed: &str, now: Timestamp) -> Answer<SignIn, PerformFault> {
        let login = login.trim().to_lowercase();
        let (address, typed) = (Subject::Address(address.to_owned()), typed.to_owned());
        self.hash(move |store| sign_in(store, &login, &address, &typed, now))
    }

    /// As `sign_in`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn sign_in_blocking(
        &self,
        login: &str,
        address: &str,
        typed: &str,
        now: Timestamp,
    ) -> Result<SignIn, PerformFault> {
        self.sign_in(login, address, typed, now).wait()
    }

    /// Looks at the password typed again at signing. The third failure locks signing for 15 minutes or until an
    /// administrator unlocks it.
    pub fn check_password(
        &self,
        person: PersonId,
        typed: &str,
        now: Timestamp,
    ) -> Answer<PasswordAnswer, PerformFault> {
        let typed = typed.to_owned();
        self.hash(move |store| at_signing(store, person, &typed, now))
    }

    /// As `check_password`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn check_password_blocking(
        &self,
        person: PersonId,
        typed: &str,
        now: Timestamp,
    ) -> Result<PasswordAnswer, PerformFault> {
        self.check_password(person, typed, now).wait()
    }

    /// Unlocks a person's signing.
    pub fn unlock_signing(&self, person: PersonId) -> Answer<(), PerformFault> {
        self.recording().give(move |desk| {
            forget(&desk.connection, &Subject::Signing(person))?;
            Ok(Ok(()))
        })
    }

    /// As `unlock_signing`, waiting.
    ///
    /// # Errors
    /// When it could not be kept.
    pub fn unlock_signing_blocking(&self, person: PersonId) -> Result<(), PerformFault> {
        self.unlock_signing(person).wait()
    }

    /// The person who signs in with this name, account on or off.
    pub fn person_by_login(&self, login: &str) -> Answer<Option<Person>, ReadFault> {
        let login = login.trim().to_lowercase();
        self.read(move |desk| by_login(&desk.connection, &login))
    }

    /// As `person_by_login`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn person_by_login_blocking(&self, login: &str) -> Result<Option<Person>, ReadFault> {
        self.person_by_login(login).wait()
    }
}

fn sign_in(store: &Store, login: &str, address: &Subject, typed: &str, now: Timestamp) -> Result<SignIn, PerformFault> {
    let subjects = [Subject::Login(login.to_owned()), address.clone()];
    let (asked, name) = (subjects.clone(), login.to_owned());
    let (lock, person, hash) = store
        .read(move |desk| {
            let lock = locked(&desk.connection, &asked[0], now)?.max(locked(&desk.connection, &asked[1], now)?);
            let person = by_login(&desk.connection, &name)?.filter(|p| p.active);
            let hash = person.as_ref().map_or(Ok(None), |p| hash_of(&desk.connection, p.id))?;
            Ok((lock, person, hash))
        })
        .wait()?;
    if let Some(until) = lock {
        return Ok(SignIn::Locked { until });
    }
    // The hash is worked out for nobody, too.
    let right = fits(typed, hash.as_deref())?;
    let person = person.filter(|_| right);
    let id = person.as_ref().map(|p| p.id);
    store.writing().give(move |desk| Ok(Ok::<_, PerformFault>(note(&desk.connection, &subjects, id, now)?))).wait()?;
    Ok(person.map_or(SignIn::Wrong, SignIn::Right))
}

fn note(
    connection: &Connection,
    subjects: &[Subject; 2],
    person: Option<PersonId>,
    now: Timestamp,
) -> Result<(), Fault> {
    let Some(person) = person else {
        return subjects.iter().try_for_each(|subject| failed(connection, subject, now).map(drop));
    };
    forget(connection, &subjects[0])?;
    connection
        .prepare_cached("UPDATE passwords SET last_sign_in = :now WHERE person = :person")?
        .execute(named_params! { ":now": now.to_string(), ":person": person.to_string() })?;
    Ok(())
}

fn at_signing(store: &Store, person: PersonId, typed: &str, now: Timestamp) -> Result<PasswordAnswer, PerformFault> {
    let subject = Subject::Signing(person);
    let asked = subject.clone();
    let (lock, hash) = store
        .read(move |desk| {
            let active = by_id(&desk.connection, person)?.is_some_and(|p| p.active);
            let hash = if active { hash_of(&desk.connection, person)? } else { None };
            Ok((locked(&desk.connection, &asked, now)?, hash))
        })
        .wait()?;
    if let Some(until) = lock {
        return Ok(PasswordAnswer::Locked { until });
    }
    let right = fits(typed, hash.as_deref())?;
    store
        .writing()
        .give(move |desk| {
            if right {
                forget(&desk.connection, &subject)?;
                return Ok(Ok(PasswordAnswer::Right));
            }
            let attempts = failed(&desk.connection, &subject, now)?;
            Ok(Ok(attempts.locked_until.map_or(PasswordAnswer::Wrong, |until| PasswordAnswer::Locked { until })))
        })
        .wait()
}

/// The person who signs in with this name.
pub(crate) fn by_login(connection: &Connection, login: &str) -> Result<Option<Person>, Fault> {
    Ok(connection
        .prepare_cached("SELECT person FROM people WHERE login = :login")?
        .query_row(named_params! { ":login": login }, person)
        .optional()?)
}

/// The person of this id.
pub(crate) fn by_id(connection: &Connection, id: PersonId) -> Result<Option<Person>, Fault> {
    Ok(connection
        .prepare_cached("SELECT person FROM people WHERE id = :id")?
        .query_row(named_params! { ":id": id.to_string() }, person)
        .optional()?)
}

/// Reads a person's row.
pub(crate) fn person(row: &Row<'_>) -> rusqlite::Result<Person> {
    json(row, "person")
}
