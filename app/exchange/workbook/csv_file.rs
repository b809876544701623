//! A table as .csv: comma, decimal point, UTF-8; words that would become a formula get an apostrophe before them.

use super::{OutCell, Table};
use crate::sheets::decimal;

/// The file's bytes.
#[must_use]
pub fn csv(table: &Table) -> Vec<u8> {
    let mut out = String::from("\u{feff}");
    let headings = table.headings.iter().map(|h| OutCell::Text(h.text()));
    line(&mut out, &headings.collect::<Vec<_>>());
    for row in &table.rows {
        line(&mut out, row);
    }
    out.into_bytes()
}

fn line(out: &mut String, cells: &[OutCell]) {
    for (index, cell) in cells.iter().enumerate() {
        if index > 0 {
            out.push(',');
        }
        match cell {
            OutCell::Empty => {}
            OutCell::Number(number, decimals) => out.push_str(&figure(*number, *decimals)),
            OutCell::Text(text) => words(out, text),
        }
    }
    out.push_str("\r\n");
}

/// Words are quoted always, so that blanks and separators in them stay where they are.
fn words(out: &mut String, text: &str) {
    out.push('"');
    if needs_guard(text) {
        out.push('\'');
    }
    out.push_str(&text.replace('"', "\"\""));
    out.push('"');
}

/// Whether a spreadsheet would take these words for a formula, or our own reader for guarded ones.
pub(crate) fn needs_guard(text: &str) -> bool {
    text.trim_start().starts_with(['=', '+', '-', '@', '\'']) || text.starts_with(char::is_whitespace)
}

/// A number that cannot be read two ways: 1.485 is written 1.4850, or a reader might take its point for a group's.
fn figure(number: f64, decimals: u8) -> String {
    let shown = format!("{number:.*}", usize::from(decimals));
    let text = if shown.parse() == Ok(number) { shown } else { decimal(number) };
    let (whole, part) = text.split_once('.').unwrap_or((&text, ""));
    let whole = whole.trim_start_matches('-');
    if part.len() == 3 && whole.len() <= 3 && whole != "0" { format!("{text}0") } else { text }
}
