//! Published values on ramps, inertia, braking, load curves and the direction of rotation.

use crate::Run;
use crate::case::{Case, Results};
use engineering::checks::rotation::{Direction, Exchange, Feed};
use engineering::formulas::thermal_load::{root_mean_square, short_time_rating};
use engineering::formulas::{affinity, stop_category::StopCategory};
use engineering::motion::braking::even_ramp;
use engineering::motion::bus::voltage_after;
use engineering::motion::closed_form::{constant_torque_time, quadratic_load_time, wk2_time};
use engineering::motion::gear::{hoisting_torque, mass_as_inertia};
use engineering::motion::resistor::{duty, largest, mean_power, shaft_power};
use engineering::motion::time_to_speed::time_to_speed;
use engineering::motion::{Flow, Gear, LoadTorque, Train};
use engineering::{
    Capacitance, Duration, Energy, Inertia, Kind, LinearSpeed, Mass, Power, Ratio, Speed, Torque, Voltage,
};

pub const RUNS: &[(&str, Run)] = &[
    ("reflected-inertia", reflected_inertia),
    ("acceleration-constant-torque", constant_torque),
    ("acceleration-wk2-us-units", wk2),
    ("acceleration-quadratic-load", quadratic),
    ("speed-reversal-integral", reversal),
    ("braking", braking),
    ("brake-duty", brake_duty),
    ("dc-bus-pump-up", pump_up),
    ("affinity-laws", affinity_laws),
    ("rms-torque", rms_torque),
    ("short-time-rating", short_time),
    ("stop-category", stop),
    ("rotation", rotation),
];

fn inertia(case: &Case, name: &str) -> Inertia {
    Inertia::from_kilogram_square_metres(case.number(name, "kg.m2"))
}

fn torque(case: &Case, name: &str) -> Torque {
    Torque::from_newton_metres(case.number(name, "N.m"))
}

fn speed(case: &Case, name: &str) -> Speed {
    Speed::from_rpm(case.number(name, "rpm"))
}

fn seconds(case: &Case, name: &str) -> Duration {
    Duration::from_seconds(case.number(name, "s"))
}

fn reflected_inertia(case: &Case) -> Results {
    let gear = Gear {
        ratio: Ratio::from_fraction(1.0 / case.number("gear_ratio_load_over_motor_speed", "1")),
        efficiency: Some(Ratio::from_fraction(case.number("gear_efficiency", "1"))),
    };
    let load = LoadTorque::Constant(torque(case, "load_torque"));
    let train = Train::new(inertia(case, "motor_inertia"), inertia(case, "load_inertia"), load, None, gear);
    let motor = speed(case, "motor_speed");
    let (mut total, mut asked) = (train.inertia.kilogram_square_metres(), train.opposing(motor).newton_metres());
    if let Some(mass) = case.maybe("mass", "kg").map(Mass::from_kilograms) {
        let lift = LinearSpeed::from_metres_per_second(case.number("lift_speed", "m/s"));
        let efficiency = Ratio::from_fraction(case.number("lift_efficiency", "1"));
        total += mass_as_inertia(mass, lift, motor).kilogram_square_metres();
        asked += hoisting_torque(mass, lift, motor, efficiency, Flow::Motoring).newton_metres();
    }
    let results = Results::new().number("total_inertia", total, "kg.m2").number("total_load_torque", asked, "N.m");
    if case.expects("power") {
        results.number("power", shaft_power(Torque::from_newton_metres(asked), motor).watts(), "W")
    } else {
        results
    }
}

fn constant_torque(case: &Case) -> Results {
    let (motor, load) = (torque(case, "motor_torque"), torque(case, "load_torque"));
    let time = constant_torque_time(inertia(case, "total_inertia"), motor, load, speed(case, "speed_change"));
    Results::new().number("time", time.expect("spare torque").seconds(), "s")
}

