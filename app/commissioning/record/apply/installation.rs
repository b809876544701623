//! From an event of the installation's chain to the next state of people, instruments, procedures and sites.

use super::{ApplyError, misfit};
use crate::journal::{Chain, Event, Fact};
use crate::people::{Installation, KeyChange};
use std::sync::Arc;

/// Applies an event of the installation's chain.
///
/// # Errors
/// When the event does not fit.
pub fn to_installation(installation: &mut Installation, event: &Event) -> Result<(), ApplyError> {
    if event.chain != Chain::Installation {
        return Err(misfit(event, "it belongs to another chain"));
    }
    match &event.fact {
        Fact::SetUp { firm } => installation.firm.clone_from(firm),
        Fact::PersonKept { person } => {
            installation.people.insert(person.id, person.clone());
        }
        Fact::InstrumentKept { instrument } => {
            installation.instrument_seen.insert(instrument.id, event.id.clone());
            installation.instrument_kept.insert(instrument.id, (event.person_name.clone(), event.received));
            installation.instruments.insert(instrument.id, instrument.clone());
        }
        Fact::ProcedureLoaded { procedure } => {
            installation.procedures.insert(procedure.version, Arc::new((**procedure).clone()));
        }
        Fact::SiteListed { site, tag } => {
            installation.sites.insert(tag.clone(), *site);
        }
        Fact::KeyRotated { old, new, by_old, by_new } => installation.key_changes.push(KeyChange {
            old: old.clone(),
            new: new.clone(),
            by_old: by_old.clone(),
            by_new: by_new.clone(),
            by_name: event.person_name.clone(),
            received: event.received,
        }),
        _ => return Err(misfit(event, "it is not about the installation")),
    }
    installation.last_change = Some(event.received);
    Ok(())
}
