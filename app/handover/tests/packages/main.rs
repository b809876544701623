//! Whole packages of an invented drive: read with common tools, verified, changed and caught.

mod document;
mod plant;
mod proof;
mod tools;
