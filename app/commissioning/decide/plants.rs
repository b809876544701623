//! Creating sites and drives, and beginning a drive's record.

use super::Surroundings;
use super::words::{self, Errors};
use super::writer::Writer;
use crate::journal::{Act, Chain, Event, Fact};
use crate::{DriveId, Refusal, SiteId};

/// Longest name of a site or drive.
const LONGEST_NAME: usize = 80;

/// Creates a site.
pub(super) fn create_site(
    act: &Act,
    around: &Surroundings<'_>,
    id: SiteId,
    tag: &str,
    name: &str,
) -> Result<Vec<Event>, Refusal> {
    if around.site.is_some() || around.installation.sites.values().any(|s| *s == id) {
        return Err(Refusal::not_now("This site exists already."));
    }
    let mut errors = Errors::default();
    let tag = errors.keep("tag", "tag", words::site_tag(tag)).unwrap_or_default();
    if around.installation.sites.keys().any(|t| t.eq_ignore_ascii_case(&tag)) {
        errors.add("tag", "tag", format!("Another site has the tag “{tag}”. Choose another."));
    }
    let name = errors.keep("name", "name", words::line(name, LONGEST_NAME)).unwrap_or_default();
    errors.none()?;
    let mut writer = Writer::new(act, around);
    writer.add(Chain::Installation, Fact::SiteListed { site: id, tag: tag.clone() });
    writer.add(Chain::Site(id), Fact::SiteCreated { tag, name });
    Ok(writer.done())
}

/// Creates a drive at a site.
pub(super) fn create_drive(
    act: &Act,
    around: &Surroundings<'_>,
    id: DriveId,
    tag: &str,
    name: &str,
) -> Result<Vec<Event>, Refusal> {
    let site = around.site(act)?;
    if around.drive.is_some() || site.drives.values().any(|d| *d == id) {
        return Err(Refusal::not_now("This drive exists already."));
    }
    let mut errors = Errors::default();
    let tag = errors.keep("tag", "plant tag", words::drive_tag(tag)).unwrap_or_default();
    if let Some(taken) = site.drives.keys().find(|t| t.eq_ignore_ascii_case(&tag)) {
        errors.add("tag", "plant tag", format!("Another drive of this site has the tag “{taken}”. Choose another."));
    }
    let name = errors.keep("name", "name", words::line(name, LONGEST_NAME)).unwrap_or_default();
    errors.none()?;
    let mut writer = Writer::new(act, around);
    writer.add(Chain::Site(site.id), Fact::DriveListed { drive: id, tag: tag.clone() });
    writer.add(Chain::Drive(id), Fact::DriveCreated { site: site.id, tag, name });
    Ok(writer.done())
}

/// Begins the record with the newest procedure.
pub(super) fn begin_record(act: &Act, around: &Surroundings<'_>) -> Result<Vec<Event>, Refusal> {
    let drive = around.drive(act)?;
    if drive.record.is_some() {
        return Err(Refusal::not_now("The record of this drive was begun already."));
    }
    let newest = around.installation.newest_procedure();
    let newest =
        newest.ok_or_else(|| Refusal::not_now("No procedure is loaded. Start the program again; it loads one."))?;
    let mut writer = Writer::new(act, around);
    writer.add(Chain::Drive(drive.id), Fact::RecordBegun { procedure: newest.version });
    Ok(writer.done())
}
