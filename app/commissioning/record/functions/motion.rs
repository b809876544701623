//! Functions: speeds, skip bands, ramps and stopping.

use super::{Function, RAMPS, SPEEDS, choice, flag, quantity};
use engineering::Kind::{Frequency, Percent, Time};

const HERTZ: (engineering::Kind, &str) = (Frequency, "Hz");
const SECONDS: (engineering::Kind, &str) = (Time, "s");

#[rustfmt::skip]
pub(super) const ROWS: &[Function] = &[
    quantity(SPEEDS, "minimum-frequency", "lowest output frequency", HERTZ, (0.0, 2000.0), "What the motor's cooling, the pump or the gearbox needs."),
    quantity(SPEEDS, "maximum-frequency", "highest output frequency", HERTZ, (0.5, 3000.0), "What motor, gearbox and load stand."),
    choice(SPEEDS, "direction-permitted", "directions permitted", &[("forward", "forwards only"), ("both", "both")], ""),
    quantity(SPEEDS, "skip-1-low", "skip band 1 from", HERTZ, (0.0, 2000.0), "Resonances are found in the load run."),
    quantity(SPEEDS, "skip-1-high", "skip band 1 to", HERTZ, (0.0, 2000.0), ""),
    quantity(SPEEDS, "skip-2-low", "skip band 2 from", HERTZ, (0.0, 2000.0), ""),
    quantity(SPEEDS, "skip-2-high", "skip band 2 to", HERTZ, (0.0, 2000.0), ""),
    quantity(SPEEDS, "skip-3-low", "skip band 3 from", HERTZ, (0.0, 2000.0), ""),
    quantity(SPEEDS, "skip-3-high", "skip band 3 to", HERTZ, (0.0, 2000.0), ""),
    quantity(SPEEDS, "fixed-speed-1", "fixed speed 1", HERTZ, (0.0, 2000.0), "Crawl or inching speed, where used."),
    quantity(SPEEDS, "fixed-speed-2", "fixed speed 2", HERTZ, (0.0, 2000.0), ""),
    quantity(RAMPS, "ramp-span", "ramp times are for a change of", HERTZ, (0.5, 3000.0), "Base or highest frequency, as the drive counts them. Left empty, the highest is assumed."),
    quantity(RAMPS, "acceleration-time", "acceleration time", SECONDS, (0.0, 36000.0), "For that change of frequency."),
    quantity(RAMPS, "deceleration-time", "deceleration time", SECONDS, (0.0, 36000.0), "For that change of frequency."),
    quantity(RAMPS, "second-acceleration-time", "second acceleration time", SECONDS, (0.0, 36000.0), "Where used."),
    quantity(RAMPS, "second-deceleration-time", "second deceleration time", SECONDS, (0.0, 36000.0), "Where used; often the quick stop."),
    quantity(RAMPS, "s-curve-share", "S-curve share of the ramp", (Percent, "%"), (0.0, 1.0), "Part of the set time, both ends together, in which the drive eases in and out without taking longer. 0 for a straight ramp."),
    quantity(RAMPS, "rounding", "rounding at the ends", SECONDS, (0.0, 600.0), "Added to the ramp by most drives."),
    choice(RAMPS, "stop-mode", "stop mode", &[("ramp", "ramps down"), ("coast", "coasts"), ("direct-current", "direct current brakes"), ("quick", "quick ramp")], "What a stop command does."),
    choice(RAMPS, "stop-on-fault", "on a trip", &[("coast", "coasts"), ("ramp", "ramps down where it can")], ""),
    quantity(RAMPS, "holding-current", "direct current at standstill", (Percent, "%"), (0.0, 2.0), "Part of rated current; it heats a motor whose fan stands."),
    quantity(RAMPS, "holding-time", "for how long", SECONDS, (0.0, 36000.0), ""),
    flag(RAMPS, "overvoltage-control", "ramp stretched by the bus voltage", "The drive lengthens the stop instead of tripping; with a brake chopper it is switched off."),
];
