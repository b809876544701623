//! The sheets in the report: every value with who and when, then the checks of the nameplates.

use super::changed;
use super::report_step::Shown;
use crate::components::{counts, verdict_panels_to_review};
use crate::extract::DriveAt;
use crate::pages::steps::sheet::shown;
use crate::verdicts;
use commissioning::Typed;
use commissioning::judge::{Counts, Judged};
use commissioning::plant::{FieldKind, Place, Sheet, Slot, fields};
use engineering::Verdict;
use maud::{Markup, html};

/// Site, supply and every sheet of the drive.
#[must_use]
pub fn all(at: &DriveAt, parts: Shown<'_>) -> Markup {
    let own: Vec<Judged> = parts.judged.iter().filter(|j| j.step.is_empty()).cloned().collect();
    let since = at.drive.record.as_ref().and_then(changed::since);
    let sheets: Vec<(Sheet, Rows<'_>)> = Sheet::ALL.into_iter().map(|s| (s, rows(at, s))).collect();
    let values: usize = sheets.iter().map(|(_, rows)| rows.len()).sum();
    let outside = own.iter().any(|j| j.outcome.verdict == Verdict::Outside);
    let touched = sheets.iter().flat_map(|(_, rows)| rows).any(|(_, s)| is_changed(s, since));
    html! {
        section #plates {
            details.report-fold open[parts.whole || outside || touched] {
                summary { h2 { "Sheets" } span.quiet { (values) @if values == 1 { " value" } @else { " values" } } (counts(&verdicts::numbers(&Counts::of(&own)))) }
                @for (sheet, rows) in &sheets { @if !rows.is_empty() { (sheet_table(*sheet, rows, since)) } }
                @if !own.is_empty() { h3 { "Nameplates against each other" } (verdict_panels_to_review(&own, parts.in_full)) }
            }
        }
    }
}

type Rows<'a> = Vec<(&'a Place, &'a Slot<Option<Typed>>)>;

fn rows(at: &DriveAt, sheet: Sheet) -> Rows<'_> {
    let all = at.site.fields.iter().chain(&at.drive.fields);
    all.filter(|(p, s)| p.sheet == sheet && !s.standing().is_empty()).collect()
}

fn is_changed(slot: &Slot<Option<Typed>>, since: Option<u64>) -> bool {
    slot.standing().iter().any(|r| changed::is_after(r, since))
}

fn sheet_table(sheet: Sheet, rows: &[(&Place, &Slot<Option<Typed>>)], since: Option<u64>) -> Markup {
    html! {
        h3 { (sheet.words()) }
        div.scroll {
            table.list.report-table {
                thead { tr { th { "field" } th { "value" } th { "recorded" } } }
                tbody { @for (place, slot) in rows { (row(place, slot, since)) } }
            }
        }
    }
}

fn row(place: &Place, slot: &Slot<Option<Typed>>, since: Option<u64>) -> Markup {
    let field = fields::find(place.sheet, &place.field);
    let label = field.map_or(place.field.as_str(), |f| f.label);
    let kind = field.map_or(FieldKind::Text(0), |f| f.kind);
    let words = |value: &Option<Typed>| value.as_ref().map_or_else(|| "empty".to_owned(), |v| shown(kind, v));
    let changed = is_changed(slot, since);
    html! {
        tr.changed[changed] {
            td data-label="field" { (label) @if fields::in_columns(place.sheet).iter().any(|f| f.key == place.field) { ", column " (place.column + 1) } }
            td data-label="value" {
                @for r in slot.earlier() { s { (words(&r.value)) } " " }
                @for r in slot.standing() { b { (words(&r.value)) } " " }
                @if changed { span.mark-changed { "changed" } }
            }
            td data-label="recorded" { @for r in slot.standing() { (r.received.shown()) " UTC, " (r.by_name) @if let Some(reason) = &r.reason { ": " (reason) } " " } }
        }
    }
}
