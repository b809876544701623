//! Unbalance as negative over positive sequence, and what unbalance does to a line-fed motor (rows UB-02, UB-04, UB-05).

use crate::quantity::{Quantity, Ratio, TemperatureRise};

/// Largest deviation in percent, then the load factor of a line-fed motor: the cautious reading of MG 1 figure 14-1.
const LOAD_FACTORS: [(f64, f64); 6] = [(0.0, 1.0), (1.0, 0.98), (2.0, 0.95), (3.0, 0.88), (4.0, 0.82), (5.0, 0.75)];

/// Negative over positive sequence from three line-to-line magnitudes, as IEC 61000-4-30 defines it.
#[must_use]
pub fn negative_sequence<Q: Quantity>(lines: [Q; 3]) -> Ratio {
    let squares = lines.map(|l| l.coherent() * l.coherent());
    let sum: f64 = squares.iter().sum();
    let beta = squares.iter().map(|s| s * s).sum::<f64>() / (sum * sum);
    // For equal readings 3 − 6β is one up to rounding; above one it would leave no root.
    let root = (3.0 - 6.0 * beta).min(1.0).sqrt();
    Ratio::from_fraction(((1.0 - root) / (1.0 + root)).sqrt())
}

/// To which part of its rating a line-fed motor may be loaded at this largest deviation; `None` beyond 5 %, where it
/// is not to run at all.
#[must_use]
pub fn load_factor(largest_deviation: Ratio) -> Option<Ratio> {
    let percent = largest_deviation.fraction() * 100.0;
    LOAD_FACTORS.windows(2).find(|pair| (pair[0].0..=pair[1].0).contains(&percent)).map(|pair| {
        let along = (percent - pair[0].0) / (pair[1].0 - pair[0].0);
        Ratio::from_fraction(pair[0].1 + along * (pair[1].1 - pair[0].1))
    })
}

/// The temperature rise of a line-fed motor grows by about twice the square of the unbalance in percent.
#[must_use]
pub fn heated_by(rated: TemperatureRise, largest_deviation: Ratio) -> TemperatureRise {
    let percent = largest_deviation.fraction() * 100.0;
    TemperatureRise::from_kelvins(rated.kelvins() * (1.0 + 2.0 * percent * percent / 100.0))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::Voltage;

    /// C-UB-001 to C-UB-005 (row UB-02, checked against the phasor solution).
    #[test]
    fn published_sequences() {
        for (volts, percent) in [
            ([460.0, 455.0, 440.0], 2.648_651_7),
            ([462.0, 463.0, 455.0], 1.091_427_2),
            ([203.0, 210.0, 212.0], 2.606_447_8),
            ([480.0, 476.0, 472.0], 0.970_385_13),
            ([400.0, 395.0, 388.0], 1.763_134_6),
        ] {
            assert!((negative_sequence(volts.map(Voltage::from_volts)).fraction() * 100.0 - percent).abs() < 0.005);
        }
        assert!(negative_sequence([400.0; 3].map(Voltage::from_volts)).fraction() < 1e-6);
    }

    /// C-UB-007 to C-UB-009 (NEMA MG 1 figure 14-1 as several sources read it).
    #[test]
    fn published_load_factors() {
        let factor = |percent: f64| load_factor(Ratio::from_fraction(percent / 100.0)).map(Ratio::fraction);
        assert!((factor(1.0).expect("on the curve") - 0.99).abs() < 0.010_001);
        assert!((factor(3.0).expect("on the curve") - 0.885).abs() < 0.015);
        assert_eq!(factor(5.5), None);
        assert_eq!(factor(f64::NAN), None);
    }

    /// C-UB-006: Hubert, Ex. 5.14, 110 K becomes 124.6 K at 2.58 %.
    #[test]
    fn published_heating() {
        let hot = heated_by(TemperatureRise::from_kelvins(110.0), Ratio::from_fraction(0.0258));
        assert!((hot.kelvins() - 124.644_08).abs() < 0.05);
    }
}
