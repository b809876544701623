//! Fields of the drive sheet: where the drive stands, what is fitted, and what is planned; the flags steps ask for.

use super::line::{choice, flag, quantity, text};
use crate::plant::field::Field;
use engineering::Kind::{Length, Temperature};

const PLACE: &str = "Place";
const DRIVE: &str = "Fitted to the drive";
const MOTOR: &str = "Fitted to motor and machine";
const CIRCUMSTANCE: &str = "Circumstances";
const WORK: &str = "Work planned";

/// Fields in the order of the form. A flag's key is the fitted-options flag that steps name.
#[rustfmt::skip]
pub const FIELDS: &[Field] = &[
    text(PLACE, "location", "location", "Building, level, room."),
    text(PLACE, "panel", "panel and compartment", "Where the drive is mounted."),
    text(PLACE, "motor-location", "motor location", "Where the motor stands, when elsewhere."),
    text(PLACE, "drawings", "drawings", "Circuit diagram and layout, with revision."),
    text(PLACE, "specification", "specification", "Documents the drive is to agree with."),
    quantity(PLACE, "altitude", "altitude here", (Length, "m"), (-430.0, 6000.0), "Only when it differs from the site's."),
    quantity(PLACE, "ambient-high", "hottest air at the drive", (Temperature, "°C"), (-50.0, 80.0), "Inside the room or cubicle it breathes from."),
    flag(DRIVE, "bypass", "bypass", "The motor can also run from the line."),
    flag(DRIVE, "brake-chopper", "brake chopper", "With a brake resistor on the DC bus."),
    choice(DRIVE, "output-filter", "output filter", &[("none", "none"), ("dv-dt", "dv/dt filter"), ("sine", "sine filter")], "Between drive and motor."),
    flag(DRIVE, "line-reactor", "line reactor", "Ahead of the drive, or built in on the AC side."),
    flag(DRIVE, "emc-filter", "EMC filter", "Built in or ahead of the drive."),
    flag(DRIVE, "active-front-end", "active front end", "The drive feeds back to the supply; the DC bus window is then not assessed."),
    flag(DRIVE, "safe-torque-off", "safe torque off", "Wired and used."),
    flag(DRIVE, "analogue-reference", "analogue reference", "Speed set by a current or voltage signal."),
    flag(DRIVE, "fieldbus", "fieldbus", "Commands or reference come over a network."),
    flag(DRIVE, "residual-current-device", "residual-current device upstream", "Ahead of the drive."),
    flag(MOTOR, "encoder", "encoder", "On the motor shaft, read by the drive."),
    choice(MOTOR, "motor-sensor", "motor temperature sensor", &[("none", "none"), ("ptc", "PTC thermistors"), ("pt100", "Pt100"), ("switch", "thermal switch")], "In the winding."),
    flag(MOTOR, "separate-fan", "separately driven motor fan", "The motor's cooling fan has its own motor."),
    flag(MOTOR, "anti-condensation-heater", "anti-condensation heater", "A second source of voltage at the motor."),
    flag(MOTOR, "mechanical-brake", "mechanical brake", "On the motor or the machine."),
    flag(MOTOR, "gearbox", "gearbox", "Between motor and load."),
    flag(MOTOR, "bearing-protection", "insulated bearing or shaft earthing", "Either of the two, at the motor."),
    flag(MOTOR, "hoisting", "hoisting", "A load can hang on this drive."),
    flag(MOTOR, "multi-motor", "several motors on this drive", "Run together on one output."),
    flag(CIRCUMSTANCE, "it-or-corner-earthed", "IT or corner-earthed supply", "Filters and varistors with an earth link may have to be opened."),
    flag(CIRCUMSTANCE, "hazardous-area", "hazardous area", "Motor or drive stands where gas or dust can be explosive."),
    flag(CIRCUMSTANCE, "stored-over-a-year", "stored longer than a year", "Without voltage; bus capacitors may need re-forming."),
    flag(WORK, "first-run-uncoupled", "first runs uncoupled", "The motor is taken off its load for the first turn and coupled again later."),
    flag(WORK, "ten-minute-insulation-test", "ten-minute insulation run", "For form-wound machines, above the size the firm sets, or where specified."),
];
