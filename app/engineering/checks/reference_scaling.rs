//! # reference-scaling
//!
//! The reference that the drive shows at 4, 8, 12, 16 and 20 mA, against the linear scale it should follow.
//!
//! ideal = low + (I − 4)/16·(high − low) (row AN-01), or between the signal's own ends where these are other than 4 and
//! 20 mA; error = (shown − ideal)/(high − low). At most 0.5 % of span at every point: common practice (row AN-03). The
//! maker's or the site's own limit goes first. The instrument is the loop source; its accuracy becomes an uncertainty of
//! the ideal value. A voltage signal is not assessed: the points are loop currents.

use crate::decision::Measured;
use crate::formulas::loop_signal::{POINTS, value_between};
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Current, Frequency, Ratio};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::settings::{AN_01, AN_03};

/// Name in the catalogue.
pub const NAME: &str = "reference-scaling";

/// Largest error at any point.
pub const ERROR: Limit = Limit { name: "error of the reference, of span", value: 0.5, unit: "%", source: AN_03 };

/// One point of the loop check.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Point {
    /// Loop current injected, with the loop source as its instrument; its nominal value when not entered.
    pub injected: Option<Reading<Current>>,
    /// Reference that the drive showed.
    pub shown: Option<Frequency>,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// The points at 4, 8, 12, 16 and 20 mA.
    pub points: [Point; 5],
    /// Whether the reference comes as a voltage.
    pub by_voltage: bool,
    /// Loop current at the low end; 4 mA is assumed.
    pub low_current: Option<Current>,
    /// Loop current at the high end; 20 mA is assumed.
    pub high_current: Option<Current>,
    /// Reference that belongs to the low end.
    pub low: Option<Frequency>,
    /// Reference that belongs to the high end.
    pub high: Option<Frequency>,
    /// The maker's or the site's own limit, as a share of the span.
    pub own_limit: Option<Ratio>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(AN_01);
    b.cite(AN_03);
    let own = inputs.own_limit.filter(|l| l.fraction().is_finite() && l.fraction() > 0.0);
    let limit = own.map_or(ERROR.value, |l| l.fraction() * 100.0);
    if own.is_some() {
        b.note("The maker's or the site's own limit is used.");
    }
    let words = significant(limit, 2);
    b.limit(format!(
        "at most {words} % of span at every point{}",
        if own.is_some() { "" } else { " (common practice)" }
    ));
    b.rule(LimitRule::linear("%").between(-limit, format!("−{words} %"), limit, format!("+{words} %")));
    if inputs.by_voltage {
        return b.not_judged(
            "Not assessed: the reference comes as a voltage, and the points of this check are loop currents. Compare it at five voltages and note what the drive shows.",
        );
    }
    let milliampere = |n: f64| Current::from_amperes(n / 1e3);
    let from = b.assume(inputs.low_current, milliampere(4.0), "loop current at the low end", "4 mA, the usual one");
    let to = b.assume(inputs.high_current, milliampere(20.0), "loop current at the high end", "20 mA, the usual one");
    let apart = to.amperes() - from.amperes() >= 1e-3;
    if !apart {
        return b.not_judged("Not assessed: the loop current at the high end is not above the one at the low end.");
    }
    let [from_shown, to_shown] = [from, to].map(|i| significant(i.amperes() * 1e3, 2));
    let low = plausible::finite(&mut b, inputs.low, &format!("reference at {from_shown} mA"));
    let high = plausible::finite(&mut b, inputs.high, &format!("reference at {to_shown} mA"));
    let shown = [0, 1, 2, 3, 4].map(|i| {
        let what = format!("reference shown at {} mA", significant(POINTS[i], 2));
        plausible::finite(&mut b, inputs.points[i].shown, &what)
    });
    let (Some(low), Some(high)) = (low, high) else { return b.not_assessed() };
    let span = high.hertz() - low.hertz();
    if span.abs() < 1e-9 {
        return b
            .not_judged("Not assessed: the references at both ends of the signal are the same, so there is no span.");
    }

    let mut verdict = Verdict::Within;
    let mut worst = (0.0_f64, POINTS[0]);
    for ((point, shown), nominal) in inputs.points.iter().zip(shown).zip(POINTS) {
        let Some(shown) = shown else { continue };
        let injected = point.injected.clone().unwrap_or_else(|| Reading::bare(Current::from_amperes(nominal / 1e3)));
        let error = judge_point(&mut b, &injected, shown, (from, to), (low, high));
        let this = error.between(-limit, limit);
        verdict = verdict.worse(this);
        marking::mark(
            &mut b,
            &Measured { doubt: None, ..error.clone() },
            format!("{} mA", significant(nominal, 2)),
            this,
        );
        if error.value.abs() > worst.0.abs() {
            worst = (error.value, nominal);
        }
    }
    if let Some(doubt) = inputs
        .points
        .iter()
        .find_map(|p| p.injected.as_ref().map_or(Some("no instrument is named".to_owned()), Reading::doubt))
    {
        b.note(format!("Marginal at best: {doubt}."));
    }
    let (error, at) = (significant(worst.0, 2), significant(worst.1, 2));
    b.figure("largest error of span", worst.0, 2, "%");
    if shown.iter().any(Option::is_none) && verdict != Verdict::Outside {
        return b.not_assessed();
    }
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("Largest error {error} % of span at {at} mA, beyond {words} %. Correct zero and span of the reference input and repeat."),
            Verdict::Marginal => format!("Largest error {error} % of span at {at} mA: the loop source cannot tell it from {words} %, or its accuracy is in doubt."),
            _ => format!("Largest error {error} % of span at {at} mA, at most {words} %."),
        },
    )
}

