//! Gears and hoists: what the motor's shaft feels of a load that turns at another speed (row RM-02).

use super::available_torque::angular;
use crate::limit::Limit;
use crate::quantity::{Inertia, LinearSpeed, Mass, Ratio, Speed, Torque};
use crate::sources::motion::GEAR_LOSSES;

/// Efficiency of a gear whose maker's figure nobody entered, where losses weigh against the motor.
pub const USUAL_EFFICIENCY: Limit =
    Limit { name: "gear efficiency, when not stated", value: 0.85, unit: "1", source: GEAR_LOSSES };
/// What is said where it stands in.
pub const EFFICIENCY_TAKEN: &str =
    "85 % where losses weigh against the motor, no losses where the load drives it (common practice)";

/// Which way power goes through the gear.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Flow {
    /// From motor to load: losses come on top.
    Motoring,
    /// From load to motor: losses go off.
    Regenerating,
}

/// A gear, belt or coupling.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Gear {
    /// Motor speed over load speed.
    pub ratio: Ratio,
    /// Output over input power, the same both ways; not stated, each flow takes the end that is harder on the motor.
    pub efficiency: Option<Ratio>,
}

impl Gear {
    /// A direct coupling.
    pub const DIRECT: Self = Self { ratio: Ratio::from_fraction(1.0), efficiency: Some(Ratio::from_fraction(1.0)) };

    /// Whether it can be calculated with.
    #[must_use]
    pub fn is_sound(&self) -> bool {
        let ratio = self.ratio.fraction();
        let efficiency = self.efficiency.map_or(USUAL_EFFICIENCY.value, Ratio::fraction);
        ratio.is_finite() && ratio > 0.0 && efficiency > 0.0 && efficiency <= 1.0
    }

    /// Speed of the load at this motor speed.
    #[must_use]
    pub fn load_speed(&self, motor: Speed) -> Speed {
        Speed::from_rpm(motor.rpm() / self.ratio.fraction())
    }

    /// J/i²: what the motor feels of the load's inertia.
    #[must_use]
    pub fn reflected_inertia(&self, load: Inertia) -> Inertia {
        let ratio = self.ratio.fraction();
        Inertia::from_kilogram_square_metres(load.kilogram_square_metres() / (ratio * ratio))
    }

    /// T/(i·η) while the motor drives, T·η/i while the load does.
    #[must_use]
    pub fn reflected_torque(&self, load: Torque, flow: Flow) -> Torque {
        // A load that drives the motor through a gear of unknown losses is taken to lose nothing on the way.
        let drives = flow == Flow::Regenerating && load.newton_metres() < 0.0;
        let unknown = if drives { 1.0 } else { USUAL_EFFICIENCY.value };
        let efficiency = self.efficiency.map_or(unknown, Ratio::fraction);
        let share = if flow == Flow::Motoring { 1.0 / efficiency } else { efficiency };
        Torque::from_newton_metres(load.newton_metres() * share / self.ratio.fraction())
    }
}

/// m·(v/ω)²: a mass moved in a straight line, as inertia at the motor's shaft.
#[must_use]
pub fn mass_as_inertia(mass: Mass, speed: LinearSpeed, motor: Speed) -> Inertia {
    let arm = speed.metres_per_second() / angular(motor);
    Inertia::from_kilogram_square_metres(mass.kilograms() * arm * arm)
}

/// m·g·v/(ω·η) while hoisting, m·g·v·η/ω while lowering, at the motor's shaft.
#[must_use]
pub fn hoisting_torque(mass: Mass, speed: LinearSpeed, motor: Speed, efficiency: Ratio, flow: Flow) -> Torque {
    /// Weight per kilogram, to the digits the trade uses.
    const GRAVITY: f64 = 9.81;
    let lossless = mass.kilograms() * GRAVITY * speed.metres_per_second() / angular(motor);
    let share = if flow == Flow::Motoring { 1.0 / efficiency.fraction() } else { efficiency.fraction() };
    Torque::from_newton_metres(lossless * share)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Dubey, Fundamentals of Electrical Drives, Ex. 2.1 (C-RM-001): 0.402 kg·m² and 117.53 N·m.
    #[test]
    fn a_gear_and_a_hoist_as_published() {
        let motor = Speed::from_rpm(1420.0);
        let gear = Gear { ratio: Ratio::from_fraction(10.0), efficiency: Some(Ratio::from_fraction(0.9)) };
        let (mass, speed) = (Mass::from_kilograms(1000.0), LinearSpeed::from_metres_per_second(1.5));
        let inertia = 0.2
            + gear.reflected_inertia(Inertia::from_kilogram_square_metres(10.0)).kilogram_square_metres()
            + mass_as_inertia(mass, speed, motor).kilogram_square_metres();
        assert!((inertia - 0.401_753_32).abs() < 1e-4, "{inertia}");
        let torque = gear.reflected_torque(Torque::from_newton_metres(10.0), Flow::Motoring).newton_metres()
            + hoisting_torque(mass, speed, motor, Ratio::from_fraction(0.85), Flow::Motoring).newton_metres();
        assert!((torque - 117.530_25).abs() < 0.05, "{torque}");
    }

    #[test]
    fn losses_help_to_brake() {
        let gear = Gear { ratio: Ratio::from_fraction(20.0), efficiency: Some(Ratio::from_fraction(0.8)) };
        let load = Torque::from_newton_metres(200.0);
        assert!((gear.reflected_torque(load, Flow::Motoring).newton_metres() - 12.5).abs() < 1e-9);
        assert!((gear.reflected_torque(load, Flow::Regenerating).newton_metres() - 8.0).abs() < 1e-9);
    }

    /// Common practice, no source: what nobody entered is taken where it is harder on the motor.
    #[test]
    fn unknown_losses_never_help() {
        let gear = Gear { ratio: Ratio::from_fraction(20.0), efficiency: None };
        let (drags, pulls) = (Torque::from_newton_metres(200.0), Torque::from_newton_metres(-200.0));
        assert!((gear.reflected_torque(drags, Flow::Motoring).newton_metres() - 10.0 / 0.85).abs() < 1e-9);
        assert!((gear.reflected_torque(drags, Flow::Regenerating).newton_metres() - 8.5).abs() < 1e-9);
        assert!((gear.reflected_torque(pulls, Flow::Regenerating).newton_metres() + 10.0).abs() < 1e-9);
        assert!(gear.is_sound() && !Gear { efficiency: Some(Ratio::from_fraction(1.2)), ..gear }.is_sound());
    }
}
