//! A caution, on its own line with its sign; and a notice, which is none.

use maud::{Markup, html};

/// A caution: general warning sign (ISO 7010 W001: black on yellow triangle) and the words.
#[must_use]
pub fn caution(words: &str) -> Markup {
    html! {
        div.caution role="note" {
            svg viewBox="0 0 30 28" aria-hidden="true" {
                path.sign d="M15 2 28 26H2Z" {}
                path.bang d="M15 10v8M15 21.5v1.5" {}
            }
            p { span.unseen { "Caution: " } (words) }
        }
    }
}

/// What was just kept: stays in sight wherever the page stands.
#[must_use]
pub fn saved(words: &str) -> Markup {
    html! { p.notice.saved #saved role="status" { (words) } }
}

/// Something to know, without a sign.
#[must_use]
pub fn notice(words: &str) -> Markup {
    html! { p.notice role="status" { (words) } }
}
