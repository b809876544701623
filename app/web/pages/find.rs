//! Search: drives by tag or name, at every site.

use crate::components::{Page, empty, search_box, small_plate};
use crate::visitor::Signed;
use crate::{App, PageError, links};
use axum::extract::{Query, State};
use maud::{Markup, html};
use serde::Deserialize;

/// What is looked for.
#[derive(Debug, Default, Deserialize)]
pub struct Asked {
    #[serde(default)]
    q: String,
}

/// Shows what was found.
///
/// # Errors
/// When the store cannot be read.
pub async fn show(State(app): State<App>, signed: Signed, Query(asked): Query<Asked>) -> Result<Markup, PageError> {
    let text: String = asked.q.trim().chars().take(100).collect();
    let found = if text.is_empty() { Vec::new() } else { app.store.find(&text).await? };
    let body = html! {
        (search_box(&text))
        @if found.is_empty() && !text.is_empty() {
            (empty("Nothing found", "No drive has this in its tag or name. Try a shorter part of the tag.", html! { a.b href=(links::sites()) { "See all sites" } }))
        }
        ul.cards {
            @for row in &found {
                li.card { (small_plate(&row.tag, &links::drive(&row.site_tag, &row.tag))) div { b { (row.name) } br; span.quiet { (row.site_name) " · " (row.status.words()) } } }
            }
        }
        @if found.len() >= 30 { p.quiet { "The first 30 are shown. Type more of the tag to narrow it down." } }
    };
    Ok(Page::new("Find a drive", body).render(&signed.visitor))
}
