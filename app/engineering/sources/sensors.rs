//! Sources on temperature sensors, vibration and encoders.

use crate::source::{Source, Status};

/// Thermistors.
pub const TH_01: Source = Source {
    id: "TH-01",
    text: "DIN 44081 and DIN 44082, resistance of thermistors around the rated response temperature",
    status: Status::Confirmed,
    safety: false,
};
/// Cold thermistors.
pub const TH_02: Source = Source {
    id: "TH-02",
    text: "DIN 44081 and relay data, 20 to 250 Ω for each sensor at room temperature",
    status: Status::Confirmed,
    safety: false,
};
/// Sensor short circuit.
pub const TH_04: Source = Source {
    id: "TH-04",
    text: "trade: below about 15 to 25 Ω in total taken as a short circuit",
    status: Status::CommonPractice,
    safety: true,
};
/// Platinum sensors.
pub const TH_05: Source = Source {
    id: "TH-05",
    text: "IEC 60751, platinum resistance sensors, class B 0.3 + 0.005·|T| K",
    status: Status::Confirmed,
    safety: false,
};
/// Two-wire leads.
pub const TH_06: Source = Source {
    id: "TH-06",
    text: "computed: about 0.385 Ω for each kelvin at Pt100",
    status: Status::Arithmetic,
    safety: false,
};
/// Sensor against thermometer.
pub const SENSOR_AGREEMENT: Source = Source {
    id: "TH-07",
    text: "common practice: a winding sensor agrees with a thermometer at rest within 5 K",
    status: Status::CommonPractice,
    safety: false,
};
/// Thermal switch.
pub const SENSOR_SWITCH: Source = Source {
    id: "TH-08",
    text: "common practice: a closed thermal switch with its leads reads at most 10 Ω, an open one more than 100 Ω",
    status: Status::CommonPractice,
    safety: true,
};
/// Vibration zones.
pub const VB_01: Source = Source {
    id: "VB-01",
    text: "ISO 20816-3:2022, zone boundaries on non-rotating parts (one row confirmed, the others from memory)",
    status: Status::Memory,
    safety: true,
};
/// Speed from pulses.
pub const EN_01: Source =
    Source { id: "EN-01", text: "arithmetic: n = 60·f/PPR", status: Status::Arithmetic, safety: false };
/// Encoder agreement.
pub const ENCODER_AGREEMENT: Source = Source {
    id: "EN-04",
    text: "common practice: encoder speed within 0.5 % of an independent measurement",
    status: Status::CommonPractice,
    safety: false,
};
/// Temperature rise by class.
pub const MN_18: Source = Source {
    id: "MN-18",
    text: "IEC 60034-1, table 8, rise at 40 °C by the resistance method: B 80 K, F 105 K, H 125 K",
    status: Status::Memory,
    safety: false,
};
/// Temperature from resistance.
pub const MN_19: Source = Source {
    id: "MN-19",
    text: "IEC 60034-1, clause 8.6.2, temperature from resistance; copper 235, aluminium 225",
    status: Status::Memory,
    safety: false,
};
