//! Sources on torque, ramps, braking, stopping and the direction of rotation.

use crate::source::{Source, Status};

/// Rated torque.
pub const RATED_TORQUE: Source =
    Source { id: "MN-04", text: "physics: T = 60·P/(2π·n)", status: Status::Arithmetic, safety: false };
/// Torque above base speed.
pub const VF_02: Source = Source {
    id: "VF-02",
    text: "textbook: above base speed the torque at a given current falls as 1/r",
    status: Status::Memory,
    safety: false,
};
/// Breakdown torque above base speed.
pub const VF_03: Source = Source {
    id: "VF-03",
    text: "Dubey, Fundamentals of Electrical Drives, Ex. 6.13: breakdown torque falls as 1/r²; margin of 1.3 common practice",
    status: Status::CommonPractice,
    safety: false,
};
/// Breakdown torque at low frequency without boost.
pub const VF_04: Source = Source {
    id: "VF-04",
    text: "Dubey, Fundamentals of Electrical Drives, Ex. 6.9: at low frequency and constant volts per hertz the torque falls",
    status: Status::Confirmed,
    safety: false,
};
/// Acceleration time.
pub const RM_01: Source =
    Source { id: "RM-01", text: "physics: t = J·Δω/(T_M − T_L)", status: Status::Arithmetic, safety: false };
/// Reflection to the motor's shaft.
pub const RM_02: Source = Source {
    id: "RM-02",
    text: "Dubey, Fundamentals of Electrical Drives, Ex. 2.1: J_L/i², torque over i·η driving and times η/i braking",
    status: Status::Confirmed,
    safety: false,
};
/// Root mean square over a cycle.
pub const RM_09: Source = Source {
    id: "RM-09",
    text: "Dubey, Fundamentals of Electrical Drives, Ex. 4.2: the root mean square over the cycle stands for its heat",
    status: Status::Confirmed,
    safety: false,
};
/// What a warm motor stands beyond rated current.
pub const EXCESS_CURRENT: Source = Source {
    id: "OL-09",
    text: "IEC 60034-1, clause 9.3 (NEMA MG 1, 12.48 the same): motors up to 315 kW and 1 kV stand 1.5 times rated current for 2 min",
    status: Status::Memory,
    safety: false,
};
/// Rounded ends of a ramp.
pub const S_CURVE: Source = Source {
    id: "RM-14",
    text: "arithmetic: easing in and out over a share s of the time raises the highest acceleration to 1/(1 − s/2) of the mean",
    status: Status::Arithmetic,
    safety: false,
};
/// Braking.
pub const RM_05: Source = Source {
    id: "RM-05",
    text: "physics: braking torque, power and energy without losses, an upper bound",
    status: Status::Arithmetic,
    safety: false,
};
/// Brake resistor.
pub const RM_06: Source = Source {
    id: "RM-06",
    text: "physics: R ≤ V²/P at the chopper's voltage; the drive's own minimum below",
    status: Status::Arithmetic,
    safety: false,
};
/// Torque against speed, integrated.
pub const RM_08: Source = Source {
    id: "RM-08",
    text: "Dubey, Fundamentals of Electrical Drives, Ex. 2.2: t = J·∫dω/T(ω)",
    status: Status::Confirmed,
    safety: false,
};
/// How far a measured ramp may be from set and predicted.
pub const MEASURED_RAMP: Source = Source {
    id: "RM-10",
    text: "common practice: a ramp more than 10 % off its setting asks why; more than 25 % over its prediction is a fault to find",
    status: Status::CommonPractice,
    safety: false,
};
/// Losses of a gear that nobody stated.
pub const GEAR_LOSSES: Source = Source {
    id: "RM-13",
    text: "common practice: a gear of unknown make is taken to pass 85 % of the power, or all of it where losses would help",
    status: Status::CommonPractice,
    safety: false,
};
/// Losses of motor and inverter while braking.
pub const BRAKING_LOSSES: Source = Source {
    id: "RM-12",
    text: "common practice: motor and inverter together lose between nothing and about 15 % of rated power while braking",
    status: Status::CommonPractice,
    safety: false,
};
/// How close the bus may come to its trip.
pub const BUS_MARGIN: Source = Source {
    id: "RM-11",
    text: "common practice: a bus peak within 5 % of the drive's trip voltage leaves no room for line tolerance",
    status: Status::CommonPractice,
    safety: false,
};
/// Bus rise.
pub const DC_09: Source = Source {
    id: "DC-09",
    text: "physics: V₂ = √(V₁² + 2·E/C), losses ignored",
    status: Status::Arithmetic,
    safety: false,
};
/// Direction of rotation.
pub const UB_06: Source = Source {
    id: "UB-06",
    text: "IEC 60034-8: direction as seen from the drive end; exchanging any two leads reverses it",
    status: Status::Memory,
    safety: true,
};
/// Output order of a drive.
pub const UB_07: Source = Source {
    id: "UB-07",
    text: "physics: a drive's output sequence does not follow the order of its supply leads; a bypass does",
    status: Status::CommonPractice,
    safety: true,
};
/// Encoder direction.
pub const EN_03: Source = Source {
    id: "EN-03",
    text: "arithmetic: the opposite sign on A and B means exchanged channels",
    status: Status::Arithmetic,
    safety: false,
};
/// Stop categories.
pub const ST_01: Source = Source {
    id: "ST-01",
    text: "IEC 60204-1:2016, clause 9.2.2, stop categories; the time itself comes from the machine's risk assessment",
    status: Status::Confirmed,
    safety: true,
};
