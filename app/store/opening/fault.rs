//! Why a store could not be opened, in sentences for whoever started the program.

use crate::fault::Fault;

/// Why a store could not be opened.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum OpenFault {
    /// Another process has it.
    #[error("The data folder {0} is in use by another Asleft. Stop that one first, or choose another folder.")]
    InUse(String),
    /// A later program wrote it.
    #[error(
        "The store was written by a newer Asleft (schema {found}; this one knows up to {known}). Use the newer program; the file was left as it is."
    )]
    Newer {
        /// In the file.
        found: u32,
        /// In this program.
        known: u32,
    },
    /// The file belongs to something else.
    #[error("{0} is not a store of Asleft; it was left as it is.")]
    NotOurs(String),
    /// The database library is too old to be trusted with concurrent readers.
    #[error("The SQLite built in is {0}; at least 3.51.3 is needed.")]
    OldSqlite(String),
    /// A setting did not take.
    #[error("The database setting {name} reads {found}, not {wanted}.")]
    Setting {
        /// Which.
        name: String,
        /// As read back.
        found: String,
        /// As set.
        wanted: String,
    },
    /// The store can only be read, and the copy to read from has no place.
    #[error(
        "Nothing can be written to the data folder, and the copy of the store to read from needs {megabytes} MB in memory or among the temporary files. Make room, or set TMPDIR to a folder that has it."
    )]
    NoRoomToRead {
        /// How much.
        megabytes: u64,
    },
    /// The disk or the file.
    #[error("The data folder could not be opened: {0}")]
    Broken(String),
}

impl From<Fault> for OpenFault {
    fn from(fault: Fault) -> Self {
        Self::Broken(fault.to_string())
    }
}

impl From<std::io::Error> for OpenFault {
    fn from(error: std::io::Error) -> Self {
        Self::Broken(error.to_string())
    }
}

impl From<rusqlite::Error> for OpenFault {
    fn from(error: rusqlite::Error) -> Self {
        Self::from(Fault::from(error))
    }
}
