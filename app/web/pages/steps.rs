//! One step a screen: what to do, its cautions, the limit, the reading, and what the checks make of it.

pub mod at;
pub mod brought;
pub mod changes;
pub mod footer;
pub mod frame;
pub mod inputs;
pub mod instruments;
pub mod keep;
pub mod live;
pub mod notices;
pub mod otherwise;
pub mod picture;
pub mod resume;
pub mod sent;
pub mod sheet;
pub mod show;
pub mod stay;
pub mod tick;

/// Most bytes of a step's form: two pictures and what is typed beside them.
pub const LARGEST_FORM: usize = 32 * 1024 * 1024;
