//! Every published source that a check cites, one file per area. Identifiers are the rows of docs/engineering-basis.

pub mod bus;
pub mod earthing;
pub mod insulation;
pub mod motion;
pub mod nameplate;
pub mod runs;
pub mod sensors;
pub mod settings;
pub mod supply;
pub mod windings;
