//! Insulation resistance against time, in decades both ways: a dry winding rises, a wet one stays flat.

use crate::chart::{Chart, Look};

/// From (seconds, megohms) as read, with the lowest acceptable value at the winding's temperature where there is one.
#[must_use]
pub fn insulation_over_time(readings: &[(f64, f64)], limit: Option<(f64, &str)>) -> Chart {
    let chart = Chart::new("Insulation resistance over time", ("time", "s"), ("insulation resistance", "MΩ"))
        .x_in_decades()
        .y_in_decades()
        .with("as read", Look::Measured, readings.to_vec());
    match limit {
        Some((at, label)) if at > 0.0 => chart.level(at, label),
        _ => chart,
    }
}
