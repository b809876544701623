//! What comes back on an even ramp down: peak power, energy and torque at the shaft (row RM-05).
//!
//! The ramp is taken as followed whatever it takes, and without motor and inverter losses: an upper bound. The gear's
//! losses are counted.

use super::available_torque::angular;
use super::time_to_speed::{STEPS, acceleration};
use super::train::Train;
use crate::quantity::{Duration, Energy, Power, Speed, Torque};

/// What comes back on the way down.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Returned {
    /// Highest braking power at the shaft; zero when the motor never brakes.
    pub peak: Power,
    /// All braking energy at the shaft.
    pub energy: Energy,
    /// Highest braking torque; negative when the motor has to drive all the way down.
    pub torque: Torque,
}

/// Peak power, energy and torque of an even ramp of this length.
#[must_use]
pub fn even_ramp(train: &Train, from: Speed, to: Speed, set: Duration) -> Returned {
    let change = from.rpm() - to.rpm();
    let slowing = change / set.seconds() / acceleration(1.0, train.inertia);
    let torque = |n: Speed| slowing - train.slowing(n).newton_metres();
    let halves = 2 * STEPS;
    let (mut peak, mut energy, mut highest) = (0.0_f64, 0.0, f64::NEG_INFINITY);
    for half in 0..=halves {
        let n = Speed::from_rpm(from.rpm() - change * f64::from(half) / f64::from(halves));
        let weight = if half == 0 || half == halves {
            1.0
        } else if half % 2 == 1 {
            4.0
        } else {
            2.0
        };
        let power = (torque(n) * angular(n)).max(0.0);
        (peak, highest) = (peak.max(power), highest.max(torque(n)));
        energy += weight * power * set.seconds() / f64::from(halves) / 3.0;
    }
    Returned {
        peak: Power::from_watts(peak),
        energy: Energy::from_joules(energy),
        torque: Torque::from_newton_metres(highest),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::motion::gear::Gear;
    use crate::motion::load_torque::LoadTorque;
    use crate::motion::resistor::{duty, largest, mean_power};
    use crate::quantity::{Inertia, Ratio, Voltage};

    fn train(load: f64, gear: Gear) -> Train {
        let (motor, driven) = (Inertia::from_kilogram_square_metres(1.5), Inertia::from_kilogram_square_metres(0.0));
        Train::new(motor, driven, LoadTorque::Constant(Torque::from_newton_metres(load)), None, gear)
    }

    /// C-RM-008 (rows RM-05, RM-06): 36.50 N·m, 5656 W, 14 141 J, at most 107.6 Ω; C-RM-009: 3600 W, 300 W, 8.33 %.
    #[test]
    fn braking_is_the_published_example() {
        let set = Duration::from_seconds(5.0);
        let back = even_ramp(&train(10.0, Gear::DIRECT), Speed::from_rpm(1480.0), Speed::from_rpm(0.0), set);
        assert!((back.peak.watts() - 5656.2748).abs() < 5.66);
        assert!((back.energy.joules() - 14_140.687).abs() < 14.1);
        assert!((back.torque.newton_metres() - 36.495_571).abs() < 0.0365);
        assert!((largest(Voltage::from_volts(780.0), back.peak).expect("peak").ohms() - 107.561_96).abs() < 0.108);
        assert!((mean_power(Energy::from_joules(18e3), set).watts() - 3600.0).abs() < 0.1);
        assert!((duty(set, Duration::from_seconds(60.0)).fraction() - 0.083_333_333).abs() < 1e-5);
    }

    #[test]
    fn a_load_that_stops_faster_than_the_ramp_returns_nothing() {
        let back = even_ramp(
            &train(100.0, Gear::DIRECT),
            Speed::from_rpm(1480.0),
            Speed::from_rpm(0.0),
            Duration::from_seconds(5.0),
        );
        assert!(
            back.peak.watts().abs() < 1e-12 && back.energy.joules().abs() < 1e-12 && back.torque.newton_metres() < 0.0
        );
    }

    #[test]
    fn an_overhauling_load_returns_more_and_a_lossy_gear_less_of_it() {
        let lossy = Gear { efficiency: Some(Ratio::from_fraction(0.8)), ..Gear::DIRECT };
        let torque = |load: f64, gear: Gear| {
            even_ramp(&train(load, gear), Speed::from_rpm(1480.0), Speed::from_rpm(0.0), Duration::from_seconds(5.0))
                .torque
                .newton_metres()
        };
        assert!((torque(-20.0, Gear::DIRECT) - torque(0.0, Gear::DIRECT) - 20.0).abs() < 1e-9);
        assert!((torque(-20.0, lossy) - torque(0.0, lossy) - 16.0).abs() < 1e-9);
    }
}
