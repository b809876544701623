//! Resistors that make two capacitors in series share the bus voltage (row DC-08).

use crate::quantity::{Current, Resistance, Voltage};

/// R ≤ (2·V_rated − V_bus)/ΔI_leak; none where the two capacitors together do not stand the bus.
#[must_use]
pub fn largest(capacitor: Voltage, bus: Voltage, leakage_difference: Current) -> Option<Resistance> {
    let spare = 2.0 * capacitor.volts() - bus.volts();
    (spare > 0.0).then(|| Resistance::from_ohms(spare / leakage_difference.amperes()))
}
