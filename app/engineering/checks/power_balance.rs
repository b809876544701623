//! # power-balance
//!
//! Whether volts, amperes, kilowatts, power factor and efficiency of one column of the plate can belong together.
//!
//! S = √3·U·I, and η·cos φ = P/S. Both printed: their product may differ from P/S by the IEC 60034-1 tolerances (taken
//! on either side) and by the rounding of every printed figure; beyond that outside. One of them missing: the other
//! follows from P/S; at 1 or above outside, beyond what induction motors have (common practice) outside. Both missing:
//! P/S itself against such bounds. Each column of a plate (50 and 60 Hz, voltage ranges) is judged for itself.

use crate::formulas::plausible::{not_negative, positive};
use crate::formulas::tolerance;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::printed::Printed;
use crate::quantity::{Current, Power, Quantity, Ratio, Voltage};
use crate::rounding::significant;
use crate::sources::nameplate::{MN_05, MN_11, PLAUSIBLE_PRODUCT};

/// Name in the catalogue.
pub const NAME: &str = "power-balance";

/// Power factors that induction motors have (common practice).
pub(crate) const POWER_FACTORS: (f64, f64) = (0.40, 0.95);

/// What the check takes: one column of the plate.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Rated line volts of the connection.
    pub voltage: Option<Printed<Voltage>>,
    /// Rated line current of the same connection.
    pub current: Option<Printed<Current>>,
    /// Rated shaft power.
    pub power: Option<Printed<Power>>,
    /// Rated power factor.
    pub power_factor: Option<Printed<Ratio>>,
    /// Rated efficiency.
    pub efficiency: Option<Printed<Ratio>>,
}

/// η·cos φ that power, volts and amperes imply.
#[must_use]
pub fn product_from_ratings(power: Power, voltage: Voltage, current: Current) -> Ratio {
    Ratio::from_fraction(power.watts() / (3.0_f64.sqrt() * voltage.volts() * current.amperes()))
}

/// What the plate leaves possible, in the order low, as printed, high.
#[derive(Clone, Copy)]
struct Span {
    low: f64,
    mid: f64,
    high: f64,
}

impl Span {
    fn of(printed: Printed<Ratio>) -> Self {
        Self { low: printed.low(), mid: printed.number(), high: printed.high() }
    }

    fn over(self, divisor: Self) -> Self {
        Self { low: self.low / divisor.high, mid: self.mid / divisor.mid, high: self.high / divisor.low }
    }

    fn misses(self, low: f64, high: f64) -> bool {
        self.low > high || self.high < low
    }
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(MN_05);
    let power = sound(&mut b, inputs.power, "rated motor power");
    let cosine = part(&mut b, inputs.power_factor, "rated power factor");
    let efficiency = part(&mut b, inputs.efficiency, "rated efficiency");
    let (Some(cosine), Some(efficiency)) = (cosine, efficiency) else { return b.not_assessed() };
    let (low, high, name) = if let Some(power) = power {
        limits(&mut b, power, cosine, efficiency)
    } else {
        (0.0, 1.0, "efficiency × power factor")
    };
    b.limit(format!("{name} from {} to {}", significant(low, 3), significant(high, 3)));
    b.rule(LimitRule::linear("").between(low, significant(low, 3), high, significant(high, 3)));
    let voltage = sound(&mut b, inputs.voltage, "rated motor voltage");
    let current = sound(&mut b, inputs.current, "rated motor current");
    let (Some(power), Some(voltage), Some(current)) = (power, voltage, current) else { return b.not_assessed() };

