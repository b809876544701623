//! # waiting-time
//!
//! The time waited after switching off, against the waiting time that the drive's label prints.
//!
//! t ≥ t_label. The label is the maker's own figure and the only limit here; nothing is assumed in its place. Waiting
//! alone proves nothing: a discharge resistor can be open, so the bus is measured as well (row DC-12).

use crate::decision::Measured;
use crate::formulas::plausible::{not_negative, positive};
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::Duration;
use crate::rounding::significant;
use crate::sources::bus::DC_12;

/// Name in the catalogue.
pub const NAME: &str = "waiting-time";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Time waited since switching off.
    pub waited: Option<Duration>,
    /// Waiting time on the drive's label.
    pub label: Option<Duration>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(DC_12);
    b.note("Waiting proves nothing by itself: measure the DC bus as well.");
    let label = positive(&mut b, inputs.label, "waiting time on the drive's label").map(|t| t.seconds() / 60.0);
    if let Some(label) = label {
        let shown = significant(label, 3);
        b.limit(format!("at least {shown} min, as the drive's label says"));
        b.rule(LimitRule::linear("min").at_least(label, format!("≥ {shown} min")));
    }
    let waited = not_negative(&mut b, inputs.waited, "time waited").map(|t| t.seconds() / 60.0);
    let (Some(label), Some(waited)) = (label, waited) else { return b.not_assessed() };
    let verdict = Measured::exact(waited).at_least(label);
    let (shown, limit) = (significant(waited, 3), significant(label, 3));
    b.line("time waited", "t ≥ t_label", format!("{shown} min, label {limit} min"), verdict.words());
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(waited, 0.0, format!("{shown} min"), verdict));
    }
    let summary = if verdict == Verdict::Outside {
        format!("{shown} min waited, the label asks for {limit} min. Keep the covers on and wait.")
    } else {
        format!("{shown} min waited, the label asks for {limit} min. Measure before anything is touched.")
    };
    b.judged(verdict, summary)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn waited(time: f64) -> Outcome {
        let minutes = |m: f64| Some(Duration::from_seconds(m * 60.0));
        check(&Inputs { waited: minutes(time), label: minutes(5.0) })
    }

    #[test]
    fn at_just_inside_and_just_outside_the_label() {
        assert_eq!(waited(5.0).verdict, Verdict::Within);
        assert_eq!(waited(5.1).verdict, Verdict::Within);
        assert_eq!(waited(4.9).verdict, Verdict::Outside);
        assert_eq!(waited(-1.0).verdict, Verdict::NotAssessed);
    }

    #[test]
    fn the_label_is_the_limit_before_anything_was_waited_and_nothing_stands_in_for_it() {
        let before = check(&Inputs { waited: None, label: Some(Duration::from_seconds(300.0)) });
        assert_eq!(
            (before.verdict, before.limit.as_str()),
            (Verdict::NotAssessed, "at least 5.00 min, as the drive's label says")
        );
        let without = check(&Inputs { waited: Some(Duration::from_seconds(600.0)), label: None });
        assert_eq!(without.verdict, Verdict::NotAssessed);
        assert_eq!(without.missing[0].what, "waiting time on the drive's label");
    }
}
