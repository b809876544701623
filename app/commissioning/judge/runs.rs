//! Inputs of the checks on runs, uncoupled and under load.

use super::{Runs, View, once, per_row};
use crate::plant::Sheet::{DrivePlate, Further, Load, Motor, Site};
use engineering::checks::{
    current_balance, encoder_scaling, instrument_calibration, load_current, load_profile, no_load_current,
    slip_at_no_load, temperature_rise, vibration,
};
use engineering::day::Day;
use engineering::quantity::Quantity;
use engineering::{Accuracy, Frequency, Outcome, Ratio, Reading, Speed, Torque, VibrationVelocity};
use std::collections::BTreeMap;

fn uncoupled(view: &View<'_>) -> Option<bool> {
    view.chosen("run-coupling").map(|coupling| coupling == "uncoupled")
}

fn meter(view: &View<'_>) -> Option<current_balance::Meter> {
    match view.chosen("run-meter") {
        Some("display" | "fundamental") => Some(current_balance::Meter::Fundamental),
        Some("true-rms") => Some(current_balance::Meter::TrueRms),
        Some("mean-responding") => Some(current_balance::Meter::MeanResponding),
        _ => None,
    }
}

/// A check that asks for an uncoupled motor: for every row, or once for its refusal where the motor was coupled.
fn per_uncoupled_row(view: &View<'_>, item: &str, run: impl Fn(u16) -> Outcome) -> Runs {
    if uncoupled(view) == Some(false) { once(run(0)) } else { per_row(view, item, run) }
}

pub(super) fn no_load_current(view: &View<'_>) -> Runs {
    per_uncoupled_row(view, "run-i-u", |row| {
        no_load_current::check(&no_load_current::Inputs {
            reading: view.reading_in("run-i-u", row),
            uncoupled: uncoupled(view),
            frequency: view.entered("run-hz", row),
            rated_frequency: view.motor("hertz"),
            rated_current: view.motor("amps"),
            power_factor: view.motor("power-factor"),
            breakdown: view.plate(Motor, "breakdown-torque"),
        })
    })
}

pub(super) fn current_balance(view: &View<'_>, step: &str) -> Runs {
    let items =
        if step == "load-run" { ["load-i-u", "load-i-v", "load-i-w"] } else { ["run-i-u", "run-i-v", "run-i-w"] };
    per_row(view, items[0], |row| {
        current_balance::check(&current_balance::Inputs {
            u: view.reading_in(items[0], row),
            v: view.reading_in(items[1], row),
            w: view.reading_in(items[2], row),
            meter: meter(view),
            maker_maximum: view.plate(Motor, "current-unbalance-maximum"),
        })
    })
}

/// The frequency that the drive makes: its own clock makes it, exact to the step that it shows.
fn output_frequency(view: &View<'_>, row: u16) -> Option<Reading<Frequency>> {
    let value: Frequency = view.entered("run-hz", row)?;
    let step = view.plate::<Frequency>(DrivePlate, "step-hertz").map_or(0.1, Frequency::hertz);
    let accuracy = Accuracy {
        percent_of_reading: 0.0,
        digits: 1.0,
        resolution: step,
        percent_of_full_scale: 0.0,
        full_scale: 0.0,
    };
    Some(Reading::with(value, accuracy))
}

pub(super) fn slip_at_no_load(view: &View<'_>) -> Runs {
    per_uncoupled_row(view, "run-rpm", |row| {
        slip_at_no_load::check(&slip_at_no_load::Inputs {
            speed: view.reading_in("run-rpm", row),
            frequency: output_frequency(view, row),
            uncoupled: uncoupled(view),
            rated_frequency: view.motor("hertz"),
            rated_speed: view.motor("rpm"),
        })
    })
}

pub(super) fn encoder_scaling(view: &View<'_>) -> Runs {
    if view.flag(crate::plant::Sheet::Drive, "encoder") != Some(true) {
        return Vec::new();
    }
    let set: Option<Ratio> = view.in_force("encoder-pulses");
    per_row(view, "run-encoder-rpm", |row| {
        encoder_scaling::check(&encoder_scaling::Inputs {
            shown: view.entered::<Speed>("run-encoder-rpm", row).map(|s| Speed::from_rpm(s.rpm().abs())),
            measured: view.reading_in("run-rpm", row),
            pulses_set: set.map(Ratio::fraction).filter(|n| (0.0..1e9).contains(n)).map(count),
            pulses_plate: view.count(Further, "encoder-pulses"),
            own_tolerance: view.plate(Further, "encoder-tolerance"),
            turns_ratio: view.plate(Further, "encoder-ratio"),
        })
    })
}

#[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "callers bound it to 0 … 1e9")]
fn count(number: f64) -> u32 {
    number.round() as u32
}

/// Torque at the motor's shaft in a row of the load run: as shown by the drive, otherwise what the load's sheet expects.
fn torque_in(view: &View<'_>, row: u16) -> Option<Torque> {
    let rated = super::motion::rated_torque(view)?;
    let shown: Option<Ratio> = view.entered("load-torque", row);
    match shown {
        Some(share) => Some(Torque::from_newton_metres(rated.newton_metres() * share.fraction())),
        None => {
            let speed = speed_in(view, row)?;
            super::motion::load_at_motor_speed(view, speed)
        }
    }
}

