//! # rated-torque
//!
//! Rated torque of the motor from its plate: T = 60·P/(2π·n), P in watts, n in rpm. A figure; nothing limits it.
//! Physics. The rounded constant 9550 (kW, rpm) lies 7·10⁻⁵ above the exact one.

use crate::formulas::plausible::positive;
use crate::formulas::torque::{pound_force_feet, torque};
use crate::outcome::{Outcome, OutcomeBuilder};
use crate::quantity::{Power, Speed};
use crate::rounding::significant;
use crate::sources::motion::RATED_TORQUE;

/// Name in the catalogue.
pub const NAME: &str = "rated-torque";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Rated shaft power.
    pub rated_power: Option<Power>,
    /// Rated speed.
    pub rated_speed: Option<Speed>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(RATED_TORQUE);
    let power = positive(&mut b, inputs.rated_power, "rated motor power");
    let speed = positive(&mut b, inputs.rated_speed, "rated motor speed");
    let (Some(power), Some(speed)) = (power, speed) else { return b.not_assessed() };
    let result = torque(power, speed);
    let shown = significant(result.newton_metres(), 3);
    b.line(
        "rated torque",
        "T = 60·P/(2π·n)",
        format!("60 × {} W/(2π × {} rpm)", significant(power.watts(), 5), significant(speed.rpm(), 5)),
        format!("{shown} N·m"),
    );
    b.figure("rated torque", result.newton_metres(), 4, "N·m");
    b.figure("rated torque", pound_force_feet(result), 4, "lbf·ft");
    b.as_figure(format!("Rated torque {shown} N·m."))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::outcome::Verdict;

    fn plate(kilowatts: f64, rpm: f64) -> Inputs {
        Inputs { rated_power: Some(Power::from_watts(kilowatts * 1000.0)), rated_speed: Some(Speed::from_rpm(rpm)) }
    }

    /// C-MN-010 (row MN-04): 15 kW at 1470 rpm is 97.44 N·m.
    #[test]
    fn a_published_plate() {
        let outcome = check(&plate(15.0, 1470.0));
        assert_eq!(outcome.verdict, Verdict::Figure);
        assert_eq!(outcome.figures[0].value, "97.44");
    }

    #[test]
    fn impossible_or_missing_plates_are_named() {
        assert_eq!(check(&plate(15.0, 0.0)).missing[0].what, "rated motor speed above zero");
        assert_eq!(check(&plate(f64::INFINITY, 1470.0)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&Inputs::default()).missing.len(), 2);
    }
}
