//! Ramps, braking and rotation: sheets, settings and what was seen in, verdict and limit out.

use super::case::{Case, Field, hold};
use crate::plant::Sheet::{Drive, DrivePlate, Load, Motor, Supply};
use crate::record::ParameterColumn::{AsLeft, Intended};
use engineering::Outcome;
use engineering::Verdict::{Figure, Marginal, NotAssessed, Outside, Within};

/// The 15 kW motor of C-MN-010 (97.44 N·m) with the braking example C-RM-008: 1.5 kg·m², 10 N·m.
const MACHINE: &[Field] = &[
    (Motor, "volts", "400"),
    (Motor, "amps", "28.5"),
    (Motor, "hertz", "50"),
    (Motor, "rpm", "1470"),
    (Motor, "power", "15"),
    (Motor, "power-factor", "0.85"),
    (Motor, "breakdown-torque", "3.0"),
    (Motor, "inertia", "0.1"),
    (Load, "profile", "constant"),
    (Load, "torque", "10"),
    (Load, "at-speed", "1470"),
    (Load, "breakaway", "100"),
    (Load, "inertia", "1.4"),
    (Supply, "volts", "400"),
    (DrivePlate, "bus-capacitance", "3300"),
    (DrivePlate, "trip-high", "800"),
];

fn case(set: &[Field], keyed: &[(&str, &str)]) -> Case {
    let mut case = Case::of(&[MACHINE, set].concat(), &[]);
    for (function, text) in keyed {
        case.keyed(function, Intended, text);
    }
    case
}

fn one(set: &[Field], keyed: &[(&str, &str)], check: &str) -> Outcome {
    case(set, keyed).once(check)
}

fn taken(outcome: &Outcome, what: &str) -> Option<String> {
    outcome.assumed.iter().find(|a| a.what == what).map(|a| a.taken.clone())
}

const RAMP_DOWN: &[(&str, &str)] = &[("current-limit", "40"), ("deceleration-time", "24")];
const RAMP_UP: &[(&str, &str)] = &[("current-limit", "40"), ("acceleration-time", "24")];

/// Row RM-05: the load alone stops it in J·ω/T_L = 23 s, so 24 s need no braking; pulling, the same load fills the bus.
#[test]
fn a_load_that_can_drive_the_motor_does_not_help_to_stop() {
    let plain = one(&[], RAMP_DOWN, "deceleration-time");
    assert_eq!(plain.verdict, Within, "{}", plain.summary);
    for hangs in [(Load, "overhauling", "yes"), (Load, "kind", "hoist"), (Drive, "hoisting", "yes")] {
        let silent = one(&[hangs], RAMP_DOWN, "deceleration-time");
        assert_eq!(silent.verdict, NotAssessed);
        assert_eq!(silent.missing[0].what, "torque of the load when it drives the motor");
        let pulls = one(&[hangs, (Load, "overhauling-torque", "10")], RAMP_DOWN, "deceleration-time");
        assert_eq!(pulls.verdict, Outside, "{}", pulls.summary);
    }
    assert_eq!(one(&[(Load, "kind", "hoist"), (Load, "overhauling", "no")], RAMP_DOWN, "deceleration-time"), plain);
}

/// Rows RM-05 and RM-06: pulled at 10 N·m for 20 s of every 60 s, 31 kJ besides the ramp's.
#[test]
fn the_brake_resistor_takes_what_a_pulling_load_gives() {
    let resistor: &[Field] = &[
        (Drive, "brake-chopper", "yes"),
        (DrivePlate, "chopper-volts", "780"),
        (DrivePlate, "resistor-minimum", "40"),
        (DrivePlate, "resistor", "60"),
        (DrivePlate, "resistor-power", "0.6"),
        (Load, "stops-per-hour", "60"),
        (Load, "overhauling", "yes"),
        (Load, "overhauling-torque", "10"),
    ];
    let keyed: &[(&str, &str)] = &[("deceleration-time", "5")];
    let open = one(resistor, keyed, "braking");
    assert_eq!(open.missing[0].what, "time that the pulling load is held in each cycle");
    let held = |seconds| one(&[resistor, &[(Load, "overhauling-time", seconds)]].concat(), keyed, "braking");
    assert_eq!(held("5").verdict, Within, "{}", held("5").summary);
    assert_eq!(held("20").verdict, Outside, "{}", held("20").summary);
    assert!(held("20").limit.starts_with("40.0 Ω"), "{}", held("20").limit);
}

