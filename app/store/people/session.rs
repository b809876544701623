//! Sessions: known by a token of which only the hash is kept.

use super::hashing::token_hash;
use super::sign_in::person;
use crate::acts::PerformFault;
use crate::answer::Answer;
use crate::columns::moment;
use crate::fault::{Fault, ReadFault};
use crate::opening::random_hex;
use crate::store::Store;
use commissioning::people::Person;
use commissioning::{PersonId, Timestamp};
use rusqlite::{Connection, OptionalExtension, Row, named_params};
use time::Duration;

/// On what kind of device a session was opened.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum SessionKind {
    /// A strange device: over after 30 minutes without use.
    Strange,
    /// A tablet of the firm: over after a shift of 12 hours.
    Enrolled,
}

/// An open session.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Session {
    /// Whose.
    pub person: Person,
    /// On what kind of device.
    pub kind: SessionKind,
    /// Since when.
    pub opened: Timestamp,
    /// When it was last used, to the minute.
    pub last_used: Timestamp,
}

const SHIFT: Duration = Duration::hours(12);
const IDLE: Duration = Duration::minutes(30);
/// How often use is written down.
const NOTED_EVERY: Duration = Duration::minutes(1);

impl SessionKind {
    const fn key(self) -> &'static str {
        match self {
            Self::Strange => "strange",
            Self::Enrolled => "enrolled",
        }
    }
}

impl Session {
    fn open_at(&self, now: Timestamp) -> bool {
        let since = |then: Timestamp| now.moment() - then.moment();
        since(self.opened) < SHIFT && (self.kind == SessionKind::Enrolled || since(self.last_used) < IDLE)
    }
}

impl Store {
    /// Opens a session and gives its token, 64 hexadecimal digits; kept nowhere but with the person.
    pub fn open_session(&self, person: PersonId, kind: SessionKind, now: Timestamp) -> Answer<String, PerformFault> {
        self.writing().give(move |desk| Ok(Ok(open(&desk.connection, person, kind, now)?)))
    }

    /// As `open_session`, waiting.
    ///
    /// # Errors
    /// When it could not be kept.
    pub fn open_session_blocking(
        &self,
        person: PersonId,
        kind: SessionKind,
        now: Timestamp,
    ) -> Result<String, PerformFault> {
        self.open_session(person, kind, now).wait()
    }

    /// The session of a token; `None` when it was closed, is over, or the account is off.
    pub fn session(&self, token: &str, now: Timestamp) -> Answer<Option<Session>, ReadFault> {
        let hash = token_hash(token);
        let writing = self.writing();
        self.read(move |desk| {
            let session = found(&desk.connection, &hash)?.filter(|s| s.open_at(now));
            if session.as_ref().is_some_and(|s| now.moment() - s.last_used.moment() >= NOTED_EVERY) {
                // Nobody waits for it: a minute that is not written down does no harm.
                drop(writing.give(move |desk| Ok(Ok::<_, PerformFault>(used(&desk.connection, &hash, now)?))));
            }
            Ok(session)
        })
    }

    /// As `session`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn session_blocking(&self, token: &str, now: Timestamp) -> Result<Option<Session>, ReadFault> {
        self.session(token, now).wait()
    }

    /// A new token in place of this one, when the password was typed again; `None` when it is no longer open.
    pub fn renew_session(&self, token: &str, now: Timestamp) -> Answer<Option<String>, PerformFault> {
        let hash = token_hash(token);
        self.writing().give(move |desk| {
            let Some(session) = found(&desk.connection, &hash)?.filter(|s| s.open_at(now)) else { return Ok(Ok(None)) };
            close(&desk.connection, &hash)?;
            Ok(Ok(Some(open(&desk.connection, session.person.id, session.kind, now)?)))
        })
    }

    /// As `renew_session`, waiting.
    ///
    /// # Errors
    /// When it could not be kept.
    pub fn renew_session_blocking(&self, token: &str, now: Timestamp) -> Result<Option<String>, PerformFault> {
        self.renew_session(token, now).wait()
    }

    /// Closes a session.
    pub fn close_session(&self, token: &str) -> Answer<(), PerformFault> {
        let hash = token_hash(token);
        self.writing().give(move |desk| Ok(Ok(close(&desk.connection, &hash)?)))
    }

    /// As `close_session`, waiting.
    ///
    /// # Errors
    /// When it could not be kept.
    pub fn close_session_blocking(&self, token: &str) -> Result<(), PerformFault> {
        self.close_session(token).wait()
    }

    /// Closes all of a person's sessions; says how many.
    pub fn close_sessions_of(&self, person: PersonId) -> Answer<u64, PerformFault> {
        self.writing().give(move |desk| Ok(Ok(close_all(&desk.connection, person)?)))
    }

    /// As `close_sessions_of`, waiting.
    ///
    /// # Errors
    /// When it could not be kept.
    pub fn close_sessions_of_blocking(&self, person: PersonId) -> Result<u64, PerformFault> {
        self.close_sessions_of(person).wait()
    }
}

fn open(connection: &Connection, person: PersonId, kind: SessionKind, now: Timestamp) -> Result<String, Fault> {
    // Whatever is over by any rule goes, so that the table stays as long as a shift.
    connection
        .prepare_cached("DELETE FROM sessions WHERE last_used < :over")?
        .execute(named_params! { ":over": Timestamp::new(now.moment() - SHIFT).to_string() })?;
    let token = random_hex(32)?;
    connection
        .prepare_cached(
            "INSERT INTO sessions (token_hash, person, kind, opened, last_used)
             VALUES (:token_hash, :person, :kind, :now, :now)",
        )?
        .execute(named_params! {
            ":token_hash": token_hash(&token),
            ":person": person.to_string(),
            ":kind": kind.key(),
            ":now": now.to_string(),
        })?;
    Ok(token)
}

fn found(connection: &Connection, hash: &str) -> Result<Option<Session>, Fault> {
    Ok(connection
        .prepare_cached(
            "SELECT people.person AS person, kind, opened, last_used
             FROM sessions JOIN people ON people.id = sessions.person
             WHERE token_hash = :token_hash AND people.active = 1",
        )?
        .query_row(named_params! { ":token_hash": hash }, session)
        .optional()?)
}

fn session(row: &Row<'_>) -> rusqlite::Result<Session> {
    let enrolled = row.get::<_, String>("kind")? == SessionKind::Enrolled.key();
    Ok(Session {
        person: person(row)?,
        kind: if enrolled { SessionKind::Enrolled } else { SessionKind::Strange },
        opened: moment(row, "opened")?,
        last_used: moment(row, "last_used")?,
    })
}

fn used(connection: &Connection, hash: &str, now: Timestamp) -> Result<(), Fault> {
    connection
        .prepare_cached("UPDATE sessions SET last_used = :now WHERE token_hash = :token_hash AND last_used < :now")?
        .execute(named_params! { ":now": now.to_string(), ":token_hash": hash })?;
    Ok(())
}

fn close(connection: &Connection, hash: &str) -> Result<(), Fault> {
    connection
        .prepare_cached("DELETE FROM sessions WHERE token_hash = :token_hash")?
        .execute(named_params! { ":token_hash": hash })?;
    Ok(())
}

/// Closes all of a person's sessions.
pub(crate) fn close_all(connection: &Connection, person: PersonId) -> Result<u64, Fault> {
    let closed = connection
        .prepare_cached("DELETE FROM sessions WHERE person = :person")?
        .execute(named_params! { ":person": person.to_string() })?;
    Ok(closed as u64)
}
