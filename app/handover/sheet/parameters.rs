//! The parameter record: first as a list to key in, then with what was found and intended and what stood before.

use super::Pages;
use super::verdicts::full;
use super::words::{of_field, rows};
use commissioning::judge::Judged;
use commissioning::plant::{Field, FieldKind};
use commissioning::record::functions::{FUNCTIONS, GROUPS, find};
use commissioning::record::{ParameterColumn, ParameterPlace};
use serde_json::{Value, json};

/// Heading of the rows that a person added.
const FREE: &str = "further rows of this drive";

impl Pages<'_> {
    /// A standing value of the parameter record in words.
    pub(super) fn parameter(&self, function: &str, column: ParameterColumn) -> Option<String> {
        let place = ParameterPlace { function: function.to_owned(), column };
        let part = self.record.parameters.iter().find(|p| p.place == place)?;
        let typed = part.slot.current()?.value.as_ref()?;
        Some(words(function, column, typed)).filter(|w| !w.is_empty())
    }

    pub(super) fn parameters(&self) -> Vec<Value> {
        GROUPS
            .iter()
            .map(|g| (*g, FUNCTIONS.iter().filter(|f| f.group == *g).map(|f| (f.key, f.label)).collect::<Vec<_>>()))
            .chain([(FREE, self.record.free_rows.iter().map(|r| (r.key.as_str(), r.label.as_str())).collect())])
            .filter_map(|(heading, functions)| {
                let rows: Vec<Value> =
                    functions.into_iter().filter_map(|(key, label)| self.parameter_row(key, label)).collect();
                (!rows.is_empty()).then(|| json!({ "heading": heading, "rows": rows }))
            })
            .collect()
    }

    fn parameter_row(&self, key: &str, label: &str) -> Option<Value> {
        let mut row = serde_json::Map::new();
        let mut any = false;
        for column in ParameterColumn::ALL {
            let place = ParameterPlace { function: key.to_owned(), column };
            let values = self.record.parameters.iter().find(|p| p.place == place).map_or_else(Vec::new, |part| {
                rows(&part.slot, |typed| typed.as_ref().map(|t| json!({ "value": words(key, column, t) })))
            });
            any |= !values.is_empty();
            row.insert(column.key().to_owned(), values.into());
        }
        row.insert("label".to_owned(), label.into());
        any.then_some(Value::Object(row))
    }

    /// Checks of a setting: what they were run for is `function/column`.
    pub(super) fn is_parameter_check(&self, judged: &Judged) -> bool {
        judged.of.split_once('/').is_some_and(|(function, _)| {
            find(function).is_some() || self.record.free_rows.iter().any(|r| r.key == function)
        })
    }

    pub(super) fn parameter_checks(&self) -> Vec<Value> {
        self.file
            .verdicts
            .iter()
            .filter(|j| self.is_parameter_check(j))
            .map(|j| {
                let mut judged = j.clone();
                if let Some((function, column)) = j.of.split_once('/') {
                    let label = find(function).map_or(function, |f| f.label);
                    let column = ParameterColumn::ALL.iter().find(|c| c.key() == column).map_or(column, |c| c.words());
                    judged.of = format!("{label}, {column}");
                }
                full(&judged)
            })
            .collect()
    }
}

fn words(function: &str, column: ParameterColumn, typed: &commissioning::Typed) -> String {
    if matches!(column, ParameterColumn::Code | ParameterColumn::Explanation) {
        return typed.shown();
    }
    let field = find(function).map(|f| Field {
        key: f.key,
        label: f.label,
        hint: "",
        group: f.group,
        kind: f.kind,
        required: false,
    });
    let shown = of_field(field.as_ref(), typed);
    if field.is_some_and(|f| f.kind == FieldKind::Flag) && shown == "yes" {
        "on".to_owned()
    } else if shown == "no" {
        "off".to_owned()
    } else {
        shown
    }
}
