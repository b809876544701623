//! The threads: one that writes, a few that read, a few for what takes long.

mod crew;
mod desk;
mod writer;

pub(crate) use crew::Crew;
pub(crate) use desk::Desk;
pub(crate) use writer::{Writer, WriterHandle};
