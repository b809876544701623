//! Opening: one process, our own file, no newer schema, every setting read back, nobody else's eyes.

use super::stage::*;
use crate::opening::{Purpose, connect, setting};
use crate::{OpenFault, Store};
use std::os::unix::fs::PermissionsExt;
use std::time::{Duration, Instant};

#[test]
fn a_second_program_on_the_same_folder_is_refused_at_once() {
    let folder = tempfile::tempdir().unwrap();
    let first = Store::open(folder.path(), at(0)).unwrap();
    let asked = Instant::now();
    let refused = Store::open(folder.path(), at(0)).unwrap_err();
    assert!(asked.elapsed() < Duration::from_secs(1));
    assert!(matches!(refused, OpenFault::InUse(_)), "{refused}");
    assert!(refused.to_string().contains("in use"));
    drop(first);
    Store::open(folder.path(), at(1)).unwrap();
}

#[test]
fn a_newer_store_is_refused_and_not_touched() {
    let folder = tempfile::tempdir().unwrap();
    drop(Store::open(folder.path(), at(0)).unwrap());
    let file = folder.path().join("store.sqlite");
    let other = rusqlite::Connection::open(&file).unwrap();
    let known = u32::try_from(crate::opening::MIGRATIONS.len()).unwrap();
    other.pragma_update(None, "user_version", known + 1).unwrap();
    drop(other);
    let before = (std::fs::read(&file).unwrap(), std::fs::metadata(&file).unwrap().modified().unwrap());
    let refused = Store::open(folder.path(), at(1)).unwrap_err();
    assert_eq!(refused, OpenFault::Newer { found: known + 1, known });
    assert_eq!((std::fs::read(&file).unwrap(), std::fs::metadata(&file).unwrap().modified().unwrap()), before);
    assert!(!folder.path().join("store.sqlite-wal").exists());
}

#[test]
fn a_file_of_something_else_is_refused_and_not_touched() {
    for content in [b"not a database at all".to_vec(), foreign_database(1), foreign_database(0)] {
        let folder = tempfile::tempdir().unwrap();
        let file = folder.path().join("store.sqlite");
        std::fs::write(&file, &content).unwrap();
        assert!(matches!(Store::open(folder.path(), at(0)), Err(OpenFault::NotOurs(_))));
        assert_eq!(std::fs::read(&file).unwrap(), content);
    }
}

fn foreign_database(version: u32) -> Vec<u8> {
    let folder = tempfile::tempdir().unwrap();
    let file = folder.path().join("other.sqlite");
    let other = rusqlite::Connection::open(&file).unwrap();
    other.execute_batch("CREATE TABLE recipes (name TEXT)").unwrap();
    other.pragma_update(None, "user_version", version).unwrap();
    drop(other);
    std::fs::read(&file).unwrap()
}

#[test]
fn every_connection_has_every_setting() {
    let store = stage();
    // As architecture.md lists them; `synchronous` 2 is FULL in SQLite's documentation of the pragma.
    let wanted = [
        ("journal_mode", "wal"),
        ("synchronous", "2"),
        ("foreign_keys", "1"),
        ("trusted_schema", "0"),
        ("cell_size_check", "1"),
        ("busy_timeout", "5000"),
        ("recursive_triggers", "1"),
    ];
    let written = store.writing().give::<_, crate::PerformFault, _>(move |desk| {
        Ok(Ok(wanted.map(|(name, _)| setting(&desk.connection, name).unwrap())))
    });
    assert_eq!(written.wait().unwrap(), wanted.map(|(_, value)| value));
    // As many reads as there are readers, held up until all are busy: each connection is asked.
    let both = std::sync::Arc::new(std::sync::Barrier::new(2));
    let asked = [(); 2].map(|()| {
        let both = std::sync::Arc::clone(&both);
        store.read(move |desk| {
            both.wait();
            let mut found = wanted.map(|(name, _)| setting(&desk.connection, name).unwrap()).to_vec();
            found.push(setting(&desk.connection, "query_only").unwrap());
            Ok(found)
        })
    });
    for answer in asked {
        let mut expected: Vec<&str> = wanted.iter().map(|(_, value)| *value).collect();
        expected.push("1");
        assert_eq!(answer.wait().unwrap(), expected);
    }
}

#[test]
fn the_library_has_no_wal_reset_race() {
    assert!(rusqlite::version_number() >= 3_051_003, "{}", rusqlite::version());
}

#[test]
fn a_reader_cannot_write() {
    let store = stage();
    let reader = connect(&store.folder().join("store.sqlite"), Purpose::Read).unwrap();
    assert!(reader.execute("DELETE FROM sessions", []).is_err());
}

#[test]
fn folder_and_file_are_for_the_owner_alone() {
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("new").join("store");
    let store = Store::open(&path, at(0)).unwrap();
    set_up(&store);
    let mode = |name: &str| std::fs::metadata(path.join(name)).unwrap().permissions().mode() & 0o777;
    assert_eq!((mode(""), mode("photos"), mode("backups")), (0o700, 0o700, 0o700));
    assert_eq!((mode("store.sqlite"), mode("store.sqlite-wal"), mode("lock")), (0o600, 0o600, 0o600));
}

#[test]
fn a_store_in_memory_leaves_nothing_behind() {
    let store = stage();
    let folder = store.folder().to_owned();
    assert!(folder.exists());
    drop(store);
    assert!(!folder.exists());
}
