//! Sources on the nameplates of motor and drive, and how the two fit.

use crate::source::{Source, Status};

const fn plain(id: &'static str, text: &'static str, status: Status) -> Source {
    Source { id, text, status, safety: false }
}

/// Pole pairs from a plate.
pub const MN_03: Source = plain("MN-03", "derived: p = ⌊60·f/n⌋ with n below the synchronous speed", Status::Memory);
/// Slip to expect by size.
pub const SLIP_BY_SIZE: Source =
    plain("MN-21", "common practice: rated slip up to 8 % from 1 kW, up to 15 % below", Status::CommonPractice);
/// Input and apparent power.
pub const MN_05: Source = plain("MN-05", "textbook: P/η = √3·U·I·cos φ, balanced three-phase", Status::Confirmed);
/// Tolerances on declared values.
pub const MN_11: Source = plain(
    "MN-11",
    "IEC 60034-1:2017/2022, clause 12: efficiency −15 % of the losses' share up to 150 kW, −10 % above; power factor a sixth of what it lacks to 1",
    Status::Confirmed,
);
/// Bounds for a plate that leaves out efficiency or power factor.
pub const PLAUSIBLE_PRODUCT: Source = plain(
    "MN-22",
    "common practice: efficiency times power factor of an induction motor is 0.15 to 0.85 below 1 kW, 0.35 to 0.90 below 10 kW, 0.45 to 0.93 above; power factor 0.40 to 0.95",
    Status::CommonPractice,
);
/// What slip and poles suggest.
pub const SLIP_LOSSES: Source = plain(
    "MN-23",
    "derived: the rotor takes s/(1 − s) of the shaft power out of all losses; common practice: 5 to 75 % of them, 16 poles at most, and columns of one plate that agree",
    Status::CommonPractice,
);
/// How far from the class tables an efficiency may lie before it is asked about.
pub const CLASS_RANGE: Source = plain(
    "MN-24",
    "common practice: losses between 0.6 times those of the highest and 2.2 times those of the lowest class listed at 50 Hz, 0.5 and 3 times at 60 Hz; a printed class less 15 % of its losses, 40 % at 60 Hz",
    Status::CommonPractice,
);
/// How readily a figure is misread in one way or another.
pub const MISREADINGS: Source = plain(
    "MN-25",
    "common practice: units, frequencies, connections and decimal points are mistaken more readily than digits; ratings and volts in common use are likelier than others",
    Status::CommonPractice,
);
/// Efficiency classes at 50 Hz.
pub const MN_08: Source =
    plain("MN-08", "IEC 60034-30-1:2014, tables and interpolation (EU 2019/1781, annex I)", Status::Confirmed);
/// Efficiency classes at 60 Hz.
pub const MN_09: Source = plain("MN-09", "10 CFR 431.25, enclosed motors, 60 Hz", Status::Confirmed);
/// Ratings between the rows at 60 Hz.
pub const MN_10: Source = plain("MN-10", "10 CFR 431.25(b): from the midpoint up the higher row", Status::Confirmed);
/// Full-load current for sizing.
pub const MN_12: Source = Source {
    id: "MN-12",
    text: "NFPA 70, table 430.250: for sizing conductors and short-circuit devices only",
    status: Status::Confirmed,
    safety: true,
};
/// Operation at a raised base frequency.
pub const VF_05: Source = plain(
    "VF-05",
    "physics: a winding keeps its flux while volts and hertz rise together; the maker's word decides speed and insulation",
    Status::CommonPractice,
);
/// Overload duty.
pub const OL_01: Source = plain(
    "OL-01",
    "common practice: overload for so many seconds, once in so many; the drive's data sheet governs",
    Status::CommonPractice,
);
/// Reference conditions.
pub const DR_01: Source =
    plain("DR-01", "IEC 60034-1, clause 6: up to 1000 m and 40 °C without a reduction", Status::Confirmed);
/// Reduction of a drive's current.
pub const DR_02: Source = plain(
    "DR-02",
    "common practice: about 1 % less current for each 100 m above 1000 m, 1 to 2.5 % for each kelvin above 40 °C; the drive's data sheet governs",
    Status::CommonPractice,
);
/// Until when an instrument's word counts.
pub const CALIBRATION_DUE: Source = Source {
    id: "DU-05",
    text: "common practice: an instrument's word counts from its calibration up to and including the due date",
    status: Status::CommonPractice,
    safety: true,
};
