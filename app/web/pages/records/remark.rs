//! A remark on a step or on the whole record.

use crate::clock_words::moment;
use crate::components::{self, FieldInput, InputKind, Page, button, field};
use crate::extract::DriveAt;
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Redirect, Response};
use commissioning::journal::Deed;
use commissioning::people::Role;
use commissioning::record::Status;
use maud::{Markup, html};

/// Makes it and shows the report where it stands.
///
/// # Errors
/// When the store refuses otherwise than at the field.
pub async fn keep(State(app): State<App>, signed: Signed, at: DriveAt, posted: Posted) -> Result<Response, PageError> {
    let step = posted.text("step").to_owned();
    let deed = Deed::Remark { drive: at.drive.id, step: step.clone(), text: posted.text("text").to_owned() };
    match app.perform(&signed, posted.act()?, deed).await {
        Ok(_) => Ok(Redirect::to(&links::record_at(&at.site.tag, &at.drive.tag, &step)).into_response()),
        Err(PageError::Fields { errors }) => {
            let text = FieldInput::new("text", "Remark", InputKind::Lines(2000)).needed().sent_back(&posted, &errors);
            let body = components::form(
                &signed.visitor,
                &links::remarks(&at.site.tag, &at.drive.tag),
                html! {
                    input type="hidden" name="step" value=(step);
                    (field(&text))
                    (button("Make the remark"))
                },
            );
            let page = Page::new("Remark", body).narrow().plate(at.plate()).render(&signed.visitor);
            Ok((StatusCode::UNPROCESSABLE_ENTITY, page).into_response())
        }
        Err(other) => Err(other),
    }
}

/// The remarks on a step, oldest first.
#[must_use]
pub fn list(at: &DriveAt, step: &str) -> Markup {
    let all = at.drive.record.iter().flat_map(|r| &r.remarks).filter(|(s, _)| s == step);
    html! { @for (_, r) in all { p.remark { b { (r.by_name) } ", " (moment(r.received)) ": " (r.value) } } }
}

/// The form for one, folded, for those who may while the record takes remarks.
#[must_use]
pub fn form(signed: &Signed, at: &DriveAt, step: &str) -> Markup {
    let takes = at.drive.record.as_ref().is_some_and(|r| !matches!(r.status, Status::Accepted { .. }));
    if !takes || !signed.visitor.is_any(&[Role::Engineer, Role::Supervisor]) {
        return html! {};
    }
    // The fields of several such forms stand in one page, so that each has a label around it instead of an id.
    html! {
        details.reason.remark-form {
            summary { "Remark" }
            (components::form(&signed.visitor, &links::remarks(&at.site.tag, &at.drive.tag), html! {
                input type="hidden" name="step" value=(step);
                label { span.unseen { "Remark" } textarea.input name="text" rows="2" {} }
                (button("Make the remark"))
            }))
        }
    }
}
