//! Whatever people do, in whatever order: lists follow from the events, chains hold, opening again gives the same.

use super::stage::*;
use crate::{BoardFilter, PerformFault, Proof, Store};
use commissioning::journal::{Chain, Deed};
use commissioning::plant::Sheet;
use commissioning::record::{Meaning, SettledOtherwise, Severity};
use commissioning::{FindingId, PersonId};
use proptest::prelude::*;

/// Somebody does something to one of three drives; much of it is refused, as in life.
fn deed(store: &Store, n: u128, what: u8) -> Option<Deed> {
    let state = store.drive_blocking(drive(n)).unwrap()?;
    let id = drive(n);
    let finding = state.record.as_ref().and_then(|r| r.findings.keys().next().copied());
    Some(match what {
        0 => Deed::BeginRecord { drive: id },
        1 => entry(store, n, "plate", "plate-read", "yes"),
        2 => entry(store, n, "door", "door-closed", "yes"),
        3 => entry(store, n, "plate", "plate-note", ["wet", "dry", ""][usize::try_from(n).unwrap() % 3]),
        4 => sign(store, n, Meaning::Performed),
        5 => sign(store, n, Meaning::Accepted),
        6 => Deed::Return { drive: id, reason: "Look at the plate again".to_owned() },
        7 => Deed::Reopen { drive: id, reason: "The motor was replaced".to_owned() },
        8 => Deed::SettleStep {
            drive: id,
            step: "door".to_owned(),
            how: SettledOtherwise::NotApplicable,
            reason: "There is no door".to_owned(),
        },
        9 => Deed::ResumeStep { drive: id, step: "door".to_owned() },
        10 => Deed::RaiseFinding {
            drive: id,
            finding: FindingId(fresh()),
            severity: Severity::BeforeHandover,
            text: "Gland loose".to_owned(),
            step: None,
        },
        11 => Deed::SettleFinding { drive: id, finding: finding?, how: "Tightened".to_owned() },
        12 => Deed::AcceptFinding { drive: id, finding: finding?, reason: "Harmless here".to_owned() },
        13 => Deed::Remark { drive: id, step: String::new(), text: "Seen".to_owned() },
        14 => Deed::SetSiteFields { site: SITE, sheet: Sheet::Supply, changes: Vec::new(), reason: String::new() },
        _ => Deed::LoadProcedure { procedure: Box::new(short_procedure(2)) },
    })
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 24, failure_persistence: None, ..ProptestConfig::default() })]

    #[test]
    fn lists_are_what_the_events_say(
        steps in proptest::collection::vec((0u8..4, 1u128..4, 0u8..16), 1..40)
    ) {
        let folder = tempfile::tempdir_in(if std::path::Path::new("/dev/shm").is_dir() { "/dev/shm" } else { "." }).unwrap();
        let store = Store::open(folder.path(), at(0)).unwrap();
        set_up(&store);
        for n in 1..4 {
            create(&store, n, &format!("P-{n}"), "Pump");
        }
        // One is nearly done, one waits for review, so that late deeds are tried as often as early ones.
        work_through(&store, 1);
        work_through(&store, 2);
        done(&store, ROWAN, sign(&store, 2, Meaning::Performed), at(7));
        for (minute, (who, n, what)) in (10..).zip(steps) {
            let who: PersonId = [ROWAN, MAREN, IDA, TOVE][usize::from(who)];
            let Some(deed) = deed(&store, n, what) else { continue };
            let sent = act(deed);
            let got = store.perform_blocking(Some(who), sent.clone(), Proof::password(), at(minute));
            prop_assert!(matches!(got, Ok(_) | Err(PerformFault::Refused(_))), "{:?}", got);
            let again = store.perform_blocking(Some(who), sent, Proof::password(), at(minute + 1));
            prop_assert_eq!(got.map(|r| r.events).ok(), again.map(|r| r.events).ok());
        }
        prop_assert_eq!(store.compare_projections_blocking().unwrap(), Vec::<String>::new());
        let faults = store.read(|desk| crate::journal::verify_journal(&desk.connection)).wait().unwrap().0;
        prop_assert_eq!(faults, Vec::<String>::new());

        let drives: Vec<_> = (1..4).map(|n| store.drive_blocking(drive(n)).unwrap()).collect();
        let rest = (store.installation_blocking().unwrap(), store.board_blocking(SITE, BoardFilter::default()).unwrap());
        drop(store);
        let store = Store::open(folder.path(), at(500)).unwrap();
        for (n, before) in (1..4).zip(&drives) {
            prop_assert_eq!(&store.drive_blocking(drive(n)).unwrap(), before, "step by step and all at once come to the same");
        }
        prop_assert_eq!(&store.installation_blocking().unwrap(), &rest.0);
        prop_assert_eq!(store.board_blocking(SITE, BoardFilter::default()).unwrap(), rest.1);
        prop_assert!(!store.chain_blocking(Chain::Installation).unwrap().is_empty());
    }
}
