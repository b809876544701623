//! Where the power goes between stator and shaft of an induction motor (rows MN-02, MN-05).

use crate::quantity::{ApparentPower, Current, Power, Ratio, Resistance, Speed, Torque, Voltage};

/// P_Cu = 3·I²·R: copper loss of three phases, or of the star equivalent.
#[must_use]
pub fn copper_loss(current: Current, phase: Resistance) -> Power {
    Power::from_watts(3.0 * current.amperes() * current.amperes() * phase.ohms())
}

/// s·P_δ: what of the air-gap power stays in the rotor.
#[must_use]
pub fn rotor_loss(air_gap: Power, slip: Ratio) -> Power {
    Power::from_watts(air_gap.watts() * slip.fraction())
}

/// s = P_rotor/P_δ: the slip behind a rotor loss.
#[must_use]
pub fn slip_of(air_gap: Power, rotor_loss: Power) -> Ratio {
    Ratio::from_fraction(rotor_loss.watts() / air_gap.watts())
}

/// (1 − s)·P_δ: what is left to turn the rotor.
#[must_use]
pub fn mechanical(air_gap: Power, slip: Ratio) -> Power {
    Power::from_watts(air_gap.watts() * (1.0 - slip.fraction()))
}

/// What is left of a power after a loss.
#[must_use]
pub fn after(power: Power, loss: Power) -> Power {
    Power::from_watts(power.watts() - loss.watts())
}

/// η = P_out/P_in.
#[must_use]
pub fn efficiency(output: Power, input: Power) -> Ratio {
    Ratio::from_fraction(output.watts() / input.watts())
}

/// P_in = P_out/η.
#[must_use]
pub fn input(output: Power, efficiency: Ratio) -> Power {
    Power::from_watts(output.watts() / efficiency.fraction())
}

/// S = √3·U·I.
#[must_use]
pub fn apparent(line: Voltage, current: Current) -> ApparentPower {
    ApparentPower::from_volt_amperes(3.0_f64.sqrt() * line.volts() * current.amperes())
}

/// cos φ = P/S.
#[must_use]
pub fn power_factor(active: Power, apparent: ApparentPower) -> Ratio {
    Ratio::from_fraction(active.watts() / apparent.volt_amperes())
}

/// T = P_δ/ω_s: the torque in the air gap, which is that of the mechanical power at its own speed.
#[must_use]
pub fn air_gap_torque(air_gap: Power, synchronous: Speed) -> Torque {
    crate::formulas::torque::torque(air_gap, synchronous)
}
