//! Fields of the site sheet: the place itself, and the rules the site has chosen where published sources disagree.

use super::line::{choice, quantity, text};
use crate::plant::field::Field;
use engineering::Kind::{Length, Percent, Power, Temperature, Time, Voltage};

const PLACE: &str = "Place";
const RULES: &str = "Rules chosen by the site";
const WORK: &str = "Work on site";

/// Fields in the order of the form.
#[rustfmt::skip]
pub const FIELDS: &[Field] = &[
    text(PLACE, "client", "client", "Who takes the drives over."),
    text(PLACE, "address", "address", "Where it is, as the package prints it."),
    text(PLACE, "contract", "contract or order", "Reference under which the start-up is done."),
    quantity(PLACE, "altitude", "altitude", (Length, "m"), (-430.0, 6000.0), "Height above sea level. Thin air cools less: above 1 000 m drive and motor give less."),
    quantity(PLACE, "ambient-high", "hottest air", (Temperature, "°C"), (-50.0, 80.0), "Hottest air that drives and motors take in. A drive's own sheet goes first."),
    quantity(PLACE, "ambient-low", "coldest air", (Temperature, "°C"), (-60.0, 50.0), "Coldest air at start-up."),
    choice(RULES, "residual-voltage", "DC bus limit after waiting", &[("50", "50 V"), ("60", "60 V (IEC 60204-1 applies)")], "Until the site chooses, 50 V is used. Below it is a figure, never a permission."),
    quantity(RULES, "residual-voltage-other", "other DC bus limit", (Voltage, "V"), (0.0, 60.0), "Only where the site rules name a lower one."),
    choice(RULES, "supply-range", "supply volts judged by", &[("ten-percent", "±10 % (IEC 60038)"), ("five-percent", "±5 % (ANSI C84.1 range A)")], "The drive's own range is judged as well."),
    choice(RULES, "overload-rule", "overload setting judged by", &[("rated-current", "not above rated current"), ("nfpa-70", "NFPA 70, 430.32")], "Until the site chooses, rated current is the limit."),
    choice(RULES, "disconnection-rule", "automatic disconnection proved by", &[("loop-impedance", "measured loop impedance"), ("design", "the design's calculation")], "Which proof the site takes."),
    choice(RULES, "harmonic-rule", "current distortion judged by", &[("none", "not judged, figure only"), ("ieee-519-2014", "IEEE 519-2014"), ("ieee-519-2022", "IEEE 519-2022")], "At the point of common coupling; a single drive has no limit of its own."),
    choice(RULES, "vibration-boundary", "vibration accepted up to", &[("a-b", "boundary of zones A and B"), ("b-c", "boundary of zones B and C")], "Zones of ISO 20816-3. The machine maker's limit goes first."),
    quantity(RULES, "polarization-from", "ten-minute insulation run from", (Power, "kW"), (0.0, 1e8), "Size above which the firm asks for the polarization index also on random-wound machines."),
    quantity(RULES, "voltage-drop-limit", "voltage drop allowed, drive to motor", (Percent, "%"), (0.001, 0.2), "As the design gives it."),
    quantity(RULES, "reference-tolerance", "error allowed in an analogue reference", (Percent, "%"), (0.0001, 0.1), "Part of the span. Until the site chooses, 0.5 % (common practice)."),
    quantity(RULES, "disconnection-time", "longest disconnection time", (Time, "s"), (0.01, 10.0), "For the device at the head of the drive's circuit."),
    quantity(RULES, "loop-share", "share of U₀/Iₐ allowed for a measured loop", (Percent, "%"), (0.1, 1.0), "Left empty, two thirds: a loop is measured cold. The design's loop is compared with the whole."),
    text(WORK, "permit-office", "permits come from", "Who issues and takes back permits."),
    text(WORK, "protective-equipment", "protective equipment rules", "Where the site's arc-flash and protective-equipment rules are found."),
    text(WORK, "emergency", "in an emergency call", "Number and meeting point."),
];
