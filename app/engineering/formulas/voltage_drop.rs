//! Voltage drop along a three-phase cable (row CB-12).

use crate::quantity::{Current, Length, Ratio, Resistance, Voltage};

/// ΔU = √3·I·l·(R·cos φ + X·sin φ), R and X of one kilometre.
#[must_use]
pub fn voltage_drop(
    current: Current,
    length: Length,
    resistance_per_kilometre: Resistance,
    reactance_per_kilometre: Resistance,
    power_factor: Ratio,
) -> Voltage {
    let cosine = power_factor.fraction();
    let sine = (1.0 - cosine * cosine).max(0.0).sqrt();
    let per_kilometre = resistance_per_kilometre.ohms() * cosine + reactance_per_kilometre.ohms() * sine;
    Voltage::from_volts(3.0_f64.sqrt() * current.amperes() * length.metres() / 1000.0 * per_kilometre)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-CB-007 and C-CB-008 (rows CB-09, CB-10 and CB-12, computed).
    #[test]
    fn two_motor_cables() {
        for (amperes, metres, ohms, cosine, volts) in
            [(32.0, 80.0, 3.685_22, 0.85, 14.076_245), (105.0, 150.0, 0.626_966, 0.86, 15.822_674)]
        {
            let found = voltage_drop(
                Current::from_amperes(amperes),
                Length::from_metres(metres),
                Resistance::from_ohms(ohms),
                Resistance::from_ohms(0.08),
                Ratio::from_fraction(cosine),
            );
            assert!((found.volts() - volts).abs() < 0.028);
        }
    }
}
