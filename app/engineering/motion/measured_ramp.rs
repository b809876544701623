//! A measured ramp against its setting and its prediction: the same rule speeding up and slowing down.

use crate::decision::Measured;
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::Duration;
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::motion::MEASURED_RAMP;

/// How far from the set time without remark, as a share of it.
pub const FROM_SET: Limit = Limit { name: "measured off set time", value: 0.10, unit: "1", source: MEASURED_RAMP };
/// How far beyond the predicted time before it is a fault, as a share of it.
pub const BEYOND_PREDICTED: Limit =
    Limit { name: "measured beyond predicted time", value: 0.25, unit: "1", source: MEASURED_RAMP };

/// What both checks take.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Measured time between the two speeds.
    pub measured: Option<Reading<Duration>>,
    /// Time set for this very change of speed.
    pub set_time: Option<Duration>,
    /// Predicted time on the set ramp; without it nothing is judged outside.
    pub predicted_time: Option<Duration>,
}

/// Runs the rule for the check of this name; `what` is "acceleration" or "deceleration".
#[must_use]
pub fn check(name: &str, what: &str, inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(name);
    b.cite(MEASURED_RAMP);
    let set = plausible::positive(&mut b, inputs.set_time, &format!("set {what} time")).map(Duration::seconds);
    let predicted = inputs.predicted_time.map(Duration::seconds).filter(|t| t.is_finite() && *t > 0.0);
    let longest = predicted.map(|t| t * (1.0 + BEYOND_PREDICTED.value));
    if let Some(set) = set {
        limits(&mut b, set, predicted, longest);
    }
    let measured = plausible::positive_reading(&mut b, inputs.measured.as_ref(), &format!("measured {what} time"));
    let (Some(set), Some(reading)) = (set, measured) else { return b.not_assessed() };

    let measured = Measured::direct(&reading);
    let as_set = marking::hint(measured.between(set * (1.0 - FROM_SET.value), set * (1.0 + FROM_SET.value)));
    // Beyond the prediction counts only where the stop-watch leaves no doubt: closer than that is marginal.
    let verdict = match longest.map(|longest| measured.at_most(longest)) {
        Some(Verdict::Outside) => Verdict::Outside,
        Some(Verdict::Marginal) => as_set.worse(Verdict::Marginal),
        _ => as_set,
    };
    let off = 100.0 * (measured.value - set) / set;
    b.figure("off the set time", off, 3, "%");
    b.line(
        "off the set time",
        "(t − t_set)/t_set",
        format!("({} s − {} s)/{} s", significant(measured.value, 3), significant(set, 3), significant(set, 3)),
        format!("{} %", significant(off, 2)),
    );
    let shown = significant(measured.value, 3);
    marking::mark(&mut b, &measured, format!("{shown} s"), verdict);
    let set = significant(set, 3);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("{shown} s, more than 25 % over the predicted {} s. Look at current limit, load, brake, dampers and valves.", significant(predicted.unwrap_or(f64::NAN), 3)),
            Verdict::Marginal => format!("{shown} s against {set} s set: more than 10 % off, or closer than the stop-watch can tell. See whether a limit or the bus held the ramp."),
            _ => format!("{shown} s against {set} s set."),
        },
    )
}

fn limits(b: &mut OutcomeBuilder, set: f64, predicted: Option<f64>, longest: Option<f64>) {
    let (low, high) = (set * (1.0 - FROM_SET.value), set * (1.0 + FROM_SET.value));
    let (low_words, high_words) = (significant(low, 3), significant(high, 3));
    let mut words = format!("{low_words} to {high_words} s, 10 % about the set {} s", significant(set, 3));
    let mut rule = LimitRule::linear("s").between(low, format!("≥ {low_words} s"), high, format!("≤ {high_words} s"));
    if let (Some(predicted), Some(longest)) = (predicted, longest) {
        let longest_words = significant(longest, 3);
        words = format!("{words}; at most {longest_words} s, 25 % over the predicted {} s", significant(predicted, 3));
        rule = rule.tick(longest, format!("predicted + 25 %: {longest_words} s"));
        b.line(
            "longest before it is a fault",
            "1.25·t_predicted",
            format!("1.25 × {} s", significant(predicted, 3)),
            format!("{longest_words} s"),
        );
    } else {
        b.note("No prediction to compare with; only the set time counts.");
    }
    b.limit(words);
    b.rule(rule);
}

#[cfg(test)]
pub(crate) mod tests {
    use super::*;
    use crate::reading::Accuracy;

    /// Set to 20 s, taken with a stop-watch of 0.2 s.
    pub(crate) fn inputs(measured: f64, predicted: Option<f64>) -> Inputs {
        let watch = Accuracy {
            percent_of_reading: 0.0,
            digits: 1.0,
            resolution: 0.2,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            measured: Some(Reading::with(Duration::from_seconds(measured), watch)),
            set_time: Some(Duration::from_seconds(20.0)),
            predicted_time: predicted.map(Duration::from_seconds),
        }
    }

    fn run(measured: f64, predicted: Option<f64>) -> Outcome {
        check("x", "acceleration", &inputs(measured, predicted))
    }

    /// Common practice, no source: 10 % about the setting, 25 % over the prediction. U is 0.19 s here.
    #[test]
    fn at_just_inside_and_just_outside() {
        for (seconds, verdict) in [
            (20.0, Verdict::Within),
            (21.7, Verdict::Within),
            (22.1, Verdict::Marginal),
            (17.9, Verdict::Marginal),
            (18.3, Verdict::Within),
            (24.9, Verdict::Marginal),
            (25.3, Verdict::Outside),
        ] {
            assert_eq!(run(seconds, Some(20.0)).verdict, verdict, "{seconds} s");
        }
        assert_eq!(run(40.0, None).verdict, Verdict::Marginal);
        assert!(run(40.0, None).notes.iter().any(|n| n.contains("No prediction")));
    }

    /// A ramp predicted to be stretched is marginal when it is, not outside.
    #[test]
    fn a_stretch_that_was_predicted_is_marginal() {
        assert_eq!(run(30.0, Some(29.0)).verdict, Verdict::Marginal);
        assert_eq!(run(37.0, Some(29.0)).verdict, Verdict::Outside);
    }

    #[test]
    fn the_limit_is_there_before_the_reading() {
        let outcome =
            check("x", "deceleration", &Inputs { set_time: Some(Duration::from_seconds(20.0)), ..Inputs::default() });
        assert_eq!(outcome.limit, "18.0 to 22.0 s, 10 % about the set 20.0 s");
        assert_eq!(outcome.missing[0].what, "measured deceleration time");
        assert!(outcome.rule.is_some());
        assert_eq!(run(f64::NAN, None).verdict, Verdict::NotAssessed);
    }
}
