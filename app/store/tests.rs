//! Tests of the store: a test begins with who, and then does only what that person could do.

mod acts;
mod crash;
mod faults;
mod guards;
mod keeping;
mod lists;
mod migrations;
mod opening;
mod people;
mod photos;
mod plans;
mod property;
mod reading;
mod stage;
