//! The page for a stale form (412): mine and theirs, who, when; whichever is chosen, nothing is lost.

use crate::components::{Page, Plate, form};
use crate::posted::Posted;
use crate::visitor::Visitor;
use axum::http::StatusCode;
use axum::response::{IntoResponse, Response};
use commissioning::{Conflict, Typed};
use maud::{Markup, html};

/// Shows the conflicts of a form that was posted to `action`; answering them sends the same form again.
#[must_use]
pub fn answer(
    visitor: &Visitor,
    action: &str,
    plate: Option<Plate>,
    posted: &Posted,
    conflicts: &[Conflict],
) -> Response {
    let body = html! {
        p { "Since you opened this form, somebody else recorded something at the same place. Both are kept: the one you do not choose stays among the earlier values." }
        (form(visitor, action, html! {
            (carried(posted, conflicts))
            @for conflict in conflicts { (choice(conflict, conflicts.len() == 1)) }
            @if conflicts.len() > 1 { div.row { button.b.go type="submit" { "Go on with these choices" } } }
        }))
    };
    let mut page = Page::new("Somebody else changed this meanwhile", body).narrow();
    if let Some(plate) = plate {
        page = page.plate(plate);
    }
    (StatusCode::PRECONDITION_FAILED, page.render(visitor)).into_response()
}

/// Everything the form held goes along; what the conflicts have seen is brought up to date.
fn carried(posted: &Posted, conflicts: &[Conflict]) -> Markup {
    let replaced = |name: &str| conflicts.iter().any(|c| name.strip_suffix(".seen") == Some(c.field.as_str()));
    html! {
        @for (name, value) in posted.pairs() {
            @if name != "token" && name != "act" && !replaced(name) { input type="hidden" name=(name) value=(value); }
        }
        @for conflict in conflicts {
            input type="hidden" name=(format!("{}.seen", conflict.field)) value=(conflict.seen.iter().map(|e| e.0.as_str()).collect::<Vec<_>>().join(" "));
        }
    }
}

fn choice(conflict: &Conflict, alone: bool) -> Markup {
    let keep = format!("{}.keep", conflict.field);
    html! {
        fieldset.conflict {
            legend { (conflict.label) }
            div.sides {
                div.side {
                    p.quiet { "yours, not recorded yet" }
                    p.value { (shown(conflict.mine.as_ref())) }
                    @if alone { button.b.go type="submit" name=(keep) value="mine" { "Record mine" } }
                    @else { label.pick { input type="radio" name=(keep) value="mine" required; span { "Record mine" } } }
                }
                div.side {
                    @for theirs in &conflict.theirs {
                        p.quiet { "recorded " (theirs.received.shown()) " UTC by " (theirs.by) }
                        p.value { (shown(theirs.value.as_ref())) }
                    }
                    @if conflict.theirs.is_empty() { p.value { "empty" } }
                    @if alone { button.b type="submit" name=(keep) value="theirs" { "Keep theirs" } }
                    @else { label.pick { input type="radio" name=(keep) value="theirs"; span { "Keep theirs" } } }
                }
            }
        }
    }
}

fn shown(value: Option<&Typed>) -> String {
    value.map(Typed::shown).filter(|t| !t.is_empty()).unwrap_or_else(|| "empty".to_owned())
}
