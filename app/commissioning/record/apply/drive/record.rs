//! From an event to the next state of a record: entries, isolation, hold points, parameters.

use super::super::{ApplyError, misfit, recorded};
use super::closing;
use crate::journal::{Event, Fact};
use crate::record::{Isolation, OnceOtherwise, Record, Release};

/// Applies an event that is about a record; `sequence` is its place in the chain.
pub(super) fn apply(record: &mut Record, event: &Event, sequence: u64) -> Result<(), ApplyError> {
    match &event.fact {
        Fact::EntryMade { place, entry, .. } => {
            let entry = recorded(entry.clone(), event, sequence);
            record.entries.entry(place.clone()).or_default().put(entry, &event.supersedes);
            record.contributors.insert(event.person);
        }
        Fact::EntryTakenBack { place, .. } => {
            let by = recorded((), event, sequence);
            record.entries.entry(place.clone()).or_default().take_back(by, &event.supersedes);
            record.contributors.insert(event.person);
        }
        Fact::StepSettled { step, how } => {
            let reason = event.reason.clone().unwrap_or_default();
            end_otherwise(record, step, event, sequence);
            record.otherwise.insert(step.clone(), recorded((*how, reason), event, sequence));
            record.contributors.insert(event.person);
        }
        Fact::StepResumed { step } => end_otherwise(record, step, event, sequence),
        Fact::IsolationEntered { step } => enter_isolation(record, step, event, sequence),
        Fact::IsolationLifted { .. } => lift_isolation(record, event, sequence),
        Fact::DirectionsVoided { .. } => {
            record.directions_void_before = Some(event.received);
            record.directions_void_upto = sequence;
        }
        Fact::HoldReleased { phase, role, printed_name } => {
            let release = Release {
                phase: phase.clone(),
                role: *role,
                printed_name: printed_name.clone(),
                by_name: event.person_name.clone(),
                received: event.received,
            };
            record.releases.insert(phase.clone(), release);
        }
        Fact::ParameterSet { place, value } => {
            let value = recorded(value.clone(), event, sequence);
            record.parameters.entry(place.clone()).or_default().put(value, &event.supersedes);
            record.contributors.insert(event.person);
        }
        Fact::ParameterRowAdded { key, label } => {
            if !record.free_rows.iter().any(|(k, _)| k == key) {
                record.free_rows.push((key.clone(), label.clone()));
            }
        }
        Fact::RemarkMade { step, text } => {
            record.remarks.push((step.clone(), recorded(text.clone(), event, sequence)));
        }
        Fact::FindingRaised { .. } | Fact::FindingSettled { .. } | Fact::FindingAccepted { .. } => {
            return closing::finding(record, event, sequence);
        }
        Fact::Signed { .. } | Fact::Returned | Fact::Reopened { .. } => {
            return closing::turn(record, event, sequence);
        }
        _ => return Err(misfit(event, "it is not about a drive")),
    }
    Ok(())
}

/// What a step was settled as stays readable when it no longer is.
fn end_otherwise(record: &mut Record, step: &str, event: &Event, sequence: u64) {
    if let Some(settled) = record.otherwise.remove(step) {
        let ended = recorded((), event, sequence);
        record.once_otherwise.push(OnceOtherwise { step: step.to_owned(), settled, ended });
    }
}

fn enter_isolation(record: &mut Record, step: &str, event: &Event, sequence: u64) {
    if !record.isolated() {
        record.isolations.push(Isolation {
            step: step.to_owned(),
            by_name: event.person_name.clone(),
            from: event.received,
            from_sequence: sequence,
            lifted: None,
            lifted_sequence: 0,
        });
    }
}

fn lift_isolation(record: &mut Record, event: &Event, sequence: u64) {
    if let Some(last) = record.isolations.last_mut().filter(|i| i.lifted.is_none()) {
        last.lifted = Some((event.received, event.person_name.clone()));
        last.lifted_sequence = sequence;
    }
}
