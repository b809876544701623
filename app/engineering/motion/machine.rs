//! What the record knows of motor, load and gear: each figure optional, each missing one named where it is missed.

use super::available_torque::Motor;
use super::gear::Gear;
use super::load_torque::LoadTorque;
use super::train::Train;
use crate::formulas::magnetising::{self, Bracket};
use crate::formulas::plausible;
use crate::outcome::OutcomeBuilder;
use crate::quantity::{Current, Inertia, Power, Ratio, Speed, Torque};
use crate::rounding::significant;
use crate::sources::motion::{RATED_TORQUE, RM_02, VF_02, VF_03};

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

    /// Inertia and load at the motor's shaft, with their lines of working.
    pub fn train(&self, b: &mut OutcomeBuilder) -> Option<Train> {
        b.cite(RM_02);
        let motor = plausible::positive(b, self.motor_inertia, "motor inertia");
        let driven = plausible::not_negative(b, self.load_inertia, "load inertia");
        let load = b.need(self.load.clone(), "load torque");
        let load =
            load.and_then(|l| b.need(Some(l).filter(LoadTorque::is_sound), "load torque with a speed above zero"));
        let breakaway = match self.breakaway {
            None => None,
            Some(t) => Some(plausible::not_negative(b, Some(t), "breakaway torque")?),
        };
        let gear = b.assume(self.gear, Gear::DIRECT, "gear", "direct coupling, ratio 1, no losses");
        let gear =
            b.need(Some(gear).filter(Gear::is_sound), "gear with a ratio above zero and an efficiency from 0 to 1")?;
        let train = Train::new(motor?, driven?, load?, breakaway, gear);
        b.line(
            "inertia at the motor's shaft",
            "J = J_M + J_L/i²",
            format!(
                "{} kg·m² + {} kg·m²/{}²",
                significant(motor?.kilogram_square_metres(), 4),
                significant(driven?.kilogram_square_metres(), 4),
                significant(gear.ratio.fraction(), 4)
            ),
            format!("{} kg·m²", significant(train.inertia.kilogram_square_metres(), 4)),
        );
        Some(train)
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
        }
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
