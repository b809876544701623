//! An act is done once, however often and in whatever company it is sent.

use super::stage::*;
use crate::{PerformFault, Proof, Store};
use commissioning::journal::{Chain, Deed, verify_chain};
use commissioning::record::Meaning;
use commissioning::{DriveId, Refusal};

#[test]
fn rowan_sends_an_act_five_times_and_it_happens_once() {
    let store = stage();
    create(&store, 1, "P-1", "Feed pump");
    let begin = act(Deed::BeginRecord { drive: drive(1) });
    let first = store.perform_blocking(Some(ROWAN), begin.clone(), Proof::none(), at(10)).unwrap();
    assert!(!first.repeated);
    for minute in 11..15 {
        let again = store.perform_blocking(Some(ROWAN), begin.clone(), Proof::none(), at(minute)).unwrap();
        assert!(again.repeated);
        assert_eq!((&again.events, again.received, &again.drive_head), (&first.events, at(10), &first.drive_head));
    }
    assert_eq!(store.chain_blocking(Chain::Drive(drive(1))).unwrap().len(), 2);
}

#[test]
fn five_sendings_at_the_same_time_are_one_event() {
    let store = stage();
    create(&store, 1, "P-1", "Feed pump");
    let begin = act(Deed::BeginRecord { drive: drive(1) });
    let answers: Vec<_> = std::thread::scope(|scope| {
        let threads: Vec<_> = (0..5)
            .map(|_| {
                let (store, begin) = (store.clone(), begin.clone());
                scope.spawn(move || store.perform_blocking(Some(ROWAN), begin, Proof::none(), at(10)).unwrap())
            })
            .collect();
        threads.into_iter().map(|t| t.join().unwrap()).collect()
    });
    assert_eq!(answers.iter().filter(|a| !a.repeated).count(), 1);
    assert!(answers.iter().all(|a| a.events == answers[0].events && a.drive_head == answers[0].drive_head));
    assert_eq!(store.chain_blocking(Chain::Drive(drive(1))).unwrap().len(), 2);
}

#[test]
fn the_same_id_with_other_content_is_refused() {
    let store = stage();
    create(&store, 1, "P-1", "Feed pump");
    let mut remark = act(Deed::BeginRecord { drive: drive(1) });
    store.perform_blocking(Some(ROWAN), remark.clone(), Proof::none(), at(10)).unwrap();
    assert_eq!(
        store.perform_blocking(Some(TOVE), remark.clone(), Proof::none(), at(11)),
        Err(PerformFault::OtherContent)
    );
    remark.deed = Deed::Remark { drive: drive(1), step: String::new(), text: "Another matter".to_owned() };
    assert_eq!(store.perform_blocking(Some(ROWAN), remark, Proof::none(), at(11)), Err(PerformFault::OtherContent));
}

#[test]
fn a_refusal_is_remembered_and_corrected_under_a_new_id() {
    let store = stage();
    let early = act(Deed::BeginRecord { drive: drive(1) });
    let refused = store.perform_blocking(Some(ROWAN), early.clone(), Proof::none(), at(3)).unwrap_err();
    assert!(matches!(refused, PerformFault::Refused(Refusal::Unknown { .. })), "{refused:?}");
    create(&store, 1, "P-1", "Feed pump");
    // What was refused stays refused under its id, though it would work now.
    assert_eq!(store.perform_blocking(Some(ROWAN), early.clone(), Proof::none(), at(9)).unwrap_err(), refused);
    assert!(matches!(store.outcome_blocking(early.id).unwrap(), Some(Err(_))));
    done(&store, ROWAN, Deed::BeginRecord { drive: drive(1) }, at(9));
}

#[test]
fn an_account_that_is_not_here_does_nothing() {
    let store = stage();
    let stranger = commissioning::PersonId(fresh());
    let deed =
        Deed::CreateSite { site: commissioning::SiteId(fresh()), tag: "mill".to_owned(), name: "Mill".to_owned() };
    assert!(matches!(tried(&store, stranger, deed, at(9)), Err(PerformFault::Refused(_))));
    assert_eq!(store.sites_blocking().unwrap().len(), 1);
}

#[test]
fn acts_that_wait_together_keep_their_order() {
    let store = stage();
    // All are in the queue before the first is answered: each builds on the one before.
    let answers: Vec<_> = (1..=40)
        .map(|n| {
            let create =
                Deed::CreateDrive { site: SITE, drive: drive(n), tag: format!("P-{n}"), name: "Pump".to_owned() };
            let begin = Deed::BeginRecord { drive: drive(n) };
            let first = store.perform(Some(ROWAN), act(create), Proof::none(), at(3));
            (first, store.perform(Some(ROWAN), act(begin), Proof::none(), at(3)))
        })
        .collect();
    for (create, begin) in answers {
        create.wait().unwrap();
        begin.wait().unwrap();
    }
    assert_eq!(store.sites_blocking().unwrap()[0].in_progress, 40);
    assert_eq!(store.compare_projections_blocking().unwrap(), Vec::<String>::new());
}

#[test]
fn of_two_tabs_that_accept_one_does() {
    let store = stage();
    signed(&store, 1, "P-1", 20);
    let accept = sign(&store, 1, Meaning::Accepted);
    let tabs = [accept.clone(), accept].map(|deed| store.perform(Some(MAREN), act(deed), Proof::password(), at(30)));
    let answers: Vec<_> = tabs.into_iter().map(crate::Answer::wait).collect();
    assert_eq!(answers.iter().filter(|a| a.is_ok()).count(), 1, "{answers:?}");
    let record = store.drive_blocking(drive(1)).unwrap().unwrap().record.clone().unwrap();
    assert_eq!(record.signatures.iter().filter(|s| s.meaning == Meaning::Accepted).count(), 1);
}

#[test]
fn every_chain_and_the_stream_hold_together() {
    let store = stage();
    signed(&store, 1, "P-1", 20);
    let mut events = 0;
    for chain in [Chain::Installation, Chain::Site(SITE), Chain::Drive(drive(1))] {
        let sealed = store.chain_blocking(chain).unwrap();
        let head = verify_chain(&sealed).unwrap();
        assert_eq!(head.sequence, sealed.len() as u64);
        events += head.sequence;
    }
    assert_eq!(store.stream_head_blocking().unwrap().sequence, events);
    assert!(store.chain_blocking(Chain::Drive(DriveId(fresh()))).unwrap().is_empty());
}

#[tokio::test]
async fn in_async_code_an_answer_is_awaited() {
    let store = tokio::task::spawn_blocking(stage).await.unwrap();
    let deed = Deed::CreateDrive { site: SITE, drive: drive(1), tag: "P-1".to_owned(), name: "Pump".to_owned() };
    let receipt = store.perform(Some(ROWAN), act(deed), Proof::none(), at(3)).await.unwrap();
    assert_eq!(receipt.drive_head.unwrap().sequence, 1);
    assert_eq!(store.drive_by_tag("larch-ferry", "P-1").await.unwrap().unwrap().id, drive(1));
    let stayed: Store = store.clone();
    drop(store);
    assert!(stayed.installation().await.unwrap().people.contains_key(&ROWAN));
}
