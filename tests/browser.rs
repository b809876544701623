//! The whole job through a real browser, against the program as it is built: Debian's Chromium and its driver.

mod accepted_package;
mod answers;
mod every_page;
mod form;
mod measure;
mod new_store;
mod program;
mod tablet;
mod walk;
mod without_script;

use tokio::sync::Mutex;

/// Browsers are large: one test at a time has one.
pub static TURN: Mutex<()> = Mutex::const_new(());

/// The site of the demo.
pub const SITE: &str = "/sites/gannet-haven";

/// Upright in the hand, lying on a table, and a telephone.
pub const UPRIGHT: (u32, u32) = (768, 1024);
pub const LYING: (u32, u32) = (1024, 768);
pub const TELEPHONE: (u32, u32) = (390, 844);
