//! Lists: pager, empty page, facts, the search box.

use crate::links;
use maud::{Markup, html};

/// Page numbers of a long list; nothing for a short one. `address` gives a page's address.
#[must_use]
pub fn pager(page: u32, pages: u32, address: impl Fn(u32) -> String) -> Markup {
    html! {
        @if pages > 1 {
            nav.pager aria-label="Pages" {
                @if page > 1 { a.b href=(address(page - 1)) rel="prev" { "Earlier" } }
                span { "page " (page) " of " (pages) }
                @if page < pages { a.b href=(address(page + 1)) rel="next" { "Further" } }
            }
        }
    }
}

/// A page or list with nothing in it: what it is for, and what to do first.
#[must_use]
pub fn empty(title: &str, what_to_do: &str, action: Markup) -> Markup {
    html! { div.empty { h2 { (title) } p { (what_to_do) } (action) } }
}

/// Names and values in two columns.
#[must_use]
pub fn facts<'a>(rows: impl IntoIterator<Item = (&'a str, Markup)>) -> Markup {
    html! { dl.facts { @for (name, value) in rows { dt { (name) } dd { (value) } } } }
}

/// The search box: drives by tag or name, at every site.
#[must_use]
pub fn search_box(text: &str) -> Markup {
    html! {
        form.find role="search" method="get" action=(links::find()) {
            label.unseen for="find" { "Find a drive by tag or name" }
            input id="find" type="search" name="q" value=(text) placeholder="Tag or name of a drive" autocomplete="off" autocapitalize="characters" spellcheck="false" maxlength="100";
            button.b type="submit" { "Find" }
        }
    }
}
