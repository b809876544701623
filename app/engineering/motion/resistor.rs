//! The brake resistor: how large it may be, and what it has to stand (rows RM-05, RM-06).

use super::available_torque::angular;
use crate::quantity::{Duration, Energy, Power, Ratio, Resistance, Speed, Torque, Voltage};

/// R ≤ V²/P: a larger one does not take the peak power at the chopper's voltage. None without power to take.
#[must_use]
pub fn largest(chopper: Voltage, peak: Power) -> Option<Resistance> {
    (peak.watts() > 0.0).then(|| Resistance::from_ohms(chopper.volts() * chopper.volts() / peak.watts()))
}

/// P = V²/R: what the resistor takes while the chopper conducts all the time.
#[must_use]
pub fn power_taken(chopper: Voltage, resistor: Resistance) -> Power {
    Power::from_watts(chopper.volts() * chopper.volts() / resistor.ohms())
}

/// P = T·ω.
#[must_use]
pub fn shaft_power(torque: Torque, speed: Speed) -> Power {
    Power::from_watts(torque.newton_metres() * angular(speed))
}

/// P = E/t.
#[must_use]
pub fn mean_power(energy: Energy, time: Duration) -> Power {
    Power::from_watts(energy.joules() / time.seconds())
}

/// Braking time over cycle time.
#[must_use]
pub fn duty(braking: Duration, cycle: Duration) -> Ratio {
    Ratio::from_fraction(braking.seconds() / cycle.seconds())
}
