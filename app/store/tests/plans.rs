//! No statement of the store reads the whole journal, as SQLite plans it.

use crate::opening::MIGRATIONS;
use rusqlite::Connection;
use std::path::Path;

/// Files whose business is the whole journal.
const WHOLE: &[&str] = &["journal/verify.rs", "keeping/check.rs", "keeping/compare.rs"];

/// Every SQL statement in a source file: its string literals that begin as SQL does.
fn statements(source: &str) -> Vec<String> {
    let mut found = Vec::new();
    for literal in source.split('"').skip(1).step_by(2) {
        let begins = |word: &str| literal.starts_with(&format!("{word} "));
        if ["SELECT", "INSERT", "UPDATE", "DELETE"].into_iter().any(begins) {
            found.push(literal.replace("\\\\", "\\"));
        }
    }
    found
}

fn files(folder: &Path, found: &mut Vec<std::path::PathBuf>) {
    for entry in std::fs::read_dir(folder).unwrap() {
        let path = entry.unwrap().path();
        if path.is_dir() && !path.ends_with("tests") {
            files(&path, found);
        } else if path.extension().is_some_and(|e| e == "rs") {
            found.push(path);
        }
    }
}

fn plan(connection: &Connection, statement: &str) -> Vec<String> {
    let mut statement =
        connection.prepare(&format!("EXPLAIN QUERY PLAN {statement}")).unwrap_or_else(|e| panic!("{e}: {statement}"));
    // Planning needs no values for the parameters.
    let mut rows = statement.raw_query();
    let mut steps = Vec::new();
    while let Some(row) = rows.next().unwrap() {
        steps.push(row.get::<_, String>("detail").unwrap());
    }
    steps
}

#[test]
fn no_page_and_no_act_scans_events_stream_or_acts() {
    let connection = Connection::open_in_memory().unwrap();
    for sql in MIGRATIONS {
        connection.execute_batch(sql).unwrap();
    }
    let root = Path::new(env!("CARGO_MANIFEST_DIR"));
    let mut sources = Vec::new();
    files(root, &mut sources);
    let mut looked_at = 0;
    for path in sources {
        let name = path.strip_prefix(root).unwrap().display().to_string();
        for statement in statements(&std::fs::read_to_string(&path).unwrap()) {
            looked_at += 1;
            for step in plan(&connection, &statement) {
                let scans = ["events", "stream", "acts", "sessions", "attempts"]
                    .into_iter()
                    .any(|table| step.starts_with(&format!("SCAN {table}")) && !step.contains("LIMIT"));
                let the_end_only = statement.contains("ORDER BY sequence DESC LIMIT 1");
                assert!(!scans || the_end_only || WHOLE.contains(&name.as_str()), "{name}: {step}: {statement}");
            }
        }
    }
    assert!(looked_at > 45, "only {looked_at} statements were found");
}

#[test]
fn lists_go_by_their_index_and_need_no_sorting() {
    let connection = Connection::open_in_memory().unwrap();
    connection.execute_batch(MIGRATIONS[0]).unwrap();
    for file in ["drives/board.rs", "drives/queue.rs"] {
        let source = std::fs::read_to_string(Path::new(env!("CARGO_MANIFEST_DIR")).join(file)).unwrap();
        for statement in statements(&source) {
            let steps = plan(&connection, &statement);
            assert!(steps.iter().all(|s| s.starts_with("SEARCH ")), "{file}: {steps:?}");
        }
    }
}

#[test]
fn a_planted_scan_is_seen() {
    let connection = Connection::open_in_memory().unwrap();
    connection.execute_batch(MIGRATIONS[0]).unwrap();
    let steps = plan(&connection, "SELECT count(*) FROM events WHERE hash = :hash");
    assert!(steps.iter().any(|s| s.starts_with("SCAN events")), "{steps:?}");
    assert_eq!(statements("x(\"SELECT a FROM b\", \"SELECTED\")"), ["SELECT a FROM b"]);
}
