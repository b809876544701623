//! From an event of a drive's chain to the next state of the drive and its record.

mod closing;
mod record;

use super::{ApplyError, misfit, recorded};
use crate::journal::{Chain, Event, Fact, Head};
use crate::record::{Drive, Record};
use std::collections::BTreeMap;

/// Applies an event of a drive's chain; `head` is the chain's head after this event.
///
/// # Errors
/// When the event does not fit.
pub fn to_drive(drive: &mut Option<Drive>, event: &Event, head: &Head) -> Result<(), ApplyError> {
    let Chain::Drive(id) = event.chain else { return Err(misfit(event, "it belongs to another chain")) };
    if let Fact::DriveCreated { site, tag, name } = &event.fact {
        if drive.is_some() {
            return Err(misfit(event, "the drive exists already"));
        }
        *drive = Some(Drive {
            id,
            site: *site,
            tag: tag.clone(),
            name: name.clone(),
            fields: BTreeMap::new(),
            record: None,
            head: head.clone(),
            last_change: event.received,
        });
        return Ok(());
    }
    let Some(drive) = drive.as_mut().filter(|d| d.id == id) else {
        return Err(misfit(event, "the drive does not exist yet"));
    };
    match &event.fact {
        Fact::FieldSet { place, value } => {
            let value = recorded(value.clone(), event, head.sequence);
            drive.fields.entry(place.clone()).or_default().put(value, &event.supersedes);
            if let Some(record) = &mut drive.record {
                record.contributors.insert(event.person);
            }
        }
        Fact::RecordBegun { procedure } => {
            if drive.record.is_some() {
                return Err(misfit(event, "the record was begun already"));
            }
            drive.record = Some(Record::begun(*procedure, event.received, &event.person_name));
        }
        _ => {
            let Some(kept) = drive.record.as_mut() else {
                return Err(misfit(event, "the record was not begun yet"));
            };
            record::apply(kept, event, head.sequence)?;
        }
    }
    drive.head = head.clone();
    drive.last_change = event.received;
    Ok(())
}
