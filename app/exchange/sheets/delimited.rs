//! Text files with comma, semicolon or tab between cells; quoted cells may hold any of them and line ends.

use super::{Address, Book, CellValue, Limits, Sheet, Unreadable, column_letters, encoding};

/// The separators that are known, in the order in which they win a tie.
const SEPARATORS: [char; 3] = ['\t', ';', ','];
/// How many rows decide on the separator.
const LOOKED_AT: usize = 60;
/// And how many bytes, should a row be that long.
const LOOKED_INTO: usize = 1 << 16;

/// Reads the bytes of a text file.
pub(super) fn read(bytes: &[u8], name: &str, limits: &Limits) -> Result<Book, Unreadable> {
    let (text, told) = encoding::decode(bytes)?;
    // Some programs say the separator in a first line of its own, which spreadsheets do not show.
    let (separator, body) = match text.split_once('\n') {
        Some((first, rest)) if first.trim_end().len() == 5 && first.starts_with("sep=") => {
            (first.chars().nth(4).unwrap_or(';'), rest)
        }
        _ => (separator(&text), text.as_str()),
    };
    let sheet = Sheet { name: name.to_owned(), rows: split(body, separator, name, limits, None)?, ..Sheet::default() };
    Ok(Book { sheets: vec![sheet], notices: told.into_iter().collect() })
}

/// The separator that cuts the largest share of the rows into the same number of cells.
fn separator(text: &str) -> char {
    let limits = Limits { columns: u32::MAX - 1, ..Limits::USUAL };
    let text = text.get(..text.floor_char_boundary(LOOKED_INTO)).unwrap_or_default();
    let score = |separator: char| {
        let rows = split(text, separator, "", &limits, Some(LOOKED_AT)).unwrap_or_default();
        let widths: Vec<usize> = rows.iter().map(Vec::len).filter(|n| *n > 0).collect();
        let same = |n: usize| widths.iter().filter(|w| **w == n).count();
        let most = widths.iter().filter(|n| **n > 1).map(|n| same(*n)).max().unwrap_or(0);
        most * 1000 / widths.len().max(1)
    };
    let mut best = (',', 0);
    for candidate in SEPARATORS {
        let share = score(candidate);
        if share > best.1 {
            best = (candidate, share);
        }
    }
    best.0
}

/// Cuts text into rows of cells; a row per record, empty lines stay rows so that row numbers are those of the file.
fn split(
    text: &str,
    separator: char,
    sheet: &str,
    limits: &Limits,
    most: Option<usize>,
) -> Result<Vec<Vec<CellValue>>, Unreadable> {
    let mut rows: Vec<Vec<CellValue>> = Vec::new();
    let (mut row, mut cell, mut count) = (Vec::new(), String::new(), 0_usize);
    let mut quoted: Option<Address> = None;
    let mut was_quoted = false;
    let mut chars = text.chars().peekable();
    let mut ended = false;
    while !ended {
        let next = chars.next();
        let at = |rows: &Vec<_>, row: &Vec<_>| {
            Address::new(u32::try_from(rows.len()).unwrap_or(u32::MAX), u32::try_from(row.len()).unwrap_or(u32::MAX))
        };
        match (next, quoted) {
            (None, Some(_)) if most.is_some() => ended = true,
            (None, Some(from)) => return Err(Unreadable::OpenQuote { cell: from.to_string() }),
            (Some('"'), Some(_)) => {
                if chars.peek() == Some(&'"') {
                    chars.next();
                    cell.push('"');
                } else {
                    quoted = None;
                }
            }
            (Some(c), Some(_)) => cell.push(c),
            (Some('"'), None) if cell.trim().is_empty() && !was_quoted => {
                cell.clear();
                quoted = Some(at(&rows, &row));
                was_quoted = true;
            }
            (Some('\r'), None) if chars.peek() == Some(&'\n') => {}
            (end @ (None | Some('\n' | '\r')), None) => {
                put(&mut row, &mut cell, &mut count);
                was_quoted = false;
                // Uncut rows tell the separator better: a row of nothing but separators is one too.
                while most.is_none() && row.last().is_some_and(CellValue::is_empty) {
                    row.pop();
                }
                rows.push(std::mem::take(&mut row));
                ended = end.is_none() || most.is_some_and(|n| rows.len() >= n);
            }
            (Some(c), None) if c == separator => {
                put(&mut row, &mut cell, &mut count);
                was_quoted = false;
            }
            (Some(c), None) => cell.push(c),
        }
        let here = at(&rows, &row);
        // An empty last line makes one row more, which is taken off below.
        if here.row > limits.rows + 1 || here.column > limits.columns {
            let (sheet, cell) = (sheet.to_owned(), here.to_string());
            let columns = column_letters(limits.columns.saturating_sub(1));
            return Err(Unreadable::TooFar { sheet, cell, rows: limits.rows, columns });
        }
        if count > limits.cells {
            return Err(Unreadable::TooMany { what: "cells", most: limits.cells });
        }
    }
    while rows.last().is_some_and(Vec::is_empty) {
        rows.pop();
    }
    Ok(rows)
}

fn put(row: &mut Vec<CellValue>, cell: &mut String, count: &mut usize) {
    let text = std::mem::take(cell);
    let text = unguarded(text);
    *count += 1;
    row.push(if text.is_empty() { CellValue::Empty } else { CellValue::Text(text) });
}

/// Takes off the apostrophe that keeps words from being a formula, as our own files put it; a doubled one stays one.
fn unguarded(mut text: String) -> String {
    if text.strip_prefix('\'').is_some_and(crate::workbook::needs_guard) {
        text.remove(0);
    }
    text
}
