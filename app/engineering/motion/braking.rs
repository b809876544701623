//! What comes back on a set ramp down: peak power, energy and torque at the shaft (row RM-05).
//!
//! The ramp is taken as followed whatever it takes, and without motor and inverter losses: an upper bound. The gear's
//! losses are counted.

use super::available_torque::angular;
use super::set_ramp::{SetRamp, done, slope};
use super::time_to_speed::{STEPS, acceleration};
use super::train::Train;
use crate::quantity::{Energy, Power, Ratio, Speed, Torque};

/// What comes back on the way down.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Returned {
    /// Highest braking power at the shaft; zero when the motor never brakes.
    pub peak: Power,
    /// All braking energy at the shaft.
    pub energy: Energy,
    /// Highest braking torque; negative when the motor has to drive all the way down.
    pub torque: Torque,
    /// The speed at which it is that high.
    pub at: Speed,
    /// The ramp's own slope there over its mean one; 1 all along a straight ramp.
    pub slope: Ratio,
}

/// Peak power, energy and torque of a ramp set like this.
#[must_use]
pub fn even_ramp(train: &Train, from: Speed, to: Speed, set: impl Into<SetRamp>) -> Returned {
    let (set, change) = (set.into(), from.rpm() - to.rpm());
    let mean = change / set.time.seconds() / acceleration(1.0, train.inertia);
    let halves = 2 * STEPS;
    let (mut peak, mut energy) = (0.0_f64, 0.0);
    let mut highest = (f64::NEG_INFINITY, from, 1.0);
    for half in 0..=halves {
        let x = f64::from(half) / f64::from(halves);
        let (n, slope) = (Speed::from_rpm(from.rpm() - change * done(set.s_curve, x)), slope(set.s_curve, x));
        let weight = if half == 0 || half == halves {
            1.0
        } else if half % 2 == 1 {
            4.0
        } else {
            2.0
        };
        let torque = mean * slope - train.slowing(n).newton_metres();
        let power = (torque * angular(n)).max(0.0);
        peak = peak.max(power);
        if torque > highest.0 {
            highest = (torque, n, slope);
        }
        energy += weight * power * set.time.seconds() / f64::from(halves) / 3.0;
    }
    Returned {
        peak: Power::from_watts(peak),
        energy: Energy::from_joules(energy),
        torque: Torque::from_newton_metres(highest.0),
        at: highest.1,
        slope: Ratio::from_fraction(highest.2),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::motion::gear::Gear;
    use crate::motion::load_torque::LoadTorque;
    use crate::motion::resistor::{duty, largest, mean_power};
    use crate::quantity::{Duration, Inertia, Voltage};

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
