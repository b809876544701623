//! Create a site.

use crate::components::{FieldInput, InputKind, Page, field, form, main_button};
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::journal::Deed;
use commissioning::plant::Sheet;
use commissioning::{FieldError, SiteId};
use maud::{Markup, html};

/// The form.
pub async fn show(signed: Signed) -> Markup {
    page(&signed, &Posted::default(), &[])
}

/// Creates it and goes on to its supply.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(State(app): State<App>, signed: Signed, posted: Posted) -> Result<Response, PageError> {
    let tag = posted.text("tag").trim().to_owned();
    let deed = Deed::CreateSite {
        site: SiteId(posted.made("site")?),
        tag: tag.clone(),
        name: posted.text("name").trim().to_owned(),
    };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => Ok(Redirect::to(&links::site_sheet(&tag, Sheet::Site)).into_response()),
        Err(PageError::Fields { errors }) => {
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&signed, &posted, &errors)).into_response())
        }
        Err(other) => Err(other),
    }
}

fn page(signed: &Signed, posted: &Posted, errors: &[FieldError]) -> Markup {
    let line = |name: &str, label: &str| FieldInput::new(name, label, InputKind::Line(120)).needed();
    Page::new("Create a site", html! {
        (form(&signed.visitor, &links::new_site(), html! {
            (field(&line("name", "Name").hint("As the client calls it: Larch Ferry board mill.").sent_back(posted, errors)))
            (field(&line("tag", "Short tag").hint("Stands in addresses: larch-ferry. It cannot be changed later.").sent_back(posted, errors)))
            div.row { (main_button("Create")) a.b href=(links::sites()) { "Back" } }
        }))
    })
    .narrow()
    .render(&signed.visitor)
}
