//! Rebuilds every list from the events, apart, and compares row by row with what is kept.

use crate::answer::Answer;
use crate::drives::project as drives;
use crate::fault::{Fault, ReadFault};
use crate::journal::chains;
use crate::opening::MIGRATIONS;
use crate::people;
use crate::sites;
use crate::states::{Shelves, procedure_of, sealed_of, state};
use crate::store::Store;
use commissioning::journal::{Chain, Fact};
use commissioning::people::Installation;
use commissioning::plant::Site;
use commissioning::record::Drive;
use rusqlite::Connection;
use rusqlite::types::Value;

/// Every list that is rebuilt, with a statement that reads it whole in the order of its key.
const LISTS: &[(&str, &str)] = &[
    ("people", "SELECT * FROM people ORDER BY id"),
    ("sites", "SELECT * FROM sites ORDER BY id"),
    ("drives", "SELECT * FROM drives ORDER BY id"),
    ("contributors", "SELECT * FROM contributors ORDER BY drive, person"),
    ("signatures", "SELECT * FROM signatures ORDER BY event"),
];

impl Store {
    /// What differs between the lists as kept and as rebuilt from the events, in sentences; empty when nothing does.
    pub fn compare_projections(&self) -> Answer<Vec<String>, ReadFault> {
        self.read(|desk| compare(&desk.connection))
    }

    /// As `compare_projections`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn compare_projections_blocking(&self) -> Result<Vec<String>, ReadFault> {
        self.compare_projections().wait()
    }
}

/// What differs between the lists as kept and as rebuilt.
pub(crate) fn compare(connection: &Connection) -> Result<Vec<String>, Fault> {
    let rebuilt = rebuild(connection)?;
    let mut differences = Vec::new();
    for (list, statement) in LISTS {
        let (kept, fresh) = (rows(connection, statement)?, rows(&rebuilt, statement)?);
        if kept.len() != fresh.len() {
            differences.push(format!("{list}: {} rows are kept, {} follow from the events", kept.len(), fresh.len()));
        }
        for (kept, fresh) in kept.iter().zip(&fresh).filter(|(kept, fresh)| kept != fresh).take(10) {
            differences.push(format!("{list}: kept {kept:?}, from the events {fresh:?}"));
        }
    }
    Ok(differences)
}

/// A database in memory with the lists as they follow from the events alone.
fn rebuild(connection: &Connection) -> Result<Connection, Fault> {
    let fresh = Connection::open_in_memory()?;
    for sql in MIGRATIONS {
        fresh.execute_batch(sql)?;
    }
    // The events stay where they are; only the lists are written here.
    fresh.execute_batch("PRAGMA foreign_keys = OFF")?;
    // Shelves of its own: what is compared with must not come from memory.
    let shelves = Shelves::default();
    let installation = state::<Installation>(connection, &shelves, Chain::Installation)?.unwrap_or_default();
    for chain in chains(connection)? {
        match chain {
            Chain::Installation => {
                for sealed in sealed_of(connection, chain)? {
                    if let Fact::PersonKept { person } = sealed.event()?.fact {
                        people::project(&fresh, &person)?;
                    }
                }
            }
            Chain::Site(id) => {
                if let Some(site) = state::<Site>(connection, &shelves, Chain::Site(id))? {
                    sites::project(&fresh, &site)?;
                }
            }
            Chain::Drive(id) => {
                for sealed in sealed_of(connection, chain)? {
                    drives::project_signature(&fresh, &sealed.event()?)?;
                }
                let Some(drive) = state::<Drive>(connection, &shelves, Chain::Drive(id))? else { continue };
                let site = state::<Site>(connection, &shelves, Chain::Site(drive.site))?
                    .ok_or_else(|| Fault::Broken(format!("drive {id} belongs to a site that is not here")))?;
                let procedure = procedure_of(&drive, &installation).map(std::convert::AsRef::as_ref);
                drives::project(&fresh, &drive, &site, procedure)?;
            }
        }
    }
    Ok(fresh)
}

fn rows(connection: &Connection, statement: &str) -> Result<Vec<Vec<Value>>, Fault> {
    let mut statement = connection.prepare(statement)?;
    let width = statement.column_count();
    let rows = statement.query_map([], |row| (0..width).map(|n| row.get::<_, Value>(n)).collect())?;
    Ok(rows.collect::<Result<_, _>>()?)
}
