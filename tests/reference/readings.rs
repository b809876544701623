//! Published values on instruments, decisions, signals, encoders and vibration.

use crate::Run;
use crate::case::{Case, Results};
use engineering::checks::{encoder_scaling, vibration};
use engineering::decision::Measured;
use engineering::formulas::conformance::{Side, acceptance_limit, accepts, probability};
use engineering::formulas::loop_signal;
use engineering::motion::Gear;
use engineering::reading::{Accuracy, Reading};
use engineering::{Current, Frequency, Ratio, Speed, Verdict, VibrationVelocity, Voltage};

pub const RUNS: &[(&str, Run)] = &[
    ("instrument-limit-error", limit_error),
    ("meter-accuracy", meter_accuracy),
    ("guard-band", guard_band),
    ("conformance-probability", conformance_probability),
    ("analog-4-20mA", analog),
    ("loop-check", loop_check),
    ("vibration-units", vibration_units),
    ("vibration-zone", vibration_zone),
    ("encoder", encoder),
    ("encoder-speed-check", encoder_speed),
];

const NO_ERROR: Accuracy =
    Accuracy { percent_of_reading: 0.0, digits: 0.0, resolution: 0.0, percent_of_full_scale: 0.0, full_scale: 0.0 };

fn limit_error(case: &Case) -> Results {
    let accuracy = Accuracy {
        full_scale: case.number("full_scale", "V"),
        percent_of_full_scale: case.number("accuracy_of_full_scale", "%"),
        ..NO_ERROR
    };
    let reading = case.number("reading", "V");
    let error = accuracy.half_width(reading);
    Results::new().number("limiting_error", error, "V").number("percent_of_reading", error / reading * 100.0, "%")
}

/// The case is in no particular unit; volts stand for any.
fn meter_accuracy(case: &Case) -> Results {
    let accuracy = Accuracy {
        percent_of_reading: case.number("percent_of_reading", "%"),
        digits: case.number("digits", "1"),
        resolution: case.number("resolution", "unit"),
        ..NO_ERROR
    };
    let reading = Reading::with(Voltage::from_volts(case.number("reading", "unit")), accuracy);
    let standard = reading.standard_uncertainty().expect("an instrument");
    let both = Measured::combined(reading.number(), &[(Some(standard), None)]);
    Results::new()
        .number("limit_of_error", reading.half_width().expect("an instrument"), "unit")
        .number("standard_uncertainty_rectangular", standard, "unit")
        .number("expanded_uncertainty_k2", both.expanded, "unit")
}

fn guard_band(case: &Case) -> Results {
    let value = |name| Voltage::from_volts(case.number(name, "unit"));
    let side = match case.text("side") {
        "lower" => Side::Lower,
        "upper" => Side::Upper,
        other => panic!("{}: side {other}", case.id()),
    };
    let (limit, expanded, measured) = (value("tolerance_limit"), value("expanded_uncertainty_k2"), value("measured"));
    let multiplier = case.number("guard_multiplier_r", "1");
    let guarded = acceptance_limit(limit, side, expanded, Ratio::from_fraction(multiplier));
    let standard = Voltage::from_volts(expanded.volts() / 2.0);
    if multiplier == 1.0 {
        // The checks' own rule is this one, with r = 1.
        let rule = Measured { value: measured.volts(), expanded: expanded.volts(), doubt: None };
        let verdict = if side == Side::Lower { rule.at_least(limit.volts()) } else { rule.at_most(limit.volts()) };
        assert_eq!(verdict == Verdict::Within, accepts(guarded, side, measured), "{}: the decision rule", case.id());
    }
    Results::new()
        .number("acceptance_limit", guarded.volts(), "unit")
        .flag("accept", accepts(guarded, side, measured))
        .number("conformance_probability_normal", probability(limit, side, measured, standard).fraction(), "1")
}

fn conformance_probability(case: &Case) -> Results {
    let volts = |name| Voltage::from_volts(case.number(name, "V"));
    let found = probability(volts("upper_limit"), Side::Upper, volts("measured"), volts("standard_uncertainty"));
    Results::new().number("conformance_probability", found.fraction(), "1")
}

