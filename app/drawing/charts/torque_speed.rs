//! Torque and current against speed: what the motor can give within its limits, and what the load asks for.

use crate::chart::{Chart, Look};

/// Curves over speed in rpm; torque and current in percent of rated, so that one axis serves both.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct TorqueSpeed {
    /// What the motor gives along the start, within the current limit.
    pub motor: Vec<(f64, f64)>,
    /// What the load asks for.
    pub load: Vec<(f64, f64)>,
    /// Current at that load.
    pub current: Vec<(f64, f64)>,
    /// The set current limit, percent of rated motor current.
    pub current_limit: Option<f64>,
}

/// Draws them over each other; where they cross the start stalls.
#[must_use]
pub fn torque_against_speed(curves: &TorqueSpeed) -> Chart {
    let chart = Chart::new("Torque and current against speed", ("speed", "rpm"), ("of rated", "%"))
        .with("torque of the motor", Look::Line, curves.motor.clone())
        .with("torque of the load", Look::Dashed, curves.load.clone())
        .with("current", Look::Dashed, curves.current.clone());
    match curves.current_limit {
        Some(at) => chart.level(at, "current limit"),
        None => chart,
    }
}
