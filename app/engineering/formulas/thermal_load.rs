//! What a varying load amounts to for heating: root mean square, and the short-time rating (rows RM-09, OL-06).

use crate::quantity::{Duration, Power, Torque};

/// √(ΣT²·t/Σt) over the parts of a cycle; zero without any.
#[must_use]
pub fn root_mean_square(cycle: &[(Torque, Duration)]) -> Torque {
    let squares: f64 = cycle.iter().map(|(t, d)| t.newton_metres() * t.newton_metres() * d.seconds()).sum();
    let time: f64 = cycle.iter().map(|(_, d)| d.seconds()).sum();
    Torque::from_newton_metres(if time > 0.0 { (squares / time).sqrt() } else { 0.0 })
}

/// P = P_N·√(1/(1 − e^(−t/τ))): from cold, losses with the square of load.
#[must_use]
pub fn short_time_rating(continuous: Power, heating: Duration, run: Duration) -> Power {
    let reached = 1.0 - libm::exp(-run.seconds() / heating.seconds());
    Power::from_watts(continuous.watts() * (1.0 / reached).sqrt())
}
