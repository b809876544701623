//! The schema: numbered SQL files applied in order, a checked copy before each, a newer file left as it is.

use super::connection::{connect_unchanging, setting};
use super::fault::OpenFault;
use super::folder::sync_folder;
use super::write_down::write_down;
use crate::keeping::copy_checked;
use commissioning::Timestamp;
use rusqlite::Connection;
use std::io::Read;
use std::path::Path;

/// Every migration, oldest first; its place in the list is the schema it leads to. Never edited once merged.
pub(crate) const MIGRATIONS: &[&str] = &[
    include_str!("../../../migrations/0001_journal_and_lists.sql"),
    include_str!("../../../migrations/0002_invitations_kept_and_sheets_by_person.sql"),
];

/// Marks a file as a store of ours: "ASLF".
pub(crate) const APPLICATION: u32 = 0x4153_4C46;

/// Refuses, from the header alone and without opening it as a database, a file that is not ours or is newer.
pub(crate) fn schema_of(file: &Path, known: usize) -> Result<u32, OpenFault> {
    let mut header = Vec::new();
    std::fs::File::open(file)?.take(100).read_to_end(&mut header)?;
    if header.is_empty() {
        return Ok(0);
    }
    let number = |at: usize| header.get(at..at + 4).and_then(|b| b.try_into().ok()).map_or(0, u32::from_be_bytes);
    // A file whose first commit is still in the write-ahead log has a header without marks.
    let (version, application) = (number(60), number(68));
    if !header.starts_with(b"SQLite format 3\0") || !(application == APPLICATION || (application, version) == (0, 0)) {
        return Err(OpenFault::NotOurs(file.display().to_string()));
    }
    refuse_newer(version, known)?;
    if version == 0 && !unmarked_is_ours(file)? {
        return Err(OpenFault::NotOurs(file.display().to_string()));
    }
    Ok(version)
}

/// A file without marks is ours when it is empty still, or when its marks are in the write-ahead log beside it.
fn unmarked_is_ours(file: &Path) -> Result<bool, OpenFault> {
    // A journal of the older kind lies there only when the very first opening was cut short: it wants to be played back
    // by whoever may write, and is passed over by whoever only looks.
    let mut journal = file.as_os_str().to_owned();
    journal.push("-journal");
    let connection = connect_unchanging(file, Path::new(&journal).exists())?;
    let tables: i64 = connection.query_row("SELECT count(*) FROM sqlite_schema", [], |row| row.get(0))?;
    Ok(tables == 0 || setting(&connection, "application_id")? == APPLICATION.to_string())
}

/// Applies what is missing, each in one exclusive transaction.
pub(crate) fn bring_up_to_date(
    connection: &mut Connection,
    migrations: &[&str],
    copies: &Path,
    now: Timestamp,
) -> Result<(), OpenFault> {
    let at = schema_version(connection)?;
    refuse_newer(at, migrations.len())?;
    for (next, sql) in (1_u32..).zip(migrations).skip(at as usize) {
        if next > 1 {
            let stamp: String = now.to_string().replace(':', "-");
            copy_checked(connection, &copies.join(format!("before-{next:04}-{stamp}.sqlite")))?;
            sync_folder(copies)?;
        }
        let step = connection.transaction_with_behavior(rusqlite::TransactionBehavior::Exclusive)?;
        step.execute_batch(sql)?;
        step.pragma_update(None, "application_id", APPLICATION)?;
        step.pragma_update(None, "user_version", next)?;
        let kind = if next == 1 { "created" } else { "migrated" };
        write_down(&step, now, kind, &format!("schema {next}"))?;
        step.commit()?;
    }
    Ok(())
}

/// The schema of an open file.
pub(crate) fn schema_version(connection: &Connection) -> Result<u32, OpenFault> {
    Ok(setting(connection, "user_version")?.parse().unwrap_or(0))
}

fn refuse_newer(found: u32, known: usize) -> Result<(), OpenFault> {
    let known = u32::try_from(known).unwrap_or(u32::MAX);
    if found > known { Err(OpenFault::Newer { found, known }) } else { Ok(()) }
}
