//! The one place where finished SVG from the drawing crate enters a page unescaped; that crate escapes its texts itself.

use maud::{Markup, PreEscaped};

/// A drawing, as the drawing crate made it.
#[must_use]
pub fn drawn(svg: String) -> Markup {
    PreEscaped(svg)
}
