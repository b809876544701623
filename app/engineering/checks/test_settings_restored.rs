//! # test-settings-restored
//!
//! Whatever was changed for a test, against what it should be at handover.
//!
//! As left equals intended: within. As left still the test value, or anything else: outside. Numbers are compared as
//! numbers, words as words. What was changed and written down nowhere is missing by name. Common practice (row TS-01).

use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::sources::settings::RESTORED;

/// Name in the catalogue.
pub const NAME: &str = "test-settings-restored";

/// One setting that was changed for a test. Values as typed, all in one unit.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct TestSetting {
    /// What it sets, for instance `current limit`.
    pub what: String,
    /// Value for the test.
    pub during: Option<String>,
    /// Value that it should have.
    pub intended: Option<String>,
    /// Value at handover.
    pub as_left: Option<String>,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Inputs {
    /// Settings changed for tests; an empty list when none was; `None` when nobody said.
    pub settings: Option<Vec<TestSetting>>,
    /// What was changed by what the record says, and written down nowhere: each by name.
    pub unlisted: Vec<String>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(RESTORED);
    b.limit("each as intended");
    let Some(settings) = b.need(inputs.settings.as_ref(), "settings changed for a test, or that none was") else {
        return b.not_assessed();
    };
    let mut wrong = Vec::new();
    let mut open = false;
    for what in &inputs.unlisted {
        let _ = b.need(None::<()>, what);
        open = true;
    }
    for setting in settings {
        let intended = b.need(filled(setting.intended.as_deref()), &format!("{} as intended", setting.what));
        let left = b.need(filled(setting.as_left.as_deref()), &format!("{} as left", setting.what));
        let (Some(intended), Some(left)) = (intended, left) else {
            open = true;
            continue;
        };
        let restored = same(intended, left);
        let still = !restored && filled(setting.during.as_deref()).is_some_and(|during| same(during, left));
        let result = if restored {
            "restored"
        } else if still {
            "still the test value"
        } else {
            "other than intended"
        };
        b.line(&setting.what, "as left = intended", format!("{left} against {intended}"), result);
        if !restored {
            wrong.push(format!("{} ({left} instead of {intended})", setting.what));
        }
    }
    if !wrong.is_empty() {
        return b.judged(Verdict::Outside, format!("Not restored: {}. Put it back before handover.", wrong.join(", ")));
    }
    if open {
        return b.not_assessed();
    }
    match settings.len() {
        0 => b.judged(Verdict::Within, "Nothing was changed for a test."),
        1 => b.judged(Verdict::Within, "The setting changed for a test is back as intended."),
        count => b.judged(Verdict::Within, format!("All {count} settings changed for tests are back as intended.")),
    }
}

/// A value that says something; a number out of all range says nothing.
fn filled(text: Option<&str>) -> Option<&str> {
    text.map(str::trim).filter(|t| !t.is_empty() && t.parse::<f64>().map_or(true, f64::is_finite))
}

/// Equal as numbers where both are numbers, else as words.
fn same(a: &str, b: &str) -> bool {
    let number = |t: &str| t.trim().replace(',', ".").parse::<f64>().ok().filter(|n| n.is_finite());
    match (number(a), number(b)) {
        (Some(x), Some(y)) => (x - y).abs() <= x.abs().max(y.abs()) * 1e-12,
        _ => a.trim().eq_ignore_ascii_case(b.trim()),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn of(during: &str, intended: &str, left: &str) -> Inputs {
        let text = |t: &str| Some(t.to_owned());
        let setting = TestSetting {
            what: "current limit".to_owned(),
            during: text(during),
            intended: text(intended),
            as_left: text(left),
        };
        Inputs { settings: Some(vec![setting]), ..Inputs::default() }
    }

    /// Common practice, no source (row TS-01).
    #[test]
    fn restored_still_and_other() {
        assert_eq!(check(&of("50", "110", "110.0")).verdict, Verdict::Within);
        assert_eq!(check(&of("50", "110,5", "110.5")).verdict, Verdict::Within);
        assert_eq!(check(&of("off", "on", "ON")).verdict, Verdict::Within);
        let still = check(&of("50", "110", "50.0"));
        assert_eq!((still.verdict, still.working[0].result.as_str()), (Verdict::Outside, "still the test value"));
        assert_eq!(check(&of("50", "110", "110.1")).working[0].result, "other than intended");
    }

    #[test]
    fn none_and_missing() {
        let none = Inputs { settings: Some(Vec::new()), ..Inputs::default() };
        assert_eq!(check(&none).verdict, Verdict::Within);
        let unlisted = vec!["settings lowered for the first turn".to_owned()];
        let outcome = check(&Inputs { unlisted: unlisted.clone(), ..none });
        assert_eq!((outcome.verdict, &outcome.missing[0].what), (Verdict::NotAssessed, &unlisted[0]));
        assert_eq!(check(&Inputs { unlisted, ..of("50", "110", "50") }).verdict, Verdict::Outside);
        assert_eq!(check(&Inputs::default()).verdict, Verdict::NotAssessed);
        let outcome = check(&of("50", "110", " "));
        assert_eq!(
            (outcome.verdict, outcome.missing[0].what.as_str()),
            (Verdict::NotAssessed, "current limit as left")
        );
        // Found by the records made of anything (commissioning, judge/tests/fuzz.rs).
        assert_eq!(check(&of("50", "-inf", "50")).missing[0].what, "current limit as intended");
    }
}