fn wk2(case: &Case) -> Results {
    let coherent = |kind: Kind, symbol: &str, number: f64| kind.unit(symbol).expect("a known unit").to_coherent(number);
    let wk2 = Inertia::from_kilogram_square_metres(coherent(Kind::Inertia, "lb·ft²", case.number("wk2", "lb.ft2")));
    let spare =
        Torque::from_newton_metres(coherent(Kind::Torque, "lbf·ft", case.number("accelerating_torque", "lbf.ft")));
    let change = speed(case, "speed_change");
    let exact = constant_torque_time(wk2, spare, Torque::from_newton_metres(0.0), change).expect("spare torque");
    let trade = wk2_time(wk2, change, spare).expect("spare torque");
    Results::new().number("time_308", trade.seconds(), "s").number("time_exact", exact.seconds(), "s")
}

/// The closed form is compared with the published value, and the integration with the same value.
fn quadratic(case: &Case) -> Results {
    let (motor, load) = (torque(case, "motor_torque"), torque(case, "load_torque_at_rated_speed"));
    let (total, rated) = (inertia(case, "total_inertia"), speed(case, "rated_speed"));
    let to = Speed::from_rpm(rated.rpm() * case.number("final_speed_fraction", "1"));
    let closed = quadratic_load_time(total, motor, load, rated, to).expect("spare torque").seconds();
    let curve = LoadTorque::Quadratic { torque: load, speed: rated };
    let net = |n| Torque::from_newton_metres(motor.newton_metres() - curve.at(n).newton_metres());
    let integrated = time_to_speed(total, Speed::from_rpm(0.0), to, net).expect("spare torque").seconds();
    assert!((integrated / closed - 1.0).abs() < 1e-3, "{}: {integrated} s integrated, {closed} s closed", case.id());
    Results::new().number("time", closed, "s")
}

/// Reads "100 - 0.1 N": torque at standstill, and what each rpm takes off.
fn line(text: &str) -> (f64, f64) {
    let (start, slope) = text.trim_end_matches(" N").rsplit_once(" - ").expect("a falling straight line");
    (start.parse().expect("a torque"), slope.parse().expect("a slope"))
}

fn reversal(case: &Case) -> Results {
    let load = case.number("load_torque_slope", "N.m/rpm");
    let ((forward, falling), (reverse, rising)) =
        (line(case.text("motor_torque_forward")), line(case.text("motor_torque_reverse")));
    let start = Speed::from_rpm(forward / (falling + load));
    let end = Speed::from_rpm(reverse / (rising + load) * case.number("final_speed_fraction", "1"));
    let net = |n: Speed| Torque::from_newton_metres(reverse - (rising + load) * n.rpm());
    let time = time_to_speed(inertia(case, "total_inertia"), start, end, net).expect("torque all the way");
    Results::new().number("initial_speed", start.rpm(), "rpm").number("time", time.seconds(), "s")
}

fn braking(case: &Case) -> Results {
    let load = LoadTorque::Constant(torque(case, "constant_load_torque"));
    let none = Inertia::from_kilogram_square_metres(0.0);
    let train = Train::new(inertia(case, "total_inertia"), none, load, None, Gear::DIRECT);
    let back = even_ramp(&train, speed(case, "speed"), Speed::from_rpm(0.0), seconds(case, "decel_time"));
    let volts = |name| Voltage::from_volts(case.number(name, "V"));
    let capacitance = Capacitance::from_farads(case.number("bus_capacitance", "uF") * 1e-6);
    Results::new()
        .number("motor_braking_torque", back.torque.newton_metres(), "N.m")
        .number("peak_braking_power", back.peak.watts(), "W")
        .number("braking_energy", back.energy.joules(), "J")
        .number("max_resistor", largest(volts("chopper_voltage"), back.peak).expect("power").ohms(), "Ohm")
        .number(
            "bus_voltage_without_chopper",
            voltage_after(volts("bus_voltage"), back.energy, capacitance).volts(),
            "V",
        )
}

