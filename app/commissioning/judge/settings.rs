//! Inputs of the checks on the parameter record; each runs for what is intended and for what was left.

use super::drive_train::{Settings, told};
use super::{Runs, View, both_columns, once};
use crate::plant::Sheet::{DrivePlate, Further, Load, Motor, Site};
use crate::record::ParameterColumn;
use engineering::checks::{
    current_limit, loss_of_reference, maximum_speed, minimum_speed, motor_data_settings, overload_setting,
    reference_scaling, restart, skip_bands, switching_frequency, test_settings_restored, volts_per_hertz,
};
use engineering::formulas::trip_class::TripClass;
use engineering::quantity::Quantity;
use engineering::{Current, Frequency, Ratio, Reading};

pub(super) fn motor_data_settings(view: &View<'_>) -> Runs {
    use motor_data_settings::{Inputs, Pair, check};
    fn pair<Q: Quantity>(view: &View<'_>, column: ParameterColumn, function: &str, plate: &str, step: &str) -> Pair<Q> {
        let set = view.setting(function, column);
        let plate: Option<Q> = view.motor(plate);
        // Which of these a drive asks for differs from maker to maker: one that was left empty was not asked.
        let not_asked = set.is_none();
        Pair { set, plate, step: view.plate(DrivePlate, step), not_asked }
    }
    both_columns(
        view,
        &["motor-volts", "motor-amps", "motor-hertz", "motor-rpm", "motor-power", "motor-power-factor"],
        |c| {
            check(&Inputs {
                voltage: pair(view, c, "motor-volts", "volts", "step-volts"),
                current: pair(view, c, "motor-amps", "amps", "step-amps"),
                frequency: pair(view, c, "motor-hertz", "hertz", "step-hertz"),
                speed: pair(view, c, "motor-rpm", "rpm", "step-rpm"),
                power: pair(view, c, "motor-power", "power", "step-power"),
                power_factor: pair(view, c, "motor-power-factor", "power-factor", "step-power-factor"),
            })
        },
    )
}

pub(super) fn volts_per_hertz(view: &View<'_>) -> Runs {
    both_columns(view, &["base-volts", "base-frequency"], |c| {
        volts_per_hertz::check(&volts_per_hertz::Inputs {
            set_voltage: view.setting("base-volts", c),
            set_frequency: view.setting("base-frequency", c),
            rated_voltage: view.motor("volts"),
            rated_frequency: view.motor("hertz"),
            voltage_resolution: view.plate(DrivePlate, "step-volts"),
            frequency_resolution: view.plate(DrivePlate, "step-hertz"),
        })
    })
}

pub(super) fn maximum_speed(view: &View<'_>) -> Runs {
    both_columns(view, &["maximum-frequency"], |c| {
        maximum_speed::check(&maximum_speed::Inputs {
            maximum_frequency: view.setting("maximum-frequency", c),
            rated_frequency: view.motor("hertz"),
            rated_speed: view.motor("rpm"),
            motor_maximum: view.plate(Motor, "maximum-speed"),
            gear_ratio: view.plate(Load, "gear-ratio"),
            gearbox_maximum: view.plate(Load, "gear-speed"),
            load_maximum: view.plate(Load, "speed-limit").or_else(|| view.plate(Load, "speed-high")),
        })
    })
}

pub(super) fn minimum_speed(view: &View<'_>) -> Runs {
    both_columns(view, &["minimum-frequency"], |c| {
        minimum_speed::check(&minimum_speed::Inputs {
            minimum_frequency: view.setting("minimum-frequency", c),
            maximum_frequency: view.setting("maximum-frequency", c),
            rated_frequency: view.motor("hertz"),
            rated_speed: view.motor("rpm"),
            self_cooled: view.choice(Motor, "cooling").map(|cooling| cooling == "self"),
            motor_minimum: view.plate(Motor, "minimum-speed"),
            gear_ratio: view.plate(Load, "gear-ratio"),
            gearbox_minimum: view.plate(Load, "gear-speed-least"),
            load_minimum: view.plate(Load, "speed-least").or_else(|| view.plate(Load, "speed-low")),
        })
    })
}

pub(super) fn current_limit(view: &View<'_>) -> Runs {
    let by_column = |c| {
        let (breakaway_torque, acceleration_torque) = super::motion::torques_by(view, Settings::Column(c));
        current_limit::check(&current_limit::Inputs {
            setting: view.setting("current-limit", c),
            rated_current: view.motor("amps"),
            power_factor: view.motor("power-factor"),
            breakdown: view.plate(Motor, "breakdown-torque"),
            rated_power: view.motor("power"),
            rated_speed: view.motor("rpm"),
            breakaway_torque,
            acceleration_torque,
            drive_overload_current: super::motion::overload_current(view),
            coupling_torque: view.plate(Load, "coupling-torque"),
            gearbox_torque: view.plate(Load, "gear-torque"),
        })
    };
    told(view, both_columns(view, &["current-limit"], by_column))
}

