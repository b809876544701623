//! Verdicts that this program would give otherwise than those kept: told apart, since a better formula is no fault.

use commissioning::judge::Judged;
use serde::Serialize;

/// A verdict kept and the verdict of today.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct Difference {
    /// Check, step and what it was run for.
    pub check: String,
    /// The step; empty for a nameplate check.
    pub step: String,
    /// What it was run for.
    pub of: String,
    /// As kept; empty when it was not judged then.
    pub kept: String,
    /// As judged by this program; empty when it no longer judges it.
    pub today: String,
}

/// All differences, in the order kept, new ones last.
pub(super) fn between(kept: &[Judged], today: &[Judged]) -> Vec<Difference> {
    let same = |a: &Judged, b: &Judged| a.outcome.check == b.outcome.check && a.step == b.step && a.of == b.of;
    let told = |j: Option<&Judged>| {
        j.map_or_else(String::new, |j| format!("{}: {}", j.outcome.verdict.words(), j.outcome.summary))
    };
    let difference = |of: &Judged, kept: Option<&Judged>, today: Option<&Judged>| Difference {
        check: of.outcome.check.clone(),
        step: of.step.clone(),
        of: of.of.clone(),
        kept: told(kept),
        today: told(today),
    };
    let changed = kept.iter().filter_map(|k| {
        let now = today.iter().find(|t| same(k, t));
        (told(now) != told(Some(k))).then(|| difference(k, Some(k), now))
    });
    let new = today.iter().filter(|t| !kept.iter().any(|k| same(k, t))).map(|t| difference(t, None, Some(t)));
    changed.chain(new).collect()
}
