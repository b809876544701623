//! Tables as .xlsx: frozen heading, filter, print set-up, a fixed moment of making.

use super::{OutCell, Table};
use commissioning::Timestamp;
use rust_xlsxwriter::{DocProperties, ExcelDateTime, Format, FormatAlign, Workbook, Worksheet, XlsxError};
use std::collections::BTreeMap;
use thiserror::Error;

/// Why a workbook was not written.
#[derive(Debug, Error)]
#[error("The workbook could not be written: {0}")]
pub struct NotWritten(String);

impl From<XlsxError> for NotWritten {
    fn from(error: XlsxError) -> Self {
        Self(error.to_string())
    }
}

/// Most letters of a cell; a spreadsheet keeps no more.
const LONGEST: usize = 32_000;
/// Narrowest and widest column, in letters.
const WIDTHS: (usize, usize) = (8, 60);
/// Paper A4, as the format numbers it.
const A4: u8 = 9;

/// The file's bytes; `made` stands in its properties, so that the same tables give the same bytes.
///
/// # Errors
/// When a table is larger than the format allows.
pub fn xlsx(title: &str, tables: &[Table], made: Timestamp) -> Result<Vec<u8>, NotWritten> {
    let mut book = Workbook::new();
    let moment = ExcelDateTime::from_timestamp(made.moment().unix_timestamp())?;
    book.set_properties(&DocProperties::new().set_title(title).set_creation_datetime(&moment));
    let mut names: Vec<String> = Vec::new();
    for table in tables {
        let name = sheet_name(&table.name, &names);
        let sheet = book.add_worksheet();
        sheet.set_name(&name)?;
        fill(sheet, table, title)?;
        names.push(name);
    }
    Ok(book.save_to_buffer()?)
}

fn fill(sheet: &mut Worksheet, table: &Table, title: &str) -> Result<(), NotWritten> {
    let bold = Format::new().set_bold().set_text_wrap().set_align(FormatAlign::Top);
    let words = Format::new().set_num_format("@");
    let mut numbers: BTreeMap<u8, Format> = BTreeMap::new();
    let columns = u16::try_from(table.headings.len()).map_err(|_| NotWritten("too many columns".to_owned()))?;
    for (column, heading) in (0..columns).zip(&table.headings) {
        sheet.write_string_with_format(0, column, heading.text(), &bold)?;
    }
    for (row, cells) in (1_u32..).zip(&table.rows) {
        for (column, cell) in (0..columns).zip(cells) {
            match cell {
                OutCell::Empty => {}
                OutCell::Text(text) => {
                    let text: String = text.chars().take(LONGEST).collect();
                    sheet.write_string_with_format(row, column, text, &words)?;
                }
                OutCell::Number(number, decimals) if number.is_finite() => {
                    let format =
                        numbers.entry(*decimals).or_insert_with(|| Format::new().set_num_format(shape(*decimals)));
                    sheet.write_number_with_format(row, column, *number, format)?;
                }
                OutCell::Number(..) => {
                    sheet.write_string_with_format(row, column, "not a number", &words)?;
                }
            }
        }
    }
    set_up(sheet, table, title, columns)
}

fn set_up(sheet: &mut Worksheet, table: &Table, title: &str, columns: u16) -> Result<(), NotWritten> {
    for (column, heading) in (0..columns).zip(&table.headings) {
        let cells = table.rows.iter().filter_map(|r| r.get(usize::from(column)));
        let longest = cells.map(length).max().unwrap_or(0).max(heading.text().chars().count().min(24));
        let width = u32::try_from(longest.clamp(WIDTHS.0, WIDTHS.1)).unwrap_or(8);
        sheet.set_column_width(column, f64::from(width) + 2.0)?;
    }
    let last = u32::try_from(table.rows.len()).map_err(|_| NotWritten("too many rows".to_owned()))?;
    sheet.set_freeze_panes(1, 1)?;
    if columns > 0 {
        sheet.autofilter(0, 0, last, columns - 1)?;
    }
    sheet.set_repeat_rows(0, 0)?;
    sheet.set_landscape().set_paper_size(A4).set_print_fit_to_pages(1, 0);
    // An ampersand begins a code in a page's head; doubled it is one.
    sheet.set_header(format!("&L{}&R&A", title.chars().take(100).collect::<String>().replace('&', "&&")));
    sheet.set_footer("&R&P / &N");
    Ok(())
}

fn length(cell: &OutCell) -> usize {
    match cell {
        OutCell::Empty => 0,
        OutCell::Text(text) => text.lines().map(|l| l.chars().count()).max().unwrap_or(0),
        OutCell::Number(number, decimals) => format!("{number:.*}", usize::from(*decimals)).len(),
    }
}

fn shape(decimals: u8) -> String {
    if decimals == 0 { "0".to_owned() } else { format!("0.{}", "0".repeat(usize::from(decimals))) }
}

/// A sheet's name without what the format forbids, 31 letters at most, different from those before.
fn sheet_name(name: &str, taken: &[String]) -> String {
    let plain: String = name.chars().map(|c| if "[]:*?/\\'".contains(c) || c.is_control() { ' ' } else { c }).collect();
    let plain = plain.trim();
    let plain = if plain.is_empty() { "Sheet" } else { plain };
    let cut = |n: usize| plain.chars().take(n).collect::<String>().trim_end().to_owned();
    let free = |name: &String| !taken.iter().any(|t| t.to_lowercase() == name.to_lowercase());
    let first = Some(cut(31)).filter(free);
    first.or_else(|| (2..1000).map(|n| format!("{} {n}", cut(27))).find(free)).unwrap_or_else(|| cut(31))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn sheet_names_are_what_the_format_takes() {
        assert_eq!(sheet_name("M/01: [x]?", &[]), "M 01   x");
        assert_eq!(sheet_name("", &[]), "Sheet");
        assert_eq!(sheet_name("drives", &["Drives".to_owned()]), "drives 2");
        assert_eq!(sheet_name(&"é".repeat(40), &[]).chars().count(), 31);
    }
}
