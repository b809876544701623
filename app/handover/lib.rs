//! The handover package: one document per drive and its data, made and verified without the store.
//!
//! The same material gives the same bytes. Nothing here knows a database, a web component or the clock.

pub mod charts;
pub mod key;
pub mod material;
pub mod package;
pub mod pdf;
pub mod verify;

mod archive;
mod coverage;
mod events;
mod instructions;
mod parameters_csv;
mod sheet;

pub use events::write as write_events;
pub use key::{Fingerprint, KeyFault};
pub use material::{Material, Photograph};
pub use package::{AssembleFault, Package, assemble};
pub use verify::{Report, verify};
