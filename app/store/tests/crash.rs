//! Faults below an act: a full disk, a panic, a store closed and opened again.

use super::stage::*;
use crate::fault::Fault;
use crate::{PerformFault, Proof, Store};
use commissioning::journal::Deed;

#[test]
fn what_was_acknowledged_is_there_after_opening_again() {
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("store");
    let store = Store::open(&path, at(0)).unwrap();
    set_up(&store);
    signed(&store, 1, "P-1", 20);
    let before = (store.drive_blocking(drive(1)).unwrap().unwrap(), store.stream_head_blocking().unwrap());
    let board = store.board_blocking(SITE, crate::BoardFilter::default()).unwrap();
    drop(store);

    let store = Store::open(&path, at(60)).unwrap();
    assert_eq!(store.drive_blocking(drive(1)).unwrap().unwrap(), before.0, "folded anew, it is the same");
    assert_eq!(store.stream_head_blocking().unwrap(), before.1);
    assert_eq!(store.board_blocking(SITE, crate::BoardFilter::default()).unwrap(), board);
    assert_eq!(store.compare_projections_blocking().unwrap(), Vec::<String>::new());
}

#[test]
fn a_full_disk_loses_the_batch_and_nothing_else() {
    let store = stage();
    create(&store, 1, "P-1", "Feed pump");
    // From here on the writing connection may not add a page: SQLite answers as on a full disk.
    let full = store.writing().give(|desk| {
        let pages: i64 = desk.connection.pragma_query_value(None, "page_count", |row| row.get(0))?;
        desk.connection.pragma_update(None, "max_page_count", pages)?;
        Ok(Ok::<_, PerformFault>(()))
    });
    full.wait().unwrap();

    let long = |n: usize| {
        act(Deed::CreateDrive {
            site: SITE,
            drive: drive(1000 + n as u128),
            tag: format!("LONG-{n}"),
            name: "n".repeat(80),
        })
    };
    let mut unknown = None;
    for n in 0..200 {
        let sent = long(n);
        match store.perform_blocking(Some(ROWAN), sent.clone(), Proof::none(), at(5)) {
            Ok(_) => {}
            Err(PerformFault::Unknown) => {
                unknown = Some(sent);
                break;
            }
            Err(other) => panic!("{other:?}"),
        }
    }
    let unknown = unknown.expect("the disk was full at some time");
    assert!(store.is_read_only());
    // Reading goes on, and the act is not there.
    assert!(store.drive_blocking(drive(1)).unwrap().is_some());
    assert_eq!(store.outcome_blocking(unknown.id).unwrap(), None);

    // The next sending opens the file anew, where there is room again; it is recorded once.
    let receipt = store.perform_blocking(Some(ROWAN), unknown.clone(), Proof::none(), at(6)).unwrap();
    assert!(!receipt.repeated);
    assert!(store.perform_blocking(Some(ROWAN), unknown, Proof::none(), at(7)).unwrap().repeated);
    assert!(!store.is_read_only());
    assert_eq!(store.compare_projections_blocking().unwrap(), Vec::<String>::new());
}

/// An act handed in together with a piece of writing that brings the whole batch down; what both were told.
fn together_with(
    store: &Store,
    fault: impl FnOnce(&crate::work::Desk) -> Result<(), Fault> + Send + 'static,
) -> (commissioning::ActId, Result<crate::Receipt, PerformFault>) {
    // The writer is held up in a batch of its own until both are in the queue.
    let (started, begun) = std::sync::mpsc::channel();
    let (release, held) = std::sync::mpsc::channel::<()>();
    let pause = store.writing().give::<(), PerformFault, _>(move |_| {
        started.send(()).unwrap();
        held.recv().unwrap();
        Ok(Ok(()))
    });
    begun.recv().unwrap();
    let sent = act(Deed::BeginRecord { drive: drive(1) });
    let act = store.perform(Some(ROWAN), sent.clone(), Proof::none(), at(5));
    let broken = store.writing().give::<(), PerformFault, _>(move |desk| Ok(Ok(fault(desk)?)));
    release.send(()).unwrap();
    pause.wait().unwrap();
    assert_eq!(broken.wait(), Err(PerformFault::Unknown));
    (sent.id, act.wait())
}

#[test]
fn an_act_whose_commit_fails_is_not_called_recorded() {
    let store = stage();
    create(&store, 1, "P-1", "Feed pump");
    // A row whose site is not there, looked at only at the commit: the act before it in the batch went well.
    let (id, answer) = together_with(&store, |desk| {
        desk.connection.execute_batch(
            "PRAGMA defer_foreign_keys = ON;
             INSERT INTO contributors (drive, person) VALUES ('nowhere', 'nobody')",
        )?;
        Ok(())
    });
    assert_eq!(answer, Err(PerformFault::Unknown));
    assert_eq!(store.outcome_blocking(id).unwrap(), None);
    done(&store, ROWAN, Deed::BeginRecord { drive: drive(1) }, at(6));
}

#[test]
fn a_fault_of_the_disk_undoes_the_acts_that_waited_with_it() {
    let store = stage();
    create(&store, 1, "P-1", "Feed pump");
    let (id, answer) = together_with(&store, |_| Err(Fault::Disk("planted".to_owned())));
    assert_eq!(answer, Err(PerformFault::Unknown));
    assert_eq!(store.outcome_blocking(id).unwrap(), None);
    done(&store, ROWAN, Deed::BeginRecord { drive: drive(1) }, at(6));
    assert_eq!(store.compare_projections_blocking().unwrap(), Vec::<String>::new());
}

#[test]
fn a_panic_in_one_act_harms_no_other() {
    let store = stage();
    let stop = store.writing().give::<(), PerformFault, _>(|_| {
        std::thread::sleep(std::time::Duration::from_millis(50));
        Ok(Ok(()))
    });
    // These wait together behind the first.
    let before = store.perform(
        Some(ROWAN),
        act(Deed::CreateDrive { site: SITE, drive: drive(1), tag: "P-1".to_owned(), name: "Pump".to_owned() }),
        Proof::none(),
        at(3),
    );
    let broken = store.writing().give::<(), PerformFault, _>(|desk| {
        desk.connection
            .execute("INSERT INTO openings (number, at, kind, words) VALUES (99, 'x', 'backup', 'half')", [])?;
        panic!("planted");
    });
    let undone = store.writing().give::<(), PerformFault, _>(|desk| {
        desk.connection
            .execute("INSERT INTO openings (number, at, kind, words) VALUES (98, 'x', 'backup', 'half')", [])?;
        Err(Fault::Broken("planted".to_owned()))
    });
    let after = store.perform(Some(ROWAN), act(Deed::BeginRecord { drive: drive(1) }), Proof::none(), at(4));
    stop.wait().unwrap();
    before.wait().unwrap();
    assert!(matches!(broken.wait(), Err(PerformFault::Broken(_))));
    assert!(matches!(undone.wait(), Err(PerformFault::Broken(_))));
    after.wait().unwrap();
    let left: i64 = store
        .read(|desk| {
            Ok(desk.connection.query_row("SELECT count(*) FROM openings WHERE number > 90", [], |r| r.get(0))?)
        })
        .wait()
        .unwrap();
    assert_eq!(left, 0, "what the broken acts wrote is undone");
}

#[test]
fn a_panic_in_a_read_ends_only_that_read() {
    let store = stage();
    for _ in 0..4 {
        assert!(store.read::<(), _>(|_| panic!("planted")).wait().is_err());
    }
    assert_eq!(store.sites_blocking().unwrap().len(), 1);
}
