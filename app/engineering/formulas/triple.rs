//! Largest deviation of three like readings from their mean, as NEMA MG 1 12.45 and 14.36 define unbalance (row UB-01).

use crate::decision::Measured;
use crate::quantity::Quantity;
use crate::reading::Reading;

/// What three readings tell.
#[derive(Clone, Debug, PartialEq)]
pub struct Spread {
    /// Their mean, in the coherent unit.
    pub mean: f64,
    /// Deviation of each from the mean, in percent, signed.
    pub deviations: [f64; 3],
    /// Which of them is farthest off.
    pub farthest: usize,
    /// The largest deviation in percent, with its uncertainty.
    pub largest: Measured,
}

/// `None` where the mean is not above zero.
#[must_use]
pub fn spread<Q: Quantity>(readings: &[Reading<Q>; 3]) -> Option<Spread> {
    let numbers = [readings[0].number(), readings[1].number(), readings[2].number()];
    let mean = numbers.iter().sum::<f64>() / 3.0;
    if !(mean.is_finite() && mean > 0.0) {
        return None;
    }
    let deviations = numbers.map(|n| (n / mean - 1.0) * 100.0);
    let farthest = (0..3).fold(0, |far, i| if deviations[i].abs() > deviations[far].abs() { i } else { far });
    // d = 100·(x/m − 1): its own reading counts (1/m − x/3m²), each of the others x/3m².
    let shared = numbers[farthest] / (3.0 * mean * mean);
    let terms: Vec<_> = readings
        .iter()
        .enumerate()
        .map(|(i, reading)| {
            let weight = if i == farthest { 1.0 / mean - shared } else { shared };
            (reading.standard_uncertainty().map(|u| 100.0 * weight.abs() * u), reading.doubt())
        })
        .collect();
    Some(Spread { mean, deviations, farthest, largest: Measured::combined(deviations[farthest].abs(), &terms) })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::Voltage;

    /// Hubert Ex. 5.14 (2.58 %), and C-UB-005, whose largest deviation lies below the mean (row UB-01).
    #[test]
    fn the_largest_deviation_is_the_published_one_on_either_side() {
        for (volts, published) in [([460.0, 455.0, 440.0], 2.583_025_8), ([400.0, 395.0, 388.0], 1.606_086_2)] {
            let found = spread(&volts.map(|v| Reading::bare(Voltage::from_volts(v)))).expect("above zero");
            assert!((found.largest.value - published).abs() < 0.005, "{found:?}");
            assert_eq!(found.farthest, 2);
        }
        assert!(spread(&[0.0; 3].map(|v| Reading::bare(Voltage::from_volts(v)))).is_none());
    }
}
