//! Create a drive at a site.

use super::sheet::plate;
use crate::components::{FieldInput, InputKind, Page, field, form, main_button};
use crate::extract::SiteAt;
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::journal::Deed;
use commissioning::plant::Site;
use commissioning::{DriveId, FieldError};
use maud::{Markup, html};

/// The form.
pub async fn show(signed: Signed, SiteAt(site): SiteAt) -> Markup {
    page(&signed, &site, &Posted::default(), &[])
}

/// Creates it.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(
    State(app): State<App>,
    signed: Signed,
    SiteAt(site): SiteAt,
    posted: Posted,
) -> Result<Response, PageError> {
    let tag = posted.text("tag").trim().to_owned();
    let deed = Deed::CreateDrive {
        site: site.id,
        drive: DriveId(posted.made("drive")?),
        tag: tag.clone(),
        name: posted.text("name").trim().to_owned(),
    };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => Ok(Redirect::to(&links::drive(&site.tag, &tag)).into_response()),
        Err(PageError::Fields { errors }) => {
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&signed, &site, &posted, &errors)).into_response())
        }
        Err(other) => Err(other),
    }
}

fn page(signed: &Signed, site: &Site, posted: &Posted, errors: &[FieldError]) -> Markup {
    let line = |name: &str, label: &str| FieldInput::new(name, label, InputKind::Line(120)).needed();
    Page::new("Create a drive", html! {
        (form(&signed.visitor, &links::new_drive(&site.tag), html! {
            (field(&line("tag", "Plant tag").hint("As engraved on the label: FN-204. It cannot be changed later.").sent_back(posted, errors)))
            (field(&line("name", "What it drives").hint("Return-air fan, dryer 2.").sent_back(posted, errors)))
            div.row { (main_button("Create")) a.b href=(links::site(&site.tag)) { "Back" } }
        }))
    })
    .plate(plate(site))
    .narrow()
    .render(&signed.visitor)
}
