//! Instruments: testers and meters, their accuracy and when their calibration runs out.

pub mod accuracy;
pub mod edit;
pub mod list;
