//! Whether the readings of an isolation step prove it dead: a live or unmeasured bus or terminal keeps isolation out of
//! force.

use super::Surroundings;
use crate::Refusal;
use crate::journal::Event;
use crate::judge;
use crate::procedure::Step;
use engineering::Verdict;

/// What speaks against isolation once these events have happened: every verdict at the step that is outside or not
/// assessed, in its own words; `None` when nothing does.
pub(super) fn against(around: &Surroundings<'_>, step: &Step, events: &[Event]) -> Result<Option<String>, Refusal> {
    let drive = super::outside::after(around, events)?;
    let Some(drive) = drive else { return Ok(None) };
    let Some(record) = drive.record.as_ref() else { return Ok(None) };
    let view = around.view(&drive, record)?;
    let judged = judge::step(&view, &step.id);
    let bad = judged.iter().filter(|j| matches!(j.outcome.verdict, Verdict::Outside | Verdict::NotAssessed));
    let said: Vec<&str> = bad.map(|j| j.outcome.summary.as_str()).collect();
    Ok((!said.is_empty()).then(|| said.join(" ")))
}
