//! What the checks of a step say while it is being filled in: nothing is recorded, only this step is judged.

use super::at::StepAt;
use super::{changes, frame};
use crate::pages::parameters;
use crate::posted::Posted;
use crate::{App, PageError};
use axum::extract::State;
use commissioning::judge::{self, View};
use commissioning::record::draft;
use maud::Markup;

/// The fragment that takes the place of the page's verdicts.
///
/// # Errors
/// Never for a step that is there.
pub async fn show(State(app): State<App>, at: StepAt, posted: Posted) -> Result<Markup, PageError> {
    let (_, step) = at.step()?;
    let settings =
        step.parameters.as_deref().map(|group| parameters::changes::of(&at.at, group, &posted)).unwrap_or_default();
    let (drive, _) = draft::with_parameters(&at.at.drive, &settings);
    let view = View { drive: &drive, ..at.at.view() };
    let (drive, _) =
        draft::with_entries(&drive, &view, &at.id, &changes::of(&at, &posted)?, &at.at.installation, app.now());
    let view = View { drive: &drive, ..at.at.view() };
    Ok(frame::panels(&judge::step(&view, &at.id)))
}
