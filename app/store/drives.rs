//! Lists of drives: the board of a site, the review queue, search, one person's open work.

mod board;
mod find;
mod order;
mod page;
pub(crate) mod project;
mod queue;
mod row;

pub use board::BoardFilter;
pub use find::FoundRow;
pub use page::Page;
pub use queue::QueueRow;
pub use row::{BoardRow, PhaseCell, StatusKey};
