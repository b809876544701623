//! What the record knows of motor, load and gear: each figure optional, each missing one named where it is missed.

use super::available_torque::Motor;
use super::gear::{EFFICIENCY_TAKEN, Gear, mass_as_inertia};
use super::load_torque::LoadTorque;
use super::train::Train;
use crate::formulas::magnetising::{self, Bracket};
use crate::formulas::plausible;
use crate::outcome::OutcomeBuilder;
use crate::quantity::{Current, Inertia, LinearSpeed, Mass, Power, Ratio, Speed, Torque};
use crate::rounding::significant;
use crate::sources::motion::{GEAR_LOSSES, RATED_TORQUE, RM_02, VF_02, VF_03};

/// Everything about the drive train that ramps need; nothing is required until a check asks for it.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Machine {
    /// Rated power of the motor.
    pub rated_power: Option<Power>,
    /// Rated speed of the motor.
    pub rated_speed: Option<Speed>,
    /// Rated current of the motor.
    pub rated_current: Option<Current>,
    /// Rated power factor of the motor.
    pub power_factor: Option<Ratio>,
    /// Breakdown over rated torque, λ; assumed when the plate is silent.
    pub breakdown: Option<Ratio>,
    /// Magnetising current as identified or measured uncoupled; takes the place of the bracket from the plate.
    pub magnetising_current: Option<Current>,
    /// The drive's current limit.
    pub current_limit: Option<Current>,
    /// Inertia of the motor.
    pub motor_inertia: Option<Inertia>,
    /// Inertia of the load at its own shaft.
    pub load_inertia: Option<Inertia>,
    /// Torque of the load at its own shaft.
    pub load: Option<LoadTorque>,
    /// Breakaway torque at the load's own shaft.
    pub breakaway: Option<Torque>,
    /// What stands between motor and load; a direct coupling is assumed.
    pub gear: Option<Gear>,
    /// A mass moved in a straight line.
    pub linear: Option<Linear>,
    /// Whether the load can drive the motor: a falling load, a downhill belt.
    pub overhauling: bool,
    /// Torque at the load's own shaft when it does; how large, not which way.
    pub overhauling_torque: Option<Torque>,
}

/// A mass that the train moves in a straight line.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Linear {
    /// The mass.
    pub mass: Option<Mass>,
    /// Its speed.
    pub speed: Option<LinearSpeed>,
    /// Speed of the motor that belongs to it.
    pub motor: Option<Speed>,
}

impl Machine {
    /// The motor, with its lines of working; missing figures are named in `b`.
    pub fn motor(&self, b: &mut OutcomeBuilder) -> Option<Motor> {
        b.cite(RATED_TORQUE);
        b.cite(VF_02);
        b.cite(VF_03);
        let power = plausible::positive(b, self.rated_power, "rated motor power");
        let speed = plausible::positive(b, self.rated_speed, "rated motor speed");
        let bracket = self.magnetising(b);
        let current = plausible::positive(b, self.rated_current, "rated motor current");
        let breakdown = plausible::breakdown(b, self.breakdown);
        let motor = Motor::from_plate(power?, speed?, current?, breakdown?, bracket?);
        b.line(
            "rated torque",
            "T_N = 60·P/(2π·n)",
            format!("60 × {} W/(2π × {} rpm)", significant(power?.watts(), 4), significant(speed?.rpm(), 4)),
            newton_metres(motor.rated_torque),
        );
        Some(motor)
    }

    fn magnetising(&self, b: &mut OutcomeBuilder) -> Option<Bracket> {
        let Some(known) = self.magnetising_current else {
            return magnetising::work_out(b, self.rated_current, self.power_factor, self.breakdown);
        };
        let rated = self.rated_current.map_or(f64::INFINITY, Current::amperes);
        let sound = known.amperes() >= 0.0 && known.amperes() < rated;
        let known = b.need(sound.then_some(known), "magnetising current below rated current")?;
        Some(Bracket { low: known, high: known })
    }

    /// The train for a ramp down: a load that can drive the motor is taken at its worst, pulling all the way.
    pub fn braked_train(&self, b: &mut OutcomeBuilder) -> Option<Train> {
        if !self.overhauling {
            return self.train(b);
        }
        b.note("The load can drive the motor: judged with it pulling all the way down.");
        let pull = plausible::positive(b, self.overhauling_torque, "torque of the load when it drives the motor");
        let load = pull.map(|t| LoadTorque::Constant(Torque::from_newton_metres(-t.newton_metres())));
        self.train_with(b, load)
    }

