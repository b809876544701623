//! The load run: current measured at each speed over what the load curve predicts; and the harmonics as bars.

use crate::chart::{Chart, Look};

/// From (hertz, amperes); `low` and `high` bracket the prediction where there is one.
#[must_use]
pub fn load_run(measured: &[(f64, f64)], low: &[(f64, f64)], high: &[(f64, f64)], rated: Option<f64>) -> Chart {
    let chart = Chart::new("Load run", ("frequency", "Hz"), ("current", "A"))
        .with("measured", Look::Measured, measured.to_vec())
        .with("predicted, at least", Look::Dashed, low.to_vec())
        .with("predicted, at most", Look::Dashed, high.to_vec());
    match rated {
        Some(at) => chart.level(at, "rated current"),
        None => chart,
    }
}

/// From (order, percent of the fundamental): as measured, as expected, and the limit of each by IEEE 519.
#[must_use]
pub fn harmonics(measured: &[(f64, f64)], expected: &[(f64, f64)], limits: &[(f64, f64)]) -> Chart {
    Chart::new("Line current harmonics", ("order", ""), ("of the fundamental", "%"))
        .with("measured", Look::Bars, measured.to_vec())
        .with("expected", Look::Bars, expected.to_vec())
        .with("limit, IEEE 519", Look::Limits, limits.to_vec())
}