pub(super) fn overload_setting(view: &View<'_>) -> Runs {
    use overload_setting::{Inputs, Rule, check};
    let rule = match view.choice(Site, "overload-rule") {
        Some("nfpa-70") => Some(Rule::Nfpa70),
        Some("rated-current") => Some(Rule::RatedCurrent),
        _ => None,
    };
    both_columns(view, &["overload-current"], |c| {
        let trip_class = match view.set_choice("overload-class", c) {
            Some("10a") => Some(TripClass::Class10A),
            Some("10") => Some(TripClass::Class10),
            Some("20") => Some(TripClass::Class20),
            Some("30") => Some(TripClass::Class30),
            _ => None,
        };
        check(&Inputs {
            setting: view.setting("overload-current", c),
            rated_current: view.motor("amps"),
            rule,
            service_factor: view.motor("service-factor"),
            marked_rise: view.plate(Motor, "rise"),
            will_not_start: view.flag(Further, "will-not-start"),
            trip_class,
            acceleration_time: super::motion::start_time(view),
            maker_maximum: view.plate(Further, "overload-maximum"),
        })
    })
}

pub(super) fn switching_frequency(view: &View<'_>) -> Runs {
    both_columns(view, &["switching-frequency"], |c| {
        switching_frequency::check(&switching_frequency::Inputs {
            setting: view.setting("switching-frequency", c),
            full_current_up_to: view.plate(DrivePlate, "switching-rated"),
            filter_minimum: view.plate(DrivePlate, "filter-switching-low"),
            filter_maximum: view.plate(DrivePlate, "filter-switching-high"),
            motor_minimum: view.plate(Motor, "switching-minimum"),
        })
    })
}

/// The skip bands set in a column; none where no band is complete.
fn bands(view: &View<'_>, column: ParameterColumn) -> Vec<skip_bands::Band> {
    (1..=3)
        .filter_map(|n| {
            let low = view.setting(&format!("skip-{n}-low"), column)?;
            let high = view.setting(&format!("skip-{n}-high"), column)?;
            Some(skip_bands::Band { low, high })
        })
        .collect()
}

pub(super) fn skip_bands(view: &View<'_>) -> Runs {
    let points: Vec<Frequency> =
        ["fixed-speed-1", "fixed-speed-2"].into_iter().filter_map(|f| view.in_force(f)).collect();
    both_columns(view, &["skip-1-low", "skip-2-low", "skip-3-low"], |c| {
        // An empty list says that nothing is skipped, once it is known over which speeds the load works.
        let speeds = ["minimum-frequency", "maximum-frequency"].into_iter().any(|f| view.parameter(f, c).is_some());
        let bands = bands(view, c);
        skip_bands::check(&skip_bands::Inputs {
            bands: (speeds || !points.is_empty() || !bands.is_empty()).then_some(bands),
            working_points: points.clone(),
            minimum_frequency: view.setting("minimum-frequency", c),
            maximum_frequency: view.setting("maximum-frequency", c),
        })
    })
}

pub(super) fn restart(view: &View<'_>) -> Runs {
    both_columns(view, &["auto-restart", "restart-after-power"], |c| {
        let set = |function: &str| view.set_choice(function, c).map(|text| text == "yes");
        let attempts: Option<Ratio> = view.setting("auto-restart-attempts", c);
        restart::check(&restart::Inputs {
            after_trip: set("auto-restart"),
            attempts: attempts.map(Ratio::fraction).filter(|n| (0.0..1000.0).contains(n)).map(whole),
            after_supply_return: set("restart-after-power"),
            allowed: view.flag(Further, "auto-restart-allowed"),
        })
    })
}

#[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "callers bound it to 0 … 1000")]
fn whole(number: f64) -> u32 {
    number.round() as u32
}

pub(super) fn loss_of_reference(view: &View<'_>) -> Runs {
    use loss_of_reference::{Action, Inputs, Signal, check};
    let action_of = |key: Option<&str>| match key {
        Some("trip") => Some(Action::Trip),
        Some("last-speed") => Some(Action::HoldLast),
        Some("fixed-speed") => Some(Action::PresetSpeed),
        Some("ramp") => Some(Action::RampStop),
        Some("none") => Some(Action::Ignored),
        _ => None,
    };
    both_columns(view, &["loss-of-reference", "loss-of-communication"], |c| {
        let source = view.set_choice("reference-source", c);
        let signal = match source {
            // The drive's own controller lives on a measured value that comes the same way.
            Some("analogue" | "controller") => match view.choice(Further, "reference-signal") {
                Some("0-20" | "0-10") => Some(Signal::DeadZero),
                Some("4-20") => Some(Signal::LiveZero),
                _ => None,
            },
            Some("network") => Some(Signal::Network),
            Some("panel" | "fixed") => Some(Signal::Panel),
            _ => None,
        };
        // A network is watched by another function than a signal, and its loss is tried at another step.
        let (set, tried) = if source == Some("network") {
            (view.set_choice("loss-of-communication", c), view.entry("communication-loss-right", 0))
        } else {
            (view.set_choice("loss-of-reference", c), view.entry("reference-loss-right", 0))
        };
        check(&Inputs {
            signal,
            action: action_of(set),
            specified: action_of(view.choice(Further, "loss-of-reference-action")),
            threshold: view.setting("loss-of-reference-level", c),
            tried: tried.map(|_| true),
        })
    })
}

