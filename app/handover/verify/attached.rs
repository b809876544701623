//! Opens the document and compares what is attached to it with the record.json beside it, byte for byte.

use super::Report;
use crate::package::{DOCUMENT, RECORD};
use flate2::read::ZlibDecoder;
use hayro_syntax::object::{Array, Dict, Stream, String as PdfString};
use hayro_syntax::{Filter, Pdf};
use std::collections::BTreeMap;
use std::io::Read;
use std::panic::catch_unwind;

/// How deep a tree of names may go; the typesetter writes one level.
const DEEPEST: usize = 8;
/// Branches of that tree looked at in all.
const MOST_BRANCHES: usize = 1000;

/// The document is there, and what a reader of it finds attached is this record.
pub(super) fn check(files: &BTreeMap<String, Vec<u8>>, report: &mut Report) {
    let Some(document) = files.get(DOCUMENT) else {
        report.fault(DOCUMENT, "it is missing");
        return;
    };
    let Some(record) = files.get(RECORD) else { return };
    let (document, record) = (document.clone(), record.clone());
    // A document made to harm must not end the verification of the rest.
    let looked = catch_unwind(move || compare(document, &record));
    if let Err(what) = looked.unwrap_or_else(|_| Err("it cannot be read".to_owned())) {
        report.fault(DOCUMENT, what);
    }
}

fn compare(document: Vec<u8>, record: &[u8]) -> Result<(), String> {
    let pdf = Pdf::new(document).map_err(|_| "it is no PDF that can be read".to_owned())?;
    let catalogue: Dict<'_> = pdf.xref().get(pdf.xref().root_id()).ok_or("it has no catalogue")?;
    // By name, as readers list attachments, and as the associated file of the whole document, as PDF/A-3 asks.
    let mut named = Vec::new();
    let names = catalogue.get::<Dict<'_>>("Names").and_then(|names| names.get::<Dict<'_>>("EmbeddedFiles"));
    if let Some(tree) = names {
        in_tree(&tree, DEEPEST, &mut { MOST_BRANCHES }, &mut named)?;
    }
    let associated: Vec<Dict<'_>> =
        catalogue.get::<Array<'_>>("AF").map(|list| list.iter().collect()).unwrap_or_default();
    if named.is_empty() || associated.is_empty() {
        return Err(format!("no {RECORD} is attached to it"));
    }
    for attached in named.iter().chain(&associated) {
        if !["UF", "F"]
            .iter()
            .filter_map(|key| attached.get::<PdfString<'_>>(*key))
            .all(|name| is_record(name.as_bytes()))
        {
            return Err(format!("something other than {RECORD} is attached to it"));
        }
        let embedded: Dict<'_> = attached.get("EF").ok_or("a file is named as attached that is not in it")?;
        let streams: Vec<Stream<'_>> = ["UF", "F"].iter().filter_map(|key| embedded.get(*key)).collect();
        if streams.is_empty() || streams.iter().any(|stream| !holds(stream, record)) {
            return Err(format!("the {RECORD} attached to it is not the one beside it"));
        }
    }
    Ok(())
}

/// The leaves of a tree of names: name and file by turns. `left` bounds how many branches are looked at in all, since a
/// branch may name itself many times over.
fn in_tree<'a>(tree: &Dict<'a>, deeper: usize, left: &mut usize, found: &mut Vec<Dict<'a>>) -> Result<(), String> {
    *left = left.checked_sub(1).ok_or("its list of attached files has too many branches")?;
    if let Some(leaves) = tree.get::<Array<'a>>("Names") {
        found.extend(
            leaves.iter::<hayro_syntax::object::Object<'a>>().filter_map(hayro_syntax::object::Object::into_dict),
        );
    }
    let Some(branches) = tree.get::<Array<'a>>("Kids") else { return Ok(()) };
    let further = deeper.checked_sub(1).ok_or("its list of attached files goes too deep")?;
    branches.iter::<Dict<'a>>().try_for_each(|branch| in_tree(&branch, further, left, found))
}

/// The name, in letters or in UTF-16 as PDF writes it.
fn is_record(name: &[u8]) -> bool {
    let wide: Vec<u8> = [0xFE, 0xFF].into_iter().chain(RECORD.bytes().flat_map(|b| [0, b])).collect();
    name == RECORD.as_bytes() || name == wide
}

/// Whether a stream unpacks to exactly these bytes; never further than they go.
fn holds(stream: &Stream<'_>, record: &[u8]) -> bool {
    let raw = stream.raw_data();
    let mut unpacked = Vec::with_capacity(record.len());
    match stream.filters().as_slice() {
        [] => return *raw == *record,
        [Filter::FlateDecode] if !stream.dict().contains_key("DecodeParms") => {
            let limit = record.len() as u64 + 1;
            if ZlibDecoder::new(&*raw).take(limit).read_to_end(&mut unpacked).is_err() {
                return false;
            }
        }
        _ => return false,
    }
    unpacked == record
}
