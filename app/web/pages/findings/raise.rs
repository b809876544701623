//! Raises a finding.

use super::list::page;
use crate::components::{self, FieldInput, InputKind, field, input_id, main_button};
use crate::extract::DriveAt;
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::journal::Deed;
use commissioning::record::Severity;
use commissioning::{FieldError, FindingId};
use maud::{Markup, html};

/// Raises it.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(State(app): State<App>, signed: Signed, at: DriveAt, posted: Posted) -> Result<Response, PageError> {
    let severity = Severity::ALL.into_iter().find(|s| s.key() == posted.text("severity"));
    let step = Some(posted.text("step").to_owned()).filter(|s| !s.is_empty());
    let errors = match severity {
        None => vec![FieldError {
            field: "severity".to_owned(),
            label: "What it holds up".to_owned(),
            message: "Choose what the finding holds up while it is open.".to_owned(),
        }],
        Some(severity) => {
            let deed = Deed::RaiseFinding {
                drive: at.drive.id,
                finding: FindingId(posted.made("finding")?),
                severity,
                text: posted.text("text").to_owned(),
                step,
            };
            match app.perform(&signed, posted.act()?, deed).await {
                Ok(_) => return Ok(Redirect::to(&links::findings(&at.site.tag, &at.drive.tag)).into_response()),
                Err(PageError::Fields { errors }) => errors,
                Err(other) => return Err(other),
            }
        }
    };
    Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&signed, &at, posted.text("step"), Some(&posted), &errors))
        .into_response())
}

/// The form for one.
#[must_use]
pub fn form(signed: &Signed, at: &DriveAt, step: &str, posted: Option<&Posted>, errors: &[FieldError]) -> Markup {
    let none = Posted::default();
    let sent = posted.unwrap_or(&none);
    let options = Severity::ALL.iter().map(|s| (s.key().to_owned(), s.words().to_owned())).collect();
    let severity = FieldInput::new("severity", "What it holds up while it is open", InputKind::Choice(options))
        .needed()
        .sent_back(sent, errors);
    let text =
        FieldInput::new("text", "What is wrong or open", InputKind::Lines(2000)).needed().sent_back(sent, errors);
    components::form(
        &signed.visitor,
        &links::findings(&at.site.tag, &at.drive.tag),
        html! {
            (field(&severity))
            (field(&text))
            div.field {
                label for=(input_id("step")) { "Step it arose at" }
                select.input id=(input_id("step")) name="step" {
                    option value="" { "none in particular" }
                    @for (phase, one) in at.procedure.steps() { option value=(one.id) selected[one.id == step] { (phase.short) ": " (one.title) } }
                }
            }
            div.row { (main_button("Raise the finding")) }
        },
    )
}
