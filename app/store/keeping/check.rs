//! Checks a store from end to end without changing anything: `integrity_check` alone finds few of the faults that count.

use super::compare::compare;
use super::copy::sound;
use super::report::Report;
use super::signatures::check_signatures;
use super::space::Space;
use crate::fault::Fault;
use crate::journal::{ahead_of_the_store, stream_head, verify_journal};
use crate::opening::{MIGRATIONS, OpenFault, connect_unchanging, schema_of, schema_version, setting};
use crate::photos;
use commissioning::Timestamp;
use commissioning::journal::Head;
use rusqlite::{Connection, OptionalExtension};
use std::fs::File;
use std::os::unix::fs::PermissionsExt;
use std::path::Path;

/// Checks the store in a folder, beside a running program too. Nothing is changed.
///
/// # Errors
/// When there is no store of ours to look at.
pub fn check_store(folder: &Path, now: Timestamp) -> Result<Report, OpenFault> {
    let file = folder.join("store.sqlite");
    schema_of(&file, MIGRATIONS.len())?;
    let alone = alone_here(folder);
    let connection = connect_unchanging(&file, alone.is_some())?;
    let moment = connection.unchecked_transaction()?;
    let mut report = Report::new();

    let schema = schema_version(&moment)?;
    report.add("database", format!("SQLite {}, schema {schema}", rusqlite::version()), settings(&moment));
    report.add("file", "integrity_check and foreign keys are fine", faults_of(sound(&moment)));
    let (faults, events) = seen(verify_journal(&moment), 0);
    let (more, end) = seen(stream_head(&moment).map(|head| (Vec::new(), head)), Head::empty());
    report.add("journal", format!("{events} events, stream ends in {}", short(&end.hash)), [faults, more].concat());
    report.add("heads seen elsewhere", "none knows more than this store", flat(ahead_of_the_store(&moment)));
    report.add("lists", "rebuilt from the events they are the same", flat(compare(&moment)));
    let (faults, count) = seen(check_signatures(&moment), 0);
    report.add("signatures", format!("{count} signatures, each on the record as the events give it"), faults);
    let (faults, count) = seen(check_photos(&moment, &folder.join("photos")), 0);
    report.add("photos", format!("{count} photos, each as its hash says"), faults);
    report.add("modes", "open to nobody else", modes(folder));
    report.add("room", "enough", room(folder));
    report.add("time", "the clock is not behind the store", flat(clock(&moment, now)));
    report.add("backup", last_backup(&moment)?, Vec::new());
    Ok(report)
}

/// Keeps others out while the check lasts, if nobody is in: without a write-ahead log the file can then be read as
/// one that does not change, which leaves nothing behind. A backup has no lock, and nobody in it.
fn alone_here(folder: &Path) -> Option<Option<File>> {
    let log = folder.join("store.sqlite-wal");
    if std::fs::metadata(log).is_ok_and(|m| m.len() > 0) {
        return None;
    }
    let Ok(lock) = File::open(folder.join("lock")) else { return Some(None) };
    lock.try_lock_shared().ok().map(|()| Some(lock))
}

fn settings(connection: &Connection) -> Vec<String> {
    let wanted = [("trusted_schema", "0"), ("cell_size_check", "1"), ("journal_mode", "wal"), ("encoding", "UTF-8")];
    let mut faults = Vec::new();
    for (name, value) in wanted {
        match setting(connection, name) {
            Ok(found) if found == value => {}
            // Read as unchanging, or as a backup, a file has no write-ahead log.
            Ok(found) if name == "journal_mode" && (found == "delete" || found == "off") => {}
            Ok(found) => faults.push(format!("{name} reads {found}, not {value}")),
            Err(error) => faults.push(format!("{name} cannot be read: {error}")),
        }
    }
    faults
}

