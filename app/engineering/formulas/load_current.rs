//! The current that a torque takes, and the torque behind a current (row NL-05), for both ends of the bracket.

use crate::formulas::magnetising::Bracket;
use crate::quantity::{Current, Ratio};

/// I = √((I_m/r)² + (I_N² − I_m²)·(x·r)²), x = T/T_N, r = max(f/f_b, 1); `None` when I_m is above I_N.
#[must_use]
pub fn current_for(rated: Current, magnetising: Current, torque: Ratio, weakening: Ratio) -> Option<Current> {
    let (i_n, i_m, r) = (rated.amperes(), magnetising.amperes(), weakening.fraction().max(1.0));
    let active = i_n * i_n - i_m * i_m;
    let loaded = torque.fraction() * r;
    let amperes = ((i_m / r) * (i_m / r) + active * loaded * loaded).sqrt();
    (active >= 0.0 && amperes.is_finite()).then(|| Current::from_amperes(amperes))
}

/// The same for both ends of the bracket, the smaller first.
#[must_use]
pub fn current_between(
    rated: Current,
    bracket: Bracket,
    torque: Ratio,
    weakening: Ratio,
) -> Option<(Current, Current)> {
    let low = current_for(rated, bracket.low, torque, weakening)?;
    let high = current_for(rated, bracket.high, torque, weakening)?;
    Some(if low.amperes() <= high.amperes() { (low, high) } else { (high, low) })
}

/// x = √(I² − (I_m/r)²)/(r·√(I_N² − I_m²)), zero below the magnetising current; both ends, the smaller first.
#[must_use]
pub fn torque_between(rated: Current, bracket: Bracket, current: Current, weakening: Ratio) -> Option<(Ratio, Ratio)> {
    let r = weakening.fraction().max(1.0);
    let at = |magnetising: Current| {
        let i_m = magnetising.amperes();
        let active = rated.amperes() * rated.amperes() - i_m * i_m;
        let left = (current.amperes() * current.amperes() - (i_m / r) * (i_m / r)).max(0.0);
        let x = (left / active).sqrt() / r;
        (active > 0.0 && x.is_finite()).then_some(x)
    };
    let (a, b) = (at(bracket.low)?, at(bracket.high)?);
    Some((Ratio::from_fraction(a.min(b)), Ratio::from_fraction(a.max(b))))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn amperes(value: f64) -> Current {
        Current::from_amperes(value)
    }

    const RATED_FLUX: Ratio = Ratio::from_fraction(1.0);

    /// C-NL-004, C-NL-005 (row NL-05).
    #[test]
    fn partial_load_current_is_the_reference_figure() {
        for (load, published) in [(0.5, 12.773_801), (0.0, 8.4)] {
            let found =
                current_for(amperes(21.0), amperes(8.4), Ratio::from_fraction(load), RATED_FLUX).expect("plausible");
            assert!((found.amperes() - published).abs() < 0.01);
        }
    }

    /// Fitzgerald Ex. 6.2 and Chapman Ex. 7-3 machines at half load (C-NL-006, C-NL-007), within the 2 % of row NL-05.
    #[test]
    fn half_load_current_agrees_with_the_solved_circuits() {
        for (rated, magnetising, exact) in
            [(25.415_483, 9.233_479_7, 14.937_261), (31.237_451, 9.687_970_2, 17.407_914)]
        {
            let found = current_for(amperes(rated), amperes(magnetising), Ratio::from_fraction(0.5), RATED_FLUX);
            assert!((found.expect("plausible").amperes() / exact - 1.0).abs() < 0.02);
        }
    }

    #[test]
    fn torque_and_current_are_inverse() {
        let bracket = Bracket { low: amperes(8.0), high: amperes(11.0) };
        for weakening in [1.0, 1.5] {
            let (r, x) = (Ratio::from_fraction(weakening), Ratio::from_fraction(0.6));
            let (low, high) = current_between(amperes(21.0), bracket, x, r).expect("plausible");
            for current in [low, high] {
                let (a, b) = torque_between(amperes(21.0), bracket, current, r).expect("plausible");
                assert!((a.fraction() - 0.6).abs() < 1e-9 || (b.fraction() - 0.6).abs() < 1e-9);
            }
        }
        assert!(current_for(amperes(5.0), amperes(8.0), RATED_FLUX, RATED_FLUX).is_none());
    }
}
