//! Every published value of `reference/cases.json` against the engineering crate, each named with its source.
#![expect(clippy::expect_used, clippy::panic, reason = "a test stops at what it cannot go on from")]

#[path = "reference/case.rs"]
mod case;
#[path = "reference/circuit.rs"]
mod circuit;
#[path = "reference/insulation.rs"]
mod insulation;
#[path = "reference/motion.rs"]
mod motion;
#[path = "reference/plates.rs"]
mod plates;
#[path = "reference/protection.rs"]
mod protection;
#[path = "reference/readings.rs"]
mod readings;
#[path = "reference/supply.rs"]
mod supply;

use case::{Case, Results, compare};
use serde_json::{Value, json};
use std::collections::{BTreeMap, BTreeSet};

/// Topics that the engineering crate has no function for. A topic must be run or stand here, and never both.
const NOT_YET_COVERED: &[&str] = &[];

type Run = fn(&Case) -> Results;

fn runs() -> BTreeMap<&'static str, Run> {
    let areas: [&[(&str, Run)]; 7] =
        [insulation::RUNS, plates::RUNS, circuit::RUNS, supply::RUNS, motion::RUNS, protection::RUNS, readings::RUNS];
    let mut runs = BTreeMap::new();
    for (topic, run) in areas.into_iter().flatten() {
        assert!(runs.insert(*topic, *run).is_none(), "{topic} is run twice");
    }
    runs
}

fn cases() -> Vec<Case> {
    let text = include_str!("reference/cases.json");
    let cases: Vec<Value> = serde_json::from_str(text).expect("cases.json is a list of cases");
    assert!(cases.len() >= 187, "cases have gone missing: {} left of 187", cases.len());
    cases.into_iter().map(Case::new).collect()
}

#[test]
fn every_case_is_what_was_published() {
    let runs = runs();
    let mut wrong = Vec::new();
    for case in cases() {
        if let Some(run) = runs.get(case.topic()) {
            wrong.extend(compare(&case, &run(&case)));
        }
    }
    assert!(wrong.is_empty(), "{} values differ from what was published:\n{}", wrong.len(), wrong.join("\n"));
}

#[test]
fn every_topic_is_run_or_listed_and_none_is_both() {
    let runs: BTreeSet<&str> = runs().into_keys().collect();
    let listed: BTreeSet<&str> = NOT_YET_COVERED.iter().copied().collect();
    let cases = cases();
    let topics: BTreeSet<&str> = cases.iter().map(Case::topic).collect();
    let neither: Vec<_> = topics.iter().filter(|t| !runs.contains(**t) && !listed.contains(**t)).collect();
    let both: Vec<_> = runs.intersection(&listed).collect();
    let unknown: Vec<_> = runs.union(&listed).filter(|t| !topics.contains(**t)).collect();
    assert!(neither.is_empty(), "neither run nor listed as not yet covered: {neither:?}");
    assert!(both.is_empty(), "listed as not yet covered, but run: {both:?}");
    assert!(unknown.is_empty(), "no case has this topic: {unknown:?}");
}

/// A comparison that could not fail would prove nothing: every expected value, changed, must be noticed.
#[test]
fn every_changed_value_is_noticed() {
    let runs = runs();
    for case in cases() {
        let Some(run) = runs.get(case.topic()) else { continue };
        let results = run(&case);
        for name in case.expected_names() {
            let changed =
                case.with_expected(&name, changed(&case.expected(&name)["value"], &case.expected(&name)["tolerance"]));
            assert!(!compare(&changed, &results).is_empty(), "{}: a changed {name} went unnoticed", case.id());
        }
    }
}

fn changed(value: &Value, tolerance: &Value) -> Value {
    match value {
        Value::Number(n) => {
            let n = n.as_f64().expect("a number");
            json!(n + 3.0 * tolerance.as_f64().unwrap_or(0.0) + n.abs() * 1e-3 + 1e-3)
        }
        Value::String(s) => json!(format!("{s}, changed")),
        Value::Bool(b) => json!(!b),
        Value::Array(list) => json!(list.iter().map(|v| changed(v, tolerance)).collect::<Vec<_>>()),
        Value::Null => json!(1.0),
        Value::Object(_) => panic!("an expected value is no object"),
    }
}
