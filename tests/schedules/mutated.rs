//! Damaged copies of the corpus: whatever is done to the bytes, an answer or a refusal comes back, never a panic.
//!
//! A short, repeatable run: the damage comes from a counter, not from chance.

use super::{SITE, codes, files};
use exchange::rows::{self, Answers};
use exchange::schedule::{best_sheet, propose};
use exchange::{code_sheet, readout, sheets};
use std::collections::BTreeMap;
use std::io::{Cursor, Read, Write};

/// How many damaged copies are made of each file; `ASLEFT_COPIES` asks for a longer run.
const COPIES: u64 = 24;

/// Figures that look random and are the same in every run.
struct Figures(u64);

impl Figures {
    fn below(&mut self, most: usize) -> usize {
        self.0 = self.0.wrapping_mul(6_364_136_223_846_793_005).wrapping_add(1_442_695_040_888_963_407);
        usize::try_from(self.0 >> 33).expect("31 bits") % most.max(1)
    }
}

fn damaged(bytes: &[u8], figures: &mut Figures) -> Vec<u8> {
    let mut bytes = bytes.to_vec();
    for _ in 0..=figures.below(6) {
        let at = figures.below(bytes.len());
        match figures.below(5) {
            0 if !bytes.is_empty() => bytes[at] = u8::try_from(figures.below(256)).expect("a byte"),
            1 => bytes.truncate(at),
            2 => {
                let piece: Vec<u8> = bytes.iter().skip(at).take(figures.below(200)).copied().collect();
                let to = figures.below(bytes.len());
                bytes.splice(to..to, piece);
            }
            3 => {
                let end = (at + figures.below(40)).min(bytes.len());
                bytes.drain(at.min(end)..end);
            }
            _ => {
                let pieces: [&[u8]; 9] = [
                    b"\"",
                    b"9999999999999999999",
                    b"&#x0;",
                    b"<c r=\"ZZZZZZZZ1\">",
                    b"r=\"0\"",
                    b";",
                    b"\r",
                    b"\xFF\xFE",
                    b"1e308",
                ];
                let piece = pieces[figures.below(pieces.len())].to_vec();
                bytes.splice(at..at, piece);
            }
        }
    }
    bytes
}

/// The same archive with one of its parts damaged: damage to the packed bytes alone is mostly caught by its sum.
fn damaged_inside(bytes: &[u8], figures: &mut Figures) -> Option<Vec<u8>> {
    let mut archive = zip::ZipArchive::new(Cursor::new(bytes)).ok()?;
    let chosen = figures.below(archive.len());
    let mut out = zip::ZipWriter::new(Cursor::new(Vec::new()));
    for index in 0..archive.len() {
        let mut part = archive.by_index(index).ok()?;
        let mut content = Vec::new();
        part.read_to_end(&mut content).ok()?;
        let name = part.name().ok()?.into_owned();
        if index == chosen || name.starts_with("xl/worksheets/sheet") {
            content = damaged(&content, figures);
        }
        out.start_file(name, zip::write::SimpleFileOptions::default()).ok()?;
        out.write_all(&content).ok()?;
    }
    Some(out.finish().ok()?.into_inner())
}

/// Everything that is ever done with a file. Returns how much of it was answered.
fn through_everything(bytes: &[u8]) -> usize {
    let mut answered = 0;
    if let Ok(book) = sheets::read(bytes, "list") {
        for (index, sheet) in book.sheets.iter().enumerate() {
            let proposal = propose(sheet);
            let rows = rows::read(sheet, &proposal.mapping(), &Answers::new(), SITE);
            answered += rows.len() + usize::from(best_sheet(&book) == Some(index));
            let (codes, problems) = code_sheet::read(sheet, "KX");
            answered += codes.faults().len() + problems.len();
        }
    }
    if let Ok(out) = readout::read(bytes, "list") {
        answered += readout::join(&out.lines, &codes(), &BTreeMap::new()).len();
    }
    answered
}

#[test]
fn no_damage_brings_it_down() {
    // The reading crate panics on some damage, which the crate takes for a damaged file; only this thread keeps quiet.
    let (own, before) = (std::thread::current().id(), std::panic::take_hook());
    std::panic::set_hook(Box::new(move |told| {
        if std::thread::current().id() != own {
            before(told);
        }
    }));
    let copies = std::env::var("ASLEFT_COPIES").ok().and_then(|n| n.parse().ok()).unwrap_or(COPIES);
    let (mut read, mut refused, mut fell) = (0, 0, Vec::new());
    for (seed, (name, bytes)) in (1_u64..).zip(files()) {
        for copy in 0..copies {
            let mut figures = Figures(seed * 1_000_003 + copy);
            let outer = if copy % 3 == 0 { Some(damaged(&bytes, &mut figures)) } else { None };
            let made =
                outer.or_else(|| damaged_inside(&bytes, &mut figures)).unwrap_or_else(|| damaged(&bytes, &mut figures));
            let run = std::panic::catch_unwind(|| through_everything(&made));
            match run {
                Ok(0) => refused += 1,
                Ok(_) => read += 1,
                Err(_) => fell.push(format!("{name}, copy {copy}")),
            }
        }
    }
    let _ = std::panic::take_hook();
    assert!(fell.is_empty(), "{fell:?}");
    assert!(read > 200 && refused > 50, "the damage is neither nothing nor everything: {read} read, {refused} refused");
}
