//! Sources on protective earthing and disconnection.

use crate::source::{Source, Status};

const fn grave(id: &'static str, text: &'static str, status: Status) -> Source {
    Source { id, text, status, safety: true }
}

/// Continuity test.
pub const PE_01: Source = grave(
    "PE-01",
    "IEC 60204-1:2016, clause 18.2.2: 0.2 to 10 A from at most 24 V; a result in the range expected for length, section and metal",
    Status::Memory,
);
/// High leakage current.
pub const PE_03: Source = grave(
    "PE-03",
    "IEC 61800-5-1:2007, clause 4.3.5.5.2: above 3.5 mA ac or 10 mA dc a PE of 10 mm² copper or 16 mm² aluminium, a second PE, or disconnection when the PE breaks",
    Status::Confirmed,
);
/// Section by the phase conductor.
pub const PE_04: Source = grave(
    "PE-04",
    "IEC 61800-5-1, table 2; IEC 60364-5-54, clause 543.1: PE section by phase section",
    Status::Confirmed,
);
/// Residual-current device.
pub const PE_08: Source = grave(
    "PE-08",
    "IEC 61800-5-1: a residual-current device ahead of a three-phase drive is type B",
    Status::Confirmed,
);
/// Automatic disconnection.
pub const DISCONNECTION: Source =
    grave("PE-09", "IEC 60364-4-41, clause 411.4: Z_s·I_a ≤ U₀ (TN system)", Status::Memory);
/// Allowance for clamps and joints.
pub const CONTINUITY_ALLOWANCE: Source = grave(
    "PE-10",
    "common practice: 0.05 Ω on top of the conductor for clamps and joints; beyond twice the sum a fault to find",
    Status::CommonPractice,
);
/// Loops measured cold.
pub const COLD_LOOP: Source = grave(
    "PE-11",
    "IEC 60364-6, informative annex on measured loops: Z_s(m) ≤ 2/3·U₀/I_a, since the conductors are warmer in a fault than in the test",
    Status::Memory,
);
/// Volts that count as live at a terminal.
pub const EXTRA_LOW_VOLTAGE: Source = grave(
    "PE-12",
    "IEC 60364-4-41 and IEC 61140: 50 V alternating, the upper end of extra-low voltage",
    Status::Memory,
);
/// Volts to earth by the way a supply is earthed.
pub const TO_EARTH: Source = grave(
    "PE-13",
    "geometry of three phases: U/√3 to an earthed star point; 0, U and U with one corner earthed",
    Status::Arithmetic,
);
/// How far volts to earth may lie from the geometry.
pub const TO_EARTH_ALLOWANCE: Source = grave(
    "PE-14",
    "common practice: volts to earth within 10 % of what the geometry gives; beyond 25 % another earthing, or a fault",
    Status::CommonPractice,
);