/// m·(v/ω)² (row RM-02): 5000 kg at 2 m/s and 1470 rpm are 0.844 kg·m² more, so the start takes longer.
#[test]
fn a_mass_in_a_line_is_inertia() {
    let even = |outcome: &Outcome| -> f64 {
        outcome.figures.iter().find(|f| f.name == "shortest even ramp").unwrap().value.parse().unwrap()
    };
    let plain = one(&[], RAMP_UP, "acceleration-time");
    let belt: &[Field] = &[(Load, "linear-mass", "5000"), (Load, "linear-speed", "2"), (Load, "speed-high", "1470")];
    let moved = one(belt, RAMP_UP, "acceleration-time");
    assert!((even(&moved) / even(&plain) - (1.5 + 0.844) / 1.5).abs() < 0.01, "{moved:?}");
    let silent = one(&[(Load, "linear-mass", "5000")], RAMP_UP, "acceleration-time");
    assert_eq!(silent.missing[0].what, "speed of the mass moved in a line");
}

/// Common practice, no source: 85 % where nobody entered the gear's losses, and said; a ratio of 1 is a coupling.
#[test]
fn a_gear_efficiency_that_nobody_entered_is_said() {
    let ratio = |i| one(&[(Load, "gear-ratio", i)], RAMP_UP, "acceleration-time");
    assert!(taken(&ratio("10"), "gear efficiency").unwrap().starts_with("85 %"));
    assert_eq!(taken(&ratio("1"), "gear efficiency"), None);
    let stated: &[Field] = &[(Load, "gear-ratio", "10"), (Load, "gear-efficiency", "90")];
    assert_eq!(taken(&one(stated, RAMP_UP, "acceleration-time"), "gear efficiency"), None);
    let limit = one(&[(Load, "gear-ratio", "10")], RAMP_UP, "current-limit");
    assert!(taken(&limit, "gear efficiency").is_some());
}

/// The hint of the field: left empty, the highest working speed is taken.
#[test]
fn the_duty_point_left_empty_is_the_highest_working_speed() {
    let mut case = Case::of(&MACHINE.iter().filter(|f| f.1 != "at-speed").copied().collect::<Vec<_>>(), &[]);
    for (function, text) in RAMP_UP {
        case.keyed(function, Intended, text);
    }
    case.set(Load, 0, "profile", "quadratic");
    assert_eq!(case.once("acceleration-time").missing[0].what, "load torque");
    case.set(Load, 0, "speed-high", "1450");
    let outcome = case.once("acceleration-time");
    assert_eq!(outcome.verdict, Within, "{}", outcome.summary);
    let what = "speed at which the load's torque holds";
    assert_eq!(taken(&outcome, what).as_deref(), Some("1450 rpm, the highest working speed"));
    case.set(Load, 0, "at-speed", "1450");
    assert_eq!(taken(&case.once("acceleration-time"), what), None);
}

/// The load's hint: a share of the torque stays at very low speed, on top of which the rest rises.
#[test]
fn what_stays_at_standstill_counts() {
    let pump: &[Field] = &[(Load, "profile", "quadratic"), (Load, "torque", "90")];
    let spare = |set: &[Field]| -> f64 {
        let outcome = one(&[pump, set].concat(), RAMP_UP, "acceleration-time");
        outcome.figures.iter().find(|f| f.name == "shortest even ramp").unwrap().value.parse().unwrap()
    };
    // Tightest at full speed either way; torque asked at half speed differs, and with it the least time.
    assert!((spare(&[]) - spare(&[(Load, "static-torque", "50")])).abs() < 1e-9);
    let words = |set: &[Field]| format!("{:?}", one(&[pump, set].concat(), RAMP_UP, "acceleration-time").working);
    assert!(words(&[(Load, "static-torque", "50")]).contains("torque at standstill"));
    assert!(!words(&[]).contains("torque at standstill"));
}

/// What is in force is decided function by function: a ramp left as it is counts, though no current limit was left yet.
#[test]
fn every_function_is_in_force_by_itself() {
    let mut case = case(&[], RAMP_UP);
    let limit = |case: &Case| case.once("measured-acceleration").limit;
    assert!(limit(&case).contains("26.4 s"), "{}", limit(&case));
    case.keyed("acceleration-time", AsLeft, "30");
    assert!(limit(&case).contains("33.0 s"), "the ramp as left is in force: {}", limit(&case));
}

