//! Finds what a file says and the reader passed over: a variant without members takes any member beside its name.

use serde_json::Value;

/// The path of the first member that is not in what was taken from the file. What may be left out may also be empty.
pub(super) fn first(given: &Value, taken: &Value) -> Option<String> {
    match (given, taken) {
        (Value::Object(given), Value::Object(taken)) => given.iter().find_map(|(key, inner)| match taken.get(key) {
            Some(known) => first(inner, known)
                .map(|path| format!("{key}{}{path}", if path.starts_with('[') || path.is_empty() { "" } else { "." })),
            None => (!is_empty(inner)).then(|| key.clone()),
        }),
        (Value::Array(given), Value::Array(taken)) => {
            given.iter().zip(taken).enumerate().find_map(|(n, (inner, known))| {
                first(inner, known).map(|path| format!("[{n}]{}{path}", if path.starts_with('[') { "" } else { "." }))
            })
        }
        _ => None,
    }
}

fn is_empty(value: &Value) -> bool {
    match value {
        Value::Null | Value::Bool(false) => true,
        Value::String(text) => text.is_empty(),
        Value::Array(list) => list.is_empty(),
        Value::Bool(true) | Value::Number(_) | Value::Object(_) => false,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use serde_json::json;

    #[test]
    fn the_first_member_passed_over_is_told_by_its_path() {
        let taken = json!({ "a": [{ "b": 1 }, { "c": { "d": 2 } }] });
        assert_eq!(first(&taken, &taken), None);
        let given = json!({ "a": [{ "b": 1, "note": "" }, { "c": { "d": 2, "e": 3 } }] });
        assert_eq!(first(&given, &taken).as_deref(), Some("a[1].c.e"));
        assert_eq!(first(&json!({ "x": true }), &taken).as_deref(), Some("x"));
    }
}