    let apparent = 3.0_f64.sqrt() * voltage.number() * current.number();
    if !(apparent.is_finite() && apparent > 0.0) {
        return b.not_judged("Not assessed: volts times amperes leave the range of the arithmetic. Read both again.");
    }
    let ratings = Span {
        low: power.low() / (3.0_f64.sqrt() * voltage.high() * current.high()),
        mid: product_from_ratings(power.value, voltage.value, current.value).fraction(),
        high: power.high() / (3.0_f64.sqrt() * voltage.low() * current.low()),
    };
    let (watts, va) = (significant(power.number(), 4), significant(apparent, 4));
    b.line(
        "apparent power",
        "S = √3·U·I",
        format!("√3 × {} V × {} A", significant(voltage.number(), 4), significant(current.number(), 4)),
        format!("{va} VA"),
    );
    b.line("from the ratings", "η·cos φ = P/S", format!("{watts} W/{va} VA"), significant(ratings.mid, 4));
    let found = match (cosine, efficiency) {
        (Some(c), Some(e)) => {
            let stated = c.number() * e.number();
            b.line(
                "as printed",
                "η·cos φ",
                format!("{} × {}", significant(e.number(), 4), significant(c.number(), 4)),
                significant(stated, 4),
            );
            b.figure("implied efficiency", ratings.mid / c.number() * 100.0, 3, "%");
            b.figure("difference from the printed product", (ratings.mid / stated - 1.0) * 100.0, 3, "%");
            ratings
        }
        (Some(c), None) => {
            let implied = ratings.over(Span::of(c));
            b.line(
                "implied efficiency",
                "η = P/(S·cos φ)",
                format!("{}/{}", significant(ratings.mid, 4), significant(c.number(), 4)),
                significant(implied.mid, 4),
            );
            b.figure("implied efficiency", implied.mid * 100.0, 3, "%");
            implied
        }
        (None, Some(e)) => {
            let implied = ratings.over(Span::of(e));
            b.line(
                "implied power factor",
                "cos φ = P/(S·η)",
                format!("{}/{}", significant(ratings.mid, 4), significant(e.number(), 4)),
                significant(implied.mid, 4),
            );
            b.figure("implied power factor", implied.mid, 3, "");
            implied
        }
        (None, None) => ratings,
    };
    if let Some(cosine) = cosine {
        b.figure("input power", apparent * cosine.number() / 1000.0, 4, "kW");
    }
    b.figure("efficiency × power factor from the ratings", ratings.mid, 4, "");
    let verdict = if found.misses(low, high) { Verdict::Outside } else { Verdict::Within };
    let shown = significant(found.mid, 3);
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(found.mid, (found.high - found.low) / 2.0, shown.clone(), verdict));
    }
    let (low, high) = (significant(low, 3), significant(high, 3));
    let summary = if verdict == Verdict::Within {
        format!("The plate agrees with itself: {name} {shown}, possible {low} to {high}.")
    } else if found.low >= 1.0 {
        format!(
            "The plate contradicts itself: {name} would be {shown}, so the motor would give more than it takes. Read volts, amperes and kilowatts again, from one column and one connection."
        )
    } else {
        format!(
            "The plate contradicts itself: {name} is {shown}, possible {low} to {high}. Read every figure again, from one column and one connection."
        )
    };
    b.judged(verdict, summary)
}

/// Least and most efficiency times power factor that a motor of this power has (common practice, row MN-22).
pub(crate) fn least_and_most_product(power: Power) -> (f64, f64) {
    match power.watts() {
        watts if watts < 1000.0 => (0.15, 0.85),
        watts if watts < 10_000.0 => (0.35, 0.90),
        _ => (0.45, 0.93),
    }
}

