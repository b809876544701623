//! The ramp over time: as set, as predicted before the first start, as measured.

use crate::chart::{Chart, Look};

/// A quantity over seconds in its three forms.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Ramp {
    /// Heading: "Start", "Stop".
    pub title: String,
    /// What is drawn: "speed", "current", "DC bus".
    pub label: String,
    /// Its unit.
    pub unit: String,
    /// As set.
    pub set: Vec<(f64, f64)>,
    /// As predicted.
    pub predicted: Vec<(f64, f64)>,
    /// As measured.
    pub measured: Vec<(f64, f64)>,
    /// A level with its name: trip volts, current limit.
    pub level: Option<(f64, String)>,
}

/// Draws the three over each other.
#[must_use]
pub fn ramp(ramp: &Ramp) -> Chart {
    let chart = Chart::new(&ramp.title, ("time", "s"), (&ramp.label, &ramp.unit))
        .with("measured", Look::Measured, ramp.measured.clone())
        .with("predicted", Look::Dashed, ramp.predicted.clone())
        .with("as set", Look::Dashed, ramp.set.clone());
    match &ramp.level {
        Some((at, label)) => chart.level(*at, label),
        None => chart,
    }
}
