//! The list of sites.

mod list;
mod project;

pub use list::SiteRow;
pub(crate) use project::project;
