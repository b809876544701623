//! The inputs of a group of the parameter record: one function a row, its five columns side by side or, where narrow, as a card.

use super::rows::{self, Row, name};
use crate::components::{FieldInput, InputKind, field, input_id};
use crate::extract::DriveAt;
use crate::sheet_form::Back;
use commissioning::Timestamp;
use commissioning::plant::{Field, FieldKind};
use commissioning::record::ParameterColumn;
use maud::{Markup, html};

/// All rows of a group; for the whole record those in use stand open and the others folded.
#[must_use]
pub fn group(at: &DriveAt, group: &str, back: &Back<'_>, now: Timestamp) -> Markup {
    let (used, unused): (Vec<Row>, Vec<Row>) =
        rows::of(at, group).into_iter().partition(|r| group != "*" || r.any(at) || faulty(r, back));
    html! {
        div.params {
            div.params-head aria-hidden="true" { span { "Function" } @for column in ParameterColumn::ALL { span { (column.words()) } } }
            @for row in &used { (one(at, row, back, now)) }
            @if !unused.is_empty() {
                details.reason { summary { (unused.len()) " functions without a value" } @for row in &unused { (one(at, row, back, now)) } }
            }
        }
    }
}

fn faulty(row: &Row, back: &Back<'_>) -> bool {
    back.errors.iter().any(|e| e.field.strip_prefix(row.key.as_str()).is_some_and(|rest| rest.starts_with('.')))
}

fn one(at: &DriveAt, row: &Row, back: &Back<'_>, now: Timestamp) -> Markup {
    html! {
        fieldset.param.differs[row.differs(at)] {
            legend { (row.label) @if row.differs(at) { span.differing { " as left differs from intended" } } }
            @if !row.hint.is_empty() { p.hint { (row.hint) } }
            div.cols { @for column in ParameterColumn::ALL { (cell(at, row, column, back, now)) } }
        }
    }
}

fn cell(at: &DriveAt, row: &Row, column: ParameterColumn, back: &Back<'_>, now: Timestamp) -> Markup {
    let described =
        Field { key: "", label: column.words(), hint: "", group: "", kind: row.kind_in(column), required: false };
    let mut input = FieldInput::of(&described, name(&row.place(column))).standing(row.slot(at, column), now);
    if matches!(input.kind, InputKind::Lines(_)) {
        input.kind = InputKind::Line(400);
    }
    if let Some(posted) = back.posted {
        input = input.sent_back(posted, back.errors);
    }
    match row.kind_in(column) {
        FieldKind::Choice(options) => select(&input, options),
        FieldKind::Flag => select(&input, &[("yes", "yes"), ("no", "no")]),
        _ => field(&input),
    }
}

/// A choice as a select: rows of side-by-side options would not fit five to a line.
fn select(input: &FieldInput, options: &[(&str, &str)]) -> Markup {
    let id = input_id(&input.name);
    html! {
        div.field.bad[input.error.is_some()] {
            label for=(id) { (input.label) }
            select.input id=(id) name=(input.name) {
                option value="" { "not stated" }
                @for (key, label) in options { option value=(key) selected[*key == input.text] { (label) } }
            }
            @if let Some(error) = &input.error { p.error { (error) } }
            @if let Some(state) = &input.state { div.state { (state) } }
            @if !input.seen.is_empty() { input type="hidden" name=(format!("{}.seen", input.name)) value=(crate::pages::steps::at::joined(&input.seen)); }
        }
    }
}
