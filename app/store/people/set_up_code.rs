//! The one-time code that the program prints while nobody has an account.

use super::attempts::{Subject, failed, forget, locked};
use super::hashing::token_hash;
use super::sign_in::PasswordAnswer;
use crate::acts::PerformFault;
use crate::answer::Answer;
use crate::fault::Fault;
use crate::opening::random_hex;
use crate::store::Store;
use crate::work::Desk;
use commissioning::Timestamp;
use rusqlite::{Connection, OptionalExtension, named_params};

impl Store {
    /// A fresh code for the first administrator, in place of any before; `None` once someone has an account.
    pub fn setup_code(&self) -> Answer<Option<String>, PerformFault> {
        self.recording().give(|desk| {
            if somebody_is_here(desk)? {
                close(&desk.connection)?;
                return Ok(Ok(None));
            }
            let code = readable_code()?;
            desk.connection.execute(
                "INSERT INTO set_up_code (one, code_hash) VALUES (1, :code_hash)
                 ON CONFLICT (one) DO UPDATE SET code_hash = excluded.code_hash",
                named_params! { ":code_hash": token_hash(&plain(&code)) },
            )?;
            Ok(Ok(Some(code)))
        })
    }

    /// As `setup_code`, waiting.
    ///
    /// # Errors
    /// When it could not be kept.
    pub fn setup_code_blocking(&self) -> Result<Option<String>, PerformFault> {
        self.setup_code().wait()
    }

    /// Whether this is the code that was printed; never once someone has an account. Failures cost time.
    pub fn setup_code_fits(&self, typed: &str, now: Timestamp) -> Answer<PasswordAnswer, PerformFault> {
        let hash = token_hash(&plain(typed));
        self.writing().give(move |desk| Ok(Ok(look(desk, &hash, now)?)))
    }

    /// As `setup_code_fits`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn setup_code_fits_blocking(&self, typed: &str, now: Timestamp) -> Result<PasswordAnswer, PerformFault> {
        self.setup_code_fits(typed, now).wait()
    }
}

fn look(desk: &Desk, hash: &str, now: Timestamp) -> Result<PasswordAnswer, Fault> {
    if somebody_is_here(desk)? {
        close(&desk.connection)?;
        return Ok(PasswordAnswer::Wrong);
    }
    if let Some(until) = locked(&desk.connection, &Subject::SetUpCode, now)? {
        return Ok(PasswordAnswer::Locked { until });
    }
    let kept: Option<String> = desk
        .connection
        .prepare_cached("SELECT code_hash FROM set_up_code WHERE one = 1")?
        .query_row([], |row| row.get("code_hash"))
        .optional()?;
    if kept.as_deref() == Some(hash) {
        forget(&desk.connection, &Subject::SetUpCode)?;
        return Ok(PasswordAnswer::Right);
    }
    failed(&desk.connection, &Subject::SetUpCode, now)?;
    Ok(PasswordAnswer::Wrong)
}

fn somebody_is_here(desk: &Desk) -> Result<bool, Fault> {
    Ok(!desk.installation()?.people.is_empty())
}

fn close(connection: &Connection) -> Result<(), Fault> {
    connection.prepare_cached("DELETE FROM set_up_code")?.execute([])?;
    Ok(())
}

/// Five groups of four, easy to read off a screen: 80 bits.
pub(crate) fn readable_code() -> Result<String, Fault> {
    let digits = random_hex(10)?.to_uppercase();
    let groups: Vec<&str> = (0..5).filter_map(|n| digits.get(n * 4..n * 4 + 4)).collect();
    Ok(groups.join("-"))
}

/// A code as typed, without what people put between its groups.
pub(crate) fn plain(typed: &str) -> String {
    typed.chars().filter(char::is_ascii_alphanumeric).collect::<String>().to_uppercase()
}
