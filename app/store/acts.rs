//! Acts: each is decided, kept and answered once, however often it is sent.

mod content;
mod fault;
mod guard;
mod outcome;
mod perform;

pub use fault::PerformFault;
#[cfg(test)]
pub(crate) use guard::guarded as guarded_for_test;
pub use outcome::Receipt;
pub use perform::Proof;
