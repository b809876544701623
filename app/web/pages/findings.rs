//! Findings: what is wrong or open; raised, settled, or accepted as it is, always by name.

pub mod accept;
pub mod at;
pub mod list;
pub mod raise;
pub mod settle;
pub mod show;
