//! Adds a free row to the parameter record, for what a drive needs besides the generic functions.

use super::list;
use super::rows::{FREE, address_name};
use crate::components::{self, FieldInput, InputKind, button, field};
use crate::extract::DriveAt;
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::FieldError;
use commissioning::journal::Deed;
use maud::{Markup, html};

/// Adds it and opens the free rows.
///
/// # Errors
/// When the store refuses otherwise than at the field.
pub async fn keep(State(app): State<App>, signed: Signed, at: DriveAt, posted: Posted) -> Result<Response, PageError> {
    let deed = Deed::AddParameterRow { drive: at.drive.id, label: posted.text("label").to_owned() };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => {
            Ok(Redirect::to(&links::parameter_group(&at.site.tag, &at.drive.tag, &address_name(FREE))).into_response())
        }
        Err(PageError::Fields { errors }) => {
            Ok((StatusCode::UNPROCESSABLE_ENTITY, list::page(&signed, &at, None, Some(&posted), &errors))
                .into_response())
        }
        Err(other) => Err(other),
    }
}

/// The form for one.
#[must_use]
pub fn form(signed: &Signed, at: &DriveAt, posted: Option<&Posted>, errors: &[FieldError]) -> Markup {
    let none = Posted::default();
    let label = FieldInput::new("label", "What it sets", InputKind::Line(80))
        .hint("For a setting that none of the functions above covers.")
        .sent_back(posted.unwrap_or(&none), errors);
    components::form(
        &signed.visitor,
        &links::parameter_rows(&at.site.tag, &at.drive.tag),
        html! {
            (field(&label))
            (button("Add a free row"))
        },
    )
}
