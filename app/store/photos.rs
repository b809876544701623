//! Photos: the bytes in files named by their hash, a row for each; never one without the other.

mod fetch;
mod keep;
mod kind;
mod settle;

pub(crate) use fetch::kept;
pub(crate) use keep::file_hash;
pub use keep::{LARGEST_PHOTO, PhotoFault};
pub use kind::media_of;
pub(crate) use settle::settle_after_a_crash;
