//! Tests of the pages: each begins with who, and then does only what that person can do through the router.

mod access;
mod accounts;
mod conflicts;
mod doors;
mod every_page;
mod going_on;
mod guidance;
mod in_words;
mod job;
mod pictures;
mod record_pages;
mod review;
mod serving;
mod sheets;
mod steps;
pub mod world;
