//! From an event of a site's chain to the next state of the site.

use super::{ApplyError, misfit, recorded};
use crate::journal::{Chain, Event, Fact};
use crate::plant::Site;
use std::collections::BTreeMap;

/// Applies an event of a site's chain.
///
/// # Errors
/// When the event does not fit.
pub fn to_site(site: &mut Option<Site>, event: &Event) -> Result<(), ApplyError> {
    let Chain::Site(id) = event.chain else { return Err(misfit(event, "it belongs to another chain")) };
    if let Fact::SiteCreated { tag, name } = &event.fact {
        if site.is_some() {
            return Err(misfit(event, "the site exists already"));
        }
        *site = Some(Site {
            id,
            tag: tag.clone(),
            name: name.clone(),
            fields: BTreeMap::new(),
            drives: BTreeMap::new(),
            events: 1,
            last_change: event.received,
        });
        return Ok(());
    }
    let Some(site) = site.as_mut().filter(|s| s.id == id) else {
        return Err(misfit(event, "the site does not exist yet"));
    };
    match &event.fact {
        Fact::SiteFieldSet { place, value } => {
            let value = recorded(value.clone(), event, site.events + 1);
            site.fields.entry(place.clone()).or_default().put(value, &event.supersedes);
        }
        Fact::DriveListed { drive, tag } => {
            site.drives.insert(tag.clone(), *drive);
        }
        _ => return Err(misfit(event, "it is not about a site")),
    }
    site.events += 1;
    site.last_change = event.received;
    Ok(())
}
