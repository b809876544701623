//! Migrations rehearsed in order with sample rows, and the checked copy before each.

use super::stage::*;
use crate::keeping::check_store;
use crate::opening::{MIGRATIONS, bring_up_to_date, schema_version};
use rusqlite::Connection;

/// Sample rows by migration: none comes without rows to migrate.
const SAMPLES: &[&str] =
    &[include_str!("../../../migrations/samples/0001.sql"), include_str!("../../../migrations/samples/0002.sql")];

#[test]
fn each_migration_works_on_the_rows_of_those_before() {
    assert_eq!(SAMPLES.len(), MIGRATIONS.len(), "every migration brings sample rows");
    let folder = tempfile::tempdir().unwrap();
    let file = folder.path().join("store.sqlite");
    let mut connection = Connection::open(&file).unwrap();
    connection.pragma_update(None, "foreign_keys", true).unwrap();
    for (n, sample) in SAMPLES.iter().enumerate() {
        bring_up_to_date(&mut connection, &MIGRATIONS[..=n], folder.path(), at(0)).unwrap();
        connection.execute_batch(sample).unwrap_or_else(|e| panic!("sample {}: {e}", n + 1));
        crate::keeping::sound(&connection).unwrap();
    }
    assert_eq!(schema_version(&connection).unwrap() as usize, MIGRATIONS.len());
}

#[test]
fn the_samples_are_a_sound_journal_with_a_row_in_every_table() {
    let connection = Connection::open_in_memory().unwrap();
    for (sql, sample) in MIGRATIONS.iter().zip(SAMPLES) {
        connection.execute_batch(sql).unwrap();
        connection.execute_batch(sample).unwrap();
    }
    let (faults, events) = crate::journal::verify_journal(&connection).unwrap();
    assert_eq!(faults, Vec::<String>::new());
    assert!(events > 3);
    let tables: Vec<String> = connection
        .prepare("SELECT name FROM sqlite_schema WHERE type = 'table'")
        .unwrap()
        .query_map([], |row| row.get(0))
        .unwrap()
        .map(Result::unwrap)
        .collect();
    for table in tables {
        let rows: i64 = connection.query_row(&format!("SELECT count(*) FROM {table}"), [], |row| row.get(0)).unwrap();
        assert!(rows > 0, "{table} has no sample row");
    }
}

#[test]
fn a_copy_is_made_and_checked_before_a_store_with_rows_is_changed() {
    let folder = tempfile::tempdir().unwrap();
    let store = crate::Store::open(folder.path(), at(0)).unwrap();
    set_up(&store);
    drop(store);
    let mut connection = Connection::open(folder.path().join("store.sqlite")).unwrap();
    let copies = folder.path().join("backups");
    let known = u32::try_from(MIGRATIONS.len()).unwrap();
    let next = [MIGRATIONS, &["CREATE TABLE later (id TEXT NOT NULL PRIMARY KEY) STRICT;"]].concat();
    bring_up_to_date(&mut connection, &next, &copies, at(9)).unwrap();
    assert_eq!(schema_version(&connection).unwrap(), known + 1);
    let mut made: Vec<_> = std::fs::read_dir(&copies).unwrap().map(|e| e.unwrap().path()).collect();
    made.sort();
    let copy = Connection::open(made.last().unwrap()).unwrap();
    assert_eq!(schema_version(&copy).unwrap(), known, "{made:?}");
    assert_eq!(crate::journal::verify_journal(&copy).unwrap().0, Vec::<String>::new());

    // One that fails changes nothing.
    let broken = [next.as_slice(), &["CREATE TABLE half (id TEXT) STRICT; SELECT no_such_thing();"]].concat();
    assert!(bring_up_to_date(&mut connection, &broken, &copies, at(10)).is_err());
    assert_eq!(schema_version(&connection).unwrap(), known + 1);
    assert!(!connection.table_exists(None, "half").unwrap());
}

#[test]
fn a_fresh_store_passes_its_own_check() {
    let store = stage();
    let report = check_store(store.folder(), at(10)).unwrap();
    let wrong: Vec<_> = report.findings.iter().filter(|f| !f.starts_with("room")).collect();
    assert!(wrong.is_empty(), "{}", report.to_text());
}
