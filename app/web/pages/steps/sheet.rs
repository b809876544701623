//! A step that stands for a sheet: what is filled in there, what is missing, and the way to it.

use super::at::StepAt;
use crate::components::{facts, main_link};
use crate::links;
use commissioning::plant::{Place, Sheet, fields};
use commissioning::procedure::Step;
use maud::{Markup, html};

/// The sheet of a step, when it has one.
#[must_use]
pub fn of(step: &Step) -> Option<Sheet> {
    step.sheet.as_deref().and_then(Sheet::from_key)
}

/// Its summary.
#[must_use]
pub fn summary(at: &StepAt, sheet: Sheet, missing: &[String]) -> Markup {
    let all = fields::in_columns(sheet).iter().chain(fields::of(sheet));
    let filled: Vec<(&str, Markup)> = all
        .filter_map(|f| {
            let value = at.at.drive.field(&Place::new(sheet, f.key))?;
            Some((f.label, html! { (shown(f.kind, value)) }))
        })
        .collect();
    html! {
        div.card.sheet-summary {
            h2 { (sheet.words()) }
            @if !missing.is_empty() { p { b { "Still needed: " } (missing.join(", ")) } }
            @if filled.is_empty() { p.quiet { "Nothing is filled in yet." } }
            (facts(filled))
            (main_link(&links::sheet(&at.at.site.tag, &at.at.drive.tag, sheet), if missing.is_empty() { "Open the sheet" } else { "Fill in the sheet" }))
        }
    }
}

/// A field's value with a choice's label in place of its key.
#[must_use]
pub fn shown(kind: commissioning::plant::FieldKind, value: &commissioning::Typed) -> String {
    match kind {
        commissioning::plant::FieldKind::Choice(options) => {
            options.iter().find(|(k, _)| *k == value.text).map_or_else(|| value.shown(), |(_, l)| (*l).to_owned())
        }
        _ => value.shown(),
    }
}
