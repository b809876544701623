//! The plant tag, drawn as the engraved label that hangs on the plant.

use maud::{Markup, html};

/// What the header shows about the drive or site on screen.
#[derive(Clone, Debug, Default)]
pub struct Plate {
    /// Plant tag, or a site's tag.
    pub tag: String,
    /// Address behind the tag.
    pub address: String,
    /// What it drives, or the site's name.
    pub name: String,
    /// Its site's name and address, when it is a drive.
    pub site: Option<(String, String)>,
    /// Where its record stands, in words; may be empty.
    pub state: String,
}

/// The label with its two screws, and beside it what and where it is.
#[must_use]
pub fn plate(plate: &Plate) -> Markup {
    html! {
        a.plate href=(plate.address) { i aria-hidden="true" {} span { (plate.tag) } i aria-hidden="true" {} }
        div.where {
            b { (plate.name) }
            @if let Some((name, address)) = &plate.site { a href=(address) { (name) } }
            @if !plate.state.is_empty() { span.state { @if plate.site.is_some() { " · " } (plate.state) } }
        }
    }
}

/// The label alone, for lists.
#[must_use]
pub fn small_plate(tag: &str, address: &str) -> Markup {
    html! { a.plate.small href=(address) { i aria-hidden="true" {} span { (tag) } i aria-hidden="true" {} } }
}
