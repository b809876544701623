//! Fields of the further sheet: inputs beyond the plates, all optional; what is missing is named where it is missed.

use super::line::{choice, flag, quantity, text};
use crate::plant::field::Field;
use engineering::Kind::{
    Count, Current, Frequency, LoopCurrent, Number, Percent, Power, Resistance, Speed, TemperatureRise, Time, Voltage,
};

const STOP: &str = "Stops";
const ENCODER: &str = "Encoder";
const REFERENCE: &str = "Analogue reference";
const BRAKING: &str = "Ramps and braking";
const SPECIFIED: &str = "Specified by the design";
const TESTS: &str = "Limits set by the specification";

/// Fields in the order of the form.
#[rustfmt::skip]
pub const FIELDS: &[Field] = &[
    choice(STOP, "emergency-category", "emergency stop category", &[("0", "category 0"), ("1", "category 1")], "As the risk assessment gives it."),
    choice(STOP, "stop-category", "normal stop", &[("coast", "coasts"), ("ramp", "ramps down"), ("ramp-hold", "ramps down and holds")], "As specified."),
    quantity(STOP, "emergency-stop-time", "specified emergency stop time", (Time, "s"), (0.0, 7200.0), "To standstill, from the risk assessment."),
    text(STOP, "safety-document", "safety document", "Where the required safety function is described."),
    flag(STOP, "auto-restart-allowed", "may start by itself", "By the risk assessment."),
    choice(STOP, "loss-of-reference-action", "action specified on loss of the reference", &[("trip", "trips"), ("last-speed", "keeps the last speed"), ("fixed-speed", "goes to a fixed speed"), ("ramp", "ramps down")], "By the process."),
    quantity(ENCODER, "encoder-pulses", "pulses in one turn", (Count, ""), (1.0, 1e6), "Of one channel."),
    choice(ENCODER, "encoder-signal", "signal", &[("two-channel", "two channels"), ("one-channel", "one channel"), ("sine-cosine", "sine and cosine"), ("absolute", "absolute")], ""),
    quantity(ENCODER, "encoder-ratio", "turns for one turn of the motor", (Number, ""), (0.01, 100.0), "1 when it sits on the motor shaft."),
    quantity(ENCODER, "encoder-tolerance", "scaling error allowed", (Percent, "%"), (0.0001, 0.1), "Left empty, 0.5 % (common practice)."),
    choice(REFERENCE, "reference-signal", "signal", &[("4-20", "4 to 20 mA"), ("0-20", "0 to 20 mA"), ("0-10", "0 to 10 V")], ""),
    quantity(REFERENCE, "reference-low", "loop current at the low end", (LoopCurrent, "mA"), (0.0, 0.022), "Usually 4 mA."),
    quantity(REFERENCE, "reference-high", "loop current at the high end", (LoopCurrent, "mA"), (0.001, 0.024), "Usually 20 mA."),
    quantity(REFERENCE, "reference-low-hertz", "output frequency at the low end", (Frequency, "Hz"), (0.0, 2000.0), "As intended."),
    quantity(REFERENCE, "reference-high-hertz", "output frequency at the high end", (Frequency, "Hz"), (0.0, 2000.0), "As intended."),
    quantity(BRAKING, "braking-losses", "power lost in motor and inverter while braking", (Power, "kW"), (0.0, 1e6), "Left empty, a bracket is assumed and said."),
    quantity(BRAKING, "stop-cycle", "time from stop to stop", (Time, "s"), (0.1, 864000.0), "For the mean power of the resistor."),
    quantity(BRAKING, "start-interval", "time from start to start", (Time, "s"), (1.0, 864000.0), "Shortest, for the drive's overload."),
    quantity(BRAKING, "residual-delay", "bypass transfer delay by the maker", (Time, "s"), (0.0, 60.0), "Until the motor's residual voltage has died away."),
    quantity(SPECIFIED, "design-speed", "design speed of the motor", (Speed, "rpm"), (0.1, 1e5), "At the duty point."),
    quantity(SPECIFIED, "design-current", "design current", (Current, "A"), (0.01, 2e4), "At the duty point."),
    quantity(SPECIFIED, "design-base-hertz", "intended base frequency", (Frequency, "Hz"), (1.0, 2000.0), "When it is not the plate's, as in the 87 Hz way."),
    quantity(SPECIFIED, "design-output-volts", "intended volts at base frequency", (Voltage, "V"), (10.0, 1e5), "When they are not the plate's."),
    quantity(SPECIFIED, "overload-maximum", "highest overload setting by the motor's maker", (Current, "A"), (0.01, 2e4), "It goes before the general rule."),
    flag(SPECIFIED, "will-not-start", "trips at start with the usual overload setting", "NFPA 70 430.32(C) then allows a higher one."),
    quantity(SPECIFIED, "joint-resistance-limit", "largest joint resistance", (Resistance, "µΩ"), (1e-7, 1.0), "By the maker of the joint."),
    quantity(SPECIFIED, "pe-resistance-limit", "largest protective-conductor resistance", (Resistance, "Ω"), (1e-4, 100.0), "By the design, when it gives one."),
    quantity(TESTS, "distortion-limit", "largest current distortion, THDi", (Percent, "%"), (0.001, 2.0), "By the specification, at the drive's input."),
    quantity(TESTS, "leakage-limit", "largest earth leakage", (Current, "mA"), (1e-4, 30.0), "By the specification. No check uses it."),
    quantity(TESTS, "bearing-rise-limit", "largest bearing temperature rise", (TemperatureRise, "K"), (1.0, 150.0), "By the maker. No check uses it."),
    quantity(TESTS, "unbalance-site-limit", "supply unbalance by the specification", (Percent, "%"), (0.001, 0.2), "The larger of both definitions is compared with it, beside the manual's limit."),
    text(TESTS, "notes", "notes", "Anything else a reader must know."),
];
