//! The journal: acts, the events they became, and the hash chains that hold the events.

pub mod act;
pub mod chain;
pub mod event;

pub use act::{Act, Change, Deed};
pub use chain::{Chain, ChainFault, Head, Sealed, seal, verify_chain};
pub use event::{Event, Fact};
