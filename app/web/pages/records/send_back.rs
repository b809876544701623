//! Returns a signed record with a reason.

use crate::components::{FieldInput, InputKind, Page, field, form, link_button, main_button};
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

/// The form.
pub async fn show(signed: Signed, at: DriveAt) -> Markup {
    page(&signed, &at, None, &[])
}

/// Returns it.
///
/// # Errors
/// When the store refuses otherwise than at the field.
pub async fn keep(State(app): State<App>, signed: Signed, at: DriveAt, posted: Posted) -> Result<Response, PageError> {
    let deed = Deed::Return { drive: at.drive.id, reason: posted.text("reason").to_owned() };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => Ok(Redirect::to(&links::queue()).into_response()),
        Err(PageError::Fields { errors }) => {
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&signed, &at, Some(&posted), &errors)).into_response())
        }
        Err(other) => Err(other),
    }
}

fn page(signed: &Signed, at: &DriveAt, posted: Option<&Posted>, errors: &[FieldError]) -> Markup {
    let none = Posted::default();
    let reason = FieldInput::new("reason", "Why it goes back, and what is to be done", InputKind::Lines(1000))
        .needed()
        .sent_back(posted.unwrap_or(&none), errors);
    let body = html! {
        p.lead { "It goes back to the engineer, in progress again. Its signature stays, shown as superseded." }
        (form(&signed.visitor, &links::send_back(&at.site.tag, &at.drive.tag), html! {
            (field(&reason))
            div.row { (main_button("Return the record")) (link_button(&links::record(&at.site.tag, &at.drive.tag), "Back to the record")) }
        }))
    };
    Page::new("Return the record", body).narrow().plate(at.plate()).render(&signed.visitor)
}