fn speed_in(view: &View<'_>, row: u16) -> Option<Speed> {
    view.entered("load-rpm", row).or_else(|| super::motion::speed_at(view, view.entered::<Frequency>("load-hz", row)?))
}

pub(super) fn load_current(view: &View<'_>) -> Runs {
    let by_row = |row| {
        load_current::check(&load_current::Inputs {
            reading: view.reading_in("load-i-u", row),
            load_torque: torque_in(view, row),
            frequency: view.entered("load-hz", row),
            rated_frequency: view.motor("hertz"),
            rated_current: view.motor("amps"),
            power_factor: view.motor("power-factor"),
            breakdown: view.plate(Motor, "breakdown-torque"),
            rated_power: view.motor("power"),
            rated_speed: view.motor("rpm"),
        })
    };
    super::drive_train::told(view, per_row(view, "load-i-u", by_row))
}

pub(super) fn load_profile(view: &View<'_>) -> Runs {
    use load_profile::{Expected, Inputs, Point, check};
    let rated = super::motion::rated_torque(view);
    let rows = u16::try_from(view.rows_of("load-hz").len()).unwrap_or(0);
    let points = (0..rows)
        .filter_map(|row| {
            let share: Ratio = view.entered("load-torque", row)?;
            let torque = Torque::from_newton_metres(rated?.newton_metres() * share.fraction());
            Some(Point { speed: speed_in(view, row)?, torque })
        })
        .collect();
    let expected = match view.choice(Load, "profile") {
        Some("constant") => Some(Expected::Constant),
        Some("linear") => Some(Expected::Linear),
        Some("quadratic") => Some(Expected::Quadratic),
        Some("constant-power") => Some(Expected::ConstantPower),
        _ => None,
    };
    once(check(&Inputs { points, expected }))
}

pub(super) fn vibration(view: &View<'_>) -> Runs {
    use vibration::{Accepted, Foundation, Inputs, check};
    let accepted = match view.choice(Site, "vibration-boundary") {
        Some("a-b") => Some(Accepted::ZoneA),
        Some("b-c") => Some(Accepted::ZoneB),
        _ => None,
    };
    // Motor and machine stand together: the smaller of their makers' limits holds.
    let by_motor: Option<VibrationVelocity> = view.plate(Motor, "vibration-maximum");
    let by_machine: Option<VibrationVelocity> = view.plate(Load, "vibration-limit");
    let maker_maximum = by_motor.into_iter().chain(by_machine).min_by(|a, b| a.coherent().total_cmp(&b.coherent()));
    let foundation = match view.choice(Load, "foundation") {
        Some("rigid") => Some(Foundation::Rigid),
        Some("flexible") => Some(Foundation::Flexible),
        _ => None,
    };
    per_row(view, "vibration-drive-end", |row| {
        let highest = ["vibration-drive-end", "vibration-other-end", "vibration-axial"]
            .into_iter()
            .filter_map(|item| view.reading_in(item, row))
            .max_by(|a, b| a.number().total_cmp(&b.number()));
        check(&Inputs {
            reading: highest,
            shaft_height: view.plate(Motor, "shaft-height"),
            accepted,
            foundation,
            rated_power: view.motor("power"),
            speed: view.entered("vibration-hz", row).and_then(|f| super::motion::speed_at(view, f)),
            maker_maximum,
        })
    })
}

pub(super) fn temperature_rise(view: &View<'_>) -> Runs {
    use temperature_rise::{Inputs, Method, check};
    let method = match view.chosen("thermal-method") {
        Some("sensor") => Some(Method::Sensor { winding: view.reading("thermal-sensor") }),
        Some("resistance") => Some(Method::Resistance {
            cold: view.reading("winding-r-uv"),
            cold_at: view.reading("winding-temperature"),
            hot: view.reading("thermal-hot-resistance"),
        }),
        _ => None,
    };
    once(check(&Inputs {
        method,
        coolant: view.reading("thermal-ambient"),
        conductor: super::supply::metal(view.choice(Motor, "winding-metal")),
        thermal_class: super::windings::thermal_class(view),
        plate_ambient: view.plate(Motor, "ambient"),
        maker_maximum: view.plate(Motor, "rise-maximum"),
    }))
}

/// One outcome for every instrument that a standing entry names, on the last day it was used.
pub(super) fn instrument_calibration(view: &View<'_>) -> Runs {
    let day = |text: &str| {
        let mut parts = text.splitn(3, '-');
        let year = parts.next()?.parse().ok()?;
        let month = parts.next()?.parse().ok()?;
        Day::new(year, month, parts.next()?.parse().ok()?)
    };
    let mut used: BTreeMap<String, (String, String)> = BTreeMap::new();
    for slot in view.drive.record.iter().flat_map(|r| r.entries.values()) {
        let Some(recorded) = slot.current() else { continue };
        let Some(instrument) = &recorded.value.instrument else { continue };
        let date = recorded.received.date();
        let entry = used.entry(instrument.0.mark.clone()).or_insert_with(|| (instrument.0.due.clone(), date.clone()));
        // The latest use is the one that calibration must still cover.
        entry.1 = entry.1.clone().max(date);
    }
    used.into_iter()
        .map(|(mark, (due, on))| {
            let inputs = instrument_calibration::Inputs { read_on: day(&on), due: day(&due), calibrated_on: None };
            (mark, instrument_calibration::check(&inputs))
        })
        .collect()
}
