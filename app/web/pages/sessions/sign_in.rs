//! Sign in: the same answer, after the same time, whether the name is known or not.

use crate::components::{FieldInput, InputKind, Page, field, form, input_id, main_button, notice};
use crate::pages::people::codes;
use crate::posted::Posted;
use crate::sessions::{Address, SessionToken};
use crate::visitor::Visitor;
use crate::{App, PageError, cookies, links};
use axum::extract::{Query, State};
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use maud::{Markup, html};
use serde::Deserialize;
use store::{SessionKind, SignIn};

/// Where to go afterwards.
#[derive(Debug, Default, Deserialize)]
pub struct Asked {
    #[serde(default)]
    back: String,
}

/// The form; whoever is signed in already goes on; an empty installation is set up first.
///
/// # Errors
/// When the store cannot be read.
pub async fn show(State(app): State<App>, visitor: Visitor, Query(asked): Query<Asked>) -> Result<Response, PageError> {
    if visitor.person.is_some() {
        return Ok(Redirect::to(&links::home()).into_response());
    }
    if app.store.installation().await?.people.is_empty() {
        return Ok(Redirect::to(&links::set_up()).into_response());
    }
    Ok(page(&app, &visitor, &asked.back, "", None).into_response())
}

/// Opens a session under a new token.
///
/// # Errors
/// When the store cannot answer.
pub async fn open(
    State(app): State<App>,
    visitor: Visitor,
    Address(address): Address,
    SessionToken(before): SessionToken,
    posted: Posted,
) -> Result<Response, PageError> {
    let (login, back) = (posted.text("login").trim().to_lowercase(), posted.text("back"));
    let said = match app.store.sign_in(&login, &address, posted.text("password"), app.now()).await? {
        SignIn::Right(person) => {
            if let Some(before) = before {
                app.store.close_session(&before).await?;
            }
            // Whoever says nothing sits at a device that others use too.
            let kind = if posted.text("own") == "yes" { SessionKind::Enrolled } else { SessionKind::Strange };
            let token = app.store.open_session(person.id, kind, app.now()).await?;
            // The start page says what was done with their account; that goes before what they came for.
            let told = codes::to_tell(&app.store.codes_made(person.id).await?, app.now());
            let to = if links::is_local(back) && told.is_empty() { back } else { "/" };
            let mut response = Redirect::to(to).into_response();
            cookies::add(&mut response, &cookies::session(&token, app.secure));
            return Ok(response);
        }
        SignIn::Wrong => "Name and password do not go together. Check both; capitals count in the password.".to_owned(),
        SignIn::Locked { until } => format!("Too many attempts. Try again after {} UTC.", until.shown()),
    };
    Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&app, &visitor, back, posted.text("login"), Some(said))).into_response())
}

fn page(app: &App, visitor: &Visitor, back: &str, login: &str, error: Option<String>) -> Markup {
    let mut name = FieldInput::new("login", "Name", InputKind::Line(60)).autocomplete("username").with(login);
    name.error = error;
    let password =
        FieldInput::new("password", "Password", InputKind::Html("password")).autocomplete("current-password");
    Page::new("Sign in", html! {
        p.lead { "The commissioning book for variable-frequency drives: what was measured, what was set, and what was left." }
        @if let Some(welcome) = &app.welcome { (notice(welcome)) }
        (form(visitor, &links::sign_in(None), html! {
            input type="hidden" name="back" value=(back);
            (field(&name))
            (field(&password))
            div.field {
                label.tick for=(input_id("own")) { input type="checkbox" id=(input_id("own")) name="own" value="yes"; span { "This is my own tablet" } }
                p.hint { "You then stay signed in for a shift of 12 hours. Otherwise the session ends after 30 minutes without use." }
            }
            div.row { (main_button("Sign in")) }
        }))
        p.quiet { "With a one-time code from an administrator, " a href=(links::invitation()) { "set your password" } " first." }
    })
    .narrow()
    .render(visitor)
}
