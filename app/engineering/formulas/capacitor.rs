//! A capacitor charged and discharged through a resistor (rows DC-05, DC-06 and DC-09).

use crate::quantity::{Capacitance, Current, Duration, Energy, Resistance, Voltage};

/// τ = R·C.
#[must_use]
pub fn time_constant(resistance: Resistance, capacitance: Capacitance) -> Duration {
    Duration::from_seconds(resistance.ohms() * capacitance.farads())
}

/// Time to reach 95 % of the final voltage: τ·ln 20.
#[must_use]
pub fn charged_to_95_percent(resistance: Resistance, capacitance: Capacitance) -> Duration {
    Duration::from_seconds(time_constant(resistance, capacitance).seconds() * libm::log(20.0))
}

/// Time from one voltage down to another: τ·ln(V₀/V).
#[must_use]
pub fn discharge_time(resistance: Resistance, capacitance: Capacitance, from: Voltage, to: Voltage) -> Duration {
    Duration::from_seconds(time_constant(resistance, capacitance).seconds() * libm::log(from.volts() / to.volts()))
}

/// ½·C·V², stored in the capacitor and, when it was charged through a resistor, once more lost in that.
#[must_use]
pub fn energy(capacitance: Capacitance, voltage: Voltage) -> Energy {
    Energy::from_joules(0.5 * capacitance.farads() * voltage.volts() * voltage.volts())
}

/// Current at the first instant: V/R.
#[must_use]
pub fn first_current(resistance: Resistance, voltage: Voltage) -> Current {
    Current::from_amperes(voltage.volts() / resistance.ohms())
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-DC-005, C-DC-007 (row DC-06) and C-DC-006 (published worked example, about 554 s).
    #[test]
    fn published_discharges() {
        for (farads, ohms, from, to, tau, seconds) in [
            (3300e-6, 23_500.0, 680.0, 60.0, 77.55, 188.271_88),
            (2000e-6, 100_000.0, 800.0, 50.0, 200.0, 554.517_74),
            (2000e-6, 100_000.0, 800.0, 60.0, 200.0, 518.053_43),
        ] {
            let (r, c) = (Resistance::from_ohms(ohms), Capacitance::from_farads(farads));
            assert!((time_constant(r, c).seconds() - tau).abs() < 0.0078);
            let t = discharge_time(r, c, Voltage::from_volts(from), Voltage::from_volts(to));
            assert!((t.seconds() - seconds).abs() < 0.37);
        }
    }

    /// C-DC-010 (row DC-05): 3300 µF through 100 Ω from 565 V.
    #[test]
    fn published_precharge() {
        let (r, c) = (Resistance::from_ohms(100.0), Capacitance::from_farads(3300e-6));
        let v = Voltage::from_volts(565.0);
        assert!((charged_to_95_percent(r, c).seconds() - 0.988_591_65).abs() < 0.001);
        assert!((energy(c, v).joules() - 526.721_25).abs() < 0.1);
        assert!((first_current(r, v).amperes() - 5.65).abs() < 0.01);
    }
}
