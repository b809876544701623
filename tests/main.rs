//! The project's own tests across crates: its architecture, and the whole job from the outside.

mod architecture;
#[cfg(test)]
mod browser;
mod engineering_basis;
mod licences;
