//! Whether the readings of an isolation step prove it dead: a live or unmeasured bus or terminal keeps isolation out of
//! force.

use super::Surroundings;
use crate::Refusal;
use crate::journal::{Event, Head};
use crate::judge;
use crate::procedure::Step;
use crate::record::apply;
use engineering::Verdict;

/// What speaks against isolation once these events have happened: every verdict at the step that is outside or not
/// assessed, in its own words; `None` when nothing does.
pub(super) fn against(around: &Surroundings<'_>, step: &Step, events: &[Event]) -> Result<Option<String>, Refusal> {
    let mut drive = around.drive.cloned();
    let mut head = drive.as_ref().map_or_else(Head::empty, |d| d.head.clone());
    for event in events {
        head.sequence += 1;
        apply::to_drive(&mut drive, event, &head).map_err(|fault| Refusal::not_now(fault.to_string()))?;
    }
    let Some(drive) = drive else { return Ok(None) };
    let Some(record) = drive.record.as_ref() else { return Ok(None) };
    let view = around.view(&drive, record)?;
    let judged = judge::step(&view, &step.id);
    let bad = judged.iter().filter(|j| matches!(j.outcome.verdict, Verdict::Outside | Verdict::NotAssessed));
    let said: Vec<&str> = bad.map(|j| j.outcome.summary.as_str()).collect();
    Ok((!said.is_empty()).then(|| said.join(" ")))
}
