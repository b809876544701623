//! What slip makes of a frequency and of a speed (row MN-02).

use crate::quantity::{Frequency, Ratio, Speed};

/// Frequency in the rotor, s·f.
#[must_use]
pub fn rotor_frequency(slip: Ratio, supply: Frequency) -> Frequency {
    Frequency::from_hertz(slip.fraction() * supply.hertz())
}

/// n_s = n/(1 − s).
#[must_use]
pub fn synchronous_speed(speed: Speed, slip: Ratio) -> Speed {
    Speed::from_rpm(speed.rpm() / (1.0 - slip.fraction()))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-MN-003: Bird, Ex. 22.4 (1.5 Hz); C-MN-004: Hubert, Ex. 4.2 (5 Hz); C-MN-005: Bird, Ex. 22.6 (1250 rpm).
    #[test]
    fn published_examples() {
        for (slip, supply, rotor) in [(0.03, 50.0, 1.5), (0.083_333_333, 60.0, 5.0)] {
            let found = rotor_frequency(Ratio::from_fraction(slip), Frequency::from_hertz(supply));
            assert!((found.hertz() - rotor).abs() < 0.001);
        }
        let found = synchronous_speed(Speed::from_rpm(1200.0), Ratio::from_fraction(0.04));
        assert!((found.rpm() - 1250.0).abs() < 0.01);
    }
}
