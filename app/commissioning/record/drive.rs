//! A drive and its record, as they stand after the last event of the drive's chain.

use super::canonical::SitePart;
use super::entry::{Entry, EntryPlace, Isolation, OnceOtherwise, Release, SettledOtherwise};
use super::finding::Finding;
use super::parameter::ParameterPlace;
use super::sign::Signature;
use crate::journal::Head;
use crate::judge::Judged;
use crate::plant::{Place, Recorded, Slot};
use crate::{DriveId, FindingId, PersonId, SiteId, Timestamp, Typed};
use serde::{Deserialize, Serialize};
use std::collections::{BTreeMap, BTreeSet};

/// A drive: known by its plant tag, owns one record at a time.
#[derive(Clone, Debug, PartialEq)]
pub struct Drive {
    /// Never reused.
    pub id: DriveId,
    /// Its site.
    pub site: SiteId,
    /// Plant tag.
    pub tag: String,
    /// What it drives, in words: "Return-air fan, dryer 2".
    pub name: String,
    /// Its plates and sheets. `None` inside a slot is a value taken back.
    pub fields: BTreeMap<Place, Slot<Option<Typed>>>,
    /// Its record, once begun.
    pub record: Option<Record>,
    /// Last event of its chain.
    pub head: Head,
    /// When its chain was last added to.
    pub last_change: Timestamp,
}

/// A record: one commissioning of one drive.
#[derive(Clone, Debug, PartialEq)]
pub struct Record {
    /// Rises with each reopening.
    pub revision: u32,
    /// The procedure version it began with.
    pub procedure: u32,
    /// When it was begun.
    pub begun: Timestamp,
    /// Who began it.
    pub begun_by: String,
    /// Where it stands.
    pub status: Status,
    /// What was recorded at the steps.
    pub entries: BTreeMap<EntryPlace, Slot<Entry>>,
    /// Steps settled otherwise, with the reason as value.
    pub otherwise: BTreeMap<String, Recorded<(SettledOtherwise, String)>>,
    /// Steps that were settled otherwise once and no longer are so, oldest first.
    pub once_otherwise: Vec<OnceOtherwise>,
    /// Every stretch of isolation, oldest first; in force when the last is not lifted.
    pub isolations: Vec<Isolation>,
    /// Hold points released, by phase.
    pub releases: BTreeMap<String, Release>,
    /// Directions observed before this moment count as not observed.
    pub directions_void_before: Option<Timestamp>,
    /// The same as a place in the drive's chain: entries up to it count as not observed.
    pub directions_void_upto: u64,
    /// The parameter record.
    pub parameters: BTreeMap<ParameterPlace, Slot<Option<Typed>>>,
    /// Free rows of the parameter record, key and label, in order.
    pub free_rows: Vec<(String, String)>,
    /// Findings, in order of number.
    pub findings: BTreeMap<FindingId, Finding>,
    /// Every signature ever put, superseded ones too.
    pub signatures: Vec<Signature>,
    /// Verdicts frozen at the last signing; `None` while in progress.
    pub frozen: Option<Vec<Judged>>,
    /// The site as it was at the last signing; `None` while in progress.
    pub frozen_site: Option<SitePart>,
    /// Remarks by step, oldest first; the step `""` is the whole record.
    pub remarks: Vec<(String, Recorded<String>)>,
    /// Everyone who entered a plate value, reading, confirmation, choice or parameter while the record was begun, settled
    /// a step otherwise, or signed as performer: they cannot accept.
    pub contributors: BTreeSet<PersonId>,
    /// Returns and reopenings: revision, what happened, with reason.
    pub history: Vec<Recorded<Turn>>,
    /// Whether anything of this record was ever signed: overwriting then needs a reason.
    pub ever_signed: bool,
}

/// A turn in the life of a record.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(tag = "turn", content = "with", rename_all = "kebab-case")]
pub enum Turn {
    /// Signed by the engineer.
    Signed,
    /// Sent back with a reason.
    Returned(String),
    /// Accepted.
    Accepted,
    /// Reopened with a reason, as this revision.
    Reopened(String, u32),
}

/// Where a record stands.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(tag = "state", rename_all = "kebab-case", deny_unknown_fields)]
pub enum Status {
    /// Being worked on.
    InProgress {
        /// Why it was sent back, when it was.
        returned: Option<String>,
    },
    /// Signed by the engineer, waits for review.
    Signed {
        /// When.
        at: Timestamp,
    },
    /// Accepted by a supervisor.
    Accepted {
        /// When.
        at: Timestamp,
    },
}

impl Status {
    /// As screens name it.
    #[must_use]
    pub const fn words(&self) -> &'static str {
        match self {
            Self::InProgress { returned: None } => "in progress",
            Self::InProgress { returned: Some(_) } => "returned",
            Self::Signed { .. } => "signed, waits for review",
            Self::Accepted { .. } => "accepted",
        }
    }
}

impl Drive {
    /// Fitted options, as the procedure's `when` names them: a flag that is yes gives its key; a choice gives
    /// `key:value` and, unless the value is `none` or `no`, its key; the kind of load gives `load:<kind>` besides.
    #[must_use]
    pub fn flags(&self) -> BTreeSet<String> {
        crate::plant::flags_of(&self.fields)
    }

    /// The standing value of a field; `None` when empty, taken back, or in need of a choice.
    #[must_use]
    pub fn field(&self, place: &Place) -> Option<&Typed> {
        self.fields.get(place)?.current()?.value.as_ref()
    }
}

impl Record {
    /// A record just begun.
    #[must_use]
    pub fn begun(procedure: u32, begun: Timestamp, begun_by: &str) -> Self {
        Self {
            revision: 1,
            procedure,
            begun,
            begun_by: begun_by.to_owned(),
            status: Status::InProgress { returned: None },
            entries: BTreeMap::new(),
            otherwise: BTreeMap::new(),
            once_otherwise: Vec::new(),
            isolations: Vec::new(),
            releases: BTreeMap::new(),
            directions_void_before: None,
            directions_void_upto: 0,
            parameters: BTreeMap::new(),
            free_rows: Vec::new(),
            findings: BTreeMap::new(),
            signatures: Vec::new(),
            frozen: None,
            frozen_site: None,
            remarks: Vec::new(),
            contributors: BTreeSet::new(),
            history: Vec::new(),
            ever_signed: false,
        }
    }

    /// The standing entry at a place, unless it is a direction observed before leads or channels were exchanged:
    /// such a one counts as not observed. What a check may look at.
    #[must_use]
    pub fn observed(&self, place: &EntryPlace) -> Option<&Recorded<Entry>> {
        self.entry(place).filter(|e| !place.is_direction() || e.sequence > self.directions_void_upto)
    }

    /// The standing entry at a place.
    #[must_use]
    pub fn entry(&self, place: &EntryPlace) -> Option<&Recorded<Entry>> {
        self.entries.get(place)?.current()
    }

    /// The standing value of a parameter.
    #[must_use]
    pub fn parameter(&self, place: &ParameterPlace) -> Option<&Typed> {
        self.parameters.get(place)?.current()?.value.as_ref()
    }

    /// Whether "isolated and proved dead" is in force.
    #[must_use]
    pub fn isolated(&self) -> bool {
        self.isolations.last().is_some_and(|i| i.lifted.is_none())
    }
}
