//! # stop-time
//!
//! Time from the stop command to standstill, against the time that the machine's risk assessment asks.
//!
//! At most the specified time, for a stop from top speed or nearly so. None specified: a figure without a verdict. A stop
//! from less, or from a speed nobody wrote down, is a figure too, as it says nothing of the longest stop; yet one that is
//! longer than specified already from there is outside. The stop category (IEC 60204-1, clause 9.2.2) says how the power
//! goes, not how long it may take; that number belongs to the machine's builder.

use crate::decision::Measured;
use crate::formulas::{marking, plausible};
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Duration, Frequency};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::motion::ST_01;

/// Name in the catalogue.
pub const NAME: &str = "stop-time";

/// A stop from this share of top speed counts as one from top speed (common practice, no source).
const ABOUT_TOP: f64 = 0.95;

/// Where the stop began.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub enum Began {
    /// At top speed, as the step asks.
    #[default]
    TopSpeed,
    /// At an output frequency.
    At {
        /// As it was written down.
        from: Option<Frequency>,
        /// That of top speed.
        top: Option<Frequency>,
    },
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// From the stop command to standstill.
    pub measured: Option<Reading<Duration>>,
    /// The longest that the machine's documents allow.
    pub specified: Option<Duration>,
    /// Where the stop began.
    pub began: Began,
}

impl Began {
    /// Why the time is not that of a stop from top speed; `None` where it is.
    fn below_top(self) -> Option<String> {
        let Self::At { from, top } = self else { return None };
        let shown = |f: Frequency| significant(f.hertz(), 3);
        match (from, top) {
            (Some(from), Some(top)) if from.hertz() >= ABOUT_TOP * top.hertz() => None,
            (Some(from), Some(top)) => Some(format!("from {} Hz, top speed is at {} Hz", shown(from), shown(top))),
            (Some(from), None) => Some(format!("from {} Hz, and the top speed is not known", shown(from))),
            (None, _) => Some("and the speed it was stopped from was not written down".to_owned()),
        }
    }
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(ST_01);
    b.note("The time that counts is the one in the machine's own documents; a stop function is not isolation.");
    let specified = match inputs.specified {
        None => None,
        given => {
            let Some(limit) = plausible::positive(&mut b, given, "specified stop time") else {
                return b.not_assessed();
            };
            let shown = significant(limit.seconds(), 3);
            b.limit(format!("at most {shown} s, as specified"));
            b.rule(LimitRule::linear("s").at_most(limit.seconds(), format!("≤ {shown} s")));
            Some(limit.seconds())
        }
    };
    let Some(reading) = plausible::positive_reading(&mut b, inputs.measured.as_ref(), "measured stop time") else {
        return b.not_assessed();
    };
    let measured = Measured::direct(&reading);
    let shown = significant(measured.value, 3);
    b.figure("stop time", measured.value, 3, "s");
    let Some(limit) = specified else {
        return b.as_figure(format!("{shown} s from command to standstill; no time is specified to compare it with."));
    };
    let verdict = measured.at_most(limit);
    if let Some(below) = inputs.began.below_top().filter(|_| verdict != Verdict::Outside) {
        return b.as_figure(format!(
            "{shown} s from command to standstill, {below}: it is not compared with the specified {} s. Take the time from top speed.",
            significant(limit, 3)
        ));
    }
    if measured.doubt.is_none() {
        b.needed(format!("With this stop-watch {} s is within", significant(limit - measured.expanded, 3)));
    }
    b.line(
        "comparison",
        "t ≤ t_specified",
        format!("{shown} s ± {} s against {} s", significant(measured.expanded, 2), significant(limit, 3)),
        verdict.words(),
    );
    marking::mark(&mut b, &measured, format!("{shown} s"), verdict);
    let limit = significant(limit, 3);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("{shown} s, longer than the specified {limit} s. Do not hand over the stop function like this; shorten the ramp or add braking, and ask the machine's builder."),
            Verdict::Marginal => format!("{shown} s against {limit} s: closer than the stop-watch can tell, or its accuracy is in doubt."),
            _ => format!("{shown} s, at most the specified {limit} s."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn stop(seconds: f64) -> Inputs {
        let watch = Accuracy {
            percent_of_reading: 0.0,
            digits: 1.0,
            resolution: 0.1,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            measured: Some(Reading::with(Duration::from_seconds(seconds), watch)),
            specified: Some(Duration::from_seconds(5.0)),
            began: Began::TopSpeed,
        }
    }

    /// Common practice, no source: 95 % of top speed counts as top speed.
    #[test]
    fn a_stop_from_less_than_top_speed_is_a_figure_unless_it_is_too_long_already() {
        let hertz = |f: f64| Some(Frequency::from_hertz(f));
        let from = |from, top, seconds| check(&Inputs { began: Began::At { from, top }, ..stop(seconds) });
        for (hz, verdict) in [(12.5, Verdict::Figure), (47.4, Verdict::Figure), (47.5, Verdict::Within)] {
            assert_eq!(from(hertz(hz), hertz(50.0), 3.0).verdict, verdict, "{hz} Hz");
        }
        let low = from(hertz(12.5), hertz(50.0), 3.0).summary;
        assert!(low.contains("from 12.5 Hz, top speed is at 50.0 Hz"), "{low}");
        for (start, top) in [(None, hertz(50.0)), (hertz(50.0), None), (None, None)] {
            assert_eq!(from(start, top, 3.0).verdict, Verdict::Figure);
        }
        assert_eq!(
            from(hertz(12.5), hertz(50.0), 5.0).verdict,
            Verdict::Figure,
            "no better than the stop-watch either"
        );
        assert_eq!(from(hertz(12.5), hertz(50.0), 6.0).verdict, Verdict::Outside);
    }

    /// U is 1.65·0.1 s/√3 = 0.095 s.
    #[test]
    fn at_just_inside_and_just_outside() {
        for (seconds, verdict) in
            [(4.9, Verdict::Within), (5.0, Verdict::Marginal), (5.09, Verdict::Marginal), (5.1, Verdict::Outside)]
        {
            assert_eq!(check(&stop(seconds)).verdict, verdict, "{seconds} s");
        }
    }

    #[test]
    fn nothing_specified_is_a_figure_and_nothing_measured_shows_the_limit() {
        assert_eq!(check(&Inputs { specified: None, ..stop(60.0) }).verdict, Verdict::Figure);
        let outcome = check(&Inputs { measured: None, ..stop(1.0) });
        assert_eq!((outcome.verdict, outcome.limit.as_str()), (Verdict::NotAssessed, "at most 5.00 s, as specified"));
        assert_eq!(check(&stop(-1.0)).verdict, Verdict::NotAssessed);
        assert_eq!(
            check(&Inputs { specified: Some(Duration::from_seconds(0.0)), ..stop(1.0) }).verdict,
            Verdict::NotAssessed
        );
    }
}
