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
    use crate::outcome::Verdict;
    use crate::quantity::Duration;
    use crate::reading::{Accuracy, Reading};

    /// Set 10 s, predicted 10 s; the rule itself is tested in `motion::measured_ramp`.
    fn took(seconds: f64) -> Outcome {
        let exact = Accuracy {
            percent_of_reading: 0.0,
            digits: 1.0,
            resolution: 0.01,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        let set = Some(Duration::from_seconds(10.0));
        let measured = Some(Reading::with(Duration::from_seconds(seconds), exact));
        check(&Inputs { measured, set_time: set, predicted_time: set })
    }

    #[test]
    fn ten_percent_is_marginal_and_a_quarter_beyond_the_prediction_is_outside() {
        assert_eq!(took(10.9).verdict, Verdict::Within);
        assert_eq!(took(11.2).verdict, Verdict::Marginal);
        assert_eq!(took(12.6).verdict, Verdict::Outside);
        assert_eq!(took(10.0).check, NAME);
    }
}
