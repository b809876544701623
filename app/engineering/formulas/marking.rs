//! How a result reaches the ruler and the notes: the same way in every check.

use crate::decision::Measured;
use crate::outcome::{OutcomeBuilder, Verdict};

/// Within up to `good`, outside only beyond `bad`, marginal between the two.
#[must_use]
pub fn graded(measured: &Measured, good: f64, bad: f64) -> Verdict {
    match (measured.at_most(good), measured.at_most(bad)) {
        (Verdict::Within, _) => Verdict::Within,
        (_, Verdict::Outside) => Verdict::Outside,
        _ => Verdict::Marginal,
    }
}

/// A result that can only be a hint: whatever is beyond its limit is marginal, never outside.
#[must_use]
pub fn hint(verdict: Verdict) -> Verdict {
    if verdict == Verdict::Outside { Verdict::Marginal } else { verdict }
}

/// `value` at most `limit`, where a last binary digit decides nothing.
#[must_use]
pub fn up_to(value: f64, limit: f64) -> bool {
    value <= limit + limit.abs() * 1e-9
}

/// Puts the result on the ruler and says why it is marginal at best, if so.
pub fn mark(b: &mut OutcomeBuilder, measured: &Measured, label: impl Into<String>, verdict: Verdict) {
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(measured.value, measured.expanded, label, verdict));
    }
    if let Some(doubt) = &measured.doubt {
        b.note(format!("Marginal at best: {doubt}."));
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn between_the_two_limits_is_marginal() {
        let at = |value: f64, expanded: f64| Measured { value, expanded, doubt: None };
        assert_eq!(graded(&at(5.0, 0.0), 5.0, 10.0), Verdict::Within);
        assert_eq!(graded(&at(4.9, 0.2), 5.0, 10.0), Verdict::Marginal);
        assert_eq!(graded(&at(10.1, 0.2), 5.0, 10.0), Verdict::Marginal);
        assert_eq!(graded(&at(10.3, 0.2), 5.0, 10.0), Verdict::Outside);
        assert_eq!(hint(Verdict::Outside), Verdict::Marginal);
        assert!(up_to(1.15 * 14.2, 16.33) && !up_to(16.34, 16.33));
    }
}
