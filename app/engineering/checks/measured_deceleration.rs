//! # measured-deceleration
//!
//! The time the load took to slow down, against the set and the predicted time.
//!
//! More than 10 % off the set time, either way: marginal. Beyond the predicted time plus 25 %: outside. Both are common
//! practice, no source. Predicted is the time of `deceleration-time` on the set ramp; without it nothing is outside.

pub use crate::motion::measured_ramp::Inputs;
use crate::outcome::Outcome;

/// Name in the catalogue.
pub const NAME: &str = "measured-deceleration";

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    crate::motion::measured_ramp::check(NAME, "deceleration", inputs)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::motion::measured_ramp::tests::inputs;
    use crate::outcome::Verdict;

    /// The rule itself is tested in `motion::measured_ramp`; here, that it judges under this name.
    #[test]
    fn the_rule_of_measured_ramps_judges_under_this_name() {
        assert_eq!(check(&inputs(20.0, Some(20.0))).check, NAME);
        assert_eq!(check(&inputs(20.0, Some(20.0))).verdict, Verdict::Within);
        assert_eq!(check(&inputs(26.0, Some(20.0))).verdict, Verdict::Outside);
    }
}
