//! What a package is made from, all of one moment.

use crate::extract::DriveAt;
use crate::{App, PageError, packaging};
use handover::Material;

/// The material. Somebody may record while it is gathered: it is then gathered again, until record and chain agree.
///
/// # Errors
/// When the store cannot be read, or somebody records without a pause.
pub async fn gather(app: &App, at: &DriveAt) -> Result<Material, PageError> {
    for _ in 0..5 {
        let found =
            packaging::material(&app.store, at.drive.id).await?.ok_or_else(|| PageError::not_found("This drive"))?;
        if found.chain.last().map(commissioning::journal::Sealed::head).as_ref() == Some(&found.record.head) {
            return Ok(found);
        }
    }
    Err(PageError::NotNow {
        why: "Somebody is recording at this drive just now. Ask for the package again in a moment.".to_owned(),
    })
}
