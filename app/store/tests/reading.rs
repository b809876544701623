//! A store that can only be read: opened and labelled so, everything shown, nothing recorded, the folder as it was.

use super::stage::*;
use crate::{BoardFilter, PasswordFault, PerformFault, PhotoFault, SessionKind, SignIn, SiteRow, Store, check_store};
use commissioning::journal::Deed;
use std::os::unix::fs::PermissionsExt;
use std::os::unix::process::CommandExt;
use std::path::{Path, PathBuf};
use std::process::Command;

/// Names the folder to a process that may not write there.
const FOLDER: &str = "ASLEFT_ONLY_READ";
const PASSWORD: &str = "larch over the ferry";
/// Who has no rights on most systems, where the tests run as one who has all.
const NOBODY: u32 = 65_534;

fn everything(folder: &Path) -> Vec<(PathBuf, Vec<u8>)> {
    let mut found = Vec::new();
    for entry in std::fs::read_dir(folder).unwrap() {
        let path = entry.unwrap().path();
        if path.is_dir() {
            found.extend(everything(&path))
        } else {
            found.push((path.clone(), std::fs::read(path).unwrap()))
        }
    }
    found.sort();
    found
}

/// Gives all of it to one owner who may read but not write.
fn close_to_writing(folder: &Path, owner: Option<u32>) {
    for entry in std::fs::read_dir(folder).unwrap() {
        let path = entry.unwrap().path();
        if path.is_dir() { close_to_writing(&path, owner) } else { settle(&path, owner, 0o400) }
    }
    settle(folder, owner, 0o500);
}

fn settle(path: &Path, owner: Option<u32>, mode: u32) {
    std::os::unix::fs::chown(path, owner, owner).unwrap();
    std::fs::set_permissions(path, std::fs::Permissions::from_mode(mode)).unwrap();
}

/// What somebody finds who may only read.
fn looked_at(folder: &Path) {
    let store = Store::open(folder, at(40)).unwrap();
    let why = store.only_read().expect("labelled as only to be read");
    assert!(why.contains("denied"), "{why}");
    assert!(store.is_read_only());
    assert_eq!(store.folder(), folder);
    let state = store.drive_blocking(drive(1)).unwrap().unwrap();
    assert!(state.record.as_ref().is_some_and(|r| r.signatures.len() == 1));
    let sites: Vec<SiteRow> = store.sites_blocking().unwrap();
    assert_eq!((sites.len(), store.board_blocking(SITE, BoardFilter::default()).unwrap().total), (1, 1));
    let picture = std::fs::read_dir(folder.join("photos")).unwrap().next().unwrap().unwrap().file_name();
    assert!(store.photo_blocking(picture.to_str().unwrap()).unwrap().is_some());
    // Without signing in nobody could read: a session and a failed attempt are kept, for as long as this store is open.
    assert!(matches!(store.sign_in_blocking("rowan", "10.0.0.1", "wrong", at(41)).unwrap(), SignIn::Wrong));
    assert!(matches!(store.sign_in_blocking("rowan", "10.0.0.1", PASSWORD, at(42)).unwrap(), SignIn::Right(_)));
    let token = store.open_session_blocking(ROWAN, SessionKind::Strange, at(42)).unwrap();
    assert!(store.session_blocking(&token, at(43)).unwrap().is_some());

    let remark = Deed::Remark { drive: drive(1), step: String::new(), text: "Seen".to_owned() };
    let refused = tried(&store, ROWAN, remark, at(44)).unwrap_err();
    assert_eq!(refused, PerformFault::ReadOnly);
    assert!(refused.to_string().contains("nothing can be recorded at present"));
    let photo = store.keep_photo_blocking(vec![0xFF, 0xD8, 0xFF, 9], at(44));
    assert!(matches!(&photo, Err(PhotoFault::Storage(words)) if words.contains("nothing can be recorded")));
    assert!(matches!(store.set_password_blocking(ROWAN, "another long one", at(44)), Err(PasswordFault::Storage(_))));
    assert_eq!(store.invite_blocking(ROWAN, None, at(44)), Err(PerformFault::ReadOnly));
    assert_eq!(store.unlock_signing_blocking(ROWAN), Err(PerformFault::ReadOnly));
    assert_eq!(store.setup_code_blocking(), Err(PerformFault::ReadOnly));

    let beside = tempfile::tempdir().unwrap();
    let copy = beside.path().join("copy");
    assert_eq!(store.backup_blocking(&copy, at(45)).unwrap().stream, store.stream_head_blocking().unwrap());
    let found = check_store(&copy, at(46)).unwrap().findings;
    assert_eq!(found.iter().filter(|f| !f.starts_with("room")).count(), 0, "{found:?}");
    // Two may read at one time.
    Store::open(folder, at(47)).unwrap();
}

