//! Records what was entered at a step and goes on to the next unsettled one.

use super::at::StepAt;
use super::sent::Sent;
use super::{brought, changes, frame, stay};
use crate::pages::parameters;
use crate::posted::Posted;
use crate::sheet_form::Back;
use crate::visitor::Signed;
use crate::{App, PageError, conflict_page, links, progress, verdicts};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::decide::{Surroundings, decide};
use commissioning::journal::{Act, Deed};
use commissioning::{ActId, Refusal, agenda};

/// Records it.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(State(app): State<App>, signed: Signed, at: StepAt, sent: Sent) -> Result<Response, PageError> {
    let (posted, faults) = sent.keep_pictures(&app, &at).await?;
    let (done, settings_kept) = if faults.is_empty() {
        record(&app, &signed, &at, &posted).await?
    } else {
        (Err(PageError::Fields { errors: faults }), false)
    };
    match done {
        Ok(anything) => onward(&app, &at, anything).await,
        Err(PageError::Fields { errors }) => {
            let back = Back { posted: Some(&posted), errors: &errors };
            let told = settings_kept.then_some("The settings were recorded; what is listed below was not.");
            Ok((StatusCode::UNPROCESSABLE_ENTITY, frame::page(&signed, &at, &back, told, None)?).into_response())
        }
        Err(PageError::Stale { conflicts }) => {
            let action = links::step(&at.at.site.tag, &at.at.drive.tag, &at.id);
            Ok(conflict_page::answer(&signed.visitor, &action, Some(at.at.plate()), &posted, &conflicts))
        }
        Err(other) => Err(other),
    }
}

/// Parameters first, then entries: two acts, each made once however often the form is sent. Both are tried before the
/// first is made, so that a form refused is a form of which nothing was recorded. Gives whether anything was there, or
/// the refusal, and whether the settings were kept all the same because somebody else came between the two.
async fn record(
    app: &App,
    signed: &Signed,
    at: &StepAt,
    posted: &Posted,
) -> Result<(Result<bool, PageError>, bool), PageError> {
    let (_, step) = at.step()?;
    let drive = at.at.drive.id;
    let reason = posted.text("reason").trim().to_owned();
    let settings =
        step.parameters.as_deref().map(|group| parameters::changes::of(&at.at, group, posted)).unwrap_or_default();
    let entries = changes::of(at, posted)?;
    let mut acts = Vec::new();
    if !settings.is_empty() {
        let deed = Deed::SetParameters { drive, changes: settings, reason: reason.clone() };
        acts.push(Act { id: ActId(posted.made("parameters")?), tablet: None, deed });
    }
    if !entries.is_empty() {
        let deed = Deed::RecordEntries { drive, step: at.id.clone(), changes: entries, reason };
        acts.push(Act { id: posted.act()?, tablet: None, deed });
    }
    if let [first, _] = acts.as_slice()
        && app.store.outcome(first.id).await?.is_none()
        && let Err(refused) = tried(app, signed, at, &acts)
    {
        return Ok((Err(refused), false));
    }
    let mut made = 0;
    for act in &acts {
        if let Err(fault) = app.perform(signed, act.id, act.deed.clone()).await {
            return Ok((Err(fault), made > 0));
        }
        made += 1;
    }
    Ok((Ok(made > 0), false))
}

/// What the acts would be refused for, the wrong fields of all of them together.
fn tried(app: &App, signed: &Signed, at: &StepAt, acts: &[Act]) -> Result<(), PageError> {
    let around = Surroundings {
        actor: Some(&signed.person),
        now: app.now(),
        installation: &at.at.installation,
        site: Some(&at.at.site),
        drive: Some(&at.at.drive),
        password_proved: false,
    };
    let mut wrong = Vec::new();
    for act in acts {
        match decide(act, &around) {
            Ok(_) => {}
            Err(Refusal::Fields { errors }) => wrong.extend(errors),
            Err(other) => return Err(other.into()),
        }
    }
    if wrong.is_empty() { Ok(()) } else { Err(PageError::Fields { errors: wrong }) }
}

/// Stays while something is missing here, or what was just recorded is outside here or made something outside elsewhere,
/// and says so; goes on otherwise.
async fn onward(app: &App, at: &StepAt, anything: bool) -> Result<Response, PageError> {
    let fresh = at.again(app).await?;
    let agenda = agenda::of(&fresh.at.view());
    let (site, drive) = (at.at.site.tag.as_str(), at.at.drive.tag.as_str());
    let settled = agenda.step(&at.id).is_none_or(|(_, s)| s.state.is_settled());
    let (_, step) = fresh.step()?;
    let outside = anything && stay::any_outside(&verdicts::at_step(&fresh.at.view(), step));
    let brought = if anything { brought::of(&at.at.view(), &fresh.at.view(), &at.id) } else { String::new() };
    let to = match (settled, anything) {
        (true, _) if !outside && brought.is_empty() => progress::after(&agenda, &at.id).address(site, drive),
        (_, true) => links::step_recorded(site, drive, &at.id, if settled { "whole" } else { "partly" }, &brought),
        (_, false) => links::step_recorded(site, drive, &at.id, "nothing", ""),
    };
    Ok(Redirect::to(&to).into_response())
}
