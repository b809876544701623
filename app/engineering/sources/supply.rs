//! Sources on the supply and the cables.

use crate::source::{Source, Status};

const fn plain(id: &'static str, text: &'static str, status: Status) -> Source {
    Source { id, text, status, safety: false }
}

const fn grave(id: &'static str, text: &'static str, status: Status) -> Source {
    Source { id, text, status, safety: true }
}

/// Supply volts.
pub const SP_04: Source = plain("SP-04", "IEC 60038:2009 and EN 50160: nominal voltage ±10 %", Status::Memory);
/// Supply voltage by the narrower range.
pub const SUPPLY_RANGE_A: Source = plain("SP-11", "ANSI C84.1: range A, nominal voltage ±5 %", Status::Memory);
/// Unbalance by negative sequence.
pub const UB_02: Source =
    plain("UB-02", "IEC 61000-4-30: negative over positive sequence from three line volts", Status::Confirmed);
/// Load of a line-fed motor at unbalanced volts.
pub const UB_04: Source = grave(
    "UB-04",
    "NEMA MG 1, figure 14-1, the lowest of several readings of the curve; not to run beyond 5 %",
    Status::Confirmed,
);
/// How much unbalance is accepted.
pub const UB_08: Source = plain(
    "UB-08",
    "IEC 60034-1: negative sequence at most 1 % in the long run (EN 50160: 2 %; ANSI C84.1: 3 % by the largest deviation)",
    Status::Memory,
);
/// Current unbalance follows voltage unbalance.
pub const UB_05: Source = plain(
    "UB-05",
    "NEMA MG 1 14.36: current unbalance is about 6 to 10 times the voltage unbalance (line-fed motor)",
    Status::Confirmed,
);
/// Transformer through-fault current.
pub const SP_01: Source =
    grave("SP-01", "textbook: I = S/(√3·U·z); motor contribution about 4 times full load", Status::Confirmed);
/// With a finite source.
pub const SP_02: Source = grave("SP-02", "textbook: source and transformer in series", Status::Memory);
/// Prospective current against the marked rating.
pub const SP_03: Source = grave(
    "SP-03",
    "NFPA 70 110.10, 409.22, 430.130: available fault current at most the marked rating",
    Status::Memory,
);
/// Ideal harmonics of a six-pulse bridge.
pub const SP_06: Source =
    plain("SP-06", "textbook: six-pulse bridge, orders 6k ± 1, I_h = I₁/h (ideal)", Status::Confirmed);
/// Current distortion limits.
pub const SP_07: Source =
    plain("SP-07", "IEEE 519-2014 and -2022, table 2, at the point of common coupling", Status::Confirmed);
/// Even harmonics and editions.
pub const SP_08: Source = plain(
    "SP-08",
    "IEEE 519: even orders 25 % of the odd limit (2014), 50 % up to the 6th and 100 % above (2022)",
    Status::Confirmed,
);
/// Wave reflection.
pub const CB_01: Source = plain("CB-01", "transmission-line theory: G = (Z_m − Z_c)/(Z_m + Z_c)", Status::Confirmed);
/// Critical length.
pub const CB_02: Source = plain("CB-02", "derived: critical length v·t_r/2", Status::Memory);
/// Shorter cables.
pub const CB_03: Source = plain("CB-03", "derived: first reflection only; double pulses can exceed it", Status::Memory);
/// Usual surge impedances.
pub const CB_04: Source = plain(
    "CB-04",
    "IEEE Trans. IA 1996: reflection about 0.95 up to 20 hp, 0.82 at 125 hp, 0.6 at 500 hp",
    Status::Memory,
);
/// General-purpose motor.
pub const CB_06: Source = grave(
    "CB-06",
    "NEMA MG 1, part 30 (30.2.2.8): peak at most 1000 V, rise time at least 2 µs, up to 600 V rated",
    Status::Confirmed,
);
/// Inverter-duty motor.
pub const CB_07: Source = grave(
    "CB-07",
    "NEMA MG 1, part 31 (31.4.4.2): peak at most 3.1 times rated volts, rise time at least 0.1 µs, up to 600 V rated",
    Status::Confirmed,
);
/// IEC stress categories.
pub const CB_08: Source =
    grave("CB-08", "IEC 60034-18-41:2014: overshoot factor A 1.1, B 1.5, C 2.0, D 2.5", Status::Memory);
/// Conductor resistance.
pub const CB_09: Source = plain("CB-09", "IEC 60228:2004, tables 2 and 3, plain copper at 20 °C", Status::Confirmed);
/// Resistance with temperature.
pub const CB_10: Source = plain("CB-10", "IEC 60028: R = R₂₀·(1 + 0.00393·(T − 20))", Status::Memory);
/// Resistivity.
pub const CB_11: Source =
    plain("CB-11", "IEC 60028: copper 17.241, aluminium 28.264 Ω·mm²/km at 20 °C", Status::Confirmed);
/// Voltage drop.
pub const CB_12: Source =
    plain("CB-12", "NEC 210.19 note: 3 % on a branch, 5 % in all; IEC 60364-5-52, annex G: 5 %", Status::Memory);
