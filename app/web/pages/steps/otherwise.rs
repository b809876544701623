//! Settles a step without its entries: it does not apply here, or it could not be done; always with a reason.

use super::at::StepAt;
use crate::components::{FieldInput, InputKind, Page, field, form, link_button, main_button};
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, links, progress};
use axum::extract::{Query, State};
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::journal::Deed;
use commissioning::record::SettledOtherwise;
use commissioning::{FieldError, agenda};
use maud::{Markup, html};
use serde::Deserialize;

/// Which of the two was asked for.
#[derive(Debug, Default, Deserialize)]
pub struct Asked {
    #[serde(default)]
    how: String,
}

/// The form.
///
/// # Errors
/// Never for a step that is there.
pub async fn show(signed: Signed, at: StepAt, Query(asked): Query<Asked>) -> Result<Markup, PageError> {
    page(&signed, &at, &asked.how, None, &[])
}

/// Settles it and goes on.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(State(app): State<App>, signed: Signed, at: StepAt, posted: Posted) -> Result<Response, PageError> {
    let how = match posted.text("how") {
        "not-applicable" => SettledOtherwise::NotApplicable,
        "could-not-be-done" => SettledOtherwise::CouldNotBeDone,
        _ => {
            return Err(PageError::BadForm {
                why: "The form does not say how the step is settled. Load the page again.".to_owned(),
            });
        }
    };
    let deed =
        Deed::SettleStep { drive: at.at.drive.id, step: at.id.clone(), how, reason: posted.text("reason").to_owned() };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => {
            let fresh = at.again(&app).await?;
            let next = progress::after(&agenda::of(&fresh.at.view()), &at.id);
            Ok(Redirect::to(&next.address(&at.at.site.tag, &at.at.drive.tag)).into_response())
        }
        Err(PageError::Fields { errors }) => {
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&signed, &at, posted.text("how"), Some(&posted), &errors)?)
                .into_response())
        }
        Err(other) => Err(other),
    }
}

fn page(
    signed: &Signed,
    at: &StepAt,
    how: &str,
    posted: Option<&Posted>,
    errors: &[FieldError],
) -> Result<Markup, PageError> {
    let (_, step) = at.step()?;
    let (site, drive) = (at.at.site.tag.as_str(), at.at.drive.tag.as_str());
    let undone = how == "could-not-be-done";
    let (title, hint) = if undone {
        ("Could not be done", "It becomes a finding that somebody must settle or accept by name.")
    } else {
        ("Does not apply", "For what this drive does not have. It is listed in the record with your reason.")
    };
    let none = Posted::default();
    let reason = FieldInput::new("reason", "Reason", InputKind::Lines(1000))
        .needed()
        .hint(hint)
        .sent_back(posted.unwrap_or(&none), errors);
    let body = html! {
        p.lead { (step.title) }
        @if step.stops_start_up { p.notice { "This step guards start-up: settling it so raises a finding, which stops start-up until it is settled or accepted by name." } }
        (form(&signed.visitor, &links::otherwise(site, drive, &at.id, ""), html! {
            input type="hidden" name="how" value=(if undone { "could-not-be-done" } else { "not-applicable" });
            (field(&reason))
            div.row { (main_button("Settle the step so")) (link_button(&links::step(site, drive, &at.id), "Back to the step")) }
        }))
    };
    Ok(Page::new(title, body).narrow().plate(at.at.plate()).render(&signed.visitor))
}
