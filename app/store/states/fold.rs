//! Folds a chain to the state it comes to.

use super::chains::{head_of, sealed_of};
use super::shelf::{Shelf, Shelves};
use crate::fault::Fault;
use crate::work::Desk;
use commissioning::journal::{Chain, Event, Head, Sealed};
use commissioning::people::Installation;
use commissioning::plant::Site;
use commissioning::record::{Drive, apply};
use commissioning::{DriveId, SiteId};
use rusqlite::Connection;
use std::sync::Arc;

/// A state that events bring about.
pub(crate) trait Fold: Sized + Clone {
    /// The state after one more event.
    fn after(state: &mut Option<Self>, event: &Event, head: &Head) -> Result<(), Fault>;

    /// Where such states are kept.
    fn shelf(shelves: &Shelves) -> &Shelf<Self>;
}

impl Fold for Installation {
    fn after(state: &mut Option<Self>, event: &Event, _: &Head) -> Result<(), Fault> {
        apply::to_installation(state.get_or_insert_default(), event).map_err(|e| Fault::Broken(e.to_string()))
    }

    fn shelf(shelves: &Shelves) -> &Shelf<Self> {
        &shelves.installation
    }
}

impl Fold for Site {
    fn after(state: &mut Option<Self>, event: &Event, _: &Head) -> Result<(), Fault> {
        apply::to_site(state, event).map_err(|e| Fault::Broken(e.to_string()))
    }

    fn shelf(shelves: &Shelves) -> &Shelf<Self> {
        &shelves.sites
    }
}

impl Fold for Drive {
    fn after(state: &mut Option<Self>, event: &Event, head: &Head) -> Result<(), Fault> {
        apply::to_drive(state, event, head).map_err(|e| Fault::Broken(e.to_string()))
    }

    fn shelf(shelves: &Shelves) -> &Shelf<Self> {
        &shelves.drives
    }
}

/// Folds events from nothing.
pub(crate) fn fold_all<T: Fold>(events: &[Sealed]) -> Result<Option<T>, Fault> {
    let mut state = None;
    for sealed in events {
        T::after(&mut state, &sealed.event()?, &sealed.head())?;
    }
    Ok(state)
}

/// The state of a chain as a connection sees it now; folded only when its head is not on the shelf.
pub(crate) fn state<T: Fold>(
    connection: &Connection,
    shelves: &Shelves,
    chain: Chain,
) -> Result<Option<Arc<T>>, Fault> {
    let head = head_of(connection, chain)?;
    if head.sequence == 0 {
        return Ok(None);
    }
    let shelf = T::shelf(shelves);
    if let Some(state) = shelf.get(chain, &head) {
        return Ok(Some(state));
    }
    let Some(state) = fold_all::<T>(&sealed_of(connection, chain)?)?.map(Arc::new) else { return Ok(None) };
    shelf.put(chain, &head, Arc::clone(&state));
    Ok(Some(state))
}

impl Desk {
    /// The state of a chain as this connection sees it now.
    pub(crate) fn state<T: Fold>(&self, chain: Chain) -> Result<Option<Arc<T>>, Fault> {
        state(&self.connection, &self.shelves, chain)
    }

    /// People, instruments, procedures, list of sites; empty before set-up.
    pub(crate) fn installation(&self) -> Result<Arc<Installation>, Fault> {
        Ok(self.state(Chain::Installation)?.unwrap_or_default())
    }

    /// A site.
    pub(crate) fn site(&self, id: SiteId) -> Result<Option<Arc<Site>>, Fault> {
        self.state(Chain::Site(id))
    }

    /// A drive.
    pub(crate) fn drive(&self, id: DriveId) -> Result<Option<Arc<Drive>>, Fault> {
        self.state(Chain::Drive(id))
    }
}
