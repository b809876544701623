//! A motor off its rated frequency: volts, torque, power and speed (rows VF-01 to VF-03, VF-05, VF-06).

use crate::formulas::synchronous::synchronous_speed;
use crate::quantity::{Frequency, Power, Ratio, Speed, Voltage};

/// In proportion up to base frequency, rated voltage from there.
#[must_use]
pub fn voltage(rated: Voltage, base: Frequency, output: Frequency) -> Voltage {
    Voltage::from_volts(rated.volts() * (output.hertz() / base.hertz()).min(1.0))
}

/// Torque over rated torque at constant power: 1 up to base frequency, f_b/f from there.
#[must_use]
pub fn torque_share(base: Frequency, output: Frequency) -> Ratio {
    Ratio::from_fraction((base.hertz() / output.hertz()).min(1.0))
}

/// Breakdown torque over that at base frequency, without stator resistance: 1, then (f_b/f)².
#[must_use]
pub fn breakdown_share(base: Frequency, output: Frequency) -> Ratio {
    let share = torque_share(base, output).fraction();
    Ratio::from_fraction(share * share)
}

/// Power at rated torque on a stretched base frequency.
#[must_use]
pub fn stretched_power(rated_power: Power, rated: Frequency, base: Frequency) -> Power {
    Power::from_watts(rated_power.watts() * base.hertz() / rated.hertz())
}

/// Speed at constant flux: the field's, less the rated slip speed in proportion to torque.
#[must_use]
pub fn speed(frequency: Frequency, pole_pairs: u32, rated_slip: Speed, torque: Ratio) -> Speed {
    Speed::from_rpm(synchronous_speed(frequency, pole_pairs).rpm() - torque.fraction() * rated_slip.rpm())
}

/// The frequency for a wanted speed at constant flux.
#[must_use]
pub fn frequency(wanted: Speed, pole_pairs: u32, rated_slip: Speed, torque: Ratio) -> Frequency {
    Frequency::from_hertz((wanted.rpm() + torque.fraction() * rated_slip.rpm()) * f64::from(pole_pairs) / 60.0)
}
