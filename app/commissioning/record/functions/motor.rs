//! Functions: motor data as keyed in, control mode and volts per hertz.

use super::{CONTROL, Function, MOTOR, choice, flag, quantity};
use engineering::Kind::{Current, Frequency, Number, Percent, Power, Resistance, Speed, Voltage};

#[rustfmt::skip]
pub(super) const ROWS: &[Function] = &[
    quantity(MOTOR, "motor-volts", "motor rated volts", (Voltage, "V"), (10.0, 1e5), "Of the rating column in use."),
    quantity(MOTOR, "motor-amps", "motor rated amps", (Current, "A"), (0.01, 2e4), "Of the same column; never the drive's."),
    quantity(MOTOR, "motor-hertz", "motor rated hertz", (Frequency, "Hz"), (1.0, 2000.0), ""),
    quantity(MOTOR, "motor-rpm", "motor rated speed", (Speed, "rpm"), (10.0, 60000.0), "The plate's, with its slip; not the synchronous speed."),
    quantity(MOTOR, "motor-power", "motor rated power", (Power, "kW"), (10.0, 5e7), "At the shaft."),
    quantity(MOTOR, "motor-power-factor", "motor cosφ", (Number, ""), (0.05, 1.0), ""),
    quantity(MOTOR, "motor-no-load-current", "no-load or magnetising current", (Current, "A"), (0.0, 1e4), "Keyed in or found by the drive."),
    quantity(MOTOR, "identified-stator-resistance", "stator resistance found by the drive", (Resistance, "Ω"), (0.0, 1e5), "One phase in star, cable included."),
    choice(CONTROL, "control-mode", "control mode", &[("volts-per-hertz", "volts per hertz"), ("volts-per-hertz-slip", "volts per hertz, slip compensated"), ("vector-open", "vector, without encoder"), ("vector-closed", "vector, with encoder"), ("torque", "torque control")], "Several motors on one drive: volts per hertz."),
    quantity(CONTROL, "base-frequency", "base frequency", (Frequency, "Hz"), (1.0, 2000.0), "Where full volts are reached."),
    quantity(CONTROL, "base-volts", "volts at base frequency", (Voltage, "V"), (10.0, 1e5), "Together with the base frequency it is the flux of the motor."),
    choice(CONTROL, "volts-per-hertz-shape", "shape of volts over hertz", &[("linear", "straight"), ("square", "square, for fans and pumps"), ("points", "set by points"), ("automatic", "found by the drive")], ""),
    quantity(CONTROL, "boost", "boost at standstill", (Percent, "%"), (0.0, 0.5), "Part of rated volts; too much heats a motor at low speed."),
    flag(CONTROL, "slip-compensation", "slip compensation", ""),
    flag(CONTROL, "energy-saving", "flux lowered at part load", ""),
    choice(CONTROL, "output-phase-order", "output sequence", &[("u-v-w", "U-V-W"), ("u-w-v", "exchanged by setting")], "A direction made right here is not right on a bypass."),
    quantity(CONTROL, "encoder-pulses", "encoder pulses in one turn", (engineering::Kind::Count, ""), (1.0, 1e6), ""),
    flag(CONTROL, "encoder-reversed", "encoder counts reversed by setting", ""),
];
