//! An act: what a person sends, with the identifier made where it was made.

use crate::people::{Instrument, Role};
use crate::plant::Sheet;
use crate::record::{EntryPlace, Meaning, ParameterPlace, Photo, ReleaseRole, SettledOtherwise, Severity};
use crate::{ActId, DriveId, EventId, FindingId, InstrumentId, PersonId, SiteId, Timestamp};
use serde::{Deserialize, Serialize};

/// What a person sends. The same id with the same content gets the same answer; with other content it is refused.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub struct Act {
    /// Made by the tablet or the page.
    pub id: ActId,
    /// The tablet's own time, if it has one.
    pub tablet: Option<Timestamp>,
    /// What is to be done.
    pub deed: Deed,
}

/// One field as sent by a form: text and unit as typed, and which events the form had seen at this field.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
pub struct Change<P> {
    /// Where.
    pub place: P,
    /// As typed; empty takes the value back.
    pub text: String,
    /// Unit picked; empty where there is none.
    pub unit: String,
    /// Instrument picked, for readings.
    pub instrument: Option<InstrumentId>,
    /// Picture, for photo items: already stored by its hash.
    pub photo: Option<Photo>,
    /// Events that stood here when the form was shown.
    pub seen: Vec<EventId>,
}

/// What is to be done.
#[expect(missing_docs, reason = "each variant says what its fields are; their names are the glossary's")]
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(tag = "deed", rename_all = "kebab-case")]
pub enum Deed {
    /// Names the firm and makes the first administrator. Only in an empty installation.
    SetUp { firm: String, person: PersonId, login: String, name: String, roles: Vec<Role> },
    /// Adds a person.
    AddPerson { person: PersonId, login: String, name: String, roles: Vec<Role> },
    /// Changes name or roles, or switches an account on or off.
    ChangePerson { person: PersonId, name: String, roles: Vec<Role>, active: bool },
    /// Adds or changes an instrument; `seen` is empty for a new one.
    KeepInstrument { instrument: Instrument, seen: Vec<EventId> },
    /// Loads a procedure version, as the program does at start for the built-in one.
    LoadProcedure { procedure: Box<crate::procedure::Procedure> },
    /// Creates a site.
    CreateSite { site: SiteId, tag: String, name: String },
    /// Sets fields of a site's sheet.
    SetSiteFields { site: SiteId, sheet: Sheet, changes: Vec<Change<(u8, String)>>, reason: String },
    /// Creates a drive at a site.
    CreateDrive { site: SiteId, drive: DriveId, tag: String, name: String },
    /// Sets fields of a drive's sheet: places are (column, field key).
    SetDriveFields { drive: DriveId, sheet: Sheet, changes: Vec<Change<(u8, String)>>, reason: String },
    /// Begins the record with the newest procedure.
    BeginRecord { drive: DriveId },
    /// Records entries at a step.
    RecordEntries { drive: DriveId, step: String, changes: Vec<Change<EntryPlace>>, reason: String },
    /// Settles a step otherwise.
    SettleStep { drive: DriveId, step: String, how: SettledOtherwise, reason: String },
    /// Takes that back.
    ResumeStep { drive: DriveId, step: String },
    /// Releases the hold point before a phase.
    ReleaseHold { drive: DriveId, phase: String, role: ReleaseRole, printed_name: String, declared: Vec<bool> },
    /// Sets values of the parameter record.
    SetParameters { drive: DriveId, changes: Vec<Change<ParameterPlace>>, reason: String },
    /// Adds a free row to the parameter record.
    AddParameterRow { drive: DriveId, label: String },
    /// Raises a finding.
    RaiseFinding { drive: DriveId, finding: FindingId, severity: Severity, text: String, step: Option<String> },
    /// Settles a finding.
    SettleFinding { drive: DriveId, finding: FindingId, how: String },
    /// Accepts a finding as it is.
    AcceptFinding { drive: DriveId, finding: FindingId, reason: String },
    /// A remark on a step, or on the whole record.
    Remark { drive: DriveId, step: String, text: String },
    /// Signs: performed and recorded, or reviewed and accepted. `digest` is what the signer was shown.
    Sign { drive: DriveId, meaning: Meaning, digest: String },
    /// Sends a signed record back.
    Return { drive: DriveId, reason: String },
    /// Reopens an accepted record as the next revision.
    Reopen { drive: DriveId, reason: String },
    /// Changes the installation's signing key: public keys and both signatures in hexadecimal.
    RotateKey { old: String, new: String, by_old: String, by_new: String },
}

impl Deed {
    /// The drive it is about, if one.
    #[must_use]
    pub const fn drive(&self) -> Option<DriveId> {
        match self {
            Self::CreateDrive { drive, .. }
            | Self::SetDriveFields { drive, .. }
            | Self::BeginRecord { drive }
            | Self::RecordEntries { drive, .. }
            | Self::SettleStep { drive, .. }
            | Self::ResumeStep { drive, .. }
            | Self::ReleaseHold { drive, .. }
            | Self::SetParameters { drive, .. }
            | Self::AddParameterRow { drive, .. }
            | Self::RaiseFinding { drive, .. }
            | Self::SettleFinding { drive, .. }
            | Self::AcceptFinding { drive, .. }
            | Self::Remark { drive, .. }
            | Self::Sign { drive, .. }
            | Self::Return { drive, .. }
            | Self::Reopen { drive, .. } => Some(*drive),
            _ => None,
        }
    }

    /// The site it names itself; a drive's site is known from the drive.
    #[must_use]
    pub const fn site(&self) -> Option<SiteId> {
        match self {
            Self::CreateSite { site, .. } | Self::SetSiteFields { site, .. } | Self::CreateDrive { site, .. } => {
                Some(*site)
            }
            _ => None,
        }
    }
}
