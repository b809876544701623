//! Sources on insulation and windings.

use crate::source::{Source, Status};

/// Minimum insulation resistance at 40 °C.
pub const IR_02: Source =
    Source { id: "IR-02", text: "IEEE 43-2013, clause 12.3, table 3", status: Status::Confirmed, safety: true };
/// Temperature correction, thermoplastic: halving per 10 K.
pub const IR_03: Source = Source {
    id: "IR-03",
    text: "IEEE 43-2013, clause 6.3, halving for every 10 K",
    status: Status::Confirmed,
    safety: true,
};
/// Temperature correction, thermosetting.
pub const IR_04: Source = Source {
    id: "IR-04",
    text: "IEEE 43-2013, clause 6.3, thermosetting equations, 10 to 85 °C",
    status: Status::Memory,
    safety: true,
};
/// Test voltage by rated voltage.
pub const IR_01: Source = Source {
    id: "IR-01",
    text: "IEEE 43-2013, table 1, direct test voltage by rated line-to-line voltage",
    status: Status::Memory,
    safety: true,
};
/// Polarization index.
pub const IR_05: Source = Source {
    id: "IR-05",
    text: "IEEE 43-2013, clauses 3 and 5.4, polarization index 10 min over 1 min",
    status: Status::Confirmed,
    safety: false,
};
/// Minimum polarization index by thermal class.
pub const IR_06: Source = Source {
    id: "IR-06",
    text: "IEEE 43-2013, clause 12.2, table 2, minimum polarization index by thermal class",
    status: Status::Confirmed,
    safety: false,
};
/// No polarization index above 5000 MΩ.
pub const IR_07: Source = Source {
    id: "IR-07",
    text: "IEEE 43-2013, clause 12.2, polarization index not judged above 5000 MΩ at 40 °C",
    status: Status::Confirmed,
    safety: false,
};
/// Polarization index and random-wound machines.
pub const IR_08: Source = Source {
    id: "IR-08",
    text: "IEEE 43-2013, clause 5.4 and annex A, absorption dies away early in small random-wound machines",
    status: Status::Confirmed,
    safety: false,
};
/// Polarization index suspiciously high.
pub const IR_09: Source = Source {
    id: "IR-09",
    text: "IEEE 43, polarization index above 8 may mean dry, brittle insulation",
    status: Status::Confirmed,
    safety: false,
};
/// Dielectric absorption ratio.
pub const IR_10: Source = Source {
    id: "IR-10",
    text: "common practice: dielectric absorption 60 s over 30 s, below 1.0 poor, 1.4 and above good",
    status: Status::CommonPractice,
    safety: false,
};
/// Both tests, above the dew point.
pub const IR_11: Source = Source {
    id: "IR-11",
    text: "IEEE 43-2013, clause 12, resistance and, where it applies, index both met, winding above the dew point",
    status: Status::Memory,
    safety: true,
};
/// Drive disconnected before any insulation test.
pub const IR_18: Source = Source {
    id: "IR-18",
    text: "trade rule: motor and cable are tested with the drive disconnected",
    status: Status::CommonPractice,
    safety: true,
};
/// Discharge after a test: at least four times its duration.
pub const IR_20: Source = Source {
    id: "IR-20",
    text: "IEEE 43-2013, discharge of the winding for at least four times the duration of the test",
    status: Status::Memory,
    safety: true,
};
