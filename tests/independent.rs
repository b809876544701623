//! Figures of `tests/independent/*.json`, reckoned by other means, against the engineering crate.
#![expect(clippy::expect_used, clippy::panic, reason = "a test stops at what it cannot go on from")]

#[path = "independent/machines.rs"]
mod machines;
#[path = "independent/machines_page.rs"]
mod machines_page;
#[path = "independent/ramps.rs"]
mod ramps;
#[path = "independent/spreads.rs"]
mod spreads;
#[path = "independent/units.rs"]
mod units;

use serde_json::Value;

/// The cases of a file; each names its method and versions, and there are not fewer than were committed.
fn cases(text: &str, at_least: usize) -> Vec<Value> {
    let file: Value = serde_json::from_str(text).expect("the file is JSON");
    assert!(file["method"].is_string() && file["versions"]["python"].is_string(), "without its origin");
    let cases = file["cases"].as_array().expect("a list of cases").clone();
    assert!(cases.len() >= at_least, "cases have gone missing: {} left of {at_least}", cases.len());
    cases
}

fn number(value: &Value, name: &str) -> f64 {
    value[name].as_f64().unwrap_or_else(|| panic!("no number {name} in {value}"))
}

fn numbers(value: &Value, name: &str) -> Vec<f64> {
    let list = value[name].as_array().unwrap_or_else(|| panic!("no list {name} in {value}"));
    list.iter().map(|v| v.as_f64().expect("a number")).collect()
}

/// Complains unless found and published agree to this part of the published one, or to the absolute hair beside it.
fn near(wrong: &mut Vec<String>, what: &str, found: f64, published: f64, part: f64, hair: f64) {
    let allowed = (published.abs() * part).max(hair);
    // A number that is none is not near anything.
    let agrees = (found - published).abs() <= allowed;
    if !agrees {
        wrong.push(format!("{what}: {found}, independently {published} ± {allowed}"));
    }
}
