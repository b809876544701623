//! Add a person; the next page makes the one-time code with which they set their password.

use super::{role_boxes, roles};
use crate::components::{FieldInput, InputKind, Page, field, form, main_button};
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::journal::Deed;
use commissioning::{FieldError, PersonId};
use maud::{Markup, html};

/// The form.
pub async fn show(signed: Signed) -> Markup {
    page(&signed, &Posted::default(), &[])
}

/// Adds the person.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(State(app): State<App>, signed: Signed, posted: Posted) -> Result<Response, PageError> {
    let login = posted.text("login").trim().to_lowercase();
    let deed = Deed::AddPerson {
        person: PersonId(posted.made("person")?),
        login: login.clone(),
        name: posted.text("name").trim().to_owned(),
        roles: roles(&posted),
    };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => Ok(Redirect::to(&links::person(&login)).into_response()),
        Err(PageError::Fields { errors }) => {
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&signed, &posted, &errors)).into_response())
        }
        Err(other) => Err(other),
    }
}

fn page(signed: &Signed, posted: &Posted, errors: &[FieldError]) -> Markup {
    let line = |name: &str, label: &str| FieldInput::new(name, label, InputKind::Line(120)).needed();
    Page::new("Add a person", html! {
        (form(&signed.visitor, &links::new_person(), html! {
            (field(&line("name", "Name").hint("As it is printed beside what they sign.").sent_back(posted, errors)))
            (field(&line("login", "Name to sign in with").hint("Lower case, without blanks. It is never given to anyone else later.").sent_back(posted, errors)))
            (role_boxes(&["engineer"], posted, errors))
            div.row { (main_button("Add")) a.b href=(links::people()) { "Back" } }
        }))
    })
    .narrow()
    .render(&signed.visitor)
}
