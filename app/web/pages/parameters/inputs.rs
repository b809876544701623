//! The inputs of the parameter record: one function a row; what is done is folded to a line with a count.

use super::rows::{self, Row, name};
use crate::components::{FieldInput, InputKind, field, input_id};
use crate::extract::DriveAt;
use crate::pages::steps::sheet::shown;
use crate::sheet_form::Back;
use commissioning::agenda::{Difference, differs};
use commissioning::plant::{Field, FieldKind};
use commissioning::record::{ParameterColumn, functions};
use maud::{Markup, html};

/// Columns in use while setting; the two others are asked where the whole record is looked at.
const SETTING: [ParameterColumn; 3] = [ParameterColumn::Code, ParameterColumn::AsFound, ParameterColumn::Intended];
const LEAVING: [ParameterColumn; 2] = [ParameterColumn::AsLeft, ParameterColumn::Explanation];

/// All rows of a group, or (`*`) of every group, each group folded once nothing of it is left.
#[must_use]
pub fn group(at: &DriveAt, group: &str, back: &Back<'_>) -> Markup {
    if group == "*" {
        return every_group(at, back);
    }
    let rows = rows::of(at, group);
    let intended = rows.iter().filter(|r| r.value(at, ParameterColumn::Intended).is_some()).count();
    html! {
        div.params {
            @if !rows.is_empty() { p.count-line { (intended) " of " (rows.len()) @if rows.len() == 1 { " function has" } @else { " functions have" } " an intended value" } }
            @for row in &rows { (setting(at, row, back)) }
        }
    }
}

/// Whether anything stands in a group, or (`*`) in any, so that a form can overwrite it.
#[must_use]
pub fn has_values(at: &DriveAt, group: &str) -> bool {
    let stands =
        |row: &Row| needs_choice(at, row) || ParameterColumn::ALL.iter().any(|column| row.value(at, *column).is_some());
    match group {
        "*" => at.drive.record.iter().flat_map(|r| r.parameters.values()).any(|slot| !slot.standing().is_empty()),
        _ => rows::of(at, group).iter().any(stands),
    }
}

/// A function while it is being set: a line once it has its intended value, open before.
fn setting(at: &DriveAt, row: &Row, back: &Back<'_>) -> Markup {
    let filled = |columns: &[ParameterColumn]| columns.iter().filter(|c| row.value(at, **c).is_some()).count();
    let all = filled(&ParameterColumn::ALL);
    let done = row.value(at, ParameterColumn::Intended).is_some();
    let open = !done || row.differs(at) || needs_choice(at, row) || touched(at, row, back);
    let left_open = filled(&LEAVING) > 0 || touched(at, row, back);
    html! {
        details.param.differs[row.differs(at)] open[open] {
            summary {
                b { (row.label) }
                span.quiet { (in_short(at, row)) @if all > 0 { " · " (all) " of " (ParameterColumn::ALL.len()) " filled in" } }
                @if row.differs(at) { span.differing { "as left differs from intended" } }
            }
            @if !row.hint.is_empty() { p.hint { (row.hint) } }
            div.cols.three { @for column in SETTING { (cell(at, row, column, back)) } }
            details.reason.later open[left_open] {
                summary { "As left and explanation" span.quiet { " · " (filled(&LEAVING)) " of " (LEAVING.len()) " filled in" } }
                div.cols.two { @for column in LEAVING { (cell(at, row, column, back)) } }
            }
        }
    }
}

/// What stands in a row, on one line.
fn in_short(at: &DriveAt, row: &Row) -> String {
    let words = |column| row.value(at, column).map(|v| shown(row.kind_in(column), v));
    let code = words(ParameterColumn::Code);
    let intended = words(ParameterColumn::Intended).map(|v| format!("intended {v}"));
    let left = words(ParameterColumn::AsLeft).map(|v| format!("as left {v}"));
    code.into_iter().chain(intended).chain(left).collect::<Vec<_>>().join(" · ")
}

/// The whole record: groups folded with what is left in each; functions without a value folded at the end of theirs.
fn every_group(at: &DriveAt, back: &Back<'_>) -> Markup {
    let every = rows::of(at, "*");
    let names = functions::GROUPS.iter().copied().chain([rows::FREE]);
    html! {
        div.params {
            @for name in names {
                @let keys: Vec<String> = rows::of(at, name).into_iter().map(|r| r.key).collect();
                @let own: Vec<&Row> = every.iter().filter(|r| keys.contains(&r.key)).collect();
                @if !own.is_empty() { (leaving(at, name, &own, back)) }
            }
        }
    }
}

fn leaving(at: &DriveAt, name: &str, rows: &[&Row], back: &Back<'_>) -> Markup {
    let (used, unused): (Vec<&Row>, Vec<&Row>) = rows.iter().partition(|r| r.any(at) || touched(at, r, back));
    let left = used.iter().filter(|r| is_left(at, r)).count();
    let open = left > 0 || used.iter().any(|r| needs_choice(at, r) || touched(at, r, back));
    html! {
        details.setting-fold open[open] {
            summary {
                b { (rows::title(name)) }
                span.quiet { @if used.is_empty() { "no value" } @else if left == 0 { (used.len()) " as left, nothing missing" } @else { (left) " of " (used.len()) " to be entered as left" } }
            }
            @if !used.is_empty() { div.params-head aria-hidden="true" { @for column in ParameterColumn::ALL { span { (column.words()) } } } }
            @for row in &used { (one(at, row, back)) }
            @if !unused.is_empty() {
                details.reason { summary { (unused.len()) @if unused.len() == 1 { " function" } @else { " functions" } " without a value" } @for row in &unused { (one(at, row, back)) } }
            }
        }
    }
}

/// Whether a row still lacks what was left, or why that differs.
fn is_left(at: &DriveAt, row: &Row) -> bool {
    let intended = row.value(at, ParameterColumn::Intended);
    match differs(intended, row.value(at, ParameterColumn::AsLeft)) {
        Difference::Unknown => intended.is_some(),
        Difference::Different => row.value(at, ParameterColumn::Explanation).is_none(),
        Difference::Same => false,
    }
}

fn needs_choice(at: &DriveAt, row: &Row) -> bool {
    ParameterColumn::ALL.into_iter().any(|c| row.slot(at, c).is_some_and(commissioning::plant::Slot::needs_choice))
}

/// Whether a form that came back holds something else here than what stands.
fn touched(at: &DriveAt, row: &Row, back: &Back<'_>) -> bool {
    let Some(posted) = back.posted else { return false };
    ParameterColumn::ALL.into_iter().any(|column| {
        let name = name(&row.place(column));
        posted.has(&name) && posted.text(&name) != row.value(at, column).map_or("", |v| v.text.as_str())
    })
}

fn one(at: &DriveAt, row: &Row, back: &Back<'_>) -> Markup {
    html! {
        fieldset.param.differs[row.differs(at)] {
            legend { (row.label) @if row.differs(at) { span.differing { " as left differs from intended" } } }
            @if !row.hint.is_empty() { p.hint { (row.hint) } }
            div.cols { @for column in ParameterColumn::ALL { (cell(at, row, column, back)) } }
        }
    }
}

fn cell(at: &DriveAt, row: &Row, column: ParameterColumn, back: &Back<'_>) -> Markup {
    let described =
        Field { key: "", label: column.words(), hint: "", group: "", kind: row.kind_in(column), required: false };
    let mut input = FieldInput::of(&described, name(&row.place(column))).standing(row.slot(at, column));
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
