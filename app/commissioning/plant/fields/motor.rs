//! Fields of the motor sheet: the plate's rating columns, what stands once, and the motor maker's limits.

use super::line::{choice, flag, quantity, required, table, text};
use crate::plant::field::Field;
use engineering::Kind::{
    Count, Current, Frequency, Inertia, Length, Mass, Number, Percent, Power, Resistance, RiseTime, Speed, Temperature,
    TemperatureRise, Vibration, Voltage,
};

const IDENTITY: &str = "Identity";
const RATING: &str = "Rating column";
const THERMAL: &str = "Duty and thermal";
const MECHANICAL: &str = "Mechanical";
const WINDING: &str = "Winding";
const DRIVEN: &str = "On a drive";
const SENSOR: &str = "Sensor, heater, fan";
const MAKER: &str = "Limits by the motor's maker";

/// Fields of every rating column.
#[rustfmt::skip]
pub const COLUMN_FIELDS: &[Field] = &[
    choice(RATING, "connection", "connection", &[("star", "star"), ("delta", "delta"), ("high", "links for high volts"), ("low", "links for low volts"), ("single", "only one")], "As the plate draws it beside these volts."),
    required(quantity(RATING, "volts", "volts", (Voltage, "V"), (10.0, 1e5), "Line to line, of this column. Motors above 1 000 V are outside the scope.")),
    required(quantity(RATING, "amps", "amps", (Current, "A"), (0.01, 2e4), "At these volts; star and delta amps differ by the root of three.")),
    required(quantity(RATING, "hertz", "hertz", (Frequency, "Hz"), (1.0, 2000.0), "Of this column.")),
    required(quantity(RATING, "rpm", "rated speed", (Speed, "rpm"), (10.0, 60000.0), "At full load; a little below 60 times hertz over pole pairs.")),
    required(quantity(RATING, "power", "power at the shaft", (Power, "kW"), (10.0, 5e7), "kW, hp or PS: pick the one that is printed.")),
    quantity(RATING, "power-factor", "power factor, cosφ", (Number, ""), (0.05, 1.0), "At full load."),
    quantity(RATING, "efficiency", "efficiency", (Percent, "%"), (0.05, 0.999), "At full load."),
    quantity(RATING, "service-factor-amps", "amps at the service factor", (Current, "A"), (0.01, 2e4), "When the plate prints them."),
    quantity(RATING, "service-factor", "service factor", (Number, ""), (1.0, 2.0), "On a drive, 1.0 is to be reckoned with."),
];

