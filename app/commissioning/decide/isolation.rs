//! Isolation as a state that entries bring about: when a step's entries put it in force or lift it.

use crate::agenda::step_parts;
use crate::procedure::{IsolationAct, Step};
use crate::record::{EntryPlace, Record};
use std::collections::BTreeSet;

/// The turn that recording this step can bring now.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) struct Turn {
    /// In force, or lifted.
    pub(super) to: IsolationAct,
    /// The place in the chain of the turn before: only what was entered after it proves anything.
    since: u64,
}

/// What turn is due at this step, if any.
pub(super) fn due(record: &Record, step: &Step) -> Option<Turn> {
    let last = record.isolations.last();
    match (step.isolation?, record.isolated()) {
        (IsolationAct::Enter, false) => {
            Some(Turn { to: IsolationAct::Enter, since: last.map_or(0, |i| i.lifted_sequence) })
        }
        (IsolationAct::Lift, true) => Some(Turn { to: IsolationAct::Lift, since: last.map_or(0, |i| i.from_sequence) }),
        _ => None,
    }
}

impl Turn {
    /// Whether what stands at a place was entered before the last turn: entering the same again is then a new entry.
    pub(super) fn outdates(self, record: &Record, place: &EntryPlace) -> bool {
        record.entry(place).is_some_and(|e| e.sequence <= self.since)
    }

    /// Whether every item is there that a step asks for which is not left alone, entered since the last turn or in this
    /// act; `gone` was emptied in it.
    pub(super) fn complete(
        self,
        record: &Record,
        step: &Step,
        flags: &BTreeSet<String>,
        made: &BTreeSet<EntryPlace>,
        gone: &BTreeSet<EntryPlace>,
    ) -> bool {
        let fresh = |place: &EntryPlace| {
            let kept = record.entry(place).is_some_and(|e| e.sequence > self.since) && !gone.contains(place);
            made.contains(place) || kept
        };
        step_parts::required(step, flags, false).all(|item| step_parts::places(step, item).all(|place| fresh(&place)))
    }
}
