//! All sites with how many drives stand where.

use crate::answer::Answer;
use crate::columns::parsed;
use crate::drives::StatusKey;
use crate::fault::{Fault, ReadFault};
use crate::store::Store;
use commissioning::SiteId;
use rusqlite::{Connection, Row};

/// A site with its counts.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct SiteRow {
    /// Which.
    pub site: SiteId,
    /// Tag.
    pub tag: String,
    /// Name.
    pub name: String,
    /// All its drives.
    pub drives: u32,
    /// Without a record.
    pub not_begun: u32,
    /// Being worked on.
    pub in_progress: u32,
    /// Sent back.
    pub returned: u32,
    /// Waiting for review.
    pub signed: u32,
    /// Accepted.
    pub accepted: u32,
}

impl Store {
    /// All sites by tag.
    pub fn sites(&self) -> Answer<Vec<SiteRow>, ReadFault> {
        self.read(|desk| listed(&desk.connection))
    }

    /// As `sites`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn sites_blocking(&self) -> Result<Vec<SiteRow>, ReadFault> {
        self.sites().wait()
    }
}

fn listed(connection: &Connection) -> Result<Vec<SiteRow>, Fault> {
    let mut statement = connection.prepare_cached(
        "SELECT sites.id AS id, sites.tag AS tag, sites.name AS name,
                count(drives.id) AS drives,
                count(drives.id) FILTER (WHERE drives.status = 'not-begun') AS not_begun,
                count(drives.id) FILTER (WHERE drives.status = 'in-progress') AS in_progress,
                count(drives.id) FILTER (WHERE drives.status = 'returned') AS returned,
                count(drives.id) FILTER (WHERE drives.status = 'signed') AS signed,
                count(drives.id) FILTER (WHERE drives.status = 'accepted') AS accepted
         FROM sites LEFT JOIN drives ON drives.site = sites.id
         GROUP BY sites.tag, sites.id ORDER BY sites.tag, sites.id",
    )?;
    let rows = statement.query_map([], site_row)?;
    Ok(rows.collect::<Result<_, _>>()?)
}

fn site_row(row: &Row<'_>) -> rusqlite::Result<SiteRow> {
    Ok(SiteRow {
        site: parsed(row, "id")?,
        tag: row.get("tag")?,
        name: row.get("name")?,
        drives: row.get("drives")?,
        not_begun: row.get("not_begun")?,
        in_progress: row.get("in_progress")?,
        returned: row.get("returned")?,
        signed: row.get("signed")?,
        accepted: row.get("accepted")?,
    })
}

impl SiteRow {
    /// How many stand at this status.
    #[must_use]
    pub const fn count(&self, status: StatusKey) -> u32 {
        match status {
            StatusKey::NotBegun => self.not_begun,
            StatusKey::InProgress => self.in_progress,
            StatusKey::Returned => self.returned,
            StatusKey::Signed => self.signed,
            StatusKey::Accepted => self.accepted,
        }
    }
}
