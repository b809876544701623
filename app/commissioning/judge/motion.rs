//! Inputs of the motion checks: the machine as one shaft, its ramps, what was measured of them, and rotation.

use super::drive_train::{Settings, base_frequency, breakaway_at_shaft, machine, told};
pub(super) use super::drive_train::{load_at_motor_speed, load_torque_at_shaft, rated_torque, speed_at};
use super::{Runs, View, once};
use crate::plant::Sheet::{Drive, DrivePlate, Further, Load, Supply};
use crate::record::ParameterColumn;
use engineering::checks::{
    acceleration_time, braking, bus_peak, deceleration_time, measured_acceleration, measured_deceleration, rotation,
    stop_time,
};
use engineering::motion::set_ramp::STRAIGHT;
use engineering::motion::{SetRamp, Trace};
use engineering::{Current, Duration, Frequency, Ratio, Speed, Torque, Voltage};

/// The speed a ramp ends at (the set maximum, or the plate's), and the time for that change out of the set one.
fn ramp(view: &View<'_>, function: &str, set: Settings) -> (Option<Speed>, Option<Duration>) {
    let top: Option<Frequency> = set.quantity(view, "maximum-frequency").or_else(|| base_frequency(view, set));
    let whole: Option<Duration> = set.quantity(view, function);
    let span: Option<Frequency> = set.quantity(view, "ramp-span").or(top);
    let time = match (whole, span, top) {
        (Some(whole), Some(span), Some(top)) if span.hertz() > 0.0 => {
            Some(Duration::from_seconds(whole.seconds() * top.hertz() / span.hertz()))
        }
        (whole, ..) => whole,
    };
    (top.and_then(|f| speed_at(view, f)), time)
}

fn acceleration_inputs(view: &View<'_>, set: Settings) -> acceleration_time::Inputs {
    let (to_speed, set_time) = ramp(view, "acceleration-time", set);
    acceleration_time::Inputs {
        machine: machine(view, set),
        from_speed: None,
        to_speed,
        set_time,
        s_curve: set.quantity(view, "s-curve-share"),
        plain_volts_per_hertz: set.choice(view, "control-mode").map(|mode| mode == "volts-per-hertz"),
    }
}

/// The start as predicted on the ramp in force, for charts.
#[must_use]
pub fn predicted_start(view: &View<'_>) -> Option<engineering::motion::Trace> {
    acceleration_time::trace(&acceleration_inputs(view, Settings::InForce))
}

/// The predicted time of the start.
pub(super) fn start_time(view: &View<'_>) -> Option<Duration> {
    predicted_start(view)?.time()
}

/// Torque to break away and the largest torque that the set ramp asks, at the motor's shaft. What a ramp asks knows no
/// current limit: a limit judged by a torque that it has cut itself would always be right.
pub(super) fn torques_by(view: &View<'_>, set: Settings) -> (Option<Torque>, Option<Torque>) {
    (breakaway_at_shaft(view), acceleration_time::torque_asked(&acceleration_inputs(view, set)))
}

/// The same by the settings in force.
pub(super) fn torques(view: &View<'_>) -> (Option<Torque>, Option<Torque>) {
    torques_by(view, Settings::InForce)
}

pub(super) fn acceleration_time(view: &View<'_>) -> Runs {
    let by_column = |column| acceleration_time::check(&acceleration_inputs(view, Settings::Column(column)));
    told(view, super::both_columns(view, &["acceleration-time"], by_column))
}

/// The bus at nominal supply: √2 times the line volts.
pub(super) fn bus_volts(view: &View<'_>) -> Option<Voltage> {
    view.plate::<Voltage>(Supply, "volts").map(|v| Voltage::from_volts(v.volts() * std::f64::consts::SQRT_2))
}

fn chopper(view: &View<'_>, set: Settings) -> Option<Voltage> {
    if view.flag(Drive, "brake-chopper") != Some(true) {
        return None;
    }
    set.quantity(view, "chopper-volts").or_else(|| view.plate(DrivePlate, "chopper-volts"))
}

