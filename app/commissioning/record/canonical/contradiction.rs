//! What record.json says twice must agree: status, signatures, history, contributors, numbers, places in the chain.

use super::{RecordFile, RecordPart, numbers};
use crate::PersonId;
use crate::record::{Meaning, Signature, Status, Turn};
use std::collections::BTreeSet;

/// The first contradiction in a record, in a sentence.
pub(super) fn of(file: &RecordFile, part: &RecordPart) -> Option<String> {
    status(part)
        .or_else(|| history(part))
        .or_else(|| versions(file, part))
        .or_else(|| contributors(file, part))
        .or_else(|| accepted_by_another(part))
        .or_else(|| numbers::of(file, part))
        .or_else(|| places(file, part))
}

/// The status follows from the signatures that stand.
fn status(part: &RecordPart) -> Option<String> {
    let standing: Vec<&Signature> = part.signatures.iter().filter(|s| !s.superseded).collect();
    let fits = match (&part.status, standing.as_slice()) {
        (Status::InProgress { .. }, []) => true,
        (Status::Signed { at }, [one]) => one.meaning == Meaning::Performed && one.received == *at,
        (Status::Accepted { at }, [first, second]) => {
            first.meaning == Meaning::Performed && second.meaning == Meaning::Accepted && second.received == *at
        }
        _ => false,
    };
    if !fits {
        return Some("record.status does not fit the signatures that stand.".to_owned());
    }
    let signed = !part.signatures.is_empty();
    (part.ever_signed != signed).then(|| "record.ever_signed does not fit the signatures.".to_owned())
}

/// Each signature is a turn in the history, and returns and reopenings tell status and revision.
fn history(part: &RecordPart) -> Option<String> {
    let signings = part.history.iter().filter_map(|turn| match turn.value {
        Turn::Signed => Some((Meaning::Performed, turn.by, &turn.by_name, turn.received)),
        Turn::Accepted => Some((Meaning::Accepted, turn.by, &turn.by_name, turn.received)),
        Turn::Returned(_) | Turn::Reopened(..) => None,
    });
    let signatures = part.signatures.iter().map(|s| (s.meaning, s.person, &s.printed_name, s.received));
    if !signings.eq(signatures) {
        return Some("record.history does not fit the signatures.".to_owned());
    }
    let reopened = part.history.iter().filter_map(|turn| match turn.value {
        Turn::Reopened(_, revision) => Some(revision),
        _ => None,
    });
    if reopened.max().unwrap_or(1) != part.revision {
        return Some("record.revision does not fit the history.".to_owned());
    }
    let returned = match part.history.last().map(|turn| &turn.value) {
        Some(Turn::Returned(reason)) => Some(reason),
        _ => None,
    };
    let said = match &part.status {
        Status::InProgress { returned } => returned.as_ref(),
        Status::Signed { .. } | Status::Accepted { .. } => None,
    };
    (said != returned).then(|| "record.status does not fit the history.".to_owned())
}

/// Signatures that stand are of this revision and catalogue.
fn versions(file: &RecordFile, part: &RecordPart) -> Option<String> {
    let mut standing = part.signatures.iter().filter(|s| !s.superseded);
    let fits = standing.all(|s| s.revision == part.revision && s.catalogue == file.catalogue);
    (!fits).then(|| "A signature that stands is of another revision or check catalogue.".to_owned())
}

/// Whoever entered, filled in, settled or signed something is among the contributors.
fn contributors(file: &RecordFile, part: &RecordPart) -> Option<String> {
    let entered =
        part.entries.iter().flat_map(|e| e.slot.all().map(|r| r.by).chain(e.slot.taken_back().iter().map(|r| r.by)));
    let keyed = part.parameters.iter().flat_map(|p| p.slot.all().map(|r| r.by));
    let settled = part.otherwise.iter().map(|o| o.settled.by).chain(part.once_otherwise.iter().map(|o| o.settled.by));
    let signed = part.signatures.iter().filter(|s| s.meaning == Meaning::Performed).map(|s| s.person);
    let filled = || file.drive.fields.iter().flat_map(|f| f.slot.all());
    // Until the record is begun a drive's chain holds its creation, at 1, and fields: the first gap is the beginning.
    let before: BTreeSet<u64> = filled().map(|r| r.sequence).collect();
    let begun = (2..).find(|n| !before.contains(n)).unwrap_or(u64::MAX);
    let filled = filled().filter(|r| r.sequence > begun).map(|r| r.by);
    let listed: BTreeSet<PersonId> = part.contributors.iter().copied().collect();
    let all = entered.chain(keyed).chain(settled).chain(signed).chain(filled).all(|id| listed.contains(&id));
    (!all).then(|| "record.contributors lacks somebody who entered, filled in or signed something.".to_owned())
}

/// Nobody accepted what they entered, filled in or signed themselves.
fn accepted_by_another(part: &RecordPart) -> Option<String> {
    let mut accepted = part.signatures.iter().filter(|s| !s.superseded && s.meaning == Meaning::Accepted);
    let own = accepted.any(|s| part.contributors.contains(&s.person));
    own.then(|| "The record was accepted by somebody who contributed to it.".to_owned())
}

/// Nothing stands later in the chain than the chain is long, and signatures come in order.
fn places(file: &RecordFile, part: &RecordPart) -> Option<String> {
    let entries = part.entries.iter().flat_map(|e| e.slot.all().map(|r| r.sequence));
    let parameters = part.parameters.iter().flat_map(|p| p.slot.all().map(|r| r.sequence));
    let remarks = part.remarks.iter().map(|r| r.remark.sequence);
    let history = part.history.iter().map(|h| h.sequence);
    let once = part.once_otherwise.iter().map(|o| o.ended.sequence);
    let last = entries.chain(once).chain(parameters).chain(remarks).chain(history).max().unwrap_or(0);
    if last > file.head.sequence {
        return Some("Something stands later in the chain than its head.".to_owned());
    }
    let signed: Vec<u64> = part.signatures.iter().map(|s| s.head.sequence).collect();
    let turns: Vec<u64> = (part.history.iter())
        .filter(|h| matches!(h.value, Turn::Signed | Turn::Accepted))
        .map(|h| h.sequence - h.sequence.min(1))
        .collect();
    (signed != turns).then(|| "A signature's head is not the event before it.".to_owned())
}
