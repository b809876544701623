//! Whatever people do in whatever order: the chain rebuilds the same state, and what must hold after an act holds.

use super::*;
use crate::record::{ParameterColumn, ParameterPlace, SettledOtherwise, Severity};
use crate::{EventId, FindingId};
use proptest::prelude::*;

const STEPS: [(&str, &str, &str); 8] = [
    ("prove-dead", "tester-proved", "yes"),
    ("prove-dead", "bus-after-waiting", "3"),
    ("prove-dead", "isolation-note", "lamp"),
    ("terminals", "terminals-tight", "yes"),
    ("insulation", "ir-60s", "812"),
    ("lift", "isolation-removed", "yes"),
    ("direction", "direction-seen", "clockwise"),
    ("exchange", "leads-exchanged", "yes"),
];
const PEOPLE: [PersonId; 5] = [ERIN, ERIN, EBBE, SUNE, ADA];

/// An act by small numbers; many are refused, which is part of the exercise.
fn deed(world: &World, what: u8, which: u8, how: u8) -> Deed {
    let drive = DRIVE;
    let (step, item, text) = STEPS[usize::from(which) % STEPS.len()];
    let reason = if how.is_multiple_of(4) { String::new() } else { "for a reason".to_owned() };
    let finding = FindingId(Uuid::from_u128(u128::from(which % 3)));
    let role = if how.is_multiple_of(2) { Meaning::Performed } else { Meaning::Accepted };
    match what % 14 {
        0..=4 => {
            let text = match how % 5 {
                0 => "",
                1 => "7",
                _ => text,
            };
            let mut change = world.change(EntryPlace::new(item), text);
            if how.is_multiple_of(7) {
                change.seen = vec![EventId("older.1".into())];
            }
            Deed::RecordEntries { drive, step: step.into(), changes: vec![change], reason }
        }
        5 => Deed::SettleStep { drive, step: step.into(), how: SettledOtherwise::NotApplicable, reason },
        6 => Deed::ResumeStep { drive, step: step.into() },
        7 => release(["inspect", "turn"][usize::from(which) % 2]),
        8 => {
            let place = ParameterPlace { function: "acceleration-time".into(), column: ParameterColumn::AsLeft };
            let seen = world.record().parameters.get(&place).map(|s| s.seen()).unwrap_or_default();
            let change = Change { place, text: how.to_string(), unit: "s".into(), instrument: None, photo: None, seen };
            Deed::SetParameters { drive, changes: vec![change], reason }
        }
        9 => Deed::RaiseFinding {
            drive,
            finding,
            severity: Severity::ALL[usize::from(how) % 3],
            text: "Worn.".into(),
            step: None,
        },
        10 => Deed::AcceptFinding { drive, finding, reason },
        11 => Deed::Remark { drive, step: String::new(), text: "Seen.".into() },
        12 => Deed::Sign { drive, meaning: role, digest: world.file().digest() },
        _ if how.is_multiple_of(2) => Deed::Return { drive, reason },
        _ => Deed::Reopen { drive, reason },
    }
}

/// Folds a chain from its stored bytes.
fn fold(chain: &[Sealed]) -> Option<Drive> {
    let mut drive = None;
    for sealed in chain {
        apply::to_drive(&mut drive, &sealed.event().unwrap(), &sealed.head()).unwrap();
    }
    drive
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 16, failure_persistence: None, ..ProptestConfig::default() })]

    #[test]
    fn the_chain_alone_gives_the_same_state(complete in any::<bool>(), acts in proptest::collection::vec(any::<(u8, u8, u8, u8)>(), 1..24)) {
        let mut world = if complete { World::complete() } else { World::begun() };
        let mut done = 0;
        for (who, what, which, how) in acts {
            let deed = deed(&world, what, which, how);
            let (before, head) = (world.drive().clone(), world.drive().head.clone());
            world.minute += i64::from(how % 3);
            match world.attempt(Some(PEOPLE[usize::from(who) % PEOPLE.len()]), deed) {
                Ok(events) => {
                    done += events.len();
                    prop_assert_eq!(world.drive().head.sequence, head.sequence + events.len() as u64);
                }
                Err(_) => prop_assert_eq!(world.drive(), &before, "a refusal changes nothing"),
            }
        }
        let chain = &world.chains[&Chain::Drive(DRIVE)];
        prop_assert!(chain.len() > done);
        let folded = fold(chain);
        prop_assert_eq!(folded.as_ref(), Some(world.drive()));
        let record = world.record();
        prop_assert!(!record.entries.values().any(|s| s.needs_choice()), "one installation alone never needs a choice");
        for signature in record.signatures.iter().filter(|s| s.meaning == Meaning::Accepted) {
            prop_assert!(!record.signatures.iter().any(|s| s.meaning == Meaning::Performed && s.person == signature.person));
        }
    }
}
