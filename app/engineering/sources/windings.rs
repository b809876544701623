//! Sources on winding resistance, dew point and joints.

use crate::source::{Source, Status};

/// Balance of winding resistances.
pub const WINDING_BALANCE: Source = Source {
    id: "WB-01",
    text: "repair practice: winding resistances within 2 % of their mean random-wound, 1 % form-wound; 5 % a fault to find",
    status: Status::Memory,
    safety: false,
};
/// Dew point.
pub const MAGNUS: Source = Source {
    id: "DP-01",
    text: "Magnus formula with the constants 17.62 and 243.12 °C (WMO guide No. 8), over water",
    status: Status::Memory,
    safety: false,
};
/// Distance from the dew point.
pub const DEW_MARGIN: Source = Source {
    id: "DP-02",
    text: "common practice: winding at least 3 K above the dew point during an insulation test",
    status: Status::CommonPractice,
    safety: false,
};
/// Identified resistance against measured.
pub const IDENTIFIED: Source = Source {
    id: "WB-02",
    text: "common practice: identified stator resistance within 20 % of half the line-to-line resistance, cable included",
    status: Status::CommonPractice,
    safety: false,
};
/// Joints.
pub const JOINTS: Source = Source {
    id: "WB-03",
    text: "common practice: similar joints within 50 % of the lowest",
    status: Status::CommonPractice,
    safety: false,
};
/// Torque of terminals.
pub const TERMINAL_TORQUE: Source = Source {
    id: "WB-04",
    text: "common practice: power terminals within 10 % of the maker's torque; a range that the maker gives goes first",
    status: Status::CommonPractice,
    safety: false,
};
