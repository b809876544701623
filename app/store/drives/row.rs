//! A drive as lists show it.

use super::order::{searched, tag_order};
use crate::columns::{json, moment, parsed, unreadable};
use commissioning::judge::Counts;
use commissioning::record::Status;
use commissioning::{DriveId, SiteId, Timestamp};
use rusqlite::Row;
use serde::{Deserialize, Serialize};

/// Where a drive's record stands, as lists filter by it.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum StatusKey {
    /// No record yet.
    NotBegun,
    /// Being worked on.
    InProgress,
    /// Sent back.
    Returned,
    /// Signed, waits for review.
    Signed,
    /// Accepted.
    Accepted,
}

impl StatusKey {
    /// All, in the order of the work.
    pub const ALL: [Self; 5] = [Self::NotBegun, Self::InProgress, Self::Returned, Self::Signed, Self::Accepted];

    /// Of a record's status.
    #[must_use]
    pub const fn of(status: Option<&Status>) -> Self {
        match status {
            None => Self::NotBegun,
            Some(Status::InProgress { returned: None }) => Self::InProgress,
            Some(Status::InProgress { returned: Some(_) }) => Self::Returned,
            Some(Status::Signed { .. }) => Self::Signed,
            Some(Status::Accepted { .. }) => Self::Accepted,
        }
    }

    /// As addresses and the store name it.
    #[must_use]
    pub const fn key(self) -> &'static str {
        match self {
            Self::NotBegun => "not-begun",
            Self::InProgress => "in-progress",
            Self::Returned => "returned",
            Self::Signed => "signed",
            Self::Accepted => "accepted",
        }
    }

    /// As screens name it.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::NotBegun => "not begun",
            Self::InProgress => "in progress",
            Self::Returned => "returned",
            Self::Signed => "signed, waits for review",
            Self::Accepted => "accepted",
        }
    }

    /// The status of this key.
    #[must_use]
    pub fn from_key(key: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|s| s.key() == key)
    }
}

/// A phase on the board.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct PhaseCell {
    /// Its id.
    pub id: String,
    /// One word for it.
    pub short: String,
    /// Steps still to be settled.
    pub left: u32,
    /// Steps settled.
    pub settled: u32,
    /// Waits at its hold point.
    pub waits: bool,
}

/// A drive on the board.
#[derive(Clone, Debug, PartialEq)]
pub struct BoardRow {
    /// Which.
    pub drive: DriveId,
    /// Its site.
    pub site: SiteId,
    /// Plant tag.
    pub tag: String,
    /// What it drives.
    pub name: String,
    /// Where its record stands.
    pub status: StatusKey,
    /// Revision of its record; 0 when none has begun.
    pub revision: u32,
    /// Phases in order.
    pub phases: Vec<PhaseCell>,
    /// Verdicts: those frozen at signing, else those of now.
    pub counts: Counts,
    /// Findings nobody has settled.
    pub open_findings: u32,
    /// When its chain was last added to.
    pub last_change: Timestamp,
}

/// The row with the columns that only lists need.
pub(crate) struct Written {
    pub(crate) row: BoardRow,
    pub(crate) signed_at: Option<Timestamp>,
    pub(crate) signed_by: Option<String>,
}

impl Written {
    pub(crate) fn tag_order(&self) -> String {
        tag_order(&self.row.tag)
    }

    pub(crate) fn tag_search(&self) -> String {
        searched(&self.row.tag)
    }

    pub(crate) fn name_search(&self) -> String {
        searched(&self.row.name)
    }
}

/// Reads a drive's row; the statement names every column of it.
pub(crate) fn board_row(row: &Row<'_>) -> rusqlite::Result<BoardRow> {
    Ok(BoardRow {
        drive: parsed(row, "id")?,
        site: parsed(row, "site")?,
        tag: row.get("tag")?,
        name: row.get("name")?,
        status: status(row)?,
        revision: row.get("revision")?,
        phases: json(row, "phases")?,
        counts: json(row, "counts")?,
        open_findings: row.get("open_findings")?,
        last_change: moment(row, "last_change")?,
    })
}

/// A status from its column.
pub(crate) fn status(row: &Row<'_>) -> rusqlite::Result<StatusKey> {
    let text: String = row.get("status")?;
    StatusKey::from_key(&text).ok_or_else(|| unreadable("status", text))
}
