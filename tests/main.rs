//! The project's own tests across crates: its architecture, and the whole job from the outside.

#[cfg(test)]
mod architecture;
#[cfg(test)]
mod browser;
#[cfg(test)]
mod engineering_basis;
#[cfg(test)]
mod licences;
