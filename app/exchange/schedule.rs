//! Understanding a schedule's layout: where its header stands, which column is which field, in which unit.
//!
//! What is found is a proposal; a person corrects it, and the corrected [`Mapping`] is remembered by the header's
//! fingerprint, so that the next revision of the same list needs no second correction.

mod header;
mod mapping;
mod propose;
mod spelling;
mod target;
#[cfg(test)]
mod tests;
mod units;
mod vocabulary;

pub use mapping::{DecimalSign, MappedColumn, Mapping};
pub use propose::{Proposal, ProposedColumn, UnitFrom, best_sheet, propose, propose_at};
pub use target::Target;
pub use units::unit_of;

pub(crate) use spelling::{bare, folded};
