//! Extractors that load what an address speaks of and answer "not here" in one place.

use crate::components::Plate;
use crate::{App, PageError, links};
use axum::extract::{FromRequestParts, RawPathParams};
use axum::http::request::Parts;
use commissioning::judge::View;
use commissioning::people::Installation;
use commissioning::plant::{Sheet, Site};
use commissioning::procedure::Procedure;
use commissioning::record::Drive;
use std::sync::Arc;

/// The site whose tag stands in the address.
#[derive(Clone, Debug)]
pub struct SiteAt(pub Arc<Site>);

/// The drive whose tags stand in the address, with everything a check looks at.
#[derive(Clone, Debug)]
pub struct DriveAt {
    /// The drive.
    pub drive: Arc<Drive>,
    /// Its site.
    pub site: Arc<Site>,
    /// Procedure of its record, or the newest.
    pub procedure: Arc<Procedure>,
    /// People and instruments.
    pub installation: Arc<Installation>,
}

/// The sheet named in the address as `{sheet}`.
#[derive(Clone, Copy, Debug)]
pub struct SheetAt(pub Sheet);

impl DriveAt {
    /// What the checks look at.
    #[must_use]
    pub fn view(&self) -> View<'_> {
        View { drive: &self.drive, site: &self.site, procedure: &self.procedure }
    }

    /// Its label for the header of the page.
    #[must_use]
    pub fn plate(&self) -> Plate {
        let state = self.drive.record.as_ref().map_or("record not begun", |r| r.status.words());
        Plate {
            tag: self.drive.tag.clone(),
            address: links::drive(&self.site.tag, &self.drive.tag),
            name: self.drive.name.clone(),
            site: Some((self.site.name.clone(), links::site(&self.site.tag))),
            state: state.to_owned(),
        }
    }
}

/// A segment of the address by the name it has in `routes.rs`.
pub(crate) async fn segment(parts: &mut Parts, name: &str) -> Result<String, PageError> {
    let params = RawPathParams::from_request_parts(parts, &()).await.map_err(|_| PageError::not_found("This page"))?;
    let found = params.iter().find(|(n, _)| *n == name).map(|(_, v)| v.to_owned());
    found.ok_or_else(|| PageError::broken(format!("the route has no segment {name}")))
}

impl FromRequestParts<App> for SiteAt {
    type Rejection = PageError;

    async fn from_request_parts(parts: &mut Parts, app: &App) -> Result<Self, Self::Rejection> {
        let tag = segment(parts, "site").await?;
        let site = app.store.site_by_tag(&tag).await?;
        site.map(Self).ok_or_else(|| {
            PageError::not_found(format!("A site with the tag “{}”", commissioning::typed::shorten(&tag)))
        })
    }
}

impl FromRequestParts<App> for DriveAt {
    type Rejection = PageError;

    async fn from_request_parts(parts: &mut Parts, app: &App) -> Result<Self, Self::Rejection> {
        let site = segment(parts, "site").await?;
        let drive = segment(parts, "drive").await?;
        let found = app.store.drive_view(&site, &drive).await?.ok_or_else(|| {
            let (site, drive) = (commissioning::typed::shorten(&site), commissioning::typed::shorten(&drive));
            PageError::not_found(format!("A drive with the tag “{drive}” at the site “{site}”"))
        })?;
        Ok(Self { drive: found.drive, site: found.site, procedure: found.procedure, installation: found.installation })
    }
}

impl<S: Send + Sync> FromRequestParts<S> for SheetAt {
    type Rejection = PageError;

    async fn from_request_parts(parts: &mut Parts, _: &S) -> Result<Self, Self::Rejection> {
        let key = segment(parts, "sheet").await?;
        Sheet::from_key(&key).map(Self).ok_or_else(|| PageError::not_found("This page"))
    }
}
