//! Raising, settling and accepting findings.

use super::Surroundings;
use super::words;
use super::writer::Writer;
use crate::journal::{Act, Chain, Event, Fact};
use crate::record::{Finding, FindingState, Record, Severity, Status};
use crate::{FindingId, Refusal};

/// The number of the next finding of a record.
pub(super) fn next_number(record: &Record) -> u32 {
    record.findings.values().map(|f| f.number).max().unwrap_or(0) + 1
}

/// Raises a finding.
pub(super) fn raise(
    act: &Act,
    around: &Surroundings<'_>,
    finding: FindingId,
    severity: Severity,
    text: &str,
    step: Option<&str>,
) -> Result<Vec<Event>, Refusal> {
    let (drive, record) = around.record_in_progress(act)?;
    let view = around.view(drive, record)?;
    if record.findings.contains_key(&finding) {
        return Err(Refusal::not_now("This finding was raised already."));
    }
    if let Some(step) = step.filter(|s| view.procedure.step(s).is_none()) {
        return Err(Refusal::Unknown { what: format!("The step “{}”", crate::typed::shorten(step)) });
    }
    let text = words::passage(text, "what is wrong or open").map_err(|m| Refusal::field("text", "finding", m))?;
    let mut writer = Writer::new(act, around);
    let (number, step) = (next_number(record), step.map(str::to_owned));
    writer.add(Chain::Drive(drive.id), Fact::FindingRaised { finding, number, severity, text, step });
    Ok(writer.done())
}

/// Settles a finding: it was put right.
pub(super) fn settle(
    act: &Act,
    around: &Surroundings<'_>,
    finding: FindingId,
    how: &str,
) -> Result<Vec<Event>, Refusal> {
    let (drive, record) = around.record_in_progress(act)?;
    open(record, finding)?;
    let how = words::passage(how, "what was done").map_err(|m| Refusal::field("how", "what was done", m))?;
    let mut writer = Writer::new(act, around);
    writer.add(Chain::Drive(drive.id), Fact::FindingSettled { finding, how });
    Ok(writer.done())
}

/// Accepts a finding as it is, by name and with a reason; also while the record waits for review.
pub(super) fn accept(
    act: &Act,
    around: &Surroundings<'_>,
    finding: FindingId,
    reason: &str,
) -> Result<Vec<Event>, Refusal> {
    let (drive, record) = around.record(act)?;
    if !matches!(record.status, Status::Signed { .. }) {
        super::in_progress(record)?;
    }
    open(record, finding)?;
    let reason = words::reason(reason, "why it may stay")?;
    let mut writer = Writer::new(act, around);
    writer.add_over(Chain::Drive(drive.id), Fact::FindingAccepted { finding }, Vec::new(), &reason);
    Ok(writer.done())
}

fn open(record: &Record, finding: FindingId) -> Result<&Finding, Refusal> {
    let known = record.findings.get(&finding);
    let known = known.ok_or_else(|| Refusal::Unknown { what: "This finding".to_owned() })?;
    match &known.state {
        FindingState::Open => Ok(known),
        FindingState::Settled { by_name, .. } => Err(Refusal::not_now(format!(
            "{by_name} settled this finding already. Raise a new one if it is open again."
        ))),
        FindingState::Accepted { by_name, .. } => {
            Err(Refusal::not_now(format!("{by_name} accepted this finding already.")))
        }
    }
}
