//! Sources on the drive's settings.

use crate::source::{Source, Status};

/// Overload setting of a separate device.
pub const MN_14: Source = Source {
    id: "MN-14",
    text: "NFPA 70 430.32(A)(1) and (C): 125 % or 115 % of nameplate current, 140 % or 130 % when it will not start",
    status: Status::Confirmed,
    safety: true,
};
/// Service factor on a drive.
pub const MN_15: Source = Source {
    id: "MN-15",
    text: "NEMA MG 1 14.37 and parts 30, 31: on a drive the service factor counts as 1.0",
    status: Status::Memory,
    safety: false,
};
/// Overload setting at rated current.
pub const RATED_OVERLOAD: Source = Source {
    id: "OL-08",
    text: "common practice: the drive's motor overload is set at the rated current of the plate, not above",
    status: Status::CommonPractice,
    safety: true,
};
/// IEC trip classes.
pub const OL_02: Source = Source {
    id: "OL-02",
    text: "IEC 60947-4-1:2018, trip classes from cold at 7.2 times the setting",
    status: Status::Confirmed,
    safety: true,
};
/// NEMA trip classes.
pub const OL_05: Source = Source {
    id: "OL-05",
    text: "NEMA ICS 2, trip classes 10, 20, 30 at 6 times the setting",
    status: Status::Confirmed,
    safety: true,
};
/// Thermal model.
pub const OL_04: Source = Source {
    id: "OL-04",
    text: "IEC 60255-149:2013, cold and hot curves of the thermal model",
    status: Status::Memory,
    safety: true,
};
/// Overload without a sensor does not see lost cooling.
pub const OL_07: Source = Source {
    id: "OL-07",
    text: "NFPA 70 430.126 and trade: current-only protection does not see loss of cooling at low speed",
    status: Status::Memory,
    safety: true,
};
/// Volts per hertz.
pub const VF_01: Source =
    Source { id: "VF-01", text: "physics: rated flux at U_N/f_N", status: Status::Arithmetic, safety: false };
/// Voltage zones at the motor.
pub const MN_13: Source = Source {
    id: "MN-13",
    text: "IEC 60034-1, clause 7.3, zone A: ±5 % voltage, ±2 % frequency",
    status: Status::Confirmed,
    safety: false,
};
/// Synchronous speed.
pub const MN_01: Source =
    Source { id: "MN-01", text: "textbook: n_s = 60·f/p", status: Status::Arithmetic, safety: false };
/// Speed beyond the rated one.
pub const SPEED_BOUNDS: Source = Source {
    id: "SB-01",
    text: "common practice: above rated speed only with the maker's figure for motor, gearbox and load",
    status: Status::CommonPractice,
    safety: true,
};
/// Loop check.
pub const AN_03: Source = Source {
    id: "AN-03",
    text: "trade: points 4, 8, 12, 16, 20 mA; error commonly at most 0.25 to 0.5 % of span end to end",
    status: Status::CommonPractice,
    safety: false,
};
/// Linear loop signal.
pub const AN_01: Source =
    Source { id: "AN-01", text: "IEC 60381-1, linear 4 to 20 mA signal", status: Status::Memory, safety: false };
/// Failure levels of a loop signal.
pub const AN_02: Source = Source {
    id: "AN-02",
    text: "NAMUR NE 43 (2003): 3.8 to 20.5 mA measuring range, failure at 3.6 mA and below or 21 mA and above",
    status: Status::Confirmed,
    safety: true,
};
/// Brake resistor tolerance.
pub const RESISTOR_TOLERANCE: Source = Source {
    id: "BR-01",
    text: "common practice: a wire-wound brake resistor within 10 % of its plate",
    status: Status::CommonPractice,
    safety: false,
};
/// Turn-down of self-cooled motors.
pub const VF_07: Source = Source {
    id: "VF-07",
    text: "trade: no universal turn-down for a self-cooled motor; the maker's curve decides",
    status: Status::CommonPractice,
    safety: false,
};
/// Switching frequency.
pub const SWITCHING: Source = Source {
    id: "SF-01",
    text: "drive, motor and filter manuals: span of the switching frequency at full output current",
    status: Status::Maker,
    safety: false,
};
/// Skip bands.
pub const SKIP: Source = Source {
    id: "SK-01",
    text: "common practice: skip bands cover no speed at which the load has to work",
    status: Status::CommonPractice,
    safety: false,
};
/// Unexpected start.
pub const UNEXPECTED_START: Source = Source {
    id: "RS-01",
    text: "ISO 14118 and IEC 60204-1, clause 7.5: no automatic restart where it can be hazardous",
    status: Status::Memory,
    safety: true,
};
/// Settings against the plate.
pub const PLATE_SETTINGS: Source = Source {
    id: "MS-01",
    text: "common practice: motor values in the drive as on the plate, at the drive's resolution",
    status: Status::CommonPractice,
    safety: false,
};
/// Test settings.
pub const RESTORED: Source = Source {
    id: "TS-01",
    text: "common practice: whatever was changed for a test is put back before handover",
    status: Status::CommonPractice,
    safety: true,
};
