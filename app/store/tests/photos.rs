//! Photos: by hash, never half, never an entry without its picture.

use super::stage::*;
use crate::{LARGEST_PHOTO, PerformFault, PhotoFault, Store};
use commissioning::journal::{Change, Deed};
use commissioning::record::{EntryPlace, Photo};

fn picture(fill: u8) -> Vec<u8> {
    let mut bytes = vec![0xFF, 0xD8, 0xFF, 0xE0];
    bytes.extend(std::iter::repeat_n(fill, 500));
    bytes
}

fn photo_entry(photo: Photo) -> Deed {
    let change = Change {
        place: EntryPlace::new("plate-photo"),
        text: "the plate".to_owned(),
        unit: String::new(),
        instrument: None,
        photo: Some(photo),
        seen: Vec::new(),
    };
    Deed::RecordEntries { drive: drive(1), step: "plate".to_owned(), changes: vec![change], reason: String::new() }
}

fn files(store: &Store) -> usize {
    std::fs::read_dir(store.folder().join("photos")).unwrap().count()
}

#[test]
fn a_photo_is_kept_once_under_its_hash() {
    let store = stage();
    let photo = store.keep_photo_blocking(picture(7), at(5)).unwrap();
    assert_eq!((photo.media.as_str(), photo.bytes), ("image/jpeg", 504));
    assert_eq!(store.keep_photo_blocking(picture(7), at(6)).unwrap(), photo);
    assert_eq!(files(&store), 1);
    assert_eq!(store.photo_blocking(&photo.hash).unwrap().unwrap(), (picture(7), "image/jpeg".to_owned()));
}

#[test]
fn what_is_too_large_or_no_picture_is_refused() {
    let store = stage();
    assert_eq!(store.keep_photo_blocking(b"<svg/>".to_vec(), at(5)), Err(PhotoFault::UnknownKind));
    let mut large = picture(1);
    large.resize(LARGEST_PHOTO + 1, 0);
    assert_eq!(store.keep_photo_blocking(large, at(5)), Err(PhotoFault::TooLarge));
    assert_eq!(files(&store), 0);
}

#[test]
fn only_names_that_the_store_gave_are_looked_for() {
    let store = stage();
    for name in
        ["../store.sqlite", "..%2fstore.sqlite", "/etc/hostname", "", ".", "..\\lock", "photos/../lock", "%00", "a\0b"]
    {
        assert_eq!(store.photo_blocking(name).unwrap(), None, "{name:?}");
    }
}

#[test]
fn an_entry_without_its_picture_is_refused() {
    let store = stage();
    create(&store, 1, "P-1", "Pump");
    done(&store, ROWAN, Deed::BeginRecord { drive: drive(1) }, at(4));
    let absent = Photo { hash: "0".repeat(64), media: "image/jpeg".to_owned(), bytes: 504, caption: String::new() };
    assert!(matches!(tried(&store, ROWAN, photo_entry(absent), at(5)), Err(PerformFault::Refused(_))));
    let photo = store.keep_photo_blocking(picture(9), at(6)).unwrap();
    done(&store, ROWAN, photo_entry(photo.clone()), at(7));
    let unwell =
        || crate::check_store(store.folder(), at(8)).unwrap().findings.iter().any(|f| f.contains("is not kept"));
    assert!(!unwell());
    let other = rusqlite::Connection::open(store.folder().join("store.sqlite")).unwrap();
    other.execute("DELETE FROM photos WHERE hash = ?1", [photo.hash]).unwrap();
    assert!(unwell());
}

#[test]
fn after_a_crash_half_files_are_gone_and_whole_ones_have_their_row() {
    let folder = tempfile::tempdir().unwrap();
    let store = Store::open(folder.path(), at(0)).unwrap();
    set_up(&store);
    let photos = folder.path().join("photos");
    drop(store);
    let whole = crate::photos::file_hash(&picture(3));
    std::fs::write(photos.join(&whole), picture(3)).unwrap();
    std::fs::write(photos.join("0011.part"), b"half").unwrap();
    std::fs::write(photos.join("f".repeat(64)), picture(4)).unwrap();
    let store = Store::open(folder.path(), at(1)).unwrap();
    assert!(!photos.join("0011.part").exists());
    assert_eq!(store.photo_blocking(&whole).unwrap().unwrap().0, picture(3));
    assert_eq!(store.photo_blocking(&"f".repeat(64)).unwrap(), None, "it is not what its name says");
    let report = crate::check_store(folder.path(), at(2)).unwrap();
    assert!(report.findings.iter().any(|f| f.contains("belongs to no photo")), "{}", report.to_text());
}
