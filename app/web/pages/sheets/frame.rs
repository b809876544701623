//! The page around a drive's sheet: tabs, form, verdicts beside it.

use crate::components::{Page, live_form, main_button, saved, verdict_panels};
use crate::extract::DriveAt;
use crate::links;
use crate::sheet_form::{self, Back};
use crate::sheet_words;
use crate::verdicts::{odd, odd_in_words};
use crate::visitor::Signed;
use commissioning::judge::{self, Judged, View};
use commissioning::people::Role;
use commissioning::plant::Sheet;
use maud::{Markup, html};

/// The sheets that belong to a drive.
pub const SHEETS: [Sheet; 7] =
    [Sheet::Drive, Sheet::DrivePlate, Sheet::Motor, Sheet::Cable, Sheet::Load, Sheet::Supply, Sheet::Further];

/// The page of a sheet; `asked` is how many rating columns were asked for, `told` what was just kept.
#[must_use]
pub fn page(signed: &Signed, at: &DriveAt, sheet: Sheet, asked: u8, back: &Back<'_>, told: Option<&str>) -> Markup {
    let (site, drive) = (at.site.tag.as_str(), at.drive.tag.as_str());
    // Once the record is begun its plates are part of what a supervisor reviews.
    let may = signed.visitor.is_any(&[Role::Engineer])
        || (at.drive.record.is_none() && signed.visitor.is_any(&[Role::Supervisor]));
    let columns = sheet_form::columns(sheet, &at.drive.fields, back.posted, asked);
    let action = links::sheet(site, drive, sheet);
    let away = html! { a.b href=(links::drive(site, drive)) { "Back to the drive" } };
    let inputs = html! {
        (sheet_form::inputs(sheet, columns, &at.drive.fields, back))
        @if columns < sheet.columns() { p { a.b href=(format!("{action}?columns={}", columns + 1)) { "Show one more rating column" } } }
        (sheet_form::reason(back, sheet_form::has_values(sheet, &at.drive.fields)))
        div.row.foot { (main_button("Record")) (away) }
    };
    let body = html! {
        (tabs(at, sheet))
        h1 { (sheet.words()) }
        @if let Some(told) = told { (saved(told)) (disagreeing(&at.view())) }
        (sheet_form::summary(back.errors))
        div.split {
            section {
                @if may { (live_form(&signed.visitor, &action, &links::sheet_live(site, drive, sheet), inputs)) }
                @else { (sheet_words::all(sheet, columns, &at.drive.fields)) div.row { (away) } }
            }
            aside.verdicts #plates aria-label="Verdicts" { div data-live aria-live="polite" { (verdicts(&at.view())) } }
        }
    };
    Page::new(sheet.words(), body).own_heading().plate(at.plate()).render(&signed.visitor)
}

/// What of the plates is outside or marginal, said where a sheet was just kept.
fn disagreeing(view: &View<'_>) -> Markup {
    let judged = judge::plates(view);
    html! {
        @if !odd(&judged).is_empty() {
            div.stay {
                p { b { "With this the plates do not all agree:" } }
                (odd_in_words(&judged, |_| "#plates".to_owned()))
                p { "If a figure was misread, correct it below. If the plate says so, ask the maker or raise a finding." }
            }
        }
    }
}

/// What the nameplate checks say about a view.
#[must_use]
pub fn verdicts(view: &View<'_>) -> Markup {
    let judged: Vec<Judged> = judge::plates(view);
    html! {
        h2 { "Do the plates agree?" }
        @if judged.is_empty() { p.quiet { "As soon as volts, amps, power and speed are entered, they are checked against each other here." } }
        (verdict_panels(&judged))
    }
}

fn tabs(at: &DriveAt, sheet: Sheet) -> Markup {
    html! {
        nav.tabs aria-label="Sheets" {
            @for other in SHEETS { a href=(links::sheet(&at.site.tag, &at.drive.tag, other)) aria-current=[(other == sheet).then_some("page")] { (other.words()) } }
        }
    }
}
