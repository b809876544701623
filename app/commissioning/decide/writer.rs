//! Collects the events of one act: numbers them, and puts person and times on each.

use super::Surroundings;
use crate::journal::{Act, Chain, Event, Fact};
use crate::record::Record;
use crate::{EventId, FindingId, PersonId};
use sha2::{Digest, Sha256};

/// The events of an act so far.
pub(super) struct Writer<'a> {
    act: &'a Act,
    now: crate::Timestamp,
    person: PersonId,
    name: String,
    events: Vec<Event>,
}

impl<'a> Writer<'a> {
    /// In the name of the actor; without one, in the name of the program, which enters no results.
    pub(super) fn new(act: &'a Act, around: &Surroundings<'_>) -> Self {
        let (person, name) = match around.actor {
            Some(actor) => (actor.id, actor.name.clone()),
            None => (PersonId(uuid::Uuid::nil()), "the program".to_owned()),
        };
        Self { act, now: around.now, person, name, events: Vec::new() }
    }

    /// In the name of somebody who only now becomes known.
    pub(super) fn in_name_of(mut self, person: PersonId, name: &str) -> Self {
        self.person = person;
        name.clone_into(&mut self.name);
        self
    }

    /// Adds a fact that supersedes nothing and needs no reason.
    pub(super) fn add(&mut self, chain: Chain, fact: Fact) {
        self.add_over(chain, fact, Vec::new(), "");
    }

    /// Adds the value of a field: a reason belongs to what it overwrites, not to what it only adds.
    pub(super) fn put(&mut self, chain: Chain, fact: Fact, supersedes: Vec<EventId>, reason: &str) {
        let reason = if supersedes.is_empty() { "" } else { reason };
        self.add_over(chain, fact, supersedes, reason);
    }

    /// Adds a fact with what it supersedes and why; an empty reason is none.
    pub(super) fn add_over(&mut self, chain: Chain, fact: Fact, supersedes: Vec<EventId>, reason: &str) {
        let reason = reason.trim();
        self.events.push(Event {
            id: EventId::of(self.act.id, self.events.len() + 1),
            act: self.act.id,
            chain,
            person: self.person,
            person_name: self.name.clone(),
            received: self.now,
            tablet: self.act.tablet,
            supersedes,
            reason: (!reason.is_empty()).then(|| reason.to_owned()),
            fact,
        });
    }

    /// The identifier of a finding that this act raises by itself. The tablet chooses act and finding identifiers, so
    /// that one raised beforehand could have this one: then the next is taken, and no finding is swallowed.
    pub(super) fn finding(&self, record: &Record, what: &str, step: &str) -> FindingId {
        let act = self.act.id.to_string();
        let mut number = 0_u32;
        loop {
            let id = finding_about(&[what, &act, step, &number.to_string()]);
            if !record.findings.contains_key(&id) {
                return id;
            }
            number += 1;
        }
    }

    /// The events so far.
    pub(super) fn so_far(&self) -> &[Event] {
        &self.events
    }

    /// The events.
    pub(super) fn done(self) -> Vec<Event> {
        self.events
    }
}

/// The identifier of a finding that the program raises: made from what it is about.
pub(super) fn finding_about(words: &[&str]) -> FindingId {
    let digest = Sha256::digest(words.join("\n").as_bytes());
    let mut bytes = [0u8; 16];
    bytes.iter_mut().zip(digest.iter()).for_each(|(b, d)| *b = *d);
    FindingId(uuid::Builder::from_custom_bytes(bytes).into_uuid())
}
