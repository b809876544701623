//! The handover package: what is in it, and the file itself.

pub mod download;
pub mod material;
pub mod show;
