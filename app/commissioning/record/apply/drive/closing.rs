//! From an event to the next state of a record: findings, signatures, returns, reopenings.

use super::super::{ApplyError, misfit, recorded};
use crate::journal::{Event, Fact};
use crate::record::{Finding, FindingState, Meaning, Record, Signature, Status, Turn};

/// Applies what is about a finding.
pub(super) fn finding(record: &mut Record, event: &Event, sequence: u64) -> Result<(), ApplyError> {
    let (by_name, received) = (event.person_name.clone(), event.received);
    match &event.fact {
        Fact::FindingRaised { finding, number, severity, text, step } => {
            let raised = Finding {
                id: *finding,
                number: *number,
                severity: *severity,
                text: text.clone(),
                step: step.clone(),
                by_name,
                received,
                state: FindingState::Open,
            };
            record.findings.entry(*finding).or_insert(raised);
        }
        Fact::FindingSettled { finding, how } => {
            let state = FindingState::Settled { how: how.clone(), by_name, received, sequence };
            known(record, finding, event)?.state = state;
        }
        Fact::FindingAccepted { finding } => {
            let reason = event.reason.clone().unwrap_or_default();
            known(record, finding, event)?.state = FindingState::Accepted { reason, by_name, received, sequence };
        }
        _ => return Err(misfit(event, "it is not about a finding")),
    }
    Ok(())
}

fn known<'a>(record: &'a mut Record, id: &crate::FindingId, event: &Event) -> Result<&'a mut Finding, ApplyError> {
    record.findings.get_mut(id).ok_or_else(|| misfit(event, "its finding was never raised"))
}

/// Applies a turn in the life of a record.
pub(super) fn turn(record: &mut Record, event: &Event, sequence: u64) -> Result<(), ApplyError> {
    let reason = event.reason.clone().unwrap_or_default();
    let turn = match &event.fact {
        Fact::Signed { meaning, .. } => {
            sign(record, event);
            match meaning {
                Meaning::Performed => Turn::Signed,
                Meaning::Accepted => Turn::Accepted,
            }
        }
        Fact::Returned => {
            open_again(record);
            record.status = Status::InProgress { returned: Some(reason.clone()) };
            Turn::Returned(reason)
        }
        Fact::Reopened { revision } => {
            open_again(record);
            record.status = Status::InProgress { returned: None };
            record.revision = *revision;
            Turn::Reopened(reason, *revision)
        }
        _ => return Err(misfit(event, "it is no turn in the life of a record")),
    };
    record.history.push(recorded(turn, event, sequence));
    Ok(())
}

fn sign(record: &mut Record, event: &Event) {
    let Fact::Signed { meaning, revision, digest, head, catalogue, verdicts, site } = &event.fact else { return };
    record.signatures.push(Signature {
        meaning: *meaning,
        person: event.person,
        printed_name: event.person_name.clone(),
        received: event.received,
        revision: *revision,
        digest: digest.clone(),
        head: head.clone(),
        catalogue: *catalogue,
        superseded: false,
    });
    record.frozen = Some(verdicts.clone());
    record.frozen_site = Some((**site).clone());
    record.ever_signed = true;
    record.status = match meaning {
        Meaning::Performed => {
            record.contributors.insert(event.person);
            Status::Signed { at: event.received }
        }
        Meaning::Accepted => Status::Accepted { at: event.received },
    };
}

/// Earlier signatures stay, as superseded ones; verdicts are judged afresh.
fn open_again(record: &mut Record) {
    record.signatures.iter_mut().for_each(|s| s.superseded = true);
    record.frozen = None;
    record.frozen_site = None;
}
