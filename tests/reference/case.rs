//! One published case: its inputs by name and unit, what was computed for it, and how the two are compared.

use engineering::quantity::Quantity;
use engineering::reading::{Accuracy, Reading};
use serde_json::Value;

/// A case as it stands in the file.
pub struct Case {
    body: Value,
}

/// What the engineering crate found, by the names of the expected values.
#[derive(Default)]
pub struct Results(Vec<(&'static str, Found)>);

enum Found {
    Number(f64, &'static str),
    Numbers(Vec<f64>, &'static str),
    Text(String),
    Flag(bool),
    NotJudged,
}

impl Case {
    pub fn new(body: Value) -> Self {
        Self { body }
    }

    pub fn id(&self) -> &str {
        self.body["id"].as_str().expect("every case has an id")
    }

    pub fn topic(&self) -> &str {
        self.body["topic"].as_str().expect("every case has a topic")
    }

    pub fn expected(&self, name: &str) -> Value {
        self.body["expected"][name].clone()
    }

    pub fn expected_names(&self) -> Vec<String> {
        self.body["expected"].as_object().expect("expected values by name").keys().cloned().collect()
    }

    pub fn expects(&self, name: &str) -> bool {
        self.body["expected"].get(name).is_some()
    }

    pub fn with_expected(&self, name: &str, value: Value) -> Self {
        let mut body = self.body.clone();
        body["expected"][name]["value"] = value;
        Self { body }
    }

    /// An input in the unit it has to have; nothing when it is absent or null.
    pub fn maybe(&self, name: &str, unit: &str) -> Option<f64> {
        let input = self.body["inputs"].get(name)?;
        assert_eq!(input["unit"].as_str(), Some(unit), "{}: unit of {name}", self.id());
        input["value"].as_f64()
    }

    pub fn number(&self, name: &str, unit: &str) -> f64 {
        self.maybe(name, unit).unwrap_or_else(|| panic!("{}: no number {name}", self.id()))
    }

    pub fn numbers(&self, name: &str, unit: &str) -> Vec<f64> {
        let input = &self.body["inputs"][name];
        assert_eq!(input["unit"].as_str(), Some(unit), "{}: unit of {name}", self.id());
        input["value"].as_array().expect("a list").iter().map(|v| v.as_f64().expect("a number")).collect()
    }

    pub fn text(&self, name: &str) -> &str {
        self.body["inputs"][name]["value"].as_str().unwrap_or_else(|| panic!("{}: no text {name}", self.id()))
    }

    pub fn has(&self, name: &str) -> bool {
        self.body["inputs"].get(name).is_some()
    }

    pub fn unit(&self, name: &str) -> &str {
        self.body["inputs"][name]["unit"].as_str().expect("a unit")
    }

    pub fn flag(&self, name: &str) -> bool {
        self.body["inputs"][name]["value"].as_bool().unwrap_or_else(|| panic!("{}: no yes or no {name}", self.id()))
    }

    fn origin(&self) -> String {
        let of = |key: &str| self.body[key].as_str().unwrap_or_default().to_owned();
        format!("[{}; {}]", of("source"), of("confirmation"))
    }
}

impl Results {
    pub fn new() -> Self {
        Self::default()
    }

    pub fn number(self, name: &'static str, value: f64, unit: &'static str) -> Self {
        self.with(name, Found::Number(value, unit))
    }

    pub fn numbers(self, name: &'static str, values: Vec<f64>, unit: &'static str) -> Self {
        self.with(name, Found::Numbers(values, unit))
    }

    pub fn text(self, name: &'static str, text: impl Into<String>) -> Self {
        self.with(name, Found::Text(text.into()))
    }

    pub fn flag(self, name: &'static str, value: bool) -> Self {
        self.with(name, Found::Flag(value))
    }

    /// A verdict, or that the check does not judge.
    pub fn judged(self, name: &'static str, value: Option<bool>) -> Self {
        self.with(name, value.map_or(Found::NotJudged, Found::Flag))
    }

    fn with(mut self, name: &'static str, found: Found) -> Self {
        self.0.push((name, found));
        self
    }
}

/// A reading with an instrument that is never wrong, so that only the formula decides.
pub fn exact<Q: Quantity>(value: Q) -> Reading<Q> {
    let none =
        Accuracy { percent_of_reading: 0.0, digits: 0.0, resolution: 0.0, percent_of_full_scale: 0.0, full_scale: 0.0 };
    Reading::with(value, none)
}

/// One sentence for each expected value that was not found, differs, or was not asked for.
pub fn compare(case: &Case, results: &Results) -> Vec<String> {
    let mut wrong = Vec::new();
    let mut complain = |what: String| wrong.push(format!("{} {}: {what} {}", case.id(), case.topic(), case.origin()));
    for name in case.expected_names() {
        let expected = case.expected(&name);
        let Some((_, found)) = results.0.iter().find(|(n, _)| *n == name) else {
            complain(format!("{name} was not worked out"));
            continue;
        };
        if let Err(difference) = same(&expected, found) {
            complain(format!("{name} {difference}"));
        }
    }
    for (name, _) in &results.0 {
        if !case.expects(name) {
            complain(format!("{name} was worked out, but nothing is published"));
        }
    }
    wrong
}

fn same(expected: &Value, found: &Found) -> Result<(), String> {
    let (value, tolerance) = (&expected["value"], expected["tolerance"].as_f64());
    let unit = expected["unit"].as_str().unwrap_or_default();
    let near = |published: &Value, found: f64| {
        let published = published.as_f64().ok_or("is not a published number")?;
        // Tolerances are absolute; the hair is for numbers that binary cannot write, such as 115 % from 1.15.
        let allowed = tolerance.unwrap_or(0.0) + published.abs() * 1e-12;
        if (found - published).abs() <= allowed {
            Ok(())
        } else {
            Err(format!("is {found}, published {published} ± {allowed}"))
        }
    };
    let of_unit = |found: &str| if found == unit { Ok(()) } else { Err(format!("is in {found}, published in {unit}")) };
    match found {
        Found::NotJudged if value.is_null() => Ok(()),
        Found::NotJudged => Err(format!("is not judged, published {value}")),
        _ if value.is_null() => Err("is judged, but must not be".to_owned()),
        Found::Flag(found) if value.as_bool() == Some(*found) => Ok(()),
        Found::Flag(found) => Err(format!("is {found}, published {value}")),
        Found::Text(found) if value.as_str() == Some(found) => Ok(()),
        Found::Text(found) => Err(format!("is {found:?}, published {value}")),
        Found::Number(found, found_unit) => of_unit(found_unit).and_then(|()| near(value, *found)),
        Found::Numbers(found, found_unit) => {
            of_unit(found_unit)?;
            let published = value.as_array().ok_or("is a list, published otherwise")?;
            if published.len() != found.len() {
                return Err(format!("has {} numbers, published {}", found.len(), published.len()));
            }
            published.iter().zip(found).try_for_each(|(p, f)| near(p, *f))
        }
    }
}
