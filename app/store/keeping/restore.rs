//! Restores a backup into an empty folder, and writes down in the store that it came from one.

use super::backup::copy_photos;
use super::copy::{finish_copy, sound};
use super::fault::BackupFault;
use crate::fault::Fault;
use crate::journal::{stream_head, verify_journal};
use crate::opening::{MIGRATIONS, private_folder, schema_of, sync_folder, write_down};
use crate::photos;
use crate::store::Store;
use commissioning::Timestamp;
use commissioning::journal::Head;
use rusqlite::Connection;
use std::os::unix::fs::PermissionsExt;
use std::path::Path;

impl Store {
    /// Restores a backup into a new or empty folder; gives the head of the stream that it holds.
    ///
    /// # Errors
    /// When the folder holds something, the backup is none or unsound, or the disk fails.
    pub fn restore(from: &Path, to: &Path, now: Timestamp) -> Result<Head, BackupFault> {
        let source = from.join("store.sqlite");
        if !source.is_file() {
            return Err(BackupFault::NoBackup(format!("There is no store.sqlite in {}.", from.display())));
        }
        for ending in ["-wal", "-shm", "-journal"] {
            let beside = from.join(format!("store.sqlite{ending}"));
            if beside.exists() {
                return Err(BackupFault::NoBackup(format!(
                    "{} lies beside the store: this is a copy of a store in use, not a backup. Use a folder that `backup` made.",
                    beside.display()
                )));
            }
        }
        schema_of(&source, MIGRATIONS.len())?;
        private_folder(to)?;
        if std::fs::read_dir(to)?.next().is_some() {
            return Err(BackupFault::NotEmpty(to.display().to_string()));
        }
        let part = to.join("store.sqlite.part");
        std::fs::copy(&source, &part)?;
        std::fs::set_permissions(&part, std::fs::Permissions::from_mode(0o600))?;
        let restored = settle(&part, from, to, now);
        if restored.is_err() {
            // Half a restore is none: the folder is left empty, to try again.
            let _ = std::fs::remove_file(&part);
            let _ = std::fs::remove_dir_all(to.join("photos"));
        }
        restored
    }
}

fn settle(part: &Path, from: &Path, to: &Path, now: Timestamp) -> Result<Head, BackupFault> {
    let copy = Connection::open(part).map_err(Fault::from)?;
    sound(&copy).map_err(|fault| BackupFault::Unsound(fault.to_string()))?;
    if let Some(fault) = verify_journal(&copy)?.0.first() {
        return Err(BackupFault::Unsound(fault.clone()));
    }
    let stream = stream_head(&copy)?;
    copy_photos(&from.join("photos"), &to.join("photos"), &photos::kept(&copy)?)?;
    write_down(&copy, now, "restored", &format!("from a backup that ends at event {} of the stream", stream.sequence))?;
    copy.close().map_err(|(_, error)| Fault::from(error))?;
    finish_copy(part, &to.join("store.sqlite"))?;
    sync_folder(to)?;
    Ok(stream)
}
