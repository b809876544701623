//! Looking through an archive with counted bytes before anything else reads it.

use super::{Limits, Unreadable};
use std::io::{Cursor, Read};

/// What the archive holds, once every part of it was unpacked and counted.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) struct Contents {
    /// It carries macros.
    pub macros: bool,
    /// Some sheet has formulas.
    pub formulas: bool,
}

/// Unpacks every part within the limits and says what it is.
pub(super) fn look_through(bytes: &[u8], limits: &Limits) -> Result<Contents, Unreadable> {
    let damaged = |place: &str| Unreadable::Damaged { place: place.to_owned() };
    let mut archive = match zip::ZipArchive::new(Cursor::new(bytes)) {
        Ok(archive) => archive,
        // The table of contents stands at the end: without it the file was cut off.
        Err(_) if !bytes.windows(4).rev().take(70_000).any(|w| w == b"PK\x05\x06") => return Err(Unreadable::CutOff),
        Err(_) => return Err(damaged("The archive")),
    };
    if archive.len() > limits.parts {
        return Err(Unreadable::TooMany { what: "parts", most: limits.parts });
    }
    let names: Vec<String> = archive.file_names().flatten().map(|n| n.to_ascii_lowercase()).collect();
    let has = |name: &str| names.iter().any(|n| n == name);
    if !has("xl/workbook.xml") {
        return Err(Unreadable::OtherArchive { what: kind_of(&names) });
    }
    let mut contents = Contents { macros: names.iter().any(|n| n.ends_with("vbaproject.bin")), formulas: false };
    let mut left = limits.unpacked;
    let mut chunk = vec![0_u8; 1 << 16];
    for index in 0..archive.len() {
        let mut part = archive.by_index(index).map_err(|_| damaged("An archive part"))?;
        let sheet = part.name().is_ok_and(|n| n.to_ascii_lowercase().starts_with("xl/worksheets/"));
        let mut tail = Vec::new();
        loop {
            let read = part.read(&mut chunk).map_err(|_| damaged("A compressed part"))?;
            if read == 0 {
                break;
            }
            left = left
                .checked_sub(u64::try_from(read).unwrap_or(u64::MAX))
                .ok_or(Unreadable::Unfolds { most: limits.unpacked })?;
            if sheet && !contents.formulas {
                tail.extend_from_slice(chunk.get(..read).unwrap_or_default());
                contents.formulas = tail.windows(3).any(|w| w == b"<f>" || w == b"<f ");
                let keep = tail.len().saturating_sub(2);
                tail.drain(..keep);
            }
        }
    }
    Ok(contents)
}

fn kind_of(names: &[String]) -> &'static str {
    let starts = |start: &str| names.iter().any(|n| n.starts_with(start));
    match () {
        () if starts("xl/workbook.bin") => "a spreadsheet in the binary format .xlsb",
        () if starts("content.xml") => "an OpenDocument file",
        () if starts("word/") => "a text document",
        () if starts("ppt/") => "a presentation",
        () if starts("index/") => "a spreadsheet in another program's own format",
        () => "no spreadsheet",
    }
}