/// Arithmetic (row RM-14): a share of 50 % makes the steepest part 1/(1 − 0.25) = 1.333 of the mean, so a constant load
/// needs a third more time within the same limit, and 4/3 of J·ω/t to slow down; each column tells of its own share.
#[test]
fn the_s_curve_share_of_the_record_counts_for_every_ramp() {
    let figure = |outcome: &Outcome, name: &str| -> f64 {
        outcome.figures.iter().find(|f| f.name == name).unwrap().value.parse().unwrap()
    };
    let eased: &[(&str, &str)] = &[("s-curve-share", "50")];
    for (ramp, check, name) in [
        (RAMP_UP, "acceleration-time", "shortest even ramp"),
        (RAMP_DOWN, "deceleration-time", "shortest even ramp within the current limit"),
    ] {
        let (straight, round) = (one(&[], ramp, check), one(&[], &[ramp, eased].concat(), check));
        let ratio = figure(&round, name) / figure(&straight, name);
        assert!((ratio - 4.0 / 3.0).abs() < 0.01, "{check}: {ratio}");
        assert_eq!(taken(&straight, "S-curve share of the ramp").as_deref(), Some("none, a straight ramp"));
        assert_eq!(taken(&round, "S-curve share of the ramp"), None);
    }
    let chopper: &[Field] = &[(Drive, "brake-chopper", "yes"), (DrivePlate, "chopper-volts", "780")];
    let torque = |keyed: &[(&str, &str)]| figure(&one(chopper, keyed, "braking"), "braking torque");
    let short: &[(&str, &str)] = &[("deceleration-time", "5")];
    let (straight, round) = (torque(short), torque(&[short, eased].concat()));
    assert!(((round + 10.0) / (straight + 10.0) - 4.0 / 3.0).abs() < 0.01, "{straight} {round}");
}

/// Rows UB-06 and UB-07: what is seen counts, with leads and settings as they are.
#[test]
fn rotation_by_what_was_seen_and_how_it_came_about() {
    let limit = "clockwise on every feed, seen from the drive end";
    let base: &[Field] = &[(Load, "direction", "clockwise")];
    let bypass: Field = (Drive, "bypass", "yes");
    let encoder: Field = (Drive, "encoder", "yes");
    let right = ("direction-drive", "clockwise");
    let wrong = ("direction-drive", "counter-clockwise");
    let said = |seen: (&'static str, &'static str), order: &str| {
        let mut case = Case::of(base, &[seen]);
        case.keyed("output-phase-order", Intended, order);
        case.once("rotation")
    };
    for (seen, order, verdict) in
        [(right, "u-v-w", Within), (wrong, "u-v-w", Outside), (right, "u-w-v", Marginal), (wrong, "u-w-v", Outside)]
    {
        let outcome = said(seen, order);
        assert_eq!(
            (outcome.verdict, outcome.limit.as_str()),
            (verdict, limit),
            "{seen:?} {order}: {}",
            outcome.summary
        );
    }
    assert!(said(wrong, "u-w-v").summary.contains("Take the parameter back"));
    hold("rotation", base, &[(&[], &[right], NotAssessed, limit), (&[], &[], NotAssessed, limit)]);
    let mut both = Case::of(&[base, &[bypass, encoder]].concat(), &[right, ("direction-bypass", "clockwise")]);
    both.keyed("output-phase-order", Intended, "u-v-w");
    assert_eq!(both.once("rotation").missing[0].what, "whether the encoder's sign agrees with the shaft");
}

/// The emergency stop's own time goes before the load's; ST-01: the time comes from the risk assessment.
#[test]
fn stop_time_and_bus_peak() {
    use crate::plant::Sheet::Further;
    let seen: &[(&str, &str)] = &[("stop-seconds", "5"), ("stop-from-hertz", "50")];
    let low: &[(&str, &str)] = &[("stop-seconds", "5"), ("stop-from-hertz", "12.5")];
    hold(
        "stop-time",
        &[(Motor, "hertz", "50")],
        &[
            (&[(Load, "stop-time", "6")], seen, Within, "at most 6.00 s, as specified"),
            (&[(Load, "stop-time", "6")], low, Figure, "at most 6.00 s, as specified"),
            (
                &[(Load, "stop-time", "6"), (Further, "emergency-stop-time", "4")],
                seen,
                Outside,
                "at most 4.00 s, as specified",
            ),
        ],
    );
    // Common practice (row RM-11): 95 % of the trip.
    for (volts, verdict) in [("700", Within), ("790", Marginal), ("801", Outside)] {
        let outcome = Case::of(&[(DrivePlate, "trip-high", "800")], &[("bus-peak", volts)]).once("bus-peak");
        assert_eq!(outcome.verdict, verdict, "{volts} V: {}", outcome.summary);
        assert!(outcome.limit.contains("760"), "{}", outcome.limit);
    }
}
