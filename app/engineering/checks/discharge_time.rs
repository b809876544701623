//! # discharge-time
//!
//! The time a tested winding was earthed, against four times the time the test voltage stood on it.
//!
//! t ≥ 4·t_test, from memory of IEEE 43. The test lasted one minute, or ten where the ten-minute run was made; the
//! winding can still be charged afterwards, so the absence of voltage is proved as well.

use crate::decision::Measured;
use crate::formulas::plausible::{not_negative, positive};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::Duration;
use crate::rounding::significant;
use crate::sources::insulation::IR_20;

/// Name in the catalogue.
pub const NAME: &str = "discharge-time";

/// Earthed at least this many times the test's duration.
pub const TIMES: Limit = Limit { name: "discharge time over test time", value: 4.0, unit: "1", source: IR_20 };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Time the winding was earthed.
    pub earthed: Option<Duration>,
    /// Time the test voltage stood on it.
    pub test: Option<Duration>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(IR_20);
    b.note("Prove that no voltage is left before the winding is touched.");
    let test = positive(&mut b, inputs.test, "duration of the insulation test").map(|t| t.seconds() / 60.0);
    let least = test.map(|t| TIMES.value * t);
    if let (Some(test), Some(least)) = (test, least) {
        let shown = significant(least, 3);
        b.limit(format!("at least {shown} min, four times the test of {} min", significant(test, 3)));
        b.rule(LimitRule::linear("min").at_least(least, format!("≥ {shown} min")));
    }
    let earthed = not_negative(&mut b, inputs.earthed, "time the winding was earthed").map(|t| t.seconds() / 60.0);
    let (Some(test), Some(least), Some(earthed)) = (test, least, earthed) else { return b.not_assessed() };
    let verdict = Measured::exact(earthed).at_least(least);
    let (shown, limit) = (significant(earthed, 3), significant(least, 3));
    b.line("discharge time", "t ≥ 4·t_test", format!("4 × {} min", significant(test, 3)), format!("{limit} min"));
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(earthed, 0.0, format!("{shown} min"), verdict));
    }
    let summary = if verdict == Verdict::Outside {
        format!("Earthed for {shown} min, at least {limit} min are due. Leave it earthed and do not touch it.")
    } else {
        format!("Earthed for {shown} min, at least {limit} min are due.")
    };
    b.judged(verdict, summary)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn earthed(time: f64, test: f64) -> Outcome {
        let minutes = |m: f64| Some(Duration::from_seconds(m * 60.0));
        check(&Inputs { earthed: minutes(time), test: minutes(test) })
    }

    #[test]
    fn at_just_inside_and_just_outside_four_times_the_test() {
        assert_eq!(earthed(4.0, 1.0).verdict, Verdict::Within);
        assert_eq!(earthed(4.1, 1.0).verdict, Verdict::Within);
        assert_eq!(earthed(3.9, 1.0).verdict, Verdict::Outside);
        assert_eq!(earthed(39.0, 10.0).verdict, Verdict::Outside);
        assert_eq!(earthed(40.0, 10.0).verdict, Verdict::Within);
    }

    #[test]
    fn the_limit_is_there_before_the_time_is() {
        let before = check(&Inputs { earthed: None, test: Some(Duration::from_seconds(60.0)) });
        assert_eq!(
            (before.verdict, before.limit.as_str()),
            (Verdict::NotAssessed, "at least 4.00 min, four times the test of 1.00 min")
        );
        assert_eq!(check(&Inputs::default()).missing.len(), 2);
    }
}
