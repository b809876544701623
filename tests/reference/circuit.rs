//! Published values on the equivalent circuit, no-load current and breakdown torque.

use crate::Run;
use crate::case::{Case, Results};
use engineering::formulas::breakdown_torque::Leakage;
use engineering::formulas::circuit_from_tests::{Tests, circuit};
use engineering::formulas::equivalent_circuit::Circuit;
use engineering::formulas::load_current::current_for;
use engineering::formulas::magnetising::bracket;
use engineering::formulas::power_flow::efficiency;
use engineering::formulas::torque::torque;
use engineering::formulas::variable_frequency::breakdown_share;
use engineering::{Current, Frequency, Power, Ratio, Resistance, Voltage};

pub const RUNS: &[(&str, Run)] = &[
    ("equivalent-circuit", equivalent_circuit),
    ("breakdown-torque", breakdown_torque),
    ("no-load-and-locked-rotor-test", from_tests),
    ("no-load-current-estimate", no_load_estimate),
    ("no-load-current-exact", no_load_exact),
    ("no-load-estimate-vs-exact", estimate_against_exact),
    ("partial-load-current", partial_load),
    ("breakdown-torque-field-weakening", breakdown_weakened),
    ("breakdown-torque-constant-v-per-hz", breakdown_by_frequency),
];

const RATED_FLUX: Ratio = Ratio::from_fraction(1.0);

fn ohms(case: &Case, name: &str) -> Resistance {
    Resistance::from_ohms(case.number(name, "Ohm"))
}

fn pole_pairs(case: &Case) -> u32 {
    let poles = case.number("poles", "1");
    (1..=20).find(|pairs| f64::from(2 * pairs) == poles).expect("an even number of poles")
}

fn machine(case: &Case) -> Circuit {
    Circuit {
        voltage: Voltage::from_volts(case.number("voltage_ll", "V")),
        frequency: Frequency::from_hertz(case.number("frequency", "Hz")),
        pole_pairs: pole_pairs(case),
        stator: (ohms(case, "r1"), ohms(case, "x1")),
        rotor: (ohms(case, "r2"), ohms(case, "x2")),
        magnetising: ohms(case, "xm"),
        iron: case.maybe("r_fe", "Ohm").map(Resistance::from_ohms),
        rotational: Power::from_watts(case.maybe("rotational_losses", "W").unwrap_or(0.0)),
    }
}

fn equivalent_circuit(case: &Case) -> Results {
    let point = machine(case).at(Ratio::from_fraction(case.number("slip", "1")));
    Results::new()
        .number("speed", point.speed.rpm(), "rpm")
        .number("stator_current", point.current.amperes(), "A")
        .number("stator_current_angle", -point.power_factor.fraction().acos().to_degrees(), "deg")
        .number("power_factor", point.power_factor.fraction(), "1")
        .number("input_power", point.input.watts(), "W")
        .number("air_gap_power", point.air_gap.watts(), "W")
        .number("shaft_power", point.shaft.watts(), "W")
        .number("shaft_torque", torque(point.shaft, point.speed).newton_metres(), "N.m")
        .number("efficiency", efficiency(point.shaft, point.input).fraction(), "1")
}

fn breakdown_torque(case: &Case) -> Results {
    let machine = machine(case);
    let (slip, highest) = machine.breakdown();
    Results::new()
        .number("slip_at_max_torque", slip.fraction(), "1")
        .number("max_torque", highest.newton_metres(), "N.m")
        .number("starting_torque", machine.torque(Ratio::from_fraction(1.0)).newton_metres(), "N.m")
}

fn from_tests(case: &Case) -> Results {
    let volts = |name| Voltage::from_volts(case.number(name, "V"));
    let amperes = |name| Current::from_amperes(case.number(name, "A"));
    let watts = |name| Power::from_watts(case.number(name, "W"));
    let hertz = |name| Frequency::from_hertz(case.number(name, "Hz"));
    let no_load = amperes("no_load_current");
    let found = circuit(&Tests {
        direct: (volts("dc_voltage_two_terminals"), amperes("dc_current")),
        locked: (
            volts("locked_rotor_voltage_ll"),
            amperes("locked_rotor_current"),
            watts("locked_rotor_power"),
            hertz("locked_rotor_frequency"),
        ),
        no_load: (volts("no_load_voltage_ll"), no_load, watts("no_load_power"), hertz("rated_frequency")),
        stator_share: Ratio::from_fraction(case.number("x1_fraction", "1")),
    });
    Results::new()
        .number("r1", found.stator.0.ohms(), "Ohm")
        .number("x1", found.stator.1.ohms(), "Ohm")
        .number("r2", found.rotor.0.ohms(), "Ohm")
        .number("x2", found.rotor.1.ohms(), "Ohm")
        .number("xm", found.magnetising.ohms(), "Ohm")
        .number("no_load_current_percent", no_load.amperes() / case.number("rated_current", "A") * 100.0, "%")
}

