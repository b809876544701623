//! Fields of the cable sheet: motor cable, protective conductors, and what the voltage edge meets.

use super::line::{choice, flag, quantity, required, text};
use crate::plant::field::Field;
use engineering::Kind::{
    Count, CrossSection, Current, Length, LinearSpeed, Percent, Resistance, RiseTime, Temperature, Voltage,
};

const CABLE: &str = "Motor cable";
const EARTH: &str = "Protective conductor to the motor";
const DRIVE_EARTH: &str = "Protective conductor to the drive";
const EDGE: &str = "Voltage edge";
const METALS: &[(&str, &str)] = &[("copper", "copper"), ("aluminium", "aluminium")];

/// Fields in the order of the form.
#[rustfmt::skip]
pub const FIELDS: &[Field] = &[
    text(CABLE, "number", "cable number", "As in the cable list."),
    choice(CABLE, "type", "type", &[("screened-symmetrical", "screened, symmetrical earth"), ("screened", "screened, three or four cores"), ("armoured", "armoured"), ("metal-conduit", "single cores in metal conduit"), ("unscreened", "unscreened")], "What lies there, not what was ordered."),
    required(quantity(CABLE, "length", "length", (Length, "m"), (0.1, 1e4), "Laid length from drive to motor.")),
    quantity(CABLE, "cross-section", "cross-section of a phase", (CrossSection, "mm²"), (0.2, 2000.0), "Of one conductor."),
    quantity(CABLE, "parallel", "cables in parallel", (Count, ""), (1.0, 20.0), "One, unless doubled."),
    choice(CABLE, "metal", "conductor metal", METALS, ""),
    choice(CABLE, "build", "conductor build", &[("class-2", "stranded (class 2)"), ("class-5", "flexible (class 5)")], "IEC 60228."),
    quantity(CABLE, "rated-volts", "rated volts of the cable", (Voltage, "V"), (100.0, 50000.0), "Between conductors, as printed on it."),
    quantity(CABLE, "ampacity", "current it carries here", (Current, "A"), (0.5, 1e4), "After laying and temperature, from the design. No check uses it."),
    quantity(CABLE, "conductor-temperature", "conductor temperature at load", (Temperature, "°C"), (-40.0, 180.0), "For the voltage drop. Left empty, the usual one is assumed and said so."),
    quantity(CABLE, "reactance-per-km", "reactance of one kilometre", (Resistance, "Ω"), (0.01, 2.0), "From the cable's sheet, often near 0.08 Ω."),
    quantity(CABLE, "drop-limit", "voltage drop allowed", (Percent, "%"), (0.001, 0.2), "By the design, when it gives one."),
    quantity(EARTH, "pe-cross-section", "cross-section", (CrossSection, "mm²"), (0.2, 2000.0), "Of the motor's protective conductor."),
    choice(EARTH, "pe-metal", "metal", METALS, ""),
    quantity(EARTH, "pe-length", "length", (Length, "m"), (0.1, 1e4), "When it differs from the cable's."),
    quantity(EARTH, "pe-parallel", "conductors in parallel", (Count, ""), (1.0, 20.0), "One, unless doubled."),
    flag(EARTH, "pe-in-cable", "inside the cable or mechanically protected", "A separate unprotected one must not be thin."),
    quantity(EARTH, "pe-temperature", "conductor temperature during the test", (Temperature, "°C"), (-40.0, 120.0), "Left empty, 20 °C is assumed."),
    quantity(DRIVE_EARTH, "supply-cross-section", "cross-section of a supply phase", (CrossSection, "mm²"), (0.2, 2000.0), "At the drive's input."),
    quantity(DRIVE_EARTH, "supply-pe-cross-section", "cross-section", (CrossSection, "mm²"), (0.2, 2000.0), "Of the protective conductor at the drive's input."),
    choice(DRIVE_EARTH, "supply-pe-metal", "metal", METALS, ""),
    flag(DRIVE_EARTH, "second-pe", "a second one on its own terminal", "Of the same cross-section."),
    flag(DRIVE_EARTH, "pe-monitored", "supply opens when it breaks", "Automatic disconnection on loss of the protective conductor."),
    quantity(EDGE, "rise-time", "rise time at the drive's output", (RiseTime, "µs"), (1e-9, 1e-3), "From the drive's manual; behind a filter, the filter's."),
    quantity(EDGE, "wave-speed", "speed of the edge in the cable", (LinearSpeed, "m/s"), (5e7, 3e8), "150 to 180 million m/s in usual cables. Left empty, it is assumed and said so."),
    quantity(EDGE, "cable-surge-impedance", "surge impedance of the cable", (Resistance, "Ω"), (10.0, 500.0), "Often 80 to 180 Ω."),
    quantity(EDGE, "motor-surge-impedance", "surge impedance of the motor", (Resistance, "Ω"), (50.0, 20000.0), "Larger for small motors. Left empty, full reflection is taken."),
    quantity(EDGE, "peak-measured", "peak volts measured at the motor", (Voltage, "V"), (10.0, 1e5), "With a wide-band probe, when it was done."),
];
