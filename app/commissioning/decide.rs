//! From an act and the state of things to events, or a refusal in words for the person.
//!
//! The order is always the same: does it exist, may this person, does the state allow it, are the fields right, is
//! the form up to date. An act that changes nothing gives no event and is no refusal.

mod changes;
mod directions;
pub(crate) mod entry_value;
mod fields;
mod findings;
mod holds;
mod instruments;
mod isolation;
mod isolation_proof;
mod keys;
mod outside;
pub(crate) mod parameters;
mod people;
mod plants;
mod procedures;
mod record_entries;
mod remark;
mod roles;
mod scope;
mod signing;
mod steps;
mod words;
mod writer;

pub(crate) use fields::field_at;
pub use roles::needed as roles_needed;
pub use words::drive_tag;

#[cfg(test)]
mod tests;

use crate::journal::{Act, Deed, Event};
use crate::judge::View;
use crate::people::{Installation, Person};
use crate::plant::Site;
use crate::record::{Drive, Record, Status};
use crate::{Refusal, Timestamp};

/// What an act meets: who acts, when, and the state of things it is about.
#[derive(Clone, Copy, Debug)]
pub struct Surroundings<'a> {
    /// Who acts; `None` only for setting up and for loading a procedure.
    pub actor: Option<&'a Person>,
    /// Receipt time of the server.
    pub now: Timestamp,
    /// People, instruments and procedures.
    pub installation: &'a Installation,
    /// The site the deed names, or the drive's.
    pub site: Option<&'a Site>,
    /// The drive the deed names.
    pub drive: Option<&'a Drive>,
    /// The password was typed again and is right.
    pub password_proved: bool,
}

/// What an act makes true, or why it does not.
///
/// # Errors
/// A refusal in words for the person.
pub fn decide(act: &Act, around: &Surroundings<'_>) -> Result<Vec<Event>, Refusal> {
    roles::may(&act.deed, around)?;
    match &act.deed {
        Deed::SetUp { .. } => people::set_up(act, around),
        Deed::AddPerson { .. } => people::add(act, around),
        Deed::ChangePerson { .. } => people::change(act, around),
        Deed::KeepInstrument { instrument, seen } => instruments::keep(act, around, instrument, seen),
        Deed::LoadProcedure { procedure } => procedures::load(act, around, procedure),
        Deed::CreateSite { site, tag, name } => plants::create_site(act, around, *site, tag, name),
        Deed::SetSiteFields { sheet, changes, reason, .. } => fields::of_site(act, around, *sheet, changes, reason),
        Deed::CreateDrive { drive, tag, name, .. } => plants::create_drive(act, around, *drive, tag, name),
        Deed::SetDriveFields { sheet, changes, reason, .. } => fields::of_drive(act, around, *sheet, changes, reason),
        Deed::BeginRecord { .. } => plants::begin_record(act, around),
        Deed::RecordEntries { step, changes, reason, .. } => record_entries::record(act, around, step, changes, reason),
        Deed::SettleStep { step, how, reason, .. } => steps::settle(act, around, step, *how, reason),
        Deed::ResumeStep { step, .. } => steps::resume(act, around, step),
        Deed::ReleaseHold { phase, role, printed_name, declared, .. } => {
            holds::release(act, around, phase, *role, printed_name, declared)
        }
        Deed::SetParameters { changes, reason, .. } => parameters::set(act, around, changes, reason),
        Deed::AddParameterRow { label, .. } => parameters::add_row(act, around, label),
        Deed::RaiseFinding { finding, severity, text, step, .. } => {
            findings::raise(act, around, *finding, *severity, text, step.as_deref())
        }
        Deed::SettleFinding { finding, how, .. } => findings::settle(act, around, *finding, how),
        Deed::AcceptFinding { finding, reason, .. } => findings::accept(act, around, *finding, reason),
        Deed::Remark { step, text, .. } => remark::make(act, around, step, text),
        Deed::Sign { meaning, digest, .. } => signing::sign(act, around, *meaning, digest),
        Deed::Return { reason, .. } => signing::send_back(act, around, reason),
        Deed::Reopen { reason, .. } => signing::reopen(act, around, reason),
        Deed::RotateKey { .. } => keys::rotate(act, around),
    }
}

impl<'a> Surroundings<'a> {
    /// The site, or that there is none.
    fn site(&self, act: &Act) -> Result<&'a Site, Refusal> {
        self.site
            .filter(|s| act.deed.site().is_none_or(|id| id == s.id))
            .ok_or_else(|| Refusal::Unknown { what: "This site".to_owned() })
    }

    /// The drive, or that there is none.
    fn drive(&self, act: &Act) -> Result<&'a Drive, Refusal> {
        self.drive
            .filter(|d| act.deed.drive() == Some(d.id))
            .ok_or_else(|| Refusal::Unknown { what: "This drive".to_owned() })
    }

    /// The drive and its record, whatever its status.
    fn record(&self, act: &Act) -> Result<(&'a Drive, &'a Record), Refusal> {
        let drive = self.drive(act)?;
        let record = drive.record.as_ref();
        let record =
            record.ok_or_else(|| Refusal::not_now("The record of this drive has not been begun. Begin it first."))?;
        Ok((drive, record))
    }

    /// The drive and its record, which must be in progress.
    fn record_in_progress(&self, act: &Act) -> Result<(&'a Drive, &'a Record), Refusal> {
        let (drive, record) = self.record(act)?;
        in_progress(record)?;
        Ok((drive, record))
    }

    /// All that checks and agenda look at.
    fn view(&self, drive: &'a Drive, record: &Record) -> Result<View<'a>, Refusal> {
        let site = self.site.filter(|s| s.id == drive.site);
        let site = site.ok_or_else(|| Refusal::Unknown { what: "The site of this drive".to_owned() })?;
        let procedure = self.installation.procedures.get(&record.procedure).map(AsRef::as_ref);
        let missing = || Refusal::Unknown { what: format!("Version {} of the procedure", record.procedure) };
        Ok(View { drive, site, procedure: procedure.ok_or_else(missing)? })
    }
}

/// Refuses unless the record is in progress, and says what to do first.
fn in_progress(record: &Record) -> Result<(), Refusal> {
    match record.status {
        Status::InProgress { .. } => Ok(()),
        Status::Signed { .. } => Err(Refusal::not_now(
            "The record is signed and waits for review; only remarks may be added. Have a supervisor return it first.",
        )),
        Status::Accepted { .. } => {
            Err(Refusal::not_now("The record is accepted. Have a supervisor reopen it as the next revision first."))
        }
    }
}
