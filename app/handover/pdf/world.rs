//! What the typesetter may see: the template, the sheet as JSON, record.json, the pictures; no file, no clock.

use super::{Picture, Typefaces, TypesetFault};
use std::collections::HashMap;
use typst::diag::{FileError, FileResult};
use typst::foundations::{Bytes, Datetime, Duration};
use typst::syntax::{FileId, RootedPath, Source, VirtualPath, VirtualRoot};
use typst::text::{Font, FontBook};
use typst::utils::LazyHash;
use typst::{Library, LibraryExt, World};

/// The template's files, by the name under which they import each other.
const TEMPLATE: &[(&str, &str)] = &[
    ("main.typ", include_str!("../template/main.typ")),
    ("look.typ", include_str!("../template/look.typ")),
    ("cover.typ", include_str!("../template/cover.typ")),
    ("phases.typ", include_str!("../template/phases.typ")),
    ("lists.typ", include_str!("../template/lists.typ")),
    ("ending.typ", include_str!("../template/ending.typ")),
];

/// The desk of the typesetter, laid for one document.
pub(crate) struct Desk {
    library: LazyHash<Library>,
    typefaces: Typefaces,
    main: FileId,
    sources: HashMap<FileId, Source>,
    files: HashMap<FileId, Bytes>,
}

impl Desk {
    pub(crate) fn new(
        typefaces: Typefaces,
        sheet: Vec<u8>,
        record: Vec<u8>,
        pictures: &[Picture],
    ) -> Result<Self, TypesetFault> {
        let mut sources = HashMap::new();
        for (name, text) in TEMPLATE {
            let id = named(name)?;
            sources.insert(id, Source::new(id, (*text).to_owned()));
        }
        let mut files =
            HashMap::from([(named("sheet.json")?, Bytes::new(sheet)), (named("record.json")?, Bytes::new(record))]);
        for picture in pictures {
            files.insert(named(&picture.name)?, Bytes::new(picture.bytes.clone()));
        }
        let library = LazyHash::new(Library::builder().build());
        Ok(Self { library, typefaces, main: named("main.typ")?, sources, files })
    }
}

fn named(name: &str) -> Result<FileId, TypesetFault> {
    let path = VirtualPath::new(name).map_err(|e| TypesetFault(format!("{name}: {e}")))?;
    Ok(RootedPath::new(VirtualRoot::Project, path).intern())
}

impl World for Desk {
    fn library(&self) -> &LazyHash<Library> {
        &self.library
    }

    fn book(&self) -> &LazyHash<FontBook> {
        self.typefaces.book()
    }

    fn main(&self) -> FileId {
        self.main
    }

    fn source(&self, id: FileId) -> FileResult<Source> {
        self.sources.get(&id).cloned().ok_or_else(|| missing(id))
    }

    fn file(&self, id: FileId) -> FileResult<Bytes> {
        self.files.get(&id).cloned().ok_or_else(|| missing(id))
    }

    fn font(&self, index: usize) -> Option<Font> {
        self.typefaces.font(index)
    }

    /// Nobody asks: the document's date comes from the record.
    fn today(&self, _: Option<Duration>) -> Option<Datetime> {
        None
    }
}

fn missing(id: FileId) -> FileError {
    FileError::NotFound(id.get().vpath().get_without_slash().into())
}
