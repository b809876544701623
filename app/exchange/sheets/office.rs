//! Reading .xlsx, cell by cell with counted limits; never as one block, which a single far-off cell could inflate.

use super::{Address, Book, CellValue, Limits, Sheet, Unreadable, archive, column_letters};
use calamine::{DataRef, Reader, SheetType, SheetVisible, Xlsx, XlsxError};
use std::collections::BTreeSet;
use std::io::Cursor;
use std::panic::{AssertUnwindSafe, catch_unwind};

type File<'a> = Xlsx<Cursor<&'a [u8]>>;

/// How many merged areas of a sheet are kept, from its top.
const MOST_MERGED: usize = 2000;

/// What was counted over all sheets so far.
#[derive(Default)]
struct Counted {
    cells: usize,
    words: usize,
}

/// Reads the archive's sheets.
pub(super) fn read(bytes: &[u8], limits: &Limits) -> Result<Book, Unreadable> {
    let contents = archive::look_through(bytes, limits)?;
    // The reading crate counts columns without looking for overflow; what it stumbles over is a damaged file to us.
    catch_unwind(AssertUnwindSafe(|| book(bytes, contents, limits)))
        .unwrap_or_else(|_| Err(Unreadable::Damaged { place: "A cell".to_owned() }))
}

fn book(bytes: &[u8], contents: archive::Contents, limits: &Limits) -> Result<Book, Unreadable> {
    let mut file: File<'_> = Xlsx::new(Cursor::new(bytes)).map_err(|e| refused(&e, "The workbook"))?;
    let listed: Vec<calamine::Sheet> =
        file.sheets_metadata().iter().filter(|s| s.typ == SheetType::WorkSheet).cloned().collect();
    if listed.len() > limits.sheets {
        return Err(Unreadable::TooMany { what: "sheets", most: limits.sheets });
    }
    let mut counted = Counted::default();
    let mut sheets = Vec::new();
    for one in listed {
        let hidden = one.visible != SheetVisible::Visible;
        let place = format!("Sheet “{}”", one.name);
        let mut sheet = Sheet { name: one.name, hidden, ..Sheet::default() };
        cells(&mut file, &mut sheet, limits, &mut counted).map_err(|e| e.at(&place))?;
        if contents.formulas {
            unsolved(&mut file, &mut sheet, limits).map_err(|e| refused(&e, &place))?;
        }
        let merged = file.merge_cells_by_sheet_name(&sheet.name).map_err(|e| refused(&e, &place))?;
        let address = |(row, column)| Address::new(row, column);
        sheet.merged = merged.iter().map(|m| (address(m.start), address(m.end))).collect();
        // Merged areas matter in headers only, which stand above.
        sheet.merged.sort_unstable();
        sheet.merged.truncate(MOST_MERGED);
        sheets.push(sheet);
    }
    let macros = "The file carries macros. They were not read; only what the cells show was.".to_owned();
    Ok(Book { sheets, notices: contents.macros.then_some(macros).into_iter().collect() })
}

/// A fault of the reading crate, or a limit of ours.
enum Stopped {
    Fault(XlsxError),
    Limit(Unreadable),
}

impl Stopped {
    fn at(self, place: &str) -> Unreadable {
        match self {
            Self::Fault(error) => refused(&error, place),
            Self::Limit(limit) => limit,
        }
    }
}

fn refused(error: &XlsxError, place: &str) -> Unreadable {
    match error {
        XlsxError::Password => Unreadable::Password,
        _ => Unreadable::Damaged { place: place.to_owned() },
    }
}

fn cells(file: &mut File<'_>, sheet: &mut Sheet, limits: &Limits, counted: &mut Counted) -> Result<(), Stopped> {
    let mut reader = file.worksheet_cells_reader(&sheet.name).map_err(Stopped::Fault)?;
    let percent: BTreeSet<usize> = reader
        .styles()
        .iter()
        .enumerate()
        .filter(|(_, s)| s.number_format.as_ref().is_some_and(|n| shows_percent(&n.format_code)))
        .map(|(index, _)| index)
        .collect();
    while let Some((cell, style)) = reader.next_cell_with_style_id().map_err(Stopped::Fault)? {
        let value = value_of(cell.get_value(), percent.contains(&style));
        if value == CellValue::Empty {
            continue;
        }
        let (row, column) = cell.get_position();
        if row >= limits.rows || column >= limits.columns {
            let columns = column_letters(limits.columns.saturating_sub(1));
            let cell = Address::new(row, column).to_string();
            let sheet = sheet.name.clone();
            return Err(Stopped::Limit(Unreadable::TooFar { sheet, cell, rows: limits.rows, columns }));
        }
        if let CellValue::Text(text) = &value {
            counted.words += text.len();
        }
        if counted.words > limits.words {
            return Err(Stopped::Limit(Unreadable::TooMany { what: "letters", most: limits.words }));
        }
        // Empty cells before a filled one take room too.
        counted.cells += put(sheet, Address::new(row, column), value);
        if counted.cells > limits.cells {
            return Err(Stopped::Limit(Unreadable::TooMany { what: "cells", most: limits.cells }));
        }
    }
    Ok(())
}

