//! Resistance of a conductor: the IEC 60228 maxima, resistivity, and temperature (rows CB-09 to CB-11).

use crate::formulas::copper::Conductor;
use crate::quantity::{CrossSection, Length, Ratio, Resistance, Temperature};

/// Build of a copper conductor.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Build {
    /// Stranded, for fixed installation.
    Class2,
    /// Flexible.
    Class5,
}

/// Rise of the resistance for each kelvin above 20 °C, as a part of the resistance at 20 °C (IEC 60028).
const PER_KELVIN: f64 = 0.003_93;

/// Section in mm², then the largest resistance at 20 °C in Ω/km, class 2 and class 5, plain copper.
const IEC_60228: [(f64, f64, f64); 21] = [
    (0.75, 24.5, 26.0),
    (1.0, 18.1, 19.5),
    (1.5, 12.1, 13.3),
    (2.5, 7.41, 7.98),
    (4.0, 4.61, 4.95),
    (6.0, 3.08, 3.3),
    (10.0, 1.83, 1.91),
    (16.0, 1.15, 1.21),
    (25.0, 0.727, 0.78),
    (35.0, 0.524, 0.554),
    (50.0, 0.387, 0.386),
    (70.0, 0.268, 0.272),
    (95.0, 0.193, 0.206),
    (120.0, 0.153, 0.161),
    (150.0, 0.124, 0.129),
    (185.0, 0.0991, 0.106),
    (240.0, 0.0754, 0.0801),
    (300.0, 0.0601, 0.0641),
    (400.0, 0.047, 0.0486),
    (500.0, 0.0366, 0.0384),
    (630.0, 0.0283, 0.0287),
];

/// The largest resistance that IEC 60228 allows one kilometre of plain copper at 20 °C; `None` off its list of sections.
#[must_use]
pub fn largest_per_kilometre(section: CrossSection, build: Build) -> Option<Resistance> {
    let row = IEC_60228.iter().find(|(mm2, _, _)| (mm2 - section.square_millimetres()).abs() < 1e-6)?;
    Some(Resistance::from_ohms(match build {
        Build::Class2 => row.1,
        Build::Class5 => row.2,
    }))
}

/// ρ·1 km/A at 20 °C: 17.241 Ω·mm²/km for copper, 28.264 for aluminium.
#[must_use]
pub fn per_kilometre(section: CrossSection, metal: Conductor) -> Resistance {
    let resistivity = match metal {
        Conductor::Copper => 17.241,
        Conductor::Aluminium => 28.264,
    };
    Resistance::from_ohms(resistivity / section.square_millimetres())
}

/// R = R₂₀·(1 + 0.00393·(T − 20)).
#[must_use]
pub fn at_temperature(at_20: Resistance, temperature: Temperature) -> Resistance {
    by_coefficient(at_20, Ratio::from_fraction(PER_KELVIN), temperature)
}

/// R = R₂₀·(1 + α·(T − 20)) with another coefficient for each kelvin, such as the 0.004 of the IEC 60228 factors.
#[must_use]
pub fn by_coefficient(at_20: Resistance, per_kelvin: Ratio, temperature: Temperature) -> Resistance {
    Resistance::from_ohms(at_20.ohms() * (1.0 + per_kelvin.fraction() * (temperature.celsius() - 20.0)))
}

/// A length of conductor of this resistance for each kilometre.
#[must_use]
pub fn of_length(per_kilometre: Resistance, length: Length) -> Resistance {
    Resistance::from_ohms(per_kilometre.ohms() * length.metres() / 1000.0)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-CB-010 and C-CB-011: IEC 60228, tables 2 and 3.
    #[test]
    fn published_maxima() {
        let ohms =
            |mm2, build| largest_per_kilometre(CrossSection::from_square_millimetres(mm2), build).map(Resistance::ohms);
        assert_eq!(ohms(2.5, Build::Class2), Some(7.41));
        assert_eq!(ohms(10.0, Build::Class5), Some(1.91));
        assert_eq!(ohms(11.0, Build::Class5), None);
    }

    /// C-PE-005: 30 m of 10 mm² at 20 °C is 0.0549 Ω; C-CB-007: 3.08 Ω/km becomes 3.685 Ω/km at 70 °C.
    #[test]
    fn length_and_temperature() {
        let r = of_length(Resistance::from_ohms(1.83), Length::from_metres(30.0));
        assert!((at_temperature(r, Temperature::from_celsius(20.0)).ohms() - 0.0549).abs() < 1e-5);
        let hot = at_temperature(Resistance::from_ohms(3.08), Temperature::from_celsius(70.0));
        assert!((hot.ohms() - 3.685_22).abs() < 0.003_69);
        // No cable is better than its resistivity: the list of IEC 60228 lies above ρ/A for every section.
        for (mm2, class_2, _) in IEC_60228 {
            assert!(per_kilometre(CrossSection::from_square_millimetres(mm2), Conductor::Copper).ohms() < class_2);
        }
    }
}
