//! The input of a confirmation: a tick by name.

use super::at::joined;
use crate::components::{FieldInput, input_id};
use maud::{Markup, html};

/// The tick. Without one a browser would send nothing, so that a hidden field follows it.
#[must_use]
pub fn input(input: &FieldInput) -> Markup {
    let id = input_id(&input.name);
    html! {
        div.field.bad[input.error.is_some()] {
            label.tick for=(id) {
                input type="checkbox" id=(id) name=(input.name) value="yes" checked[input.text == "yes"];
                span { (input.label) @if input.required { span.needed { " needed" } } }
            }
            input type="hidden" name=(input.name) value="";
            input type="hidden" name=(format!("{}.seen", input.name)) value=(joined(&input.seen));
            @if let Some(error) = &input.error { p.error { (error) } }
            @if !input.hint.is_empty() { p.hint { (input.hint) } }
            @if let Some(state) = &input.state { div.state { (state) } }
        }
    }
}
