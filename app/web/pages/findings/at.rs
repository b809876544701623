//! The finding whose id stands in the address.

use crate::extract::{DriveAt, segment};
use crate::{App, PageError};
use axum::extract::FromRequestParts;
use axum::http::request::Parts;
use commissioning::FindingId;
use commissioning::record::{Finding, FindingState};
use maud::{Markup, html};

/// A finding of a drive's record.
#[derive(Clone, Debug)]
pub struct FindingAt {
    /// Its drive.
    pub at: DriveAt,
    /// The finding as it stands.
    pub finding: Finding,
}

impl FromRequestParts<App> for FindingAt {
    type Rejection = PageError;

    async fn from_request_parts(parts: &mut Parts, app: &App) -> Result<Self, Self::Rejection> {
        let at = DriveAt::from_request_parts(parts, app).await?;
        let missing = || PageError::not_found("This finding");
        let id: FindingId = segment(parts, "finding").await?.parse().map_err(|_| missing())?;
        let finding = at.drive.record.as_ref().and_then(|r| r.findings.get(&id)).cloned().ok_or_else(missing)?;
        Ok(Self { at, finding })
    }
}

/// Where it stands, by whom, when, and why.
#[must_use]
pub fn state(finding: &Finding) -> Markup {
    html! {
        @match &finding.state {
            FindingState::Open => { b { "open" } }
            FindingState::Settled { how, by_name, received, .. } => { b { "settled" } " " (received.shown()) " UTC by " (by_name) ": " (how) }
            FindingState::Accepted { reason, by_name, received, .. } => { b { "accepted as it is" } " " (received.shown()) " UTC by " (by_name) ": " (reason) }
        }
    }
}