    /// Inertia and load at the motor's shaft, with their lines of working.
    pub fn train(&self, b: &mut OutcomeBuilder) -> Option<Train> {
        let load = b.need(self.load.clone(), "load torque");
        self.train_with(b, load)
    }

    fn train_with(&self, b: &mut OutcomeBuilder, load: Option<LoadTorque>) -> Option<Train> {
        b.cite(RM_02);
        let motor = plausible::positive(b, self.motor_inertia, "motor inertia");
        let driven = plausible::not_negative(b, self.load_inertia, "load inertia");
        let linear = self.linear(b);
        let load =
            load.and_then(|l| b.need(Some(l).filter(LoadTorque::is_sound), "load torque with a speed above zero"));
        let breakaway = match self.breakaway {
            None => None,
            Some(t) => Some(plausible::not_negative(b, Some(t), "breakaway torque")?),
        };
        let gear = b.assume(self.gear, Gear::DIRECT, "gear", "direct coupling, ratio 1, no losses");
        let gear =
            b.need(Some(gear).filter(Gear::is_sound), "gear with a ratio above zero and an efficiency from 0 to 1")?;
        if gear.efficiency.is_none() {
            b.cite(GEAR_LOSSES);
            b.assume(None, (), "gear efficiency", EFFICIENCY_TAKEN);
        }
        let (motor, driven, linear) = (motor?, driven?, linear?);
        let turning = motor.kilogram_square_metres() + linear.kilogram_square_metres();
        let train = Train::new(Inertia::from_kilogram_square_metres(turning), driven, load?, breakaway, gear);
        let (own, in_a_line) = (significant(motor.kilogram_square_metres(), 4), linear.kilogram_square_metres());
        let (formula, in_a_line) = if in_a_line > 0.0 {
            ("J = J_M + m·(v/ω)² + J_L/i²", format!(" + {} kg·m²", significant(in_a_line, 4)))
        } else {
            ("J = J_M + J_L/i²", String::new())
        };
        b.line(
            "inertia at the motor's shaft",
            formula,
            format!(
                "{own} kg·m²{in_a_line} + {} kg·m²/{}²",
                significant(driven.kilogram_square_metres(), 4),
                significant(gear.ratio.fraction(), 4)
            ),
            format!("{} kg·m²", significant(train.inertia.kilogram_square_metres(), 4)),
        );
        Some(train)
    }

    /// The mass in a straight line as inertia at the motor's shaft; nothing where there is none.
    fn linear(&self, b: &mut OutcomeBuilder) -> Option<Inertia> {
        let none = Inertia::from_kilogram_square_metres(0.0);
        let Some(linear) = self.linear else { return Some(none) };
        let mass = plausible::not_negative(b, linear.mass, "mass moved in a line");
        let speed = plausible::not_negative(b, linear.speed, "speed of the mass moved in a line");
        let motor = plausible::positive(b, linear.motor, "motor speed that goes with the mass moved in a line");
        let (mass, speed, motor) = (mass?, speed?, motor?);
        let inertia = mass_as_inertia(mass, speed, motor);
        b.line(
            "mass moved in a line, as inertia at the motor's shaft",
            "J = m·(60·v/(2π·n))²",
            format!(
                "{} kg × (60 × {} m/s/(2π × {} rpm))²",
                significant(mass.kilograms(), 4),
                significant(speed.metres_per_second(), 3),
                significant(motor.rpm(), 4)
            ),
            format!("{} kg·m²", significant(inertia.kilogram_square_metres(), 4)),
        );
        Some(inertia)
    }

    /// The current limit.
    pub fn limit(&self, b: &mut OutcomeBuilder) -> Option<Current> {
        plausible::positive(b, self.current_limit, "current limit")
    }
}

/// Torque in words.
pub(crate) fn newton_metres(torque: Torque) -> String {
    format!("{} N·m", significant(torque.newton_metres(), 4))
}

#[cfg(test)]
pub(crate) mod tests {
    use super::*;

