//! A site's own sheets: what holds for the whole site, and its supply.

use crate::components::{Page, Plate, form, main_button, notice};
use crate::extract::{SheetAt, SiteAt};
use crate::posted::Posted;
use crate::sheet_form::{self, Back};
use crate::visitor::Signed;
use crate::{App, PageError, conflict_page, links};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::FieldError;
use commissioning::journal::Deed;
use commissioning::people::Role;
use commissioning::plant::{Sheet, Site};
use maud::{Markup, html};

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

/// The form.
///
/// # Errors
/// When the sheet is a drive's.
pub async fn show(
    State(app): State<App>,
    signed: Signed,
    SiteAt(site): SiteAt,
    SheetAt(sheet): SheetAt,
) -> Result<Markup, PageError> {
    Ok(page(&app, &signed, &site, of_a_site(sheet)?, None, &[]))
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
    if changes.is_empty() {
        return Ok(Redirect::to(&links::site(&site.tag)).into_response());
    }
    let deed = Deed::SetSiteFields { site: site.id, sheet, changes, reason: posted.text("reason").trim().to_owned() };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => Ok(Redirect::to(&links::site(&site.tag)).into_response()),
        Err(PageError::Fields { errors }) => {
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&app, &signed, &site, sheet, Some(&posted), &errors))
                .into_response())
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

fn page(
    app: &App,
    signed: &Signed,
    site: &Site,
    sheet: Sheet,
    posted: Option<&Posted>,
    errors: &[FieldError],
) -> Markup {
    let may = signed.visitor.is_any(&[Role::Engineer, Role::Supervisor]);
    let back = Back { posted, errors };
    let body = html! {
        nav.tabs aria-label="Sheets" {
            @for other in SHEETS { a href=(links::site_sheet(&site.tag, other)) aria-current=[(other == sheet).then_some("page")] { (other.words()) } }
        }
        @if sheet == Sheet::Supply { (notice("What is entered here holds for every drive of the site, unless the drive's own supply sheet says otherwise.")) }
        (sheet_form::summary(errors))
        (form(&signed.visitor, &links::site_sheet(&site.tag, sheet), html! {
            fieldset.plain disabled[!may] {
                (sheet_form::inputs(sheet, 1, &site.fields, &back, app.now()))
                (sheet_form::reason(&back))
            }
            div.row { @if may { (main_button("Record")) } a.b href=(links::site(&site.tag)) { "Back" } }
        }))
    };
    Page::new(sheet.words(), body).plate(plate(site)).render(&signed.visitor)
}
