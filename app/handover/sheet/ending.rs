//! The end of the document: findings, pictures, instruments, signatures, turns, and how to verify.

use super::words::{grouped, instrument, when};
use super::{Pages, picture_name};
use commissioning::record::drive::Turn;
use commissioning::record::{FindingState, Severity};
use serde_json::{Value, json};
use std::collections::BTreeMap;

impl Pages<'_> {
    pub(super) fn findings(&self) -> Vec<Value> {
        let title = |id: &str| self.procedure.step(id).map_or_else(|| id.to_owned(), |(_, s)| s.title.clone());
        self.record
            .findings
            .iter()
            .map(|f| {
                let (state, how) = match &f.state {
                    FindingState::Open => ("open", String::new()),
                    FindingState::Settled { how, by_name, received, .. } => {
                        ("settled", format!("{how} ({by_name}, {})", received.shown()))
                    }
                    FindingState::Accepted { reason, by_name, received, .. } => {
                        ("accepted as it is", format!("{reason} ({by_name}, {})", received.shown()))
                    }
                };
                json!({
                    "number": f.number,
                    "severity": f.severity.words(),
                    "grave": f.severity != Severity::Information,
                    "text": f.text,
                    "step": f.step.as_deref().map(title),
                    "raised": format!("{}, {}", f.by_name, f.received.shown()),
                    "state": state,
                    "how": how,
                })
            })
            .collect()
    }

    pub(super) fn general_remarks(&self) -> Vec<String> {
        self.remarks("")
    }

    /// Every picture once, with the item it was taken for.
    pub(super) fn photo_list(&self) -> Vec<Value> {
        self.record
            .photos()
            .map(|(item, entry, photo)| {
                let label = self.procedure.item(item).map_or_else(|| item.to_owned(), |(_, i)| i.label.clone());
                let caption = if photo.caption.is_empty() { entry.value.shown() } else { photo.caption.clone() };
                json!({
                    "label": label,
                    "caption": caption,
                    "hash": grouped(&photo.hash),
                    "file": picture_name(photo).filter(|_| self.pictures),
                })
            })
            .collect()
    }

    pub(super) fn signatures(&self) -> Vec<Value> {
        self.record
            .signatures
            .iter()
            .map(|s| {
                json!({
                    "meaning": s.meaning.words(),
                    "name": s.printed_name,
                    "when": format!("{} UTC", s.received.shown()),
                    "revision": s.revision,
                    "digest": grouped(&s.digest),
                    "head": format!("{} · {}", s.head.sequence, grouped(&s.head.hash)),
                    "catalogue": s.catalogue,
                    "superseded": s.superseded,
                })
            })
            .collect()
    }

    pub(super) fn history(&self) -> Vec<String> {
        self.record
            .history
            .iter()
            .map(|turn| {
                let what = match &turn.value {
                    Turn::Signed => "signed".to_owned(),
                    Turn::Returned(why) => format!("returned: {why}"),
                    Turn::Accepted => "accepted".to_owned(),
                    Turn::Reopened(why, revision) => format!("reopened as revision {revision}: {why}"),
                };
                format!("{}, {}: {what}", when(turn), turn.by_name)
            })
            .collect()
    }

    /// Every instrument that gave a reading, once, as it was on the day.
    pub(super) fn instruments(&self) -> Vec<String> {
        let used = self.record.entries.iter().flat_map(|e| e.slot.standing().iter().chain(e.slot.earlier()));
        let lines: BTreeMap<String, ()> =
            used.filter_map(|r| r.value.instrument.as_ref()).map(|i| (instrument(i), ())).collect();
        lines.into_keys().collect()
    }

    pub(super) fn proof(&self) -> Value {
        let site = self.material.site_chain.last();
        json!({
            "sequence": self.file.head.sequence,
            "head": grouped(&self.file.head.hash),
            "short-head": self.short_head(),
            "site-sequence": site.map_or(0, |s| s.sequence),
            "site-head": site.map_or_else(String::new, |s| grouped(&s.hash)),
            "key": grouped(&self.key.0),
            "short-key": grouped(self.key.0.get(..8).unwrap_or_default()),
            "digest": grouped(&self.file.digest()),
            "commands": crate::instructions::COMMANDS.iter().map(|(what, line)| json!([what, line])).collect::<Vec<_>>(),
            "procedure": format!("{}, version {}", self.procedure.name, self.procedure.version),
            "catalogue": self.file.catalogue,
            "begun": format!("{}, {}", self.record.begun_by, self.record.begun.shown()),
        })
    }
}
