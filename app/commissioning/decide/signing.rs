//! Signing, accepting, returning and reopening a record.

use super::Surroundings;
use super::words;
use super::writer::Writer;
use crate::agenda;
use crate::journal::{Act, Chain, Event, Fact};
use crate::judge::View;
use crate::plant::{Recorded, Slot};
use crate::record::canonical::RecordFile;
use crate::record::{Meaning, Record, Severity, Status, Turn};
use crate::{PersonId, Refusal};

/// Signs as performed and recorded, or as reviewed and accepted; `digest` is what the signer was shown.
pub(super) fn sign(
    act: &Act,
    around: &Surroundings<'_>,
    meaning: Meaning,
    digest: &str,
) -> Result<Vec<Event>, Refusal> {
    let (drive, record) = around.record(act)?;
    let view = around.view(drive, record)?;
    match meaning {
        Meaning::Performed => {
            super::in_progress(record)?;
            complete(&view)?;
            answered(&view)?;
            super::outside::all_in_findings(&view, record)?;
            answers_the_return(&view, record)?;
        }
        Meaning::Accepted => {
            to_be_accepted(record)?;
            independent(record, around.actor.map(|a| a.id))?;
            nothing_open(record)?;
        }
    }
    one_value_each(&view, record)?;
    let file = RecordFile::shown(&view);
    let now = file.digest();
    if now != digest {
        return Err(Refusal::not_now("The record has changed since it was shown to you. Look at it again, then sign."));
    }
    if !around.password_proved {
        return Err(Refusal::field("password", "password", "Each signature asks for your password again. Type it."));
    }
    let fact = Fact::Signed {
        meaning,
        revision: record.revision,
        digest: now,
        head: drive.head.clone(),
        catalogue: file.catalogue,
        verdicts: file.verdicts,
        site: Box::new(file.site),
    };
    let mut writer = Writer::new(act, around);
    writer.add(Chain::Drive(drive.id), fact);
    Ok(writer.done())
}

/// Sends a signed record back.
pub(super) fn send_back(act: &Act, around: &Surroundings<'_>, reason: &str) -> Result<Vec<Event>, Refusal> {
    let (drive, record) = around.record(act)?;
    match record.status {
        Status::Signed { .. } => {}
        Status::InProgress { .. } => {
            return Err(Refusal::not_now("The record is in progress; there is nothing to return."));
        }
        Status::Accepted { .. } => {
            return Err(Refusal::not_now("The record is accepted. Reopen it as the next revision instead."));
        }
    }
    let reason = words::reason(reason, "why it goes back and what is to be done")?;
    let mut writer = Writer::new(act, around);
    writer.add_over(Chain::Drive(drive.id), Fact::Returned, Vec::new(), &reason);
    Ok(writer.done())
}

/// Reopens an accepted record as the next revision.
pub(super) fn reopen(act: &Act, around: &Surroundings<'_>, reason: &str) -> Result<Vec<Event>, Refusal> {
    let (drive, record) = around.record(act)?;
    match record.status {
        Status::Accepted { .. } => {}
        Status::InProgress { .. } => return Err(Refusal::not_now("The record is in progress; it is open already.")),
        Status::Signed { .. } => return Err(Refusal::not_now("The record waits for review. Return it instead.")),
    }
    let reason = words::reason(reason, "why it is opened again")?;
    let mut writer = Writer::new(act, around);
    let fact = Fact::Reopened { revision: record.revision + 1 };
    writer.add_over(Chain::Drive(drive.id), fact, Vec::new(), &reason);
    Ok(writer.done())
}

/// Every step that applies is settled, or settled otherwise.
fn complete(view: &View<'_>) -> Result<(), Refusal> {
    let agenda = agenda::of(view);
    if agenda.complete() {
        return Ok(());
    }
    let left: Vec<String> =
        (agenda.phases.iter().filter(|p| p.left() > 0)).map(|p| format!("{} in “{}”", p.left(), p.title)).collect();
    Err(Refusal::not_now(format!("Steps are still to be settled: {}.", left.join(", "))))
}

/// No step waits for an option that nobody has stated.
fn answered(view: &View<'_>) -> Result<(), Refusal> {
    agenda::unanswered(view).words().map_or(Ok(()), |open| Err(Refusal::not_now(open)))
}

/// What was returned comes back changed, or with a remark. Turns are part of what is signed, so that the digest always
/// differs after a return: that nothing happened since, at the drive or on the sheets of its site, is told by the chain.
fn answers_the_return(view: &View<'_>, record: &Record) -> Result<(), Refusal> {
    let Some(Recorded { value: Turn::Returned(why), sequence, received, .. }) = record.history.last() else {
        return Ok(());
    };
    let site = view.site.fields.values().flat_map(Slot::standing).any(|r| r.received > *received);
    if view.drive.head.sequence > *sequence || site {
        return Ok(());
    }
    let stop = if why.trim_end().ends_with(['.', '?']) { "" } else { "." };
    Err(Refusal::not_now(format!(
        "Nothing was changed since this record was returned for: {why}{stop} Put it right, or answer with a remark, then sign."
    )))
}

fn to_be_accepted(record: &Record) -> Result<(), Refusal> {
    match record.status {
        Status::Signed { .. } => Ok(()),
        Status::InProgress { .. } => Err(Refusal::not_now(
            "The record has not been signed as performed and recorded. The engineer signs it first.",
        )),
        Status::Accepted { .. } => Err(Refusal::not_now("The record is accepted already.")),
    }
}

/// Nobody accepts what they entered or signed themselves.
fn independent(record: &Record, actor: Option<PersonId>) -> Result<(), Refusal> {
    let signed = |id: PersonId| record.signatures.iter().any(|s| s.person == id && s.meaning == Meaning::Performed);
    match actor {
        Some(id) if !record.contributors.contains(&id) && !signed(id) => Ok(()),
        _ => Err(Refusal::not_allowed(
            "You entered something in this record or signed it, so that you cannot accept it. Ask another supervisor.",
        )),
    }
}

/// No finding is open that must be closed before handover.
fn nothing_open(record: &Record) -> Result<(), Refusal> {
    let open = record.findings.values().filter(|f| f.is_open() && f.severity != Severity::Information);
    let mut numbers: Vec<u32> = open.map(|f| f.number).collect();
    numbers.sort_unstable();
    if numbers.is_empty() {
        return Ok(());
    }
    let list: Vec<String> = numbers.iter().map(ToString::to_string).collect();
    Err(Refusal::not_now(format!(
        "Findings are open: {}. Accept each by name with a reason, or return the record so that they are settled.",
        list.join(", ")
    )))
}

/// Nothing needs a choice between two values that stand beside each other.
fn one_value_each(view: &View<'_>, record: &Record) -> Result<(), Refusal> {
    let fields = view.drive.fields.iter().filter(|(_, s)| s.needs_choice()).map(|(p, _)| p.to_string());
    let site = view.site.fields.iter().filter(|(_, s)| record.frozen_site.is_none() && s.needs_choice());
    let entries = record.entries.iter().filter(|(_, s)| s.needs_choice()).map(|(p, _)| format!("{}.{}", p.item, p.row));
    let parameters =
        record.parameters.iter().filter(|(_, s)| s.needs_choice()).map(|(p, _)| super::parameters::name(p));
    let list: Vec<String> = fields.chain(site.map(|(p, _)| p.to_string())).chain(entries).chain(parameters).collect();
    if list.is_empty() {
        return Ok(());
    }
    Err(Refusal::not_now(format!("Two values stand beside each other and need a choice first: {}.", list.join(", "))))
}
