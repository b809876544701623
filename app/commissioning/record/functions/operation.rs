//! Functions: commands, references, restart, braking, and what else a drive is left with.

use super::{BRAKING, Function, OTHER, REFERENCES, RESTART, TEST, choice, flag, quantity, words};
use engineering::Kind::{Count, Current, Frequency, LoopCurrent, Power, Resistance, Time, Voltage};

const LOOP: (engineering::Kind, &str) = (LoopCurrent, "mA");

#[rustfmt::skip]
pub(super) const ROWS: &[Function] = &[
    choice(REFERENCES, "command-source", "start and stop from", &[("terminals", "terminals"), ("panel", "the drive's panel"), ("network", "network"), ("several", "several places")], ""),
    choice(REFERENCES, "reference-source", "speed from", &[("analogue", "analogue signal"), ("network", "network"), ("panel", "the drive's panel"), ("fixed", "fixed speeds"), ("controller", "the drive's own controller")], ""),
    quantity(REFERENCES, "reference-low", "low end of the signal", LOOP, (0.0, 0.022), "Usually 4 mA."),
    quantity(REFERENCES, "reference-high", "high end of the signal", LOOP, (0.001, 0.024), "Usually 20 mA."),
    quantity(REFERENCES, "reference-low-frequency", "output frequency at the low end", (Frequency, "Hz"), (0.0, 2000.0), ""),
    quantity(REFERENCES, "reference-high-frequency", "output frequency at the high end", (Frequency, "Hz"), (0.0, 2000.0), ""),
    quantity(REFERENCES, "reference-filter", "filter time", (Time, "s"), (0.0, 600.0), ""),
    choice(REFERENCES, "loss-of-reference", "when the reference is lost", &[("trip", "trips"), ("last-speed", "keeps the last speed"), ("fixed-speed", "goes to a fixed speed"), ("ramp", "ramps down"), ("none", "not watched")], "It must be chosen, whatever the choice."),
    quantity(REFERENCES, "loss-of-reference-level", "taken as lost below", LOOP, (0.0, 0.02), "3.6 mA or less by NAMUR NE 43."),
    choice(REFERENCES, "loss-of-communication", "when the network is lost", &[("trip", "trips"), ("last-speed", "keeps the last speed"), ("fixed-speed", "goes to a fixed speed"), ("ramp", "ramps down"), ("none", "not watched")], ""),
    quantity(REFERENCES, "loss-of-communication-time", "network taken as lost after", (Time, "s"), (0.0, 600.0), ""),
    flag(RESTART, "auto-restart", "restarts by itself after a trip", "A machine that starts by itself must be marked so."),
    quantity(RESTART, "auto-restart-attempts", "attempts", (Count, ""), (0.0, 1000.0), ""),
    quantity(RESTART, "auto-restart-delay", "delay between attempts", (Time, "s"), (0.0, 36000.0), ""),
    flag(RESTART, "restart-after-power", "starts by itself when voltage returns", ""),
    flag(RESTART, "catching", "catches a spinning load", ""),
    quantity(RESTART, "ride-through", "dip ridden through", (Time, "s"), (0.0, 60.0), ""),
    flag(BRAKING, "chopper-enabled", "brake chopper switched on", ""),
    quantity(BRAKING, "chopper-volts", "chopper conducts at", (Voltage, "V"), (50.0, 2e5), "When it can be set."),
    quantity(BRAKING, "resistor-ohms", "brake resistor as set", (Resistance, "Ω"), (0.01, 1e5), ""),
    quantity(BRAKING, "resistor-watts", "brake resistor power as set", (Power, "kW"), (1.0, 1e7), ""),
    quantity(BRAKING, "brake-open-delay", "mechanical brake opens after", (Time, "s"), (0.0, 60.0), ""),
    quantity(BRAKING, "brake-open-current", "mechanical brake opens above", (Current, "A"), (0.0, 2e4), "Torque must be there before it opens."),
    quantity(BRAKING, "brake-close-frequency", "mechanical brake closes below", (Frequency, "Hz"), (0.0, 100.0), ""),
    quantity(OTHER, "switching-frequency", "switching frequency", (Frequency, "kHz"), (100.0, 1e5), "It decides current, noise, heat and what cable and filter stand."),
    flag(OTHER, "emc-earth-link", "EMC and varistor earth links closed", "Open on IT and corner-earthed supplies, as the manual says."),
    words(OTHER, "relay-1", "relay 1 signals", ""),
    words(OTHER, "relay-2", "relay 2 signals", ""),
    words(OTHER, "relay-3", "relay 3 signals", ""),
    words(OTHER, "inputs", "digital inputs", "Terminal by terminal."),
    words(OTHER, "analogue-output", "analogue output", "What it shows and its span."),
    words(OTHER, "network", "network", "Kind, address, bit rate."),
    words(OTHER, "safety-checksum", "checksum of the safety settings", "As the drive shows it."),
    quantity(OTHER, "transfer-delay", "bypass transfer delay", (Time, "s"), (0.0, 600.0), "Long enough for the motor's residual voltage to die away."),
    quantity(OTHER, "sleep-frequency", "sleep below", (Frequency, "Hz"), (0.0, 2000.0), "Pumps and fans that stop by themselves."),
    flag(OTHER, "access-code-set", "settings locked", ""),
    flag(OTHER, "access-code-handed-over", "access code handed over", "Yes or no, never the code itself."),
    quantity(TEST, "test-overload-current", "overload lowered for its test", (Current, "A"), (0.01, 2e4), "As found: the test value. As left: back to the overload setting."),
    quantity(TEST, "test-current-limit", "current limit lowered for the first turn", (Current, "A"), (0.01, 2e4), "As left: back to the current limit."),
    quantity(TEST, "test-maximum-frequency", "highest frequency lowered for the first turn", (Frequency, "Hz"), (0.5, 3000.0), "As left: back to the highest frequency."),
    words(TEST, "test-other", "other settings changed for a test", "What, and that it is back."),
];
