//! parameters.csv: the parameter record for a spreadsheet; words can never become a formula, numbers stay numbers.

use commissioning::record::canonical::RecordFile;
use commissioning::record::functions::{FUNCTIONS, find};
use commissioning::record::{ParameterColumn, ParameterPlace};

/// Names of the columns.
const HEADINGS: [&str; 13] = [
    "function",
    "label",
    "code",
    "as left",
    "as left unit",
    "as left SI",
    "intended",
    "intended unit",
    "intended SI",
    "as found",
    "as found unit",
    "as found SI",
    "explanation",
];

/// The file's text. A cell of words that begins like a formula gets an apostrophe before it; a quantity's number is
/// written as a plain decimal as it was understood, its words stand as typed.
pub(crate) fn write(file: &RecordFile) -> Result<Vec<u8>, String> {
    let mut out = csv::WriterBuilder::new().terminator(csv::Terminator::CRLF).from_writer(Vec::new());
    out.write_record(HEADINGS).map_err(|e| e.to_string())?;
    let Some(record) = &file.record else { return out.into_inner().map_err(|e| e.to_string()) };
    let free = record.free_rows.iter().map(|r| (r.key.as_str(), r.label.as_str()));
    for (key, label) in FUNCTIONS.iter().map(|f| (f.key, f.label)).chain(free) {
        let typed = |column: ParameterColumn| {
            let place = ParameterPlace { function: key.to_owned(), column };
            record.parameters.iter().find(|p| p.place == place)?.slot.current()?.value.as_ref()
        };
        if ParameterColumn::ALL.iter().all(|c| typed(*c).is_none()) {
            continue;
        }
        let word = |column| typed(column).map_or_else(String::new, |t| guarded(&t.text));
        let mut cells =
            vec![key.to_owned(), guarded(find(key).map_or(label, |f| f.label)), word(ParameterColumn::Code)];
        for column in [ParameterColumn::AsLeft, ParameterColumn::Intended, ParameterColumn::AsFound] {
            let value = typed(column);
            let unit = value.and_then(|t| t.unit.clone()).unwrap_or_default();
            let si = value.and_then(|t| t.si.clone()).unwrap_or_default();
            let shown =
                value.map_or_else(String::new, |t| if t.si.is_some() { plain(&t.text) } else { guarded(&t.text) });
            cells.extend([shown, guarded(&unit), si]);
        }
        cells.push(word(ParameterColumn::Explanation));
        out.write_record(&cells).map_err(|e| e.to_string())?;
    }
    out.into_inner().map_err(|e| e.to_string())
}

/// Words as a spreadsheet must take them: as words.
fn guarded(text: &str) -> String {
    let text: String = text.chars().map(|c| if c.is_control() { ' ' } else { c }).collect();
    if text.trim_start().starts_with(['=', '+', '-', '@']) || text.starts_with(char::is_whitespace) {
        format!("'{text}")
    } else {
        text
    }
}

/// A number as typed stays one when it is a plain decimal; anything else is words.
fn plain(text: &str) -> String {
    let digits = text.trim().trim_start_matches(['-', '+']);
    let number = !digits.is_empty()
        && digits.chars().all(|c| c.is_ascii_digit() || c == '.')
        && text.trim().parse::<f64>().is_ok();
    if number { text.trim().to_owned() } else { guarded(text) }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn words_cannot_become_formulas_and_numbers_stay_numbers() {
        for bad in ["=1+1", "+cmd", "-x", "@sum", "\t=1", " =1", "\r=1"] {
            assert!(guarded(bad).starts_with('\''), "{bad:?}");
        }
        assert_eq!(plain("-10.5"), "-10.5");
        assert_eq!(plain("=1"), "'=1");
        assert_eq!(plain("-1+1"), "'-1+1");
        assert_eq!(plain("10,5"), "10,5");
        assert_eq!(guarded("row 12"), "row 12");
    }
}
