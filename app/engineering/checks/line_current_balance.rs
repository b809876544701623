//! # line-current-balance
//!
//! Unbalance of the three input currents of a drive: largest deviation from the mean over the mean (NEMA style).
//! A figure: a six-pulse bridge turns a small unbalance of the line volts into a large one of its currents, and no
//! published number limits it. A line without current is said plainly.

use crate::formulas::plausible::reading_not_negative;
use crate::formulas::triple::spread;
use crate::outcome::{Outcome, OutcomeBuilder};
use crate::quantity::Current;
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::runs::UB_01;
use crate::sources::supply::UB_05;

/// Name in the catalogue.
pub const NAME: &str = "line-current-balance";

/// A line that carries less than this part of the mean is as good as lost.
const LOST: f64 = 0.05;

/// Names of the three readings.
const LINES: [&str; 3] = ["input current L1", "input current L2", "input current L3"];

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Input currents of L1, L2, L3, true r.m.s.
    pub lines: [Option<Reading<Current>>; 3],
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(UB_01);
    b.cite(UB_05);
    b.note("A six-pulse bridge multiplies the unbalance of its line volts; compare with supply-unbalance. Input currents need a true r.m.s. meter.");
    let mut readings = Vec::new();
    for (reading, name) in inputs.lines.iter().zip(LINES) {
        readings.extend(reading_not_negative(&mut b, reading.as_ref(), name));
    }
    let Ok(readings) = <[Reading<Current>; 3]>::try_from(readings) else { return b.not_assessed() };
    let Some(found) = spread(&readings) else {
        return b.not_judged("Not assessed: the three input currents are zero.");
    };
    let listed = readings.iter().map(|r| significant(r.number(), 3)).collect::<Vec<_>>().join(", ");
    let shown = significant(found.largest.value, 3);
    b.line("mean", "(I₁ + I₂ + I₃)/3", format!("{listed} A"), format!("{} A", significant(found.mean, 4)));
    b.line("largest deviation", "max|I − mean|/mean", format!("{listed} A"), format!("{shown} %"));
    b.figure("largest deviation of the input currents", found.largest.value, 3, "%");
    b.figure("mean input current", found.mean, 3, "A");
    for (reading, name) in readings.iter().zip(LINES) {
        if reading.number() < LOST * found.mean {
            b.note(format!("{name} carries next to nothing: look for a lost phase or a blown fuse."));
        }
    }
    b.as_figure(format!("Input currents differ from their mean by up to {shown} %."))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::outcome::Verdict;

    fn lines(amperes: [f64; 3]) -> Inputs {
        Inputs { lines: amperes.map(|a| Some(Reading::bare(Current::from_amperes(a)))) }
    }

    /// The definition of NEMA MG 1 14.36 (row UB-01) on numbers worked by hand: mean 20 A, farthest 3 A, 15 %.
    #[test]
    fn a_figure_whatever_the_size() {
        let outcome = check(&lines([23.0, 19.0, 18.0]));
        assert_eq!((outcome.verdict, outcome.figures[0].value.as_str()), (Verdict::Figure, "15.0"));
        let lost = check(&lines([30.0, 30.0, 0.0]));
        assert!(lost.verdict == Verdict::Figure && lost.notes.iter().any(|n| n.contains("L3 carries next to nothing")));
    }

    #[test]
    fn missing_and_impossible_currents_are_named() {
        assert_eq!(check(&Inputs::default()).missing.len(), 3);
        assert_eq!(check(&lines([0.0; 3])).verdict, Verdict::NotAssessed);
        assert_eq!(check(&lines([20.0, -1.0, 20.0])).verdict, Verdict::NotAssessed);
        assert_eq!(check(&lines([20.0, f64::NAN, 20.0])).verdict, Verdict::NotAssessed);
    }
}
