//! # load-profile
//!
//! How the load torque grows with speed, from measured points. A figure.
//!
//! T = a·nᵖ by least squares on logarithms, p with its 95 % interval by Student's t (row LS-01). 0 is a constant torque,
//! 1 a linear one, 2 that of fans and pumps without static head (row RM-07), −1 constant power.

use crate::formulas::power_law::fit;
use crate::outcome::{Outcome, OutcomeBuilder};
use crate::quantity::{Speed, Torque};
use crate::rounding::{decimals, significant};
use crate::sources::runs::LEAST_SQUARES;

/// Name in the catalogue.
pub const NAME: &str = "load-profile";

/// What kind of load the design expects.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Expected {
    /// Hoists, conveyors, positive-displacement pumps.
    Constant,
    /// Calenders and the like.
    Linear,
    /// Fans, centrifugal pumps.
    Quadratic,
    /// Winders.
    ConstantPower,
}

impl Expected {
    /// Its exponent.
    #[must_use]
    pub const fn exponent(self) -> f64 {
        match self {
            Self::Constant => 0.0,
            Self::Linear => 1.0,
            Self::Quadratic => 2.0,
            Self::ConstantPower => -1.0,
        }
    }
}

/// One measured point; torque as shown by the drive, or from power and speed.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Point {
    /// Motor speed.
    pub speed: Speed,
    /// Torque at the motor shaft.
    pub torque: Torque,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Points of the load run, three or more.
    pub points: Vec<Point>,
    /// What the design expects.
    pub expected: Option<Expected>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(LEAST_SQUARES);
    b.limit("a figure: no limit");
    if inputs.points.len() < 3 {
        let _ = b.need(None::<Point>, "three or more points of speed and torque");
        return b.not_assessed();
    }
    let points: Vec<(f64, f64)> = inputs.points.iter().map(|p| (p.speed.rpm(), p.torque.newton_metres())).collect();
    let law = fit(&inputs.points.iter().map(|p| (p.speed, p.torque)).collect::<Vec<_>>())
        .and_then(|law| Some((law, law.half_interval?)));
    let Some((law, half)) = law else {
        return b.not_judged("Not assessed: speeds and torques must be above zero, at two different speeds or more.");
    };
    let (p, h) = (law.exponent.fraction(), half.fraction());
    // Two decimals: an exponent is never known better from a load run.
    let (exponent, margin) = (decimals(p, 2), decimals(h, 2));
    let listed: Vec<String> =
        points.iter().map(|(n, t)| format!("{} rpm {} N·m", significant(*n, 4), significant(*t, 3))).collect();
    b.line("points", "n, T", listed.join("; "), format!("{} points", points.len()));
    b.line(
        "exponent by least squares",
        "p = Σ(x − x̄)(y − ȳ)/Σ(x − x̄)², x = ln n, y = ln T",
        format!("{} points", points.len()),
        exponent.clone(),
    );
    b.line(
        "its 95 % interval",
        "p ± t·s/√Σ(x − x̄)²",
        format!("{} degrees of freedom", points.len() - 2),
        format!("{exponent} ± {margin}"),
    );
    b.text_figure("exponent", exponent.clone());
    b.text_figure("half of its 95 % interval", margin.clone());
    let kinds = [Expected::Constant, Expected::Linear, Expected::Quadratic, Expected::ConstantPower];
    let fitting = kinds.iter().filter(|k| (k.exponent() - p).abs() <= h + 0.05).count();
    if fitting > 1 {
        b.note("The interval holds several kinds of load: take more points, farther apart in speed.");
    }
    let against = inputs.expected.map(|expected| {
        let agrees = (expected.exponent() - p).abs() <= h + 0.05;
        format!(
            " The design expects {}: {}.",
            significant(expected.exponent(), 2),
            if agrees { "they agree" } else { "they do not agree; check valves, dampers, static head and friction" }
        )
    });
    b.as_figure(format!(
        "Load torque grows with speed to the power {exponent} ± {margin}.{}",
        against.unwrap_or_default()
    ))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::outcome::Verdict;

    fn of(points: &[(f64, f64)], expected: Option<Expected>) -> Inputs {
        let point = |(n, t): &(f64, f64)| Point { speed: Speed::from_rpm(*n), torque: Torque::from_newton_metres(*t) };
        Inputs { points: points.iter().map(point).collect(), expected }
    }

    /// Affinity laws (row RM-07): torque of a fan with the square of speed.
    #[test]
    fn a_fan_has_exponent_two() {
        let outcome = check(&of(&[(500.0, 10.0), (1000.0, 40.0), (1500.0, 90.0)], Some(Expected::Quadratic)));
        assert_eq!((outcome.verdict, outcome.figures[0].value.as_str()), (Verdict::Figure, "2.00"));
        assert!(outcome.summary.contains("they agree"));
        let other = check(&of(&[(500.0, 40.0), (1000.0, 40.1), (1500.0, 40.0)], Some(Expected::Quadratic)));
        assert!(other.summary.contains("do not agree"));
    }

    #[test]
    fn few_or_impossible_points() {
        assert_eq!(check(&of(&[(500.0, 10.0), (1000.0, 40.0)], None)).missing.len(), 1);
        for points in [
            [(0.0, 1.0), (1.0, 2.0), (2.0, 3.0)],
            [(1.0, 1.0), (1.0, 2.0), (1.0, 3.0)],
            [(1.0, -1.0), (2.0, 2.0), (3.0, 3.0)],
            [(1.0, f64::NAN), (2.0, 2.0), (3.0, 3.0)],
        ] {
            assert_eq!(check(&of(&points, None)).verdict, Verdict::NotAssessed, "{points:?}");
        }
        let wide = check(&of(&[(500.0, 10.0), (1000.0, 60.0), (1100.0, 20.0)], None));
        assert!(wide.notes[0].contains("several kinds"));
    }
}
