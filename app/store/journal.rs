//! The journal: events in their chains, their hashes in the stream, heads that left the building.

pub(crate) mod append;
mod fetch;
mod stream;
mod verify;
mod witness;

pub(crate) use stream::stream_head;
pub(crate) use verify::{chains, verify_journal};
pub use witness::Witnessed;
pub(crate) use witness::{ahead_of_the_store, remember_head};
