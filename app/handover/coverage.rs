//! Which characters the bundled typefaces can print; all others are printed as their code point, never dropped.

use crate::pdf::Typefaces;
use serde_json::Value;

/// A run without a blank longer than this gets places where a line may break.
const LONGEST_RUN: usize = 18;

/// How much is trusted to print.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Trust {
    /// Whatever both typefaces of the document have.
    Covered,
    /// Only Latin, Greek and the signs of our own sentences: when a document failed otherwise.
    Narrow,
}

/// Goes through all strings of a document; says whether any character had to be printed as its code point.
pub(crate) fn make_printable(value: &mut Value, typefaces: Typefaces, trust: Trust) -> bool {
    match value {
        Value::String(text) => {
            let (safe, changed) = printable(text, typefaces, trust);
            // Pictures bring their own line breaks.
            *text = if text.starts_with("<svg ") { safe } else { with_breaks(&safe) };
            changed
        }
        // Counted, not asked with `any`, which would stop at the first.
        Value::Array(items) => {
            items.iter_mut().filter_map(|v| make_printable(v, typefaces, trust).then_some(())).count() > 0
        }
        Value::Object(map) => {
            map.values_mut().filter_map(|v| make_printable(v, typefaces, trust).then_some(())).count() > 0
        }
        _ => false,
    }
}

/// The text with every character that cannot be printed written as `[U+1F600]`.
pub(crate) fn printable(text: &str, typefaces: Typefaces, trust: Trust) -> (String, bool) {
    let mut safe = String::with_capacity(text.len());
    let mut changed = false;
    for c in text.chars() {
        if c == '\n' || typefaces.cover(c) && !is_hidden(c) && (trust == Trust::Covered || is_ours(c)) {
            safe.push(c);
        } else if c == '\t' {
            safe.push(' ');
        } else if c == '\r' {
        } else {
            changed = true;
            safe.push_str(&format!("[U+{:04X}]", u32::from(c)));
        }
    }
    (safe, changed)
}

/// Latin, Greek, punctuation, sub- and superscripts, mathematical signs and shapes.
fn is_ours(c: char) -> bool {
    matches!(u32::from(c), 0x20..=0x24f | 0x370..=0x3ff | 0x2010..=0x2044 | 0x2070..=0x209f | 0x2200..=0x22ff | 0x25a0..=0x25ff)
}

/// Marks that join the character before them: a cluster is set in one typeface, which may not have both.
fn is_joining(c: char) -> bool {
    matches!(u32::from(c),
        0x483..=0x489 | 0x591..=0x5bd | 0x5bf | 0x5c1..=0x5c2 | 0x5c4..=0x5c5 | 0x5c7 | 0x610..=0x61a | 0x64b..=0x65f | 0x670
        | 0x6d6..=0x6dc | 0x6df..=0x6e4 | 0x6e7..=0x6e8 | 0x6ea..=0x6ed | 0x1ab0..=0x1aff | 0x1dc0..=0x1dff | 0x20d0..=0x20ff
        | 0x302a..=0x302f | 0x3099..=0x309a | 0xfe20..=0xfe2f)
}

/// Characters that steer instead of print (direction, joining, variation, tags), and those of private meaning.
fn is_hidden(c: char) -> bool {
    c.is_control()
        || is_joining(c)
        || matches!(u32::from(c),
            0x00ad | 0x034f | 0x061c | 0x115f..=0x1160 | 0x17b4..=0x17b5 | 0x180b..=0x180f | 0x200b..=0x200f
            | 0x2028..=0x202e | 0x2060..=0x206f | 0x3164 | 0xd800..=0xf8ff | 0xfe00..=0xfe0f | 0xfeff | 0xffa0
            | 0xfff0..=0xffff | 0x1bca0..=0x1bca3 | 0x1d173..=0x1d17a | 0xe0000..=0x10_ffff)
}

/// Zero-width breaks inside long runs, so that nothing a person types can run out of its cell.
fn with_breaks(text: &str) -> String {
    let mut out = String::with_capacity(text.len());
    let mut run = 0;
    for c in text.chars() {
        if c.is_whitespace() {
            run = 0;
        } else {
            run += 1;
            // Never between a letter and the accent that stands on it.
            if run > LONGEST_RUN && !matches!(u32::from(c), 0x300..=0x36f) {
                out.push('\u{200b}');
                run = 1;
            }
        }
        out.push(c);
    }
    out
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn what_no_typeface_has_is_printed_as_its_code_point() {
        let typefaces = Typefaces::bundled();
        assert_eq!(
            printable("21.0 MΩ ± 0.4 ≥ ● ▲ ■ ○ é Ж µ² √", typefaces, Trust::Covered),
            ("21.0 MΩ ± 0.4 ≥ ● ▲ ■ ○ é Ж µ² √".to_owned(), false)
        );
        assert_eq!(printable("😀泵", typefaces, Trust::Covered), ("[U+1F600][U+6CF5]".to_owned(), true));
        assert_eq!(
            printable("a\u{0}\u{202e}b\u{e000}", typefaces, Trust::Covered),
            ("a[U+0000][U+202E]b[U+E000]".to_owned(), true)
        );
        assert_eq!(printable("مضخة é", typefaces, Trust::Narrow).0, "[U+0645][U+0636][U+062E][U+0629] é");
        assert_eq!(printable("a\tb\r\nc", typefaces, Trust::Covered), ("a b\nc".to_owned(), false));
    }

    #[test]
    fn long_runs_may_break() {
        let broken = with_breaks(&"x".repeat(40));
        assert_eq!(broken.matches('\u{200b}').count(), 2);
        assert_eq!(with_breaks("short words stay as they are"), "short words stay as they are");
    }
}
