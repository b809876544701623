//! The web pages: one screen a file; a handler extracts, makes one call, and shows a page or redirects.
//!
//! Addresses stand in `routes.rs`, links in `links.rs`, who may open what in `access.rs`. No SQL, no formula and no
//! permission decided in markup.

pub mod access;
pub mod app;
pub mod clock_words;
pub mod components;
pub mod conflict_page;
pub mod cookies;
pub mod error_page;
pub mod extract;
pub mod headers;
pub mod links;
pub mod packaging;
pub mod page_error;
pub mod pages;
pub mod pictures;
pub mod posted;
pub mod progress;
pub mod routes;
pub mod serve;
pub mod sessions;
pub mod sheet_form;
pub mod sheet_words;
pub mod static_files;
pub mod unanswered;
pub mod verdicts;
pub mod visitor;

#[cfg(test)]
#[expect(clippy::disallowed_methods, reason = "the world of the tests is its own program: it makes the ids")]
mod tests;

pub use app::App;
pub use page_error::PageError;
pub use routes::router;
pub use serve::serve;
