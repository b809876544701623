//! The one thread that writes: takes what waits, a savepoint each, one commit for all, and answers only after it.

use super::crew::join_others;
use super::desk::Desk;
use crate::answer::{Answer, Reply};
use crate::fault::Fault;
use std::panic::{AssertUnwindSafe, catch_unwind};
use std::sync::Arc;
use std::sync::atomic::{AtomicBool, Ordering};
use std::sync::mpsc::{Receiver, Sender, channel};
use std::thread::{Builder, JoinHandle};

/// How many acts share a commit at most; more would let the first wait too long.
const MOST_TOGETHER: usize = 64;

/// Opens the writing connection anew after a fault.
type Desks = Box<dyn Fn() -> Result<Desk, Fault> + Send>;

/// How a job left its savepoint.
enum Left {
    Keep,
    Undo,
    BatchLost,
}

/// What became of the batch.
#[derive(Clone, Copy)]
enum End {
    Committed,
    Unknown,
    ReadOnly,
}

trait Job: Send {
    fn run(&mut self, desk: &mut Desk) -> Left;
    fn answer(self: Box<Self>, end: End);
}

/// A piece of writing: `Err(Fault)` undoes it; an inner `Err` is an answer that is kept like any other.
struct Task<T, F, W> {
    work: Option<W>,
    got: Option<Result<T, F>>,
    reply: Reply<T, F>,
}

impl<T, F, W> Job for Task<T, F, W>
where
    T: Send,
    F: From<Fault> + Send,
    W: FnOnce(&mut Desk) -> Result<Result<T, F>, Fault> + Send,
{
    fn run(&mut self, desk: &mut Desk) -> Left {
        let Some(work) = self.work.take() else { return Left::Undo };
        match catch_unwind(AssertUnwindSafe(|| work(desk))).unwrap_or(Err(Fault::Gone)) {
            Ok(got) => {
                self.got = Some(got);
                Left::Keep
            }
            Err(fault) => {
                let lost = fault.ends_the_batch();
                self.got = Some(Err(F::from(fault)));
                if lost { Left::BatchLost } else { Left::Undo }
            }
        }
    }

    fn answer(self: Box<Self>, end: End) {
        let got = match end {
            End::Committed => self.got.unwrap_or_else(|| Err(F::from(Fault::Gone))),
            End::Unknown => Err(F::from(Fault::Unknown)),
            End::ReadOnly => Err(F::from(Fault::ReadOnly)),
        };
        // Whoever asked may have gone meanwhile; what was committed stays and is found by its id.
        let _ = self.reply.send(got);
    }
}

/// The queue of the writing thread.
pub(crate) struct Writer {
    queue: Option<Sender<Box<dyn Job>>>,
    read_only: Arc<AtomicBool>,
    thread: Vec<JoinHandle<()>>,
}

impl Writer {
    /// Starts the thread with a connection, and how to open another after a fault.
    pub(crate) fn start(desk: Desk, open: Desks) -> std::io::Result<Self> {
        let (queue, jobs) = channel();
        let read_only = Arc::new(AtomicBool::new(false));
        let state = Arc::clone(&read_only);
        let thread = Builder::new().name("store-writer".to_owned()).spawn(move || serve(&jobs, desk, &open, &state))?;
        Ok(Self { queue: Some(queue), read_only, thread: vec![thread] })
    }

    /// A handle that only hands in work.
    pub(crate) fn handle(&self) -> WriterHandle {
        WriterHandle(self.queue.clone())
    }

    /// Whether writing stopped after a fault of the disk.
    pub(crate) fn is_read_only(&self) -> bool {
        self.read_only.load(Ordering::Acquire)
    }
}

/// Hands in work.
#[derive(Clone)]
pub(crate) struct WriterHandle(Option<Sender<Box<dyn Job>>>);

impl WriterHandle {
    /// Takes no work: whoever asks hears that nothing is recorded.
    pub(crate) const fn refusing() -> Self {
        Self(None)
    }

    /// Puts a piece of writing in the queue.
    pub(crate) fn give<T, F, W>(&self, work: W) -> Answer<T, F>
    where
        T: Send + 'static,
        F: From<Fault> + Send + 'static,
        W: FnOnce(&mut Desk) -> Result<Result<T, F>, Fault> + Send + 'static,
    {
        let (reply, answer) = Answer::pair();
        // Whoever asked may have gone already; then nobody is told.
        match &self.0 {
            Some(queue) => drop(queue.send(Box::new(Task { work: Some(work), got: None, reply }))),
            None => drop(reply.send(Err(F::from(Fault::ReadOnly)))),
        }
        answer
    }
}

impl Drop for Writer {
    fn drop(&mut self) {
        self.queue = None;
        join_others(&mut self.thread);
    }
}

fn serve(jobs: &Receiver<Box<dyn Job>>, first: Desk, open: &Desks, read_only: &AtomicBool) {
    let mut desk = Some(first);
    while let Ok(job) = jobs.recv() {
        let mut batch = vec![job];
        while batch.len() < MOST_TOGETHER {
            let Ok(job) = jobs.try_recv() else { break };
            batch.push(job);
        }
        if desk.is_none() {
            // A failed sync leaves the connection's own view in doubt: only a new one reads what is really there.
            desk = open().ok();
        }
        let end = match desk.as_mut() {
            None => End::ReadOnly,
            Some(working) => match together(working, &mut batch) {
                Ok(()) => End::Committed,
                Err(_) => {
                    desk = None;
                    End::Unknown
                }
            },
        };
        read_only.store(desk.is_none(), Ordering::Release);
        for job in batch {
            job.answer(end);
        }
    }
}

/// One transaction for all that wait.
fn together(desk: &mut Desk, batch: &mut [Box<dyn Job>]) -> Result<(), Fault> {
    desk.connection.execute_batch("BEGIN IMMEDIATE")?;
    let done = one_by_one(desk, batch).and_then(|()| Ok(desk.connection.execute_batch("COMMIT")?));
    if done.is_err() && !desk.connection.is_autocommit() {
        let _ = desk.connection.execute_batch("ROLLBACK");
    }
    done
}

fn one_by_one(desk: &mut Desk, batch: &mut [Box<dyn Job>]) -> Result<(), Fault> {
    for job in batch {
        desk.connection.execute_batch("SAVEPOINT act")?;
        match job.run(desk) {
            Left::Keep => desk.connection.execute_batch("RELEASE act")?,
            Left::Undo => desk.connection.execute_batch("ROLLBACK TO act; RELEASE act")?,
            Left::BatchLost => return Err(Fault::Unknown),
        }
    }
    Ok(())
}