    /// A 15 kW fan drive with every figure known.
    pub(crate) fn fan() -> Machine {
        Machine {
            rated_power: Some(Power::from_watts(15e3)),
            rated_speed: Some(Speed::from_rpm(1470.0)),
            rated_current: Some(Current::from_amperes(28.5)),
            power_factor: Some(Ratio::from_fraction(0.85)),
            breakdown: Some(Ratio::from_fraction(3.0)),
            magnetising_current: None,
            current_limit: Some(Current::from_amperes(31.0)),
            motor_inertia: Some(Inertia::from_kilogram_square_metres(0.1)),
            load_inertia: Some(Inertia::from_kilogram_square_metres(3.9)),
            load: Some(LoadTorque::Quadratic {
                torque: Torque::from_newton_metres(70.0),
                speed: Speed::from_rpm(1470.0),
            }),
            breakaway: Some(Torque::from_newton_metres(10.0)),
            gear: Some(Gear::DIRECT),
            linear: None,
            overhauling: false,
            overhauling_torque: None,
        }
    }

    /// Dubey, Fundamentals of Electrical Drives, Ex. 2.1 (C-RM-001): 1000 kg at 1.5 m/s and 1420 rpm are 0.1018 kg·m².
    #[test]
    fn a_mass_in_a_line_counts_as_inertia_and_names_what_it_lacks() {
        let linear = Linear {
            mass: Some(Mass::from_kilograms(1000.0)),
            speed: Some(LinearSpeed::from_metres_per_second(1.5)),
            motor: Some(Speed::from_rpm(1420.0)),
        };
        let mut b = OutcomeBuilder::new("x");
        let train = Machine { linear: Some(linear), ..fan() }.train(&mut b).expect("complete");
        assert!((train.inertia.kilogram_square_metres() - 4.0 - 0.101_75).abs() < 1e-4, "{train:?}");
        assert!(Machine { linear: Some(Linear { speed: None, ..linear }), ..fan() }.train(&mut b).is_none());
        assert_eq!(b.not_assessed().missing[0].what, "speed of the mass moved in a line");
    }

    #[test]
    fn an_overhauling_load_pulls_on_the_way_down_and_says_when_nobody_knows_how_hard() {
        let mut b = OutcomeBuilder::new("x");
        let hoist = Machine { overhauling: true, overhauling_torque: Some(Torque::from_newton_metres(20.0)), ..fan() };
        let n = Speed::from_rpm(700.0);
        assert!((hoist.braked_train(&mut b).expect("complete").slowing(n).newton_metres() + 20.0).abs() < 1e-9);
        assert!(fan().braked_train(&mut b).expect("complete").slowing(n).newton_metres() > 0.0);
        assert!(Machine { overhauling_torque: None, ..hoist }.braked_train(&mut b).is_none());
        assert_eq!(b.not_assessed().missing[0].what, "torque of the load when it drives the motor");
    }

    #[test]
    fn a_gear_efficiency_that_nobody_stated_is_said_openly() {
        let mut b = OutcomeBuilder::new("x");
        let gear = Some(Gear { ratio: Ratio::from_fraction(10.0), efficiency: None });
        assert!(Machine { gear, ..fan() }.train(&mut b).is_some());
        assert_eq!(b.not_assessed().assumed[0].what, "gear efficiency");
    }

    #[test]
    fn every_missing_figure_is_named_at_once() {
        let mut b = OutcomeBuilder::new("x");
        let empty = Machine::default();
        assert!(empty.motor(&mut b).is_none() && empty.train(&mut b).is_none() && empty.limit(&mut b).is_none());
        let outcome = b.not_assessed();
        for what in [
            "rated motor power",
            "rated motor speed",
            "rated motor current",
            "rated power factor",
            "motor inertia",
            "load inertia",
            "load torque",
            "current limit",
        ] {
            assert!(outcome.missing.iter().any(|m| m.what == what), "{what}");
        }
        for what in ["breakdown torque ratio λ", "gear"] {
            assert!(outcome.assumed.iter().any(|a| a.what == what), "{what}");
        }
    }

    #[test]
    fn an_identified_magnetising_current_replaces_the_bracket() {
        let mut b = OutcomeBuilder::new("x");
        let machine = Machine { magnetising_current: Some(Current::from_amperes(11.0)), power_factor: None, ..fan() };
        let motor = machine.motor(&mut b).expect("complete");
        assert!(
            (motor.magnetising.low.amperes() - 11.0).abs() < 1e-12 && motor.magnetising.low == motor.magnetising.high
        );
        assert!(Machine { magnetising_current: Some(Current::from_amperes(30.0)), ..fan() }.motor(&mut b).is_none());
    }
}
