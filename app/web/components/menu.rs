//! Navigation along the top, and the menu that holds it where the top is taken by a drive's label or is too narrow.

use super::list::search_box;
use crate::links;
use crate::visitor::{Theme, Visitor};
use commissioning::people::Role;
use maud::{Markup, html};

fn places(visitor: &Visitor) -> Vec<(String, &'static str)> {
    if visitor.person.is_none() {
        return vec![(links::about(), "About")];
    }
    let mut places = vec![
        (links::home(), "Start"),
        (links::sites(), "Sites"),
        (links::queue(), "Queue"),
        (links::instruments(), "Instruments"),
    ];
    if visitor.is_any(&[Role::Administrator]) {
        places.push((links::people(), "People"));
    }
    places
}

/// Where one can go, in a row.
pub fn navigation(visitor: &Visitor) -> Markup {
    let here = visitor.path.split('?').next().unwrap_or_default();
    html! {
        nav.places aria-label="Main" {
            @for (address, words) in places(visitor) {
                a href=(address) aria-current=[(address == here).then_some("page")] { (words) }
            }
        }
    }
}

/// The menu: search, places, theme, account.
pub fn menu(visitor: &Visitor) -> Markup {
    html! {
        details.menu {
            summary { @if let Some(person) = &visitor.person { span.who { (person.name) } span.bars aria-hidden="true" {} span.unseen { " menu" } } @else { "Menu" } }
            div.sheet {
                @if visitor.person.is_some() { (search_box("")) }
                nav aria-label="All places" {
                    @for (address, words) in places(visitor) { a href=(address) { (words) } }
                    @if visitor.person.is_some() {
                        a href=(links::signers()) { "Who can sign" }
                        a href=(links::password()) { "Change my password" }
                        a href=(links::about()) { "About and cautions" }
                    }
                }
                (themes(visitor))
                @if visitor.person.is_some() {
                    (super::form(visitor, &links::sign_out(), html! { button.b type="submit" { "Sign out" } }))
                } @else {
                    a.b href=(links::sign_in(None)) { "Sign in" }
                }
            }
        }
    }
}

fn themes(visitor: &Visitor) -> Markup {
    let choices = [(Theme::System, "As the system"), (Theme::Light, "Daylight"), (Theme::Dark, "Dark")];
    super::form(
        visitor,
        &links::theme(),
        html! {
            input type="hidden" name="back" value=(visitor.path);
            div.segments role="group" aria-label="Daylight or dark" {
                @for (theme, words) in choices {
                    button type="submit" name="theme" value=(theme.key()) aria-pressed=(if visitor.theme == theme { "true" } else { "false" }) { (words) }
                }
            }
        },
    )
}
