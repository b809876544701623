//! Shows a step.

use super::at::StepAt;
use super::frame::page;
use crate::PageError;
use crate::sheet_form::Back;
use crate::visitor::Signed;
use axum::extract::Query;
use commissioning::agenda;
use maud::Markup;
use serde::Deserialize;

/// What brought the person here.
#[derive(Debug, Default, Deserialize)]
pub struct Asked {
    #[serde(default)]
    recorded: String,
    /// Verdicts elsewhere that the record brought about.
    #[serde(default)]
    brought: String,
}

/// Shows it; after a record that did not lead on it says what is still to be entered, and what is outside.
///
/// # Errors
/// Never for a step that is there.
pub async fn show(signed: Signed, at: StepAt, Query(asked): Query<Asked>) -> Result<Markup, PageError> {
    let agenda = agenda::of(&at.at.view());
    let missing = agenda.step(&at.id).map(|(_, s)| s.missing.join(", ")).filter(|m| !m.is_empty());
    let told = match (asked.recorded.as_str(), missing) {
        ("", _) => None,
        ("nothing", _) => Some("Nothing was entered. Fill in a field, or settle the step otherwise.".to_owned()),
        (_, Some(missing)) => Some(format!("Recorded. Still to be entered here: {missing}.")),
        (_, None) => Some("Recorded.".to_owned()),
    };
    let stays = (told.is_some() && asked.recorded != "nothing").then_some(asked.brought.as_str());
    page(&signed, &at, &Back::default(), told.as_deref(), stays)
}
