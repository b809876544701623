//! What can break below an act or a read, and how that is said.

use commissioning::journal::ChainFault;
use std::fmt;

/// Something broke; inside this crate only.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(crate) enum Fault {
    /// The disk or the file: nothing more is written on this connection.
    Disk(String),
    /// A trigger of the database refused.
    Guard(String),
    /// What is stored cannot be what was written, or the program has a fault.
    Broken(String),
    /// The thread that should have answered is gone, or met a fault of its own.
    Gone,
    /// A commit that failed: not known whether it took place.
    Unknown,
    /// Nothing is written at present.
    ReadOnly,
}

impl Fault {
    /// Whether the whole transaction is lost with it.
    pub(crate) const fn ends_the_batch(&self) -> bool {
        matches!(self, Self::Disk(_))
    }
}

impl fmt::Display for Fault {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Disk(words) => write!(f, "the store's disk or file did not work: {words}"),
            Self::Guard(words) => write!(f, "the database refused: {words}"),
            Self::Broken(words) => f.write_str(words),
            Self::Gone => f.write_str("the program met a fault of its own here; nothing was recorded"),
            Self::Unknown => f.write_str("it is not known whether this was recorded; send it again to find out"),
            Self::ReadOnly => f.write_str("the store can be read but nothing can be recorded at present"),
        }
    }
}

impl From<rusqlite::Error> for Fault {
    fn from(error: rusqlite::Error) -> Self {
        use rusqlite::ErrorCode as Code;
        let words = error.to_string();
        match &error {
            rusqlite::Error::SqliteFailure(code, message) => match code.code {
                Code::ConstraintViolation if code.extended_code == rusqlite::ffi::SQLITE_CONSTRAINT_TRIGGER => {
                    Self::Guard(message.clone().unwrap_or(words))
                }
                Code::SystemIoFailure
                | Code::DiskFull
                | Code::DatabaseCorrupt
                | Code::NotADatabase
                | Code::CannotOpen
                | Code::OutOfMemory
                | Code::ReadOnly
                | Code::DatabaseBusy
                | Code::DatabaseLocked => Self::Disk(words),
                _ => Self::Broken(words),
            },
            _ => Self::Broken(words),
        }
    }
}

impl From<std::io::Error> for Fault {
    fn from(error: std::io::Error) -> Self {
        Self::Disk(error.to_string())
    }
}

impl From<serde_json::Error> for Fault {
    fn from(error: serde_json::Error) -> Self {
        Self::Broken(format!("what is stored here cannot be read: {error}"))
    }
}

impl From<ChainFault> for Fault {
    fn from(fault: ChainFault) -> Self {
        Self::Broken(fault.to_string())
    }
}

/// Why something could not be read: something broke, it is never "there is none".
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
#[error("{0}")]
pub struct ReadFault(pub(crate) String);

impl From<Fault> for ReadFault {
    fn from(fault: Fault) -> Self {
        Self(fault.to_string())
    }
}
