//! Where a hold point stands: which of its conditions are not met, and whether it is released.

use super::{Agenda, HoldAgenda, StepState};
use crate::judge::{self, Judged, View};
use crate::procedure::{Condition, Phase};
use crate::record::{Record, Severity};
use engineering::Verdict;

/// The hold point before a phase, if it has one; `agenda` holds every step already.
pub(super) fn of(view: &View<'_>, phase: &Phase, agenda: &Agenda) -> Option<HoldAgenda> {
    let hold = phase.hold.as_ref()?;
    let released = view.drive.record.as_ref().and_then(|r| r.releases.get(&phase.id)).cloned();
    let settled = agenda.phases.iter().any(|p| p.id == phase.id && p.left() == 0 && !p.steps.is_empty());
    let mut unmet = Vec::new();
    // A phase whose work is done waits for nothing, though isolation has been lifted since.
    if released.is_none() || !settled {
        let asked = hold.conditions.iter().filter(|c| released.is_none() || must_keep(c));
        asked.for_each(|c| unmet.extend(unmet_of(view, c, agenda)));
    }
    let open = released.is_some() && unmet.is_empty();
    Some(HoldAgenda { title: hold.title.clone(), unmet, released, open })
}

/// Whether a condition must keep holding after the release.
const fn must_keep(condition: &Condition) -> bool {
    matches!(condition, Condition::IsolationInForce | Condition::NoFindingStopsStartUp)
}

fn unmet_of(view: &View<'_>, condition: &Condition, agenda: &Agenda) -> Vec<String> {
    let record = view.drive.record.as_ref();
    match condition {
        Condition::PhaseSettled { phase } => agenda
            .phases
            .iter()
            .filter(|p| p.id == *phase && p.left() > 0)
            .map(|p| match p.left() {
                1 => format!("“{}” has one step left.", p.title),
                left => format!("“{}” has {left} steps left.", p.title),
            })
            .collect(),
        Condition::StepSettled { step } => match agenda.step(step) {
            Some((_, s)) if !s.state.is_settled() => vec![format!("“{}” is not settled.", s.title)],
            _ => Vec::new(),
        },
        Condition::IsolationInForce if !record.is_some_and(Record::isolated) => {
            vec!["“Isolated and proved dead” is not in force.".to_owned()]
        }
        Condition::IsolationLifted if record.is_some_and(Record::isolated) => {
            vec!["“Isolated and proved dead” is still in force; record that it was lifted.".to_owned()]
        }
        Condition::IsolationInForce | Condition::IsolationLifted => Vec::new(),
        Condition::NoFindingStopsStartUp => record.map_or_else(Vec::new, stopping),
        Condition::ChecksJudged { checks } => checks.iter().filter_map(|check| unjudged(view, check, agenda)).collect(),
    }
}

fn stopping(record: &Record) -> Vec<String> {
    let open = record.findings.values().filter(|f| f.is_open() && f.severity == Severity::StopsStartUp);
    let mut numbers: Vec<u32> = open.map(|f| f.number).collect();
    numbers.sort_unstable();
    numbers.iter().map(|n| format!("Finding {n} stops start-up and is open.")).collect()
}

/// What is wrong with a check at the steps that show it, unless those were settled otherwise.
fn unjudged(view: &View<'_>, check: &str, agenda: &Agenda) -> Option<String> {
    let counts = |id: &str| {
        let state = agenda.step(id).map(|(_, s)| &s.state);
        state.is_some_and(|s| !matches!(s, StepState::NotApplicable(_) | StepState::CouldNotBeDone(_)))
    };
    let showing = view.procedure.steps().map(|(_, s)| s).filter(|s| s.checks.iter().any(|c| c == check));
    showing.filter(|s| counts(&s.id)).find_map(|step| {
        let judged = judge::step(view, &step.id);
        let outcomes: Vec<&Judged> = judged.iter().filter(|j| j.outcome.check == check).collect();
        let at = format!("at “{}”", step.title);
        if outcomes.is_empty() {
            return Some(format!("The check {check} {at} has not been judged."));
        }
        let first = |verdict| outcomes.iter().find(|j| j.outcome.verdict == verdict);
        let bad = first(Verdict::Outside).or_else(|| first(Verdict::NotAssessed))?;
        Some(format!("The check {check} {at} is {}: {}", bad.outcome.verdict.words(), bad.outcome.summary))
    })
}