fn no_load_estimate(case: &Case) -> Results {
    let current = Current::from_amperes(case.number("rated_current", "A"));
    let ratio = |name| Ratio::from_fraction(case.number(name, "1"));
    let found = bracket(current, ratio("power_factor"), ratio("breakdown_torque_ratio")).expect("a plausible plate");
    Results::new().number("i0_upper_bound_sine", found.high.amperes(), "A").number(
        "i0_circle_estimate",
        found.low.amperes(),
        "A",
    )
}

/// The rotor plays no part at synchronous speed; the case names no other figures of the C-EC-002 machine.
fn no_load_exact(case: &Case) -> Results {
    assert!(case.number("slip", "1") == 0.0, "{}: at synchronous speed", case.id());
    let machine = Circuit {
        voltage: Voltage::from_volts(case.number("voltage_ll", "V")),
        frequency: Frequency::from_hertz(60.0),
        pole_pairs: 2,
        stator: (ohms(case, "r1"), ohms(case, "x1")),
        rotor: (Resistance::from_ohms(0.332), Resistance::from_ohms(0.464)),
        magnetising: ohms(case, "xm"),
        iron: None,
        rotational: Power::from_watts(1100.0),
    };
    let ideal = machine.ideal_no_load_current().amperes();
    let running = machine.at(Ratio::from_fraction(0.022)).current.amperes();
    Results::new().number("no_load_current_ideal", ideal, "A").number(
        "no_load_percent_of_2_2_percent_slip_current",
        ideal / running * 100.0,
        "%",
    )
}

fn estimate_against_exact(case: &Case) -> Results {
    let machine = machine(case);
    let shaft = Power::from_watts(case.number("rated_shaft_power", "W"));
    let slip = machine.slip_for(shaft).expect("a power the machine gives");
    let rated = machine.at(slip);
    let breakdown = Ratio::from_fraction(machine.breakdown().1.newton_metres() / machine.torque(slip).newton_metres());
    let found = bracket(rated.current, rated.power_factor, breakdown).expect("a plausible plate");
    let idle = machine.ideal_no_load_current();
    let half = machine.slip_for(Power::from_watts(shaft.watts() / 2.0)).expect("half of it");
    let by_formula = current_for(rated.current, idle, Ratio::from_fraction(0.5), RATED_FLUX).expect("below rated");
    Results::new()
        .number("rated_slip", slip.fraction(), "1")
        .number("rated_current", rated.current.amperes(), "A")
        .number("rated_power_factor", rated.power_factor.fraction(), "1")
        .number("breakdown_ratio", breakdown.fraction(), "1")
        .number("i0_exact", idle.amperes(), "A")
        .number("i0_circle_estimate", found.low.amperes(), "A")
        .number("i0_upper_bound_sine", found.high.amperes(), "A")
        .number("current_half_load_exact", machine.at(half).current.amperes(), "A")
        .number("current_half_load_quadrature", by_formula.amperes(), "A")
}

fn partial_load(case: &Case) -> Results {
    let amperes = |name| Current::from_amperes(case.number(name, "A"));
    let load = Ratio::from_fraction(case.number("load_fraction", "1"));
    let found =
        current_for(amperes("rated_current"), amperes("no_load_current"), load, RATED_FLUX).expect("below rated");
    Results::new().number("current_estimate", found.amperes(), "A")
}

fn leakage(case: &Case) -> (Leakage, Voltage, Frequency) {
    let base = Frequency::from_hertz(case.number("base_frequency", "Hz"));
    let leakage =
        Leakage { stator: ohms(case, "r1"), reactance: ohms(case, "x1_plus_x2"), base, pole_pairs: pole_pairs(case) };
    (leakage, Voltage::from_volts(case.number("voltage_ll", "V")), base)
}

fn breakdown_weakened(case: &Case) -> Results {
    let (leakage, line, base) = leakage(case);
    let frequency = Frequency::from_hertz(case.number("frequency", "Hz"));
    let ratio = leakage.breakdown(line, frequency).newton_metres() / leakage.breakdown(line, base).newton_metres();
    Results::new().number("breakdown_ratio", ratio, "1").number(
        "ideal_ratio",
        breakdown_share(base, frequency).fraction(),
        "1",
    )
}

fn breakdown_by_frequency(case: &Case) -> Results {
    let (leakage, line, base) = leakage(case);
    let at = |hertz: f64| {
        let frequency = Frequency::from_hertz(hertz);
        leakage
            .breakdown(engineering::formulas::variable_frequency::voltage(line, base, frequency), frequency)
            .newton_metres()
    };
    Results::new().number("tmax_at_50Hz", at(50.0), "N.m").number("tmax_at_25Hz", at(25.0), "N.m").number(
        "tmax_at_10Hz",
        at(10.0),
        "N.m",
    )
}