/// Formulas whose result the file does not hold: a second look, only where there are formulas at all.
fn unsolved(file: &mut File<'_>, sheet: &mut Sheet, limits: &Limits) -> Result<(), XlsxError> {
    let mut reader = file.worksheet_cells_reader(&sheet.name)?;
    let mut found = Vec::new();
    while let Some(cell) = reader.next_cell_with_formula_metadata()? {
        let (row, column) = cell.pos;
        let bare = matches!(&cell.value, DataRef::Empty) || matches!(&cell.value, DataRef::String(s) if s.is_empty());
        if cell.formula.is_some() && bare && row < limits.rows && column < limits.columns {
            found.push(Address::new(row, column));
        }
    }
    for at in found.into_iter().take(limits.cells) {
        if sheet.cell(at).is_empty() {
            put(sheet, at, CellValue::Unsolved);
        }
    }
    Ok(())
}

/// Puts a value in its place; returns by how many cells the sheet grew.
fn put(sheet: &mut Sheet, at: Address, value: CellValue) -> usize {
    let (row, column) = (at.row as usize, at.column as usize);
    if sheet.rows.len() <= row {
        sheet.rows.resize_with(row + 1, Vec::new);
    }
    let Some(cells) = sheet.rows.get_mut(row) else { return 0 };
    let before = cells.len();
    if before <= column {
        cells.resize(column + 1, CellValue::Empty);
    }
    if let Some(cell) = cells.get_mut(column) {
        *cell = value;
    }
    cells.len() - before
}

/// Whether a number format shows percent: a `%` outside quotation marks and not escaped.
fn shows_percent(format: &str) -> bool {
    let (mut quoted, mut escaped) = (false, false);
    for c in format.chars() {
        match c {
            _ if escaped => escaped = false,
            '\\' => escaped = true,
            '"' => quoted = !quoted,
            '%' if !quoted => return true,
            _ => {}
        }
    }
    false
}

fn value_of(value: &DataRef<'_>, percent: bool) -> CellValue {
    match value {
        DataRef::Empty => CellValue::Empty,
        DataRef::String(text) if text.is_empty() => CellValue::Empty,
        DataRef::SharedString("") => CellValue::Empty,
        DataRef::String(text) => CellValue::Text(text.clone()),
        DataRef::SharedString(text) => CellValue::Text((*text).to_owned()),
        #[expect(clippy::cast_precision_loss, reason = "a spreadsheet keeps no more than fifteen digits")]
        DataRef::Int(number) => number_of(*number as f64, percent),
        DataRef::Float(number) => number_of(*number, percent),
        DataRef::Bool(yes) => CellValue::Flag(*yes),
        DataRef::DateTime(moment) if moment.is_duration() => {
            CellValue::Date(format!("{} days", super::cell::decimal(moment.as_f64())))
        }
        DataRef::DateTime(moment) => {
            let (year, month, day, hour, minute, ..) = moment.to_ymd_hms_milli();
            let date = format!("{year:04}-{month:02}-{day:02}");
            let time = if hour == 0 && minute == 0 { String::new() } else { format!(" {hour:02}:{minute:02}") };
            CellValue::Date(date + &time)
        }
        DataRef::DateTimeIso(text) | DataRef::DurationIso(text) => CellValue::Date(text.clone()),
        DataRef::Error(error) => CellValue::Error(error.to_string()),
    }
}

fn number_of(number: f64, percent: bool) -> CellValue {
    match () {
        () if !number.is_finite() => CellValue::Error("#NUM!".to_owned()),
        () if percent => CellValue::Percent(engineering::rounding::to_significant(number * 100.0, 15)),
        () => CellValue::Number(number),
    }
}
