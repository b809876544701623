//! Voltage reflection at the end of a motor cable (rows CB-01 to CB-04).

use crate::quantity::{Duration, Length, Power, Ratio, Resistance, Voltage};

/// Power and reflection of usual motors on usual cables, after row CB-04 (20, 125 and 500 hp).
const USUAL: [(f64, f64); 3] = [(15_000.0, 0.95), (93_000.0, 0.82), (373_000.0, 0.6)];

/// G = (Z_m − Z_c)/(Z_m + Z_c), of the voltage.
#[must_use]
pub fn coefficient(motor: Resistance, cable: Resistance) -> Ratio {
    Ratio::from_fraction((motor.ohms() - cable.ohms()) / (motor.ohms() + cable.ohms()))
}

/// A usual coefficient for a motor of this power: that of the next smaller row, which reflects more.
#[must_use]
pub fn usual_coefficient(power: Power) -> Ratio {
    let row = USUAL.iter().rev().find(|(watts, _)| power.watts() >= *watts);
    Ratio::from_fraction(row.map_or(USUAL[0].1, |(_, g)| *g))
}

/// l_c = v·t_r/2, with v as metres in a second.
#[must_use]
pub fn critical_length(travelled_in_a_second: Length, rise_time: Duration) -> Length {
    Length::from_metres(travelled_in_a_second.metres() * rise_time.seconds() / 2.0)
}

/// U_dc·(1 + G·l/l_c), from the critical length on U_dc·(1 + G).
#[must_use]
pub fn peak(bus: Voltage, coefficient: Ratio, cable: Length, critical: Length) -> Voltage {
    let part = (cable.metres() / critical.metres()).min(1.0);
    Voltage::from_volts(bus.volts() * (1.0 + coefficient.fraction() * part))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-CB-001: Bird, Ex. 44.13: 10 V at the load are 6.5 V incident and 3.5 V reflected.
    #[test]
    fn published_reflection() {
        let g = coefficient(Resistance::from_ohms(250.0), Resistance::from_ohms(75.0)).fraction();
        assert!((g - 0.538_461_54).abs() < 0.001);
        assert!((10.0 / (1.0 + g) - 6.5).abs() < 0.01 && (10.0 * g / (1.0 + g) - 3.5).abs() < 0.01);
    }

    /// C-CB-002 to C-CB-004 (rows CB-01 to CB-03, computed).
    #[test]
    fn peaks_of_three_cables() {
        for (bus, cable, motor, microseconds, metres, g, critical, volts) in [
            (565.0, 80.0, 1500.0, 0.1, 50.0, 0.898_734_18, 7.5, 1072.7848),
            (565.0, 80.0, 1500.0, 0.2, 5.0, 0.898_734_18, 15.0, 734.2616),
            (650.0, 90.0, 2000.0, 0.05, 3.0, 0.913_875_6, 3.75, 1125.2153),
        ] {
            let found = coefficient(Resistance::from_ohms(motor), Resistance::from_ohms(cable));
            assert!((found.fraction() - g).abs() < 1e-4);
            let length = critical_length(Length::from_metres(150e6), Duration::from_seconds(microseconds * 1e-6));
            assert!((length.metres() - critical).abs() < 0.01);
            let top = peak(Voltage::from_volts(bus), found, Length::from_metres(metres), length);
            assert!((top.volts() - volts).abs() < 0.5);
        }
    }
}
