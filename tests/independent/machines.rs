//! The equivalent circuit against complex numbers and scipy's solvers, on textbook machines.

use crate::{cases, near, number};
use engineering::formulas::equivalent_circuit::{Circuit, Point};
use engineering::{Frequency, Power, Ratio, Resistance, Voltage};
use serde_json::Value;

pub fn machines() -> Vec<Value> {
    cases(include_str!("machines.json"), 3)
}

pub fn circuit(case: &Value) -> Circuit {
    let ohms = |name| Resistance::from_ohms(number(case, name));
    let pairs = case["pole_pairs"].as_u64().and_then(|p| u32::try_from(p).ok()).expect("pole pairs");
    Circuit {
        voltage: Voltage::from_volts(number(case, "volts")),
        frequency: Frequency::from_hertz(number(case, "hertz")),
        pole_pairs: pairs,
        stator: (ohms("r1"), ohms("x1")),
        rotor: (ohms("r2"), ohms("x2")),
        magnetising: ohms("xm"),
        iron: case["iron"].as_f64().map(Resistance::from_ohms),
        rotational: Power::from_watts(number(case, "rotational_w")),
    }
}

#[test]
fn circuits_agree_with_complex_numbers() {
    let mut wrong = Vec::new();
    for case in machines() {
        let (id, expected, circuit) = (case["id"].as_str().expect("an id"), &case["expected"], circuit(&case));
        let mut hold = |name: &str, found: f64, published: f64, part: f64| {
            near(&mut wrong, &format!("{id}, {name}"), found, published, part, 0.0);
        };
        let slip = circuit.slip_for(Power::from_watts(number(&case, "rated_w"))).expect("within its power");
        hold("rated slip", slip.fraction(), number(expected, "rated_slip"), 1e-9);
        for (name, slip) in [("rated", slip), ("start", Ratio::from_fraction(1.0))] {
            let (point, theirs): (Point, &Value) = (circuit.at(slip), &expected[name]);
            hold("current", point.current.amperes(), number(theirs, "current_a"), 1e-8);
            hold("power factor", point.power_factor.fraction(), number(theirs, "power_factor"), 1e-8);
            hold("air-gap power", point.air_gap.watts(), number(theirs, "air_gap_w"), 1e-8);
            hold("torque", circuit.torque(slip).newton_metres(), number(theirs, "torque"), 1e-8);
            hold("shaft power", point.shaft.watts(), number(theirs, "shaft_w"), 1e-8);
        }
        hold("idle current", circuit.ideal_no_load_current().amperes(), number(expected, "idle_a"), 1e-9);
        // The search for the highest torque finds its slip only to the root of its own tolerance.
        let (slip, torque) = circuit.breakdown();
        hold("breakdown slip", slip.fraction(), number(expected, "breakdown_slip"), 1e-5);
        hold("breakdown torque", torque.newton_metres(), number(expected, "breakdown_torque"), 1e-9);
    }
    assert!(wrong.is_empty(), "{} figures differ:\n{}", wrong.len(), wrong.join("\n"));
}
