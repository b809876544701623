//! Shows the journal of a drive, the newest event first, a hundred a page.

use super::facts;
use crate::components::{Page, link_button, pager};
use crate::extract::DriveAt;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::{Query, State};
use commissioning::journal::{Chain, Event, Sealed};
use maud::{Markup, html};
use serde::Deserialize;

const A_PAGE: usize = 100;

/// Which page.
#[derive(Debug, Default, Deserialize)]
pub struct Asked {
    #[serde(default)]
    page: String,
}

/// Shows it.
///
/// # Errors
/// When the store cannot be read or an event is no event.
pub async fn show(
    State(app): State<App>,
    signed: Signed,
    at: DriveAt,
    Query(asked): Query<Asked>,
) -> Result<Markup, PageError> {
    let chain = app.store.chain(Chain::Drive(at.drive.id)).await?;
    let pages = u32::try_from(chain.len().div_ceil(A_PAGE)).unwrap_or(u32::MAX).max(1);
    let page = asked.page.parse().unwrap_or(1).clamp(1, pages);
    let skip = usize::try_from(page - 1).unwrap_or(0) * A_PAGE;
    let rows: Result<Vec<(&Sealed, Event)>, PageError> = chain
        .iter()
        .rev()
        .skip(skip)
        .take(A_PAGE)
        .map(|s| s.event().map(|e| (s, e)).map_err(PageError::broken))
        .collect();
    let rows = rows?;
    let body = html! {
        p.lead { "Every change, in the order in which the server received it. Nothing here is ever changed or taken out; each event carries the hash of the one before." }
        p.quiet { (chain.len()) " events · head " code { (at.drive.head.hash.get(..16).unwrap_or_default()) } }
        div.scroll {
            table.list.journal {
                thead { tr { th { "no." } th { "when" } th { "who" } th { "what" } } }
                tbody { @for (sealed, event) in &rows { (row(&at, sealed, event)) } }
            }
        }
        (pager(page, pages, |n| links::journal(&at.site.tag, &at.drive.tag, n)))
        div.row { (link_button(&links::journal_file(&at.site.tag, &at.drive.tag), "Take it as a file")) (link_button(&links::drive(&at.site.tag, &at.drive.tag), "Back to the drive")) }
    };
    Ok(Page::new("Journal", body).plate(at.plate()).render(&signed.visitor))
}

fn row(at: &DriveAt, sealed: &Sealed, event: &Event) -> Markup {
    html! {
        tr {
            td data-label="no." { (sealed.sequence) }
            td data-label="when" { (event.received.shown()) " UTC" }
            td data-label="who" { (event.person_name) }
            td data-label="what" {
                (facts::words(&event.fact, &at.procedure))
                @if !event.supersedes.is_empty() { span.quiet { " · in place of an earlier value" } }
                @if let Some(reason) = &event.reason { span.quiet { " · reason: " (reason) } }
                @if let Some(tablet) = event.tablet { span.quiet { " · tablet’s time " (tablet.shown()) " UTC" } }
            }
        }
    }
}
