//! Durable saves of one entry against bare SQLite commits of the same bytes, one at a time and sixty-four waiting.

use super::alternate::{Medians, line};
use commissioning::journal::{Act, Deed};
use commissioning::{ActId, DriveId, PersonId, Timestamp};
use std::path::Path;
use std::time::{Duration, Instant};
use store::{Proof, Store};
use uuid::Uuid;

const SAVES: u128 = 200;
const CLIENTS: u128 = 64;

pub fn run() {
    // On the disk, since what is measured is the wait for it.
    let folder = tempfile::tempdir_in(env!("CARGO_TARGET_TMPDIR")).expect("a folder on the disk");
    let now = Timestamp::parse("2026-11-30T16:00:00Z").expect("a moment");
    let store = Store::open(&folder.path().join("store"), now).expect("a store");
    let demo = seed_demo::load(&store, now).expect("the demo loads");
    let installation = store.installation().wait().expect("readable");
    let person =
        installation.people.values().find(|p| p.is(commissioning::people::Role::Engineer)).expect("an engineer").id;
    let site = store.site_by_tag(&demo.site_tag).wait().expect("readable").expect("the site");
    let open = |id: &&DriveId| {
        let drive = store.drive(**id).wait().expect("readable").expect("the drive");
        drive.record.as_ref().is_some_and(|r| matches!(r.status, commissioning::record::Status::InProgress { .. }))
    };
    let drive = *site.drives.values().find(open).expect("a drive in progress");
    let bytes = serde_json::to_string(&act(drive, 1)).expect("writes");

    let mut alone = Medians { ours: Duration::ZERO, baseline: Duration::ZERO };
    let mut waiting = Medians { ours: Duration::ZERO, baseline: Duration::ZERO };
    // In turn, so that a noisy disk disturbs all alike.
    for round in 0..4 {
        alone.baseline += bare(folder.path(), &bytes);
        alone.ours += one_at_a_time(&store, person, drive, now, round);
        waiting.baseline += bare(folder.path(), &bytes);
        waiting.ours += many_waiting(&store, person, drive, now, round);
    }
    line("200 saves, one at a time (baseline: 200 bare commits)", &alone, "≤ 2");
    line("200 saves, 64 waiting (baseline: 200 bare commits)", &waiting, "≤ 0.33");
}

fn act(drive: DriveId, number: u128) -> Act {
    // Numbered ids: the store only asks that they differ.
    let id = ActId(Uuid::from_u128(0x7000_8000_0000_0000_0000 + number));
    Act { id, tablet: None, deed: Deed::Remark { drive, step: String::new(), text: format!("remark {number}") } }
}

fn one_at_a_time(store: &Store, person: PersonId, drive: DriveId, now: Timestamp, round: u128) -> Duration {
    let begun = Instant::now();
    for n in 0..SAVES {
        store.perform(Some(person), act(drive, round * 1_000_000 + n), Proof::none(), now).wait().expect("saved");
    }
    begun.elapsed()
}

fn many_waiting(store: &Store, person: PersonId, drive: DriveId, now: Timestamp, round: u128) -> Duration {
    let begun = Instant::now();
    std::thread::scope(|scope| {
        for client in 0..CLIENTS {
            scope.spawn(move || {
                for n in (client..SAVES).step_by(CLIENTS as usize) {
                    let act = act(drive, round * 1_000_000 + 500_000 + n);
                    store.perform(Some(person), act, Proof::none(), now).wait().expect("saved");
                }
            });
        }
    });
    begun.elapsed()
}

/// The same bytes into one table, a durable commit each, with nothing of ours in between.
fn bare(folder: &Path, bytes: &str) -> Duration {
    let connection = rusqlite::Connection::open(folder.join("bare.sqlite")).expect("opens");
    connection
        .execute_batch(
            "PRAGMA journal_mode=WAL; PRAGMA synchronous=FULL;
             CREATE TABLE IF NOT EXISTS bare (id INTEGER PRIMARY KEY, bytes TEXT) STRICT;",
        )
        .expect("a table");
    let begun = Instant::now();
    for _ in 0..SAVES {
        connection.execute("INSERT INTO bare (bytes) VALUES (?1)", [bytes]).expect("inserted");
    }
    begun.elapsed()
}
