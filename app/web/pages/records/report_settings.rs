//! The parameter record in the report: one function a row, differences marked, who and when.

use super::changed;
use crate::extract::DriveAt;
use crate::pages::parameters::rows::{self, Row};
use crate::pages::steps::sheet::shown;
use commissioning::record::ParameterColumn;
use maud::{Markup, html};

/// All rows with a value.
#[must_use]
pub fn all(at: &DriveAt, whole: bool) -> Markup {
    let used: Vec<Row> = rows::of(at, "*").into_iter().filter(|r| r.any(at)).collect();
    let since = at.drive.record.as_ref().and_then(changed::since);
    let differing = used.iter().filter(|r| r.differs(at)).count();
    let touched = used.iter().any(|r| is_changed(at, r, since));
    html! {
        section #settings {
            details.report-fold open[whole || touched] {
                summary {
                    h2 { "Parameter record" }
                    span.quiet { (used.len()) @if used.len() == 1 { " function" } @else { " functions" } }
                    @if differing > 0 { b { (differing) " left otherwise than intended" } }
                }
                @if used.is_empty() { p.quiet { "Nothing entered." } }
                @else {
                    div.scroll {
                        table.list.report-table.settings {
                            thead { tr { th { "function" } @for c in ParameterColumn::ALL { th { (c.words()) } } th { "as left recorded" } } }
                            tbody { @for row in &used { (one(at, row, since)) } }
                        }
                    }
                }
            }
        }
    }
}

fn is_changed(at: &DriveAt, row: &Row, since: Option<u64>) -> bool {
    let slots = ParameterColumn::ALL.into_iter().filter_map(|c| row.slot(at, c));
    slots.flat_map(|s| s.standing()).any(|r| changed::is_after(r, since))
}

fn one(at: &DriveAt, row: &Row, since: Option<u64>) -> Markup {
    let left = row.slot(at, ParameterColumn::AsLeft).and_then(|s| s.current());
    let changed = is_changed(at, row, since);
    html! {
        tr.differs[row.differs(at)].changed[changed] {
            td data-label="function" { b { (row.label) } @if changed { " " span.mark-changed { "changed" } } }
            @for column in ParameterColumn::ALL { td data-label=(column.words()) { (values(at, row, column)) } }
            td data-label="as left recorded" { @if let Some(r) = left { (r.received.shown()) " UTC, " (r.by_name) @if let Some(reason) = &r.reason { ": " (reason) } } }
        }
    }
}

fn values(at: &DriveAt, row: &Row, column: ParameterColumn) -> Markup {
    let Some(slot) = row.slot(at, column) else { return html! {} };
    let words = |value: &Option<commissioning::Typed>| {
        value.as_ref().map_or_else(|| "empty".to_owned(), |v| shown(row.kind_in(column), v))
    };
    html! {
        @for r in slot.earlier() { s { (words(&r.value)) } " " }
        @for r in slot.standing() { @if r.value.is_some() || !slot.earlier().is_empty() { (words(&r.value)) " " } }
        @if column == ParameterColumn::AsLeft && row.differs(at) { span.differing { "differs" } }
    }
}
