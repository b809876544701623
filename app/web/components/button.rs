//! Buttons, and links that look like them: 48 px and more, 8 px apart.

use maud::{Markup, html};

/// The main action of a form: "do this".
#[must_use]
pub fn main_button(words: &str) -> Markup {
    html! { button.b.go type="submit" { (words) } }
}

/// A further action of a form.
#[must_use]
pub fn button(words: &str) -> Markup {
    html! { button.b type="submit" { (words) } }
}

/// A further action that sends a name and value with the form.
#[must_use]
pub fn button_named(words: &str, name: &str, value: &str) -> Markup {
    html! { button.b type="submit" name=(name) value=(value) { (words) } }
}

/// A link of the size of a button.
#[must_use]
pub fn link_button(address: &str, words: &str) -> Markup {
    html! { a.b href=(address) { (words) } }
}

/// A link that is the page's main action.
#[must_use]
pub fn main_link(address: &str, words: &str) -> Markup {
    html! { a.b.go href=(address) { (words) } }
}
