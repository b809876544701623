//! As much of JSON Schema (draft 2020-12) as the published schema uses; a keyword that it does not know is a fault of the test.

use serde_json::{Map, Value};
use std::collections::BTreeSet;

/// A schema.
pub struct Schema(Value);

/// Keywords that only explain.
const WORDS: [&str; 4] = ["$schema", "$defs", "title", "description"];

impl Schema {
    /// From its text.
    pub fn of(text: &str) -> Self {
        Self(serde_json::from_str(text).unwrap())
    }

    /// Everything about a value that the schema does not allow, with its path.
    pub fn faults(&self, value: &Value) -> Vec<String> {
        let mut faults = Vec::new();
        self.check(&self.0, value, "", &mut faults);
        faults
    }

    fn definition(&self, name: &str) -> &Value {
        &self.0["$defs"][name.strip_prefix("#/$defs/").unwrap()]
    }

    fn allows(&self, schema: &Value, value: &Value) -> bool {
        let mut faults = Vec::new();
        self.check(schema, value, "", &mut faults);
        faults.is_empty()
    }

    fn check(&self, schema: &Value, value: &Value, path: &str, faults: &mut Vec<String>) {
        for (keyword, wanted) in schema.as_object().unwrap() {
            let fits = match keyword.as_str() {
                word if WORDS.contains(&word) => true,
                "then" => true,
                "$ref" => {
                    self.check(self.definition(wanted.as_str().unwrap()), value, path, faults);
                    true
                }
                "type" => is_of(value, wanted.as_str().unwrap()),
                "const" => value == wanted,
                "enum" => wanted.as_array().unwrap().contains(value),
                "anyOf" => wanted.as_array().unwrap().iter().any(|s| self.allows(s, value)),
                "allOf" => wanted.as_array().unwrap().iter().all(|s| self.allows(s, value)),
                "if" => !self.allows(wanted, value) || self.allows(&schema["then"], value),
                "minimum" => value.as_f64().is_none_or(|n| n >= wanted.as_f64().unwrap()),
                "minItems" => value.as_array().is_none_or(|l| l.len() as u64 >= wanted.as_u64().unwrap()),
                "maxItems" => value.as_array().is_none_or(|l| l.len() as u64 <= wanted.as_u64().unwrap()),
                "pattern" => value.as_str().is_none_or(|text| matches(wanted.as_str().unwrap(), text)),
                "required" => {
                    let keys = wanted.as_array().unwrap().iter().map(|k| k.as_str().unwrap());
                    value.as_object().is_none_or(|map| keys.clone().all(|key| map.contains_key(key)))
                }
                "additionalProperties" => {
                    value.as_object().is_none_or(|map| map.keys().all(|k| schema["properties"].get(k).is_some()))
                }
                "properties" => {
                    for (key, inner) in value.as_object().unwrap_or(&Map::new()) {
                        if let Some(schema) = wanted.get(key) {
                            self.check(schema, inner, &format!("{path}/{key}"), faults);
                        }
                    }
                    true
                }
                "items" | "prefixItems" => {
                    for (n, inner) in value.as_array().unwrap_or(&Vec::new()).iter().enumerate() {
                        let schema = if keyword == "items" { Some(wanted) } else { wanted.get(n) };
                        schema.into_iter().for_each(|s| self.check(s, inner, &format!("{path}/{n}"), faults));
                    }
                    true
                }
                other => panic!("the schema has a keyword that this test does not know: {other}"),
            };
            if !fits {
                faults.push(format!("{path}: {keyword}"));
            }
        }
    }

    /// Every member that a named part describes: `entry/photo`.
    pub fn described(&self) -> BTreeSet<String> {
        let parts = self.0["$defs"].as_object().unwrap().iter();
        parts.flat_map(|(part, schema)| members(schema).map(move |key| format!("{part}/{key}"))).collect()
    }

    /// Notes every described member that a file really has.
    pub fn meet(&self, value: &Value, met: &mut BTreeSet<String>) {
        self.walk(&self.0, value, met);
    }

    fn walk(&self, schema: &Value, value: &Value, met: &mut BTreeSet<String>) {
        if let Some(name) = schema.get("$ref").and_then(Value::as_str) {
            let (definition, part) = (self.definition(name), name.rsplit('/').next().unwrap());
            let has =
                value.as_object().into_iter().flat_map(Map::keys).filter(|k| members(definition).any(|m| m == *k));
            met.extend(has.map(|key| format!("{part}/{key}")));
            self.walk(definition, value, met);
        }
        for choice in schema.get("anyOf").and_then(Value::as_array).into_iter().flatten() {
            if self.allows(choice, value) {
                self.walk(choice, value, met);
            }
        }
        for (key, inner) in value.as_object().into_iter().flatten() {
            if let Some(schema) = schema.get("properties").and_then(|p| p.get(key)) {
                self.walk(schema, inner, met);
            }
        }
        for inner in value.as_array().into_iter().flatten() {
            schema.get("items").into_iter().for_each(|s| self.walk(s, inner, met));
        }
    }
}

fn members(schema: &Value) -> impl Iterator<Item = &String> {
    schema.get("properties").and_then(Value::as_object).into_iter().flat_map(Map::keys)
}

fn is_of(value: &Value, kind: &str) -> bool {
    match kind {
        "object" => value.is_object(),
        "array" => value.is_array(),
        "string" => value.is_string(),
        "integer" => value.is_u64() || value.is_i64(),
        "number" => value.is_number(),
        "boolean" => value.is_boolean(),
        "null" => value.is_null(),
        other => panic!("no type of JSON: {other}"),
    }
}

/// The patterns of the schema, each read by hand: lower-case hexadecimal in groups, and moments.
fn matches(pattern: &str, text: &str) -> bool {
    let hexadecimal = |text: &str| text.bytes().all(|b| b.is_ascii_digit() || (b'a'..=b'f').contains(&b));
    match pattern {
        "^[0-9a-f]{64}$" => text.len() == 64 && hexadecimal(text),
        "^([0-9a-f]{64})?$" => text.is_empty() || (text.len() == 64 && hexadecimal(text)),
        p if p.starts_with("^[0-9a-f]{8}-") => {
            let groups: Vec<&str> = text.split('-').collect();
            groups.iter().map(|g| g.len()).eq([8, 4, 4, 4, 12]) && groups.iter().all(|g| hexadecimal(g))
        }
        p if p.starts_with("^\\d{4}-") => {
            let shape: String = text.chars().map(|c| if c.is_ascii_digit() { '0' } else { c }).collect();
            let rest = shape.strip_prefix("0000-00-00T00:00:00").and_then(|r| r.strip_suffix('Z'));
            rest.is_some_and(|r| {
                r.is_empty() || r.strip_prefix('.').is_some_and(|d| !d.is_empty() && d.bytes().all(|b| b == b'0'))
            })
        }
        other => panic!("the schema has a pattern that this test does not know: {other}"),
    }
}