fn milliamperes(value: f64) -> Current {
    Current::from_amperes(value * 1e-3)
}

fn analog(case: &Case) -> Results {
    let current = milliamperes(case.number("current", "mA"));
    let hertz = |name| Frequency::from_hertz(case.number(name, "Hz"));
    let state = match loop_signal::state(current) {
        loop_signal::State::Valid => "valid",
        loop_signal::State::FailureLow => "failure_low",
        loop_signal::State::FailureHigh => "failure_high",
        loop_signal::State::Neither => "neither",
    };
    let value = loop_signal::value(current, hertz("range_low"), hertz("range_high"));
    Results::new().number("value", value.hertz(), "Hz").text("ne43_state", state)
}

fn loop_check(case: &Case) -> Results {
    assert_eq!(case.numbers("percent_points", "%"), [0.0, 25.0, 50.0, 75.0, 100.0]);
    let measured = case.numbers("measured", "mA");
    let errors: Vec<f64> = loop_signal::POINTS
        .iter()
        .zip(&measured)
        .map(|(ideal, seen)| loop_signal::error_of_span(milliamperes(*seen), milliamperes(*ideal)).fraction() * 100.0)
        .collect();
    let largest = errors.iter().map(|e| e.abs()).fold(0.0, f64::max);
    Results::new()
        .numbers("ideal", loop_signal::POINTS.to_vec(), "mA")
        .numbers("errors_percent_of_span", errors, "%")
        .number("max_abs_error", largest, "%")
        .flag("pass", largest <= case.number("limit_percent_of_span", "%"))
}

fn vibration_units(case: &Case) -> Results {
    let rms = VibrationVelocity::from_millimetres_per_second(case.number("velocity_rms", "mm/s"));
    Results::new().number("velocity_peak_sinusoidal", vibration::peak_inches_per_second(rms), "in/s")
}

fn vibration_zone(case: &Case) -> Results {
    let group = match case.text("group") {
        "1" => vibration::Group::Large,
        "2" => vibration::Group::Medium,
        other => panic!("{}: group {other}", case.id()),
    };
    let foundation = match case.text("support") {
        "rigid" => vibration::Foundation::Rigid,
        "flexible" => vibration::Foundation::Flexible,
        other => panic!("{}: support {other}", case.id()),
    };
    let boundaries = vibration::boundaries(group, foundation).expect("a group with boundaries");
    let velocity = VibrationVelocity::from_millimetres_per_second(case.number("velocity_rms", "mm/s"));
    let zone = match vibration::zone(velocity, boundaries) {
        vibration::Zone::A => "A",
        vibration::Zone::B => "B",
        vibration::Zone::C => "C",
        vibration::Zone::D => "D",
    };
    Results::new().text("zone", zone)
}

fn count(case: &Case, name: &str) -> u32 {
    let count = case.number(name, "1");
    (1..=100_000).find(|n| f64::from(*n) == count).expect("a count")
}

fn encoder(case: &Case) -> Results {
    let motor = Speed::from_rpm(case.number("motor_speed", "rpm"));
    let (pulses, counts) =
        encoder_scaling::pulse_and_count_rate(motor, count(case, "pulses_per_rev"), count(case, "edges_counted"));
    let gear = Gear { ratio: Ratio::from_fraction(case.number("gear_ratio_motor_over_load", "1")), ..Gear::DIRECT };
    Results::new()
        .number("pulse_frequency", pulses.hertz(), "Hz")
        .number("count_frequency", counts.hertz(), "Hz")
        .number("driven_speed", gear.load_speed(motor).rpm(), "rpm")
}

fn encoder_speed(case: &Case) -> Results {
    let pulses = Frequency::from_hertz(case.number("measured_pulse_frequency", "Hz"));
    let speed = encoder_scaling::speed_from_pulses(pulses, count(case, "pulses_per_rev")).expect("pulses").rpm();
    let expected = case.number("expected_speed", "rpm");
    Results::new().number("speed", speed, "rpm").number("deviation_percent", (speed / expected - 1.0) * 100.0, "%")
}
