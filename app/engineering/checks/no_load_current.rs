//! # no-load-current
//!
//! Motor current without load, uncoupled, against the two bounds that the nameplate allows.
//!
//! Between I_N·(sin φ − cos φ·(λ − √(λ² − 1))) and I_N·sin φ (rows NL-02, NL-01), divided by r = f/f_N above rated
//! frequency. Both bounds are derived, so outside the bracket is marginal, never more. No standard limits the
//! no-load current; the trade sees 20 to 50 % of rated current, up to 65 % in small or many-pole motors (NL-03).

use crate::decision::Measured;
use crate::formulas::{magnetising, marking, plausible};
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Current, Frequency, Ratio};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::runs::{NL_03, TF_03};

/// Name in the catalogue.
pub const NAME: &str = "no-load-current";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Motor current of the uncoupled run; the mean of the three phases.
    pub reading: Option<Reading<Current>>,
    /// Whether the motor ran uncoupled.
    pub uncoupled: Option<bool>,
    /// Output frequency during the run.
    pub frequency: Option<Frequency>,
    /// Rated frequency.
    pub rated_frequency: Option<Frequency>,
    /// Rated current.
    pub rated_current: Option<Current>,
    /// Rated power factor.
    pub power_factor: Option<Ratio>,
    /// Breakdown over rated torque, λ.
    pub breakdown: Option<Ratio>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(NL_03);
    b.cite(TF_03);
    b.note("Both bounds are derived from the nameplate; no standard limits the no-load current.");
    let bracket = magnetising::work_out(&mut b, inputs.rated_current, inputs.power_factor, inputs.breakdown);
    let frequency = plausible::positive(&mut b, inputs.frequency, "output frequency of the run");
    let rated_frequency = plausible::positive(&mut b, inputs.rated_frequency, "rated frequency");
    let weakening =
        frequency.zip(rated_frequency).map(|(f, n)| (f.hertz() / n.hertz()).max(1.0)).filter(|r| r.is_finite());
    let bounds = bracket.map(|found| {
        let r = weakening.unwrap_or(1.0);
        (found.low.amperes() / r, found.high.amperes() / r)
    });
    if let Some((low, high)) = bounds {
        let (l, h) = (significant(low, 3), significant(high, 3));
        b.limit(format!("between {l} and {h} A; beyond is marginal, never more"));
        b.rule(LimitRule::linear("A").between(low, format!("≥ {l} A"), high, format!("≤ {h} A")));
        if let Some(r) = weakening.filter(|r| *r > 1.0) {
            let how = format!("bracket / {}", significant(r, 3));
            b.line("weaker field above rated frequency", "I_m/r, r = f/f_N", how, format!("{l} to {h} A"));
        }
    }
    let uncoupled = b.need(inputs.uncoupled, "whether the motor ran uncoupled");
    let reading = plausible::positive_reading(&mut b, inputs.reading.as_ref(), "no-load current");
    if uncoupled == Some(false) {
        return b.not_judged("Not assessed: the motor was coupled, and these bounds hold for an uncoupled motor only.");
    }
    let (Some((low, high)), Some(_), Some(_), Some(reading)) = (bounds, weakening, uncoupled, reading) else {
        return b.not_assessed();
    };

    let measured = Measured::direct(&reading);
    let verdict = marking::hint(measured.between(low, high));
    let shown = significant(measured.value, 3);
    b.figure("no-load current", measured.value, 3, "A");
    if let Some(rated) = inputs.rated_current {
        let percent = measured.value / rated.amperes() * 100.0;
        b.figure("no-load current over rated current", percent, 3, "%");
        b.line(
            "share of rated current",
            "I₀/I_N",
            format!("{shown} A / {} A", significant(rated.amperes(), 3)),
            format!("{} %", significant(percent, 3)),
        );
    }
    marking::mark(&mut b, &measured, format!("{shown} A"), verdict);
    let span = format!("{} to {} A", significant(low, 3), significant(high, 3));
    b.judged(
        verdict,
        match verdict {
            Verdict::Within => format!("No-load current {shown} A, inside {span}."),
            _ if measured.value > high => format!("No-load current {shown} A, above {span}. Check base voltage and frequency, connection and boost; a rubbing rotor also shows like this."),
            _ if measured.value < low => format!("No-load current {shown} A, below {span}. Check base voltage and frequency, connection and the meter; on a flux-saving function the flux is lowered on purpose."),
            _ => format!("No-load current {shown} A: the meter cannot tell it from an end of {span}, or its accuracy is in doubt."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    /// The motor of C-NL-001: bracket 8.00 to 11.06 A (rows NL-01, NL-02).
    fn of(amperes: f64, hertz: f64) -> Inputs {
        let clamp = Accuracy {
            percent_of_reading: 1.0,
            digits: 0.0,
            resolution: 0.0,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            reading: Some(Reading::with(Current::from_amperes(amperes), clamp)),
            uncoupled: Some(true),
            frequency: Some(Frequency::from_hertz(hertz)),
            rated_frequency: Some(Frequency::from_hertz(50.0)),
            rated_current: Some(Current::from_amperes(21.0)),
            power_factor: Some(Ratio::from_fraction(0.85)),
            breakdown: Some(Ratio::from_fraction(3.0)),
        }
    }

    /// C-NL-001: 7.99986 A and 11.062436 A.
    #[test]
    fn at_just_inside_and_just_outside_is_never_outside() {
        assert_eq!(check(&of(9.0, 50.0)).verdict, Verdict::Within);
        assert_eq!(check(&of(8.2, 50.0)).verdict, Verdict::Within);
        assert_eq!(check(&of(8.0, 50.0)).verdict, Verdict::Marginal);
        assert_eq!(check(&of(10.9, 50.0)).verdict, Verdict::Within);
        for beyond in [2.0, 11.062, 13.0, 60.0] {
            assert_eq!(check(&of(beyond, 50.0)).verdict, Verdict::Marginal, "{beyond}");
        }
    }

    #[test]
    fn the_field_is_weaker_above_rated_frequency() {
        assert_eq!(check(&of(9.0, 100.0)).verdict, Verdict::Marginal);
        assert_eq!(check(&of(4.5, 100.0)).verdict, Verdict::Within);
        assert_eq!(check(&of(9.0, 25.0)).verdict, Verdict::Within);
    }

    /// Chapman Ex. 7-3 machine at zero slip (C-NL-003, C-NL-007): 9.688 A lies inside.
    #[test]
    fn the_textbook_machine_is_within() {
        let machine = Inputs {
            rated_current: Some(Current::from_amperes(31.237_451)),
            power_factor: Some(Ratio::from_fraction(0.903_304_98)),
            breakdown: Some(Ratio::from_fraction(2.111_360_6)),
            ..of(9.687_970_2, 50.0)
        };
        assert_eq!(check(&machine).verdict, Verdict::Within);
    }

    #[test]
    fn coupled_missing_and_impossible() {
        assert_eq!(check(&Inputs { uncoupled: Some(false), ..of(9.0, 50.0) }).verdict, Verdict::NotAssessed);
        let outcome = check(&Inputs { reading: None, ..of(9.0, 50.0) });
        assert_eq!(outcome.missing[0].what, "no-load current");
        assert!(outcome.rule.is_some() && outcome.limit.starts_with("between 8.00 and 11.1 A"));
        for cosine in [0.0, 1.0, 1.2, f64::NAN] {
            let wrong = Inputs { power_factor: Some(Ratio::from_fraction(cosine)), ..of(9.0, 50.0) };
            assert_eq!(check(&wrong).verdict, Verdict::NotAssessed, "{cosine}");
        }
        assert_eq!(check(&Inputs { breakdown: None, ..of(9.0, 50.0) }).assumed.len(), 1);
    }
}
