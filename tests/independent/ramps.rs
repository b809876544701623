//! Ramps against differential equations solved in time by another program, to 0.1 %.

use crate::{cases, near, number};
use engineering::formulas::magnetising::bracket;
use engineering::motion::bus::Bus;
use engineering::motion::ramp_down::RampDown;
use engineering::motion::ramp_up::RampUp;
use engineering::motion::{Gear, LoadTorque, Motor, SetRamp, Trace, Train};
use engineering::{Capacitance, Current, Duration, Inertia, Power, Ratio, Speed, Torque, Voltage};
use serde_json::Value;

const PART: f64 = 1e-3;

/// The plates of `ramps.py`.
fn motor(name: &str) -> Motor {
    let (watts, rpm, amps, cosine, lambda) = match name {
        "15 kW" => (15e3, 1470.0, 28.5, 0.85, 3.0),
        "55 kW" => (55e3, 1482.0, 98.0, 0.86, 2.4),
        other => panic!("no motor {other}"),
    };
    let (current, lambda) = (Current::from_amperes(amps), Ratio::from_fraction(lambda));
    let magnetising = bracket(current, Ratio::from_fraction(cosine), lambda).expect("plausible");
    Motor::from_plate(Power::from_watts(watts), Speed::from_rpm(rpm), current, lambda, magnetising)
}

fn load(load: &Value) -> LoadTorque {
    let speed = || Speed::from_rpm(number(load, "rpm"));
    let torque = |name| Torque::from_newton_metres(number(load, name));
    match load["kind"].as_str().expect("a kind") {
        "constant" => LoadTorque::Constant(torque("torque")),
        "linear" => LoadTorque::Linear { torque: torque("torque"), speed: speed() },
        "quadratic" => LoadTorque::Quadratic { torque: torque("torque"), speed: speed() },
        "lifted" => {
            LoadTorque::Lifted { at_rest: torque("at_rest"), torque: torque("torque"), speed: speed(), square: true }
        }
        "constant-power" => {
            LoadTorque::ConstantPower { power: Power::from_watts(number(load, "power_w")), from: speed() }
        }
        other => panic!("no load {other}"),
    }
}

fn trace(case: &Value) -> Trace {
    let none = Inertia::from_kilogram_square_metres(0.0);
    let inertia = Inertia::from_kilogram_square_metres(number(case, "inertia"));
    let train = Train::new(inertia, none, load(&case["load"]), None, Gear::DIRECT);
    let motor = motor(case["motor"].as_str().expect("a motor"));
    let limit = Current::from_amperes(number(case, "limit_a"));
    let (from, to) = (Speed::from_rpm(number(case, "from_rpm")), Speed::from_rpm(number(case, "to_rpm")));
    let set = case["set_s"].as_f64().map(|seconds| SetRamp {
        time: Duration::from_seconds(seconds),
        s_curve: Ratio::from_fraction(number(case, "s_curve")),
    });
    if to > from {
        let run = RampUp { motor, train, limit, from, to };
        return set.map_or_else(|| run.fastest(), |set| run.on_ramp(set));
    }
    let bus = case["bus_v"].as_f64().map(|volts| Bus {
        voltage: Voltage::from_volts(volts),
        capacitance: Some(Capacitance::from_farads(number(case, "farads"))),
        trip: None,
        chopper: None,
        losses: Power::from_watts(number(case, "losses_w")),
    });
    let run = RampDown { motor, train, limit, bus, from, to };
    set.map_or_else(|| run.fastest(), |set| run.on_ramp(set))
}

#[test]
fn ramps_agree_with_the_differential_equations() {
    let mut wrong = Vec::new();
    for case in cases(include_str!("ramps.json"), 24) {
        let (id, expected, trace) = (case["id"].as_str().expect("an id"), &case["expected"], trace(&case));
        let rated = motor(case["motor"].as_str().expect("a motor")).rated_current;
        let seconds = trace.time().unwrap_or_else(|| panic!("{id} does not arrive: {:?}", trace.end)).seconds();
        let mut hold = |name: &str, found: f64, hair: f64| {
            near(&mut wrong, &format!("{id}, {name}"), found, number(expected, name), PART, hair);
        };
        hold("time_s", seconds, 0.0);
        hold("peak_torque", trace.peak_torque().newton_metres(), 0.0);
        hold("peak_current_a", trace.peak_current().amperes(), 0.0);
        hold("rms_current_a", trace.root_mean_square_current().expect("time").amperes(), 0.0);
        // A millisecond of rated heat is nothing; the sum begins where the current crosses rated.
        hold("excess_heat_s", trace.excess_heat(rated).seconds(), 1e-3);
        if case.get("bus_v").is_some() {
            hold("bus_peak_v", trace.peak_bus().expect("a bus").volts(), 0.0);
        }
    }
    assert!(wrong.is_empty(), "{} figures differ:\n{}", wrong.len(), wrong.join("\n"));
}

/// A comparison that could not fail would prove nothing: half a percent more inertia must be noticed.
#[test]
fn a_little_more_inertia_is_noticed() {
    let mut noticed = 0;
    for mut case in cases(include_str!("ramps.json"), 24).into_iter().filter(|case| case["set_s"].is_null()) {
        case["inertia"] = (number(&case, "inertia") * 1.005).into();
        let mut wrong = Vec::new();
        let seconds = trace(&case).time().expect("arrives").seconds();
        near(&mut wrong, "time", seconds, number(&case["expected"], "time_s"), PART, 0.0);
        assert_eq!(wrong.len(), 1, "{} went unnoticed", case["id"]);
        noticed += 1;
    }
    assert!(noticed >= 7, "only {noticed} looked at");
}
