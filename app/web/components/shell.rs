//! The frame of every page: header with the tag on screen, phase strip, the page, its actions within reach of a thumb.

use super::menu::{menu, navigation};
use super::plate::{Plate, plate};
use crate::links;
use crate::visitor::{Theme, Visitor};
use maud::{DOCTYPE, Markup, html};

/// A page with its title and ready values.
#[derive(Debug)]
pub struct Page {
    title: String,
    body: Markup,
    plate: Option<Plate>,
    strip: Option<Markup>,
    actions: Option<Markup>,
    heading: bool,
    narrow: bool,
}

impl Page {
    /// A page: its title is shown as heading above the body.
    #[must_use]
    pub fn new(title: impl Into<String>, body: Markup) -> Self {
        Self { title: title.into(), body, plate: None, strip: None, actions: None, heading: true, narrow: false }
    }

    /// Shows a drive's or site's label in the header, where the navigation stands otherwise.
    #[must_use]
    pub fn plate(mut self, plate: Plate) -> Self {
        self.plate = Some(plate);
        self
    }

    /// Shows the phase strip under the header.
    #[must_use]
    pub fn strip(mut self, strip: Markup) -> Self {
        self.strip = Some(strip);
        self
    }

    /// Buttons that stay at the lower edge of the screen. A button there belongs to a form by its `form` attribute.
    #[must_use]
    pub fn actions(mut self, actions: Markup) -> Self {
        self.actions = Some(actions);
        self
    }

    /// The body brings its own `h1`.
    #[must_use]
    pub const fn own_heading(mut self) -> Self {
        self.heading = false;
        self
    }

    /// One narrow column, for short forms and errors.
    #[must_use]
    pub const fn narrow(mut self) -> Self {
        self.narrow = true;
        self
    }

    /// The whole page.
    #[must_use]
    pub fn render(self, visitor: &Visitor) -> Markup {
        let theme = (visitor.theme != Theme::System).then_some(visitor.theme.key());
        let title = self.plate.as_ref().map_or_else(|| self.title.clone(), |p| format!("{} · {}", self.title, p.tag));
        html! {
            (DOCTYPE)
            html lang="en" data-theme=[theme] {
                head {
                    meta charset="utf-8";
                    meta name="viewport" content="width=device-width, initial-scale=1";
                    meta name="color-scheme" content=(match visitor.theme { Theme::System => "light dark", other => other.key() });
                    title { (title) " · Asleft" }
                    link rel="stylesheet" href=(links::stylesheet());
                    link rel="icon" href=(links::icon()) type="image/svg+xml";
                    script type="module" src=(links::script()) {}
                }
                body {
                    a.skip href="#page" { "To the page" }
                    header.top {
                        a.brand href=(links::home()) { "Asleft" }
                        @if let Some(shown) = &self.plate { (plate(shown)) } @else { (navigation(visitor)) }
                        (menu(visitor))
                    }
                    @if let Some(strip) = &self.strip { (strip) }
                    main #page.narrow[self.narrow].acted[self.actions.is_some()] tabindex="-1" {
                        @if self.heading { h1 { (self.title) } }
                        (self.body)
                    }
                    @if let Some(actions) = &self.actions { footer.actions { (actions) } }
                }
            }
        }
    }
}
