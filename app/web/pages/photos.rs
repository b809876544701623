//! Pictures: the copy that pages show, and the original to take away.

pub mod original;
pub mod show;
