//! Prospective short-circuit current at a drive, and impedance in percent (rows SP-01, SP-02 and SP-05).

use crate::quantity::{ApparentPower, Current, Frequency, Ratio, Resistance, Voltage};

/// A transformer as its plate describes it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Transformer {
    /// Rated apparent power.
    pub rating: ApparentPower,
    /// Secondary line volts.
    pub secondary: Voltage,
    /// Short-circuit impedance: 0.04 for 4 %.
    pub impedance: Ratio,
}

impl Transformer {
    /// Rated secondary current, S/(√3·U).
    #[must_use]
    pub fn full_load(&self) -> Current {
        Current::from_amperes(self.rating.volt_amperes() / (3.0_f64.sqrt() * self.secondary.volts()))
    }

    /// Impedance of one phase as seen from the secondary, z·U²/S.
    #[must_use]
    pub fn ohms(&self) -> Resistance {
        base_impedance(self.impedance, self.secondary, self.rating)
    }
}

/// z·U²/S: what an impedance in percent is in ohms.
#[must_use]
pub fn base_impedance(part: Ratio, line: Voltage, base: ApparentPower) -> Resistance {
    Resistance::from_ohms(part.fraction() * line.volts() * line.volts() / base.volt_amperes())
}

/// z = √(r² + x²).
#[must_use]
pub fn impedance(resistance: Ratio, reactance: Ratio) -> Ratio {
    Ratio::from_fraction(libm::hypot(resistance.fraction(), reactance.fraction()))
}

/// Inductance of a reactance in henries, X/(2π·f), for display.
#[must_use]
pub fn henries(reactance: Resistance, frequency: Frequency) -> f64 {
    reactance.ohms() / (2.0 * std::f64::consts::PI * frequency.hertz())
}

/// I = U/(√3·Z) behind a transformer, its source (infinite when not stated) and a cable of this resistance and
/// reactance. Source and transformer count as pure reactance, which with a cable gives the larger current.
#[must_use]
pub fn prospective(
    transformer: &Transformer,
    source: Option<ApparentPower>,
    cable_resistance: Resistance,
    cable_reactance: Resistance,
) -> Current {
    let volts = transformer.secondary.volts();
    let behind = source.map_or(0.0, |s| volts * volts / s.volt_amperes());
    let reactance = behind + transformer.ohms().ohms() + cable_reactance.ohms();
    Current::from_amperes(volts / (3.0_f64.sqrt() * libm::hypot(cable_resistance.ohms(), reactance)))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn transformer(kva: f64, volts: f64, percent: f64) -> Transformer {
        Transformer {
            rating: ApparentPower::from_volt_amperes(kva * 1000.0),
            secondary: Voltage::from_volts(volts),
            impedance: Ratio::from_fraction(percent / 100.0),
        }
    }

    const NOTHING: Resistance = Resistance::from_ohms(0.0);

    /// C-SP-001, C-SP-002 (row SP-01) and C-SP-003 (row SP-02, source of 100 MVA).
    #[test]
    fn published_transformers() {
        for (kva, volts, percent, full, fault) in
            [(1000.0, 480.0, 5.75, 1202.8131, 20_918.488), (630.0, 400.0, 4.0, 909.326_67, 22_733.167)]
        {
            let t = transformer(kva, volts, percent);
            assert!((t.full_load().amperes() - full).abs() < 0.12);
            assert!((prospective(&t, None, NOTHING, NOTHING).amperes() - fault).abs() < 2.2);
        }
        let source = Some(ApparentPower::from_volt_amperes(100e6));
        let found = prospective(&transformer(1000.0, 480.0, 5.75), source, NOTHING, NOTHING);
        assert!((found.amperes() - 17_819.453).abs() < 5.0);
    }

    /// C-SP-004: Hubert, Ex. 2.8 (1.58 %); C-SP-007 (row SP-05): 3 % of 45 kVA at 480 V, 60 Hz.
    #[test]
    fn published_impedances() {
        let z = impedance(Ratio::from_fraction(0.009), Ratio::from_fraction(0.013));
        assert!((z.fraction() * 100.0 - 1.581_138_8).abs() < 0.001);
        let x = base_impedance(
            Ratio::from_fraction(0.03),
            Voltage::from_volts(480.0),
            ApparentPower::from_volt_amperes(45_000.0),
        );
        assert!((x.ohms() - 0.1536).abs() < 1.54e-5);
        assert!((henries(x, Frequency::from_hertz(60.0)) * 1000.0 - 0.407_436_65).abs() < 0.000_407);
    }
}