fn deceleration_inputs(view: &View<'_>, set: Settings) -> deceleration_time::Inputs {
    let (from_speed, set_time) = ramp(view, "deceleration-time", set);
    deceleration_time::Inputs {
        machine: machine(view, set),
        from_speed,
        to_speed: None,
        set_time,
        s_curve: set.quantity(view, "s-curve-share"),
        bus_voltage: bus_volts(view),
        bus_capacitance: view.plate(DrivePlate, "bus-capacitance"),
        trip_voltage: view.plate(DrivePlate, "trip-high"),
        chopper_voltage: chopper(view, set),
        losses: view.plate(Further, "braking-losses"),
    }
}

pub(super) fn deceleration_time(view: &View<'_>) -> Runs {
    let by_column = |column| deceleration_time::check(&deceleration_inputs(view, Settings::Column(column)));
    told(view, super::both_columns(view, &["deceleration-time"], by_column))
}

pub(super) fn braking(view: &View<'_>) -> Runs {
    if view.flag(Drive, "brake-chopper") == Some(false) {
        // Nothing to size: whether the bus stands the ramp is the deceleration time's question.
        return Vec::new();
    }
    let by_column = |column| {
        let set = Settings::Column(column);
        let (from_speed, set_time) = ramp(view, "deceleration-time", set);
        let cycle = view.plate(Further, "stop-cycle").or_else(|| {
            let stops = view.count(Load, "stops-per-hour").filter(|n| *n > 0)?;
            Some(Duration::from_seconds(3600.0 / f64::from(stops)))
        });
        braking::check(&braking::Inputs {
            machine: machine(view, set),
            from_speed,
            to_speed: None,
            set_time,
            s_curve: set.quantity(view, "s-curve-share"),
            holding_time: view.plate(Load, "overhauling-time"),
            cycle_time: cycle,
            chopper_voltage: chopper(view, set),
            minimum_resistor: view.plate(DrivePlate, "resistor-minimum"),
            resistor: set.quantity(view, "resistor-ohms").or_else(|| view.plate(DrivePlate, "resistor")),
            resistor_power: view.plate(DrivePlate, "resistor-power"),
        })
    };
    told(view, super::both_columns(view, &["deceleration-time"], by_column))
}

/// A ramp between standstill and the frequency that was entered, with the set time's share for it.
fn as_run(view: &View<'_>, item: &str, function: &str) -> Option<(Option<Speed>, Option<Duration>)> {
    let set = Settings::InForce;
    let reached: Frequency = view.entered(item, 0)?;
    let (_, whole) = ramp(view, function, set);
    let top: Frequency = set.quantity(view, "maximum-frequency").or_else(|| base_frequency(view, set))?;
    let share = whole
        .filter(|_| top.hertz() > 0.0)
        .map(|t| Duration::from_seconds(t.seconds() * reached.hertz() / top.hertz()));
    Some((speed_at(view, reached), share))
}

fn start_as_run(view: &View<'_>) -> acceleration_time::Inputs {
    let mut inputs = acceleration_inputs(view, Settings::InForce);
    if let Some((to_speed, set_time)) = as_run(view, "start-to-hertz", "acceleration-time") {
        (inputs.to_speed, inputs.set_time) = (to_speed, set_time);
    }
    inputs
}

fn stop_as_run(view: &View<'_>) -> deceleration_time::Inputs {
    let mut inputs = deceleration_inputs(view, Settings::InForce);
    if let Some((from_speed, set_time)) = as_run(view, "ramp-down-from-hertz", "deceleration-time") {
        (inputs.from_speed, inputs.set_time) = (from_speed, set_time);
    }
    inputs
}

/// A ramp as it was run, for charts; over the whole speed while the frequency it was run to is not entered.
#[derive(Clone, Debug, PartialEq)]
pub struct AsRun {
    /// What was set for it.
    pub set: Option<SetRamp>,
    /// The motor speed at its upper end.
    pub speed: Option<Speed>,
    /// How it should go.
    pub predicted: Option<Trace>,
}

fn set_ramp(time: Option<Duration>, s_curve: Option<Ratio>) -> Option<SetRamp> {
    Some(SetRamp { time: time?, s_curve: s_curve.unwrap_or(STRAIGHT) })
}

/// The start as it was run.
#[must_use]
pub fn start(view: &View<'_>) -> AsRun {
    let inputs = start_as_run(view);
    AsRun {
        set: set_ramp(inputs.set_time, inputs.s_curve),
        speed: inputs.to_speed,
        predicted: acceleration_time::trace(&inputs),
    }
}

