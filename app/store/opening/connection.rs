//! A connection with every setting that the store relies on, each read back.

use super::fault::OpenFault;
use rusqlite::config::DbConfig;
use rusqlite::{Connection, OpenFlags};
use std::path::Path;
use std::time::Duration;

/// What a connection is for.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Purpose {
    /// The one that writes.
    Write,
    /// One that reads for pages.
    Read,
}

/// Name, what is set, what reads back. WAL before 3.51.3 has a race at reset; `synchronous` 2 is FULL.
pub(crate) const SETTINGS: &[(&str, &str, &str)] = &[
    ("busy_timeout", "5000", "5000"),
    ("journal_mode", "WAL", "wal"),
    ("synchronous", "FULL", "2"),
    ("foreign_keys", "ON", "1"),
    ("recursive_triggers", "ON", "1"),
    ("trusted_schema", "OFF", "0"),
    ("cell_size_check", "ON", "1"),
    ("journal_size_limit", "67108864", "67108864"),
];

/// Opens the file with every setting, read back.
pub(crate) fn connect(file: &Path, purpose: Purpose) -> Result<Connection, OpenFault> {
    let flags = OpenFlags::SQLITE_OPEN_READ_WRITE | OpenFlags::SQLITE_OPEN_NO_MUTEX;
    let connection = Connection::open_with_flags(file, flags)?;
    connection.busy_timeout(Duration::from_secs(5))?;
    connection.set_db_config(DbConfig::SQLITE_DBCONFIG_DEFENSIVE, true)?;
    connection.set_db_config(DbConfig::SQLITE_DBCONFIG_DQS_DML, false)?;
    connection.set_db_config(DbConfig::SQLITE_DBCONFIG_DQS_DDL, false)?;
    for (name, value, wanted) in SETTINGS {
        connection.execute_batch(&format!("PRAGMA {name} = {value}"))?;
        check(&connection, name, wanted)?;
    }
    if purpose == Purpose::Read {
        connection.execute_batch("PRAGMA query_only = ON")?;
        check(&connection, "query_only", "1")?;
    }
    connection.set_prepared_statement_cache_capacity(64);
    Ok(connection)
}

/// Opens the file for looking only. `untouched` also leaves no files beside it; for when no other process has it.
pub(crate) fn connect_unchanging(file: &Path, untouched: bool) -> Result<Connection, OpenFault> {
    let ending = if untouched { "&immutable=1" } else { "" };
    let name: String = file.display().to_string().replace('%', "%25").replace('?', "%3f").replace('#', "%23");
    let flags = OpenFlags::SQLITE_OPEN_READ_ONLY | OpenFlags::SQLITE_OPEN_NO_MUTEX | OpenFlags::SQLITE_OPEN_URI;
    let connection = Connection::open_with_flags(format!("file:{name}?mode=ro{ending}"), flags)?;
    connection.busy_timeout(Duration::from_secs(5))?;
    connection.set_db_config(DbConfig::SQLITE_DBCONFIG_NO_CKPT_ON_CLOSE, true)?;
    connection.execute_batch("PRAGMA trusted_schema = OFF; PRAGMA cell_size_check = ON")?;
    Ok(connection)
}

/// A setting as it reads back.
pub(crate) fn setting(connection: &Connection, name: &str) -> Result<String, rusqlite::Error> {
    connection.pragma_query_value(None, name, |row| {
        Ok(match row.get_ref(0)? {
            rusqlite::types::ValueRef::Integer(number) => number.to_string(),
            other => other.as_str().unwrap_or_default().to_owned(),
        })
    })
}

fn check(connection: &Connection, name: &str, wanted: &str) -> Result<(), OpenFault> {
    let found = setting(connection, name)?;
    if found == wanted {
        return Ok(());
    }
    Err(OpenFault::Setting { name: name.to_owned(), found, wanted: wanted.to_owned() })
}
