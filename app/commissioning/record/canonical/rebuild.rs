//! From record.json back to drive, site and procedure, so that every check can be worked out again.

use super::{FieldPart, RecordFile, RecordPart, SitePart, contradiction};
use crate::Typed;
use crate::judge::Judged;
use crate::plant::{Place, Site, Slot};
use crate::procedure::Procedure;
use crate::record::{Drive, Record, Status};
use std::collections::BTreeMap;

/// What a file was written from.
#[derive(Clone, Debug, PartialEq)]
pub struct Rebuilt {
    /// The drive with its record.
    pub drive: Drive,
    /// Its site; of its drives only this one is known.
    pub site: Site,
    /// The procedure of its record.
    pub procedure: Procedure,
}

impl RecordFile {
    /// Drive, site and procedure as they were when the file was written.
    ///
    /// # Errors
    /// When the file contradicts itself, in a sentence.
    pub fn rebuild(&self) -> Result<Rebuilt, String> {
        let record = self.record.as_ref().map(|part| self.rebuild_record(part)).transpose()?;
        let drive = Drive {
            id: self.drive.id,
            site: self.site.id,
            tag: self.drive.tag.clone(),
            name: self.drive.name.clone(),
            fields: fields(&self.drive.fields, "drive.fields")?,
            record,
            head: self.head.clone(),
            last_change: self.drive.last_change,
        };
        let site = Site {
            id: self.site.id,
            tag: self.site.tag.clone(),
            name: self.site.name.clone(),
            fields: fields(&self.site.fields, "site.fields")?,
            drives: BTreeMap::from([(drive.tag.clone(), drive.id)]),
            events: 0,
            last_change: self.drive.last_change,
        };
        Ok(Rebuilt { drive, site, procedure: self.procedure.clone() })
    }

    fn rebuild_record(&self, part: &RecordPart) -> Result<Record, String> {
        if let Some(contradiction) = contradiction::of(self, part) {
            return Err(contradiction);
        }
        let signed = !matches!(part.status, Status::InProgress { .. });
        Ok(Record {
            revision: part.revision,
            procedure: self.procedure.version,
            begun: part.begun,
            begun_by: part.begun_by.clone(),
            status: part.status.clone(),
            entries: once(part.entries.iter().map(|e| (e.place.clone(), e.slot.clone())), "record.entries")?,
            otherwise: once(part.otherwise.iter().map(|o| (o.step.clone(), o.settled.clone())), "record.otherwise")?,
            once_otherwise: part.once_otherwise.clone(),
            isolations: part.isolations.clone(),
            releases: once(part.releases.iter().map(|r| (r.phase.clone(), r.clone())), "record.releases")?,
            directions_void_before: part.directions_void_before,
            directions_void_upto: part.directions_void_upto,
            parameters: once(part.parameters.iter().map(|p| (p.place.clone(), p.slot.clone())), "record.parameters")?,
            free_rows: part.free_rows.iter().map(|r| (r.key.clone(), r.label.clone())).collect(),
            findings: once(part.findings.iter().map(|f| (f.id, f.clone())), "record.findings")?,
            signatures: part.signatures.clone(),
            frozen: signed.then(|| self.verdicts.clone()) as Option<Vec<Judged>>,
            frozen_site: signed.then(|| self.site.clone()) as Option<SitePart>,
            remarks: part.remarks.iter().map(|r| (r.step.clone(), r.remark.clone())).collect(),
            contributors: part.contributors.iter().copied().collect(),
            history: part.history.clone(),
            ever_signed: part.ever_signed,
        })
    }
}

fn fields(parts: &[FieldPart], path: &str) -> Result<BTreeMap<Place, Slot<Option<Typed>>>, String> {
    once(parts.iter().map(|f| (f.place.clone(), f.slot.clone())), path)
}

/// Collects into a map; a key that comes twice is a contradiction.
fn once<K: Ord, V>(pairs: impl Iterator<Item = (K, V)>, path: &str) -> Result<BTreeMap<K, V>, String> {
    let mut map = BTreeMap::new();
    for (n, (key, value)) in pairs.enumerate() {
        if map.insert(key, value).is_some() {
            return Err(format!("{path}[{n}] stands a second time; each place stands once."));
        }
    }
    Ok(map)
}