/// The ramp down as it was run.
#[must_use]
pub fn ramp_down(view: &View<'_>) -> AsRun {
    let inputs = stop_as_run(view);
    AsRun {
        set: set_ramp(inputs.set_time, inputs.s_curve),
        speed: inputs.from_speed,
        predicted: deceleration_time::trace(&inputs),
    }
}

pub(super) fn measured_acceleration(view: &View<'_>) -> Runs {
    let inputs = start_as_run(view);
    once(measured_acceleration::check(&measured_acceleration::Inputs {
        measured: view.reading("start-time"),
        set_time: inputs.set_time,
        predicted_time: acceleration_time::trace(&inputs).and_then(|t| t.time()),
    }))
}

pub(super) fn measured_deceleration(view: &View<'_>) -> Runs {
    let inputs = stop_as_run(view);
    once(measured_deceleration::check(&measured_deceleration::Inputs {
        measured: view.reading("ramp-down-time"),
        set_time: inputs.set_time,
        predicted_time: deceleration_time::trace(&inputs).and_then(|t| t.time()),
    }))
}

pub(super) fn bus_peak(view: &View<'_>) -> Runs {
    once(bus_peak::check(&bus_peak::Inputs {
        peak: view.reading("bus-peak"),
        trip: view.plate(DrivePlate, "trip-high"),
    }))
}

pub(super) fn stop_time(view: &View<'_>, step: &str) -> Runs {
    let item = if step == "stop-time-under-load" { "stop-seconds-load" } else { "stop-seconds" };
    let specified: Option<Duration> =
        view.plate(Further, "emergency-stop-time").or_else(|| view.plate(Load, "stop-time"));
    let began = if step == "stop-time-under-load" {
        stop_time::Began::TopSpeed
    } else {
        let set = Settings::InForce;
        let top = set.quantity(view, "maximum-frequency").or_else(|| base_frequency(view, set));
        stop_time::Began::At { from: view.entered("stop-from-hertz", 0), top }
    };
    once(stop_time::check(&stop_time::Inputs { measured: view.reading(item), specified, began }))
}

pub(super) fn rotation(view: &View<'_>) -> Runs {
    use rotation::{Direction, Inputs, check};
    let direction = |key: Option<&str>| match key {
        Some("clockwise") => Some(Direction::Clockwise),
        Some("counter-clockwise") => Some(Direction::CounterClockwise),
        _ => None,
    };
    let on_drive = direction(view.observed("direction-drive"));
    // Either way round will do: what was observed is then what is required.
    let required = match view.choice(Load, "direction") {
        Some("either") => on_drive,
        other => direction(other),
    };
    // At the first turn nothing is left yet; what is intended is then what the drive was given.
    let reversed = view
        .parameter("output-phase-order", ParameterColumn::AsLeft)
        .or_else(|| view.parameter("output-phase-order", ParameterColumn::Intended))
        .map(|order| order.text == "u-w-v");
    once(check(&Inputs {
        required,
        on_drive,
        has_bypass: Some(view.flag(Drive, "bypass").unwrap_or(false)),
        on_bypass: direction(view.observed("direction-bypass")),
        corrected_by_parameter: reversed,
        has_encoder: Some(view.flag(Drive, "encoder").unwrap_or(false)),
        // Without a signal there is no sign to compare: what is missing then is the comparison.
        encoder_agrees: match view.observed("encoder-sign") {
            Some("agrees") => Some(true),
            Some("opposite") => Some(false),
            _ => None,
        },
    }))
}

/// The current that goes with the drive's overload: a peak of a few seconds is no more than the longer overload allows.
pub(super) fn overload_current(view: &View<'_>) -> Option<Current> {
    let continuous: Option<Current> = view.plate(DrivePlate, "continuous-current");
    let by_percent = super::nameplate::overload(view).zip(continuous).map(|(o, continuous)| o.current(continuous));
    let peak: Option<Current> = view.plate(DrivePlate, "peak-current");
    by_percent.into_iter().chain(peak).min_by(|a, b| a.amperes().total_cmp(&b.amperes()))
}
