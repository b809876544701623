//! The board of a site: drives × phases, one cell each, so that the odd ones out are found at a glance.

use crate::components::{Page, Plate, counts, empty, input_id, link_button, main_link, pager, small_plate};
use crate::extract::SiteAt;
use crate::visitor::Signed;
use crate::{App, PageError, links, verdicts};
use axum::extract::{Query, State};
use commissioning::people::Role;
use commissioning::plant::{Sheet, Site};
use engineering::Verdict;
use maud::{Markup, html};
use serde::Deserialize;
use store::{BoardFilter, BoardRow, PhaseCell, StatusKey};

/// What is looked for.
#[derive(Debug, Default, Deserialize)]
pub struct Asked {
    #[serde(default)]
    text: String,
    #[serde(default)]
    status: String,
    #[serde(default)]
    page: String,
}

/// Shows it.
///
/// # Errors
/// When the store cannot be read.
pub async fn show(
    State(app): State<App>,
    signed: Signed,
    SiteAt(site): SiteAt,
    Query(asked): Query<Asked>,
) -> Result<Markup, PageError> {
    let text: String = asked.text.trim().chars().take(100).collect();
    let status = StatusKey::from_key(&asked.status);
    let filter = BoardFilter { text: text.clone(), status, page: asked.page.parse().unwrap_or(1).max(1) };
    let board = app.store.board(site.id, filter).await?;
    let keeper = signed.visitor.is_any(&[Role::Engineer, Role::Supervisor]);
    let filtered = !text.is_empty() || status.is_some();
    let key = status.map_or("", StatusKey::key);
    let body = html! {
        h1 { (site.name) }
        div.row.ways {
            @if keeper { (main_link(&links::new_drive(&site.tag), "Add a drive")) }
            (link_button(&links::site_sheet(&site.tag, Sheet::Site), "Site sheet"))
            (link_button(&links::site_sheet(&site.tag, Sheet::Supply), "Supply"))
        }
        (search(&site, &text, status))
        @if board.rows.is_empty() && filtered { (empty("No drive fits", "No drive of this site has this in its tag or name and that status.", html! { a.b href=(links::site(&site.tag)) { "Show all drives" } })) }
        @if board.rows.is_empty() && !filtered { (empty("No drive yet", "Add the drives of this site; each gets its nameplates, its record and its package.", html! { @if keeper { (main_link(&links::new_drive(&site.tag), "Add a drive")) } })) }
        @if !board.rows.is_empty() { p.quiet { (board.total) @if board.total == 1 { " drive" } @else { " drives" } } (table(&site, &board.rows)) }
        (pager(board.page, board.pages, |n| links::board(&site.tag, &text, key, n)))
    };
    let plate = Plate {
        tag: site.tag.clone(),
        address: links::site(&site.tag),
        name: site.name.clone(),
        site: None,
        state: String::new(),
    };
    Ok(Page::new("Drives", body).own_heading().plate(plate).render(&signed.visitor))
}

fn search(site: &Site, text: &str, status: Option<StatusKey>) -> Markup {
    html! {
        form.board-filter role="search" method="get" action=(links::site(&site.tag)) {
            div.field { label for=(input_id("text")) { "Tag or name" } input.input id=(input_id("text")) type="search" name="text" value=(text) maxlength="100" autocomplete="off"; }
            div.field {
                label for=(input_id("status")) { "Status" }
                select.input id=(input_id("status")) name="status" {
                    option value="" { "any" }
                    @for one in StatusKey::ALL { option value=(one.key()) selected[status == Some(one)] { (one.words()) } }
                }
            }
            button.b type="submit" { "Show" }
        }
    }
}

fn table(site: &Site, rows: &[BoardRow]) -> Markup {
    let heads: &[PhaseCell] = rows.iter().map(|r| r.phases.as_slice()).max_by_key(|p| p.len()).unwrap_or_default();
    html! {
        div.scroll {
            table.board {
                thead { tr { th scope="col" { "drive" } th scope="col" { "status" } @for cell in heads { th.phase scope="col" { span { (cell.short) } } } th scope="col" { "verdicts" } th scope="col" { "findings" } } }
                tbody { @for row in rows { (one(site, row)) } }
            }
        }
    }
}

fn one(site: &Site, row: &BoardRow) -> Markup {
    html! {
        tr {
            th scope="row" { (small_plate(&row.tag, &links::drive(&site.tag, &row.tag))) span.name { (row.name) } }
            td data-label="status" { (row.status.words()) @if row.revision > 1 { ", revision " (row.revision) } }
            @for cell in &row.phases { (phase(site, row, cell)) }
            td.verdicts-cell data-label="verdicts" { (judged(row)) }
            td data-label="findings" { @if row.open_findings > 0 { b { (row.open_findings) " open" } } @else { span.quiet { "none" } } }
        }
    }
}

/// Every verdict counted, figures apart: they have none.
fn judged(row: &BoardRow) -> Markup {
    let counted = verdicts::numbers(&row.counts);
    let judged: Vec<_> = counted.into_iter().filter(|(v, n)| *v != Verdict::Figure && *n > 0).collect();
    html! { @if judged.is_empty() { span.quiet { "none yet" } } @else { (counts(&judged)) } }
}

/// One cell: full when settled, part-filled while begun, a double edge where its hold point waits.
fn phase(site: &Site, row: &BoardRow, cell: &PhaseCell) -> Markup {
    let all = cell.left + cell.settled;
    let words = match (cell.left, cell.waits) {
        (0, _) => "settled".to_owned(),
        (left, true) => format!("waits, {left} of {all} left"),
        (left, false) => format!("{left} of {all} left"),
    };
    let address = format!("{}#phase-{}", links::drive(&site.tag, &row.tag), links::encode(&cell.id));
    let class = match (cell.left, cell.settled, cell.waits) {
        (0, ..) => "done",
        (_, _, true) => "waits",
        (_, 0, _) => "open",
        _ => "begun",
    };
    html! {
        td class=(format!("phase {class}")) data-label=(cell.short) {
            a href=(address) title=(format!("{}: {words}", cell.short)) {
                @if row.revision == 0 { span aria-hidden="true" { "·" } } @else if cell.left == 0 { span aria-hidden="true" { "✓" } } @else { span aria-hidden="true" { (cell.left) } }
                span.unseen { (words) }
            }
        }
    }
}
