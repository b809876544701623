//! A site's own sheets: what holds for the whole site, and its supply.

use crate::components::{Page, Plate, kept_form, main_button, notice, saved};
use crate::extract::{SheetAt, SiteAt};
use crate::posted::Posted;
use crate::sheet_form::{self, Back};
use crate::sheet_words;
use crate::visitor::Signed;
use crate::{App, PageError, conflict_page, links};
use axum::extract::{Query, State};
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::journal::Deed;
use commissioning::people::Role;
use commissioning::plant::{Sheet, Site};
use maud::{Markup, html};
use serde::Deserialize;

/// The site's label in the header.
#[must_use]
pub fn plate(site: &Site) -> Plate {
    Plate { tag: site.tag.clone(), address: links::site(&site.tag), name: site.name.clone(), ..Plate::default() }
}

/// The sheets that belong to a site.
const SHEETS: [Sheet; 2] = [Sheet::Site, Sheet::Supply];

fn of_a_site(sheet: Sheet) -> Result<Sheet, PageError> {
    if SHEETS.contains(&sheet) { Ok(sheet) } else { Err(PageError::not_found("This page")) }
}

/// How many fields were just kept.
#[derive(Debug, Default, Deserialize)]
pub struct Asked {
    #[serde(default)]
    saved: String,
}

/// The form.
///
/// # Errors
/// When the sheet is a drive's.
pub async fn show(
    signed: Signed,
    SiteAt(site): SiteAt,
    SheetAt(sheet): SheetAt,
    Query(asked): Query<Asked>,
) -> Result<Markup, PageError> {
    let told = sheet_form::saved_words(sheet.words(), "field", &asked.saved);
    Ok(page(&signed, &site, of_a_site(sheet)?, &Back::default(), told.as_deref()))
}

/// Records what was changed.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(
    State(app): State<App>,
    signed: Signed,
    SiteAt(site): SiteAt,
    SheetAt(sheet): SheetAt,
    posted: Posted,
) -> Result<Response, PageError> {
    let sheet = of_a_site(sheet)?;
    let changes = sheet_form::changes(sheet, &site.fields, &posted);
    let told = links::saved(&links::site_sheet(&site.tag, sheet), changes.len());
    if changes.is_empty() {
        return Ok(Redirect::to(&told).into_response());
    }
    let deed = Deed::SetSiteFields { site: site.id, sheet, changes, reason: posted.text("reason").trim().to_owned() };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => Ok(Redirect::to(&told).into_response()),
        Err(PageError::Fields { errors }) => {
            let back = Back { posted: Some(&posted), errors: &errors };
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&signed, &site, sheet, &back, None)).into_response())
        }
        Err(PageError::Stale { conflicts }) => Ok(conflict_page::answer(
            &signed.visitor,
            &links::site_sheet(&site.tag, sheet),
            Some(plate(&site)),
            &posted,
            &conflicts,
        )),
        Err(other) => Err(other),
    }
}

fn page(signed: &Signed, site: &Site, sheet: Sheet, back: &Back<'_>, told: Option<&str>) -> Markup {
    let may = signed.visitor.is_any(&[Role::Engineer, Role::Supervisor]);
    let action = links::site_sheet(&site.tag, sheet);
    let away = html! { a.b href=(links::site(&site.tag)) { "Back to the site" } };
    let body = html! {
        nav.tabs aria-label="Sheets" {
            @for other in SHEETS { a href=(links::site_sheet(&site.tag, other)) aria-current=[(other == sheet).then_some("page")] { (other.words()) } }
        }
        @if sheet == Sheet::Supply { (notice("What is entered here holds for every drive of the site, unless the drive's own supply sheet says otherwise.")) }
        @if let Some(told) = told { (saved(told)) }
        (sheet_form::summary(back.errors))
        @if may {
            (kept_form(&signed.visitor, &action, html! {
                (sheet_form::inputs(sheet, 1, &site.fields, back))
                (sheet_form::reason(back, sheet_form::has_values(sheet, &site.fields)))
                div.row { (main_button("Record")) (away) }
            }))
        } @else { (sheet_words::all(sheet, 1, &site.fields)) div.row { (away) } }
    };
    Page::new(sheet.words(), body).plate(plate(site)).render(&signed.visitor)
}
