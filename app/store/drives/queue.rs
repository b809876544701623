//! The review queue: signed records of all sites, the one that has waited longest first.

use super::page::{Cut, Page};
use super::row::{BoardRow, board_row};
use crate::answer::Answer;
use crate::columns::moment;
use crate::fault::{Fault, ReadFault};
use crate::store::Store;
use commissioning::Timestamp;
use rusqlite::{Connection, Row, named_params};

/// A record that waits for review.
#[derive(Clone, Debug, PartialEq)]
pub struct QueueRow {
    /// The site's tag.
    pub site_tag: String,
    /// The site's name.
    pub site_name: String,
    /// The drive.
    pub row: BoardRow,
    /// When it was signed.
    pub signed_at: Timestamp,
    /// By whom, printed name.
    pub signed_by: String,
}

impl Store {
    /// A page of the review queue.
    pub fn queue(&self, page: u32) -> Answer<Page<QueueRow>, ReadFault> {
        self.read(move |desk| waiting(&desk.connection, page))
    }

    /// As `queue`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn queue_blocking(&self, page: u32) -> Result<Page<QueueRow>, ReadFault> {
        self.queue(page).wait()
    }
}

fn waiting(connection: &Connection, page: u32) -> Result<Page<QueueRow>, Fault> {
    let total = connection
        .prepare_cached("SELECT count(*) FROM drives WHERE status = 'signed'")?
        .query_row([], |row| row.get(0))?;
    let cut = Cut::of(total, page);
    let mut statement = connection.prepare_cached(
        "SELECT drives.id AS id, drives.site AS site, drives.tag AS tag, drives.name AS name, status, revision,
                phases, counts, open_findings, drives.last_change AS last_change, signed_at, signed_by,
                sites.tag AS site_tag, sites.name AS site_name
         FROM drives JOIN sites ON sites.id = drives.site
         WHERE status = 'signed' ORDER BY signed_at, drives.id LIMIT :limit OFFSET :offset",
    )?;
    let rows = statement.query_map(named_params! { ":limit": cut.limit, ":offset": cut.offset }, queue_row)?;
    Ok(cut.page(rows.collect::<Result<_, _>>()?))
}

fn queue_row(row: &Row<'_>) -> rusqlite::Result<QueueRow> {
    Ok(QueueRow {
        site_tag: row.get("site_tag")?,
        site_name: row.get("site_name")?,
        row: board_row(row)?,
        signed_at: moment(row, "signed_at")?,
        signed_by: row.get::<_, Option<String>>("signed_by")?.unwrap_or_default(),
    })
}