pub(super) fn reference_scaling(view: &View<'_>) -> Runs {
    use reference_scaling::{Inputs, Point, check};
    // A row left without an applied current stands for its own value, as the row says.
    let point = |row: u16, milliamperes: f64| Point {
        injected: view
            .reading_in("ref-applied", row)
            .or_else(|| view.entry("ref-hz", row).map(|_| Reading::bare(Current::from_amperes(milliamperes / 1e3)))),
        shown: view.entered("ref-hz", row),
    };
    let signal = view.choice(Further, "reference-signal");
    let stated = |milliamperes: [f64; 2], end: usize| {
        let known = matches!(signal, Some("4-20" | "0-20"));
        known.then(|| Current::from_amperes(milliamperes[end] / 1e3))
    };
    let ends = if signal == Some("0-20") { [0.0, 20.0] } else { [4.0, 20.0] };
    let low: Option<Current> = view.plate(Further, "reference-low").or_else(|| view.in_force("reference-low"));
    let high: Option<Current> = view.plate(Further, "reference-high").or_else(|| view.in_force("reference-high"));
    once(check(&Inputs {
        by_voltage: signal == Some("0-10"),
        low_current: low.or_else(|| stated(ends, 0)),
        high_current: high.or_else(|| stated(ends, 1)),
        points: [point(0, 4.0), point(1, 8.0), point(2, 12.0), point(3, 16.0), point(4, 20.0)],
        low: view.plate(Further, "reference-low-hertz").or_else(|| view.in_force("reference-low-frequency")),
        high: view.plate(Further, "reference-high-hertz").or_else(|| view.in_force("reference-high-frequency")),
        own_limit: view.plate(Site, "reference-tolerance"),
    }))
}

pub(super) fn test_settings_restored(view: &View<'_>) -> Runs {
    use ParameterColumn::{AsFound, AsLeft, Intended};
    use test_settings_restored::{Inputs, TestSetting, check};
    let at = |function: &str, column| view.parameter(function, column).map(comparable);
    let stands =
        |row: &str| [AsFound, Intended, AsLeft].into_iter().any(|column| view.parameter(row, column).is_some());
    let label = |function: &str| crate::record::functions::find(function).map_or("", |f| f.label).to_owned();
    let mut settings = Vec::new();
    for (test, function) in [
        ("test-overload-current", "overload-current"),
        ("test-current-limit", "current-limit"),
        ("test-maximum-frequency", "maximum-frequency"),
    ] {
        if !stands(test) {
            continue;
        }
        // The column as found of a test row holds what was set for the test.
        let (during, intended, as_left) = (at(test, AsFound), at(function, Intended), at(function, AsLeft));
        let own = at(test, AsLeft).filter(|own| Some(own) != as_left.as_ref());
        let of = |what, as_left| TestSetting { what, during: during.clone(), intended: intended.clone(), as_left };
        settings.push(of(label(function), as_left));
        settings.extend(own.map(|own| of(format!("{}, by its test row", label(function)), Some(own))));
    }
    let other = "test-other";
    let said_none = [AsFound, Intended, AsLeft].into_iter().any(|c| at(other, c).is_some_and(|text| text == "none"));
    if stands(other) && !said_none {
        let (during, intended, as_left) = (at(other, AsFound), at(other, Intended), at(other, AsLeft));
        settings.push(TestSetting { what: label(other), during, intended, as_left });
    }
    let entered = |item: &crate::plant::Recorded<crate::record::Entry>| comparable(&item.value.value);
    let (trip, restored) = (view.entry("overload-trip-set", 0), view.entry("overload-restored", 0));
    if trip.is_some() || restored.is_some() {
        let (during, intended) = (trip.map(entered), at("overload-current", Intended));
        let of = |what, as_left| TestSetting { what, during: during.clone(), intended: intended.clone(), as_left };
        settings.push(of(format!("{} after its trip", label("overload-current")), restored.map(entered)));
        if !stands("test-overload-current") {
            settings.push(of(label("overload-current"), at("overload-current", AsLeft)));
        }
    }
    let mut unlisted = Vec::new();
    let listed = stands("test-current-limit") || stands("test-maximum-frequency");
    if view.entry("limits-lowered", 0).is_some() && !listed {
        unlisted.push("test settings that were lowered for the first turn".to_owned());
    }
    let neither_done = view.drive.record.as_ref().is_some_and(|record| {
        ["lower-limits", "overload-trip"].into_iter().all(|step| record.otherwise.contains_key(step))
    });
    let said = !settings.is_empty() || !unlisted.is_empty() || said_none || neither_done;
    once(check(&Inputs { settings: said.then_some(settings), unlisted }))
}

/// Equal values read equal, whatever digits were typed.
fn comparable(typed: &crate::Typed) -> String {
    typed.si.clone().unwrap_or_else(|| typed.text.trim().to_lowercase())
}
