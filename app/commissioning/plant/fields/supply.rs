//! Fields of the supply sheet: volts, hertz, earthing, where the fault current comes from, and the device ahead.

use super::line::{choice, quantity, required, text};
use crate::plant::field::Field;
use engineering::Kind::{
    ApparentPower, Count, CrossSection, Current, Frequency, Length, Percent, Power, Resistance, Time, Voltage,
};

const SUPPLY: &str = "Supply";
const SOURCE: &str = "Transformer and source";
const FEEDER: &str = "Feeder to the drive";
const DEVICE: &str = "Protective device ahead of the drive";
const HARMONICS: &str = "Point of common coupling";

/// Fields in the order of the form.
#[rustfmt::skip]
pub const FIELDS: &[Field] = &[
    required(quantity(SUPPLY, "volts", "nominal volts, line to line", (Voltage, "V"), (24.0, 1e5), "As the system is named: 400 V, 480 V, 690 V. Drives above 1 000 V are outside the scope.")),
    required(quantity(SUPPLY, "hertz", "frequency", (Frequency, "Hz"), (15.0, 440.0), "50 Hz or 60 Hz on public supplies.")),
    choice(SUPPLY, "feed", "the drive is fed by", &[("three-phase", "three phases"), ("single-phase", "one phase"), ("common-dc-bus", "a common DC bus")], "Only three-phase input is in scope. The other two are named so that no check is wrong in silence."),
    choice(SUPPLY, "earthing", "earthing system", &[("tn-s", "TN-S"), ("tn-c-s", "TN-C-S"), ("tn-c", "TN-C"), ("tt", "TT"), ("it", "IT"), ("corner-earthed", "corner-earthed"), ("high-resistance", "high-resistance earthed")], "Filters and varistors with an earth link do not suit every system. With IT or corner-earthed, set the flag on the drive sheet too."),
    quantity(SOURCE, "transformer-rating", "transformer rating", (ApparentPower, "kVA"), (500.0, 1e9), "Rated power on its plate."),
    quantity(SOURCE, "transformer-impedance", "transformer impedance", (Percent, "%"), (0.005, 0.25), "Short-circuit impedance on its plate, often between 4 % and 8 %."),
    quantity(SOURCE, "transformer-volts", "transformer secondary volts", (Voltage, "V"), (24.0, 1e5), "No-load volts on its plate, when they differ from nominal."),
    quantity(SOURCE, "source-fault-power", "fault power ahead of the transformer", (ApparentPower, "MVA"), (1e5, 1e12), "From the network operator. Left empty, an infinite source is taken, which gives more current."),
    quantity(SOURCE, "fault-current", "prospective short-circuit current", (Current, "kA"), (10.0, 5e5), "At the drive's supply terminals, from the design or a tester. It goes before the computed one."),
    quantity(SOURCE, "motors-full-load", "full-load current of all motors on the bus", (Current, "A"), (0.0, 1e5), "Running motors feed a fault, with about four times their full-load current."),
    quantity(FEEDER, "feeder-length", "length", (Length, "m"), (0.1, 1e4), "From transformer or board to the drive."),
    quantity(FEEDER, "feeder-cross-section", "cross-section of a phase", (CrossSection, "mm²"), (0.2, 3000.0), "Of one conductor."),
    quantity(FEEDER, "feeder-parallel", "conductors in parallel", (Count, ""), (1.0, 20.0), "One, unless the feeder is doubled."),
    choice(FEEDER, "feeder-metal", "conductor metal", &[("copper", "copper"), ("aluminium", "aluminium")], ""),
    text(DEVICE, "device", "device", "Kind, size and curve, as marked on it."),
    quantity(DEVICE, "device-rating", "rated current", (Current, "A"), (0.1, 1e4), "Of fuse or breaker."),
    quantity(DEVICE, "device-breaking", "breaking capacity", (Current, "kA"), (100.0, 5e5), "As marked. No check uses it."),
    quantity(DEVICE, "device-trip-current", "current for disconnection in time, Iₐ", (Current, "A"), (0.01, 1e6), "Current at which the device opens within the required time, from its curve."),
    quantity(DEVICE, "device-trip-time", "required disconnection time", (Time, "s"), (0.01, 10.0), "As the local rule asks."),
    quantity(DEVICE, "loop-impedance", "loop impedance by design, Zₛ", (Resistance, "Ω"), (1e-4, 1e4), "Phase to protective conductor at the drive. A measured one goes first."),
    choice(DEVICE, "residual-current-type", "residual-current device", &[("none", "none"), ("ac", "type AC"), ("a", "type A"), ("f", "type F"), ("b", "type B")], "A three-phase bridge can pass direct fault current."),
    quantity(DEVICE, "residual-current", "its rated residual current", (Current, "mA"), (0.001, 30.0), "As marked."),
    quantity(HARMONICS, "demand-current", "maximum demand current", (Current, "A"), (0.1, 1e6), "At the point of common coupling; harmonic limits are parts of it."),
    quantity(HARMONICS, "coupling-fault-current", "fault current at the point of common coupling", (Current, "kA"), (10.0, 1e6), "Its ratio to the demand current picks the row of limits."),
    quantity(HARMONICS, "other-drives", "other six-pulse drives on the bus", (Power, "kW"), (0.0, 1e9), "Their rated power together."),
];
