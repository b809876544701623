//! The magnetising (no-load) current bracketed from the nameplate: rows NL-01 and NL-02.
//!
//! Upper end: I_N·sin φ_N. Lower end, Heyland's lossless circle: I_N·(sin φ − cos φ·(λ − √(λ² − 1))), λ = T_b/T_N.
//! On the three textbook machines of the reference cases the exact value lies between the two. Neither end is a limit.

use crate::formulas::plausible;
use crate::limit::Limit;
use crate::outcome::OutcomeBuilder;
use crate::quantity::{Current, Ratio};
use crate::rounding::significant;
use crate::sources::runs::{NL_01, NL_02, PULL_OUT};

/// Breakdown over rated torque taken when the plate does not tell; the small end, so that the bracket is wide.
pub const USUAL_BREAKDOWN: Limit =
    Limit { name: "breakdown over rated torque, when not stated", value: 1.6, unit: "1", source: PULL_OUT };

/// Two currents between which the magnetising current lies.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Bracket {
    /// Lower end (NL-02).
    pub low: Current,
    /// Upper end (NL-01).
    pub high: Current,
}

/// The bracket at rated flux; `None` unless current is above zero, power factor between 0 and 1, λ at least 1.
#[must_use]
pub fn bracket(rated_current: Current, power_factor: Ratio, breakdown: Ratio) -> Option<Bracket> {
    let (amperes, cosine, lambda) = (rated_current.amperes(), power_factor.fraction(), breakdown.fraction());
    let sound =
        amperes.is_finite() && amperes > 0.0 && cosine > 0.0 && cosine < 1.0 && lambda.is_finite() && lambda >= 1.0;
    sound.then(|| {
        let sine = (1.0 - cosine * cosine).sqrt();
        let low = amperes * (sine - cosine * (lambda - (lambda * lambda - 1.0).sqrt()));
        Bracket { low: Current::from_amperes(low.max(0.0)), high: Current::from_amperes(amperes * sine) }
    })
}

/// The bracket for a check: names what is missing, marks an assumed λ, cites and shows the working.
pub fn work_out(
    b: &mut OutcomeBuilder,
    rated_current: Option<Current>,
    power_factor: Option<Ratio>,
    breakdown: Option<Ratio>,
) -> Option<Bracket> {
    b.cite(NL_01);
    b.cite(NL_02);
    let current = plausible::positive(b, rated_current, "rated motor current");
    let cosine = plausible::proper_fraction(b, power_factor, "rated power factor");
    let lambda = plausible::breakdown(b, breakdown);
    let (current, cosine, lambda) = (current?, cosine?, lambda?);
    let found = bracket(current, cosine, lambda)?;
    let (i, c, l) =
        (significant(current.amperes(), 4), significant(cosine.fraction(), 3), significant(lambda.fraction(), 3));
    let sine = significant((1.0 - cosine.fraction() * cosine.fraction()).sqrt(), 4);
    b.line("sine of the rated angle", "sin φ = √(1 − cos² φ)", format!("√(1 − {c}²)"), sine.clone());
    b.line(
        "magnetising current, upper end",
        "I_m = I_N·sin φ",
        format!("{i} A × {sine}"),
        format!("{} A", significant(found.high.amperes(), 3)),
    );
    b.line(
        "magnetising current, lower end (circle diagram)",
        "I_m = I_N·(sin φ − cos φ·(λ − √(λ² − 1)))",
        format!("{i} A × ({sine} − {c} × ({l} − √({l}² − 1)))"),
        format!("{} A", significant(found.low.amperes(), 3)),
    );
    Some(found)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn of(amperes: f64, cosine: f64, lambda: f64) -> Option<Bracket> {
        bracket(Current::from_amperes(amperes), Ratio::from_fraction(cosine), Ratio::from_fraction(lambda))
    }

    /// Reference cases C-NL-001, C-NL-002 (rows NL-01, NL-02).
    #[test]
    fn both_ends_are_the_reference_figures() {
        for (i, c, l, high, low) in
            [(21.0, 0.85, 3.0, 11.062_436, 7.999_860_6), (67.0, 0.88, 2.8, 31.823_237, 20.935_646)]
        {
            let found = of(i, c, l).expect("plausible plate");
            assert!((found.high.amperes() - high).abs() < 0.001 * high, "{found:?}");
            assert!((found.low.amperes() - low).abs() < 0.001 * low, "{found:?}");
        }
    }

    /// Fitzgerald Ex. 6.2 and Chapman Ex. 7-3 machines solved exactly (C-NL-006, C-NL-007): I₀ lies inside.
    #[test]
    fn textbook_machines_lie_inside_the_bracket() {
        for (i, c, l, exact) in
            [(25.415_483, 0.895_415, 2.707_525_1, 9.233_479_7), (31.237_451, 0.903_304_98, 2.111_360_6, 9.687_970_2)]
        {
            let found = of(i, c, l).expect("plausible plate");
            assert!(found.low.amperes() < exact && exact < found.high.amperes(), "{found:?}");
        }
    }

    #[test]
    fn impossible_plates_have_no_bracket_and_a_negative_lower_end_is_zero() {
        for (i, c, l) in [
            (0.0, 0.85, 2.0),
            (21.0, 1.2, 2.0),
            (21.0, 0.0, 2.0),
            (21.0, 0.85, 0.9),
            (f64::NAN, 0.85, 2.0),
            (f64::INFINITY, 0.85, 2.0),
        ] {
            assert!(of(i, c, l).is_none(), "{i} {c} {l}");
        }
        assert!(of(21.0, 0.97, 1.6).expect("plausible").low.amperes().abs() < 1e-12);
    }
}
