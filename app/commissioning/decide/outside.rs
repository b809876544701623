//! Outside verdicts and the findings they stand in: the program raises that of a stop, and nobody signs without one.

use super::writer::Writer;
use super::{Surroundings, findings};
use crate::Refusal;
use crate::agenda;
use crate::journal::{Chain, Event, Fact, Head};
use crate::judge::{self, View, catalogue::title};
use crate::procedure::Step;
use crate::record::{Drive, Finding, Record, Severity, apply};
use engineering::Verdict;

/// Checks of a stop function: one that is outside is raised by the program, whoever saw it.
const STOPS: &[&str] = &["stop-time"];

/// Raises the finding of every stop at this step that is outside once the events so far have happened, unless a finding
/// of at least the same weight that names it is open there.
pub(super) fn raise_stops(
    writer: &mut Writer<'_>,
    around: &Surroundings<'_>,
    record: &Record,
    step: &Step,
) -> Result<(), Refusal> {
    let stops = || step.checks.iter().filter(|c| STOPS.contains(&c.as_str()));
    if stops().next().is_none() {
        return Ok(());
    }
    let Some(drive) = after(around, writer.so_far())? else { return Ok(()) };
    let Some(then) = drive.record.as_ref() else { return Ok(()) };
    let view = around.view(&drive, then)?;
    for name in stops() {
        for one in judge::run(&view, name, &step.id) {
            let named = |f: &Finding| f.is_open() && f.severity >= Severity::BeforeHandover && names(f, &step.id, name);
            if one.outcome.verdict != Verdict::Outside || then.findings.values().any(named) {
                continue;
            }
            let text = format!("“{}” at “{}” is outside: {}", title(name), step.title, one.outcome.summary);
            let finding = writer.finding(record, name, &step.id);
            let (number, severity, step) =
                (findings::next_number(then), Severity::BeforeHandover, Some(step.id.clone()));
            writer.add(Chain::Drive(drive.id), Fact::FindingRaised { finding, number, severity, text, step });
        }
    }
    Ok(())
}

/// Every outside verdict of a step that counts stands in a finding of a step that shows it and that names it: one open
/// and at least to be closed before handover, or one closed after the last thing entered there.
pub(super) fn all_in_findings(view: &View<'_>, record: &Record) -> Result<(), Refusal> {
    let agenda = agenda::of(view);
    // The same outcome shown at several steps is one: what it was run for, and what it says.
    let mut shown: Vec<(&str, String, String, Vec<&Step>)> = Vec::new();
    for (_, step) in view.procedure.steps().filter(|(_, s)| agenda::counts(view, &agenda, s)) {
        for name in &step.checks {
            for one in judge::run(view, name, &step.id) {
                if one.outcome.verdict != Verdict::Outside {
                    continue;
                }
                let said = one.outcome.summary;
                match shown.iter_mut().find(|(n, of, s, _)| *n == name.as_str() && *of == one.of && *s == said) {
                    Some((.., steps)) => steps.push(step),
                    None => shown.push((name, one.of, said, vec![step])),
                }
            }
        }
    }
    let told = |name: &str, steps: &[&Step]| {
        let newest = steps.iter().filter_map(|s| agenda::newest(view, record, s)).max().unwrap_or(0);
        record.findings.values().any(|f| {
            let weighs = f.closed_at().map_or(f.severity >= Severity::BeforeHandover, |at| at > newest);
            weighs && steps.iter().any(|s| names(f, &s.id, name))
        })
    };
    let mut left: Vec<String> = Vec::new();
    for (name, _, said, steps) in shown.iter().filter(|(name, .., steps)| !told(name, steps)) {
        let at = steps.first().map_or("", |s| s.title.as_str());
        left.push(format!("“{}” at “{at}”: {said}", title(name)));
    }
    left.dedup();
    if left.is_empty() {
        return Ok(());
    }
    Err(Refusal::not_now(format!(
        "What is outside stands in no finding yet: {} Put it right, or raise a finding at that step that names the check, to be closed before handover.",
        left.join(" ")
    )))
}

/// Whether a finding stands at this step and names this check.
fn names(finding: &Finding, step: &str, check: &str) -> bool {
    finding.step.as_deref() == Some(step) && finding.text.to_lowercase().contains(&title(check).to_lowercase())
}

/// The drive once these events have happened.
pub(super) fn after(around: &Surroundings<'_>, events: &[Event]) -> Result<Option<Drive>, Refusal> {
    let mut drive = around.drive.cloned();
    let mut head = drive.as_ref().map_or_else(Head::empty, |d| d.head.clone());
    for event in events {
        head.sequence += 1;
        apply::to_drive(&mut drive, event, &head).map_err(|fault| Refusal::not_now(fault.to_string()))?;
    }
    Ok(drive)
}
