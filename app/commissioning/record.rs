//! The record: one commissioning of one drive, as the fold of the drive's chain.

pub mod apply;
pub mod canonical;
pub mod draft;
pub mod drive;
pub mod entry;
pub mod finding;
pub mod functions;
pub mod parameter;
pub mod sign;

pub use drive::{Drive, Record, Status, Turn};
pub use entry::{
    Entry, EntryPlace, InstrumentUsed, Isolation, OnceOtherwise, Photo, Release, ReleaseRole, SettledOtherwise,
};
pub use finding::{Finding, FindingState, Severity};
pub use parameter::{ParameterColumn, ParameterPlace};
pub use sign::{Meaning, Signature};
