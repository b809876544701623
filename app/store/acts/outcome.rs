//! What an act came to, as kept for ever under its id.

use super::fault::PerformFault;
use crate::answer::Answer;
use crate::fault::{Fault, ReadFault};
use crate::store::Store;
use commissioning::journal::Head;
use commissioning::{ActId, EventId, Refusal, Timestamp};
use rusqlite::{Connection, OptionalExtension, Row, named_params};
use serde::{Deserialize, Serialize};

/// That an act was done: what it made true, and when it was received.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Receipt {
    /// The act.
    pub act: ActId,
    /// The events it became.
    pub events: Vec<EventId>,
    /// When it was received first.
    pub received: Timestamp,
    /// It had been done before; this is the same answer again.
    pub repeated: bool,
    /// The head of the drive's chain after it, if it was about a drive.
    pub drive_head: Option<Head>,
}

/// What is written beside the act.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(tag = "came_to", rename_all = "kebab-case", deny_unknown_fields)]
pub(crate) enum Outcome {
    /// Done.
    Done {
        events: Vec<EventId>,
        #[serde(default, skip_serializing_if = "Option::is_none")]
        drive_head: Option<Head>,
    },
    /// Refused.
    Refused { because: Refusal },
}

/// An act as kept.
pub(crate) struct KeptAct {
    pub(crate) content_hash: String,
    pub(crate) outcome: Outcome,
    pub(crate) received: Timestamp,
}

impl KeptAct {
    /// The answer, said again.
    pub(crate) fn answer(self, act: ActId, repeated: bool) -> Result<Receipt, PerformFault> {
        match self.outcome {
            Outcome::Done { events, drive_head } => {
                Ok(Receipt { act, events, received: self.received, repeated, drive_head })
            }
            Outcome::Refused { because } => Err(PerformFault::Refused(because)),
        }
    }
}

/// The act kept under this id.
pub(crate) fn kept(connection: &Connection, act: ActId) -> Result<Option<KeptAct>, Fault> {
    let row = connection
        .prepare_cached("SELECT content_hash, outcome, received FROM acts WHERE id = :id")?
        .query_row(named_params! { ":id": act.to_string() }, columns)
        .optional()?;
    let Some((content_hash, outcome, received)) = row else { return Ok(None) };
    let received = Timestamp::parse(&received).ok_or_else(|| Fault::Broken(format!("act {act} has no moment")))?;
    Ok(Some(KeptAct { content_hash, outcome: serde_json::from_str(&outcome)?, received }))
}

fn columns(row: &Row<'_>) -> rusqlite::Result<(String, String, String)> {
    Ok((row.get("content_hash")?, row.get("outcome")?, row.get("received")?))
}

/// Keeps an act.
pub(crate) fn keep(connection: &Connection, act: ActId, kept: &KeptAct) -> Result<(), Fault> {
    connection
        .prepare_cached(
            "INSERT INTO acts (id, content_hash, outcome, received) VALUES (:id, :content_hash, :outcome, :received)",
        )?
        .execute(named_params! {
            ":id": act.to_string(),
            ":content_hash": kept.content_hash,
            ":outcome": serde_json::to_string(&kept.outcome)?,
            ":received": kept.received.to_string(),
        })?;
    Ok(())
}

impl Store {
    /// What the act with this id came to; `None` when none was kept.
    pub fn outcome(&self, act: ActId) -> Answer<Option<Result<Receipt, Refusal>>, ReadFault> {
        self.read(move |desk| {
            Ok(kept(&desk.connection, act)?.map(|kept| match kept.outcome {
                Outcome::Done { events, drive_head } => {
                    Ok(Receipt { act, events, received: kept.received, repeated: true, drive_head })
                }
                Outcome::Refused { because } => Err(because),
            }))
        })
    }

    /// As `outcome`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn outcome_blocking(&self, act: ActId) -> Result<Option<Result<Receipt, Refusal>>, ReadFault> {
        self.outcome(act).wait()
    }
}
