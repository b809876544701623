//! A read-out joined with a code sheet: each line a generic function's value, a question, a problem, or a free row.

use super::ReadLine;
use crate::code_sheet::{CodeEntry, CodeSheet, as_field, same_code, unit_for};
use crate::rows::{CellOutcome, Reading, column_sign, figures_in, understand};
use crate::schedule::DecimalSign;
use crate::sheets::{Address, CellValue};
use commissioning::Typed;
use commissioning::plant::FieldKind;
use commissioning::record::functions::Function;
use commissioning::typed::shorten;
use std::collections::BTreeMap;

/// What became of a line.
#[derive(Clone, Debug, PartialEq)]
pub enum Joined {
    /// A generic function's value.
    Function {
        /// The line.
        line: ReadLine,
        /// The function.
        function: &'static Function,
        /// As a form would send it.
        text: String,
        /// Its unit; empty where there is none.
        unit: String,
        /// As the function understands it.
        typed: Typed,
        /// When the code sheet says that the drive cannot be set so: the sentence.
        notice: Option<String>,
    },
    /// A value that can be read more than one way.
    Question {
        /// The line.
        line: ReadLine,
        /// The function.
        function: &'static Function,
        /// Why it is asked.
        sentence: String,
        /// The readings to choose from.
        readings: Vec<Reading>,
    },
    /// A value that the function cannot have, or a unit that cannot be brought to its own.
    Problem {
        /// The line.
        line: ReadLine,
        /// The function.
        function: &'static Function,
        /// Names the cell, the fault and the remedy.
        sentence: String,
    },
    /// No function of the code sheet has this code: a free row.
    Free {
        /// The line.
        line: ReadLine,
    },
}

/// Joins the lines of a read-out with a code sheet; `answers` are the readings chosen for questions.
#[must_use]
pub fn join(lines: &[ReadLine], sheet: &CodeSheet, answers: &BTreeMap<Address, Option<usize>>) -> Vec<Joined> {
    // A drive writes all its numbers the same way, so that the whole read-out shows one decimal sign.
    let figures: Vec<String> = lines
        .iter()
        .flat_map(|l| if let CellValue::Text(text) = &l.value { figures_in(text) } else { Vec::new() })
        .collect();
    let sign = column_sign(figures.iter().map(String::as_str));
    let mut values: BTreeMap<String, Vec<&ReadLine>> = BTreeMap::new();
    for line in lines {
        values.entry(same_code(&line.code)).or_default().push(line);
    }
    lines
        .iter()
        .filter_map(|line| {
            let Some((entry, function)) = sheet.by_code(&line.code).and_then(|e| Some((e, e.generic()?))) else {
                return Some(Joined::Free { line: line.clone() });
            };
            let same: Vec<&ReadLine> = values.get(&same_code(&line.code)).cloned().unwrap_or_default();
            if let Some(other) =
                same.iter().find(|l| l.at != line.at && (&l.value, &l.unit) != (&line.value, &line.unit))
            {
                let sentence = format!(
                    "{}: code “{}” stands again in {} with another value. Leave one of them out, in the file.",
                    line.at,
                    shorten(&line.code),
                    other.at
                );
                return Some(Joined::Problem { line: line.clone(), function, sentence });
            }
            // The same value twice is taken once.
            let first = same.first().is_none_or(|l| l.at == line.at);
            first.then(|| one(line, entry, function, sign, answers)).flatten()
        })
        .collect()
}

fn one(
    line: &ReadLine,
    entry: &CodeEntry,
    function: &'static Function,
    sign: Option<DecimalSign>,
    answers: &BTreeMap<Address, Option<usize>>,
) -> Option<Joined> {
    let line = line.clone();
    let problem = |line: ReadLine, sentence: &str| {
        let sentence = format!("{} ({}): {sentence}", line.at, shorten(&line.code));
        Some(Joined::Problem { line, function, sentence })
    };
    let shown = if line.unit.is_empty() { &entry.unit } else { &line.unit };
    let Some(unit) = unit_for(function, shown) else {
        let sentence = format!(
            "the drive counts {} in “{}”, which is no unit of it. Work it out and enter it by hand.",
            function.label,
            shorten(shown)
        );
        return problem(line, &sentence);
    };
    let field = as_field(function);
    let cell = match (function.kind, entry.meaning_of(&line.value.text())) {
        (FieldKind::Choice(_) | FieldKind::Flag, Some(meaning)) => CellValue::Text(meaning.to_owned()),
        _ => line.value.clone(),
    };
    let value = |line: ReadLine, text: String, unit: String, typed: Typed| {
        let notice = beyond(entry, function, &typed);
        Some(Joined::Function { line, function, text, unit, typed, notice })
    };
    match understand(&cell, None, &field, unit, sign) {
        CellOutcome::Nothing => None,
        CellOutcome::Value(text, unit, typed) => value(line, text, unit, typed),
        CellOutcome::Problem(sentence) => problem(line, &sentence),
        CellOutcome::Question(sentence, readings) => match answers.get(&line.at) {
            Some(None) => None,
            Some(Some(chosen)) if readings.get(*chosen).is_some() => {
                let reading = readings.get(*chosen)?;
                match field.understand(&reading.text, &reading.unit) {
                    Ok(typed) => value(line, reading.text.clone(), reading.unit.clone(), typed?),
                    Err(sentence) => problem(line, &sentence),
                }
            }
            _ => {
                let sentence = format!("{} ({}): {sentence}", line.at, shorten(&line.code));
                Some(Joined::Question { line, function, sentence, readings })
            }
        },
    }
}

/// Says when a value lies beyond what the code sheet says the drive can be set to.
fn beyond(entry: &CodeEntry, function: &Function, typed: &Typed) -> Option<String> {
    let FieldKind::Quantity { kind, .. } = function.kind else { return None };
    let unit = kind.unit(unit_for(function, &entry.unit)?)?;
    let number = unit.from_coherent(typed.number()?);
    let limit = |text: &str| text.trim().parse::<f64>().ok();
    // Converting to and fro costs the last digits.
    let slack = number.abs() * 1e-9;
    let low = limit(&entry.lowest).filter(|l| number < *l - slack);
    let high = limit(&entry.highest).filter(|h| number > *h + slack);
    (low.is_some() || high.is_some()).then(|| {
        format!(
            "{} is beyond what the code sheet allows ({} to {} {}). Check the value, the unit and the sheet.",
            typed.shown(),
            entry.lowest,
            entry.highest,
            unit.symbol
        )
    })
}
