//! Forms: every one carries the visitor's token and the id of the act it asks for.

use crate::visitor::Visitor;
use maud::{Markup, html};

/// The hidden fields of every form: token and act id. A double send of the same form is one act.
#[must_use]
pub fn seal(visitor: &Visitor) -> Markup {
    html! {
        input type="hidden" name="token" value=(visitor.form_token);
        input type="hidden" name="act" value=(visitor.fresh_act());
    }
}

/// A form that posts to `action`.
#[must_use]
pub fn form(visitor: &Visitor, action: &str, body: Markup) -> Markup {
    html! { form method="post" action=(action) { (seal(visitor)) (body) } }
}

/// A form that is shown again after it was kept, where it stood.
#[must_use]
pub fn kept_form(visitor: &Visitor, action: &str, body: Markup) -> Markup {
    html! { form method="post" action=(action) data-keeps { (seal(visitor)) (body) } }
}

/// Such a form whose `[data-live]` region is refreshed from `judge` while its fields are being filled in.
#[must_use]
pub fn live_form(visitor: &Visitor, action: &str, judge: &str, body: Markup) -> Markup {
    html! { form method="post" action=(action) data-judge=(judge) data-keeps { (seal(visitor)) (body) } }
}
