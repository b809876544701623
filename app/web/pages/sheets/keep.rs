//! Records what was changed on a drive's sheet.

use super::frame::{SHEETS, page};
use crate::extract::{DriveAt, SheetAt};
use crate::posted::Posted;
use crate::sheet_form::{self, Back};
use crate::visitor::Signed;
use crate::{App, PageError, conflict_page, links};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::journal::Deed;

/// Records it and shows the sheet again, with what was kept and its verdicts.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(
    State(app): State<App>,
    signed: Signed,
    at: DriveAt,
    SheetAt(sheet): SheetAt,
    posted: Posted,
) -> Result<Response, PageError> {
    if !SHEETS.contains(&sheet) {
        return Err(PageError::not_found("This page"));
    }
    let action = links::sheet(&at.site.tag, &at.drive.tag, sheet);
    let changes = sheet_form::changes(sheet, &at.drive.fields, &posted);
    let told = links::saved(&action, changes.len());
    if changes.is_empty() {
        return Ok(Redirect::to(&told).into_response());
    }
    let deed =
        Deed::SetDriveFields { drive: at.drive.id, sheet, changes, reason: posted.text("reason").trim().to_owned() };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => Ok(Redirect::to(&told).into_response()),
        Err(PageError::Fields { errors }) => {
            let back = Back { posted: Some(&posted), errors: &errors };
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&signed, &at, sheet, 1, &back, None)).into_response())
        }
        Err(PageError::Stale { conflicts }) => {
            Ok(conflict_page::answer(&signed.visitor, &action, Some(at.plate()), &posted, &conflicts))
        }
        Err(other) => Err(other),
    }
}
