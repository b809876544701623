//! A limit rule in words, for those who cannot see it: the readings, the limits, the scale.

use crate::rule_range::range;
use engineering::rounding::significant;
use engineering::{LimitRule, Scale, Verdict};

/// The rule as one sentence with every number on it.
#[must_use]
pub fn words(rule: &LimitRule) -> String {
    let with_unit = |v: f64| format!("{} {}", significant(v, 4), rule.unit).trim_end().to_owned();
    let mut parts = Vec::new();
    for m in &rule.markers {
        let shown = if m.label.is_empty() { with_unit(m.at) } else { m.label.clone() };
        let verdict = if m.verdict == Verdict::Figure { String::new() } else { format!(", {}", m.verdict.words()) };
        let whisker = if m.whisker > 0.0 {
            format!(", between {} and {}", significant(m.at - m.whisker, 4), with_unit(m.at + m.whisker))
        } else {
            String::new()
        };
        parts.push(format!("{shown}{verdict}{whisker}"));
    }
    if rule.markers.is_empty() {
        parts.push("No reading yet".to_owned());
    }
    for t in &rule.ticks {
        parts.push(if t.label.is_empty() {
            format!("mark at {}", with_unit(t.at))
        } else {
            format!("mark {}", t.label)
        });
    }
    for b in &rule.bands {
        parts.push(match (b.from, b.to) {
            (Some(from), Some(to)) => format!("acceptable from {} to {}", significant(from, 4), with_unit(to)),
            (Some(from), None) => format!("acceptable from {} up", with_unit(from)),
            (None, Some(to)) => format!("acceptable up to {}", with_unit(to)),
            (None, None) => "acceptable everywhere".to_owned(),
        });
    }
    let (low, high) = range(rule);
    let kind = if rule.scale == Scale::Logarithmic { "logarithmic scale" } else { "scale" };
    parts.push(format!("{kind} {} to {}", significant(low, 3), with_unit(high)));
    parts.join("; ") + "."
}