/// Fields in the order of the form.
#[rustfmt::skip]
pub const FIELDS: &[Field] = &[
    text(IDENTITY, "maker", "maker", "As printed."),
    text(IDENTITY, "type", "type designation", "The whole of it, as printed."),
    text(IDENTITY, "serial", "serial number", "As printed."),
    quantity(IDENTITY, "year", "year made", (Count, ""), (1890.0, 2100.0), ""),
    required(choice(IDENTITY, "machine", "kind of machine", &[("induction", "three-phase induction"), ("permanent-magnet", "permanent magnet"), ("reluctance", "reluctance"), ("other", "other")], "Only induction motors are in scope; the others generate when turned, or follow other rules.")),
    choice(IDENTITY, "column-in-use", "rating column in use", &[("1", "column 1"), ("2", "column 2"), ("3", "column 3"), ("4", "column 4")], "The one that goes with the links and volts on this drive. Left empty, the first is taken and marked as assumed."),
    text(IDENTITY, "frame", "frame", "As printed."),
    text(IDENTITY, "standard", "standard", "As printed: IEC 60034-1, NEMA MG 1."),
    quantity(IDENTITY, "poles", "number of poles", (Count, ""), (2.0, 60.0), "Only when the plate prints it."),
    text(IDENTITY, "hazard-marking", "marking for hazardous areas", "The whole of it, with the certificate number."),
    choice(THERMAL, "duty", "duty", &[("s1", "S1 continuous"), ("s2", "S2 short time"), ("s3", "S3 intermittent"), ("s4", "S4"), ("s5", "S5"), ("s6", "S6"), ("s7", "S7"), ("s8", "S8"), ("s9", "S9 on a drive"), ("s10", "S10")], "As printed."),
    choice(THERMAL, "thermal-class", "thermal class", &[("105", "105 (A)"), ("120", "120 (E)"), ("130", "130 (B)"), ("155", "155 (F)"), ("180", "180 (H)"), ("200", "200")], "Of the insulation."),
    choice(THERMAL, "rise-class", "used to the rise of class", &[("130", "130 (B)"), ("155", "155 (F)"), ("180", "180 (H)")], "When the plate says, for example, F used as B."),
    quantity(THERMAL, "rise", "marked temperature rise", (TemperatureRise, "K"), (20.0, 180.0), "When printed."),
    quantity(THERMAL, "ambient", "ambient", (Temperature, "°C"), (-60.0, 90.0), "As printed; 40 °C when the plate is silent."),
    quantity(THERMAL, "altitude", "altitude", (Length, "m"), (0.0, 6000.0), "As printed; 1 000 m when the plate is silent."),
    choice(THERMAL, "cooling", "cooling", &[("self", "fan on its own shaft"), ("separate", "separately driven fan"), ("surface", "no fan"), ("liquid", "liquid"), ("air-stream", "stands in the air stream of the load")], "A shaft fan cools little at low speed."),
    text(THERMAL, "enclosure", "enclosure", "Degree of protection, as printed."),
    choice(THERMAL, "efficiency-class", "efficiency class", &[("ie1", "IE1"), ("ie2", "IE2"), ("ie3", "IE3"), ("ie4", "IE4"), ("ie5", "IE5"), ("none", "none printed")], "As printed."),
    text(THERMAL, "code-letter", "locked-rotor code letter", "When printed."),
    quantity(THERMAL, "locked-rotor-current", "locked-rotor over rated current", (Number, ""), (1.5, 15.0), "From plate or sheet."),
    quantity(THERMAL, "locked-rotor-torque", "locked-rotor over rated torque", (Number, ""), (0.2, 8.0), "From plate or sheet."),
    quantity(THERMAL, "breakdown-torque", "breakdown over rated torque, λ", (Number, ""), (1.1, 8.0), "From plate or sheet. Left empty, a usual one is assumed and said so."),
    quantity(MECHANICAL, "maximum-speed", "highest permitted speed", (Speed, "rpm"), (10.0, 1e5), "Mechanical, from plate or sheet."),
    quantity(MECHANICAL, "inertia", "moment of inertia of the rotor", (Inertia, "kg·m²"), (1e-7, 1e5), "J, from the sheet. GD² is four times as large."),
    quantity(MECHANICAL, "mass", "mass", (Mass, "kg"), (0.1, 1e6), ""),
    quantity(MECHANICAL, "shaft-height", "shaft height", (Length, "mm"), (0.03, 2.0), "It picks the vibration group together with the power."),
    choice(MECHANICAL, "direction", "permitted direction", &[("both", "both"), ("clockwise", "clockwise only"), ("counter-clockwise", "counter-clockwise only")], "Seen from the drive end; a fan may allow one only."),
    text(MECHANICAL, "bearing-drive-end", "bearing, drive end", ""),
    text(MECHANICAL, "bearing-other-end", "bearing, other end", ""),
    text(MECHANICAL, "grease", "grease and interval", "As printed."),
    choice(WINDING, "construction", "winding", &[("random-wound", "random-wound"), ("form-wound", "form-wound"), ("before-1970", "made before about 1970"), ("not-known", "not known")], "Almost every low-voltage motor is random-wound."),
    choice(WINDING, "insulation-system", "insulation system", &[("thermosetting", "thermosetting (epoxy, polyester)"), ("thermoplastic", "thermoplastic (asphalt, shellac)"), ("not-known", "not known")], "It decides how insulation resistance is brought to 40 °C. Not known takes the smaller factor."),
    choice(WINDING, "winding-metal", "conductor of the winding", &[("copper", "copper"), ("aluminium", "aluminium")], "Left empty, copper is assumed."),
    quantity(WINDING, "winding-resistance", "winding resistance, terminal to terminal", (Resistance, "Ω"), (1e-6, 1e5), "From the maker's test sheet, in the connection used."),
    quantity(WINDING, "winding-resistance-at", "at a winding temperature of", (Temperature, "°C"), (-20.0, 150.0), "Of that sheet; often 20 °C."),
    quantity(WINDING, "no-load-current", "no-load current of the test sheet", (Current, "A"), (0.01, 1e4), "At rated volts and hertz."),
    flag(DRIVEN, "raised-base-allowed", "maker allows a raised base frequency", "Speed and insulation both, in writing: needed for the 87 Hz way."),
    choice(DRIVEN, "withstand", "winding built for drives", &[("mg1-30", "general purpose (MG 1 part 30)"), ("mg1-31", "for drives (MG 1 part 31)"), ("iec-a", "IEC 60034-18-41 category A"), ("iec-b", "category B"), ("iec-c", "category C"), ("iec-d", "category D"), ("maker", "figures by the maker"), ("not-known", "not known")], "From plate or sheet."),
    quantity(DRIVEN, "peak-limit", "peak volts the winding stands", (Voltage, "V"), (100.0, 1e5), "Line to line at the terminals, from the maker."),
    quantity(DRIVEN, "rise-limit", "shortest rise time it stands", (RiseTime, "µs"), (1e-9, 1e-3), "From the maker."),
    quantity(DRIVEN, "minimum-speed", "lowest speed at rated torque", (Speed, "rpm"), (0.0, 60000.0), "Continuous, from the maker."),
    quantity(DRIVEN, "turndown", "speed range at constant torque", (Number, ""), (1.0, 10000.0), "10 for 10:1, when printed."),
    quantity(DRIVEN, "switching-minimum", "lowest switching frequency it wants", (Frequency, "kHz"), (100.0, 1e5), "From its maker, when given."),
    table(DRIVEN, "low-speed-torque", "continuous torque over speed", "From the maker's curve: “speed in % ; torque in %”, a line each."),
    quantity(SENSOR, "sensor-count", "sensors in series", (Count, ""), (1.0, 12.0), "Three in most motors."),
    quantity(SENSOR, "sensor-response", "response temperature", (Temperature, "°C"), (60.0, 200.0), "Of the thermistors, by the colour of their leads or the sheet."),
    quantity(SENSOR, "sensor-low", "cold resistance not below", (Resistance, "Ω"), (0.1, 1e5), "By the maker, when given."),
    quantity(SENSOR, "sensor-high", "cold resistance not above", (Resistance, "Ω"), (0.1, 1e6), "By the maker, when given."),
    quantity(SENSOR, "sensor-lead", "resistance of the sensor's leads", (Resistance, "Ω"), (0.0, 1000.0), "Both ways, for a two-wire circuit."),
    quantity(SENSOR, "heater-volts", "heater volts", (Voltage, "V"), (10.0, 1000.0), ""),
    quantity(SENSOR, "heater-power", "heater power", (Power, "W"), (1.0, 1e5), ""),
    quantity(SENSOR, "fan-volts", "separate fan volts", (Voltage, "V"), (10.0, 1000.0), ""),
    quantity(SENSOR, "fan-amps", "separate fan amps", (Current, "A"), (0.01, 1000.0), "For its own overload."),
    quantity(MAKER, "insulation-test-volts", "insulation test volts", (Voltage, "V"), (50.0, 15000.0), "Direct voltage."),
    quantity(MAKER, "insulation-minimum", "least insulation resistance at 40 °C", (Resistance, "MΩ"), (1e3, 1e13), ""),
    quantity(MAKER, "polarization-minimum", "least polarization index", (Number, ""), (1.0, 10.0), ""),
    quantity(MAKER, "balance-maximum", "largest deviation of winding resistance", (Percent, "%"), (0.001, 0.2), "From the mean of the three."),
    quantity(MAKER, "current-unbalance-maximum", "largest current unbalance", (Percent, "%"), (0.001, 0.5), ""),
    quantity(MAKER, "vibration-maximum", "largest vibration", (Vibration, "mm/s"), (0.1, 100.0), "Velocity, r.m.s."),
    quantity(MAKER, "rise-maximum", "largest temperature rise", (TemperatureRise, "K"), (10.0, 200.0), "On a drive."),
    quantity(MAKER, "terminal-torque", "terminal torque", (engineering::Kind::Torque, "N·m"), (0.1, 1000.0), ""),
];