fn brake_duty(case: &Case) -> Results {
    let energy = Energy::from_joules(case.number("braking_energy", "J"));
    let (braking, cycle) = (seconds(case, "decel_time"), seconds(case, "cycle_time"));
    Results::new()
        .number("mean_power_during_braking", mean_power(energy, braking).watts(), "W")
        .number("mean_power_over_cycle", mean_power(energy, cycle).watts(), "W")
        .number("duty", duty(braking, cycle).fraction(), "1")
}

fn pump_up(case: &Case) -> Results {
    let before = Voltage::from_volts(case.number("initial_voltage", "V"));
    let energy = Energy::from_joules(case.number("returned_energy", "J"));
    let capacitance = Capacitance::from_farads(case.number("capacitance", "uF") * 1e-6);
    Results::new().number("final_voltage", voltage_after(before, energy, capacitance).volts(), "V")
}

fn affinity_laws(case: &Case) -> Results {
    let ratio = Ratio::from_fraction(case.number("speed_ratio", "1"));
    Results::new()
        .number("flow_new", case.number("flow", "m3/h") * affinity::flow(ratio).fraction(), "m3/h")
        .number("head_new", case.number("head", "m") * affinity::head(ratio).fraction(), "m")
        .number("power_new", case.number("power", "kW") * affinity::power(ratio).fraction(), "kW")
}

fn rms_torque(case: &Case) -> Results {
    assert_eq!(case.text("reversal_from_to"), "+200 to -200 rpm in 5 s, twice");
    let (top, reversing) = (Speed::from_rpm(200.0), Duration::from_seconds(5.0));
    // The torque whose constant-torque time over 400 rpm is 5 s: the time is inversely proportional to torque.
    let newton_metre = Torque::from_newton_metres(1.0);
    let change = Speed::from_rpm(2.0 * top.rpm());
    let at_one =
        constant_torque_time(inertia(case, "reversal_inertia"), newton_metre, Torque::from_newton_metres(0.0), change);
    let reversal = Torque::from_newton_metres(at_one.expect("torque").seconds() / reversing.seconds());
    let rms = root_mean_square(&[
        (torque(case, "torque_1"), seconds(case, "time_1")),
        (reversal, reversing),
        (torque(case, "torque_2"), seconds(case, "time_2")),
        (reversal, reversing),
        (Torque::from_newton_metres(0.0), seconds(case, "idle_total")),
    ]);
    Results::new()
        .number("reversal_torque", reversal.newton_metres(), "N.m")
        .number("rms_torque", rms.newton_metres(), "N.m")
        .number("rating", shaft_power(rms, top).watts() / 1e3, "kW")
}

fn short_time(case: &Case) -> Results {
    let minutes = |name| Duration::from_seconds(case.number(name, "min") * 60.0);
    let continuous = Power::from_watts(case.number("continuous_rating", "kW") * 1e3);
    let rating = short_time_rating(continuous, minutes("heating_time_constant"), minutes("run_time"));
    Results::new().number("short_time_rating", rating.watts() / 1e3, "kW")
}

fn stop(case: &Case) -> Results {
    let category = match case.text("stop_category") {
        "0" => StopCategory::Zero,
        "1" => StopCategory::One,
        other => panic!("{}: stop category {other}", case.id()),
    };
    Results::new()
        .text("corresponding_drive_function", category.drive_function())
        .flag("allowed_for_emergency_stop", category.serves_emergency_stop())
}

fn rotation(case: &Case) -> Results {
    let after = |exchange: Exchange| match exchange.turns(Direction::Clockwise, Feed::Drive) {
        Direction::Clockwise => "unchanged",
        Direction::CounterClockwise => "reversed",
    };
    match case.text("change") {
        "swap any two motor leads" => Results::new().text("direction", after(Exchange::AtMotor)),
        "swap two supply leads ahead of the drive" => {
            Results::new().text("motor_direction", after(Exchange::AheadOfBoth))
        }
        other => panic!("{}: change {other}", case.id()),
    }
}
