//! Fields of the drive plate sheet: what the drive's plate and manual say, the maker's limits among them.

use super::line::{choice, quantity, required, text};
use crate::plant::field::Field;
use engineering::Kind::{
    Capacitance, Count, CrossSection, Current, Energy, Frequency, Length, Number, Percent, Power, Resistance, Speed,
    Temperature, Time, Voltage,
};

const IDENTITY: &str = "Identity";
const INPUT: &str = "Input";
const OUTPUT: &str = "Output at the chosen overload";
const REDUCTION: &str = "Reduction by place";
const BUS: &str = "DC bus";
const RESISTOR: &str = "Brake chopper and resistor";
const PROTECTION: &str = "Protection and earth";
const CABLE: &str = "Motor cable, filter and encoder";
const RESOLUTION: &str = "Resolution of its settings";

/// Fields in the order of the form.
#[rustfmt::skip]
pub const FIELDS: &[Field] = &[
    text(IDENTITY, "maker", "maker", "As printed."),
    text(IDENTITY, "type", "type designation", "The whole of it, as printed."),
    text(IDENTITY, "serial", "serial number", "As printed."),
    text(IDENTITY, "firmware", "firmware", "As the drive shows it."),
    text(IDENTITY, "options", "option boards", "What is plugged in, slot by slot."),
    quantity(IDENTITY, "year", "year made", (Count, ""), (1960.0, 2100.0), ""),
    text(IDENTITY, "enclosure", "enclosure", "Degree of protection, as printed."),
    text(IDENTITY, "manual", "manual", "Number and revision of the manual that governs."),
    choice(IDENTITY, "converter", "kind of converter", &[("diode", "voltage source, diode input"), ("active", "voltage source, active input"), ("current-source", "current source"), ("matrix", "without DC bus"), ("other", "other")], "Only voltage-source drives are in scope."),
    quantity(INPUT, "input-volts-low", "lowest rated input volts", (Voltage, "V"), (24.0, 1e5), "Of the printed range."),
    quantity(INPUT, "input-volts-high", "highest rated input volts", (Voltage, "V"), (24.0, 1e5), "Of the printed range."),
    quantity(INPUT, "input-tolerance-low", "allowed below that range", (Percent, "%"), (0.0, 0.5), "As the manual gives it, often 10 % or 15 %."),
    quantity(INPUT, "input-tolerance-high", "allowed above that range", (Percent, "%"), (0.0, 0.5), "As the manual gives it, often 10 %."),
    quantity(INPUT, "input-hertz-low", "lowest input frequency", (Frequency, "Hz"), (10.0, 440.0), "No check uses it."),
    quantity(INPUT, "input-hertz-high", "highest input frequency", (Frequency, "Hz"), (10.0, 440.0), "No check uses it."),
    quantity(INPUT, "input-current", "rated input current", (Current, "A"), (0.1, 1e4), "At rated output."),
    quantity(INPUT, "unbalance-limit", "supply unbalance allowed", (Percent, "%"), (0.001, 0.2), "From the manual; without it the unbalance is a figure."),
    choice(INPUT, "unbalance-definition", "reckoned as", &[("largest-deviation", "largest deviation from the mean"), ("negative-sequence", "negative over positive sequence")], "The two are different numbers; the manual says which it means. Left empty, the larger of the two is compared."),
    quantity(INPUT, "reactor", "line reactor or choke", (Percent, "%"), (0.0, 0.2), "Impedance on the drive's rated power."),
    required(quantity(OUTPUT, "continuous-current", "continuous output current", (Current, "A"), (0.1, 1e4), "Of the column of the plate whose overload suits the load.")),
    quantity(OUTPUT, "rated-power", "rated motor power", (Power, "kW"), (50.0, 1e7), "Of the same column."),
    quantity(OUTPUT, "overload", "overload current", (Percent, "%"), (1.0, 4.0), "Of the continuous current, as printed: 110 %, 150 %."),
    quantity(OUTPUT, "overload-time", "for how long", (Time, "s"), (0.1, 3600.0), "As printed, often 60 s."),
    quantity(OUTPUT, "overload-period", "once in", (Time, "min"), (1.0, 86400.0), "As printed, often 10 min."),
    quantity(OUTPUT, "peak-current", "highest current at start", (Current, "A"), (0.1, 2e4), "For a few seconds, when the maker gives one."),
    quantity(OUTPUT, "output-volts", "highest output volts", (Voltage, "V"), (24.0, 1e5), "Usually the input volts."),
    quantity(OUTPUT, "output-hertz", "highest output frequency", (Frequency, "Hz"), (10.0, 3000.0), "No check uses it."),
    quantity(OUTPUT, "switching-rated", "switching frequency of the rating", (Frequency, "kHz"), (100.0, 1e5), "Above it the current is reduced."),
    quantity(OUTPUT, "switching-low", "lowest switching frequency", (Frequency, "kHz"), (100.0, 1e5), "That can be set; a sine filter asks for a lowest one of its own. No check uses it."),
    quantity(OUTPUT, "switching-high", "highest switching frequency", (Frequency, "kHz"), (100.0, 1e5), "That can be set, or that filter and cable allow. No check uses it."),
    quantity(REDUCTION, "reduction", "remaining current, by the maker", (Percent, "%"), (0.1, 1.0), "For this altitude, air and switching frequency; 100 % for none. It replaces the usual figures."),
    quantity(REDUCTION, "ambient-rated", "full current up to", (Temperature, "°C"), (10.0, 70.0), "Air temperature of the rating, often 40 °C."),
    quantity(REDUCTION, "altitude-rated", "full current up to altitude", (Length, "m"), (0.0, 5000.0), "Often 1 000 m."),
    quantity(REDUCTION, "lost-per-kelvin", "lost for every kelvin above", (Percent, "%"), (0.0, 0.1), "From the manual."),
    quantity(REDUCTION, "lost-per-hundred-metres", "lost for every 100 m above", (Percent, "%"), (0.0, 0.05), "From the manual; often 1 %."),
    quantity(BUS, "waiting-time", "waiting time on the label", (Time, "min"), (0.0, 7200.0), "After switching off, before the DC bus is measured."),
    quantity(BUS, "bus-limit", "maker's limit after waiting", (Voltage, "V"), (0.0, 120.0), "Only where the manual names one."),
    quantity(BUS, "bus-capacitance", "bus capacitance", (Capacitance, "µF"), (1e-6, 10.0), "From the maker."),
    quantity(BUS, "trip-high", "overvoltage trip", (Voltage, "V"), (50.0, 2e5), "Bus volts at which the drive trips."),
    quantity(BUS, "trip-low", "undervoltage trip", (Voltage, "V"), (10.0, 2e5), "Bus volts at which the drive trips."),
    quantity(BUS, "precharge-resistor", "pre-charge resistor", (Resistance, "Ω"), (0.01, 1e5), "From the maker."),
    quantity(BUS, "discharge-resistor", "discharge resistor", (Resistance, "kΩ"), (1.0, 1e8), "Across the bus, from the maker."),
    quantity(RESISTOR, "chopper-volts", "chopper conducts at", (Voltage, "V"), (50.0, 2e5), "Bus volts at which it switches on."),
    quantity(RESISTOR, "resistor-minimum", "least resistance allowed", (Resistance, "Ω"), (0.01, 1e5), "The chopper's, from the manual."),
    quantity(RESISTOR, "chopper-current", "chopper's highest current", (Current, "A"), (0.1, 1e4), "When the manual gives it. No check uses it."),
    quantity(RESISTOR, "resistor", "resistor fitted", (Resistance, "Ω"), (0.01, 1e5), "As marked on it."),
    quantity(RESISTOR, "resistor-tolerance", "its tolerance", (Percent, "%"), (0.0, 0.3), "As marked; left empty, 10 % is assumed."),
    quantity(RESISTOR, "resistor-power", "its continuous power", (Power, "kW"), (1.0, 1e7), "As marked."),
    quantity(RESISTOR, "resistor-energy", "energy it takes in one stop", (Energy, "kJ"), (1.0, 1e10), "From its sheet. No check uses it."),
    quantity(RESISTOR, "resistor-duty", "its duty", (Percent, "%"), (0.001, 1.0), "Part of the period it may carry peak power. No check uses it."),
    quantity(PROTECTION, "short-circuit-rating", "short-circuit rating", (Current, "kA"), (100.0, 5e5), "As marked, with the device named beside it."),
    text(PROTECTION, "short-circuit-device", "with this device", "Fuse or breaker the rating depends on, as the maker publishes it."),
    text(PROTECTION, "residual-current-type", "residual-current device the maker allows", "Type, as the manual gives it."),
    choice(PROTECTION, "touch-current", "touch current", &[("above", "above 3.5 mA AC or 10 mA DC"), ("below", "not above"), ("not-known", "not known")], "From the manual. Not known is taken as above."),
    quantity(PROTECTION, "touch-current-ac", "touch current, AC", (Current, "mA"), (0.0, 10.0), "When the manual gives the figure. Without the class above, both are needed."),
    quantity(PROTECTION, "touch-current-dc", "touch current, DC", (Current, "mA"), (0.0, 10.0), "When the manual gives the figure."),
    quantity(PROTECTION, "pe-minimum", "least protective conductor", (CrossSection, "mm²"), (0.5, 1000.0), "When the manual names one."),
    quantity(PROTECTION, "terminal-torque", "power terminals, torque", (engineering::Kind::Torque, "N·m"), (0.1, 1000.0), "Terminal torque from the manual; of a range, its low end."),
    quantity(PROTECTION, "terminal-torque-high", "power terminals, highest torque", (engineering::Kind::Torque, "N·m"), (0.1, 1000.0), "Only where the manual gives a range. Left empty, ±10 % of the figure above (common practice)."),
    quantity(CABLE, "cable-length-screened", "longest screened cable", (Length, "m"), (1.0, 1e4), "Without output filter, from the manual."),
    quantity(CABLE, "cable-length-unscreened", "longest unscreened cable", (Length, "m"), (1.0, 1e4), "From the manual."),
    quantity(CABLE, "cable-length-filtered", "longest cable with the output filter", (Length, "m"), (1.0, 2e4), "From the filter's sheet."),
    quantity(CABLE, "filter-switching-low", "output filter, lowest switching frequency", (Frequency, "kHz"), (100.0, 1e5), "From the filter's sheet."),
    quantity(CABLE, "filter-switching-high", "output filter, highest switching frequency", (Frequency, "kHz"), (100.0, 1e5), "From the filter's sheet."),
    quantity(CABLE, "encoder-input-hertz", "encoder input, highest pulse frequency", (Frequency, "kHz"), (100.0, 1e8), "From the manual. No check uses it."),
    quantity(RESOLUTION, "step-volts", "motor volts", (Voltage, "V"), (0.001, 100.0), "Smallest step that can be set."),
    quantity(RESOLUTION, "step-amps", "motor amps", (Current, "A"), (0.001, 100.0), "Smallest step that can be set."),
    quantity(RESOLUTION, "step-hertz", "hertz", (Frequency, "Hz"), (0.001, 10.0), "Smallest step that can be set."),
    quantity(RESOLUTION, "step-rpm", "speed", (Speed, "rpm"), (0.001, 100.0), "Smallest step that can be set."),
    quantity(RESOLUTION, "step-power", "power", (Power, "kW"), (0.1, 1e5), "Smallest step that can be set."),
    quantity(RESOLUTION, "step-power-factor", "power factor", (Number, ""), (0.0001, 0.1), "Smallest step that can be set."),
    quantity(RESOLUTION, "step-time", "time", (Time, "s"), (0.0001, 10.0), "Smallest step that can be set."),
];
