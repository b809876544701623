//! A group of the parameter record to be filled in: shown, recorded, its checks beside it.

use super::rows::{address_name, group_of, title};
use super::{changes, inputs, list};
use crate::components::{Page, live_form, main_button, verdict_panels};
use crate::extract::{DriveAt, segment};
use crate::pages::steps::at::may_record;
use crate::posted::Posted;
use crate::sheet_form::{self, Back};
use crate::visitor::Signed;
use crate::{App, PageError, conflict_page, links, verdicts};
use axum::extract::{FromRequestParts, State};
use axum::http::StatusCode;
use axum::http::request::Parts;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::journal::Deed;
use commissioning::judge::{Judged, View};
use maud::{Markup, html};

/// The group named in the address.
#[derive(Clone, Copy, Debug)]
pub struct GroupAt(pub &'static str);

impl<S: Send + Sync> FromRequestParts<S> for GroupAt {
    type Rejection = PageError;

    async fn from_request_parts(parts: &mut Parts, _: &S) -> Result<Self, Self::Rejection> {
        let name = segment(parts, "group").await?;
        group_of(&name).map(Self).ok_or_else(|| PageError::not_found("This group of settings"))
    }
}

/// The form.
pub async fn show(signed: Signed, at: DriveAt, GroupAt(group): GroupAt) -> Markup {
    page(&signed, &at, group, &Back::default())
}

/// Records what was changed.
///
/// # Errors
/// When the store refuses otherwise than at a field.
pub async fn keep(
    State(app): State<App>,
    signed: Signed,
    at: DriveAt,
    GroupAt(group): GroupAt,
    posted: Posted,
) -> Result<Response, PageError> {
    let changed = changes::of(&at, group, &posted);
    let back_to = links::parameters_saved(&at.site.tag, &at.drive.tag, &address_name(group), changed.len());
    if changed.is_empty() {
        return Ok(Redirect::to(&back_to).into_response());
    }
    let deed =
        Deed::SetParameters { drive: at.drive.id, changes: changed, reason: posted.text("reason").trim().to_owned() };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => Ok(Redirect::to(&back_to).into_response()),
        Err(PageError::Fields { errors }) => {
            let back = Back { posted: Some(&posted), errors: &errors };
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page(&signed, &at, group, &back)).into_response())
        }
        Err(PageError::Stale { conflicts }) => {
            let action = links::parameter_group(&at.site.tag, &at.drive.tag, &address_name(group));
            Ok(conflict_page::answer(&signed.visitor, &action, Some(at.plate()), &posted, &conflicts))
        }
        Err(other) => Err(other),
    }
}

fn page(signed: &Signed, at: &DriveAt, group: &str, back: &Back<'_>) -> Markup {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    let may = may_record(signed, at);
    let name = address_name(group);
    let away = html! { a.b href=(links::parameters(site, drive)) { "Back to the parameter record" } };
    let fields = html! {
        (inputs::group(at, group, back))
        (sheet_form::reason(back, inputs::has_values(at, group)))
        div.row.foot { (main_button("Record")) (away) }
    };
    let body = html! {
        (sheet_form::summary(back.errors))
        @if may { (live_form(&signed.visitor, &links::parameter_group(site, drive, &name), &links::parameter_group_live(site, drive, &name), fields)) }
        @else { (list::values(at, group)) div.row { (away) } }
        div.verdicts data-live aria-live="polite" { (panels(&judged(&at.view(), group))) }
    };
    Page::new(title(group), body).plate(at.plate()).render(&signed.visitor)
}

/// The checks that the steps of a group show.
#[must_use]
pub fn judged(view: &View<'_>, group: &str) -> Vec<Judged> {
    let steps = view.procedure.steps().filter(|(_, s)| s.parameters.as_deref() == Some(group));
    let mut judged: Vec<Judged> = Vec::new();
    for (_, step) in steps {
        let fresh = verdicts::at_step(view, step);
        judged.extend(
            fresh
                .into_iter()
                .filter(|f| !judged.iter().any(|j| j.of == f.of && j.outcome == f.outcome))
                .collect::<Vec<_>>(),
        );
    }
    judged
}

/// The fragment that is replaced while typing.
#[must_use]
pub fn panels(judged: &[Judged]) -> Markup {
    verdict_panels(judged)
}
