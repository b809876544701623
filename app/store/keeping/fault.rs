//! Why a backup or a restore did not come about.

use crate::fault::{Fault, ReadFault};
use crate::opening::OpenFault;

/// Why a backup or a restore did not come about.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum BackupFault {
    /// The folder to write to holds something.
    #[error("The folder {0} is not empty. Name a new or empty one.")]
    NotEmpty(String),
    /// The folder to read from is a copied live store, or no backup at all.
    #[error("{0}")]
    NoBackup(String),
    /// What was copied does not hold together.
    #[error("The copy does not hold together and was not used: {0}")]
    Unsound(String),
    /// The copy is whole, but the store it is of could not be told.
    #[error("The backup in {0} is whole, but could not be noted in the store: {1}. Note its date and head yourself.")]
    NotNoted(String, String),
    /// The disk or the file.
    #[error("The files could not be written or read: {0}")]
    Broken(String),
}

impl From<Fault> for BackupFault {
    fn from(fault: Fault) -> Self {
        Self::Broken(fault.to_string())
    }
}

impl From<ReadFault> for BackupFault {
    fn from(fault: ReadFault) -> Self {
        Self::Broken(fault.to_string())
    }
}

impl From<OpenFault> for BackupFault {
    fn from(fault: OpenFault) -> Self {
        Self::NoBackup(fault.to_string())
    }
}

impl From<std::io::Error> for BackupFault {
    fn from(error: std::io::Error) -> Self {
        Self::Broken(error.to_string())
    }
}
