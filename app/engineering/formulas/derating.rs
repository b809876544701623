//! What altitude and heat take from a drive's output current (row DR-02, common practice).

use crate::quantity::{Length, Ratio, Temperature};

/// Altitude up to which nothing is usually taken off.
pub const FREE_ALTITUDE: Length = Length::from_metres(1000.0);
/// Ambient temperature up to which nothing is usually taken off.
pub const FREE_AMBIENT: Temperature = Temperature::from_celsius(40.0);

/// The part of the current that is left at an altitude, with this part lost for every 100 m above the free one.
#[must_use]
pub fn by_altitude(altitude: Length, free: Length, lost_per_hundred_metres: Ratio) -> Ratio {
    let hundreds = (altitude.metres() - free.metres()).max(0.0) / 100.0;
    Ratio::from_fraction((1.0 - hundreds * lost_per_hundred_metres.fraction()).max(0.0))
}

/// The part of the current that is left at an ambient temperature, with this part lost for every kelvin above the free one.
#[must_use]
pub fn by_ambient(ambient: Temperature, free: Temperature, lost_per_kelvin: Ratio) -> Ratio {
    let kelvins = (ambient.celsius() - free.celsius()).max(0.0);
    Ratio::from_fraction((1.0 - kelvins * lost_per_kelvin.fraction()).max(0.0))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-DR-001 and C-DR-002 (common practice, computed): 0.874 at 1800 m and 45 °C; nothing lost at 1000 m and 40 °C.
    #[test]
    fn both_together() {
        let one_percent = Ratio::from_fraction(0.01);
        for (metres, celsius, expected) in [(1800.0, 45.0, 0.874), (1000.0, 40.0, 1.0)] {
            let left = by_altitude(Length::from_metres(metres), FREE_ALTITUDE, one_percent).fraction()
                * by_ambient(Temperature::from_celsius(celsius), FREE_AMBIENT, one_percent).fraction();
            assert!((left - expected).abs() < 1e-5);
        }
    }
}
