//! The whole parameter record as it stands: intended beside as left, differences marked, verdicts beside.

use super::add_row;
use super::rows::{self, Row, address_name, title};
use crate::components::{Page, saved, verdict_panels};
use crate::extract::DriveAt;
use crate::pages::steps::at::may_record;
use crate::pages::steps::sheet::shown;
use crate::posted::Posted;
use crate::visitor::Signed;
use crate::{links, progress, sheet_form, verdicts};
use axum::extract::Query;
use commissioning::FieldError;
use commissioning::agenda;
use commissioning::judge::{self, Judged};
use commissioning::record::{ParameterColumn, functions};
use maud::{Markup, html};
use serde::Deserialize;

/// What was just kept: how many values of which group.
#[derive(Debug, Default, Deserialize)]
pub struct Asked {
    #[serde(default)]
    saved: String,
    #[serde(default)]
    of: String,
}

/// Shows it.
pub async fn show(signed: Signed, at: DriveAt, Query(asked): Query<Asked>) -> Markup {
    let told = rows::group_of(&asked.of).and_then(|group| sheet_form::saved_words(group, "value", &asked.saved));
    page(&signed, &at, told.as_deref(), None, &[])
}

/// The page, or as it comes back when a free row was refused.
#[must_use]
pub fn page(
    signed: &Signed,
    at: &DriveAt,
    told: Option<&str>,
    posted: Option<&Posted>,
    errors: &[FieldError],
) -> Markup {
    let may = may_record(signed, at);
    let judged = judged(at);
    let body = html! {
        h1 { "Parameter record" }
        @if let Some(told) = told { (saved(told)) }
        p.lead { "What the drive is set to, function by function, whatever its maker calls it. Its own code for each is yours to note." }
        @if at.drive.record.is_none() { p.notice { "The record of this drive has not been begun. " a href=(links::drive(&at.site.tag, &at.drive.tag)) { "Begin it on the drive’s page" } "." } }
        div.split {
            section {
                @for group in functions::GROUPS.iter().copied().chain([rows::FREE]) { (section(at, group, may)) }
                @if may { (add_row::form(signed, at, posted, errors)) }
            }
            aside { h2 { "Verdicts" } (verdict_panels(&judged)) }
        }
    };
    let agenda = agenda::of(&at.view());
    Page::new("Parameter record", body)
        .own_heading()
        .plate(at.plate())
        .strip(progress::phase_strip(at, &agenda, None))
        .render(&signed.visitor)
}

/// The settings' verdicts; frozen ones once there are any.
fn judged(at: &DriveAt) -> Vec<Judged> {
    let fresh = judge::parameters(&at.view());
    match at.drive.record.as_ref().and_then(|r| r.frozen.as_ref()) {
        Some(_) => verdicts::all(&at.view())
            .into_iter()
            .filter(|j| fresh.iter().any(|f| f.outcome.check == j.outcome.check))
            .collect(),
        None => fresh,
    }
}

fn section(at: &DriveAt, group: &'static str, may: bool) -> Markup {
    let all = rows::of(at, group);
    let used: Vec<&Row> = all.iter().filter(|r| r.any(at) || group == rows::FREE).collect();
    html! {
        section.setting-group id=(format!("group-{}", address_name(group))) {
            div.head {
                h2 { (title(group)) }
                @if !all.is_empty() { a.b href=(links::parameter_group(&at.site.tag, &at.drive.tag, &address_name(group))) { @if may { "Fill in" } @else { "Details" } } }
            }
            @if used.is_empty() { p.quiet { "Nothing entered yet." } } @else { (table(at, &used)) }
        }
    }
}

/// The rows of a group that hold a value, as words; `*` for every group.
#[must_use]
pub fn values(at: &DriveAt, group: &str) -> Markup {
    let all = rows::of(at, group);
    let used: Vec<&Row> = all.iter().filter(|r| r.any(at)).collect();
    html! { @if used.is_empty() { p.quiet { "No setting has been entered here." } } @else { (table(at, &used)) } }
}

fn table(at: &DriveAt, used: &[&Row]) -> Markup {
    const COLUMNS: [ParameterColumn; 5] = ParameterColumn::ALL;
    html! {
        div.scroll {
            table.list.settings {
                thead { tr { th { "function" } @for column in COLUMNS { th { (column.words()) } } } }
                tbody {
                    @for row in used {
                        tr.differs[row.differs(at)] {
                            td data-label="function" { b { (row.label) } }
                            @for column in COLUMNS {
                                td data-label=(column.words()) {
                                    @match row.slot(at, column) {
                                        Some(slot) if slot.needs_choice() => strong { "needs a choice" },
                                        _ => @if let Some(value) = row.value(at, column) { (shown(row.kind_in(column), value)) }
                                    }
                                    @if column == ParameterColumn::AsLeft && row.differs(at) { span.differing { " differs" } }
                                }
                            }
                        }
                    }
                }
            }
        }
    }
}
