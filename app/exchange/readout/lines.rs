//! The lines of a read-out: code, value, unit; from a table, or from words parted by blanks.

use crate::code_sheet::{Columns, find_headings};
use crate::schedule::bare;
use crate::sheets::{self, Address, CellValue, Limits, Sheet, Unreadable};

/// A line of a read-out.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct ReadLine {
    /// Where it stands; a line of words stands in column A.
    pub at: Address,
    /// The drive's own code.
    pub code: String,
    /// What the drive calls it; empty when the file does not say.
    pub name: String,
    /// The value as it stands, without the unit where that has a column of its own; a number stays one.
    pub value: CellValue,
    /// The unit as it stands; empty when the value carries it or there is none.
    pub unit: String,
}

/// A read-out.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct ReadOut {
    /// Its lines, in their order.
    pub lines: Vec<ReadLine>,
    /// Which columns were taken, for a table; `None` for lines of words.
    pub columns: Option<Columns>,
    /// Lines that hold no code and value, by number from 1.
    pub left: Vec<u32>,
    /// What to tell: letters assumed, macros left out.
    pub notices: Vec<String>,
}

/// Reads a read-out: a table with headings, a table of code, value and unit, or lines of words.
///
/// # Errors
/// When the file is none that can be read, with a sentence that says why and what to do.
pub fn read(bytes: &[u8], name: &str) -> Result<ReadOut, Unreadable> {
    if let Some((lines, told)) = sheets::lines(bytes, &Limits::USUAL)? {
        let as_table = sheets::read(bytes, name).ok().and_then(|book| book.sheets.into_iter().next());
        let headed = as_table.as_ref().and_then(find_headings).filter(|c| c.code.is_some() && c.value.is_some());
        let mut out = match (as_table, headed) {
            (Some(sheet), Some(columns)) => table(&sheet, columns),
            (Some(sheet), None) if is_plain_table(&sheet) => table(&sheet, plain_columns(&sheet)),
            _ => words(&lines),
        };
        out.notices.extend(told);
        return if out.lines.is_empty() { Err(Unreadable::Empty) } else { Ok(out) };
    }
    let book = sheets::read(bytes, name)?;
    let headed = book.sheets.iter().find_map(|s| Some((s, find_headings(s).filter(|c| c.value.is_some())?)));
    let mut out = match (headed, book.sheets.iter().find(|s| !s.hidden && !s.rows.is_empty())) {
        (Some((sheet, columns)), _) => table(sheet, columns),
        (None, Some(sheet)) => table(sheet, plain_columns(sheet)),
        (None, None) => ReadOut::default(),
    };
    out.notices.extend(book.notices);
    if out.lines.is_empty() { Err(Unreadable::Empty) } else { Ok(out) }
}

/// Code, value and unit, with a name between when there are four columns.
fn plain_columns(sheet: &Sheet) -> Columns {
    match sheet.width() {
        0..=3 => Columns { code: Some(0), value: Some(1), unit: Some(2), ..Columns::default() },
        _ => Columns { code: Some(0), name: Some(1), value: Some(2), unit: Some(3), ..Columns::default() },
    }
}

/// A table without headings: most rows have a code in one word, and something beside it; a comma inside a number makes
/// no table of lines of words.
fn is_plain_table(sheet: &Sheet) -> bool {
    let filled: Vec<_> = sheet.rows.iter().filter(|r| !r.is_empty()).collect();
    let tabular = filled
        .iter()
        .filter(|row| {
            let first = row.first().map(|c| bare(&c.text())).unwrap_or_default();
            row.len() > 1 && !first.is_empty() && !first.contains([' ', '='])
        })
        .count();
    tabular * 2 > filled.len()
}

/// Reads a table with these columns, found or corrected by a person.
#[must_use]
pub fn table(sheet: &Sheet, columns: Columns) -> ReadOut {
    let mut out = ReadOut { columns: Some(columns), ..ReadOut::default() };
    let first = columns.heading.map_or(0, |row| row.saturating_add(1));
    for row in first..sheet.height() {
        let cell =
            |column: Option<u32>| column.map_or(String::new(), |c| bare(&sheet.cell(Address::new(row, c)).text()));
        let code = cell(columns.code);
        let at = Address::new(row, columns.value.unwrap_or(0));
        let value = match columns.value.map(|_| sheet.cell(at)) {
            Some(CellValue::Text(text)) => CellValue::Text(bare(text)),
            Some(other) => other.clone(),
            None => CellValue::Empty,
        };
        if !code.is_empty() && !value.is_empty() {
            out.lines.push(ReadLine { at, code, name: cell(columns.name), value, unit: cell(columns.unit) });
        } else if sheet.rows.get(row as usize).is_some_and(|r| r.iter().any(|c| !c.is_empty())) {
            out.left.push(row.saturating_add(1));
        }
    }
    out
}

/// Lines of words: `P1.04 12.5 s`, `P1.04 = 12.5 s`, `P1.04: on`. The code is the first word and has a digit in it.
fn words(lines: &[String]) -> ReadOut {
    let mut out = ReadOut::default();
    for (row, line) in (0_u32..).zip(lines) {
        let line = bare(line);
        if line.is_empty() {
            continue;
        }
        let parted = line.split_once([' ', '=', ':']).map(|(code, rest)| {
            let rest = rest.trim_start_matches(|c: char| c.is_whitespace() || matches!(c, '=' | ':'));
            (code.trim_end_matches(['=', ':', ',', ';']), rest.trim())
        });
        match parted {
            Some((code, value)) if code.chars().any(|c| c.is_ascii_digit()) && !value.is_empty() => {
                let (code, value) = (code.to_owned(), CellValue::Text(value.to_owned()));
                out.lines.push(ReadLine { at: Address::new(row, 0), code, value, ..ReadLine::default() });
            }
            _ => out.left.push(row.saturating_add(1)),
        }
    }
    out
}
