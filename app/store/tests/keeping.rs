//! Backups, restoring, and a check that notices what was planted.

use super::stage::*;
use crate::photos::file_hash;
use crate::{BackupFault, BoardFilter, Report, Store, check_store};
use std::path::Path;

fn kept_store(folder: &Path) -> Store {
    let store = Store::open(folder, at(0)).unwrap();
    set_up(&store);
    signed(&store, 1, "P-1", 20);
    store.keep_photo_blocking([&[0xFF, 0xD8, 0xFF][..], &[5; 300]].concat(), at(21)).unwrap();
    store
}

/// What is wrong apart from the room on the disk of whoever runs the tests.
fn wrong(report: &Report) -> Vec<String> {
    report.findings.iter().filter(|f| !f.starts_with("room")).cloned().collect()
}

#[test]
fn a_backup_is_restored_and_goes_on() {
    let folder = tempfile::tempdir().unwrap();
    let [live, copy, again] = ["live", "copy", "again"].map(|n| folder.path().join(n));
    let store = kept_store(&live);
    store.open_session_blocking(ROWAN, crate::SessionKind::Enrolled, at(22)).unwrap();
    let receipt = store.backup_blocking(&copy, at(30)).unwrap();
    assert_eq!((receipt.photos, &receipt.stream), (1, &store.stream_head_blocking().unwrap()));
    assert!(receipt.bytes > 10_000);
    let names: Vec<_> = std::fs::read_dir(&copy).unwrap().map(|e| e.unwrap().file_name()).collect();
    assert_eq!(names.len(), 2, "one file and the photos: {names:?}");
    let board = store.board_blocking(SITE, BoardFilter::default()).unwrap();
    let before = store.drive_blocking(drive(1)).unwrap();
    drop(store);

    assert_eq!(wrong(&check_store(&copy, at(31)).unwrap()), Vec::<String>::new());
    assert_eq!(Store::restore(&copy, &again, at(40)).unwrap(), receipt.stream);
    let store = Store::open(&again, at(41)).unwrap();
    assert_eq!(store.drive_blocking(drive(1)).unwrap(), before);
    assert_eq!(store.board_blocking(SITE, BoardFilter::default()).unwrap(), board);
    create(&store, 2, "P-2", "Next pump");
    let count = |sql: &'static str| {
        store.read(move |desk| Ok(desk.connection.query_row(sql, [], |r| r.get::<_, i64>(0))?)).wait().unwrap()
    };
    assert_eq!(count("SELECT count(*) FROM openings WHERE kind = 'restored'"), 1);
    assert_eq!(count("SELECT count(*) FROM sessions"), 0, "open sessions stay behind");
    drop(store);
    assert_eq!(wrong(&check_store(&again, at(50)).unwrap()), Vec::<String>::new());
}

#[test]
fn a_backup_while_people_work_is_of_one_moment() {
    let folder = tempfile::tempdir().unwrap();
    let store = kept_store(&folder.path().join("live"));
    let copy = folder.path().join("copy");
    let backup = store.backup(&copy, at(30));
    for n in 2..40 {
        create(&store, n, &format!("P-{n}"), "Pump");
    }
    let receipt = backup.wait().unwrap();
    let report = check_store(&copy, at(31)).unwrap();
    assert_eq!(wrong(&report), Vec::<String>::new());
    assert!(store.stream_head_blocking().unwrap().sequence >= receipt.stream.sequence);
}

#[test]
fn nothing_is_written_over_and_no_copied_live_store_is_taken() {
    let folder = tempfile::tempdir().unwrap();
    let [live, copy, again] = ["live", "copy", "again"].map(|n| folder.path().join(n));
    let store = kept_store(&live);
    assert!(matches!(store.backup_blocking(&live, at(30)), Err(BackupFault::NotEmpty(_))));
    store.backup_blocking(&copy, at(30)).unwrap();
    assert!(matches!(store.backup_blocking(&copy, at(31)), Err(BackupFault::NotEmpty(_))));
    assert!(matches!(Store::restore(&copy, &live, at(32)), Err(BackupFault::NotEmpty(_))));
    // The live folder has its write-ahead log beside it.
    assert!(matches!(Store::restore(&live, &again, at(32)), Err(BackupFault::NoBackup(_))));
    assert!(matches!(Store::restore(&folder.path().join("nowhere"), &again, at(32)), Err(BackupFault::NoBackup(_))));
}

