//! The demo: an invented terminal with eight drives, loaded through the same acts as a person's.
//!
//! Nothing is written around the acts: what decides on a person's entry decides here too, in the same order, with
//! the same hold points, isolation and signatures. Times run over the invented weeks before the moment given.

mod calendar;
mod case;
mod crew;
mod gear;
mod hand;
mod picture;
mod site;
mod story;
#[cfg(test)]
mod tests;
mod walk;

use commissioning::Timestamp;
use store::Store;

/// What was loaded, and who may look at it.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Demo {
    /// Tag of the invented site, as in its address.
    pub site_tag: String,
    /// Invented people with the passwords of the demo.
    pub people: Vec<DemoPerson>,
}

/// An invented person of the demo.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct DemoPerson {
    /// Name to sign in with.
    pub login: String,
    /// Password, for the demo only.
    pub password: String,
    /// Printed name.
    pub name: String,
    /// What they may be, in words.
    pub role: String,
}

/// Why the demo was not loaded.
#[derive(Debug, thiserror::Error)]
pub enum DemoFault {
    /// There is something in the store already.
    #[error("the demo is loaded into an empty store only; this one is set up already")]
    NotEmpty,
    /// A table of the demo does not hold together.
    #[error("the demo's table “{0}” is faulty: {1}")]
    Table(String, String),
    /// An act was refused or could not be kept.
    #[error("the demo could not go on at {0}: {1}")]
    Stopped(String, String),
}

/// Loads the demo into an empty store and waits until it is there. `now` is the moment at which the story has
/// arrived: every act is dated before it.
///
/// # Errors
/// When the store is not empty, or an act was refused.
pub fn load(store: &Store, now: Timestamp) -> Result<Demo, DemoFault> {
    let installation =
        store.installation_blocking().map_err(|e| DemoFault::Stopped("opening".to_owned(), e.to_string()))?;
    if !installation.firm.is_empty() {
        return Err(DemoFault::NotEmpty);
    }
    story::tell(store, now)
}
