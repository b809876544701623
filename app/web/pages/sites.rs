//! Sites: their list, their own sheets, their drives' beginnings.

pub mod board;
pub mod create;
pub mod list;
pub mod new_drive;
pub mod sheet;
