//! The data folder: who may enter, who has it now, where things lie in it.

use super::fault::OpenFault;
use super::random::random_hex;
use crate::keeping::Space;
use std::fs::{DirBuilder, File, OpenOptions, TryLockError};
use std::os::unix::fs::{DirBuilderExt, OpenOptionsExt, PermissionsExt};
use std::path::{Path, PathBuf};

/// A data folder that this process has to itself until it is dropped.
#[derive(Debug)]
pub(crate) struct Folder {
    path: PathBuf,
    /// Held as long as the store is open; the system lets go of it when the process ends, however it ends.
    lock: File,
}

impl Folder {
    /// Takes the folder, making it if need be.
    pub(crate) fn take(path: &Path) -> Result<Self, OpenFault> {
        private_folder(path)?;
        private_folder(&path.join("photos"))?;
        private_folder(&path.join("backups"))?;
        let lock = OpenOptions::new().create(true).write(true).truncate(false).mode(0o600).open(path.join("lock"))?;
        match lock.try_lock() {
            Ok(()) => Ok(Self { path: path.to_owned(), lock }),
            Err(TryLockError::WouldBlock) => Err(OpenFault::InUse(path.display().to_string())),
            Err(TryLockError::Error(error)) => Err(error.into()),
        }
    }

    /// Looks into the folder and writes nothing; nobody who writes is in it meanwhile.
    pub(crate) fn look_into(path: &Path) -> Result<Self, OpenFault> {
        // A backup, or a folder copied to a disc, has no lock file, and nobody in it.
        let lock = match File::open(path.join("lock")) {
            Err(error) if error.kind() == std::io::ErrorKind::NotFound => File::open(path.join("store.sqlite"))?,
            other => other?,
        };
        match lock.try_lock_shared() {
            Ok(()) => Ok(Self { path: path.to_owned(), lock }),
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
        sync_folder(&self.path)?;
        Ok(path)
    }
}

/// Why nothing can be written to the store that is here; `None` when it can, or when there is none yet.
pub(crate) fn closed_to_writing(path: &Path) -> Option<String> {
    if !path.join("store.sqlite").exists() {
        return None;
    }
    ["", "photos", "store.sqlite", "lock"].into_iter().find_map(|name| {
        let part = if name.is_empty() { path.to_owned() } else { path.join(name) };
        let refused = rustix::fs::access(&part, rustix::fs::Access::WRITE_OK).err()?;
        let counts = matches!(refused, rustix::io::Errno::ROFS | rustix::io::Errno::ACCESS | rustix::io::Errno::PERM);
        counts.then(|| format!("{}: {}", part.display(), std::io::Error::from(refused)))
    })
}

impl Drop for Folder {
    fn drop(&mut self) {
        // Closing alone would not do: a child process that was just forked still has the file open for a moment.
        let _ = self.lock.unlock();
    }
}

/// Makes a folder for its owner alone, or makes one that is there so. The name of a new one lasts through a power cut.
pub(crate) fn private_folder(path: &Path) -> std::io::Result<()> {
    let new: Vec<&Path> = path.ancestors().take_while(|p| !p.as_os_str().is_empty() && !p.exists()).collect();
    DirBuilder::new().recursive(true).mode(0o700).create(path)?;
    std::fs::set_permissions(path, std::fs::Permissions::from_mode(0o700))?;
    for made in new {
        match made.parent() {
            Some(parent) if !parent.as_os_str().is_empty() => sync_folder(parent)?,
            _ => sync_folder(Path::new("."))?,
        }
    }
    Ok(())
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
        Self::inside(&if memory.is_dir() { memory.to_owned() } else { std::env::temp_dir() })
    }

    /// With room for so many bytes, in memory if it is there.
    pub(crate) fn with_room(bytes: u64) -> Result<Self, OpenFault> {
        let places = [PathBuf::from("/dev/shm"), std::env::temp_dir()];
        let roomy = places.iter().find(|place| Space::at(place).is_ok_and(|space| space.free > bytes));
        roomy.map_or(Err(OpenFault::NoRoomToRead { megabytes: bytes / 1_000_000 + 1 }), |place| Self::inside(place))
    }

    fn inside(parent: &Path) -> Result<Self, OpenFault> {
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
