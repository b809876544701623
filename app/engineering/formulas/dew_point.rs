//! The dew point over water by the Magnus formula (row DP-01).

use crate::quantity::{Ratio, Temperature};

const A: f64 = 17.62;
const B: f64 = 243.12;

/// T_d = B·γ/(A − γ), γ = ln φ + A·T/(B + T); `None` outside −45 to 60 °C or for a humidity not above 0 and up to 1.
#[must_use]
pub fn dew_point(air: Temperature, humidity: Ratio) -> Option<Temperature> {
    let (t, phi) = (air.celsius(), humidity.fraction());
    if !((-45.0..=60.0).contains(&t) && phi > 0.0 && phi <= 1.0) {
        return None;
    }
    let gamma = libm::log(phi) + A * t / (B + t);
    Some(Temperature::from_celsius(B * gamma / (A - gamma)))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Psychrometric tables, from memory: 20 °C and 50 % give 9.3 °C, 25 °C and 60 % give 16.7 °C, saturated air its own temperature.
    #[test]
    fn tabulated_dew_points() {
        for (t, phi, published) in [(20.0, 0.5, 9.3), (25.0, 0.6, 16.7), (30.0, 0.8, 26.2), (15.0, 1.0, 15.0)] {
            let found = dew_point(Temperature::from_celsius(t), Ratio::from_fraction(phi)).expect("in range");
            assert!((found.celsius() - published).abs() < 0.06, "{t} {phi}: {found:?}");
        }
        for (t, phi) in [(20.0, 0.0), (20.0, 1.2), (80.0, 0.5), (f64::NAN, 0.5)] {
            assert!(dew_point(Temperature::from_celsius(t), Ratio::from_fraction(phi)).is_none());
        }
    }
}
