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
    use proptest::prelude::*;

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

    /// A reading with the instrument's figures, the doubt of an unknown one where asked.
    fn with(value: f64, percent: f64, digit: f64, doubted: bool) -> Measured {
        let accuracy = Accuracy {
            percent_of_reading: percent,
            digits: 1.0,
            resolution: digit,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        let measured = Measured::direct(&Reading::with(Resistance::from_ohms(value), accuracy));
        Measured { doubt: doubted.then(|| "no instrument is named".to_owned()), ..measured }
    }

    fn every_way(measured: &Measured, low: f64, high: f64) -> [Verdict; 3] {
        [measured.at_least(low), measured.at_most(high), measured.between(low, high)]
    }

    proptest! {
        #![proptest_config(ProptestConfig { failure_persistence: None, ..ProptestConfig::default() })]

        #[test]
        fn a_better_instrument_keeps_every_definite_verdict(value in -100.0..100.0f64, low in -100.0..100.0f64, width in 0.0..50.0f64, percent in 0.0..20.0f64, digit in 0.0..5.0f64, better in 0.0..=1.0f64, doubted in prop::bool::ANY) {
            let (worse, good) = (with(value, percent, digit, doubted), with(value, percent * better, digit * better, doubted));
            prop_assert!(good.expanded <= worse.expanded);
            for (before, after) in every_way(&worse, low, low + width).into_iter().zip(every_way(&good, low, low + width)) {
                prop_assert!(before == Verdict::Marginal || after == before, "{before:?} became {after:?}");
                prop_assert!(!doubted || after != Verdict::Within);
            }
        }

        #[test]
        fn a_wider_limit_is_never_stricter(value in -100.0..100.0f64, low in -100.0..100.0f64, width in 0.0..50.0f64, wider in (0.0..50.0f64, 0.0..50.0f64), percent in 0.0..20.0f64, doubted in prop::bool::ANY) {
            let reading = with(value, percent, 0.0, doubted);
            let narrow = every_way(&reading, low, low + width);
            let wide = every_way(&reading, low - wider.0, low + width + wider.1);
            for (before, after) in narrow.into_iter().zip(wide) {
                prop_assert_eq!(after.worse(before), before, "{:?} became {:?}", before, after);
            }
        }

        #[test]
        fn several_terms_are_never_surer_than_one_of_them(value in -100.0..100.0f64, terms in prop::collection::vec(0.0..10.0f64, 1..5)) {
            let all: Vec<(Option<f64>, Option<String>)> = terms.iter().map(|u| (Some(*u), None)).collect();
            let combined = Measured::combined(value, &all);
            prop_assert!(terms.iter().all(|u| combined.expanded >= COMBINED_TERMS * u * (1.0 - 1e-12)));
            let doubted: Vec<_> = all.iter().cloned().chain([(None, Some("no instrument is named".to_owned()))]).collect();
            prop_assert_ne!(Measured::combined(value, &doubted).at_least(value - 1e6), Verdict::Within);
        }
    }
}
