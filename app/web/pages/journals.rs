//! The journal of a drive: every event, who, when, what; and the same as a file.

pub mod download;
pub mod facts;
pub mod show;