#[test]
fn a_backup_beside_a_running_store_is_whole_and_noted_there() {
    let folder = tempfile::tempdir().unwrap();
    let [live, copy] = ["live", "copy"].map(|n| folder.path().join(n));
    let store = kept_store(&live);
    let receipt = crate::backup_beside(&live, &copy, at(30)).unwrap();
    assert_eq!((receipt.photos, &receipt.stream), (1, &store.stream_head_blocking().unwrap()));
    assert_eq!(wrong(&check_store(&copy, at(31)).unwrap()), Vec::<String>::new());
    create(&store, 2, "P-2", "The running store goes on");
    let report = check_store(&live, at(31)).unwrap();
    assert_eq!(wrong(&report), Vec::<String>::new());
    assert!(report.lines.iter().any(|l| l.part == "backup" && l.found.contains("2026")), "{}", report.to_text());
    assert!(matches!(crate::backup_beside(&live, &copy, at(32)), Err(BackupFault::NotEmpty(_))));
    assert!(crate::backup_beside(&folder.path().join("nowhere"), &folder.path().join("c"), at(32)).is_err());
}

#[test]
fn a_backup_with_a_changed_photo_is_not_restored() {
    let folder = tempfile::tempdir().unwrap();
    let [live, copy, again] = ["live", "copy", "again"].map(|n| folder.path().join(n));
    kept_store(&live).backup_blocking(&copy, at(30)).unwrap();
    let photo = std::fs::read_dir(copy.join("photos")).unwrap().next().unwrap().unwrap().path();
    std::fs::write(photo, b"other").unwrap();
    assert!(matches!(Store::restore(&copy, &again, at(40)), Err(BackupFault::Unsound(_))));
    assert_eq!(std::fs::read_dir(&again).unwrap().count(), 0, "half a restore is none");
}

#[test]
fn the_check_says_all_is_well_beside_a_running_store_and_after_it() {
    let folder = tempfile::tempdir().unwrap();
    let store = kept_store(folder.path());
    let report = check_store(folder.path(), at(30)).unwrap();
    assert_eq!(wrong(&report), Vec::<String>::new(), "{}", report.to_text());
    assert!(report.lines.iter().any(|l| l.part == "journal" && l.found.contains("events")));
    drop(store);
    let before = listing(folder.path());
    let report = check_store(folder.path(), at(30)).unwrap();
    assert_eq!(wrong(&report), Vec::<String>::new(), "{}", report.to_text());
    assert_eq!(listing(folder.path()), before, "looking leaves nothing behind");
    assert!(report.to_json().contains("\"lines\""));
    assert!(check_store(&folder.path().join("photos"), at(30)).is_err());
}

fn listing(folder: &Path) -> Vec<(String, Vec<u8>)> {
    let mut found: Vec<_> = std::fs::read_dir(folder)
        .unwrap()
        .map(|e| e.unwrap().path())
        .filter(|p| p.is_file())
        .map(|p| (p.display().to_string(), std::fs::read(&p).unwrap()))
        .collect();
    found.sort();
    found
}

/// Each planted fault, by hand past every guard, with the part of the report that must notice it.
#[test]
fn what_is_planted_is_noticed() {
    const UNGUARDED: &str = "DROP TRIGGER events_never_changed; DROP TRIGGER events_never_removed;
        DROP TRIGGER stream_never_changed; DROP TRIGGER stream_never_removed; PRAGMA foreign_keys = OFF;";
    for (sql, part) in [
        ("UPDATE events SET bytes = replace(bytes, 'Feed pump', 'Fead pump')", "journal"),
        ("UPDATE events SET hash = replace(hash, '0', '1') WHERE sequence = 2", "journal"),
        ("UPDATE events SET event = event || 'x' WHERE sequence = 2", "journal"),
        ("DELETE FROM events WHERE chain LIKE 'drive:%' AND sequence = 5", "journal"),
        ("DELETE FROM stream WHERE sequence = 3", "journal"),
        ("UPDATE stream SET previous = stream_hash WHERE sequence = 3", "journal"),
        ("UPDATE drives SET open_findings = 9", "lists"),
        ("UPDATE photos SET bytes = bytes + 1", "photos"),
        ("DELETE FROM photos", "photos"),
        ("DELETE FROM acts WHERE id = (SELECT act FROM events LIMIT 1)", "file"),
    ] {
        let folder = tempfile::tempdir().unwrap();
        drop(kept_store(folder.path()));
        let other = rusqlite::Connection::open(folder.path().join("store.sqlite")).unwrap();
        other.execute_batch(UNGUARDED).unwrap();
        other.execute_batch("DROP TRIGGER acts_never_removed").unwrap();
        other.execute_batch(sql).unwrap();
        assert!(other.changes() > 0, "{sql} planted nothing");
        drop(other);
        let report = check_store(folder.path(), at(30)).unwrap();
        assert!(report.findings.iter().any(|f| f.starts_with(part)), "{sql}: {}", report.to_text());
        assert!(!report.ok);
    }
}