/// The error of one point in percent of span, with its line of working.
fn judge_point(
    b: &mut OutcomeBuilder,
    injected: &Reading<Current>,
    shown: Frequency,
    ends: (Current, Current),
    (low, high): (Frequency, Frequency),
) -> Measured {
    let span = high.hertz() - low.hertz();
    let ideal = value_between(injected.value, ends, low, high).hertz();
    let error = (shown.hertz() - ideal) / span * 100.0;
    let milliamperes = significant(injected.number() * 1e3, 4);
    b.line(
        &format!("at {milliamperes} mA"),
        "(shown − (low + (I − I_low)/(I_high − I_low)·span))/span",
        format!("({} − {}) Hz / {} Hz", significant(shown.hertz(), 4), significant(ideal, 4), significant(span, 4)),
        format!("{} %", significant(error, 2)),
    );
    // The two ends are the whole span: a doubt of the current is a doubt of the error.
    let own = Measured::scaled(injected, 100.0 / (ends.1.amperes() - ends.0.amperes()));
    Measured { value: error, expanded: own.expanded, doubt: own.doubt }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(shown: [f64; 5]) -> Inputs {
        let source = Accuracy {
            percent_of_reading: 0.0,
            digits: 1.0,
            resolution: 1e-6,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        let point = |i: usize| Point {
            injected: Some(Reading::with(Current::from_amperes(POINTS[i] / 1e3), source)),
            shown: Some(Frequency::from_hertz(shown[i])),
        };
        Inputs {
            points: [0, 1, 2, 3, 4].map(point),
            by_voltage: false,
            low_current: None,
            high_current: None,
            low: Some(Frequency::from_hertz(0.0)),
            high: Some(Frequency::from_hertz(50.0)),
            own_limit: None,
        }
    }

    /// C-AN-006 (row AN-03) as shown hertz: errors 0.0625, 0, −0.125, 0.125, 0.1875 % of 50 Hz.
    #[test]
    fn reference_case() {
        let mut inputs = of([0.031_25, 12.5, 24.9375, 37.5625, 50.093_75]);
        inputs.own_limit = Some(Ratio::from_fraction(0.0025));
        let outcome = check(&inputs);
        assert_eq!(outcome.verdict, Verdict::Within);
        assert_eq!(outcome.figures[0].value, "0.19");
        assert_eq!(outcome.rule.expect("rule").markers.len(), 5);
    }

    /// Common practice, no source (row AN-03): 0.5 % of 50 Hz is 0.25 Hz.
    #[test]
    fn at_just_inside_and_just_outside() {
        assert_eq!(check(&of([0.0, 12.5, 25.24, 37.5, 50.0])).verdict, Verdict::Within);
        assert_eq!(check(&of([0.0, 12.5, 25.25, 37.5, 50.0])).verdict, Verdict::Marginal);
        assert_eq!(check(&of([0.0, 12.5, 25.26, 37.5, 50.0])).verdict, Verdict::Outside);
        assert_eq!(check(&of([-0.26, 12.5, 25.0, 37.5, 50.0])).verdict, Verdict::Outside);
    }

    /// Arithmetic of row AN-01 with other ends: on 0 to 20 mA, 4 mA are a fifth of the span, 10 Hz of 50.
    #[test]
    fn other_ends_have_another_scale_and_a_voltage_none() {
        let shown = [10.0, 20.0, 30.0, 40.0, 50.0];
        assert_eq!(check(&of(shown)).verdict, Verdict::Outside);
        let zero = Inputs { low_current: Some(Current::from_amperes(0.0)), ..of(shown) };
        let outcome = check(&zero);
        assert_eq!(outcome.verdict, Verdict::Within, "{}", outcome.summary);
        assert_eq!(outcome.assumed.len(), 1, "only the high end is assumed");
        assert_eq!(check(&Inputs { high_current: zero.low_current, ..zero }).verdict, Verdict::NotAssessed);
        let volts = check(&Inputs { by_voltage: true, ..of(shown) });
        assert!(volts.verdict == Verdict::NotAssessed && volts.summary.contains("voltage"));
    }

    #[test]
    fn missing_bare_and_impossible() {
        let mut inputs = of([0.0, 12.5, 25.0, 37.5, 50.0]);
        inputs.points[1].shown = None;
        let outcome = check(&inputs);
        assert_eq!(
            (outcome.verdict, outcome.missing[0].what.as_str()),
            (Verdict::NotAssessed, "reference shown at 8.0 mA")
        );
        assert!(outcome.rule.is_some());
        inputs.points[4].shown = Some(Frequency::from_hertz(55.0));
        assert_eq!(check(&inputs).verdict, Verdict::Outside);
        let mut bare = of([0.0, 12.5, 25.0, 37.5, 50.0]);
        bare.points[0].injected = None;
        assert_eq!(check(&bare).verdict, Verdict::Marginal);
        bare.high = bare.low;
        assert_eq!(check(&bare).verdict, Verdict::NotAssessed);
    }
}
