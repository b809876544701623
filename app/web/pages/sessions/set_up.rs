//! First start: the one-time code that the program printed, the firm's name, the first administrator.

use super::{new_password_fields, password_error, unlike};
use crate::components::{FieldInput, InputKind, Page, field, form, main_button};
use crate::posted::Posted;
use crate::visitor::Visitor;
use crate::{App, PageError, links};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::journal::{Act, Deed};
use commissioning::{FieldError, PersonId};
use maud::{Markup, html};
use store::{PasswordAnswer, Proof};

/// The form, while nothing is set up.
///
/// # Errors
/// When the store cannot be read, or set-up was done.
pub async fn show(State(app): State<App>, visitor: Visitor) -> Result<Response, PageError> {
    if is_done(&app).await? {
        return Ok(Redirect::to(&links::sign_in(None)).into_response());
    }
    Ok(page(&visitor, &Posted::default(), &[]).into_response())
}

/// Keeps it.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(State(app): State<App>, visitor: Visitor, posted: Posted) -> Result<Response, PageError> {
    if is_done(&app).await? {
        return Err(PageError::NotNow { why: "This installation is set up already. Sign in instead.".to_owned() });
    }
    let errors = match perform(&app, &posted).await? {
        Ok(()) => return Ok(Redirect::to(&links::sign_in(None)).into_response()),
        Err(errors) => errors,
    };
    Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&visitor, &posted, &errors)).into_response())
}

async fn perform(app: &App, posted: &Posted) -> Result<Result<(), Vec<FieldError>>, PageError> {
    if let Some(error) = unlike(posted) {
        return Ok(Err(vec![error]));
    }
    let code =
        |message: String| vec![FieldError { field: "code".to_owned(), label: "One-time code".to_owned(), message }];
    match app.store.setup_code_fits(posted.text("code"), app.now()).await? {
        PasswordAnswer::Right => {}
        PasswordAnswer::Wrong => {
            return Ok(Err(code(
                "This is not the code that the program printed when it started. Start it again for a new one."
                    .to_owned(),
            )));
        }
        PasswordAnswer::Locked { until } => {
            return Ok(Err(code(format!("Too many attempts. Try again after {} UTC.", until.shown()))));
        }
    }
    let login = posted.text("login").trim().to_lowercase();
    if let Some(error) = weak(posted.text("new"), &login) {
        return Ok(Err(vec![error]));
    }
    let person = PersonId(posted.made("person")?);
    let roles = posted
        .all("role")
        .filter_map(|key| commissioning::people::Role::ALL.into_iter().find(|r| r.key() == key))
        .collect();
    let deed = Deed::SetUp {
        firm: posted.text("firm").trim().to_owned(),
        person,
        login,
        name: posted.text("name").trim().to_owned(),
        roles,
    };
    match app
        .store
        .perform(None, Act { id: posted.act()?, tablet: None, deed }, Proof::none(), app.now())
        .await
        .map_err(PageError::from)
    {
        Ok(_) => {}
        Err(PageError::Fields { errors }) => return Ok(Err(errors)),
        Err(other) => return Err(other),
    }
    match app.store.set_password(person, posted.text("new"), app.now()).await {
        Ok(()) => Ok(Ok(())),
        Err(fault) => password_error(fault, "new").map(|e| Err(vec![e])),
    }
}

/// What would be refused after the act is done is refused before it, so that set-up is never left half done.
fn weak(password: &str, login: &str) -> Option<FieldError> {
    let fault = store::password_will_do(password, login).err()?;
    password_error(fault, "new").ok()
}

async fn is_done(app: &App) -> Result<bool, PageError> {
    Ok(!app.store.installation().await?.people.is_empty())
}

fn page(visitor: &Visitor, posted: &Posted, errors: &[FieldError]) -> Markup {
    let line = |name: &str, label: &str| FieldInput::new(name, label, InputKind::Line(120)).needed();
    Page::new("Set up this installation", html! {
        p.lead { "Nothing is recorded here yet. Name the firm and make the first account: an administrator, who adds everyone else." }
        (form(visitor, &links::set_up(), html! {
            (field(&line("code", "One-time code").hint("Printed by the program when it started.").sent_back(posted, errors)))
            (field(&line("firm", "Firm").hint("As it is printed on handover packages.").autocomplete("organization").sent_back(posted, errors)))
            (field(&line("name", "Your name").hint("As it is printed beside what you sign.").autocomplete("name").sent_back(posted, errors)))
            (field(&line("login", "Name to sign in with").hint("Lower case, without blanks.").autocomplete("username").sent_back(posted, errors)))
            (crate::pages::people::role_boxes(&["administrator"], posted, errors))
            (new_password_fields(posted, errors))
            div.row { (main_button("Set up")) }
        }))
    })
    .narrow()
    .render(visitor)
}
