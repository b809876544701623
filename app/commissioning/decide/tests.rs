//! Tests of what may happen and who may do it.

mod entries;
mod fields;
mod findings;
mod holds;
mod isolation;
mod keys;
mod moves;
mod outside;
mod parameters;
mod people;
mod roles;
mod signing;
