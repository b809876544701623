//! Signs a record as performed and recorded.

use super::signature;
use crate::components::{Page, link_button, main_link};
use crate::extract::DriveAt;
use crate::posted::Posted;
use crate::sessions::SessionToken;
use crate::visitor::Signed;
use crate::{App, PageError, links, progress};
use axum::extract::State;
use axum::response::Response;
use commissioning::agenda::{self, Agenda};
use commissioning::record::{Meaning, Status};
use maud::{Markup, html};

/// The form; while steps are left, what they are.
///
/// # Errors
/// When the record is not in progress.
pub async fn show(signed: Signed, at: DriveAt) -> Result<Markup, PageError> {
    let status = at.drive.record.as_ref().map(|r| &r.status);
    if !matches!(status, Some(Status::InProgress { .. })) {
        let why = "Only a record in progress can be signed as performed and recorded. This one is not begun, or signed already.";
        return Err(PageError::NotNow { why: why.to_owned() });
    }
    let agenda = agenda::of(&at.view());
    if agenda.complete() {
        return Ok(signature::page(&signed, &at, Meaning::Performed, None, &[]));
    }
    Ok(unfinished(&signed, &at, &agenda))
}

/// Signs it.
///
/// # Errors
/// When the store refuses otherwise than at the password.
pub async fn keep(
    State(app): State<App>,
    signed: Signed,
    at: DriveAt,
    token: SessionToken,
    posted: Posted,
) -> Result<Response, PageError> {
    signature::put(&app, &signed, &at, Meaning::Performed, token, &posted).await
}

fn unfinished(signed: &Signed, at: &DriveAt, agenda: &Agenda) -> Markup {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    let body = html! {
        p.lead { "A record is signed once every step is settled, or settled otherwise with a reason." }
        @for phase in agenda.phases.iter().filter(|p| p.left() > 0) {
            h2 { (phase.title) }
            ul { @for step in phase.steps.iter().filter(|s| !s.state.is_settled()) { li { a href=(links::step(site, drive, &step.id)) { (step.title) } @if !step.missing.is_empty() { span.quiet { ": " (step.missing.join(", ")) } } } } }
        }
        div.row { (main_link(&progress::next(agenda).address(site, drive), "Go on with the next step")) (link_button(&links::drive(site, drive), "Back to the drive")) }
    };
    let left = agenda.left();
    let title = if left == 1 { "One step is left".to_owned() } else { format!("{left} steps are left") };
    Page::new(title, body)
        .narrow()
        .plate(at.plate())
        .strip(progress::phase_strip(at, agenda, None))
        .render(&signed.visitor)
}
