//! From the bytes of a text file to characters: UTF-8, UTF-16 with its mark, or else Windows-1252.

use super::Unreadable;

/// The characters, and what to tell about how they were read.
pub(super) fn decode(bytes: &[u8]) -> Result<(String, Option<String>), Unreadable> {
    if let Some((encoding, mark)) = encoding_rs::Encoding::for_bom(bytes) {
        let body = bytes.get(mark..).unwrap_or_default();
        let (text, _, broken) = encoding.decode(body);
        let told = broken.then(|| format!("Some characters are no {}; they are shown as �.", encoding.name()));
        return Ok((text.into_owned(), told));
    }
    if bytes.contains(&0) {
        return Err(Unreadable::NoSheet { what: "a file of another kind" });
    }
    if let Ok(text) = std::str::from_utf8(bytes) {
        return Ok((text.to_owned(), None));
    }
    let (text, ..) = encoding_rs::WINDOWS_1252.decode(bytes);
    let told = "The file does not say how its letters are written; they were read as Windows-1252. \
                Look whether accented letters and units are right.";
    Ok((text.into_owned(), Some(told.to_owned())))
}
