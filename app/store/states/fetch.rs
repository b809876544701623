//! Gives states to pages: one read each, all of one moment.

use crate::answer::Answer;
use crate::fault::{Fault, ReadFault};
use crate::store::Store;
use crate::work::Desk;
use commissioning::judge::View;
use commissioning::people::Installation;
use commissioning::plant::Site;
use commissioning::procedure::Procedure;
use commissioning::record::Drive;
use commissioning::{DriveId, SiteId};
use std::sync::Arc;

/// A drive with all that judges it, of one moment.
#[derive(Clone, Debug)]
pub struct DriveView {
    /// The drive.
    pub drive: Arc<Drive>,
    /// Its site.
    pub site: Arc<Site>,
    /// The procedure of its record, or the newest.
    pub procedure: Arc<Procedure>,
    /// People, instruments, procedures.
    pub installation: Arc<Installation>,
}

impl DriveView {
    /// As the checks and the agenda take it.
    #[must_use]
    pub fn view(&self) -> View<'_> {
        View { drive: &self.drive, site: &self.site, procedure: &self.procedure }
    }
}

/// The procedure that a drive's record began with, or the newest where none has begun.
pub(crate) fn procedure_of<'a>(drive: &Drive, installation: &'a Installation) -> Option<&'a Arc<Procedure>> {
    match &drive.record {
        Some(record) => installation.procedures.get(&record.procedure),
        None => installation.newest_procedure(),
    }
}

impl Store {
    /// People, instruments, procedures, list of sites; empty before set-up.
    pub fn installation(&self) -> Answer<Arc<Installation>, ReadFault> {
        self.read(Desk::installation)
    }

    /// As `installation`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn installation_blocking(&self) -> Result<Arc<Installation>, ReadFault> {
        self.installation().wait()
    }

    /// A site.
    pub fn site(&self, id: SiteId) -> Answer<Option<Arc<Site>>, ReadFault> {
        self.read(move |desk| desk.site(id))
    }

    /// As `site`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn site_blocking(&self, id: SiteId) -> Result<Option<Arc<Site>>, ReadFault> {
        self.site(id).wait()
    }

    /// The site with this tag.
    pub fn site_by_tag(&self, tag: &str) -> Answer<Option<Arc<Site>>, ReadFault> {
        let tag = tag.to_owned();
        self.read(move |desk| by_tag(desk, &tag))
    }

    /// As `site_by_tag`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn site_by_tag_blocking(&self, tag: &str) -> Result<Option<Arc<Site>>, ReadFault> {
        self.site_by_tag(tag).wait()
    }

    /// A drive.
    pub fn drive(&self, id: DriveId) -> Answer<Option<Arc<Drive>>, ReadFault> {
        self.read(move |desk| desk.drive(id))
    }

    /// As `drive`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn drive_blocking(&self, id: DriveId) -> Result<Option<Arc<Drive>>, ReadFault> {
        self.drive(id).wait()
    }

    /// The drive with this plant tag at the site with that tag.
    pub fn drive_by_tag(&self, site_tag: &str, drive_tag: &str) -> Answer<Option<Arc<Drive>>, ReadFault> {
        let (site_tag, drive_tag) = (site_tag.to_owned(), drive_tag.to_owned());
        self.read(move |desk| match listed(desk, &site_tag, &drive_tag)? {
            Some(id) => desk.drive(id),
            None => Ok(None),
        })
    }

    /// As `drive_by_tag`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn drive_by_tag_blocking(&self, site_tag: &str, drive_tag: &str) -> Result<Option<Arc<Drive>>, ReadFault> {
        self.drive_by_tag(site_tag, drive_tag).wait()
    }

    /// A drive with all that judges it, by tags. `None` too while no procedure is loaded.
    pub fn drive_view(&self, site_tag: &str, drive_tag: &str) -> Answer<Option<DriveView>, ReadFault> {
        let (site_tag, drive_tag) = (site_tag.to_owned(), drive_tag.to_owned());
        self.read(move |desk| match listed(desk, &site_tag, &drive_tag)? {
            Some(id) => view(desk, id),
            None => Ok(None),
        })
    }

    /// As `drive_view`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn drive_view_blocking(&self, site_tag: &str, drive_tag: &str) -> Result<Option<DriveView>, ReadFault> {
        self.drive_view(site_tag, drive_tag).wait()
    }

    /// A drive with all that judges it.
    pub fn drive_view_by_id(&self, id: DriveId) -> Answer<Option<DriveView>, ReadFault> {
        self.read(move |desk| view(desk, id))
    }

    /// As `drive_view_by_id`, waiting.
    ///
    /// # Errors
    /// When something broke.
    pub fn drive_view_by_id_blocking(&self, id: DriveId) -> Result<Option<DriveView>, ReadFault> {
        self.drive_view_by_id(id).wait()
    }
}

fn by_tag(desk: &Desk, tag: &str) -> Result<Option<Arc<Site>>, Fault> {
    match desk.installation()?.sites.get(tag) {
        Some(id) => desk.site(*id),
        None => Ok(None),
    }
}

fn listed(desk: &Desk, site_tag: &str, drive_tag: &str) -> Result<Option<DriveId>, Fault> {
    Ok(by_tag(desk, site_tag)?.and_then(|site| site.drives.get(drive_tag).copied()))
}

fn view(desk: &Desk, id: DriveId) -> Result<Option<DriveView>, Fault> {
    let Some(drive) = desk.drive(id)? else { return Ok(None) };
    let installation = desk.installation()?;
    let (Some(site), Some(procedure)) = (desk.site(drive.site)?, procedure_of(&drive, &installation).cloned()) else {
        return Ok(None);
    };
    Ok(Some(DriveView { drive, site, procedure, installation }))
}
