//! What a record is, what may happen to it next and who may do it: procedure, acts, events, states and checks.
//!
//! `decide(act, surroundings) → events or a Refusal`; applying the events gives the next state. Nothing here knows
//! SQL, HTTP, HTML or the clock: time and identity arrive with the act.

pub mod agenda;
pub mod decide;
pub mod id;
pub mod journal;
pub mod judge;
pub mod people;
pub mod plant;
pub mod procedure;
pub mod record;
pub mod refusal;
pub mod timestamp;
pub mod typed;
#[cfg(test)]
mod world;

pub use id::{ActId, DriveId, EventId, FindingId, InstrumentId, PersonId, SiteId};
pub use refusal::{Conflict, FieldError, Refusal};
pub use timestamp::Timestamp;
pub use typed::Typed;
