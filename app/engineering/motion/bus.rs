//! The direct-current bus while energy comes back: what its capacitors swallow (row DC-09).

use crate::quantity::{Capacitance, Energy, Power, Voltage};

/// The bus of the drive.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Bus {
    /// Before braking begins.
    pub voltage: Voltage,
    /// Of its capacitors, when known.
    pub capacitance: Option<Capacitance>,
    /// Where the drive trips, when known.
    pub trip: Option<Voltage>,
    /// Where the chopper begins to conduct, when there is one.
    pub chopper: Option<Voltage>,
    /// What motor and inverter lose of the braking power on its way; none is the cautious end.
    pub losses: Power,
}

/// V₂ = √(V₁² + 2·E/C).
#[must_use]
pub fn voltage_after(before: Voltage, energy: Energy, capacitance: Capacitance) -> Voltage {
    Voltage::from_volts(
        (before.volts() * before.volts() + 2.0 * energy.joules() / capacitance.farads()).max(0.0).sqrt(),
    )
}

/// ½·C·(V₂² − V₁²): what the capacitors take between two voltages.
#[must_use]
pub fn energy_between(before: Voltage, after: Voltage, capacitance: Capacitance) -> Energy {
    let squares = after.volts() * after.volts() - before.volts() * before.volts();
    Energy::from_joules(capacitance.farads() * squares / 2.0)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// C-DC-011 (row DC-09): 400 J into 3300 µF at 565 V lifts it to 749.4 V.
    #[test]
    fn the_bus_rises_as_published_and_the_two_formulas_agree() {
        let (before, capacitance) = (Voltage::from_volts(565.0), Capacitance::from_farads(3300e-6));
        let after = voltage_after(before, Energy::from_joules(400.0), capacitance);
        assert!((after.volts() - 749.432_61).abs() < 0.1);
        assert!((energy_between(before, after, capacitance).joules() - 400.0).abs() < 1e-6);
    }
}
