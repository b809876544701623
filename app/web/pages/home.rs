//! The start page: my drives in work, what waits for review, the sites.

use crate::components::{Page, empty, link_button, main_link, search_box, small_plate};
use crate::pages::people::codes;
use crate::pages::records::returned;
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::State;
use commissioning::DriveId;
use commissioning::people::Role;
use maud::{Markup, html};
use std::collections::BTreeMap;
use store::{FoundRow, SiteRow, StatusKey};

/// Shows it.
///
/// # Errors
/// When the store cannot be read.
pub async fn show(State(app): State<App>, signed: Signed) -> Result<Markup, PageError> {
    let mine = app.store.my_open_drives(signed.person.id).await?;
    let mut reasons = BTreeMap::new();
    for row in mine.iter().filter(|row| row.status == StatusKey::Returned) {
        let view = app.store.drive_view_by_id(row.drive).await?;
        let reason = view.and_then(|v| v.drive.record.as_ref().and_then(returned::reason).map(str::to_owned));
        reasons.extend(reason.map(|reason| (row.drive, reason)));
    }
    let sites = app.store.sites().await?;
    let waiting = if signed.visitor.is_any(&[Role::Supervisor]) { Some(app.store.queue(1).await?.total) } else { None };
    let codes = codes::to_tell(&app.store.codes_made(signed.person.id).await?, app.now());
    let low = app.store.space()?.low;
    let body = html! {
        h1 { "Start" }
        @for words in &codes { p.notice role="alert" { (words) } }
        (search_box(""))
        @if app.store.only_read().is_some() { p.notice role="alert" { "This store was opened only to be read: nothing can be written to its folder. Records can be looked at; nothing can be recorded." } }
        @else if app.store.is_read_only() { p.notice role="alert" { "The server's disk refuses to write: nothing can be recorded at present." } }
        @if low { p.notice role="alert" { "The server's disk is nearly full. Tell whoever keeps it." } }
        @if let Some(waiting) = waiting { (queue(waiting)) }
        @if !mine.is_empty() { (drives(&mine, &reasons)) }
        (site_cards(&signed, &sites))
    };
    Ok(Page::new("Start", body).own_heading().render(&signed.visitor))
}

fn queue(waiting: u64) -> Markup {
    html! {
        section aria-labelledby="review" {
            h2 #review { "To review" }
            @if waiting == 0 { p.quiet { "No signed record waits for review." } }
            @else { a.card.count href=(links::queue()) { b { (waiting) } span { @if waiting == 1 { " signed record waits" } @else { " signed records wait" } " for review" } } }
        }
    }
}

fn drives(mine: &[FoundRow], reasons: &BTreeMap<DriveId, String>) -> Markup {
    html! {
        section aria-labelledby="mine" {
            h2 #mine { "My drives in work" }
            ul.cards {
                @for row in mine {
                    li.card { (small_plate(&row.tag, &links::drive(&row.site_tag, &row.tag))) div { b { (row.name) } br; span.quiet { (row.site_name) " · " (row.status.words()) } @if let Some(reason) = reasons.get(&row.drive) { p.returned { b { "Returned: " } (reason) } } } }
                }
            }
        }
    }
}

fn site_cards(signed: &Signed, sites: &[SiteRow]) -> Markup {
    let keeper = signed.visitor.is_any(&[Role::Engineer, Role::Supervisor, Role::Administrator]);
    html! {
        section aria-labelledby="sites" {
            h2 #sites { "Sites" }
            @if sites.is_empty() {
                (empty("No site yet", "A site holds its supply and its drives. Create the first one, then add its drives.", html! { @if keeper { (main_link(&links::new_site(), "Create a site")) } }))
            } @else {
                ul.cards { @for site in sites { li { (card(site)) } } }
                @if keeper { div.row { (link_button(&links::new_site(), "Create a site")) } }
            }
        }
    }
}

/// A site in a list: name, and how its drives stand.
pub fn card(site: &SiteRow) -> Markup {
    let parts = [
        (site.not_begun, "not begun"),
        (site.in_progress, "in progress"),
        (site.returned, "returned"),
        (site.signed, "signed"),
        (site.accepted, "accepted"),
    ];
    html! {
        a.card href=(links::site(&site.tag)) {
            b { (site.name) }
            span.quiet { (site.drives) @if site.drives == 1 { " drive" } @else { " drives" } @for (n, words) in parts.iter().filter(|(n, _)| *n > 0) { " · " (n) " " (words) } }
        }
    }
}