/// Lowest and highest possible value, and of what, with its line of working.
fn limits(
    b: &mut OutcomeBuilder,
    power: Printed<Power>,
    cosine: Option<Printed<Ratio>>,
    efficiency: Option<Printed<Ratio>>,
) -> (f64, f64, &'static str) {
    let (least, most) = least_and_most_product(power.value);
    if cosine.is_none() || efficiency.is_none() {
        b.cite(PLAUSIBLE_PRODUCT);
        b.note("A figure is not on the plate, so only bounds that hold for any induction motor are applied.");
    }
    match (cosine, efficiency) {
        (Some(c), Some(e)) => {
            b.cite(MN_11);
            let of_e = tolerance::of_efficiency(power.value, e.value).fraction();
            let of_c = tolerance::of_power_factor(c.value).fraction();
            let (low, high) =
                ((e.low() - of_e) * (c.low() - of_c), (e.high() + of_e).min(1.0) * (c.high() + of_c).min(1.0));
            b.line(
                "lowest and highest product that tolerances and rounding allow",
                "(η ∓ Δη)·(cos φ ∓ Δcos φ)",
                format!(
                    "Δη = {}, Δcos φ = {}",
                    significant(of_e + e.high() - e.number(), 3),
                    significant(of_c + c.high() - c.number(), 3)
                ),
                format!("{} to {}", significant(low, 4), significant(high, 4)),
            );
            (low, high, "efficiency × power factor")
        }
        // The cap keeps an efficiency of 1 out: a hair below one is the most that any motor has.
        (Some(c), None) => ((least / c.number()).min(0.5), 0.98, "implied efficiency"),
        (None, Some(_)) => (POWER_FACTORS.0, POWER_FACTORS.1, "implied power factor"),
        (None, None) => (least, most, "efficiency × power factor"),
    }
}

/// A printed figure above zero, down to its last half digit.
fn sound<Q: Quantity>(b: &mut OutcomeBuilder, printed: Option<Printed<Q>>, what: &str) -> Option<Printed<Q>> {
    positive(b, printed.map(|p| p.value), what)?;
    let printed = printed?;
    not_negative(b, Some(printed.half_width.unwrap_or(Q::from_coherent(0.0))), &format!("rounding of the {what}"))?;
    positive(b, Some(Q::from_coherent(printed.low())), &format!("{what} with its rounding"))?;
    Some(printed)
}

