//! Performs an act: once, in one transaction, decided after every act before it.

use super::content::content_hash;
use super::fault::PerformFault;
use super::guard::{guarded, pictures_are_here};
use super::outcome::{KeptAct, Outcome, Receipt, keep, kept};
use crate::answer::Answer;
use crate::fault::Fault;
use crate::journal::append;
use crate::states::head_of;
use crate::store::Store;
use crate::work::Desk;
use commissioning::decide::{Surroundings, decide};
use commissioning::journal::{Act, Chain, Event};
use commissioning::{PersonId, Refusal, Timestamp};

/// What the person proved with this sending of the act.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct Proof {
    /// The password was typed again with it and was right.
    pub password_proved: bool,
}

impl Proof {
    /// Nothing beyond the session.
    #[must_use]
    pub const fn none() -> Self {
        Self { password_proved: false }
    }

    /// The password, typed again and right.
    #[must_use]
    pub const fn password() -> Self {
        Self { password_proved: true }
    }
}

impl Store {
    /// Performs an act, and answers when it is on the disk. The same act again gets the same answer.
    pub fn perform(
        &self,
        actor: Option<PersonId>,
        act: Act,
        proof: Proof,
        now: Timestamp,
    ) -> Answer<Receipt, PerformFault> {
        // Hashed here, on the thread of the asker: the writing thread has better things to do.
        let hash = content_hash(actor, &act);
        self.recording().give(move |desk| perform(desk, actor, &act, hash?, proof, now))
    }

    /// As `perform`, waiting.
    ///
    /// # Errors
    /// As `PerformFault` says.
    pub fn perform_blocking(
        &self,
        actor: Option<PersonId>,
        act: Act,
        proof: Proof,
        now: Timestamp,
    ) -> Result<Receipt, PerformFault> {
        self.perform(actor, act, proof, now).wait()
    }
}

fn perform(
    desk: &Desk,
    actor: Option<PersonId>,
    act: &Act,
    content_hash: String,
    proof: Proof,
    now: Timestamp,
) -> Result<Result<Receipt, PerformFault>, Fault> {
    if let Some(before) = kept(&desk.connection, act.id)? {
        return Ok(if before.content_hash == content_hash {
            before.answer(act.id, true)
        } else {
            Err(PerformFault::OtherContent)
        });
    }
    let outcome = match decided(desk, actor, act, proof, now)? {
        Ok(events) => match recorded(desk, act, &content_hash, &events, now)? {
            Ok(receipt) => return Ok(Ok(receipt)),
            Err(refusal) => Outcome::Refused { because: refusal },
        },
        Err(refusal) => Outcome::Refused { because: refusal },
    };
    let refused = KeptAct { content_hash, outcome, received: now };
    keep(&desk.connection, act.id, &refused)?;
    Ok(refused.answer(act.id, false))
}

fn decided(
    desk: &Desk,
    actor: Option<PersonId>,
    act: &Act,
    proof: Proof,
    now: Timestamp,
) -> Result<Result<Vec<Event>, Refusal>, Fault> {
    let installation = desk.installation()?;
    let actor = match actor {
        None => None,
        Some(id) => match installation.people.get(&id) {
            Some(person) => Some(person),
            None => return Ok(Err(Refusal::Unknown { what: "The account this was sent from".to_owned() })),
        },
    };
    let drive = act.deed.drive().map_or(Ok(None), |id| desk.drive(id))?;
    let site = act.deed.site().or(drive.as_ref().map(|d| d.site)).map_or(Ok(None), |id| desk.site(id))?;
    let around = Surroundings {
        actor,
        now,
        installation: &installation,
        site: site.as_deref(),
        drive: drive.as_deref(),
        password_proved: proof.password_proved,
    };
    match decide(act, &around) {
        Ok(events) => Ok(pictures_are_here(&desk.connection, &events)?.map(|()| events)),
        Err(refusal) => Ok(Err(refusal)),
    }
}

fn recorded(
    desk: &Desk,
    act: &Act,
    content_hash: &str,
    events: &[Event],
    now: Timestamp,
) -> Result<Result<Receipt, Refusal>, Fault> {
    guarded(desk, |desk| {
        let sealed = append::seal_all(desk, events)?;
        let drive_head = match act.deed.drive().map(Chain::Drive) {
            None => None,
            Some(chain) => match sealed.iter().rev().find(|(c, _, _)| *c == chain) {
                Some((_, _, sealed)) => Some(sealed.head()),
                None => Some(head_of(&desk.connection, chain)?),
            },
        };
        let outcome = Outcome::Done { events: events.iter().map(|e| e.id.clone()).collect(), drive_head };
        let done = KeptAct { content_hash: content_hash.to_owned(), outcome, received: now };
        keep(&desk.connection, act.id, &done)?;
        append::append_all(desk, &sealed)?;
        append::bring_lists_along(desk, &sealed)?;
        done.answer(act.id, false).map_err(|fault| Fault::Broken(fault.to_string()))
    })
}
