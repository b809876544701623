//! Inputs of the motion checks: the machine as one shaft, its ramps, what was measured of them, and rotation.

use super::{Runs, View, once};
use crate::plant::Sheet::{Drive, DrivePlate, Further, Load, Motor, Supply};
use crate::record::ParameterColumn;
use engineering::checks::{
    acceleration_time, braking, bus_peak, deceleration_time, measured_acceleration, measured_deceleration, rotation,
    stop_time,
};
use engineering::formulas::synchronous;
use engineering::motion::gear::Flow;
use engineering::motion::{Gear, LoadTorque, Machine, TorqueTable};
use engineering::{Current, Duration, Frequency, Inertia, Power, Ratio, Speed, Torque, Voltage};

/// Rated torque of the column in use.
pub(super) fn rated_torque(view: &View<'_>) -> Option<Torque> {
    let (power, speed): (Power, Speed) = (view.motor("power")?, view.motor("rpm")?);
    (speed.rpm() > 0.0).then(|| engineering::formulas::torque::torque(power, speed))
}

/// The frequency up to which the drive keeps rated flux: the base frequency that is set, or the plate's.
fn base_frequency(view: &View<'_>, column: ParameterColumn) -> Option<Frequency> {
    view.setting("base-frequency", column)
        .or_else(|| view.plate(Further, "design-base-hertz"))
        .or_else(|| view.motor("hertz"))
}

/// Rated power and speed at the end of the range of rated torque: with a raised base frequency (87 Hz way) both are
/// higher than on the plate, at the same torque and the same slip speed.
fn rated_at_base(view: &View<'_>, column: ParameterColumn) -> Option<(Power, Speed)> {
    let (power, speed): (Power, Speed) = (view.motor("power")?, view.motor("rpm")?);
    let (plate, base): (Frequency, Frequency) = (view.motor("hertz")?, base_frequency(view, column)?);
    if plate.hertz() <= 0.0 || base.hertz() <= plate.hertz() * 1.02 {
        return Some((power, speed));
    }
    let pairs = synchronous::pole_pairs(plate, speed)?;
    let slip_speed = synchronous::synchronous_speed(plate, pairs).rpm() - speed.rpm();
    let raised = synchronous::synchronous_speed(base, pairs).rpm() - slip_speed;
    Some((Power::from_watts(power.watts() * raised / speed.rpm()), Speed::from_rpm(raised)))
}

fn gear(view: &View<'_>) -> Option<Gear> {
    let ratio = view.plate::<Ratio>(Load, "gear-ratio")?;
    let efficiency = view.plate(Load, "gear-efficiency").unwrap_or(Ratio::from_fraction(1.0));
    Some(Gear { ratio, efficiency })
}

/// The load's own torque curve, at the load's shaft.
fn load(view: &View<'_>) -> Option<LoadTorque> {
    let speed: Option<Speed> = view.plate(Load, "at-speed");
    let torque: Option<Torque> = view.plate(Load, "torque").or_else(|| {
        let (power, speed): (Power, Speed) = (view.plate(Load, "power")?, speed?);
        (speed.rpm() > 0.0).then(|| engineering::formulas::torque::torque(power, speed))
    });
    match view.choice(Load, "profile")? {
        "constant" => Some(LoadTorque::Constant(torque?)),
        "linear" => Some(LoadTorque::Linear { torque: torque?, speed: speed? }),
        "quadratic" => Some(LoadTorque::Quadratic { torque: torque?, speed: speed? }),
        "constant-power" => {
            let power = view.plate(Load, "power")?;
            Some(LoadTorque::ConstantPower { power, from: view.plate(Load, "speed-low").or(speed)? })
        }
        "table" => {
            let pairs = crate::plant::field::table(view.choice(Load, "torque-table")?).ok()?;
            let (top, full) = (speed?.rpm() / 100.0, torque?.newton_metres() / 100.0);
            let points: Vec<(Speed, Torque)> = pairs
                .into_iter()
                .map(|(n, t)| (Speed::from_rpm(n * top), Torque::from_newton_metres(t * full)))
                .collect();
            TorqueTable::new(&points).map(LoadTorque::Table)
        }
        _ => None,
    }
}

/// The load's torque at its working speed, brought to the motor's shaft.
pub(super) fn load_torque_at_shaft(view: &View<'_>) -> Option<Torque> {
    let speed = view.plate(Load, "at-speed").unwrap_or(Speed::from_rpm(0.0));
    let own = load(view)?.at(speed);
    Some(gear(view).map_or(own, |g| g.reflected_torque(own, Flow::Motoring)))
}

