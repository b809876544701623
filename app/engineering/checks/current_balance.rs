//! # current-balance
//!
//! The three motor currents at the drive output against their mean.
//!
//! d = max |I_i − Ī|/Ī, as NEMA MG 1 defines unbalance (row UB-01). Up to 5 % within, beyond 10 % outside, between
//! marginal: common practice, no source. A limit of the motor's maker replaces both. On a pulsed output a meter for the fundamental is needed (row TF-03).

use crate::formulas::{marking, plausible, triple};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Current, Ratio};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::runs::{CURRENT_BALANCE, TF_03, UB_01};

/// Name in the catalogue.
pub const NAME: &str = "current-balance";

/// Accepted.
pub const GOOD: Limit = Limit { name: "current unbalance", value: 5.0, unit: "%", source: CURRENT_BALANCE };
/// A fault to find.
pub const FAULT: Limit =
    Limit { name: "current unbalance that means a fault", value: 10.0, unit: "%", source: CURRENT_BALANCE };

/// Which reading is which.
const NAMES: [&str; 3] = ["motor current U", "motor current V", "motor current W"];

/// What the meter shows on a pulsed output.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Meter {
    /// True r.m.s., ripple included.
    TrueRms,
    /// The fundamental: low-pass filtered, or the drive's own display.
    Fundamental,
    /// Mean-responding, scaled for a sine.
    MeanResponding,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Current of phase U.
    pub u: Option<Reading<Current>>,
    /// Current of phase V.
    pub v: Option<Reading<Current>>,
    /// Current of phase W.
    pub w: Option<Reading<Current>>,
    /// What the meter shows on a pulsed output.
    pub meter: Option<Meter>,
    /// Largest unbalance by the motor's maker.
    pub maker_maximum: Option<Ratio>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(UB_01);
    b.cite(CURRENT_BALANCE);
    b.cite(TF_03);
    let own = match inputs.maker_maximum {
        Some(own) => {
            let Some(own) = plausible::positive(&mut b, Some(own), "the maker's largest current unbalance") else {
                return b.not_assessed();
            };
            Some(own.fraction() * 100.0)
        }
        None => None,
    };
    let (good, fault) = own.map_or((GOOD.value, FAULT.value), |own| (own, own));
    let good_shown = significant(good, 3);
    if own.is_some() {
        b.limit(format!("at most {good_shown} % off the mean, the maker's"));
        b.rule(LimitRule::linear("%").at_most(good, format!("≤ {good_shown} %")));
    } else {
        b.limit("at most 5 % off the mean; beyond 10 % is outside (common practice)");
        b.rule(LimitRule::linear("%").at_most(GOOD.value, "≤ 5 %").tick(FAULT.value, "10 %"));
    }
    b.note(match inputs.meter {
        Some(Meter::TrueRms) => "A true r.m.s. meter reads high on a pulsed output; it reads all three phases alike.",
        Some(Meter::Fundamental) => "The meter gives the fundamental, as a pulsed output asks for.",
        Some(Meter::MeanResponding) => {
            "A mean-responding meter may be wrong on a pulsed output; repeat with one that gives the fundamental."
        }
        None => "Nobody said whether the meter gives the fundamental or true r.m.s. on a pulsed output.",
    });
    let readings = [&inputs.u, &inputs.v, &inputs.w];
    let readings = [0, 1, 2].map(|i| plausible::reading_not_negative(&mut b, readings[i].as_ref(), NAMES[i]));
    let [Some(u), Some(v), Some(w)] = readings else { return b.not_assessed() };
    let readings = [u, v, w];
    let Some(spread) = triple::spread(&readings) else {
        return b.not_judged("Not assessed: all three currents are zero.");
    };

    let shown = readings.each_ref().map(|r| significant(r.number(), 3));
    let mean = significant(spread.mean, 3);
    b.line(
        "mean",
        "Ī = (I_U + I_V + I_W)/3",
        format!("({} + {} + {}) A / 3", shown[0], shown[1], shown[2]),
        format!("{mean} A"),
    );
    let deviation = significant(spread.largest.value, 3);
    let which = NAMES[spread.farthest];
    b.line(
        &format!("largest deviation, {which}"),
        "d = |I − Ī|/Ī",
        format!("|{} A − {mean} A| / {mean} A", shown[spread.farthest]),
        format!("{deviation} % ± {} %", significant(spread.largest.expanded, 2)),
    );
    b.figure("current unbalance", spread.largest.value, 3, "%");
    b.figure("mean motor current", spread.mean, 3, "A");
    let verdict = marking::graded(&spread.largest, good, fault);
    marking::mark(&mut b, &spread.largest, format!("{deviation} %"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("{which} is {deviation} % off the mean. Stop; look for a loose joint, a damaged winding or an output fault: exchange two motor leads and see whether the odd phase moves with the motor."),
            Verdict::Marginal => format!("{which} is {deviation} % off the mean: more than usual, closer than the meter can tell, or its accuracy is in doubt. Repeat near rated current."),
            _ => format!("The three currents are within {deviation} % of their mean."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(amperes: [f64; 3]) -> Inputs {
        let clamp = Accuracy {
            percent_of_reading: 0.1,
            digits: 0.0,
            resolution: 0.0,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        let [u, v, w] = amperes.map(|i| Some(Reading::with(Current::from_amperes(i), clamp)));
        Inputs { u, v, w, meter: Some(Meter::Fundamental), maker_maximum: None }
    }

    /// Limits: common practice, no source. Definition: NEMA MG 1 (row UB-01), here Hubert Ex. 5.14 as currents.
    #[test]
    fn at_just_inside_and_just_outside() {
        assert_eq!(check(&of([10.0, 10.0, 10.0])).verdict, Verdict::Within);
        assert_eq!(check(&of([9.53, 10.0, 10.47])).verdict, Verdict::Within);
        assert_eq!(check(&of([9.5, 10.0, 10.5])).verdict, Verdict::Marginal);
        assert_eq!(check(&of([9.0, 10.0, 11.0])).verdict, Verdict::Marginal);
        assert_eq!(check(&of([8.95, 10.0, 11.05])).verdict, Verdict::Outside);
        assert_eq!(check(&of([0.0, 10.0, 10.0])).verdict, Verdict::Outside);
        assert_eq!(check(&of([46.0, 45.5, 44.0])).figures[0].value, "2.58");
    }

    /// The maker's own limit goes first, in either direction (standing rule of every check).
    #[test]
    fn the_makers_limit_replaces_practice() {
        let own = |percent: f64, amperes| {
            check(&Inputs { maker_maximum: Some(Ratio::from_fraction(percent / 100.0)), ..of(amperes) })
        };
        assert_eq!(own(3.0, [9.6, 10.0, 10.4]).verdict, Verdict::Outside);
        assert_eq!(own(3.0, [9.6, 10.0, 10.4]).limit, "at most 3.00 % off the mean, the maker's");
        assert_eq!(own(8.0, [9.4, 10.0, 10.6]).verdict, Verdict::Within);
        assert_eq!(own(0.0, [10.0; 3]).verdict, Verdict::NotAssessed);
    }

    #[test]
    fn limit_first_missing_named_and_zero_said() {
        let outcome = check(&Inputs { w: None, meter: None, ..of([10.0; 3]) });
        assert_eq!(outcome.missing[0].what, "motor current W");
        assert!(outcome.rule.is_some() && !outcome.limit.is_empty());
        assert_eq!(check(&of([0.0; 3])).verdict, Verdict::NotAssessed);
        assert_eq!(check(&of([f64::NAN, 1.0, 1.0])).verdict, Verdict::NotAssessed);
    }
}
