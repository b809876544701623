//! A sheet as words, for those who may not change it: what stands, by whom and when; what was not stated in one line.

use crate::components::{FieldInput, field};
use crate::sheet_form::{Values, groups};
use commissioning::plant::{Field, Place, Sheet, fields};
use maud::{Markup, html};

/// Every group of a sheet.
#[must_use]
pub fn all(sheet: Sheet, columns: u8, values: &Values) -> Markup {
    html! {
        div.as-words {
            @for (name, own) in groups(fields::in_columns(sheet)) {
                @for column in 0..columns { (group(&heading(name, columns, column), &own, |f| Place::in_column(sheet, column, f.key), values)) }
            }
            @for (name, own) in groups(fields::of(sheet)) { (group(name, &own, |f| Place::new(sheet, f.key), values)) }
        }
    }
}

fn heading(name: &str, columns: u8, column: u8) -> String {
    if columns > 1 { format!("{name} {}", column + 1) } else { name.to_owned() }
}

fn group(name: &str, own: &[&'static Field], place: impl Fn(&Field) -> Place, values: &Values) -> Markup {
    let stands = |f: &Field| values.get(&place(f)).is_some_and(|s| s.standing().iter().any(|r| r.value.is_some()));
    let (filled, empty): (Vec<&Field>, Vec<&Field>) = own.iter().copied().partition(|f| stands(f));
    html! {
        section.group {
            @if !name.is_empty() { h2 { (name) } }
            div.fields {
                @for f in &filled { @let place = place(f); (field(&FieldInput::of(f, place.to_string()).standing(values.get(&place)).fixed())) }
            }
            @if !empty.is_empty() { p.quiet { "Not stated: " (empty.iter().map(|f| f.label).collect::<Vec<_>>().join(", ")) "." } }
        }
    }
}
