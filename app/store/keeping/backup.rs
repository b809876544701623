//! Makes a backup: a checked copy of the database and every photo it names, into a folder of its own.

use super::copy::{copy_to_part, finish_copy};
use super::fault::BackupFault;
use crate::answer::Answer;
use crate::fault::Fault;
use crate::journal::{remember_head, stream_head, verify_journal};
use crate::opening::{
    MIGRATIONS, Purpose, connect, private_folder, schema_of, schema_version, sync_folder, write_down,
};
use crate::photos;
use crate::store::Store;
use commissioning::Timestamp;
use commissioning::journal::Head;
use rusqlite::{Connection, Transaction, TransactionBehavior};
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

/// Makes a checked backup of a store that another process has open, and goes on with. That it was made is noted in the
/// store as well, in one short transaction of its own.
///
/// # Errors
/// When there is no store of this program's schema, the folder to write to holds something, the copy is unsound, or the
/// disk fails.
pub fn backup_beside(folder: &Path, to: &Path, now: Timestamp) -> Result<BackupReceipt, BackupFault> {
    let database = folder.join("store.sqlite");
    schema_of(&database, MIGRATIONS.len())?;
    let connection = connect(&database, Purpose::Write)?;
    if usize::try_from(schema_version(&connection)?).ok() != Some(MIGRATIONS.len()) {
        return Err(BackupFault::NoBackup(
            "The running program is of another version than this one. Make the backup with its own.".to_owned(),
        ));
    }
    let receipt = copied(&database, &folder.join("photos"), to)?;
    let noted = || {
        let noting = Transaction::new_unchecked(&connection, TransactionBehavior::Immediate)?;
        note(&noting, &receipt, now)?;
        Ok::<(), Fault>(noting.commit()?)
    };
    match noted() {
        Ok(()) => Ok(receipt),
        Err(fault) => Err(BackupFault::NotNoted(to.display().to_string(), fault.to_string())),
    }
}

fn backup(store: &Store, to: &Path, now: Timestamp) -> Result<BackupReceipt, BackupFault> {
    let receipt = copied(store.database(), &store.folder().join("photos"), to)?;
    let noted = receipt.clone();
    store.writing().give(move |desk| Ok(Ok::<_, BackupFault>(note(&desk.connection, &noted, now)?))).wait()?;
    Ok(receipt)
}

fn copied(database: &Path, photos_folder: &Path, to: &Path) -> Result<BackupReceipt, BackupFault> {
    private_folder(to)?;
    if std::fs::read_dir(to)?.next().is_some() {
        return Err(BackupFault::NotEmpty(to.display().to_string()));
    }
    let source = connect(database, Purpose::Read)?;
    // One read transaction: the copy is of one moment, and acts meanwhile do not make it start over.
    let moment = source.unchecked_transaction().map_err(Fault::from)?;
    stream_head(&moment)?;
    let copy_here = to.join("store.sqlite");
    let part = copy_to_part(&moment, &copy_here)?;
    drop(moment);

    let copy = Connection::open(&part).map_err(Fault::from)?;
    let (faults, _) = verify_journal(&copy)?;
    if let Some(fault) = faults.first() {
        return Err(BackupFault::Unsound(fault.clone()));
    }
    let stream = stream_head(&copy)?;
    let kept = photos::kept(&copy)?;
    drop(copy);

    copy_photos(photos_folder, &to.join("photos"), &kept)?;
    finish_copy(&part, &copy_here)?;
    sync_folder(to)?;
    let bytes = std::fs::metadata(&copy_here)?.len() + kept.iter().map(|(_, size)| size).sum::<u64>();
    Ok(BackupReceipt { folder: to.to_owned(), stream, photos: kept.len() as u64, bytes })
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

/// Notes the backup in the store that it is of, with the end of the stream that it holds.
fn note(connection: &Connection, receipt: &BackupReceipt, now: Timestamp) -> Result<(), Fault> {
    let place = format!("backup {}", receipt.folder.display());
    if receipt.stream.sequence > 0 {
        remember_head(connection, &place, &receipt.stream, now)?;
    }
    write_down(
        connection,
        now,
        "backup",
        &format!("{place}: {} events, {} photos", receipt.stream.sequence, receipt.photos),
    )
}
