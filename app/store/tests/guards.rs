//! What the database itself refuses, whoever asks: each guard is seen to refuse a planted fault.

use super::stage::*;
use crate::fault::Fault;
use crate::{PerformFault, Store, Witnessed};
use commissioning::journal::{Chain, Event, Fact, Head, seal};
use commissioning::record::Meaning;
use commissioning::{ActId, EventId};

/// Runs SQL on the writing connection; gives what the database said.
fn raw(store: &Store, sql: &'static str) -> Result<(), String> {
    let answer = store.writing().give::<(), PerformFault, _>(move |desk| {
        desk.connection.execute_batch(sql)?;
        Ok(Ok(()))
    });
    answer.wait().map_err(|e| e.to_string())
}

#[test]
fn journal_rows_are_neither_changed_nor_removed() {
    let store = stage();
    signed(&store, 1, "P-1", 20);
    for sql in [
        "UPDATE events SET bytes = '{}' WHERE sequence = 1",
        "UPDATE events SET hash = hash",
        "DELETE FROM events",
        "DELETE FROM events WHERE chain = 'installation' AND sequence = 1",
        "UPDATE stream SET stream_hash = stream_hash",
        "DELETE FROM stream WHERE sequence = 1",
        "UPDATE acts SET outcome = outcome",
        "DELETE FROM acts",
        "INSERT OR REPLACE INTO events SELECT * FROM events WHERE chain = 'installation' AND sequence = 1",
        "INSERT OR REPLACE INTO acts SELECT * FROM acts",
        "INSERT OR REPLACE INTO stream SELECT * FROM stream WHERE sequence = 1",
        // A gap, a wrong hash before, an event filed twice.
        "INSERT INTO events SELECT chain, sequence + 100, previous, hash, bytes, event || 'x', act FROM events LIMIT 1",
        "INSERT INTO events SELECT chain, 1 + (SELECT max(sequence) FROM events WHERE chain = 'installation'), 'wrong',
                                   hash, bytes, event || 'x', act FROM events WHERE chain = 'installation' LIMIT 1",
        "INSERT INTO stream SELECT sequence + 100, chain || 'x', chain_sequence, hash, previous, stream_hash FROM stream LIMIT 1",
    ] {
        let said = raw(&store, sql).expect_err(sql);
        let words = ["never", "kept once", "once", "without a gap"];
        assert!(said.contains("the database refused") && words.iter().any(|w| said.contains(w)), "{sql}: {said}");
    }
    assert_eq!(store.chain_blocking(Chain::Drive(drive(1))).unwrap().len(), 5);
}

#[test]
fn the_guards_hold_for_any_other_tool_that_opens_the_file() {
    let store = stage();
    let other = rusqlite::Connection::open(store.folder().join("store.sqlite")).unwrap();
    for sql in
        ["DELETE FROM events", "UPDATE events SET bytes = '{}'", "DELETE FROM stream", "UPDATE acts SET received = ''"]
    {
        assert!(other.execute(sql, []).is_err(), "{sql}");
    }
}

/// An acceptance by this person, sealed and written past `decide`.
fn forged_acceptance(store: &Store, by: commissioning::PersonId) -> Result<(), PerformFault> {
    let state = store.drive_blocking(drive(1)).unwrap().unwrap();
    let act = ActId(fresh());
    let event = Event {
        id: EventId::of(act, 1),
        act,
        chain: Chain::Drive(drive(1)),
        person: by,
        person_name: "Somebody".to_owned(),
        received: at(30),
        tablet: None,
        supersedes: Vec::new(),
        reason: None,
        fact: match store.chain_blocking(Chain::Drive(drive(1))).unwrap().last().unwrap().event().unwrap().fact {
            Fact::Signed { revision, digest, catalogue, verdicts, site, .. } => Fact::Signed {
                meaning: Meaning::Accepted,
                revision,
                digest,
                head: state.head.clone(),
                catalogue,
                verdicts,
                site,
            },
            other => panic!("{other:?}"),
        },
    };
    let sealed = seal(&state.head, &event).unwrap();
    let answer = store.writing().give(move |desk| {
        let kept = "INSERT INTO acts (id, content_hash, outcome, received) VALUES (:id, :hash, '{}', 'x')";
        desk.connection
            .execute(kept, rusqlite::named_params! { ":id": event.act.to_string(), ":hash": sealed.hash })?;
        crate::journal::append::append_all(desk, &[(event.chain, &event, sealed)])?;
        Ok(Ok::<(), PerformFault>(()))
    });
    answer.wait()
}

#[test]
fn an_acceptance_by_a_contributor_is_refused_by_the_database_too() {
    let store = stage();
    signed(&store, 1, "P-1", 20);
    let said = forged_acceptance(&store, ROWAN).unwrap_err().to_string();
    assert!(said.contains("does not accept it"), "{said}");
    let row = "INSERT INTO signatures (event, drive, revision, meaning, person, received)
               SELECT event, substr(chain, 7), 1, 'accepted', json_extract(bytes, '$.person'), 'x'
               FROM events WHERE chain LIKE 'drive:%' AND sequence = 2";
    let said = raw(&store, row).unwrap_err();
    assert!(said.contains("does not accept it"), "{said}");
    // The same forgery in another's name gets past this guard: it is the contributor that is refused.
    forged_acceptance(&store, MAREN).unwrap();
}

#[test]
fn the_guard_is_told_to_the_person_as_a_refusal() {
    let store = stage();
    let answer = store.writing().give::<_, PerformFault, _>(|desk| {
        let refused = crate::acts::guarded_for_test(desk, |_| -> Result<(), Fault> {
            Err(Fault::Guard("who recorded or signed this record does not accept it".to_owned()))
        })?;
        Ok(Ok(refused))
    });
    assert!(matches!(answer.wait().unwrap(), Err(commissioning::Refusal::NotAllowed { .. })));
}

#[test]
fn a_head_seen_elsewhere_raises_an_alarm_when_it_knows_more() {
    let store = stage();
    let head = store.stream_head_blocking().unwrap();
    let say = |head: Head| store.witness_blocking("tablet 4", head, at(9)).unwrap();
    assert_eq!(say(head.clone()), Witnessed::Fits);
    assert_eq!(say(Head { sequence: head.sequence + 1, hash: head.hash.clone() }), Witnessed::Ahead);
    assert_eq!(say(Head { sequence: 1, hash: head.hash }), Witnessed::Other);
    let report = crate::check_store(store.folder(), at(10)).unwrap();
    assert!(!report.ok);
    assert_eq!(report.findings.iter().filter(|f| f.starts_with("heads seen elsewhere")).count(), 2, "{report:?}");
}
