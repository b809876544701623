//! Pages: a folder per noun, a file per screen or action.

pub mod about;
pub mod drives;
pub mod find;
pub mod findings;
pub mod holds;
pub mod home;
pub mod instruments;
pub mod journals;
pub mod packages;
pub mod parameters;
pub mod people;
pub mod photos;
pub mod queue;
pub mod records;
pub mod sessions;
pub mod sheets;
pub mod sites;
pub mod steps;
