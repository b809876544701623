//! Finds drives by what a person types, and a person's own open work.

use super::order::{begins_with, holds, searched};
use super::row::{StatusKey, status};
use crate::answer::Answer;
use crate::columns::parsed;
use crate::fault::{Fault, ReadFault};
use crate::store::Store;
use commissioning::{DriveId, PersonId};
use rusqlite::{Connection, Row, named_params};

/// A drive that was found.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct FoundRow {
    /// The site's tag.
    pub site_tag: String,
    /// The site's name.
    pub site_name: String,
    /// Which.
    pub drive: DriveId,
    /// Plant tag.
    pub tag: String,
    /// What it drives.
    pub name: String,
    /// Where its record stands.
    pub status: StatusKey,
}

impl Store {
    /// Drives whose tag begins with this, then those whose tag or name holds it; any letter case, at most 30.
    pub fn find(&self, text: &str) -> Answer<Vec<FoundRow>, ReadFault> {
        let text = text.to_owned();
        self.read(move |desk| found(&desk.connection, &text))
    }

    /// As `find`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn find_blocking(&self, text: &str) -> Result<Vec<FoundRow>, ReadFault> {
        self.find(text).wait()
    }

    /// Drives that this person created, filled in sheets of or contributed to the record of, while nothing is signed: the
    /// latest first, at most 50.
    pub fn my_open_drives(&self, person: PersonId) -> Answer<Vec<FoundRow>, ReadFault> {
        self.read(move |desk| open_of(&desk.connection, person))
    }

    /// As `my_open_drives`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn my_open_drives_blocking(&self, person: PersonId) -> Result<Vec<FoundRow>, ReadFault> {
        self.my_open_drives(person).wait()
    }
}

fn found(connection: &Connection, text: &str) -> Result<Vec<FoundRow>, Fault> {
    if searched(text).is_empty() {
        return Ok(Vec::new());
    }
    let mut statement = connection.prepare_cached(
        "SELECT drives.id AS id, drives.tag AS tag, drives.name AS name, status,
                sites.tag AS site_tag, sites.name AS site_name
         FROM drives JOIN sites ON sites.id = drives.site
         WHERE tag_search LIKE :holds ESCAPE '\\' OR name_search LIKE :holds ESCAPE '\\'
         ORDER BY tag_search LIKE :begins ESCAPE '\\' DESC, tag_order, drives.id LIMIT 30",
    )?;
    let rows = statement.query_map(named_params! { ":holds": holds(text), ":begins": begins_with(text) }, found_row)?;
    Ok(rows.collect::<Result<_, _>>()?)
}

fn open_of(connection: &Connection, person: PersonId) -> Result<Vec<FoundRow>, Fault> {
    let mut statement = connection.prepare_cached(
        "SELECT drives.id AS id, drives.tag AS tag, drives.name AS name, status,
                sites.tag AS site_tag, sites.name AS site_name
         FROM drives JOIN sites ON sites.id = drives.site
         WHERE drives.id IN (
                SELECT drive FROM contributors WHERE person = :person
                UNION ALL
                -- Said as the index `sheets_by_person` says it.
                SELECT substr(chain, 7) FROM events
                WHERE json_extract(bytes, '$.fact.kind') IN ('drive-created', 'field-set')
                    AND json_extract(bytes, '$.person') = :person
            )
            AND status IN ('not-begun', 'in-progress', 'returned')
         ORDER BY drives.last_change DESC, drives.id LIMIT 50",
    )?;
    let rows = statement.query_map(named_params! { ":person": person.to_string() }, found_row)?;
    Ok(rows.collect::<Result<_, _>>()?)
}

fn found_row(row: &Row<'_>) -> rusqlite::Result<FoundRow> {
    Ok(FoundRow {
        site_tag: row.get("site_tag")?,
        site_name: row.get("site_name")?,
        drive: parsed(row, "id")?,
        tag: row.get("tag")?,
        name: row.get("name")?,
        status: status(row)?,
    })
}
