//! Looks at a store after a fault: it opens, holds together, has all that was acknowledged, and takes what was under way once.

use super::super::stage::at;
use crate::{PerformFault, Proof, Store, check_store};
use commissioning::journal::Act;
use commissioning::{ActId, PersonId};
use std::path::Path;

/// What the outside world had been told when the fault came.
#[derive(Clone, Debug, Default)]
pub(super) struct Told {
    /// Sent, in order: who and what.
    pub(super) sent: Vec<(Option<PersonId>, Act)>,
    /// Acknowledged.
    pub(super) done: Vec<ActId>,
    /// Hashes of acknowledged photos.
    pub(super) photos: Vec<String>,
    /// A backup was acknowledged.
    pub(super) backup: bool,
    /// Answers of "not known", refusals, and openings that failed, as they were said.
    pub(super) lost: Vec<String>,
    /// The walk came to its end.
    pub(super) ended: bool,
}

impl Told {
    /// From the lines as far as they were written.
    pub(super) fn read(file: &Path) -> Self {
        let mut told = Self::default();
        for line in std::fs::read_to_string(file).unwrap().split_inclusive('\n').filter(|l| l.ends_with('\n')) {
            told.hear(line.trim_end());
        }
        told
    }

    /// One more line.
    pub(super) fn hear(&mut self, line: &str) {
        match line.split_once(' ') {
            Some(("sent", rest)) => self.sent.push(serde_json::from_str(rest).unwrap()),
            Some(("done", id)) => self.done.push(id.parse().unwrap()),
            Some(("photo", hash)) => self.photos.push(hash.to_owned()),
            None if line == "backup" => self.backup = true,
            None if line == "end" => self.ended = true,
            _ => self.lost.push(line.to_owned()),
        }
    }
}

/// Everything wrong with what a fault left in a folder, in sentences.
pub(super) fn faults_of(folder: &Path, told: &Told) -> Vec<String> {
    let path = folder.join("store");
    let mut faults = Vec::new();
    let store = match Store::open(&path, at(60)) {
        Ok(store) => store,
        Err(fault) => return vec![format!("it does not open: {fault}")],
    };
    for id in &told.done {
        match store.outcome_blocking(*id) {
            Ok(Some(Ok(_))) => {}
            other => faults.push(format!("act {id} was acknowledged and is {other:?}")),
        }
    }
    for hash in told.photos.iter().filter(|hash| !matches!(store.photo_blocking(hash), Ok(Some(_)))) {
        faults.push(format!("photo {hash} was acknowledged and is not there"));
    }
    // Before anything is sent again, and while the store is open: the check looks beside it.
    faults.extend(checked(&path));
    faults.extend(sent_again(&store, told));
    drop(store);
    faults.extend(checked(&path));
    if told.backup {
        faults.extend(checked(&folder.join("backup")).into_iter().map(|f| format!("backup: {f}")));
    }
    faults
}

fn checked(path: &Path) -> Vec<String> {
    match check_store(path, at(90)) {
        // How full the disk of whoever runs the tests is, is no fault of the store's.
        Ok(report) => report.findings.into_iter().filter(|f| !f.starts_with("room")).collect(),
        Err(fault) => vec![format!("it cannot be checked: {fault}")],
    }
}

/// The last act comes once more, as a page sends what it got no answer for: it is done once, whatever had become of it.
fn sent_again(store: &Store, told: &Told) -> Vec<String> {
    let Some((who, last)) = told.sent.last() else { return Vec::new() };
    let known = told.done.contains(&last.id);
    match store.perform_blocking(*who, last.clone(), Proof::password(), at(62)) {
        Ok(receipt) if known && !receipt.repeated => vec![format!("act {} was done a second time", last.id)],
        Ok(receipt) => {
            let again = store.perform_blocking(*who, last.clone(), Proof::password(), at(63)).map(|r| r.events);
            let differs = again != Ok(receipt.events);
            differs.then(|| format!("act {} got two answers", last.id)).into_iter().collect()
        }
        // After a fault of the disk the act before it may be missing, so that this one is refused: no loss of its own.
        Err(PerformFault::Refused(_)) if !known && !told.lost.is_empty() => Vec::new(),
        Err(fault) => vec![format!("act {} cannot be sent again: {fault}", last.id)],
    }
}