fn check_photos(connection: &Connection, folder: &Path) -> Result<(Vec<String>, usize), Fault> {
    let kept = photos::kept(connection)?;
    let mut faults = Vec::new();
    for (hash, size) in &kept {
        match std::fs::read(folder.join(hash)) {
            Err(error) => faults.push(format!("{hash} cannot be read: {error}")),
            Ok(bytes) if bytes.len() as u64 != *size || photos::file_hash(&bytes) != *hash => {
                faults.push(format!("{hash} was changed"));
            }
            Ok(_) => {}
        }
    }
    let mut entered = connection.prepare(
        "SELECT DISTINCT json_extract(bytes, '$.fact.entry.photo.hash') AS hash FROM events
         WHERE json_extract(bytes, '$.fact.entry.photo.hash') IS NOT NULL",
    )?;
    for hash in entered.query_map([], |row| row.get::<_, String>("hash"))? {
        let hash = hash?;
        if kept.binary_search_by(|(known, _)| known.cmp(&hash)).is_err() {
            faults.push(format!("{hash} was entered at a step but is not kept"));
        }
    }
    for entry in std::fs::read_dir(folder)? {
        let name = entry?.file_name().to_string_lossy().into_owned();
        if !name.ends_with(".part") && kept.binary_search_by(|(hash, _)| hash.as_str().cmp(&name)).is_err() {
            faults.push(format!("the file {name} belongs to no photo"));
        }
    }
    Ok((faults, kept.len()))
}

fn modes(folder: &Path) -> Vec<String> {
    let mut faults = Vec::new();
    for (name, wanted) in [("", 0o700), ("photos", 0o700), ("store.sqlite", 0o600)] {
        let path = if name.is_empty() { folder.to_owned() } else { folder.join(name) };
        match std::fs::metadata(&path).map(|m| m.permissions().mode() & 0o777) {
            Ok(mode) if mode & !wanted == 0 => {}
            Ok(mode) => faults.push(format!("{} has mode {mode:o}, more than {wanted:o}", path.display())),
            Err(error) => faults.push(format!("{}: {error}", path.display())),
        }
    }
    faults
}

fn room(folder: &Path) -> Vec<String> {
    match Space::at(folder) {
        Ok(space) if space.low => vec![format!("only {} MB are free", space.free / 1_000_000)],
        Ok(_) => Vec::new(),
        Err(fault) => vec![fault.to_string()],
    }
}

/// A receipt time later than now: the clock went back, or the store is from a machine whose clock ran ahead.
fn clock(connection: &Connection, now: Timestamp) -> Result<Vec<String>, Fault> {
    let last: Option<String> = connection
        .prepare("SELECT max(received) AS last FROM acts")?
        .query_row([], |row| row.get("last"))
        .optional()?
        .flatten();
    Ok(last
        .filter(|last| *last > now.to_string())
        .map(|last| format!("the last act was received at {last}, now it is {now}"))
        .into_iter()
        .collect())
}

fn last_backup(connection: &Connection) -> Result<String, OpenFault> {
    let last: Option<String> = connection
        .prepare("SELECT at FROM openings WHERE kind = 'backup' ORDER BY number DESC LIMIT 1")?
        .query_row([], |row| row.get("at"))
        .optional()?;
    Ok(last.map_or_else(|| "none was made yet".to_owned(), |at| format!("the last was made and checked at {at}")))
}

fn short(hash: &str) -> String {
    if hash.is_empty() { "nothing".to_owned() } else { hash.chars().take(16).collect() }
}

fn faults_of(looked: Result<(), Fault>) -> Vec<String> {
    looked.err().map(|fault| fault.to_string()).into_iter().collect()
}

fn flat(looked: Result<Vec<String>, Fault>) -> Vec<String> {
    looked.unwrap_or_else(|fault| vec![fault.to_string()])
}

/// A look that broke is a fault of its own, and the check goes on.
fn seen<T>(looked: Result<(Vec<String>, T), Fault>, otherwise: T) -> (Vec<String>, T) {
    looked.unwrap_or_else(|fault| (vec![fault.to_string()], otherwise))
}