/// A part of one that may be missing: `Some(None)` is not printed, `None` is impossible and named.
#[expect(clippy::option_option, reason = "not printed and impossible are different answers")]
fn part(b: &mut OutcomeBuilder, printed: Option<Printed<Ratio>>, what: &str) -> Option<Option<Printed<Ratio>>> {
    let Some(printed) = printed else { return Some(None) };
    let sound =
        printed.low() > 0.0 && printed.number() < 1.0 && printed.high().is_finite() && printed.high() >= printed.low();
    b.need(sound.then_some(Some(printed)), &format!("{what} between 0 and 1"))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn plate(kilowatts: f64, volts: f64, amperes: f64, cosine: f64, efficiency: f64) -> Inputs {
        Inputs {
            voltage: Some(Printed::nominal(Voltage::from_volts(volts))),
            current: Some(Printed::rounded(Current::from_amperes(amperes), Current::from_amperes(0.05))),
            power: Some(Printed::nominal(Power::from_watts(kilowatts * 1000.0))),
            power_factor: Some(Printed::rounded(Ratio::from_fraction(cosine), Ratio::from_fraction(0.005))),
            efficiency: Some(Printed::rounded(Ratio::from_fraction(efficiency), Ratio::from_fraction(0.0005))),
        }
    }

    fn figure(outcome: &Outcome, name: &str) -> f64 {
        outcome.figures.iter().find(|f| f.name == name).expect("figure").value.parse().expect("number")
    }

    /// C-MN-017 and C-MN-018 (row MN-06): 20.9 A agrees (0.14 %), 36.2 A of the 230 V connection does not (−42 %).
    #[test]
    fn published_plates() {
        let good = check(&plate(11.0, 400.0, 20.9, 0.83, 0.914));
        assert_eq!(good.verdict, Verdict::Within, "{good:?}");
        assert!((figure(&good, "efficiency × power factor from the ratings") - 0.759_671_41).abs() < 0.0002);
        assert!((figure(&good, "difference from the printed product") - 0.138_594_66).abs() < 0.05);
        let bad = check(&plate(11.0, 400.0, 36.2, 0.83, 0.914));
        assert_eq!(bad.verdict, Verdict::Outside);
        assert!((figure(&bad, "difference from the printed product") + 42.185_176).abs() < 0.05);
    }

    /// C-MN-014: Hubert, Ex. 4.6: 74.6 kW, 230 V, 248 A, 91 % need a power factor of 0.830.
    #[test]
    fn a_missing_power_factor_is_worked_out() {
        let outcome = check(&Inputs { power_factor: None, ..plate(74.6, 230.0, 248.0, 0.8, 0.91) });
        assert_eq!(outcome.verdict, Verdict::Within);
        assert!((figure(&outcome, "implied power factor") - 0.829_769_16).abs() < 0.0005);
        let twisted = Inputs { power_factor: None, ..plate(74.6, 230.0, 428.0, 0.8, 0.91) };
        assert_eq!(
            check(&Inputs { voltage: Some(Printed::nominal(Voltage::from_volts(138.0))), ..twisted.clone() }).verdict,
            Verdict::Within
        );
        assert_eq!(
            check(&Inputs { voltage: Some(Printed::nominal(Voltage::from_volts(480.0))), ..twisted }).verdict,
            Verdict::Outside
        );
    }

    /// The tolerances of C-MN-027 for 15 kW: 0.921 may be 0.909, 0.85 may be 0.825.
    #[test]
    fn just_inside_and_just_outside_tolerance_and_rounding() {
        // Worked by hand: (0.9205 − 0.01185)·(0.845 − 0.025) is the least product, reached at 29.06 A + 0.05 A of rounding.
        let edge = 15_000.0 / (3.0_f64.sqrt() * 400.0 * (0.9205 - 0.011_85) * (0.845 - 0.025)) + 0.05;
        assert!((edge - 29.108).abs() < 0.001);
        assert_eq!(check(&plate(15.0, 400.0, edge - 0.01, 0.85, 0.921)).verdict, Verdict::Within);
        assert_eq!(check(&plate(15.0, 400.0, edge + 0.01, 0.85, 0.921)).verdict, Verdict::Outside);
        let edge = 15_000.0 / (3.0_f64.sqrt() * 400.0 * (0.9215 + 0.011_85) * (0.855 + 0.025)) - 0.05;
        assert_eq!(check(&plate(15.0, 400.0, edge + 0.01, 0.85, 0.921)).verdict, Verdict::Within);
        assert_eq!(check(&plate(15.0, 400.0, edge - 0.01, 0.85, 0.921)).verdict, Verdict::Outside);
    }

    #[test]
    fn more_out_than_in_is_outside_whatever_is_missing() {
        let bare = Inputs { power_factor: None, efficiency: None, ..plate(11.0, 400.0, 12.0, 0.8, 0.9) };
        assert_eq!(check(&bare).verdict, Verdict::Outside);
        let cosine_only = Inputs { efficiency: None, ..plate(11.0, 400.0, 18.0, 0.8, 0.9) };
        let outcome = check(&cosine_only);
        assert_eq!(outcome.verdict, Verdict::Outside);
        assert!(outcome.summary.contains("more than it takes"), "{}", outcome.summary);
        assert_eq!(
            check(&Inputs { power_factor: None, efficiency: None, ..plate(11.0, 400.0, 20.9, 0.8, 0.9) }).verdict,
            Verdict::Within
        );
    }

    #[test]
    fn bad_and_missing_figures_are_named_with_the_limit_in_place() {
        assert_eq!(check(&plate(11.0, 400.0, 20.9, 1.2, 0.914)).missing[0].what, "rated power factor between 0 and 1");
        assert_eq!(check(&plate(11.0, 0.0, 20.9, 0.83, 0.914)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&plate(11.0, 400.0, f64::NAN, 0.83, 0.914)).verdict, Verdict::NotAssessed);
        let waiting = check(&Inputs { current: None, ..plate(11.0, 400.0, 20.9, 0.83, 0.914) });
        assert_eq!(waiting.missing[0].what, "rated motor current");
        assert!(waiting.rule.is_some() && waiting.limit.starts_with("efficiency × power factor from 0.7"));
    }
}
