//! What is still to be said in the parameter record: as left, and why it differs from what was intended.

use crate::Typed;
use crate::record::functions::FUNCTIONS;
use crate::record::{ParameterColumn, ParameterPlace, Record};

/// How what was left compares with what was intended.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Difference {
    /// One of the two is not there.
    Unknown,
    /// The same value, perhaps written or scaled otherwise.
    Same,
    /// Another value.
    Different,
}

/// Compares by value when both are quantities, by their words otherwise.
#[must_use]
pub fn differs(intended: Option<&Typed>, as_left: Option<&Typed>) -> Difference {
    let (Some(intended), Some(as_left)) = (intended, as_left) else { return Difference::Unknown };
    let same = match (intended.number(), as_left.number()) {
        (Some(a), Some(b)) => (a - b).abs() <= 1e-9 * a.abs().max(b.abs()),
        _ => intended.text.trim() == as_left.text.trim(),
    };
    if same { Difference::Same } else { Difference::Different }
}

/// Labels of what the functions of this group (`*` for all, with the free rows) still lack.
#[must_use]
pub fn left_of_group(record: Option<&Record>, group: &str) -> Vec<String> {
    let Some(record) = record else { return vec!["intended values".to_owned()] };
    let functions = FUNCTIONS.iter().filter(|f| group == "*" || f.group == group).map(|f| (f.key, f.label));
    let free = record.free_rows.iter().filter(|_| group == "*").map(|(k, l)| (k.as_str(), l.as_str()));
    let mut any = false;
    let mut left = Vec::new();
    for (key, label) in functions.chain(free) {
        let at = |column| ParameterPlace { function: key.to_owned(), column };
        let value = |column| record.parameter(&at(column));
        for column in ParameterColumn::ALL {
            if record.parameters.get(&at(column)).is_some_and(|s| s.needs_choice()) {
                left.push(format!("{label}, {}: needs a choice", column.words()));
            }
        }
        let intended = value(ParameterColumn::Intended);
        if intended.is_none() {
            continue;
        }
        any = true;
        if group != "*" {
            // While setting, what is intended is enough; what was left is asked where the whole record is looked at.
            continue;
        }
        match differs(intended, value(ParameterColumn::AsLeft)) {
            Difference::Unknown => left.push(format!("{label}, as left")),
            Difference::Different if value(ParameterColumn::Explanation).is_none() => {
                left.push(format!("{label}, why as left differs"));
            }
            _ => {}
        }
    }
    if !any {
        left.push("intended values".to_owned());
    }
    left
}

/// Whether anything of this group was entered.
pub(super) fn begun(record: &Record, group: &str) -> bool {
    record.parameters.iter().any(|(place, slot)| {
        let mine = group == "*" || crate::record::functions::find(&place.function).is_some_and(|f| f.group == group);
        mine && slot.current().is_some_and(|r| r.value.is_some())
    })
}
