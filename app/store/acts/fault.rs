//! Why an act got no receipt.

use crate::fault::Fault;
use commissioning::Refusal;

/// Why an act got no receipt.
#[derive(Clone, Debug, PartialEq, thiserror::Error)]
pub enum PerformFault {
    /// It was refused, in words for the person; the refusal is kept under the act's id.
    #[error("{0}")]
    Refused(Refusal),
    /// Another act with this id was kept before.
    #[error("Another act was kept under this id. Make the entry again, so that it gets an id of its own.")]
    OtherContent,
    /// The disk failed while it was being recorded: send the same act again to find out.
    #[error("It is not known whether this was recorded. Send it again unchanged; it will not be recorded twice.")]
    Unknown,
    /// Nothing is recorded at present.
    #[error(
        "The store can be read, but nothing can be recorded at present. Nothing of this was recorded; send it again later."
    )]
    ReadOnly,
    /// Something broke; nothing of it was recorded.
    #[error("Something broke and nothing of this was recorded: {0}")]
    Broken(String),
}

impl From<Fault> for PerformFault {
    fn from(fault: Fault) -> Self {
        match fault {
            Fault::Unknown | Fault::Disk(_) => Self::Unknown,
            Fault::ReadOnly => Self::ReadOnly,
            other => Self::Broken(other.to_string()),
        }
    }
}
