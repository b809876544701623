//! Sources on uncoupled runs and load runs.

use crate::source::{Source, Status};

/// Rated torque, under its row number.
pub use crate::sources::motion::RATED_TORQUE as MN_04;

/// Upper end of the no-load current.
pub const NL_01: Source = Source {
    id: "NL-01",
    text: "derived: no-load current stays below the reactive part of the rated current (three textbook machines: 23 to 38 % too high)",
    status: Status::Memory,
    safety: false,
};
/// Lower end of the no-load current.
pub const NL_02: Source = Source {
    id: "NL-02",
    text: "derived: Heyland circle without losses (three textbook machines: 10 to 35 % too low)",
    status: Status::Memory,
    safety: false,
};
/// No standard limits the no-load current.
pub const NL_03: Source = Source {
    id: "NL-03",
    text: "trade: 20 to 50 % of rated current, up to about 65 % for small or many-pole motors; no standard limit exists",
    status: Status::Confirmed,
    safety: false,
};
/// Current at partial load.
pub const NL_05: Source = Source {
    id: "NL-05",
    text: "derived: I = √(I_m² + (I_N² − I_m²)·L²), within 2 % of three textbook machines at half load",
    status: Status::Memory,
    safety: false,
};
/// Least breakdown torque of a general-purpose motor.
pub const PULL_OUT: Source = Source {
    id: "NL-08",
    text: "IEC 60034-1, momentary excess torque: at least 1.6 times rated torque for general-purpose induction motors",
    status: Status::Memory,
    safety: false,
};
/// Unbalance of three magnitudes.
pub const UB_01: Source = Source {
    id: "UB-01",
    text: "NEMA MG 1 12.45 and 14.36, largest deviation from the mean over the mean",
    status: Status::Confirmed,
    safety: false,
};
/// Current balance limits.
pub const CURRENT_BALANCE: Source = Source {
    id: "UB-09",
    text: "common practice: current unbalance up to 5 % accepted, beyond 10 % a fault to find",
    status: Status::CommonPractice,
    safety: false,
};
/// Meters on a pulsed output.
pub const TF_03: Source = Source {
    id: "TF-03",
    text: "trade: at a drive output a meter that gives the fundamental is needed; true r.m.s. reads high",
    status: Status::CommonPractice,
    safety: false,
};
/// Slip at no load.
pub const NO_LOAD_SLIP: Source = Source {
    id: "NL-09",
    text: "common practice: slip without load at most 30 % of rated slip",
    status: Status::CommonPractice,
    safety: false,
};
/// Slip speed at constant flux.
pub const VF_06: Source = Source {
    id: "VF-06",
    text: "textbook: at constant flux the slip speed is that of the torque, whatever the frequency",
    status: Status::Confirmed,
    safety: false,
};
/// Least squares.
pub const LEAST_SQUARES: Source = Source {
    id: "LS-01",
    text: "least squares on logarithms with Student's t, 95 %",
    status: Status::Arithmetic,
    safety: false,
};
/// Modified z-score.
pub const SISTERS: Source = Source {
    id: "SZ-01",
    text: "Iglewicz and Hoaglin 1993, How to Detect and Handle Outliers: modified z-score above 3.5",
    status: Status::Memory,
    safety: false,
};
