//! Fields as forms send them: what is unchanged, what is stale, what overwrites, and when that needs a reason.

use super::words::{Errors, passage};
use crate::plant::{Recorded, Slot};
use crate::refusal::Standing;
use crate::{Conflict, EventId, Refusal, Typed};

/// Most fields that one form may send.
pub(super) const MOST: usize = 500;

/// What a change does to its place.
#[derive(Debug, PartialEq, Eq)]
pub(super) enum Weighed {
    /// Nothing: what was sent is what stands.
    Unchanged,
    /// It takes the place of these.
    Change {
        /// What it supersedes.
        supersedes: Vec<EventId>,
    },
}

/// Collects errors, conflicts and overwritten labels of one form, and refuses in that order.
pub(super) struct Form {
    /// Errors so far.
    pub(super) errors: Errors,
    conflicts: Vec<Conflict>,
    overwritten: Vec<String>,
}

impl Form {
    /// A form of this many fields.
    pub(super) fn of(count: usize) -> Result<Self, Refusal> {
        if count > MOST {
            return Err(Refusal::not_now(format!("One form may change at most {MOST} fields. Send them in parts.")));
        }
        Ok(Self { errors: Errors::default(), conflicts: Vec::new(), overwritten: Vec::new() })
    }

    /// Weighs a change against what stands. `unchanged` tells whether a single standing value is what was sent;
    /// `shown` gives a value as conflicts show it.
    pub(super) fn weigh<T>(
        &mut self,
        name: &str,
        label: &str,
        slot: Option<&Slot<T>>,
        change: (Option<Typed>, &[EventId]),
        unchanged: impl Fn(&T) -> bool,
        shown: impl Fn(&T) -> Option<Typed>,
    ) -> Weighed {
        let (mine, seen) = change;
        let standing: &[Recorded<T>] = slot.map_or(&[], Slot::standing);
        match standing {
            [] if mine.is_none() => return Weighed::Unchanged,
            [only] if unchanged(&only.value) => return Weighed::Unchanged,
            _ => {}
        }
        let stand: Vec<EventId> = standing.iter().map(|r| r.event.clone()).collect();
        if stand.len() != seen.len() || !stand.iter().all(|e| seen.contains(e)) {
            let mut theirs: Vec<Standing> = standing
                .iter()
                .map(|r| Standing { value: shown(&r.value), by: r.by_name.clone(), received: r.received })
                .collect();
            if let (true, Some(gone)) = (theirs.is_empty(), slot.and_then(|s| s.taken_back().last())) {
                theirs.push(Standing { value: None, by: gone.by_name.clone(), received: gone.received });
            }
            let (field, label) = (name.to_owned(), label.to_owned());
            self.conflicts.push(Conflict { field, label, mine, theirs, seen: stand.clone() });
        }
        Weighed::Change { supersedes: stand }
    }

    /// Notes that a change overwrites something for which a reason is due.
    pub(super) fn overwrites(&mut self, label: &str) {
        self.overwritten.push(label.to_owned());
    }

    /// Refuses for what was found; errors first, since a person can put them right at once.
    pub(super) fn settle(mut self, reason: &str) -> Result<(), Refusal> {
        if !self.overwritten.is_empty() && reason.trim().is_empty() {
            let list = self.overwritten.join(", ");
            self.errors.add(
                "reason",
                "reason",
                format!("Say why this is overwritten: {list}. The earlier value stays readable."),
            );
        } else if !reason.trim().is_empty() {
            self.errors.keep("reason", "reason", passage(reason, "why"));
        }
        self.errors.none()?;
        if self.conflicts.is_empty() { Ok(()) } else { Err(Refusal::Stale { conflicts: self.conflicts }) }
    }
}

/// Text as kept: only line endings are made the same, since browsers send them their own way.
pub(crate) fn as_typed(text: &str) -> String {
    text.replace("\r\n", "\n")
}

/// Whether a standing value is what was sent; an unpicked unit says nothing.
pub(super) fn same(standing: Option<&Typed>, text: &str, unit: &str) -> bool {
    match standing {
        None => text.trim().is_empty(),
        Some(value) => {
            value.text == text && (unit.is_empty() || value.unit.is_none() || value.unit.as_deref() == Some(unit))
        }
    }
}
