//! A person: change name and roles, switch the account off and on, make a one-time code, lift a signing lock.

use super::{codes, role_boxes, roles};
use crate::components::{FieldInput, InputKind, Page, button, facts, field, form, main_button, notice};
use crate::extract::segment;
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::{FromRequestParts, State};
use axum::http::StatusCode;
use axum::http::request::Parts;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::FieldError;
use commissioning::journal::Deed;
use maud::{Markup, html};
use store::AccountRow;

/// The account whose login stands in the address.
#[derive(Clone, Debug)]
pub struct AccountAt(pub AccountRow);

impl FromRequestParts<App> for AccountAt {
    type Rejection = PageError;

    async fn from_request_parts(parts: &mut Parts, app: &App) -> Result<Self, Self::Rejection> {
        let login = segment(parts, "login").await?;
        let found = app.store.accounts().await?.into_iter().find(|a| a.person.login == login);
        found.map(Self).ok_or_else(|| PageError::not_found("A person with this name to sign in"))
    }
}

/// The page.
pub async fn show(State(app): State<App>, signed: Signed, AccountAt(account): AccountAt) -> Markup {
    page(&app, &signed, &account, &Posted::default(), &[], None)
}

/// Keeps the change.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(
    State(app): State<App>,
    signed: Signed,
    AccountAt(account): AccountAt,
    posted: Posted,
) -> Result<Response, PageError> {
    let active = posted.text("active") != "no";
    let deed = Deed::ChangePerson {
        person: account.person.id,
        name: posted.text("name").trim().to_owned(),
        roles: roles(&posted),
        active,
    };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => {
            if !active {
                app.store.close_sessions_of(account.person.id).await?;
            }
            Ok(Redirect::to(&links::people()).into_response())
        }
        Err(PageError::Fields { errors }) => {
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&app, &signed, &account, &posted, &errors, None))
                .into_response())
        }
        Err(other) => Err(other),
    }
}

/// The page, perhaps with a one-time code just made.
pub fn page(
    app: &App,
    signed: &Signed,
    account: &AccountRow,
    posted: &Posted,
    errors: &[FieldError],
    code: Option<&str>,
) -> Markup {
    let person = &account.person;
    let held: Vec<&str> = person.roles.iter().map(|r| r.key()).collect();
    let name =
        FieldInput::new("name", "Name", InputKind::Line(120)).needed().with(&person.name).sent_back(posted, errors);
    let active = FieldInput::new("active", "Account works", InputKind::Flag)
        .needed()
        .with(if person.active { "yes" } else { "no" })
        .hint("Switched off, nobody can sign in with it; what was recorded stays.")
        .sent_back(posted, errors);
    let locked = account.signing_locked_until.filter(|until| *until > app.now());
    Page::new(person.name.clone(), html! {
        @if let Some(code) = code { (shown_code(&person.name, code)) }
        (facts([
            ("signs in as", html! { (person.login) }),
            ("password", html! { @match account.password_set { Some(t) => { "set " (t.shown()) " UTC" }, None => "not set yet" } }),
            ("one-time codes", html! { @if account.codes.is_empty() { "none" } @for code in &account.codes { p { (codes::words(code)) } } }),
            ("last here", html! { @match account.last_sign_in { Some(t) => { (t.shown()) " UTC" }, None => "never" } }),
        ]))
        @if let Some(until) = locked {
            (notice(&format!("Signing is locked after wrong passwords, until {} UTC.", until.shown())))
            (form(&signed.visitor, &links::signing_unlock(&person.login), button("Lift the lock")))
        }
        (form(&signed.visitor, &links::person(&person.login), html! {
            (field(&name))
            (role_boxes(&held, posted, errors))
            (field(&active))
            div.row { (main_button("Keep")) a.b href=(links::people()) { "Back" } }
        }))
        section.card {
            h2 { "One-time code" }
            p { "With it " (person.name) " sets a password that only they know. It works once and for seven days; a new one takes its place. That you made it is shown to them and to everyone under “Who can sign”." }
            (form(&signed.visitor, &links::invite(&person.login), button("Make a one-time code")))
        }
    })
    .narrow()
    .render(&signed.visitor)
}

fn shown_code(name: &str, code: &str) -> Markup {
    html! {
        section.card role="status" {
            h2 { "One-time code for " (name) }
            p.value.code { (code) }
            p { "Hand it over in person. It is shown this once. It is used at " a href=(links::invitation()) { (links::invitation()) } "." }
        }
    }
}
