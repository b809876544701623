//! The step whose id stands in the address, with everything about it that a page needs.

use crate::extract::{DriveAt, segment};
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError};
use axum::extract::FromRequestParts;
use axum::http::request::Parts;
use commissioning::EventId;
use commissioning::people::Role;
use commissioning::procedure::{IsolationAct, Item, ItemKind, Phase, Step, applies};
use commissioning::record::{EntryPlace, Status};

/// A step of a drive's procedure.
#[derive(Clone, Debug)]
pub struct StepAt {
    /// Its drive.
    pub at: DriveAt,
    /// Its id; it is there.
    pub id: String,
    /// The day on which it is looked at, `2026-11-17`: an instrument's calibration may have run out by then.
    pub today: String,
}

impl StepAt {
    /// The step with its phase.
    ///
    /// # Errors
    /// Never for one that was extracted.
    pub fn step(&self) -> Result<(&Phase, &Step), PageError> {
        self.at.procedure.step(&self.id).ok_or_else(|| PageError::not_found("This step"))
    }

    /// The same step after something was recorded.
    ///
    /// # Errors
    /// When the store cannot be read.
    pub async fn again(&self, app: &App) -> Result<Self, PageError> {
        let found = app
            .store
            .drive_view(&self.at.site.tag, &self.at.drive.tag)
            .await?
            .ok_or_else(|| PageError::not_found("This drive"))?;
        let at = DriveAt {
            drive: found.drive,
            site: found.site,
            procedure: found.procedure,
            installation: found.installation,
        };
        Ok(Self { at, id: self.id.clone(), today: self.today.clone() })
    }
}

impl FromRequestParts<App> for StepAt {
    type Rejection = PageError;

    async fn from_request_parts(parts: &mut Parts, app: &App) -> Result<Self, Self::Rejection> {
        let at = DriveAt::from_request_parts(parts, app).await?;
        let id = segment(parts, "step").await?;
        if at.procedure.step(&id).is_none() {
            return Err(PageError::not_found(format!("A step “{}”", commissioning::typed::shorten(&id))));
        }
        Ok(Self { at, id, today: app.now().date().to_string() })
    }
}

/// Whether this person can record here now.
#[must_use]
pub fn may_record(signed: &Signed, at: &DriveAt) -> bool {
    let in_progress = at.drive.record.as_ref().is_some_and(|r| matches!(r.status, Status::InProgress { .. }));
    in_progress && signed.visitor.is_any(&[Role::Engineer])
}

/// The items that apply with the options fitted.
#[must_use]
pub fn items<'a>(at: &DriveAt, step: &'a Step) -> Vec<&'a Item> {
    let flags = at.view().flags();
    step.items.iter().filter(|i| applies(&i.when, &flags)).collect()
}

/// The places of an item: one, or one a row.
pub fn places<'a>(step: &Step, item: &'a Item) -> impl Iterator<Item = EntryPlace> + use<'a> {
    let rows = u16::try_from(step.rows.len().max(1)).unwrap_or(u16::MAX);
    (0..rows).map(|row| EntryPlace::in_row(item.key.clone(), row))
}

/// As forms name a place.
#[must_use]
pub fn name(place: &EntryPlace) -> String {
    format!("{}.{}", place.item, place.row)
}

/// Whether an item names an instrument.
#[must_use]
pub const fn names_instrument(item: &Item) -> bool {
    matches!(item.kind, ItemKind::Reading { instrument: true, .. })
}

/// Whether what stands at a place no longer counts and is asked anew: isolation was changed since, or leads exchanged.
#[must_use]
pub fn asked_again(at: &DriveAt, step: &Step, place: &EntryPlace) -> bool {
    let Some(record) = &at.drive.record else { return false };
    let Some(entry) = record.entry(place) else { return false };
    if record.observed(place).is_none() {
        return true;
    }
    let last = record.isolations.last();
    let since = match (step.isolation, record.isolated()) {
        (Some(IsolationAct::Enter), false) => last.map_or(0, |i| i.lifted_sequence),
        (Some(IsolationAct::Lift), true) => last.map_or(0, |i| i.from_sequence),
        _ => 0,
    };
    entry.sequence <= since
}

/// A picture already received that a form carries on, as `hash media bytes`.
#[must_use]
pub fn kept(posted: &Posted, name: &str) -> Option<commissioning::record::Photo> {
    let text = posted.text(&format!("{name}.kept"));
    let mut parts = text.split(' ');
    let (hash, media, bytes) = (parts.next()?, parts.next()?, parts.next()?);
    Some(commissioning::record::Photo {
        hash: hash.to_owned(),
        media: media.to_owned(),
        bytes: bytes.parse().ok()?,
        caption: String::new(),
    })
}

/// Events as a form carries them.
#[must_use]
pub fn joined(seen: &[EventId]) -> String {
    seen.iter().map(|e| e.0.as_str()).collect::<Vec<_>>().join(" ")
}
