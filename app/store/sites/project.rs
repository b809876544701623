//! Writes a site's row from its state.

use crate::fault::Fault;
use commissioning::plant::Site;
use rusqlite::{Connection, named_params};

/// Writes a site's row.
pub(crate) fn project(connection: &Connection, site: &Site) -> Result<(), Fault> {
    connection
        .prepare_cached(
            "INSERT INTO sites (id, tag, name, last_change) VALUES (:id, :tag, :name, :last_change)
             ON CONFLICT (id) DO UPDATE SET
                 tag = excluded.tag, name = excluded.name, last_change = excluded.last_change",
        )?
        .execute(named_params! {
            ":id": site.id.to_string(),
            ":tag": site.tag,
            ":name": site.name,
            ":last_change": site.last_change.to_string(),
        })?;
    Ok(())
}
