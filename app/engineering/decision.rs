//! The decision rule: a verdict knows its instrument (guard band after JCGM 106).
//!
//! A single rectangular half-width A gives U = 1.65·A/√3; several combined give U = 2u (rows DU-01, DU-04).
//! Upper limit L: within if x + U ≤ L, outside if x − U > L, otherwise marginal. Mirrored for a lower limit.
//! A reading whose instrument is unknown or out of calibration is marginal at best.

use crate::outcome::Verdict;
use crate::quantity::Quantity;
use crate::reading::Reading;

/// Factor on u for one rectangular term.
const SINGLE_TERM: f64 = 1.65;
/// Factor on u for several combined terms.
const COMBINED_TERMS: f64 = 2.0;

/// A value with what is known of its uncertainty; `expanded` is U, in the same unit.
#[derive(Clone, Debug, PartialEq)]
pub struct Measured {
    /// The value compared with the limit.
    pub value: f64,
    /// Expanded uncertainty U; zero when nothing is known (then `doubt` says so).
    pub expanded: f64,
    /// Why the verdict can be marginal at best, if so.
    pub doubt: Option<String>,
}

impl Measured {
    /// One reading compared as it stands.
    #[must_use]
    pub fn direct<Q: Quantity>(reading: &Reading<Q>) -> Self {
        Self {
            value: reading.number(),
            expanded: reading.standard_uncertainty().map_or(0.0, |u| SINGLE_TERM * u),
            doubt: reading.doubt(),
        }
    }

    /// One reading scaled by an exact factor.
    #[must_use]
    pub fn scaled<Q: Quantity>(reading: &Reading<Q>, factor: f64) -> Self {
        let direct = Self::direct(reading);
        Self { value: direct.value * factor, expanded: direct.expanded * factor.abs(), doubt: direct.doubt }
    }

    /// A result of several readings: each term is (sensitivity × standard uncertainty, doubt) of one input.
    #[must_use]
    pub fn combined(value: f64, terms: &[(Option<f64>, Option<String>)]) -> Self {
        let variance: f64 = terms.iter().filter_map(|(u, _)| *u).map(|u| u * u).sum();
        Self { value, expanded: COMBINED_TERMS * variance.sqrt(), doubt: terms.iter().find_map(|(_, d)| d.clone()) }
    }

    /// A number known exactly: computed from nameplates or settings, nothing measured.
    #[must_use]
    pub const fn exact(value: f64) -> Self {
        Self { value, expanded: 0.0, doubt: None }
    }

    /// Verdict against a lower limit.
    #[must_use]
    pub fn at_least(&self, limit: f64) -> Verdict {
        self.cap(if self.value - self.expanded >= limit {
            Verdict::Within
        } else if self.value + self.expanded < limit {
            Verdict::Outside
        } else {
            Verdict::Marginal
        })
    }

    /// Verdict against an upper limit.
    #[must_use]
    pub fn at_most(&self, limit: f64) -> Verdict {
        self.cap(if self.value + self.expanded <= limit {
            Verdict::Within
        } else if self.value - self.expanded > limit {
            Verdict::Outside
        } else {
            Verdict::Marginal
        })
    }

    /// Verdict against both.
    #[must_use]
    pub fn between(&self, low: f64, high: f64) -> Verdict {
        self.at_least(low).worse(self.at_most(high))
    }

    fn cap(&self, verdict: Verdict) -> Verdict {
        if self.doubt.is_some() { verdict.worse(Verdict::Marginal) } else { verdict }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::Resistance;
    use crate::reading::Accuracy;

    fn ohms(value: f64, half_width: f64) -> Measured {
        let accuracy = Accuracy {
            percent_of_reading: 0.0,
            digits: 1.0,
            resolution: half_width,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Measured::direct(&Reading::with(Resistance::from_ohms(value), accuracy))
    }

    /// C-DU-003 of the reference cases has the same shape: 5.2 against 5.0 with U = 0.3 is not a pass.
    #[test]
    fn a_reading_closer_than_its_instrument_can_tell_is_marginal() {
        let a = 0.3 / 1.65 * 3.0_f64.sqrt();
        assert_eq!(ohms(5.2, a).at_least(5.0), Verdict::Marginal);
        assert_eq!(ohms(5.31, a).at_least(5.0), Verdict::Within);
        assert_eq!(ohms(4.69, a).at_least(5.0), Verdict::Outside);
        assert_eq!(ohms(4.71, a).at_least(5.0), Verdict::Marginal);
    }

    #[test]
    fn no_instrument_is_marginal_at_best_but_outside_stays_outside() {
        let bare = Measured::direct(&Reading::bare(Resistance::from_ohms(100.0)));
        assert_eq!(bare.at_least(5.0), Verdict::Marginal);
        assert_eq!(bare.at_least(500.0), Verdict::Outside);
    }
}
