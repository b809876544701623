//! Change one's own password; every other session of that person ends.

use super::{new_password_fields, password_error, unlike};
use crate::components::{FieldInput, InputKind, Page, field, form, main_button};
use crate::posted::Posted;
use crate::sessions::SessionToken;
use crate::visitor::Signed;
use crate::{App, PageError, cookies, links};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::FieldError;
use maud::{Markup, html};
use store::{PasswordAnswer, SessionKind};

/// The form.
pub async fn show(signed: Signed) -> Markup {
    page(&signed, &[])
}

/// Changes it and goes on under a new session.
///
/// # Errors
/// When the store cannot answer.
pub async fn change(
    State(app): State<App>,
    signed: Signed,
    SessionToken(before): SessionToken,
    posted: Posted,
) -> Result<Response, PageError> {
    // What was said of the device at sign-in still holds; setting the password closes the session itself.
    let session = match &before {
        Some(token) => app.store.session(token, app.now()).await?,
        None => None,
    };
    let kind = session.map_or(SessionKind::Strange, |s| s.kind);
    let error = match refused(&app, &signed, &posted).await? {
        Some(error) => error,
        None => match app.store.set_password(signed.person.id, posted.text("new"), app.now()).await {
            Ok(()) => {
                let token = app.store.open_session(signed.person.id, kind, app.now()).await?;
                let mut response = Redirect::to(&links::home()).into_response();
                cookies::add(&mut response, &cookies::session(&token, app.secure));
                return Ok(response);
            }
            Err(fault) => password_error(fault, "new")?,
        },
    };
    Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&signed, &[error])).into_response())
}

async fn refused(app: &App, signed: &Signed, posted: &Posted) -> Result<Option<FieldError>, PageError> {
    if let Some(error) = unlike(posted) {
        return Ok(Some(error));
    }
    let at = |message: String| FieldError { field: "old".to_owned(), label: "Password until now".to_owned(), message };
    Ok(match app.store.check_password(signed.person.id, posted.text("old"), app.now()).await? {
        PasswordAnswer::Right => None,
        PasswordAnswer::Wrong => Some(at("This is not your password. Capitals count.".to_owned())),
        PasswordAnswer::Locked { until } => {
            Some(at(format!("Too many attempts. Try again after {} UTC, or ask an administrator.", until.shown())))
        }
    })
}

fn page(signed: &Signed, errors: &[FieldError]) -> Markup {
    let none = Posted::default();
    Page::new("Change your password", html! {
        (form(&signed.visitor, &links::password(), html! {
            (field(&FieldInput::new("old", "Password until now", InputKind::Html("password")).autocomplete("current-password").needed().sent_back(&none, errors)))
            (new_password_fields(&none, errors))
            div.row { (main_button("Change password")) }
        }))
    })
    .narrow()
    .render(&signed.visitor)
}
