//! What an operation gives at once: its answer to come, to be awaited or waited for.

use crate::fault::Fault;
use std::future::Future;
use std::pin::Pin;
use std::task::{Context, Poll};
use tokio::sync::oneshot;

/// An answer to come. `.await` it in async code; `.wait()` for it on a thread of your own.
#[must_use = "an answer nobody waits for may be an act nobody knows of"]
#[derive(Debug)]
pub struct Answer<T, F> {
    receiver: oneshot::Receiver<Result<T, F>>,
    gone: fn() -> F,
}

/// The other end.
pub(crate) type Reply<T, F> = oneshot::Sender<Result<T, F>>;

impl<T, F> Answer<T, F> {
    /// Blocks this thread until the answer is there. Not inside async code.
    ///
    /// # Errors
    /// As the operation says.
    pub fn wait(self) -> Result<T, F> {
        self.receiver.blocking_recv().unwrap_or_else(|_| Err((self.gone)()))
    }
}

#[expect(private_bounds, reason = "what breaks below stays in this crate; callers see the public faults it becomes")]
impl<T, F: From<Fault>> Answer<T, F> {
    /// A pair of ends. When the sender is dropped unanswered, the answer is a fault of the program.
    pub(crate) fn pair() -> (Reply<T, F>, Self) {
        let (sender, receiver) = oneshot::channel();
        (sender, Self { receiver, gone: || F::from(Fault::Gone) })
    }
}

impl<T, F> Future for Answer<T, F> {
    type Output = Result<T, F>;

    fn poll(mut self: Pin<&mut Self>, context: &mut Context<'_>) -> Poll<Self::Output> {
        let gone = self.gone;
        Pin::new(&mut self.receiver).poll(context).map(|got| got.unwrap_or_else(|_| Err(gone())))
    }
}
