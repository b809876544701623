//! Platinum resistance sensors after IEC 60751 (row TH-05).

use crate::quantity::{Resistance, Temperature, TemperatureRise};

const A: f64 = 3.9083e-3;
const B: f64 = -5.775e-7;
const C: f64 = -4.183e-12;

/// R = R₀·(1 + A·T + B·T²), below 0 °C also C·(T − 100)·T³; `r0` is 100 Ω for Pt100.
#[must_use]
pub fn resistance(r0: Resistance, at: Temperature) -> Resistance {
    let t = at.celsius();
    let below = if t < 0.0 { C * (t - 100.0) * t * t * t } else { 0.0 };
    Resistance::from_ohms(r0.ohms() * (1.0 + A * t + B * t * t + below))
}

/// The inverse; `None` outside −200 to 850 °C.
#[must_use]
pub fn temperature(r0: Resistance, measured: Resistance) -> Option<Temperature> {
    let ratio = measured.ohms() / r0.ohms();
    if !(ratio.is_finite() && r0.ohms() > 0.0) {
        return None;
    }
    let root = A * A - 4.0 * B * (1.0 - ratio);
    if root < 0.0 {
        return None;
    }
    // Exact from 0 °C up; below, a few Newton steps from there reach the quartic.
    let mut t = (-A + root.sqrt()) / (2.0 * B);
    if t < 0.0 {
        for _ in 0..8 {
            let value = 1.0 + A * t + B * t * t + C * (t - 100.0) * t * t * t - ratio;
            let slope = A + 2.0 * B * t + C * (4.0 * t * t * t - 300.0 * t * t);
            t -= value / slope;
        }
    }
    (-200.0..=850.0).contains(&t).then(|| Temperature::from_celsius(t))
}

/// Class B tolerance: 0.3 + 0.005·|T| K.
#[must_use]
pub fn class_b(at: Temperature) -> TemperatureRise {
    TemperatureRise::from_kelvins(0.3 + 0.005 * at.celsius().abs())
}

/// Class A tolerance: 0.15 + 0.002·|T| K.
#[must_use]
pub fn class_a(at: Temperature) -> TemperatureRise {
    TemperatureRise::from_kelvins(0.15 + 0.002 * at.celsius().abs())
}

#[cfg(test)]
mod tests {
    use super::*;

    const PT100: Resistance = Resistance::from_ohms(100.0);

    /// C-TH-001 to C-TH-004 (IEC 60751).
    #[test]
    fn published_points_both_ways() {
        for (t, r, a, b) in [(0.0, 100.0, 0.15, 0.3), (100.0, 138.5055, 0.35, 0.8), (150.0, 157.325_12, 0.45, 1.05)] {
            let at = Temperature::from_celsius(t);
            assert!((resistance(PT100, at).ohms() - r).abs() < 0.005);
            assert!((class_a(at).kelvins() - a).abs() < 1e-9 && (class_b(at).kelvins() - b).abs() < 1e-9);
            assert!((temperature(PT100, Resistance::from_ohms(r)).expect("in range").celsius() - t).abs() < 0.01);
        }
        assert!(
            (temperature(PT100, Resistance::from_ohms(120.0)).expect("in range").celsius() - 51.566_053).abs() < 0.01
        );
    }

    /// IEC 60751, printed table: 80.31 Ω at −50 °C.
    #[test]
    fn below_zero_the_quartic_counts() {
        assert!((resistance(PT100, Temperature::from_celsius(-50.0)).ohms() - 80.31).abs() < 0.005);
        assert!((temperature(PT100, Resistance::from_ohms(80.306)).expect("in range").celsius() + 50.0).abs() < 0.02);
        for r in [0.0, -5.0, 5000.0, f64::NAN, f64::INFINITY] {
            assert!(temperature(PT100, Resistance::from_ohms(r)).is_none(), "{r}");
        }
    }
}
