//! Makes a backup: a checked copy of the database and every photo it names, into a folder of its own.

use super::copy::{copy_to_part, finish_copy};
use super::fault::BackupFault;
use crate::answer::Answer;
use crate::journal::{remember_head, stream_head, verify_journal};
use crate::opening::{Purpose, connect, private_folder, sync_folder, write_down};
use crate::photos;
use crate::store::Store;
use commissioning::Timestamp;
use commissioning::journal::Head;
use rusqlite::Connection;
use std::fs::File;
use std::path::{Path, PathBuf};

/// What a backup holds: keep the head with it, it tells later whether anything was lost.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct BackupReceipt {
    /// Where it is.
    pub folder: PathBuf,
    /// The end of the stream in it.
    pub stream: Head,
    /// How many photos.
    pub photos: u64,
    /// Size of everything in bytes.
    pub bytes: u64,
}

impl Store {
    /// Makes a checked backup in a new or empty folder, while work goes on.
    pub fn backup(&self, to: &Path, now: Timestamp) -> Answer<BackupReceipt, BackupFault> {
        let to = to.to_owned();
        self.keep(move |store| backup(store, &to, now))
    }

    /// As `backup`, waiting.
    ///
    /// # Errors
    /// When the folder holds something, the copy is unsound, or the disk fails.
    pub fn backup_blocking(&self, to: &Path, now: Timestamp) -> Result<BackupReceipt, BackupFault> {
        self.backup(to, now).wait()
    }
}

fn backup(store: &Store, to: &Path, now: Timestamp) -> Result<BackupReceipt, BackupFault> {
    private_folder(to)?;
    if std::fs::read_dir(to)?.next().is_some() {
        return Err(BackupFault::NotEmpty(to.display().to_string()));
    }
    let source = connect(store.database(), Purpose::Read)?;
    // One read transaction: the copy is of one moment, and acts meanwhile do not make it start over.
    let moment = source.unchecked_transaction().map_err(crate::fault::Fault::from)?;
    stream_head(&moment)?;
    let database = to.join("store.sqlite");
    let part = copy_to_part(&moment, &database)?;
    drop(moment);

    let copy = Connection::open(&part).map_err(crate::fault::Fault::from)?;
    let (faults, _) = verify_journal(&copy)?;
    if let Some(fault) = faults.first() {
        return Err(BackupFault::Unsound(fault.clone()));
    }
    let stream = stream_head(&copy)?;
    let kept = photos::kept(&copy)?;
    drop(copy);

    copy_photos(&store.folder().join("photos"), &to.join("photos"), &kept)?;
    finish_copy(&part, &database)?;
    sync_folder(to)?;
    let bytes = std::fs::metadata(&database)?.len() + kept.iter().map(|(_, size)| size).sum::<u64>();
    let receipt = BackupReceipt { folder: to.to_owned(), stream, photos: kept.len() as u64, bytes };
    write_receipt(store, &receipt, now)?;
    Ok(receipt)
}

/// Copies photos, each checked against its hash and synced.
pub(crate) fn copy_photos(from: &Path, to: &Path, kept: &[(String, u64)]) -> Result<(), BackupFault> {
    private_folder(to)?;
    for (hash, _) in kept {
        let bytes = std::fs::read(from.join(hash))
            .map_err(|e| BackupFault::Unsound(format!("the photo {hash} cannot be read: {e}")))?;
        if photos::file_hash(&bytes) != *hash {
            return Err(BackupFault::Unsound(format!("the photo {hash} was changed")));
        }
        std::fs::write(to.join(hash), bytes)?;
        File::open(to.join(hash))?.sync_all()?;
    }
    sync_folder(to)?;
    Ok(())
}

fn write_receipt(store: &Store, receipt: &BackupReceipt, now: Timestamp) -> Result<(), BackupFault> {
    let (place, stream) = (format!("backup {}", receipt.folder.display()), receipt.stream.clone());
    let words = format!("{place}: {} events, {} photos", stream.sequence, receipt.photos);
    store
        .writing()
        .give(move |desk| {
            if stream.sequence > 0 {
                remember_head(&desk.connection, &place, &stream, now)?;
            }
            write_down(&desk.connection, now, "backup", &words)?;
            Ok(Ok::<_, BackupFault>(()))
        })
        .wait()
}
