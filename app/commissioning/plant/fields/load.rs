//! Fields of the load sheet: what is driven, its torque, inertia, gear, speeds and limits.

use super::line::{choice, flag, quantity, required, table, text};
use crate::plant::field::Field;
use engineering::Kind::{Count, Inertia, LinearSpeed, Mass, Number, Percent, Power, Speed, Time, Torque, Vibration};

const LOAD: &str = "Load";
const TORQUE: &str = "Torque";
const GEAR: &str = "Inertia and gear";
const SPEED: &str = "Speed and direction";
const BRAKING: &str = "Stopping and duty";
const VIBRATION: &str = "Vibration";

/// Fields in the order of the form. Torque, inertia and speeds are those of the load's own shaft.
#[rustfmt::skip]
pub const FIELDS: &[Field] = &[
    required(choice(LOAD, "kind", "kind", &[("pump", "pump"), ("fan", "fan"), ("conveyor", "conveyor"), ("hoist", "hoist"), ("compressor", "compressor"), ("mixer", "mixer"), ("other", "other")], "For a hoist, set the hoisting flag on the drive sheet too.")),
    text(LOAD, "description", "description", "What it moves."),
    text(LOAD, "maker", "maker", "As printed."),
    text(LOAD, "type", "type designation", "As printed."),
    text(LOAD, "serial", "serial number", "As printed."),
    choice(TORQUE, "profile", "torque over speed", &[("constant", "constant"), ("linear", "rises with speed"), ("quadratic", "rises with the square of speed"), ("constant-power", "constant power"), ("table", "table below")], "Fans and most pumps: square. Conveyors and hoists: constant."),
    quantity(TORQUE, "torque", "torque", (Torque, "N·m"), (0.0, 1e8), "Of the load's shaft at the speed below."),
    quantity(TORQUE, "power", "or shaft power", (Power, "kW"), (0.0, 5e7), "At the speed below, when the torque is not known."),
    quantity(TORQUE, "at-speed", "at this load speed", (Speed, "rpm"), (0.1, 1e5), "The duty point. Left empty, the highest working speed is taken."),
    table(TORQUE, "torque-table", "table", "“speed in % ; torque in %” of the point above, a line each, speeds rising."),
    quantity(TORQUE, "breakaway", "breakaway torque", (Percent, "%"), (0.0, 5.0), "Part of the torque above that is needed to start moving."),
    quantity(TORQUE, "static-torque", "torque left at standstill", (Percent, "%"), (0.0, 2.0), "Part of the torque above that remains at very low speed: static head, friction."),
    flag(TORQUE, "overhauling", "can drive the motor", "A falling load, a downhill conveyor, a fan in another's draught."),
    quantity(TORQUE, "overhauling-torque", "torque when it does", (Torque, "N·m"), (0.0, 1e8), "Of the load's shaft. Stopping and braking are judged with it."),
    quantity(TORQUE, "overhauling-time", "for how long between two stops", (Time, "s"), (0.0, 36000.0), "The longest lowering or downhill run in each cycle, for the brake resistor."),
    quantity(GEAR, "inertia", "moment of inertia", (Inertia, "kg·m²"), (0.0, 1e8), "Of everything that turns with the load's shaft. GD² is four times as large."),
    quantity(GEAR, "motor-side-inertia", "inertia on the motor's shaft", (Inertia, "kg·m²"), (0.0, 1e5), "Coupling, brake disc, pulley; without the rotor."),
    quantity(GEAR, "gear-ratio", "gear ratio", (Number, ""), (0.01, 10000.0), "Motor speed over load speed; 1 when coupled directly."),
    quantity(GEAR, "gear-efficiency", "gear efficiency", (Percent, "%"), (0.05, 1.0), "Left empty, a usual one is assumed and said so."),
    quantity(GEAR, "gear-torque", "gearbox limit torque, input", (Torque, "N·m"), (0.01, 1e8), "At the motor's shaft."),
    quantity(GEAR, "gear-speed", "gearbox limit speed, input", (Speed, "rpm"), (1.0, 1e5), "At the motor's shaft."),
    quantity(GEAR, "gear-speed-least", "gearbox least speed, input", (Speed, "rpm"), (0.0, 1e5), "At the motor's shaft, for its lubrication."),
    quantity(GEAR, "coupling-torque", "coupling limit torque", (Torque, "N·m"), (0.01, 1e8), "At the motor's shaft."),
    quantity(GEAR, "linear-mass", "mass moved in a line", (Mass, "kg"), (0.0, 1e7), "Belt and goods, load and hook."),
    quantity(GEAR, "linear-speed", "its speed", (LinearSpeed, "m/s"), (0.0, 100.0), "At the highest working speed."),
    quantity(SPEED, "speed-low", "lowest working speed", (Speed, "rpm"), (0.0, 1e5), "Of the load's shaft, as the process needs it."),
    quantity(SPEED, "speed-high", "highest working speed", (Speed, "rpm"), (0.1, 1e5), "Of the load's shaft."),
    quantity(SPEED, "speed-limit", "mechanical limit", (Speed, "rpm"), (0.1, 1e5), "Speed of the load's shaft that must not be passed."),
    quantity(SPEED, "speed-least", "least speed the machine stands", (Speed, "rpm"), (0.0, 1e5), "For lubrication or cooling, from its maker."),
    choice(SPEED, "direction", "required direction", &[("clockwise", "clockwise"), ("counter-clockwise", "counter-clockwise"), ("either", "either")], "Of the motor's shaft, seen from its drive end."),
    choice(SPEED, "reverse-harm", "turning backwards", &[("harmless", "does no harm"), ("briefly", "may happen for a moment"), ("never", "must not happen")], "A pump with a screwed impeller must not be turned backwards: uncouple first."),
    quantity(BRAKING, "stop-time", "specified stop time", (Time, "s"), (0.0, 7200.0), "From the risk assessment or the specification."),
    quantity(BRAKING, "acceleration-time", "specified time to top speed", (Time, "s"), (0.0, 36000.0), "When the process names one."),
    quantity(BRAKING, "deceleration-time", "specified time to standstill in service", (Time, "s"), (0.0, 36000.0), "When the process names one."),
    quantity(BRAKING, "stops-per-hour", "stops in an hour", (Count, ""), (0.0, 3600.0), "For the brake resistor and the overload."),
    choice(BRAKING, "spinning-start", "can be spinning at start", &[("no", "no"), ("forward", "forwards"), ("backward", "backwards or both")], "A fan in a draught, a pump with back-flow."),
    text(BRAKING, "process-value", "process value watched", "Flow, pressure, level: what the load run writes down."),
    choice(VIBRATION, "foundation", "foundation", &[("rigid", "rigid"), ("flexible", "flexible")], "In the direction that is measured."),
    quantity(VIBRATION, "vibration-limit", "machine maker's limit", (Vibration, "mm/s"), (0.1, 100.0), "Velocity, r.m.s. It goes before the standard."),
];
