//! Pole pairs and synchronous speed from a nameplate (rows MN-01 and MN-03), and what slip makes of a frequency (VF-06).

use crate::quantity::{Frequency, Ratio, Speed};

/// ⌊60·f/n⌋, guarding a hair above an integer; `None` for impossible plates (n at or above 60·f, or not above zero).
#[must_use]
pub fn pole_pairs(frequency: Frequency, rated_speed: Speed) -> Option<u32> {
    let (hertz, rpm) = (frequency.hertz(), rated_speed.rpm());
    if !(hertz.is_finite() && rpm.is_finite() && hertz > 0.0 && rpm > 0.0) {
        return None;
    }
    let pairs = (60.0 * hertz / rpm + 1e-9).floor();
    // More than 60 pairs is no drive motor; the bound also keeps the cast exact.
    (1.0..=60.0).contains(&pairs).then_some(pairs as u32)
}

/// n_s = 60·f/p.
#[must_use]
pub fn synchronous_speed(frequency: Frequency, pole_pairs: u32) -> Speed {
    Speed::from_rpm(60.0 * frequency.hertz() / f64::from(pole_pairs.max(1)))
}

/// s = (n_s − n)/n_s (row MN-02).
#[must_use]
pub fn slip(synchronous: Speed, speed: Speed) -> Ratio {
    Ratio::from_fraction((synchronous.rpm() - speed.rpm()) / synchronous.rpm())
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-MN-002 to C-MN-004 and C-MN-006: Hubert Ex. 4.1 and 4.2, Bird Ex. 22.4.
    #[test]
    fn published_machines() {
        assert_eq!(pole_pairs(Frequency::from_hertz(50.0), Speed::from_rpm(1475.0)), Some(2));
        assert_eq!(pole_pairs(Frequency::from_hertz(60.0), Speed::from_rpm(1100.0)), Some(3));
        assert!((synchronous_speed(Frequency::from_hertz(51.0), 3).rpm() - 1020.0).abs() < 1e-9);
        assert!((slip(Speed::from_rpm(1500.0), Speed::from_rpm(1455.0)).fraction() - 0.03).abs() < 1e-9);
        assert!((slip(Speed::from_rpm(1200.0), Speed::from_rpm(1100.0)).fraction() - 0.083_333).abs() < 1e-5);
        for (hertz, rpm) in [(50.0, 0.0), (0.0, 1475.0), (50.0, 3100.0), (50.0, -5.0), (f64::NAN, 1.0)] {
            assert!(pole_pairs(Frequency::from_hertz(hertz), Speed::from_rpm(rpm)).is_none());
        }
    }
}