/// Breakaway at the load's shaft: a share of the load's torque at working speed.
fn breakaway(view: &View<'_>) -> Option<Torque> {
    let share: Ratio = view.plate(Load, "breakaway")?;
    let speed = view.plate(Load, "at-speed").unwrap_or(Speed::from_rpm(0.0));
    Some(Torque::from_newton_metres(load(view)?.at(speed).newton_metres() * share.fraction()))
}

/// Motor, load, gear and current limit as one machine.
pub(super) fn machine(view: &View<'_>, column: ParameterColumn) -> Machine {
    let at_base = rated_at_base(view, column);
    let own: Option<Inertia> = view.plate(Motor, "inertia");
    let beside: Option<Inertia> = view.plate(Load, "motor-side-inertia");
    let motor_inertia = own.map(|j| {
        let beside = beside.map_or(0.0, Inertia::kilogram_square_metres);
        Inertia::from_kilogram_square_metres(j.kilogram_square_metres() + beside)
    });
    Machine {
        rated_power: at_base.map(|(power, _)| power),
        rated_speed: at_base.map(|(_, speed)| speed),
        rated_current: view.motor("amps"),
        power_factor: view.motor("power-factor"),
        breakdown: view.plate(Motor, "breakdown-torque"),
        magnetising_current: None,
        current_limit: view.setting("current-limit", column),
        motor_inertia,
        load_inertia: view.plate(Load, "inertia"),
        load: load(view),
        breakaway: breakaway(view),
        gear: gear(view),
    }
}

/// Speed of the motor at a frequency with its rated slip.
pub(super) fn speed_at(view: &View<'_>, frequency: Frequency) -> Option<Speed> {
    let (plate, speed): (Frequency, Speed) = (view.motor("hertz")?, view.motor("rpm")?);
    let pairs = synchronous::pole_pairs(plate, speed)?;
    let lost = synchronous::synchronous_speed(plate, pairs).rpm() - speed.rpm();
    Some(Speed::from_rpm((synchronous::synchronous_speed(frequency, pairs).rpm() - lost).max(0.0)))
}

/// The speed a ramp ends at (the set maximum, or the plate's), and the time for that change out of the set one.
fn ramp(view: &View<'_>, function: &str, column: ParameterColumn) -> (Option<Speed>, Option<Duration>) {
    let top: Option<Frequency> = view.setting("maximum-frequency", column).or_else(|| base_frequency(view, column));
    let set: Option<Duration> = view.setting(function, column);
    let span: Option<Frequency> = view.setting("ramp-span", column).or(top);
    let time = match (set, span, top) {
        (Some(set), Some(span), Some(top)) if span.hertz() > 0.0 => {
            Some(Duration::from_seconds(set.seconds() * top.hertz() / span.hertz()))
        }
        (set, ..) => set,
    };
    (top.and_then(|f| speed_at(view, f)), time)
}

fn acceleration_inputs(view: &View<'_>, column: ParameterColumn) -> acceleration_time::Inputs {
    let (to_speed, set_time) = ramp(view, "acceleration-time", column);
    acceleration_time::Inputs {
        machine: machine(view, column),
        from_speed: None,
        to_speed,
        set_time,
        plain_volts_per_hertz: view.set_choice("control-mode", column).map(|mode| mode == "volts-per-hertz"),
    }
}

/// The start as predicted on the ramp in force, for charts.
#[must_use]
pub fn predicted_start(view: &View<'_>) -> Option<engineering::motion::Trace> {
    acceleration_time::trace(&acceleration_inputs(view, in_force_column(view)))
}

/// As left where a current limit stands there, otherwise intended.
fn in_force_column(view: &View<'_>) -> ParameterColumn {
    if view.parameter("current-limit", ParameterColumn::AsLeft).is_some() {
        ParameterColumn::AsLeft
    } else {
        ParameterColumn::Intended
    }
}

/// The predicted time of the start.
pub(super) fn start_time(view: &View<'_>) -> Option<Duration> {
    predicted_start(view)?.time()
}

/// Torque to break away and largest torque of the predicted start, at the motor's shaft.
pub(super) fn torques(view: &View<'_>) -> (Option<Torque>, Option<Torque>) {
    let geared = |t: Torque| gear(view).map_or(t, |g| g.reflected_torque(t, Flow::Motoring));
    let away = breakaway(view).map(geared);
    let peak = predicted_start(view).and_then(|trace| {
        trace.samples.iter().map(|s| s.torque).max_by(|a, b| a.newton_metres().total_cmp(&b.newton_metres()))
    });
    (away, peak)
}

pub(super) fn acceleration_time(view: &View<'_>) -> Runs {
    super::both_columns(view, &["acceleration-time"], |column| {
        acceleration_time::check(&acceleration_inputs(view, column))
    })
}

/// The bus at nominal supply: √2 times the line volts.
pub(super) fn bus_volts(view: &View<'_>) -> Option<Voltage> {
    view.plate::<Voltage>(Supply, "volts").map(|v| Voltage::from_volts(v.volts() * std::f64::consts::SQRT_2))
}

