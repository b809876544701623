//! The store itself: one folder, one writing thread, a few reading ones.

use crate::answer::Answer;
use crate::fault::{Fault, ReadFault};
use crate::opening::{Folder, MIGRATIONS, OpenFault, Purpose, Throwaway, bring_up_to_date, connect, schema_of};
use crate::photos;
use crate::states::Shelves;
use crate::work::{Crew, Desk, Writer, WriterHandle};
use commissioning::Timestamp;
use std::path::Path;
use std::sync::Arc;

/// Connections for pages; two served twice as many reads as one shared connection did.
const READERS: usize = 2;
/// Password hashes worked out at once: each takes 19 MiB.
const HASHERS: usize = 2;
/// Threads for photos, backups and the store's own check.
const KEEPERS: usize = 2;
/// The first SQLite without the race at the reset of the write-ahead log.
const OLDEST_SQLITE: i32 = 3_051_003;

/// A store. Cloning gives another handle on the same one; it closes with the last.
#[derive(Clone)]
pub struct Store {
    inner: Arc<Inner>,
}

/// Dropped in this order: threads first, then the lock, then a throw-away folder. The writing connection closes last
/// and alone: of two that close at one time neither finds itself the last, and the write-ahead log would be left.
struct Inner {
    readers: Crew<Desk>,
    hashers: Crew<()>,
    keepers: Crew<()>,
    writer: Writer,
    folder: Folder,
    _throwaway: Option<Throwaway>,
}

impl Store {
    /// Opens the store in a folder, making both if they are not there. One process at a time.
    ///
    /// # Errors
    /// In a sentence for whoever started the program: in use, newer, not ours, or broken.
    pub fn open(folder: &Path, now: Timestamp) -> Result<Self, OpenFault> {
        Self::open_in(Folder::take(folder)?, None, now)
    }

    /// Opens a store in a throw-away folder, in memory where the system can; it goes with the last handle.
    ///
    /// # Errors
    /// As for `open`.
    pub fn in_memory(now: Timestamp) -> Result<Self, OpenFault> {
        let throwaway = Throwaway::new()?;
        Self::open_in(Folder::take(&throwaway.0)?, Some(throwaway), now)
    }

    fn open_in(folder: Folder, throwaway: Option<Throwaway>, now: Timestamp) -> Result<Self, OpenFault> {
        if rusqlite::version_number() < OLDEST_SQLITE {
            return Err(OpenFault::OldSqlite(rusqlite::version().to_owned()));
        }
        let file = folder.database()?;
        schema_of(&file, MIGRATIONS.len())?;
        let mut connection = connect(&file, Purpose::Write)?;
        bring_up_to_date(&mut connection, MIGRATIONS, &folder.path().join("backups"), now)?;
        photos::settle_after_a_crash(&connection, &folder.path().join("photos"), now)?;

        let shelves = Arc::new(Shelves::default());
        let mut readers = Vec::new();
        for _ in 0..READERS {
            readers.push(Desk { connection: connect(&file, Purpose::Read)?, shelves: Arc::clone(&shelves) });
        }
        let first = Desk { connection, shelves: Arc::clone(&shelves) };
        let again = Box::new(move || {
            let connection = connect(&file, Purpose::Write).map_err(|e| Fault::Broken(e.to_string()))?;
            Ok(Desk { connection, shelves: Arc::clone(&shelves) })
        });
        let inner = Inner {
            writer: Writer::start(first, again)?,
            readers: Crew::start("store-reader", readers)?,
            hashers: Crew::start("store-hasher", vec![(); HASHERS])?,
            keepers: Crew::start("store-keeper", vec![(); KEEPERS])?,
            folder,
            _throwaway: throwaway,
        };
        Ok(Self { inner: Arc::new(inner) })
    }

    /// The data folder.
    #[must_use]
    pub fn folder(&self) -> &Path {
        self.inner.folder.path()
    }

    /// Whether writing stopped after a fault of the disk; the next act tries again.
    #[must_use]
    pub fn is_read_only(&self) -> bool {
        self.inner.writer.is_read_only()
    }

    /// Reads on one of the reading connections, at one moment.
    pub(crate) fn read<T, R>(&self, read: R) -> Answer<T, ReadFault>
    where
        T: Send + 'static,
        R: FnOnce(&Desk) -> Result<T, Fault> + Send + 'static,
    {
        let (reply, answer) = Answer::pair();
        // Without a crew the reply is dropped, and the answer says so.
        let _ = self.inner.readers.give(move |desk| {
            let _ = reply.send(desk.at_one_moment(read).map_err(ReadFault::from));
        });
        answer
    }

    /// Hands in work for the writing thread.
    pub(crate) fn writing(&self) -> WriterHandle {
        self.inner.writer.handle()
    }

    /// Runs on a thread for password hashes.
    pub(crate) fn hash<T, F, W>(&self, work: W) -> Answer<T, F>
    where
        T: Send + 'static,
        F: From<Fault> + Send + 'static,
        W: FnOnce(&Self) -> Result<T, F> + Send + 'static,
    {
        self.on(&self.inner.hashers, work)
    }

    /// Runs on a thread for files.
    pub(crate) fn keep<T, F, W>(&self, work: W) -> Answer<T, F>
    where
        T: Send + 'static,
        F: From<Fault> + Send + 'static,
        W: FnOnce(&Self) -> Result<T, F> + Send + 'static,
    {
        self.on(&self.inner.keepers, work)
    }

    fn on<T, F, W>(&self, crew: &Crew<()>, work: W) -> Answer<T, F>
    where
        T: Send + 'static,
        F: From<Fault> + Send + 'static,
        W: FnOnce(&Self) -> Result<T, F> + Send + 'static,
    {
        let (reply, answer) = Answer::pair();
        let store = self.clone();
        let _ = crew.give(move |()| {
            let got = work(&store);
            drop(store);
            let _ = reply.send(got);
        });
        answer
    }
}

impl std::fmt::Debug for Store {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        f.debug_struct("Store").field("folder", &self.folder()).finish_non_exhaustive()
    }
}
