//! Where a store stands: in its folder, or, when nothing can be written there, on a copy that is thrown away.
//!
//! A copy to read from is simpler than a database without a lock or log of its own: a log that a crash left is played
//! back in it, an older schema is brought up to date in it, and sessions and failed attempts, without which nobody could
//! sign in, are kept in it. Acts, photos, passwords and accounts are refused, since they would be gone with it.

use super::fault::OpenFault;
use super::folder::{Folder, Throwaway, closed_to_writing};
use super::migrate::{MIGRATIONS, schema_of};
use std::fs::OpenOptions;
use std::os::unix::fs::OpenOptionsExt;
use std::path::{Path, PathBuf};

/// Where a store stands.
#[derive(Debug)]
pub(crate) struct Ground {
    /// The data folder, taken or looked into.
    pub(crate) folder: Folder,
    /// The database that is worked with.
    pub(crate) database: PathBuf,
    /// Where copies before a migration go.
    pub(crate) copies: PathBuf,
    /// Goes with the store.
    pub(crate) _throwaway: Option<Throwaway>,
    /// Why nothing is recorded, when nothing can be.
    pub(crate) only_read: Option<String>,
}

impl Ground {
    /// The store in a folder, as far as the folder allows.
    pub(crate) fn in_folder(path: &Path) -> Result<Self, OpenFault> {
        if let Some(why) = closed_to_writing(path) {
            return Self::copied(Folder::look_into(path)?, why);
        }
        Self::taken(Folder::take(path)?, None)
    }

    /// A new store in a folder that goes with it.
    pub(crate) fn in_memory() -> Result<Self, OpenFault> {
        let throwaway = Throwaway::new()?;
        Self::taken(Folder::take(&throwaway.0)?, Some(throwaway))
    }

    /// As for a folder that cannot be written, whatever its modes.
    #[cfg(test)]
    pub(crate) fn look_into_for_test(path: &Path) -> Result<Self, OpenFault> {
        Self::copied(Folder::look_into(path)?, "planted".to_owned())
    }

    fn taken(folder: Folder, throwaway: Option<Throwaway>) -> Result<Self, OpenFault> {
        let (database, copies) = (folder.database()?, folder.path().join("backups"));
        schema_of(&database, MIGRATIONS.len())?;
        Ok(Self { folder, database, copies, _throwaway: throwaway, only_read: None })
    }

    fn copied(folder: Folder, why: String) -> Result<Self, OpenFault> {
        let from = folder.path().join("store.sqlite");
        let log = folder.path().join("store.sqlite-wal");
        let size = |file: &Path| std::fs::metadata(file).map_or(0, |m| m.len());
        // Twice, for the copy before a migration, and something to work with.
        let throwaway = Throwaway::with_room(2 * (size(&from) + size(&log)) + 64_000_000)?;
        let database = throwaway.0.join("store.sqlite");
        copy_private(&from, &database)?;
        if size(&log) > 0 {
            copy_private(&log, &throwaway.0.join("store.sqlite-wal"))?;
        }
        // Of the copy: what is written in the log alone cannot be looked up where no index of the log can be made.
        schema_of(&database, MIGRATIONS.len())?;
        let copies = throwaway.0.clone();
        Ok(Self { folder, database, copies, _throwaway: Some(throwaway), only_read: Some(why) })
    }
}

/// Copies content, not mode: what could only be read may be written in the copy, by its owner alone.
fn copy_private(from: &Path, to: &Path) -> std::io::Result<()> {
    let mut copy = OpenOptions::new().create_new(true).write(true).mode(0o600).open(to)?;
    std::io::copy(&mut std::fs::File::open(from)?, &mut copy).map(|_| ())
}
