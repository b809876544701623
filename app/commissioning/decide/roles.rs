//! Who may do what: the one table of permissions.

use super::Surroundings;
use crate::Refusal;
use crate::journal::Deed;
use crate::people::Role;
use crate::record::Meaning;

/// The roles of which one is needed, and the deed in words: "Only … may …".
#[must_use]
pub const fn needed(deed: &Deed) -> (&'static [Role], &'static str) {
    use Role::{Administrator, Engineer, Supervisor};
    match deed {
        Deed::SetUp { .. } => (&[], "set up the installation"),
        Deed::AddPerson { .. } | Deed::ChangePerson { .. } => (&[Administrator], "keep people"),
        Deed::KeepInstrument { .. } => (&[Engineer, Supervisor, Administrator], "keep instruments"),
        Deed::LoadProcedure { .. } => (&[Administrator], "load a procedure"),
        Deed::CreateSite { .. } => (&[Engineer, Supervisor, Administrator], "create sites"),
        Deed::SetSiteFields { .. } => (&[Engineer, Supervisor], "fill in a site"),
        Deed::CreateDrive { .. } => (&[Engineer, Supervisor], "create drives"),
        Deed::SetDriveFields { .. } => (&[Engineer, Supervisor], "fill in a drive"),
        Deed::BeginRecord { .. } => (&[Engineer], "begin a record"),
        Deed::RecordEntries { .. } => (&[Engineer], "record entries"),
        Deed::SettleStep { .. } | Deed::ResumeStep { .. } => (&[Engineer], "settle a step"),
        Deed::ReleaseHold { .. } => (&[Engineer], "release a hold point"),
        Deed::SetParameters { .. } | Deed::AddParameterRow { .. } => (&[Engineer], "keep the parameter record"),
        Deed::RaiseFinding { .. } => (&[Engineer], "raise a finding"),
        Deed::SettleFinding { .. } => (&[Engineer], "settle a finding"),
        Deed::AcceptFinding { .. } => (&[Supervisor], "accept a finding as it is"),
        Deed::Remark { .. } => (&[Engineer, Supervisor], "make a remark"),
        Deed::Sign { meaning: Meaning::Performed, .. } => (&[Engineer], "sign as performed and recorded"),
        Deed::Sign { meaning: Meaning::Accepted, .. } => (&[Supervisor], "accept a record"),
        Deed::Return { .. } => (&[Supervisor], "return a record"),
        Deed::Reopen { .. } => (&[Supervisor], "reopen a record"),
        Deed::RotateKey { .. } => (&[Administrator], "change the signing key"),
    }
}

/// Refuses unless the actor may do this.
pub(super) fn may(deed: &Deed, around: &Surroundings<'_>) -> Result<(), Refusal> {
    let (roles, verb) = needed(deed);
    let Some(actor) = around.actor else {
        return match deed {
            Deed::SetUp { .. } | Deed::LoadProcedure { .. } => Ok(()),
            _ => Err(Refusal::not_allowed("Sign in first.")),
        };
    };
    if !actor.active {
        return Err(Refusal::not_allowed("This account is switched off. Ask an administrator."));
    }
    if let (Deed::SetDriveFields { .. }, Some(drive)) = (deed, around.drive)
        && drive.record.is_some()
        && !actor.is(Role::Engineer)
    {
        // From here on plates are part of what a supervisor reviews.
        return Err(Refusal::not_allowed(
            "The record of this drive is begun: only a startup engineer may fill it in now.",
        ));
    }
    if roles.is_empty() || roles.iter().any(|r| actor.is(*r)) {
        return Ok(());
    }
    let names: Vec<String> = roles.iter().map(|r| format!("{} {}", article(*r), r.words())).collect();
    Err(Refusal::not_allowed(format!("Only {} may {verb}.", names.join(" or "))))
}

const fn article(role: Role) -> &'static str {
    match role {
        Role::Administrator => "an",
        _ => "a",
    }
}
