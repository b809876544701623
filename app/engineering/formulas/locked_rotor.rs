//! Starting on the line, and what voltage and frequency change (rows MN-17, MN-20).

use crate::quantity::{ApparentPower, Current, Frequency, Ratio, Torque, Voltage};

/// I = S/(√3·U): the line current of the apparent power that a code letter names.
#[must_use]
pub fn line_current(apparent: ApparentPower, line: Voltage) -> Current {
    Current::from_amperes(apparent.volt_amperes() / (3.0_f64.sqrt() * line.volts()))
}

/// I₂ = I₁·(U₂/f₂)/(U₁/f₁): locked-rotor current follows volts per hertz.
#[must_use]
pub fn scaled_current(at_rated: Current, rated: (Voltage, Frequency), applied: (Voltage, Frequency)) -> Current {
    let flux = |(voltage, frequency): (Voltage, Frequency)| voltage.volts() / frequency.hertz();
    Current::from_amperes(at_rated.amperes() * flux(applied) / flux(rated))
}

/// T₂ = T₁·(U₂/U₁)²: torque at the same slip and frequency.
#[must_use]
pub fn torque_at_voltage(at_rated: Torque, voltage: Ratio) -> Torque {
    Torque::from_newton_metres(at_rated.newton_metres() * voltage.fraction() * voltage.fraction())
}
