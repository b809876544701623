//! The typefaces that come with the typesetter, and what they cover; the machine's own are never asked.

use std::sync::LazyLock;
use typst::foundations::Bytes;
use typst::text::{Font, FontBook};
use typst::utils::LazyHash;

/// The bundled typefaces.
#[derive(Clone, Copy)]
pub(crate) struct Typefaces {
    kept: &'static Kept,
}

struct Kept {
    book: LazyHash<FontBook>,
    fonts: Vec<Font>,
    /// For each typeface of the document, every cut of it.
    families: Vec<Vec<usize>>,
}

/// The typefaces that the template names.
const FAMILIES: [&str; 2] = ["libertinus serif", "dejavu sans mono"];

static KEPT: LazyLock<Kept> = LazyLock::new(|| {
    let fonts: Vec<Font> = typst_assets::fonts().flat_map(|data| Font::iter(Bytes::new(data))).collect();
    let book = FontBook::from_fonts(&fonts);
    let families = FAMILIES.iter().map(|name| book.select_family(name).collect()).collect();
    Kept { book: LazyHash::new(book), fonts, families }
});

impl Typefaces {
    /// Those that are compiled in.
    pub(crate) fn bundled() -> Self {
        Self { kept: &KEPT }
    }

    /// Whether one of the document's typefaces has this character, upright, slanted and bold.
    pub(crate) fn cover(self, c: char) -> bool {
        let has = |index: &usize| self.kept.fonts.get(*index).is_some_and(|f| f.info().coverage.contains(u32::from(c)));
        self.kept.families.iter().any(|cuts| !cuts.is_empty() && cuts.iter().all(has))
    }

    pub(crate) fn book(self) -> &'static LazyHash<FontBook> {
        &self.kept.book
    }

    pub(crate) fn font(self, index: usize) -> Option<Font> {
        self.kept.fonts.get(index).cloned()
    }
}
