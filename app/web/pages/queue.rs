//! The queue: signed records, oldest first, each with what a reviewer wants to know before opening it.

use crate::components::{Page, counts, empty, pager, small_plate};
use crate::pages::records::changed;
use crate::visitor::Signed;
use crate::{App, PageError, links, verdicts};
use axum::extract::{Query, State};
use commissioning::record::Finding;
use maud::{Markup, html};
use serde::Deserialize;
use store::{DriveView, QueueRow};

/// Which page.
#[derive(Debug, Default, Deserialize)]
pub struct Asked {
    #[serde(default)]
    page: String,
}

/// Shows it.
///
/// # Errors
/// When the store cannot be read.
pub async fn show(State(app): State<App>, signed: Signed, Query(asked): Query<Asked>) -> Result<Markup, PageError> {
    let queue = app.store.queue(asked.page.parse().unwrap_or(1).max(1)).await?;
    let mut rows = Vec::new();
    for row in &queue.rows {
        if let Some(view) = app.store.drive_view_by_id(row.row.drive).await? {
            rows.push(html! { (card(row, &view)) });
        }
    }
    let body = html! {
        @if rows.is_empty() { (empty("Nothing waits for review", "A record comes here when an engineer has signed it. The oldest stands first.", html! { a.b href=(links::sites()) { "See all sites" } })) }
        @else { p.quiet { (queue.total) @if queue.total == 1 { " signed record waits." } @else { " signed records wait, the oldest first." } } }
        ol.queue { @for row in &rows { (row) } }
        (pager(queue.page, queue.pages, links::queue_page))
    };
    Ok(Page::new("To review", body).render(&signed.visitor))
}

fn card(queued: &QueueRow, view: &DriveView) -> Markup {
    let (site, drive) = (queued.site_tag.as_str(), queued.row.tag.as_str());
    let judged = verdicts::all(&view.view());
    let mut open: Vec<&Finding> =
        view.drive.record.iter().flat_map(|r| r.findings.values()).filter(|f| f.is_open()).collect();
    open.sort_by_key(|f| (std::cmp::Reverse(f.severity), f.number));
    let changes = changed::list(&view.drive, &view.procedure);
    html! {
        li.card {
            div.queue-head {
                (small_plate(drive, &links::record(site, drive)))
                div { b { (queued.row.name) } br; span.quiet { (queued.site_name) " · revision " (queued.row.revision) " · signed " (queued.signed_at.shown()) " UTC by " (queued.signed_by) } }
                a.b.go href=(links::record(site, drive)) { "Review" }
            }
            p { (counts(&verdicts::numbers(&queued.row.counts))) }
            (verdicts::odd_in_words(&judged, |j| links::record_at(site, drive, &j.step)))
            @if !open.is_empty() { p { b { "Open findings" } } ul { @for f in open { li { b { "Finding " (f.number) } " · " (f.severity.words()) ": " (f.text) } } } }
            @if !changes.is_empty() { details.reason { summary { "Changed since it was sent back: " (changes.len()) } ul { @for (_, words) in &changes { li { (words) } } } } }
        }
    }
}
