//! Failed attempts: each further one costs twice the time, the third at signing locks signing.

use crate::columns::moment_if_any;
use crate::fault::Fault;
use commissioning::{PersonId, Timestamp};
use rusqlite::{Connection, OptionalExtension, Row, named_params};
use time::Duration;

/// What attempts are counted on.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(crate) enum Subject {
    /// A sign-in name, whether or not anyone has it.
    Login(String),
    /// An address: many people may share one, so it is slower to lock.
    Address(String),
    /// A person signing.
    Signing(PersonId),
    /// The set-up code.
    SetUpCode,
}

/// A count as kept.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub(crate) struct Attempts {
    pub(crate) failed: u32,
    pub(crate) last: Option<Timestamp>,
    pub(crate) locked_until: Option<Timestamp>,
}

const LONGEST_DELAY: i64 = 15 * 60;
/// A count that nothing was added to for so long is forgotten.
const FORGOTTEN_AFTER: Duration = Duration::hours(24);
/// Failures at signing until it locks.
const SIGNING_FAILURES: u32 = 3;

impl Subject {
    pub(crate) fn key(&self) -> String {
        match self {
            // Cut, so that nobody fills the table with long names.
            Self::Login(login) => format!("login:{}", login.chars().take(80).collect::<String>()),
            Self::Address(address) => format!("address:{}", address.chars().take(80).collect::<String>()),
            Self::Signing(person) => format!("signing:{person}"),
            Self::SetUpCode => "set-up-code".to_owned(),
        }
    }

    /// How long after this many failures the next attempt waits.
    fn delay(&self, failed: u32) -> Option<Duration> {
        let free = match self {
            Self::Login(_) | Self::SetUpCode => 2,
            Self::Address(_) => 9,
            Self::Signing(_) => return (failed >= SIGNING_FAILURES).then(|| Duration::seconds(LONGEST_DELAY)),
        };
        let over = failed.checked_sub(free).filter(|n| *n > 0)?;
        let seconds = 1_i64.checked_shl(over).filter(|s| *s > 0).unwrap_or(LONGEST_DELAY).min(LONGEST_DELAY);
        Some(Duration::seconds(seconds))
    }
}

/// What was counted on a subject.
pub(crate) fn counted(connection: &Connection, subject: &Subject) -> Result<Attempts, Fault> {
    let found = connection
        .prepare_cached("SELECT failed, last, locked_until FROM attempts WHERE subject = :subject")?
        .query_row(named_params! { ":subject": subject.key() }, attempts)
        .optional()?;
    Ok(found.unwrap_or_default())
}

fn attempts(row: &Row<'_>) -> rusqlite::Result<Attempts> {
    Ok(Attempts {
        failed: row.get("failed")?,
        last: moment_if_any(row, "last")?,
        locked_until: moment_if_any(row, "locked_until")?,
    })
}

/// Until when a subject is locked, if it is now.
pub(crate) fn locked(connection: &Connection, subject: &Subject, now: Timestamp) -> Result<Option<Timestamp>, Fault> {
    Ok(counted(connection, subject)?.locked_until.filter(|until| *until > now))
}

/// Counts a failure.
pub(crate) fn failed(connection: &Connection, subject: &Subject, now: Timestamp) -> Result<Attempts, Fault> {
    let before = counted(connection, subject)?;
    let fresh = before.last.is_none_or(|last| now.moment() - last.moment() > FORGOTTEN_AFTER);
    // A signing lock that ran out starts the count anew; at sign-in the doubling goes on.
    let ran_out = matches!(subject, Subject::Signing(_)) && before.locked_until.is_some_and(|until| until <= now);
    let count = if fresh || ran_out { 1 } else { before.failed.saturating_add(1) };
    let locked_until = subject.delay(count).map(|wait| Timestamp::new(now.moment() + wait));
    connection
        .prepare_cached(
            "INSERT INTO attempts (subject, failed, last, locked_until) VALUES (:subject, :failed, :last, :locked_until)
             ON CONFLICT (subject) DO UPDATE SET
                 failed = excluded.failed, last = excluded.last, locked_until = excluded.locked_until",
        )?
        .execute(named_params! {
            ":subject": subject.key(),
            ":failed": count,
            ":last": now.to_string(),
            ":locked_until": locked_until.map(|t| t.to_string()),
        })?;
    connection
        .prepare_cached("DELETE FROM attempts WHERE last < :before")?
        .execute(named_params! { ":before": Timestamp::new(now.moment() - FORGOTTEN_AFTER).to_string() })?;
    Ok(Attempts { failed: count, last: Some(now), locked_until })
}

/// Forgets the count: after the right password, or when an administrator unlocks.
pub(crate) fn forget(connection: &Connection, subject: &Subject) -> Result<(), Fault> {
    connection
        .prepare_cached("DELETE FROM attempts WHERE subject = :subject")?
        .execute(named_params! { ":subject": subject.key() })?;
    Ok(())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn each_further_failure_costs_twice_the_time_up_to_a_quarter_of_an_hour() {
        let login = Subject::Login("rowan".to_owned());
        let seconds: Vec<i64> = (1..=14).map(|n| login.delay(n).map_or(0, Duration::whole_seconds)).collect();
        assert_eq!(seconds, [0, 0, 2, 4, 8, 16, 32, 64, 128, 256, 512, 900, 900, 900]);
        assert_eq!(login.delay(4_000_000_000).map(Duration::whole_seconds), Some(900));
        assert_eq!(Subject::Address("10.0.0.7".to_owned()).delay(9), None);
    }
}
