//! Headings of code sheets and read-outs, in English, German and French; and where they stand.

use crate::schedule::folded;
use crate::sheets::{Address, CellValue, Sheet};
use serde::{Deserialize, Serialize};

/// Which column holds what; columns count from 0.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Columns {
    /// Row of the headings, from 0; `None` when the first row holds values already.
    pub heading: Option<u32>,
    /// Generic function.
    pub function: Option<u32>,
    /// The drive's own code.
    pub code: Option<u32>,
    /// What the drive calls it.
    pub name: Option<u32>,
    /// The value.
    pub value: Option<u32>,
    /// Its unit.
    pub unit: Option<u32>,
    /// Smallest step.
    pub resolution: Option<u32>,
    /// What a new drive has.
    pub default: Option<u32>,
    /// Lowest.
    pub lowest: Option<u32>,
    /// Highest.
    pub highest: Option<u32>,
    /// The drive's words for choices.
    pub meanings: Option<u32>,
}

#[rustfmt::skip]
const WORDS: &[(&str, &[&str])] = &[
    ("function", &["function", "generic function", "funktion", "fonction"]),
    ("code", &["code", "drive s own code", "parameter", "parameter no", "parameter number", "par", "par no", "param", "no", "nr", "number", "id", "index", "parameternummer", "parameter nr", "parametre", "numero", "address", "adresse"]),
    ("name", &["name", "label", "description", "bezeichnung", "beschreibung", "designation", "libelle", "parameter name", "parametername"]),
    ("value", &["value", "setting", "actual", "actual value", "set value", "current value", "as left", "wert", "einstellung", "istwert", "eingestellt", "valeur", "reglage"]),
    ("unit", &["unit", "units", "einheit", "unite"]),
    ("resolution", &["resolution", "step", "increment", "aufloesung", "schrittweite", "pas"]),
    ("default", &["default", "default value", "factory", "factory setting", "werkseinstellung", "standardwert", "valeur par defaut", "reglage usine"]),
    ("lowest", &["lowest", "min", "minimum", "low", "von", "kleinster"]),
    ("highest", &["highest", "max", "maximum", "high", "bis", "groesster"]),
    ("meanings", &["meanings", "values", "choices", "options", "enumeration", "bedeutung", "auswahl", "choix"]),
];

/// How many rows are looked at.
const LOOKED_AT: u32 = 30;

/// Finds the headings; `None` when no row has at least two of them, the code or the function among them.
pub(crate) fn find(sheet: &Sheet) -> Option<Columns> {
    let mut best: Option<(usize, Columns)> = None;
    for row in 0..sheet.height().min(LOOKED_AT) {
        let columns = row_of(sheet, row);
        let count = [columns.function, columns.code, columns.name, columns.value, columns.unit, columns.default]
            .iter()
            .flatten()
            .count();
        let named = columns.code.is_some() || columns.function.is_some();
        if named && count >= 2 && best.as_ref().is_none_or(|(known, _)| count > *known) {
            best = Some((count, columns));
        }
    }
    best.map(|(_, columns)| columns)
}

fn row_of(sheet: &Sheet, row: u32) -> Columns {
    let mut found = Columns { heading: Some(row), ..Columns::default() };
    for column in 0..sheet.width() {
        let CellValue::Text(text) = sheet.cell(Address::new(row, column)) else { continue };
        let plain = folded(text);
        let Some((what, _)) = WORDS.iter().find(|(_, words)| words.contains(&plain.as_str())) else { continue };
        let place = match *what {
            "function" => &mut found.function,
            "code" => &mut found.code,
            "name" => &mut found.name,
            "value" => &mut found.value,
            "unit" => &mut found.unit,
            "resolution" => &mut found.resolution,
            "default" => &mut found.default,
            "lowest" => &mut found.lowest,
            "highest" => &mut found.highest,
            _ => &mut found.meanings,
        };
        place.get_or_insert(column);
    }
    found
}
