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
