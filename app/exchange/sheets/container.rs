//! What kind of file the bytes are, whatever the name says.

use super::Unreadable;

/// The two kinds that are read.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Container {
    /// An archive, as .xlsx is one.
    Zip,
    /// Words with separators.
    Words,
}

/// First bytes of the compound file that old office programs wrote and encrypted packages still use.
const COMPOUND: &[u8] = &[0xD0, 0xCF, 0x11, 0xE0, 0xA1, 0xB1, 0x1A, 0xE1];

/// What these bytes are, or why they are not read.
pub(super) fn of(bytes: &[u8]) -> Result<Container, Unreadable> {
    if bytes.iter().all(|b| matches!(b, b' ' | b'\t' | b'\r' | b'\n' | 0)) {
        return Err(Unreadable::Empty);
    }
    if bytes.starts_with(b"PK\x03\x04") || bytes.starts_with(b"PK\x05\x06") {
        return Ok(Container::Zip);
    }
    if bytes.starts_with(COMPOUND) {
        return Err(match () {
            () if holds(bytes, "EncryptedPackage") => Unreadable::Password,
            () if holds(bytes, "Workbook") || holds(bytes, "Book") => Unreadable::OldBinary,
            () => Unreadable::OtherOffice,
        });
    }
    // A sheet of the oldest binary format without container: its first record says "beginning of file".
    if [&[0x09, 0x08, 0x10, 0x00], &[0x09, 0x08, 0x08, 0x00], &[0x09, 0x04, 0x06, 0x00], &[0x09, 0x02, 0x06, 0x00]]
        .iter()
        .any(|start| bytes.starts_with(*start))
    {
        return Err(Unreadable::OldBinary);
    }
    let start: Vec<u8> = bytes.iter().copied().skip_while(u8::is_ascii_whitespace).take(16).collect();
    for (first, what) in [
        (&b"%PDF"[..], "a PDF"),
        (b"\x89PNG", "a picture"),
        (b"\xFF\xD8\xFF", "a picture"),
        (b"GIF8", "a picture"),
        (b"{\\rtf", "a text document"),
        (b"<!DOCTYPE", "a web page"),
        (b"<!doctype", "a web page"),
        (b"<html", "a web page"),
        (b"<HTML", "a web page"),
        (b"<?xml", "an XML file"),
        (b"\x1F\x8B", "a compressed file"),
        (b"7z\xBC\xAF", "a compressed file"),
        (b"Rar!", "a compressed file"),
    ] {
        if start.starts_with(first) {
            return Err(Unreadable::NoSheet { what });
        }
    }
    Ok(Container::Words)
}

/// Whether a compound file's directory names this stream; names stand there in UTF-16.
fn holds(bytes: &[u8], name: &str) -> bool {
    let wanted: Vec<u8> = name.encode_utf16().flat_map(u16::to_le_bytes).collect();
    bytes.windows(wanted.len()).any(|w| w == wanted)
}