/// Somebody with the file, a copy of the program and time: an entry changed, every hash after it made anew, the
/// signature's own head too. Chains, stream and lists agree with each other; the digest does not agree with the record.
#[test]
fn a_record_rewritten_beneath_its_signature_is_noticed_and_named() {
    let folder = tempfile::tempdir().unwrap();
    drop(kept_store(folder.path()));
    let rewritten = |from: &str, to: &str| {
        let other = rusqlite::Connection::open(folder.path().join("store.sqlite")).unwrap();
        other.execute_batch("PRAGMA foreign_keys = OFF").unwrap();
        rewrite_chain(&other, &format!("drive:{}", drive(1)), from, to);
        rewrite_stream(&other);
        drop(other);
        check_store(folder.path(), at(30)).unwrap()
    };
    let report = rewritten("", "");
    assert_eq!(wrong(&report), Vec::<String>::new(), "hashes made anew over the same events change nothing");
    assert!(report.lines.iter().any(|l| l.part == "signatures" && l.found.starts_with("1 signature")));
    let report = rewritten(r#""text":"yes""#, r#""text":"off""#);
    let found = wrong(&report);
    assert_eq!(found.len(), 1, "{found:?}");
    assert!(found[0].starts_with("signatures: drive P-1 (") && found[0].contains("revision 1"), "{found:?}");
    assert!(found[0].contains("the signature of Rowan Vale binds another content"), "{found:?}");
}

/// The site as the signature froze it, against the site's own chain.
#[test]
fn a_site_rewritten_beneath_a_signature_is_noticed_too() {
    let folder = tempfile::tempdir().unwrap();
    drop(kept_store(folder.path()));
    let other = rusqlite::Connection::open(folder.path().join("store.sqlite")).unwrap();
    other.execute_batch("PRAGMA foreign_keys = OFF").unwrap();
    rewrite_chain(&other, &format!("site:{SITE}"), "pumping", "dumping");
    rewrite_stream(&other);
    other.execute("UPDATE sites SET name = replace(name, 'pumping', 'dumping')", []).unwrap();
    drop(other);
    let found = wrong(&check_store(folder.path(), at(30)).unwrap());
    assert_eq!(found.len(), 1, "{found:?}");
    assert!(found[0].contains("froze another site than the one that stood then"), "{found:?}");
}

/// Replaces words in the first event of a chain that has them, and makes every hash and every signature's head anew.
fn rewrite_chain(other: &rusqlite::Connection, chain: &str, from: &str, to: &str) {
    other
        .execute_batch("DROP TRIGGER IF EXISTS events_never_changed; DROP TRIGGER IF EXISTS stream_never_changed")
        .unwrap();
    let rows: Vec<(i64, String, String)> = other
        .prepare("SELECT sequence, hash, bytes FROM events WHERE chain = ?1 ORDER BY sequence")
        .unwrap()
        .query_map([chain], |r| Ok((r.get(0)?, r.get(1)?, r.get(2)?)))
        .unwrap()
        .map(Result::unwrap)
        .collect();
    let (mut previous, mut renamed, mut done) = (String::new(), Vec::new(), from.is_empty());
    for (sequence, hash, bytes) in rows {
        let mut bytes: String = renamed.iter().fold(bytes, |b, (old, new): &(String, String)| b.replace(old, new));
        if !done && bytes.contains(from) {
            (bytes, done) = (bytes.replacen(from, to, 1), true);
        }
        let fresh = file_hash(format!("{previous}\n{bytes}").as_bytes());
        let row = rusqlite::params![chain, sequence, previous, fresh, bytes];
        other
            .execute("UPDATE events SET previous = ?3, hash = ?4, bytes = ?5 WHERE chain = ?1 AND sequence = ?2", row)
            .unwrap();
        renamed.push((hash, fresh.clone()));
        previous = fresh;
    }
    assert!(done, "{from} is in no event of {chain}");
}

fn rewrite_stream(other: &rusqlite::Connection) {
    let rows: Vec<(i64, String)> = other
        .prepare(
            "SELECT stream.sequence, events.hash FROM stream
             JOIN events ON events.chain = stream.chain AND events.sequence = chain_sequence ORDER BY stream.sequence",
        )
        .unwrap()
        .query_map([], |r| Ok((r.get(0)?, r.get(1)?)))
        .unwrap()
        .map(Result::unwrap)
        .collect();
    let mut previous = String::new();
    for (sequence, hash) in rows {
        let fresh = file_hash(format!("{previous}\n{hash}").as_bytes());
        let row = rusqlite::params![sequence, hash, previous, fresh];
        other.execute("UPDATE stream SET hash = ?2, previous = ?3, stream_hash = ?4 WHERE sequence = ?1", row).unwrap();
        previous = fresh;
    }
}

#[test]
fn open_modes_and_a_clock_that_went_back_are_noticed() {
    use std::os::unix::fs::PermissionsExt;
    let folder = tempfile::tempdir().unwrap();
    drop(kept_store(folder.path()));
    std::fs::set_permissions(folder.path().join("store.sqlite"), std::fs::Permissions::from_mode(0o644)).unwrap();
    let report = check_store(folder.path(), at(-500)).unwrap();
    assert!(report.findings.iter().any(|f| f.starts_with("modes")), "{}", report.to_text());
    assert!(report.findings.iter().any(|f| f.starts_with("time")), "{}", report.to_text());
}
