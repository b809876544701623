//! Records what was entered at a step and goes on to the next unsettled one.

use super::at::StepAt;
use super::sent::Sent;
use super::{changes, frame};
use crate::pages::parameters;
use crate::posted::Posted;
use crate::sheet_form::Back;
use crate::visitor::Signed;
use crate::{App, PageError, conflict_page, links, progress};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::agenda;
use commissioning::journal::Deed;

/// Records it.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(State(app): State<App>, signed: Signed, at: StepAt, sent: Sent) -> Result<Response, PageError> {
    let (posted, faults) = sent.keep_pictures(&app, &at).await?;
    let done = if faults.is_empty() {
        record(&app, &signed, &at, &posted).await
    } else {
        Err(PageError::Fields { errors: faults })
    };
    match done {
        Ok(anything) => onward(&app, &at, anything).await,
        Err(PageError::Fields { errors }) => {
            let back = Back { posted: Some(&posted), errors: &errors };
            Ok((StatusCode::UNPROCESSABLE_ENTITY, frame::page(&app, &signed, &at, &back, None)?).into_response())
        }
        Err(PageError::Stale { conflicts }) => {
            let action = links::step(&at.at.site.tag, &at.at.drive.tag, &at.id);
            Ok(conflict_page::answer(&signed.visitor, &action, Some(at.at.plate()), &posted, &conflicts))
        }
        Err(other) => Err(other),
    }
}

/// Parameters first, then entries: two acts, each made once however often the form is sent. Whether anything was there.
async fn record(app: &App, signed: &Signed, at: &StepAt, posted: &Posted) -> Result<bool, PageError> {
    let (_, step) = at.step()?;
    let reason = posted.text("reason").trim().to_owned();
    let settings =
        step.parameters.as_deref().map(|group| parameters::changes::of(&at.at, group, posted)).unwrap_or_default();
    let entries = changes::of(at, posted)?;
    let anything = !settings.is_empty() || !entries.is_empty();
    if !settings.is_empty() {
        let id = commissioning::ActId(posted.made("parameters")?);
        app.perform(
            signed,
            id,
            Deed::SetParameters { drive: at.at.drive.id, changes: settings, reason: reason.clone() },
        )
        .await?;
    }
    if !entries.is_empty() {
        let deed = Deed::RecordEntries { drive: at.at.drive.id, step: at.id.clone(), changes: entries, reason };
        app.perform(signed, posted.act()?, deed).await?;
    }
    Ok(anything)
}

/// Stays while something is missing here, and says what; goes on otherwise.
async fn onward(app: &App, at: &StepAt, anything: bool) -> Result<Response, PageError> {
    let fresh = at.again(app).await?;
    let agenda = agenda::of(&fresh.at.view());
    let (site, drive) = (at.at.site.tag.as_str(), at.at.drive.tag.as_str());
    let settled = agenda.step(&at.id).is_none_or(|(_, s)| s.state.is_settled());
    let to = if settled {
        progress::after(&agenda, &at.id).address(site, drive)
    } else {
        format!("{}?recorded={}", links::step(site, drive, &at.id), if anything { "partly" } else { "nothing" })
    };
    Ok(Redirect::to(&to).into_response())
}
