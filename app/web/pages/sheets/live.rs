//! The verdicts of a sheet while it is being typed: nothing is recorded.

use super::frame::{SHEETS, verdicts};
use crate::extract::{DriveAt, SheetAt};
use crate::posted::Posted;
use crate::sheet_form;
use crate::{App, PageError};
use axum::extract::State;
use commissioning::judge::View;
use commissioning::record::draft;
use maud::Markup;

/// The fragment that takes the place of the page's verdicts.
///
/// # Errors
/// When the sheet is not a drive's.
pub async fn show(
    State(_): State<App>,
    at: DriveAt,
    SheetAt(sheet): SheetAt,
    posted: Posted,
) -> Result<Markup, PageError> {
    if !SHEETS.contains(&sheet) {
        return Err(PageError::not_found("This page"));
    }
    let changes = sheet_form::changes(sheet, &at.drive.fields, &posted);
    let (drive, _) = draft::with_fields(&at.drive, sheet, &changes);
    Ok(verdicts(&View { drive: &drive, site: &at.site, procedure: &at.procedure }))
}
