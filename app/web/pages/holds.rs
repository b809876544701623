//! Hold points: what they wait for, what is declared, and the release by name.

pub mod conditions;
pub mod release;
pub mod show;
