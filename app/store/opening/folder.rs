//! The data folder: who may enter, who has it now, where things lie in it.

use super::fault::OpenFault;
use super::random::random_hex;
use std::fs::{DirBuilder, File, OpenOptions, TryLockError};
use std::os::unix::fs::{DirBuilderExt, OpenOptionsExt, PermissionsExt};
use std::path::{Path, PathBuf};

/// A data folder that this process has to itself until it is dropped.
#[derive(Debug)]
pub(crate) struct Folder {
    path: PathBuf,
    /// Held as long as the store is open; the system lets go of it when the process ends, however it ends.
    _lock: File,
}

impl Folder {
    /// Takes the folder, making it if need be.
    pub(crate) fn take(path: &Path) -> Result<Self, OpenFault> {
        private_folder(path)?;
        private_folder(&path.join("photos"))?;
        private_folder(&path.join("backups"))?;
        let lock = OpenOptions::new().create(true).write(true).truncate(false).mode(0o600).open(path.join("lock"))?;
        match lock.try_lock() {
            Ok(()) => Ok(Self { path: path.to_owned(), _lock: lock }),
            Err(TryLockError::WouldBlock) => Err(OpenFault::InUse(path.display().to_string())),
            Err(TryLockError::Error(error)) => Err(error.into()),
        }
    }

    /// Where it is.
    pub(crate) fn path(&self) -> &Path {
        &self.path
    }

    /// The database file; made empty with mode 0600 beforehand, since SQLite would follow the umask.
    pub(crate) fn database(&self) -> Result<PathBuf, OpenFault> {
        let path = self.path.join("store.sqlite");
        let file = OpenOptions::new().create(true).append(true).mode(0o600).open(&path)?;
        file.set_permissions(std::fs::Permissions::from_mode(0o600))?;
        Ok(path)
    }
}

/// Makes a folder for its owner alone, or makes one that is there so.
pub(crate) fn private_folder(path: &Path) -> std::io::Result<()> {
    DirBuilder::new().recursive(true).mode(0o700).create(path)?;
    std::fs::set_permissions(path, std::fs::Permissions::from_mode(0o700))
}

/// Makes names in a folder durable.
pub(crate) fn sync_folder(path: &Path) -> std::io::Result<()> {
    File::open(path)?.sync_all()
}

/// A folder that goes when it is dropped.
#[derive(Debug)]
pub(crate) struct Throwaway(pub(crate) PathBuf);

impl Throwaway {
    /// In memory where the system has a file system in memory, else among the temporary files.
    pub(crate) fn new() -> Result<Self, OpenFault> {
        let memory = Path::new("/dev/shm");
        let parent = if memory.is_dir() { memory.to_owned() } else { std::env::temp_dir() };
        let path = parent.join(format!("asleft-{}", random_hex(12)?));
        private_folder(&path)?;
        Ok(Self(path))
    }
}

impl Drop for Throwaway {
    fn drop(&mut self) {
        let _ = std::fs::remove_dir_all(&self.0);
    }
}
