//! A drive's own page: where its record stands, and the way to everything else about it.

pub mod aside;
pub mod phases;
pub mod show;
