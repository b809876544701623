//! # instrument-calibration
//!
//! Whether an instrument was in calibration on the day of its reading: from the day of calibration, where entered, up
//! to and including the due date. Common practice. Days come in with the inputs; nothing here asks a clock.

use crate::day::Day;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::sources::nameplate::CALIBRATION_DUE;

/// Name in the catalogue.
pub const NAME: &str = "instrument-calibration";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Inputs {
    /// Day of the reading, at the site.
    pub read_on: Option<Day>,
    /// Last day on which the calibration counts.
    pub due: Option<Day>,
    /// Day of the calibration.
    pub calibrated_on: Option<Day>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(CALIBRATION_DUE);
    let due = b.need(inputs.due, "calibration due date of the instrument");
    if let Some(due) = due {
        b.limit(format!("read on or before {due}"));
        b.rule(LimitRule::linear("days to the due date").at_least(0.0, due.to_string()));
    }
    let read_on = b.need(inputs.read_on, "day of the reading");
    let (Some(due), Some(read_on)) = (due, read_on) else { return b.not_assessed() };
    if inputs.calibrated_on.is_some_and(|day| day > due) {
        return b.not_judged(
            "Not assessed: the calibration is dated after its own due date. Check the instrument's entry.",
        );
    }
    let days = due.days_since(read_on);
    b.line("days left", "due date − day of the reading", format!("{due} − {read_on}"), format!("{days} days"));
    b.text_figure("days left", days.to_string());
    let early = inputs.calibrated_on.filter(|day| *day > read_on);
    let verdict = if days >= 0 && early.is_none() { Verdict::Within } else { Verdict::Outside };
    // Ten thousand years are some four million days, which a float holds exactly.
    if let (Some(rule), Ok(days)) = (b.take_rule(), i32::try_from(days)) {
        b.rule(rule.reading(f64::from(days), 0.0, read_on.to_string(), verdict));
    }
    b.judged(
        verdict,
        match (verdict, early) {
            (Verdict::Within, _) => format!("In calibration on {read_on}, due {due}."),
            (_, Some(day)) => format!("Read on {read_on}, before the calibration of {day} that is entered. Enter the calibration that held on the day, or repeat the reading."),
            _ => format!("Calibration ran out on {due}, before the reading of {read_on}. Repeat the reading with an instrument in calibration, or have this one checked."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;

    fn days(read: (i32, u32, u32), due: (i32, u32, u32)) -> Inputs {
        Inputs { read_on: Day::new(read.0, read.1, read.2), due: Day::new(due.0, due.1, due.2), calibrated_on: None }
    }

    #[test]
    fn on_the_day_before_and_after() {
        assert_eq!(check(&days((2026, 5, 31), (2026, 5, 31))).verdict, Verdict::Within);
        assert_eq!(check(&days((2026, 5, 30), (2026, 5, 31))).verdict, Verdict::Within);
        let late = check(&days((2026, 6, 1), (2026, 5, 31)));
        assert_eq!((late.verdict, late.figures[0].value.as_str()), (Verdict::Outside, "-1"));
    }

    #[test]
    fn a_reading_before_the_calibration_does_not_count() {
        let early = Inputs { calibrated_on: Day::new(2026, 5, 2), ..days((2026, 5, 1), (2027, 5, 1)) };
        assert_eq!(check(&early).verdict, Verdict::Outside);
        let twisted = Inputs { calibrated_on: Day::new(2028, 5, 2), ..days((2026, 5, 1), (2027, 5, 1)) };
        assert_eq!(check(&twisted).verdict, Verdict::NotAssessed);
    }

    #[test]
    fn the_limit_is_there_before_the_reading() {
        let outcome = check(&Inputs { read_on: None, ..days((2026, 1, 1), (2026, 5, 31)) });
        assert_eq!((outcome.limit.as_str(), outcome.rule.is_some()), ("read on or before 2026-05-31", true));
        assert_eq!(outcome.missing[0].what, "day of the reading");
        assert_eq!(check(&Inputs { due: None, ..days((2026, 1, 1), (2026, 5, 31)) }).verdict, Verdict::NotAssessed);
    }
}
