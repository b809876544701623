//! The stage of every test: a store with three people, a short procedure, a clock set by hand.

use crate::{PerformFault, Proof, Receipt, Store};
use commissioning::journal::{Act, Change, Deed};
use commissioning::people::Role;
use commissioning::procedure::Procedure;
use commissioning::record::canonical::RecordFile;
use commissioning::record::{EntryPlace, Meaning};
use commissioning::{ActId, DriveId, EventId, PersonId, SiteId, Timestamp};
use std::sync::atomic::{AtomicU64, Ordering};
use uuid::Uuid;

/// Rowan, startup engineer.
pub const ROWAN: PersonId = PersonId(Uuid::from_u128(0xA1));
/// Maren, supervisor.
pub const MAREN: PersonId = PersonId(Uuid::from_u128(0xA2));
/// Ida, administrator.
pub const IDA: PersonId = PersonId(Uuid::from_u128(0xA3));
/// Tove, engineer and supervisor at once.
pub const TOVE: PersonId = PersonId(Uuid::from_u128(0xA4));
/// The site Larch Ferry.
pub const SITE: SiteId = SiteId(Uuid::from_u128(0xB1));

static NEXT: AtomicU64 = AtomicU64::new(1);

/// A fresh number for ids.
pub fn fresh() -> Uuid {
    Uuid::from_u128(0xF000_0000 + u128::from(NEXT.fetch_add(1, Ordering::Relaxed)))
}

/// Minutes after a fixed moment.
pub fn at(minutes: i64) -> Timestamp {
    let start = Timestamp::parse("2026-03-02T08:00:00.000Z").unwrap();
    Timestamp::new(start.moment() + time::Duration::minutes(minutes))
}

/// An act with a fresh id.
pub fn act(deed: Deed) -> Act {
    Act { id: ActId(fresh()), tablet: None, deed }
}

/// The n-th drive of a test.
pub fn drive(n: u128) -> DriveId {
    DriveId(Uuid::from_u128(0xD000 + n))
}

/// Two steps: a confirmation with an optional note and photo, and a confirmation.
pub fn short_procedure(version: u32) -> Procedure {
    let confirmation = |key: &str| serde_json::json!({ "key": key, "label": key, "kind": "confirmation" });
    serde_json::from_value(serde_json::json!({
        "version": version,
        "name": "Short",
        "phases": [{
            "id": "look", "title": "Look at the drive", "short": "Look", "purpose": "To know what is there.",
            "step": [
                { "id": "plate", "title": "Read the plate", "instruction": "Read the plate.", "item": [
                    confirmation("plate-read"),
                    { "key": "plate-note", "label": "note", "kind": "note", "optional": true },
                    { "key": "plate-photo", "label": "photo", "kind": "photo", "optional": true },
                ]},
                { "id": "door", "title": "Close the door", "instruction": "Close the door.",
                  "item": [confirmation("door-closed")] },
            ],
        }],
    }))
    .unwrap()
}

/// Does a deed as somebody; it must work.
pub fn done(store: &Store, who: PersonId, deed: Deed, now: Timestamp) -> Receipt {
    tried(store, who, deed, now).unwrap()
}

/// Does a deed as somebody, with the password.
pub fn tried(store: &Store, who: PersonId, deed: Deed, now: Timestamp) -> Result<Receipt, PerformFault> {
    store.perform_blocking(Some(who), act(deed), Proof::password(), now)
}

/// Sets a store up: the firm, four people, the procedure, one site.
pub fn set_up(store: &Store) {
    let deed = Deed::SetUp {
        firm: "Alder Drives".to_owned(),
        person: IDA,
        login: "ida".to_owned(),
        name: "Ida Berg".to_owned(),
        roles: vec![Role::Administrator],
    };
    store.perform_blocking(None, act(deed), Proof::none(), at(0)).unwrap();
    for (person, login, name, roles) in [
        (ROWAN, "rowan", "Rowan Vale", vec![Role::Engineer]),
        (MAREN, "maren", "Maren Holt", vec![Role::Supervisor]),
        (TOVE, "tove", "Tove Lind", vec![Role::Engineer, Role::Supervisor]),
    ] {
        done(store, IDA, Deed::AddPerson { person, login: login.to_owned(), name: name.to_owned(), roles }, at(1));
    }
    let load = Deed::LoadProcedure { procedure: Box::new(short_procedure(1)) };
    store.perform_blocking(None, act(load), Proof::none(), at(1)).unwrap();
    let (tag, name) = ("larch-ferry".to_owned(), "Larch Ferry pumping station".to_owned());
    done(store, ROWAN, Deed::CreateSite { site: SITE, tag, name }, at(2));
}

/// A store that is set up, in memory.
pub fn stage() -> Store {
    let store = Store::in_memory(at(0)).unwrap();
    set_up(&store);
    store
}

/// Creates a drive with this tag.
pub fn create(store: &Store, n: u128, tag: &str, name: &str) {
    let deed = Deed::CreateDrive { site: SITE, drive: drive(n), tag: tag.to_owned(), name: name.to_owned() };
    done(store, ROWAN, deed, at(3));
}

/// Records one item at a step, on top of what stands there.
pub fn entry(store: &Store, n: u128, step: &str, item: &str, text: &str) -> Deed {
    let place = EntryPlace::new(item);
    let state = store.drive_blocking(drive(n)).unwrap().unwrap();
    let seen: Vec<EventId> =
        state.record.as_ref().and_then(|r| r.entries.get(&place)).map(|slot| slot.seen()).unwrap_or_default();
    let change = Change { place, text: text.to_owned(), unit: String::new(), instrument: None, photo: None, seen };
    Deed::RecordEntries { drive: drive(n), step: step.to_owned(), changes: vec![change], reason: "misread".to_owned() }
}

/// Begins a drive's record and settles both steps, as Rowan.
pub fn work_through(store: &Store, n: u128) {
    done(store, ROWAN, Deed::BeginRecord { drive: drive(n) }, at(4));
    done(store, ROWAN, entry(store, n, "plate", "plate-read", "yes"), at(5));
    done(store, ROWAN, entry(store, n, "door", "door-closed", "yes"), at(6));
}

/// A signing of what the record is now.
pub fn sign(store: &Store, n: u128, meaning: Meaning) -> Deed {
    let view = store.drive_view_by_id_blocking(drive(n)).unwrap().unwrap();
    Deed::Sign { drive: drive(n), meaning, digest: RecordFile::shown(&view.view()).digest() }
}

/// A drive whose record Rowan has signed.
pub fn signed(store: &Store, n: u128, tag: &str, minute: i64) {
    create(store, n, tag, "Feed pump");
    work_through(store, n);
    done(store, ROWAN, sign(store, n, Meaning::Performed), at(minute));
}
