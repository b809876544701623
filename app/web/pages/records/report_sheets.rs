//! The sheets in the report: every value with who and when, then the checks of the nameplates.

use super::changed;
use crate::components::verdict_panels_to_review;
use crate::extract::DriveAt;
use crate::pages::steps::sheet::shown;
use commissioning::Typed;
use commissioning::judge::Judged;
use commissioning::plant::{FieldKind, Place, Sheet, Slot, fields};
use maud::{Markup, html};

/// Site, supply and every sheet of the drive.
#[must_use]
pub fn all(at: &DriveAt, judged: &[Judged], in_full: bool) -> Markup {
    let own: Vec<Judged> = judged.iter().filter(|j| j.step.is_empty()).cloned().collect();
    let since = at.drive.record.as_ref().and_then(changed::since);
    html! {
        section #plates {
            h2 { "Sheets" }
            @for sheet in Sheet::ALL {
                @let of_site = at.site.fields.iter().filter(|(p, _)| p.sheet == sheet);
                @let of_drive = at.drive.fields.iter().filter(|(p, _)| p.sheet == sheet);
                @let rows: Vec<(&Place, &Slot<Option<Typed>>)> = of_site.chain(of_drive).filter(|(_, s)| !s.standing().is_empty()).collect();
                @if !rows.is_empty() { (sheet_table(sheet, &rows, since)) }
            }
            @if !own.is_empty() { h3 { "Nameplates against each other" } (verdict_panels_to_review(&own, in_full)) }
        }
    }
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
    let changed = slot.standing().iter().any(|r| changed::is_after(r, since));
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
