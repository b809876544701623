//! Where a hold point stands: which of its conditions are not met, and whether it is released.

use super::{Agenda, HoldAgenda, StepState};
use crate::judge::catalogue::title;
use crate::judge::{self, View};
use crate::procedure::{Condition, Phase, Step};
use crate::record::{FindingState, Record, Severity, functions};
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
        asked.for_each(|c| unmet.extend(unmet_of(view, c, agenda, &phase.id)));
    }
    let open = released.is_some() && unmet.is_empty();
    Some(HoldAgenda { title: hold.title.clone(), unmet, released, open })
}

/// Whether a condition must keep holding after the release.
const fn must_keep(condition: &Condition) -> bool {
    matches!(condition, Condition::IsolationInForce | Condition::NoFindingStopsStartUp | Condition::NoneOutside { .. })
}

/// What keeps a condition of the hold point before a phase from being met, a sentence each; empty where it is met.
/// `agenda` is that of the same view.
#[must_use]
pub fn unmet_of(view: &View<'_>, condition: &Condition, agenda: &Agenda, before: &str) -> Vec<String> {
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
        Condition::ChecksJudged { checks } => {
            checks.iter().filter_map(|check| unjudged(view, check, agenda, before)).collect()
        }
        Condition::NoneOutside { checks } => {
            checks.iter().flat_map(|check| outside(view, check, agenda, before)).collect()
        }
    }
}

fn stopping(record: &Record) -> Vec<String> {
    let open = record.findings.values().filter(|f| f.is_open() && f.severity == Severity::StopsStartUp);
    let mut numbers: Vec<u32> = open.map(|f| f.number).collect();
    numbers.sort_unstable();
    numbers.iter().map(|n| format!("Finding {n} stops start-up and is open.")).collect()
}

/// Whether a step's verdicts count. What does not apply is left out; so is a step that was settled otherwise, unless
/// something was measured at it: a reading is not unmade by calling its step not applicable.
pub(crate) fn counts(view: &View<'_>, agenda: &Agenda, step: &Step) -> bool {
    match agenda.step(&step.id).map(|(_, s)| &s.state) {
        None => false,
        Some(StepState::NotApplicable(_) | StepState::CouldNotBeDone(_)) => measured(view, step),
        Some(_) => true,
    }
}

/// The steps ahead of a phase that show a check, and count.
fn showing<'a>(view: &View<'a>, check: &str, agenda: &Agenda, before: &str) -> Vec<&'a Step> {
    let ahead = view.procedure.phases.iter().take_while(|p| p.id != before);
    ahead.flat_map(|p| &p.steps).filter(|s| s.checks.iter().any(|c| c == check) && counts(view, agenda, s)).collect()
}

/// Whether any entry stands at a step.
fn measured(view: &View<'_>, step: &Step) -> bool {
    let Some(record) = view.drive.record.as_ref() else { return false };
    let own = record.entries.iter().filter(|(place, _)| step.items.iter().any(|i| i.key == place.item));
    own.into_iter().any(|(_, slot)| !slot.standing().is_empty())
}

/// What is wrong with a check at the steps that show it.
fn unjudged(view: &View<'_>, check: &str, agenda: &Agenda, before: &str) -> Option<String> {
    showing(view, check, agenda, before).into_iter().find_map(|step| {
        let outcomes = judge::run(view, check, &step.id);
        let named = format!("“{}” at “{}”", title(check), step.title);
        if outcomes.is_empty() {
            return Some(format!("{named} has not been judged."));
        }
        let first = |verdict| outcomes.iter().find(|j| j.outcome.verdict == verdict);
        let bad = first(Verdict::Outside).or_else(|| first(Verdict::NotAssessed))?;
        Some(format!("{named} is {}: {}", bad.outcome.verdict.words(), bad.outcome.summary))
    })
}

/// Every outside verdict of a check, each said once, unless it was accepted by name.
fn outside(view: &View<'_>, check: &str, agenda: &Agenda, before: &str) -> Vec<String> {
    let steps = showing(view, check, agenda, before);
    let mut sentences: Vec<String> = Vec::new();
    let mut said: Vec<String> = Vec::new();
    for step in &steps {
        for one in judge::run(view, check, &step.id) {
            let summary = one.outcome.summary;
            if one.outcome.verdict != Verdict::Outside || said.contains(&summary) {
                continue;
            }
            let of = if one.of.is_empty() { String::new() } else { format!(" ({})", one.of) };
            sentences.push(format!(
                "“{name}”{of} at “{at}” is outside: {summary} Put it right, or raise a finding at that step that names “{name}” and have it accepted by name.",
                name = title(check),
                at = step.title
            ));
            said.push(summary);
        }
    }
    if !sentences.is_empty() && accepted(view, check, &steps) { Vec::new() } else { sentences }
}

/// Whether a finding that names the check, raised at a step that shows it, was accepted after all that was entered there.
fn accepted(view: &View<'_>, check: &str, steps: &[&Step]) -> bool {
    let Some(record) = view.drive.record.as_ref() else { return false };
    let name = title(check).to_lowercase();
    let newest = steps.iter().filter_map(|step| newest(view, record, step)).max().unwrap_or(0);
    record.findings.values().any(|f| {
        let here = f.step.as_ref().is_some_and(|at| steps.iter().any(|s| s.id == *at));
        let by_name = matches!(f.state, FindingState::Accepted { sequence, .. } if sequence > newest);
        here && by_name && f.text.to_lowercase().contains(&name)
    })
}

/// The place in the drive's chain of the last thing that a verdict at a step can rest on: the step's readings and
/// settings, and every sheet, since a check at one sheet takes figures from the others.
pub(crate) fn newest(view: &View<'_>, record: &Record, step: &Step) -> Option<u64> {
    let entries = record.entries.iter().filter(|(place, _)| step.items.iter().any(|i| i.key == place.item));
    let entries = entries.flat_map(|(_, slot)| slot.standing().iter().map(|r| r.sequence));
    let fields = view.drive.fields.values().flat_map(|slot| slot.standing().iter().map(|r| r.sequence));
    let group = step.parameters.as_deref();
    // The last look at all settings (`*`) is no new setting.
    let ours = |function: &str| functions::find(function).is_some_and(|f| Some(f.group) == group);
    let settings = record.parameters.iter().filter(|(place, _)| ours(&place.function));
    let settings = settings.flat_map(|(_, slot)| slot.standing().iter().map(|r| r.sequence));
    entries.chain(fields).chain(settings).max()
}
