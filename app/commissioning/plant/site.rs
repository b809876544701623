//! A site: its own fields and the tags of its drives; the fold of the site's chain.

use super::{Place, Slot};
use crate::{DriveId, SiteId, Timestamp, Typed};
use std::collections::BTreeMap;

/// A site.
#[derive(Clone, Debug, PartialEq)]
pub struct Site {
    /// Never reused.
    pub id: SiteId,
    /// Short tag used in addresses: `larch-ferry`.
    pub tag: String,
    /// Name.
    pub name: String,
    /// Fields of the site and supply sheets. `None` inside a slot is a value taken back.
    pub fields: BTreeMap<Place, Slot<Option<Typed>>>,
    /// Its drives by plant tag.
    pub drives: BTreeMap<String, DriveId>,
    /// How many events its chain has.
    pub events: u64,
    /// When its chain was last added to.
    pub last_change: Timestamp,
}
