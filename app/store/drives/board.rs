//! The board of a site: its drives in the order of their tags, by status and text, a page at a time.

use super::order::holds;
use super::page::{Cut, Page};
use super::row::{BoardRow, StatusKey, board_row};
use crate::answer::Answer;
use crate::fault::{Fault, ReadFault};
use crate::store::Store;
use commissioning::SiteId;
use rusqlite::{Connection, named_params};

/// What the board shows.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct BoardFilter {
    /// Tag or name holds this, in any letter case; empty for all.
    pub text: String,
    /// Only records that stand here.
    pub status: Option<StatusKey>,
    /// Which page, from 1.
    pub page: u32,
}

impl Store {
    /// A page of a site's board.
    pub fn board(&self, site: SiteId, filter: BoardFilter) -> Answer<Page<BoardRow>, ReadFault> {
        self.read(move |desk| match filter.status {
            None => whole(&desk.connection, site, &filter),
            Some(status) => of_status(&desk.connection, site, status, &filter),
        })
    }

    /// As `board`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn board_blocking(&self, site: SiteId, filter: BoardFilter) -> Result<Page<BoardRow>, ReadFault> {
        self.board(site, filter).wait()
    }
}

fn whole(connection: &Connection, site: SiteId, filter: &BoardFilter) -> Result<Page<BoardRow>, Fault> {
    let (site, pattern) = (site.to_string(), holds(&filter.text));
    let total = connection
        .prepare_cached(
            "SELECT count(*) FROM drives WHERE site = :site
                 AND (tag_search LIKE :pattern ESCAPE '\\' OR name_search LIKE :pattern ESCAPE '\\')",
        )?
        .query_row(named_params! { ":site": site, ":pattern": pattern }, |row| row.get(0))?;
    let cut = Cut::of(total, filter.page);
    let mut statement = connection.prepare_cached(
        "SELECT id, site, tag, name, status, revision, phases, counts, open_findings, last_change
         FROM drives WHERE site = :site
             AND (tag_search LIKE :pattern ESCAPE '\\' OR name_search LIKE :pattern ESCAPE '\\')
         ORDER BY tag_order, id LIMIT :limit OFFSET :offset",
    )?;
    let rows = statement.query_map(
        named_params! { ":site": site, ":pattern": pattern, ":limit": cut.limit, ":offset": cut.offset },
        board_row,
    )?;
    Ok(cut.page(rows.collect::<Result<_, _>>()?))
}

fn of_status(
    connection: &Connection,
    site: SiteId,
    status: StatusKey,
    filter: &BoardFilter,
) -> Result<Page<BoardRow>, Fault> {
    let (site, status, pattern) = (site.to_string(), status.key(), holds(&filter.text));
    let total = connection
        .prepare_cached(
            "SELECT count(*) FROM drives WHERE site = :site AND status = :status
                 AND (tag_search LIKE :pattern ESCAPE '\\' OR name_search LIKE :pattern ESCAPE '\\')",
        )?
        .query_row(named_params! { ":site": site, ":status": status, ":pattern": pattern }, |row| row.get(0))?;
    let cut = Cut::of(total, filter.page);
    let mut statement = connection.prepare_cached(
        "SELECT id, site, tag, name, status, revision, phases, counts, open_findings, last_change
         FROM drives WHERE site = :site AND status = :status
             AND (tag_search LIKE :pattern ESCAPE '\\' OR name_search LIKE :pattern ESCAPE '\\')
         ORDER BY tag_order, id LIMIT :limit OFFSET :offset",
    )?;
    let rows = statement.query_map(
        named_params! {
            ":site": site, ":status": status, ":pattern": pattern, ":limit": cut.limit, ":offset": cut.offset,
        },
        board_row,
    )?;
    Ok(cut.page(rows.collect::<Result<_, _>>()?))
}
