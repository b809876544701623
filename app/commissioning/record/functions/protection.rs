//! Functions: limits, overload, thermal input.

use super::{Function, LIMITS, choice, flag, quantity, words};
use engineering::Kind::{Current, Frequency, Percent, Time, Torque};

#[rustfmt::skip]
pub(super) const ROWS: &[Function] = &[
    quantity(LIMITS, "current-limit", "current limit", (Current, "A"), (0.01, 2e4), "In amps, also when the drive shows percent: work it out from its own base."),
    quantity(LIMITS, "torque-limit", "torque limit", (Percent, "%"), (0.0, 5.0), "Part of rated torque."),
    quantity(LIMITS, "torque-limit-at-shaft", "torque limit at the shaft", (Torque, "N·m"), (0.0, 1e8), "When the drive takes it so."),
    quantity(LIMITS, "overload-current", "overload current setting", (Current, "A"), (0.01, 2e4), "Motor protection; not above rated amps unless the site's rule says so."),
    choice(LIMITS, "overload-class", "overload trip class", &[("5", "5"), ("10a", "10A"), ("10", "10"), ("20", "20"), ("30", "30")], "IEC 60947-4-1 tests at 7.2 times the setting."),
    quantity(LIMITS, "overload-time", "overload time or time constant", (Time, "s"), (0.1, 36000.0), "When the drive takes a time instead of a class."),
    flag(LIMITS, "overload-cooling", "overload follows the loss of cooling", "A shaft fan cools little at low speed; current alone does not see that."),
    flag(LIMITS, "overload-memory", "thermal state kept without voltage", ""),
    choice(LIMITS, "thermal-input", "motor sensor input", &[("none", "not used"), ("ptc", "thermistors"), ("pt100", "Pt100"), ("switch", "switch"), ("relay", "separate relay")], ""),
    choice(LIMITS, "thermal-action", "when the sensor responds", &[("trip", "trips"), ("warning", "warns only"), ("ramp", "ramps down, then trips"), ("none", "nothing")], ""),
    flag(LIMITS, "output-phase-loss", "output phase loss watched", ""),
    flag(LIMITS, "input-phase-loss", "input phase loss watched", ""),
    flag(LIMITS, "earth-fault", "earth fault watched", ""),
    choice(LIMITS, "stall-action", "stalled motor", &[("trip", "trips"), ("warning", "warns only"), ("none", "not watched")], ""),
    choice(LIMITS, "underload-action", "lost load", &[("trip", "trips"), ("warning", "warns only"), ("none", "not watched")], "Dry pump, broken belt."),
    quantity(LIMITS, "overspeed-frequency", "overspeed trip", (Frequency, "Hz"), (0.5, 3000.0), "Where used."),
    words(LIMITS, "limits-note", "note on limits", "What else is watched."),
];
