//! A person sets their own first password with a one-time code, so that no administrator ever knows it.

use super::{new_password_fields, password_error, unlike};
use crate::components::{FieldInput, InputKind, Page, field, form, main_button};
use crate::posted::Posted;
use crate::visitor::Visitor;
use crate::{App, PageError, links};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::FieldError;
use maud::{Markup, html};
use store::PasswordFault;

/// The form.
pub async fn show(visitor: Visitor) -> Markup {
    page(&visitor, &Posted::default(), &[])
}

/// Sets the password; the code is used up.
///
/// # Errors
/// When the store cannot keep it.
pub async fn redeem(State(app): State<App>, visitor: Visitor, posted: Posted) -> Result<Response, PageError> {
    let error = match unlike(&posted) {
        Some(error) => error,
        None => match app.store.redeem(posted.text("code").trim(), posted.text("new"), app.now()).await {
            Ok(_) => return Ok(Redirect::to(&links::sign_in(None)).into_response()),
            Err(fault) => {
                let at = if matches!(fault, PasswordFault::Unknown) { "code" } else { "new" };
                password_error(fault, at)?
            }
        },
    };
    Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&visitor, &posted, &[error])).into_response())
}

fn page(visitor: &Visitor, posted: &Posted, errors: &[FieldError]) -> Markup {
    Page::new("Set your password", html! {
        p.lead { "An administrator gave you a one-time code. Choose a password that only you know; it is asked for again each time you sign a record." }
        (form(visitor, &links::invitation(), html! {
            (field(&FieldInput::new("code", "One-time code", InputKind::Line(80)).needed().sent_back(posted, errors)))
            (new_password_fields(posted, errors))
            div.row { (main_button("Set password")) }
        }))
    })
    .narrow()
    .render(visitor)
}
