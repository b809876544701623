//! A crew of threads fed by one queue; each has something of its own to work with.

use crate::fault::Fault;
use std::panic::{AssertUnwindSafe, catch_unwind};
use std::sync::mpsc::{Receiver, Sender, channel};
use std::sync::{Arc, Mutex, PoisonError};
use std::thread::{Builder, JoinHandle};

type Job<C> = Box<dyn FnOnce(&mut C) + Send>;

/// Threads that take jobs from one queue.
pub(crate) struct Crew<C> {
    queue: Option<Sender<Job<C>>>,
    threads: Vec<JoinHandle<()>>,
}

impl<C: Send + 'static> Crew<C> {
    /// Starts a thread for each thing to work with.
    pub(crate) fn start(name: &str, tools: Vec<C>) -> std::io::Result<Self> {
        let (queue, jobs) = channel::<Job<C>>();
        let jobs = Arc::new(Mutex::new(jobs));
        let mut threads = Vec::new();
        for mut tool in tools {
            let jobs = Arc::clone(&jobs);
            threads.push(Builder::new().name(name.to_owned()).spawn(move || {
                while let Some(job) = next(&jobs) {
                    // A panic in one job ends that job; whoever waits for it hears that the program met a fault.
                    let _ = catch_unwind(AssertUnwindSafe(|| job(&mut tool)));
                }
            })?);
        }
        Ok(Self { queue: Some(queue), threads })
    }

    /// Puts a job in the queue.
    pub(crate) fn give(&self, job: impl FnOnce(&mut C) + Send + 'static) -> Result<(), Fault> {
        self.queue.as_ref().ok_or(Fault::Gone)?.send(Box::new(job)).map_err(|_| Fault::Gone)
    }
}

fn next<C>(jobs: &Mutex<Receiver<Job<C>>>) -> Option<Job<C>> {
    jobs.lock().unwrap_or_else(PoisonError::into_inner).recv().ok()
}

impl<C> Drop for Crew<C> {
    fn drop(&mut self) {
        self.queue = None;
        join_others(&mut self.threads);
    }
}

/// Waits for threads to end, except for the one that asks: the last handle may be dropped by a job of the crew itself.
pub(crate) fn join_others(threads: &mut Vec<JoinHandle<()>>) {
    let me = std::thread::current().id();
    for thread in threads.drain(..).filter(|t| t.thread().id() != me) {
        let _ = thread.join();
    }
}