#[test]
fn a_store_that_cannot_be_written_is_opened_to_be_read() {
    if let Some(folder) = std::env::var_os(FOLDER) {
        return looked_at(Path::new(&folder));
    }
    let outer = tempfile::tempdir().unwrap();
    let [whole, crashed] = ["whole", "crashed"].map(|n| outer.path().join(n));
    let store = Store::open(&whole, at(0)).unwrap();
    set_up(&store);
    signed(&store, 1, "P-1", 20);
    store.set_password_blocking(ROWAN, PASSWORD, at(20)).unwrap();
    store.keep_photo_blocking([&[0xFF, 0xD8, 0xFF][..], &[5; 300]].concat(), at(21)).unwrap();
    assert_eq!(store.only_read(), None);
    // As a kill leaves it: what was recorded is in the log alone.
    std::fs::create_dir_all(crashed.join("photos")).unwrap();
    for name in ["store.sqlite", "store.sqlite-wal", "lock"] {
        std::fs::copy(whole.join(name), crashed.join(name)).unwrap();
    }
    for (path, bytes) in everything(&whole.join("photos")) {
        std::fs::write(crashed.join("photos").join(path.file_name().unwrap()), bytes).unwrap();
    }
    drop(store);
    assert!(std::fs::metadata(crashed.join("store.sqlite-wal")).unwrap().len() > 100_000);

    let root = std::fs::metadata("/proc/self").is_ok_and(|m| std::os::unix::fs::MetadataExt::uid(&m) == 0);
    std::fs::set_permissions(outer.path(), std::fs::Permissions::from_mode(0o711)).unwrap();
    for folder in [&whole, &crashed] {
        let before = everything(folder);
        close_to_writing(folder, root.then_some(NOBODY));
        if root {
            looked_at_by_nobody(folder, outer.path());
        } else {
            looked_at(folder);
        }
        assert_eq!(everything(folder), before, "looking left the folder as it was");
    }
}

/// The same test, as somebody with no rights; the program is copied to where they can reach it.
fn looked_at_by_nobody(folder: &Path, reachable: &Path) {
    let program = reachable.join("program");
    if !program.exists() {
        std::fs::copy(std::env::current_exe().unwrap(), &program).unwrap();
        std::fs::set_permissions(&program, std::fs::Permissions::from_mode(0o755)).unwrap();
    }
    let output = Command::new(&program)
        .args(["--exact", "tests::reading::a_store_that_cannot_be_written_is_opened_to_be_read", "--test-threads=1"])
        .env(FOLDER, folder)
        .current_dir("/")
        .gid(NOBODY)
        .uid(NOBODY)
        .output()
        .unwrap();
    let said = String::from_utf8_lossy(&output.stdout);
    assert!(output.status.success() && said.contains("1 passed"), "{said}{}", String::from_utf8_lossy(&output.stderr));
}

#[test]
fn a_store_in_use_is_not_read_past_its_lock() {
    let folder = tempfile::tempdir().unwrap();
    let store = Store::open(folder.path(), at(0)).unwrap();
    assert!(matches!(crate::opening::Ground::look_into_for_test(folder.path()), Err(crate::OpenFault::InUse(_))));
    drop(store);
    assert!(crate::opening::Ground::look_into_for_test(folder.path()).is_ok());
}
