//! A slot keeps what stands and everything that stood before: nothing is overwritten.

use crate::{EventId, PersonId, Timestamp};
use serde::{Deserialize, Serialize};

/// A value with who, when and why.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Recorded<T> {
    /// The value.
    pub value: T,
    /// The event that brought it.
    pub event: EventId,
    /// Its place in its chain, from 1: tells before from after without a clock.
    pub sequence: u64,
    /// Who.
    pub by: PersonId,
    /// Printed name at the time.
    pub by_name: String,
    /// Receipt time of the server.
    pub received: Timestamp,
    /// The tablet's own time, kept apart.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub tablet: Option<Timestamp>,
    /// Why an earlier value was overwritten, where that was asked.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub reason: Option<String>,
}

/// One field's or entry's values. Two that stand beside each other need a choice.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Slot<T> {
    standing: Vec<Recorded<T>>,
    #[serde(default = "Vec::new", skip_serializing_if = "Vec::is_empty")]
    earlier: Vec<Recorded<T>>,
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    taken_back: Vec<Recorded<()>>,
}

impl<T> Default for Slot<T> {
    fn default() -> Self {
        Self { standing: Vec::new(), earlier: Vec::new(), taken_back: Vec::new() }
    }
}

impl<T> Slot<T> {
    /// The one value that stands; `None` when there is none or a choice is needed.
    #[must_use]
    pub fn current(&self) -> Option<&Recorded<T>> {
        if self.standing.len() == 1 { self.standing.first() } else { None }
    }

    /// All that stand: more than one needs a choice.
    #[must_use]
    pub fn standing(&self) -> &[Recorded<T>] {
        &self.standing
    }

    /// Superseded values, oldest first.
    #[must_use]
    pub fn earlier(&self) -> &[Recorded<T>] {
        &self.earlier
    }

    /// Whether two values stand beside each other.
    #[must_use]
    pub fn needs_choice(&self) -> bool {
        self.standing.len() > 1
    }

    /// What a form must send back to show that it was up to date.
    #[must_use]
    pub fn seen(&self) -> Vec<EventId> {
        self.standing.iter().map(|r| r.event.clone()).collect()
    }

    /// Who emptied this place, when and why, oldest first; what stood is among the earlier values.
    #[must_use]
    pub fn taken_back(&self) -> &[Recorded<()>] {
        &self.taken_back
    }

    /// Puts a value in the place of those it supersedes.
    pub fn put(&mut self, value: Recorded<T>, supersedes: &[EventId]) {
        self.set_aside(supersedes);
        self.standing.push(value);
    }

    /// Empties the place of those superseded, and keeps who did it.
    pub fn take_back(&mut self, by: Recorded<()>, supersedes: &[EventId]) {
        self.set_aside(supersedes);
        self.taken_back.push(by);
    }

    /// Everything that was ever put here: the superseded, oldest first, then what stands.
    pub fn all(&self) -> impl Iterator<Item = &Recorded<T>> {
        self.earlier.iter().chain(&self.standing)
    }

    fn set_aside(&mut self, supersedes: &[EventId]) {
        let (gone, kept) = std::mem::take(&mut self.standing).into_iter().partition(|r| supersedes.contains(&r.event));
        self.standing = kept;
        self.earlier.extend::<Vec<_>>(gone);
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn recorded(value: &'static str, event: &str) -> Recorded<&'static str> {
        let received = Timestamp::EPOCH;
        let by = PersonId(uuid::Uuid::nil());
        let event = EventId(event.to_owned());
        Recorded { value, event, sequence: 1, by, by_name: String::new(), received, tablet: None, reason: None }
    }

    #[test]
    fn two_that_supersede_the_same_one_need_a_choice() {
        let mut slot = Slot::default();
        slot.put(recorded("first", "a.1"), &[]);
        let seen = slot.seen();
        slot.put(recorded("mine", "b.1"), &seen);
        slot.put(recorded("theirs", "c.1"), &seen);
        assert!(slot.needs_choice() && slot.current().is_none());
        assert_eq!(slot.standing().len(), 2);
        slot.put(recorded("chosen", "d.1"), &slot.seen());
        assert_eq!(slot.current().unwrap().value, "chosen");
        let earlier: Vec<_> = slot.earlier().iter().map(|r| r.value).collect();
        assert_eq!(earlier, ["first", "mine", "theirs"], "nothing is lost");
        assert_eq!(slot.all().count(), 4);
    }

    #[test]
    fn what_was_taken_back_stays_readable_with_who_did_it() {
        let mut slot = Slot::default();
        slot.put(recorded("first", "a.1"), &[]);
        let by = recorded("", "b.1");
        let by = Recorded {
            value: (),
            event: by.event,
            sequence: 2,
            by: by.by,
            by_name: "Erin Alder".into(),
            received: by.received,
            tablet: None,
            reason: None,
        };
        slot.take_back(by, &slot.seen());
        assert!(slot.current().is_none() && !slot.needs_choice() && slot.seen().is_empty());
        assert_eq!((slot.earlier()[0].value, slot.taken_back()[0].by_name.as_str()), ("first", "Erin Alder"));
    }
}
