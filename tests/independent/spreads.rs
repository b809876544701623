//! Sisters' scores and exponents of power laws against numpy and scipy.

use crate::{cases, near, number, numbers};
use engineering::formulas::{power_law, robust_spread};
use engineering::{Speed, Torque};

/// The table of Student's t in the program has four digits, and steps beyond ten degrees of freedom.
const TABLE: f64 = 5e-4;

#[test]
fn spreads_and_exponents_agree_with_the_libraries() {
    let mut wrong = Vec::new();
    for case in cases(include_str!("spreads.json"), 10) {
        let (id, expected) = (case["id"].as_str().expect("an id"), &case["expected"]);
        let mut hold = |name: &str, found: f64, published: f64, part: f64| {
            near(&mut wrong, &format!("{id}, {name}"), found, published, part, 1e-9);
        };
        match case["kind"].as_str() {
            Some("spread") => {
                let values: Vec<Torque> =
                    numbers(&case, "values").into_iter().map(Torque::from_newton_metres).collect();
                let found = robust_spread::spread(&values).expect("enough sisters");
                hold("median", found.median, number(expected, "median"), 1e-9);
                hold("mad", found.mad, number(expected, "mad"), 1e-9);
                let scores = numbers(expected, "scores");
                assert_eq!(scores.len(), found.scores.len(), "{id}");
                for (mine, theirs) in found.scores.iter().zip(scores) {
                    hold("score", *mine, theirs, 1e-9);
                }
            }
            Some("power-law") => {
                let (x, y) = (numbers(&case, "x"), numbers(&case, "y"));
                let points: Vec<(Speed, Torque)> =
                    x.into_iter().zip(y).map(|(x, y)| (Speed::from_rpm(x), Torque::from_newton_metres(y))).collect();
                let found = power_law::fit(&points).expect("fits");
                hold("exponent", found.exponent.fraction(), number(expected, "exponent"), 1e-9);
                hold("intercept", found.intercept, number(expected, "intercept"), 1e-9);
                let half = found.half_interval.expect("three or more").fraction();
                hold("half interval", half, number(expected, "half_interval"), TABLE);
            }
            other => panic!("{id}: {other:?}"),
        }
    }
    assert!(wrong.is_empty(), "{} figures differ:\n{}", wrong.len(), wrong.join("\n"));
}
