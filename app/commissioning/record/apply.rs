//! From an event to the next state of what it belongs to.
//!
//! Applying decides nothing: whoever reads a chain years later, or joins two, gets the same state. What an event
//! supersedes is set aside, never dropped.

mod drive;
mod installation;
mod site;

pub use drive::to_drive;
pub use installation::to_installation;
pub use site::to_site;

use crate::journal::Event;
use crate::plant::Recorded;

/// An event that does not fit the state it met; a chain that is whole never gives it.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
#[error("event {event} could not be applied: {why}")]
pub struct ApplyError {
    /// The event.
    pub event: String,
    /// In words.
    pub why: String,
}

fn misfit(event: &Event, why: impl Into<String>) -> ApplyError {
    ApplyError { event: event.id.to_string(), why: why.into() }
}

/// A value with the event's who, when and why.
fn recorded<T>(value: T, event: &Event, sequence: u64) -> Recorded<T> {
    Recorded {
        value,
        event: event.id.clone(),
        sequence,
        by: event.person,
        by_name: event.person_name.clone(),
        received: event.received,
        tablet: event.tablet,
        reason: event.reason.clone(),
    }
}
