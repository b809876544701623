//! Shows a hold point: conditions met and not met, what is declared, the release.

use super::conditions;
use crate::components::{FieldInput, InputKind, Page, field, form, input_id, main_button};
use crate::extract::{DriveAt, segment};
use crate::pages::steps::at::may_record;
use crate::posted::Posted;
use crate::sheet_form;
use crate::visitor::Signed;
use crate::{App, PageError, links, progress};
use axum::extract::FromRequestParts;
use axum::http::request::Parts;
use commissioning::FieldError;
use commissioning::agenda::{self, HoldAgenda};
use commissioning::procedure::HoldPoint;
use maud::{Markup, html};

/// The phase whose hold point stands in the address.
#[derive(Clone, Debug)]
pub struct HoldAt {
    /// Its drive.
    pub at: DriveAt,
    /// Its phase; it has a hold point.
    pub phase: String,
}

impl FromRequestParts<App> for HoldAt {
    type Rejection = PageError;

    async fn from_request_parts(parts: &mut Parts, app: &App) -> Result<Self, Self::Rejection> {
        let at = DriveAt::from_request_parts(parts, app).await?;
        let phase = segment(parts, "phase").await?;
        if at.procedure.phase(&phase).is_none_or(|p| p.hold.is_none()) {
            return Err(PageError::not_found("This hold point"));
        }
        Ok(Self { at, phase })
    }
}

/// Shows it.
///
/// # Errors
/// Never for one that is there.
pub async fn show(signed: Signed, hold: HoldAt) -> Result<Markup, PageError> {
    page(&signed, &hold, None, &[])
}

/// The page, or as it comes back with what was wrong.
///
/// # Errors
/// Never for one that is there.
pub fn page(signed: &Signed, at: &HoldAt, posted: Option<&Posted>, errors: &[FieldError]) -> Result<Markup, PageError> {
    let missing = || PageError::not_found("This hold point");
    let agenda = agenda::of(&at.at.view());
    let phase = at.at.procedure.phase(&at.phase).ok_or_else(missing)?;
    let point = phase.hold.as_ref().ok_or_else(missing)?;
    let stands = agenda.phases.iter().find(|p| p.id == at.phase).and_then(|p| p.hold.as_ref()).ok_or_else(missing)?;
    let body = html! {
        div.hold-page {
            p.where-in { "Hold point before “" (phase.title) "”" }
            h1 { (point.title) }
            p.instruction { (phase.purpose) }
            (sheet_form::summary(errors))
            @if let Some(release) = &stands.released {
                p.notice { "Released " (release.received.shown()) " UTC by " b { (release.printed_name) } @if release.printed_name != release.by_name { ", recorded by " (release.by_name) } @if !stands.open { ". Something that must keep holding no longer does, so that it waits again" } "." }
            }
            h2 { "Conditions" }
            (conditions::list(&at.at, &agenda, &at.phase, &point.conditions))
            (release(signed, at, point, stands, posted, errors))
        }
    };
    let strip = progress::phase_strip(&at.at, &agenda, Some(&at.phase));
    Ok(Page::new(point.title.clone(), body).own_heading().plate(at.at.plate()).strip(strip).render(&signed.visitor))
}

fn release(
    signed: &Signed,
    at: &HoldAt,
    point: &HoldPoint,
    stands: &HoldAgenda,
    posted: Option<&Posted>,
    errors: &[FieldError],
) -> Markup {
    if stands.open {
        return html! {};
    }
    if !stands.unmet.is_empty() || !may_record(signed, &at.at) {
        return html! { h2 { "What is declared at release" } ul { @for sentence in &point.declare { li { (sentence) } } } };
    }
    let none = Posted::default();
    let sent = posted.unwrap_or(&none);
    let witness = FieldInput::new("printed_name", "Witness’s printed name", InputKind::Line(80))
        .hint("As the client’s witness signs.")
        .sent_back(sent, errors);
    html! {
        h2 { "Release" }
        (form(&signed.visitor, &links::hold(&at.at.site.tag, &at.at.drive.tag, &at.phase), html! {
            div.ticks { @for (n, sentence) in point.declare.iter().enumerate() { (declaration(n, sentence, sent, errors)) } }
            fieldset.field {
                legend { "Released by" }
                div.segments {
                    label { input type="radio" name="role" value="engineer" checked[sent.text("role") != "witness"]; span { (signed.person.name) ", startup engineer" } }
                    label { input type="radio" name="role" value="witness" checked[sent.text("role") == "witness"]; span { "a witness from the client" } }
                }
            }
            div.of-witness { (field(&witness)) }
            div.row { (main_button("Release the hold point")) }
        }))
    }
}

fn declaration(n: usize, sentence: &str, sent: &Posted, errors: &[FieldError]) -> Markup {
    let name = format!("declared.{n}");
    let error = errors.iter().find(|e| e.field == name);
    html! {
        div.field.bad[error.is_some()] {
            label.tick for=(input_id(&name)) { input type="checkbox" id=(input_id(&name)) name=(name) value="yes" checked[sent.text(&name) == "yes"]; span { (sentence) } }
            @if let Some(error) = error { p.error { (error.message) } }
        }
    }
}
