//! # winding-balance
//!
//! The three line-to-line winding resistances against their mean.
//!
//! d = max |R_i − R̄|/R̄. Up to 2 % random-wound, 1 % form-wound: within. Beyond 5 %: outside. Between: marginal.
//! Repair practice, from memory (row WB-01). Taken at one temperature, at the motor's terminals, with one instrument.
//! The motor maker's limit goes first.

use crate::checks::insulation_resistance::Construction;
use crate::formulas::{marking, plausible, triple};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Ratio, Resistance};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::windings::WINDING_BALANCE;

/// Name in the catalogue.
pub const NAME: &str = "winding-balance";

/// Random-wound windings.
pub const RANDOM_WOUND: Limit =
    Limit { name: "deviation from the mean, random-wound", value: 2.0, unit: "%", source: WINDING_BALANCE };
/// Form-wound windings.
pub const FORM_WOUND: Limit =
    Limit { name: "deviation from the mean, form-wound", value: 1.0, unit: "%", source: WINDING_BALANCE };
/// A fault to find.
pub const FAULT: Limit = Limit { name: "deviation that means a fault", value: 5.0, unit: "%", source: WINDING_BALANCE };

/// Which reading is which.
const NAMES: [&str; 3] = ["winding resistance U-V", "winding resistance V-W", "winding resistance W-U"];

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Resistance between U and V.
    pub u_v: Option<Reading<Resistance>>,
    /// Resistance between V and W.
    pub v_w: Option<Reading<Resistance>>,
    /// Resistance between W and U.
    pub w_u: Option<Reading<Resistance>>,
    /// Construction, when known.
    pub construction: Option<Construction>,
    /// The motor maker's own limit on the deviation.
    pub maker_maximum: Option<Ratio>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(WINDING_BALANCE);
    b.note("All three at one winding temperature, at the motor's terminals, with one instrument.");
    let (good, bad) = limits(&mut b, inputs);
    let words = if good < bad {
        format!("at most {} %; beyond {} % is outside", significant(good, 2), significant(bad, 2))
    } else {
        format!("at most {} %, the maker's", significant(good, 2))
    };
    b.limit(words);
    let rule = LimitRule::linear("%").at_most(good, format!("≤ {} %", significant(good, 2)));
    b.rule(if good < bad { rule.tick(bad, format!("{} %", significant(bad, 2))) } else { rule });
    let readings = [&inputs.u_v, &inputs.v_w, &inputs.w_u];
    let readings = [0, 1, 2].map(|i| plausible::positive_reading(&mut b, readings[i].as_ref(), NAMES[i]));
    let [Some(u_v), Some(v_w), Some(w_u)] = readings else { return b.not_assessed() };
    let readings = [u_v, v_w, w_u];
    let Some(spread) = triple::spread(&readings) else { return b.not_assessed() };

    let shown = readings.each_ref().map(|r| significant(r.number(), 4));
    b.line(
        "mean",
        "R̄ = (R_UV + R_VW + R_WU)/3",
        format!("({} + {} + {}) Ω / 3", shown[0], shown[1], shown[2]),
        format!("{} Ω", significant(spread.mean, 4)),
    );
    let deviation = significant(spread.largest.value, 3);
    b.line(
        &format!("largest deviation, {}", NAMES[spread.farthest]),
        "d = |R − R̄|/R̄",
        format!(
            "|{} Ω − {} Ω| / {} Ω",
            shown[spread.farthest],
            significant(spread.mean, 4),
            significant(spread.mean, 4)
        ),
        format!("{deviation} % ± {} %", significant(spread.largest.expanded, 2)),
    );
    b.figure("largest deviation from the mean", spread.largest.value, 3, "%");
    b.figure("mean winding resistance", spread.mean, 4, "Ω");
    let verdict = marking::graded(&spread.largest, good, bad);
    marking::mark(&mut b, &spread.largest, format!("{deviation} %"), verdict);
    let which = NAMES[spread.farthest];
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("{which} is {deviation} % off the mean. Look for a loose or corroded joint, a wrong connection or shorted turns before running."),
            Verdict::Marginal => format!("{which} is {deviation} % off the mean: more than usual, closer than the instrument can tell, or its accuracy is in doubt. Clean the contacts and repeat with four leads."),
            _ => format!("The three winding resistances are within {deviation} % of their mean."),
        },
    )
}

/// What is within and what is outside, in percent.
fn limits(b: &mut OutcomeBuilder, inputs: &Inputs) -> (f64, f64) {
    if let Some(own) = inputs.maker_maximum.filter(|m| m.fraction().is_finite() && m.fraction() > 0.0) {
        b.note("The maker's own limit is used.");
        return (own.fraction() * 100.0, own.fraction() * 100.0);
    }
    let usual = "random-wound, as nearly all low-voltage motors are";
    match b.assume(inputs.construction, Construction::RandomWound, "winding construction", usual) {
        Construction::FormWound => (FORM_WOUND.value, FAULT.value),
        Construction::RandomWound | Construction::Old => (RANDOM_WOUND.value, FAULT.value),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(ohms: [f64; 3]) -> Inputs {
        let meter = Accuracy {
            percent_of_reading: 0.05,
            digits: 0.0,
            resolution: 0.0,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        let [u_v, v_w, w_u] = ohms.map(|r| Some(Reading::with(Resistance::from_ohms(r), meter)));
        Inputs { u_v, v_w, w_u, construction: Some(Construction::RandomWound), maker_maximum: None }
    }

    /// Repair practice, from memory (row WB-01).
    #[test]
    fn at_just_inside_and_just_outside() {
        assert_eq!(check(&of([1.0, 1.0, 1.0])).verdict, Verdict::Within);
        assert_eq!(check(&of([0.985, 1.0, 1.015])).verdict, Verdict::Within);
        assert_eq!(check(&of([0.98, 1.0, 1.02])).verdict, Verdict::Marginal);
        assert_eq!(check(&of([0.95, 1.0, 1.05])).verdict, Verdict::Marginal);
        assert_eq!(check(&of([0.948, 1.0, 1.052])).verdict, Verdict::Outside);
        let form = Inputs { construction: Some(Construction::FormWound), ..of([0.985, 1.0, 1.015]) };
        assert_eq!(check(&form).verdict, Verdict::Marginal);
        let own = Inputs { maker_maximum: Some(Ratio::from_fraction(0.03)), ..of([0.965, 1.0, 1.035]) };
        assert_eq!(check(&own).verdict, Verdict::Outside);
    }

    #[test]
    fn limit_first_and_missing_named() {
        let outcome = check(&Inputs { v_w: None, ..of([1.0; 3]) });
        assert_eq!(outcome.missing[0].what, "winding resistance V-W");
        assert!(outcome.rule.is_some() && !outcome.limit.is_empty());
        assert_eq!(check(&of([0.0, 1.0, 1.0])).verdict, Verdict::NotAssessed);
        let bare = Inputs { u_v: Some(Reading::bare(Resistance::from_ohms(1.0))), ..of([1.0; 3]) };
        assert_eq!(check(&bare).verdict, Verdict::Marginal);
    }
}
