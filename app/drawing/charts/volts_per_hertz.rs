//! Volts over hertz: the nameplate's line, the points as set and as measured, the end of the speed range.

use crate::chart::{Chart, Look};

/// The curve is (hertz, volts); `set` are set points with their names, `measured` what was read on the output.
#[must_use]
pub fn volts_per_hertz(
    plate: &[(f64, f64)],
    set: &[(f64, f64)],
    measured: &[(f64, f64)],
    marks: &[(f64, String)],
) -> Chart {
    let chart = Chart::new("Volts per hertz", ("frequency", "Hz"), ("voltage", "V"))
        .with("nameplate", Look::Dashed, plate.to_vec())
        .with("as set", Look::Line, set.to_vec())
        .with("measured", Look::Points, measured.to_vec());
    marks.iter().fold(chart, |chart, (at, label)| chart.upright(*at, label))
}
