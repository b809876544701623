//! A code sheet from a spreadsheet: a line a function.

use super::entry::{CodeEntry, CodeSheet};
use super::headings;
use crate::schedule::{bare, folded};
use crate::sheets::{Address, CellValue, Sheet};
use commissioning::plant::FieldKind;
use commissioning::record::functions::{FUNCTIONS, Function};
use commissioning::typed::shorten;

/// A cell that was not understood.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct CodeProblem {
    /// Where.
    pub at: Address,
    /// A sentence that names the cell, the fault and the remedy.
    pub sentence: String,
}

/// Reads the code sheet of a type of drive; what was not understood stands beside it. Validate with
/// [`CodeSheet::faults`].
#[must_use]
pub fn read(sheet: &Sheet, drive_type: &str) -> (CodeSheet, Vec<CodeProblem>) {
    let mut found = CodeSheet { drive_type: drive_type.trim().to_owned(), entries: Vec::new() };
    let mut problems = Vec::new();
    let columns = headings::find(sheet);
    let Some((columns, function, code)) = columns.and_then(|c| Some((c, c.function?, c.code?))) else {
        let sentence = "No row has the headings “function” and “code”. Put them above the columns.".to_owned();
        return (found, vec![CodeProblem { at: Address::default(), sentence }]);
    };
    let first = columns.heading.map_or(0, |row| row.saturating_add(1));
    for row in first..sheet.height() {
        let cell = |column: Option<u32>| {
            let cell = column.map_or(&CellValue::Empty, |c| sheet.cell(Address::new(row, c)));
            bare(&cell.text())
        };
        let at = Address::new(row, function);
        let (words, own) = (cell(Some(function)), cell(Some(code)));
        // A function without a code is one that this drive does not have.
        if words.is_empty() && own.is_empty() || own.is_empty() || crate::rows::said_unknown(&own) {
            continue;
        }
        let Some(generic) = generic(&words) else {
            let sentence = format!("{at}: “{}” is no function of the parameter record.", shorten(&words));
            problems.push(CodeProblem { at, sentence });
            continue;
        };
        let mut entry =
            CodeEntry { function: generic.key.to_owned(), code: own, unit: cell(columns.unit), ..CodeEntry::default() };
        let quantity = matches!(generic.kind, FieldKind::Quantity { .. });
        let mut figure = |column: Option<u32>| {
            let text = cell(column);
            if !quantity {
                return text;
            }
            match column.map(|c| (Address::new(row, c), figure_of(&text))) {
                Some((at, None)) if !text.is_empty() => {
                    let sentence = format!(
                        "{at}: “{}” can be read two ways or is no number. Write it with a decimal point, as 0.1.",
                        shorten(&text)
                    );
                    problems.push(CodeProblem { at, sentence });
                    String::new()
                }
                Some((_, Some(plain))) => plain,
                _ => String::new(),
            }
        };
        entry.resolution = figure(columns.resolution);
        entry.default = figure(columns.default);
        entry.lowest = figure(columns.lowest);
        entry.highest = figure(columns.highest);
        match meanings(&cell(columns.meanings), generic) {
            Ok(meanings) => entry.meanings = meanings,
            Err(sentence) => {
                let at = Address::new(row, columns.meanings.unwrap_or(function));
                problems.push(CodeProblem { at, sentence: format!("{at}: {sentence}") });
            }
        }
        found.entries.push(entry);
    }
    let order = |key: &str| FUNCTIONS.iter().position(|f| f.key == key);
    found.entries.sort_by_key(|e| order(&e.function));
    (found, problems)
}

/// A function by its key or its words.
fn generic(words: &str) -> Option<&'static Function> {
    let plain = folded(words);
    FUNCTIONS.iter().find(|f| folded(f.key) == plain || folded(f.label) == plain)
}

/// A plain number with a decimal point, where the text can be read one way only.
fn figure_of(text: &str) -> Option<String> {
    use crate::rows::{FigureShown, figure_plain, figure_shown};
    match figure_shown(text) {
        FigureShown::Nothing => figure_plain(text, crate::schedule::DecimalSign::Point),
        FigureShown::Proves(sign) => figure_plain(text, sign),
        FigureShown::Either | FigureShown::NoNumber => None,
    }
}

/// `ramp = 0; coast = 1`: the generic meaning, by key or words, and the drive's word for it.
fn meanings(text: &str, function: &Function) -> Result<Vec<(String, String)>, String> {
    let mut found = Vec::new();
    for part in text.split(';').map(str::trim).filter(|p| !p.is_empty()) {
        let (meaning, word) = part
            .split_once('=')
            .ok_or_else(|| format!("“{}” has no equals sign. Write “meaning = the drive's word; …”.", shorten(part)))?;
        let (meaning, word) = (meaning.trim(), word.trim().to_owned());
        let key = match function.kind {
            FieldKind::Choice(options) => {
                let plain = folded(meaning);
                options.iter().find(|(k, l)| folded(k) == plain || folded(l) == plain).map(|(k, _)| (*k).to_owned())
            }
            FieldKind::Flag => Some(meaning.to_lowercase()).filter(|m| matches!(m.as_str(), "yes" | "no")),
            _ => None,
        };
        let key = key.ok_or_else(|| format!("“{}” is no meaning of {}.", shorten(meaning), function.label))?;
        found.push((key, word));
    }
    Ok(found)
}
