//! The signature: the password again, then a session under a new token.

use super::closing;
use crate::components::{FieldInput, InputKind, Page, field, form, link_button, main_button};
use crate::extract::DriveAt;
use crate::posted::Posted;
use crate::sessions::SessionToken;
use crate::visitor::Signed;
use crate::{App, PageError, cookies, links};
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::FieldError;
use commissioning::journal::Deed;
use commissioning::record::Meaning;
use maud::{Markup, html};
use store::{PasswordAnswer, Proof};

/// A digest as screens show it: its first sixteen digits in fours.
#[must_use]
pub fn shortened(digest: &str) -> String {
    let head: Vec<char> = digest.chars().take(16).collect();
    head.chunks(4).map(|four| four.iter().collect::<String>()).collect::<Vec<_>>().join(" ")
}

/// The form with what is signed.
#[must_use]
pub fn page(signed: &Signed, at: &DriveAt, meaning: Meaning, posted: Option<&Posted>, errors: &[FieldError]) -> Markup {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    // What was shown is what is signed: a form that came back keeps its digest, and the domain says when it is old.
    let digest =
        posted.map(|p| p.text("digest").to_owned()).filter(|d| !d.is_empty()).unwrap_or_else(|| closing::digest(at));
    let action = match meaning {
        Meaning::Performed => links::sign(site, drive),
        Meaning::Accepted => links::accept(site, drive),
    };
    let none = Posted::default();
    let password = FieldInput::new("password", "Your password", InputKind::Html("password"))
        .autocomplete("current-password")
        .needed()
        .hint("Asked at every signature.")
        .sent_back(&none, errors);
    let body = html! {
        @if meaning == Meaning::Performed { (crate::unanswered::notice(at)) }
        (closing::summary(at, meaning, &digest, &signed.person.name))
        (form(&signed.visitor, &action, html! {
            input type="hidden" name="digest" value=(digest);
            (field(&password))
            div.row { (main_button("Sign")) (link_button(&links::record(site, drive), "Read the record first")) }
        }))
    };
    let title = match meaning {
        Meaning::Performed => "Sign as performed and recorded",
        Meaning::Accepted => "Accept the record",
    };
    Page::new(title, body).narrow().plate(at.plate()).render(&signed.visitor)
}

/// Checks the password and signs.
///
/// # Errors
/// When the store refuses otherwise than at the password.
pub async fn put(
    app: &App,
    signed: &Signed,
    at: &DriveAt,
    meaning: Meaning,
    token: SessionToken,
    posted: &Posted,
) -> Result<Response, PageError> {
    let deed = Deed::Sign { drive: at.drive.id, meaning, digest: posted.text("digest").to_owned() };
    let errors = match wrong(app, signed, posted).await? {
        Some(error) => vec![error],
        None => match app.perform_with(signed, posted.act()?, deed, Proof::password()).await {
            Ok(_) => return done(app, at, token).await,
            Err(PageError::Fields { errors }) => errors,
            Err(other) => return Err(other),
        },
    };
    Ok((StatusCode::UNPROCESSABLE_ENTITY, page(signed, at, meaning, Some(posted), &errors)).into_response())
}

async fn wrong(app: &App, signed: &Signed, posted: &Posted) -> Result<Option<FieldError>, PageError> {
    let at = |message: String| FieldError { field: "password".to_owned(), label: "Your password".to_owned(), message };
    Ok(match app.store.check_password(signed.person.id, posted.text("password"), app.now()).await? {
        PasswordAnswer::Right => None,
        PasswordAnswer::Wrong => {
            Some(at("This is not your password. Capitals count. The third wrong one locks signing.".to_owned()))
        }
        PasswordAnswer::Locked { until } => Some(at(format!(
            "Signing is locked after three wrong passwords, until {} UTC or until an administrator unlocks it.",
            until.shown()
        ))),
    })
}

/// The record with its signature, under a new session token.
async fn done(app: &App, at: &DriveAt, token: SessionToken) -> Result<Response, PageError> {
    let mut response = Redirect::to(&links::drive(&at.site.tag, &at.drive.tag)).into_response();
    let renewed = match &token.0 {
        Some(token) => app.store.renew_session(token, app.now()).await?,
        None => None,
    };
    if let Some(token) = renewed {
        cookies::add(&mut response, &cookies::session(&token, app.secure));
    }
    Ok(response)
}
