//! Holds docs/record-format.schema.json equal to the types: what the reader takes the schema takes, and nothing else.

#[path = "schema/validator.rs"]
mod validator;

use super::RecordFile;
use super::tests::full;
use serde_json::Value;
use std::collections::BTreeSet;
use validator::Schema;

const PUBLISHED: &str = include_str!("../../../../docs/record-format.schema.json");

/// Every object and leaf of a file by its path, with the places in lists left out: one of each shape.
fn shapes(value: &Value, path: &mut Vec<String>, seen: &mut BTreeSet<String>, found: &mut Vec<Vec<String>>) {
    let mut shape: String =
        path.iter().map(|p| if p.parse::<usize>().is_ok() { "/*" } else { p.as_str() }).collect::<Vec<_>>().join("/");
    if let Some(tag) =
        value.as_object().and_then(|o| ["state", "turn", "kind", "condition"].iter().find_map(|t| o.get(*t)))
    {
        shape.push_str(&tag.to_string());
    }
    if seen.insert(shape) {
        found.push(path.clone());
    }
    let children: Vec<(String, &Value)> = match value {
        Value::Object(map) => map.iter().map(|(k, v)| (k.clone(), v)).collect(),
        Value::Array(list) => list.iter().enumerate().map(|(n, v)| (n.to_string(), v)).collect(),
        _ => Vec::new(),
    };
    for (name, child) in children {
        path.push(name);
        shapes(child, path, seen, found);
        path.pop();
    }
}

fn at<'a>(value: &'a mut Value, path: &[String]) -> &'a mut Value {
    path.iter().fold(value, |v, p| match v {
        Value::Array(list) => &mut list[p.parse::<usize>().unwrap()],
        other => other.get_mut(p).unwrap(),
    })
}

/// A file changed in one place, in every way that a kind or a name can be wrong there.
fn wrongs(original: &Value, path: &[String]) -> Vec<Value> {
    let changed = |change: &dyn Fn(&mut Value)| {
        let mut file = original.clone();
        change(at(&mut file, path));
        file
    };
    let mut made = vec![changed(&|v| {
        *v = match v {
            Value::String(_) => Value::from(7),
            Value::Array(_) => Value::from("a list"),
            Value::Null => Value::from(true),
            _ => Value::from("x"),
        };
    })];
    if let Value::Object(map) = at(&mut original.clone(), path) {
        made.push(changed(&|v| drop(v.as_object_mut().unwrap().insert("added".to_owned(), Value::from(1)))));
        for key in map.keys() {
            made.push(changed(&|v| drop(v.as_object_mut().unwrap().remove(key))));
        }
    }
    made
}

#[test]
fn the_schema_takes_what_the_reader_takes_and_refuses_what_it_refuses() {
    let schema = Schema::of(PUBLISHED);
    let original: Value = serde_json::from_str(&full().file().to_json()).unwrap();
    assert_eq!(schema.faults(&original), Vec::<String>::new());
    let mut found = Vec::new();
    shapes(&original, &mut Vec::new(), &mut BTreeSet::new(), &mut found);
    let (mut taken, mut refused) = (0, 0);
    for path in &found {
        for wrong in wrongs(&original, path) {
            let read = RecordFile::read(&wrong.to_string());
            let faults = schema.faults(&wrong);
            assert_eq!(
                read.is_ok(),
                faults.is_empty(),
                "{path:?}: the reader says {:?}, the schema {faults:?}",
                read.err()
            );
            if faults.is_empty() { taken += 1 } else { refused += 1 }
        }
    }
    assert!(
        found.len() > 150 && refused > 500 && taken > 30,
        "{} shapes, {refused} refused, {taken} taken",
        found.len()
    );
}

#[test]
fn everything_that_the_schema_describes_can_be_met_with() {
    let schema = Schema::of(PUBLISHED);
    let mut met = BTreeSet::new();
    let files = [full().file(), crate::world::World::signed().file(), crate::world::World::new().file()];
    for file in files {
        schema.meet(&serde_json::from_str(&file.to_json()).unwrap(), &mut met);
    }
    let never: Vec<String> = schema.described().difference(&met).cloned().collect();
    // What no record of the short procedure of these tests holds; each is in a record of the demo, or comes about rarely.
    let elsewhere = ["accuracy/", "ended/reason", "ended/tablet", "field-slot/taken_back", "item/", "step/"];
    let surprising: Vec<&String> = never.iter().filter(|n| !elsewhere.iter().any(|e| n.starts_with(e))).collect();
    assert_eq!(surprising, Vec::<&String>::new());
}
