//! What is now: the fold of each chain, kept in memory by the head it was folded to.

mod chains;
mod fetch;
mod fold;
mod shelf;

pub(crate) use chains::{head_of, sealed_of};
pub use fetch::DriveView;
pub(crate) use fetch::procedure_of;
pub(crate) use fold::{Fold, state};
pub(crate) use shelf::Shelves;
