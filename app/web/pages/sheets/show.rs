//! Shows a drive's sheet.

use super::frame::{SHEETS, page};
use crate::extract::{DriveAt, SheetAt};
use crate::sheet_form::Back;
use crate::visitor::Signed;
use crate::{PageError, sheet_form};
use axum::extract::Query;
use maud::Markup;
use serde::Deserialize;

/// How many rating columns were asked for; what is no number asks for none.
#[derive(Debug, Default, Deserialize)]
pub struct Asked {
    #[serde(default)]
    columns: String,
    /// How many fields were just kept.
    #[serde(default)]
    saved: String,
}

/// Shows it.
///
/// # Errors
/// When the sheet is not a drive's.
pub async fn show(
    signed: Signed,
    at: DriveAt,
    SheetAt(sheet): SheetAt,
    Query(asked): Query<Asked>,
) -> Result<Markup, PageError> {
    if !SHEETS.contains(&sheet) {
        return Err(PageError::not_found("This page"));
    }
    let told = sheet_form::saved_words(sheet.words(), "field", &asked.saved);
    Ok(page(&signed, &at, sheet, asked.columns.parse().unwrap_or(1), &Back::default(), told.as_deref()))
}
