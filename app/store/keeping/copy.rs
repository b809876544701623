//! Copies a database while it is in use: in steps, to a temporary name, checked, synced, renamed.

use crate::fault::Fault;
use rusqlite::Connection;
use rusqlite::backup::Backup;
use std::fs::{File, OpenOptions};
use std::os::unix::fs::OpenOptionsExt;
use std::path::{Path, PathBuf};
use std::time::Duration;

const PAGES_AT_ONCE: i32 = 256;

/// Copies to a temporary name beside `to` and checks it there; `finish_copy` gives it its name.
pub(crate) fn copy_to_part(from: &Connection, to: &Path) -> Result<PathBuf, Fault> {
    let mut name = to.as_os_str().to_owned();
    name.push(".part");
    let part = PathBuf::from(name);
    OpenOptions::new().create_new(true).write(true).mode(0o600).open(&part)?;
    let mut copy = Connection::open(&part)?;
    Backup::new(from, &mut copy)?.run_to_completion(PAGES_AT_ONCE, Duration::ZERO, None)?;
    // A copy is one file: no write-ahead log beside it. Open sessions stay behind.
    copy.pragma_update(None, "journal_mode", "DELETE")?;
    if copy.table_exists(None, "sessions")? {
        copy.execute("DELETE FROM sessions", [])?;
    }
    sound(&copy)?;
    copy.close().map_err(|(_, error)| Fault::from(error))?;
    Ok(part)
}

/// Syncs a checked copy and gives it its name.
pub(crate) fn finish_copy(part: &Path, to: &Path) -> Result<(), Fault> {
    File::open(part)?.sync_all()?;
    std::fs::rename(part, to)?;
    Ok(())
}

/// Both at once.
pub(crate) fn copy_checked(from: &Connection, to: &Path) -> Result<(), Fault> {
    let part = copy_to_part(from, to)?;
    finish_copy(&part, to)
}

/// Whether the database's own checks pass.
pub(crate) fn sound(connection: &Connection) -> Result<(), Fault> {
    let mut statement = connection.prepare("PRAGMA integrity_check")?;
    let said = statement.query_map([], |row| row.get::<_, String>(0))?.collect::<Result<Vec<_>, _>>()?;
    if said != ["ok"] {
        return Err(Fault::Broken(format!("the database's own check says: {}", said.join("; "))));
    }
    let mut statement = connection.prepare("PRAGMA foreign_key_check")?;
    if statement.exists([])? {
        return Err(Fault::Broken("a row names another that is not there".to_owned()));
    }
    Ok(())
}
