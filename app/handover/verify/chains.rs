//! The chains of a package: whole, at their place, and giving the record that lies beside them.

use super::{Report, text};
use crate::events;
use crate::package::{DRIVE_EVENTS, RECORD, SITE_EVENTS};
use commissioning::journal::{Chain, Head, Sealed, verify_chain};
use commissioning::judge::View;
use commissioning::plant::Site;
use commissioning::record::canonical::RecordFile;
use commissioning::record::{Drive, apply};
use std::collections::BTreeMap;

/// What the event files give.
#[derive(Default)]
pub(super) struct Chains {
    drive: Option<Drive>,
    site: Option<Site>,
}

/// Walks both chains and applies their events.
pub(super) fn check(files: &BTreeMap<String, Vec<u8>>, report: &mut Report) -> Chains {
    let mut chains = Chains::default();
    if let Some((sealed, head)) = walk(files, DRIVE_EVENTS, report) {
        report.drive_head = Some(head);
        fold_drive(&sealed, &mut chains.drive, report);
    }
    if let Some((sealed, head)) = walk(files, SITE_EVENTS, report) {
        report.site_head = Some(head);
        fold_site(&sealed, &mut chains.site, report);
    }
    chains
}

fn walk(files: &BTreeMap<String, Vec<u8>>, name: &str, report: &mut Report) -> Option<(Vec<Sealed>, Head)> {
    let sealed = match events::read(text(files, name, report)?) {
        Ok(sealed) => sealed,
        Err(what) => {
            report.fault(name, what);
            return None;
        }
    };
    match verify_chain(&sealed) {
        Ok(head) => Some((sealed, head)),
        Err(e) => {
            report.fault(name, e.to_string());
            None
        }
    }
}

fn fold_drive(sealed: &[Sealed], drive: &mut Option<Drive>, report: &mut Report) {
    for one in sealed {
        let done = one.event().map_err(|e| e.to_string()).and_then(|event| {
            if !matches!(event.chain, Chain::Drive(_)) {
                return Err(format!("event {} belongs to another chain", one.sequence));
            }
            apply::to_drive(drive, &event, &one.head()).map_err(|e| format!("event {}: {e}", one.sequence))
        });
        if let Err(what) = done {
            report.fault(DRIVE_EVENTS, what);
            *drive = None;
            return;
        }
    }
}

fn fold_site(sealed: &[Sealed], site: &mut Option<Site>, report: &mut Report) {
    for one in sealed {
        let done = one
            .event()
            .map_err(|e| e.to_string())
            .and_then(|event| apply::to_site(site, &event).map_err(|e| format!("event {}: {e}", one.sequence)));
        if let Err(what) = done {
            report.fault(SITE_EVENTS, what);
            *site = None;
            return;
        }
    }
}

/// The record beside the chains is the one that they give: all but the verdicts, which while in progress are fresh.
pub(super) fn compare(chains: &Chains, file: &RecordFile, report: &mut Report) {
    if report.drive_head.as_ref() != Some(&file.head) {
        report.fault(RECORD, "it does not stand at the end of the drive's chain");
    }
    let (Some(drive), Some(site)) = (&chains.drive, &chains.site) else { return };
    let frozen = drive.record.as_ref().and_then(|r| r.frozen.as_deref());
    let view = View { drive, site, procedure: &file.procedure };
    let told = RecordFile::of(&view, frozen.unwrap_or(&file.verdicts));
    if told != *file {
        let part = [
            ("the site", told.site != file.site),
            ("the drive's sheets", told.drive != file.drive),
            ("the record", told.record != file.record),
            ("the frozen verdicts", told.verdicts != file.verdicts),
        ];
        let parts: Vec<&str> = part.iter().filter(|(_, differs)| *differs).map(|(name, _)| *name).collect();
        let parts = if parts.is_empty() { "it".to_owned() } else { parts.join(", ") };
        report.fault(RECORD, format!("{parts}: not what the drive's journal gives"));
    }
    if drive.record.as_ref().is_some_and(|r| r.procedure != file.procedure.version) {
        report.fault(RECORD, "its procedure is not the version that the record began with");
    }
}
