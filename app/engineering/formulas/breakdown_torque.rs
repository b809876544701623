//! Breakdown torque by frequency from stator resistance and leakage reactance alone (rows VF-03, VF-04).

use crate::formulas::synchronous::synchronous_speed;
use crate::formulas::torque::torque;
use crate::quantity::{Frequency, Power, Resistance, Torque, Voltage};

/// A motor of which only these are known.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Leakage {
    /// Stator resistance.
    pub stator: Resistance,
    /// Stator and rotor leakage reactance together, at base frequency.
    pub reactance: Resistance,
    /// Base frequency.
    pub base: Frequency,
    /// Pole pairs.
    pub pole_pairs: u32,
}

impl Leakage {
    /// T = 3·U_ph²/(2·ω_s·(R₁ + √(R₁² + X²))), X in proportion to frequency.
    #[must_use]
    pub fn breakdown(&self, line: Voltage, frequency: Frequency) -> Torque {
        let reactance = self.reactance.ohms() * frequency.hertz() / self.base.hertz();
        let stator = self.stator.ohms();
        let power = line.volts() * line.volts() / (2.0 * (stator + stator.hypot(reactance)));
        torque(Power::from_watts(power), synchronous_speed(frequency, self.pole_pairs))
    }
}
