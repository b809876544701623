//! The store itself: one folder, one writing thread, a few reading ones.

use crate::answer::Answer;
use crate::fault::{Fault, ReadFault};
use crate::opening::{Ground, MIGRATIONS, OpenFault, Purpose, bring_up_to_date, connect};
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

/// Dropped in this order: threads first, then the ground with its lock and a throw-away folder. The writing connection closes last
/// and alone: of two that close at one time neither finds itself the last, and the write-ahead log would be left.
struct Inner {
    readers: Crew<Desk>,
    hashers: Crew<()>,
    keepers: Crew<()>,
    writer: Writer,
    ground: Ground,
}

impl Store {
    /// Opens the store in a folder, making both if they are not there. One process at a time. A store that is there but
    /// cannot be written is opened to be read: `only_read` says so.
    ///
    /// # Errors
    /// In a sentence for whoever started the program: in use, newer, not ours, or broken.
    pub fn open(folder: &Path, now: Timestamp) -> Result<Self, OpenFault> {
        Self::open_on(Ground::in_folder(folder)?, now)
    }

    /// Opens a store in a throw-away folder, in memory where the system can; it goes with the last handle.
    ///
    /// # Errors
    /// As for `open`.
    pub fn in_memory(now: Timestamp) -> Result<Self, OpenFault> {
        Self::open_on(Ground::in_memory()?, now)
    }

    fn open_on(ground: Ground, now: Timestamp) -> Result<Self, OpenFault> {
        if rusqlite::version_number() < OLDEST_SQLITE {
            return Err(OpenFault::OldSqlite(rusqlite::version().to_owned()));
        }
        let file = ground.database.clone();
        let mut connection = connect(&file, Purpose::Write)?;
        bring_up_to_date(&mut connection, MIGRATIONS, &ground.copies, now)?;
        if ground.only_read.is_none() {
            photos::settle_after_a_crash(&connection, &ground.folder.path().join("photos"), now)?;
        }

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
            ground,
        };
        Ok(Self { inner: Arc::new(inner) })
    }

    /// The data folder.
    #[must_use]
    pub fn folder(&self) -> &Path {
        self.inner.ground.folder.path()
    }

    /// The database file that is worked with: the folder's own, or a copy where that can only be read.
    pub(crate) fn database(&self) -> &Path {
        &self.inner.ground.database
    }

    /// Whether nothing is recorded at present: writing stopped after a fault of the disk, and the next act tries again,
    /// or the store was opened to be read.
    #[must_use]
    pub fn is_read_only(&self) -> bool {
        self.only_read().is_some() || self.inner.writer.is_read_only()
    }

    /// Why this store was opened only to be read, if it was: nothing can be written to its folder.
    #[must_use]
    pub fn only_read(&self) -> Option<&str> {
        self.inner.ground.only_read.as_deref()
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

    /// Hands in work for the writing thread that may be forgotten with a copy: sessions, attempts, receipts.
    pub(crate) fn writing(&self) -> WriterHandle {
        self.inner.writer.handle()
    }

    /// Hands in work for the writing thread that is to stay; refused where the store can only be read.
    pub(crate) fn recording(&self) -> WriterHandle {
        if self.only_read().is_some() { WriterHandle::refusing() } else { self.writing() }
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
