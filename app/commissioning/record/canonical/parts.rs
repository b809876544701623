//! The parts of record.json.

use crate::plant::{Place, Recorded, Site, Slot};
use crate::record::{
    Drive, Entry, EntryPlace, Finding, FindingState, Isolation, OnceOtherwise, ParameterPlace, Photo, Record, Release,
    SettledOtherwise, Signature, Status, Turn,
};
use crate::{DriveId, PersonId, SiteId, Timestamp, Typed};
use serde::{Deserialize, Serialize};
use std::collections::BTreeMap;

/// A field with its value, and what stood there before.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct FieldPart {
    /// Sheet, rating column, key.
    pub place: Place,
    /// What stands and what stood.
    pub slot: Slot<Option<Typed>>,
}

/// A site, as a record keeps it.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct SitePart {
    /// Never reused.
    pub id: SiteId,
    /// Short tag.
    pub tag: String,
    /// Name.
    pub name: String,
    /// Fields of the site and supply sheets, in order.
    pub fields: Vec<FieldPart>,
}

/// A drive without its record.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct DrivePart {
    /// Never reused.
    pub id: DriveId,
    /// Plant tag.
    pub tag: String,
    /// What it drives, in words.
    pub name: String,
    /// When its chain was last added to.
    pub last_change: Timestamp,
    /// Its plates and sheets, in order.
    pub fields: Vec<FieldPart>,
}

/// What was recorded at an item.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct EntryPart {
    /// Item and row.
    pub place: EntryPlace,
    /// What stands and what stood.
    pub slot: Slot<Entry>,
}

/// A step settled otherwise.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct OtherwisePart {
    /// Which step.
    pub step: String,
    /// How and why, by whom and when.
    pub settled: Recorded<(SettledOtherwise, String)>,
}

/// A value of the parameter record.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct ParameterPart {
    /// Function and column.
    pub place: ParameterPlace,
    /// What stands and what stood.
    pub slot: Slot<Option<Typed>>,
}

/// A free row of the parameter record.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct FreeRow {
    /// Its key: `row-1`.
    pub key: String,
    /// Its label.
    pub label: String,
}

/// A remark.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct RemarkPart {
    /// The step; empty for the whole record.
    pub step: String,
    /// Its text, by whom and when.
    pub remark: Recorded<String>,
}

/// A record.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct RecordPart {
    /// Rises with each reopening.
    pub revision: u32,
    /// When it was begun.
    pub begun: Timestamp,
    /// Who began it.
    pub begun_by: String,
    /// Where it stands.
    pub status: Status,
    /// Whether anything of it was ever signed.
    pub ever_signed: bool,
    /// What was recorded at the steps.
    pub entries: Vec<EntryPart>,
    /// Steps settled otherwise.
    pub otherwise: Vec<OtherwisePart>,
    /// Steps that were settled otherwise once and no longer are so, oldest first.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub once_otherwise: Vec<OnceOtherwise>,
    /// Every stretch of isolation, oldest first.
    pub isolations: Vec<Isolation>,
    /// Hold points released.
    pub releases: Vec<Release>,
    /// Directions observed before this moment count as not observed.
    pub directions_void_before: Option<Timestamp>,
    /// The same as a place in the drive's chain.
    pub directions_void_upto: u64,
    /// The parameter record.
    pub parameters: Vec<ParameterPart>,
    /// Its free rows.
    pub free_rows: Vec<FreeRow>,
    /// Findings, by number.
    pub findings: Vec<Finding>,
    /// Remarks, oldest first.
    pub remarks: Vec<RemarkPart>,
    /// Everyone who entered something: they cannot accept.
    pub contributors: Vec<PersonId>,
    /// Signings, returns and reopenings.
    pub history: Vec<Recorded<Turn>>,
    /// Every signature ever put.
    pub signatures: Vec<Signature>,
}

impl SitePart {
    /// Of a site as it stands.
    #[must_use]
    pub fn of(site: &Site) -> Self {
        Self { id: site.id, tag: site.tag.clone(), name: site.name.clone(), fields: field_parts(&site.fields) }
    }
}

impl DrivePart {
    /// Of a drive as it stands.
    #[must_use]
    pub fn of(drive: &Drive) -> Self {
        Self {
            id: drive.id,
            tag: drive.tag.clone(),
            name: drive.name.clone(),
            last_change: drive.last_change,
            fields: field_parts(&drive.fields),
        }
    }
}

fn field_parts(fields: &BTreeMap<Place, Slot<Option<Typed>>>) -> Vec<FieldPart> {
    fields.iter().map(|(place, slot)| FieldPart { place: place.clone(), slot: slot.clone() }).collect()
}

impl RecordPart {
    /// Of a record as it stands.
    #[must_use]
    pub fn of(record: &Record) -> Self {
        let mut findings: Vec<Finding> = record.findings.values().cloned().collect();
        findings.sort_by_key(|f| (f.number, f.id));
        Self {
            revision: record.revision,
            begun: record.begun,
            begun_by: record.begun_by.clone(),
            status: record.status.clone(),
            ever_signed: record.ever_signed,
            entries: record.entries.iter().map(|(p, s)| EntryPart { place: p.clone(), slot: s.clone() }).collect(),
            otherwise: (record.otherwise.iter())
                .map(|(step, settled)| OtherwisePart { step: step.clone(), settled: settled.clone() })
                .collect(),
            once_otherwise: record.once_otherwise.clone(),
            isolations: record.isolations.clone(),
            releases: record.releases.values().cloned().collect(),
            directions_void_before: record.directions_void_before,
            directions_void_upto: record.directions_void_upto,
            parameters: (record.parameters.iter())
                .map(|(place, slot)| ParameterPart { place: place.clone(), slot: slot.clone() })
                .collect(),
            free_rows: (record.free_rows.iter())
                .map(|(key, label)| FreeRow { key: key.clone(), label: label.clone() })
                .collect(),
            findings,
            remarks: (record.remarks.iter())
                .map(|(step, remark)| RemarkPart { step: step.clone(), remark: remark.clone() })
                .collect(),
            contributors: record.contributors.iter().copied().collect(),
            history: record.history.clone(),
            signatures: record.signatures.clone(),
        }
    }

    /// The entries that are pictures, standing ones, by their items, in the order of the procedure.
    pub fn photos(&self) -> impl Iterator<Item = (&str, &Entry, &Photo)> {
        self.entries.iter().flat_map(|part| {
            let standing = part.slot.standing().iter();
            standing.filter_map(|r| Some((part.place.item.as_str(), &r.value, r.value.photo.as_ref()?)))
        })
    }

    /// Cuts back to what a signer was shown: this many signatures before, and the chain up to this event. What only
    /// follows from the chain (who contributed, whether anything was ever signed) goes too.
    pub(super) fn cut(&mut self, signatures: usize, upto: u64) {
        self.signatures.truncate(signatures);
        self.signatures.iter_mut().for_each(|s| s.superseded = false);
        self.remarks.retain(|r| r.remark.sequence <= upto);
        for finding in &mut self.findings {
            if finding.closed_at().is_some_and(|sequence| sequence > upto) {
                finding.state = FindingState::Open;
            }
        }
        self.history.retain(|turn| matches!(turn.value, Turn::Returned(_) | Turn::Reopened(..)));
        self.contributors.clear();
        self.ever_signed = false;
    }
}