fn chopper(view: &View<'_>, column: ParameterColumn) -> Option<Voltage> {
    if view.flag(Drive, "brake-chopper") != Some(true) {
        return None;
    }
    view.setting("chopper-volts", column).or_else(|| view.plate(DrivePlate, "chopper-volts"))
}

fn deceleration_inputs(view: &View<'_>, column: ParameterColumn) -> deceleration_time::Inputs {
    let (from_speed, set_time) = ramp(view, "deceleration-time", column);
    deceleration_time::Inputs {
        machine: machine(view, column),
        from_speed,
        to_speed: None,
        set_time,
        bus_voltage: bus_volts(view),
        bus_capacitance: view.plate(DrivePlate, "bus-capacitance"),
        trip_voltage: view.plate(DrivePlate, "trip-high"),
        chopper_voltage: chopper(view, column),
        losses: view.plate(Further, "braking-losses"),
    }
}

pub(super) fn deceleration_time(view: &View<'_>) -> Runs {
    super::both_columns(view, &["deceleration-time"], |column| {
        deceleration_time::check(&deceleration_inputs(view, column))
    })
}

pub(super) fn braking(view: &View<'_>) -> Runs {
    if view.flag(Drive, "brake-chopper") == Some(false) {
        // Nothing to size: whether the bus stands the ramp is the deceleration time's question.
        return Vec::new();
    }
    super::both_columns(view, &["deceleration-time"], |column| {
        let (from_speed, set_time) = ramp(view, "deceleration-time", column);
        let cycle = view.plate(Further, "stop-cycle").or_else(|| {
            let stops = view.count(Load, "stops-per-hour").filter(|n| *n > 0)?;
            Some(Duration::from_seconds(3600.0 / f64::from(stops)))
        });
        braking::check(&braking::Inputs {
            machine: machine(view, column),
            from_speed,
            to_speed: None,
            set_time,
            holding_time: None,
            cycle_time: cycle,
            chopper_voltage: chopper(view, column),
            minimum_resistor: view.plate(DrivePlate, "resistor-minimum"),
            resistor: view.setting("resistor-ohms", column).or_else(|| view.plate(DrivePlate, "resistor")),
            resistor_power: view.plate(DrivePlate, "resistor-power"),
        })
    })
}

/// A ramp between standstill and the frequency that was entered, with the set time's share for it.
fn as_run(
    view: &View<'_>,
    item: &str,
    function: &str,
    column: ParameterColumn,
) -> Option<(Option<Speed>, Option<Duration>)> {
    let reached: Frequency = view.entered(item, 0)?;
    let (_, whole) = ramp(view, function, column);
    let top: Frequency = view.setting("maximum-frequency", column).or_else(|| base_frequency(view, column))?;
    let share = whole
        .filter(|_| top.hertz() > 0.0)
        .map(|t| Duration::from_seconds(t.seconds() * reached.hertz() / top.hertz()));
    Some((speed_at(view, reached), share))
}

fn start_as_run(view: &View<'_>) -> acceleration_time::Inputs {
    let column = in_force_column(view);
    let mut inputs = acceleration_inputs(view, column);
    if let Some((to_speed, set_time)) = as_run(view, "start-to-hertz", "acceleration-time", column) {
        (inputs.to_speed, inputs.set_time) = (to_speed, set_time);
    }
    inputs
}

fn stop_as_run(view: &View<'_>) -> deceleration_time::Inputs {
    let column = in_force_column(view);
    let mut inputs = deceleration_inputs(view, column);
    if let Some((from_speed, set_time)) = as_run(view, "ramp-down-from-hertz", "deceleration-time", column) {
        (inputs.from_speed, inputs.set_time) = (from_speed, set_time);
    }
    inputs
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
    once(stop_time::check(&stop_time::Inputs { measured: view.reading(item), specified }))
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
        encoder_agrees: view.observed("encoder-sign").map(|sign| sign == "agrees"),
    }))
}

/// The current that goes with the drive's overload.
pub(super) fn overload_current(view: &View<'_>) -> Option<Current> {
    let continuous: Current = view.plate(DrivePlate, "continuous-current")?;
    let by_percent = super::nameplate::overload(view).map(|o| o.current(continuous));
    view.plate(DrivePlate, "peak-current").or(by_percent)
}

/// What the load's curve asks of the motor's shaft at a motor speed.
pub(super) fn load_at_motor_speed(view: &View<'_>, speed: Speed) -> Option<Torque> {
    let curve = load(view)?;
    Some(match gear(view) {
        Some(g) => g.reflected_torque(curve.at(g.load_speed(speed)), Flow::Motoring),
        None => curve.at(speed),
    })
}
