//! Which phases are in trouble: an outside verdict, or an open finding that stops start-up.

use super::{Agenda, of};
use crate::judge::{Judged, View};
use crate::procedure::Phase;
use crate::record::Severity;
use engineering::Verdict;

/// The agenda of a drive, with what was judged there (`judge::all`, or the frozen verdicts) told in `troubled`.
#[must_use]
pub fn with_outcomes(view: &View<'_>, judged: &[Judged]) -> Agenda {
    let mut agenda = of(view);
    for phase in &mut agenda.phases {
        let here = |j: &Judged| phase.steps.iter().any(|s| s.id == j.step);
        phase.troubled |= judged.iter().any(|j| j.outcome.verdict == Verdict::Outside && here(j));
    }
    agenda
}

/// Whether a finding that stops start-up is open at a step of the phase.
pub(super) fn stopped(view: &View<'_>, phase: &Phase) -> bool {
    let here = |step: &Option<String>| step.as_ref().is_some_and(|id| phase.steps.iter().any(|s| s.id == *id));
    let findings = view.drive.record.iter().flat_map(|r| r.findings.values());
    findings.filter(|f| f.is_open() && f.severity == Severity::StopsStartUp).any(|f| here(&f.step))
}
