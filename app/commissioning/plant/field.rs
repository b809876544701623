//! What a field is: its label, its kind, its believable range.

use crate::Typed;
use engineering::Kind;

/// A field of a sheet.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Field {
    /// Stored and used in forms: `rated-current`.
    pub key: &'static str,
    /// On screen and in the package: "rated current".
    pub label: &'static str,
    /// One sentence under the field; may be empty.
    pub hint: &'static str,
    /// Heading under which forms group it; fields of one group stand together.
    pub group: &'static str,
    /// What may be entered.
    pub kind: FieldKind,
    /// The sheet is not complete without it.
    pub required: bool,
}

/// What may be entered in a field.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum FieldKind {
    /// A quantity; `low` and `high` bound what can be true at all, in the coherent unit, ends included.
    Quantity {
        /// Which quantity.
        kind: Kind,
        /// Unit shown first.
        unit: &'static str,
        /// Lowest possible value.
        low: f64,
        /// Highest possible value.
        high: f64,
    },
    /// One of several: (key, label).
    Choice(&'static [(&'static str, &'static str)]),
    /// Yes or no. As a fitted-options flag its key is the flag.
    Flag,
    /// Words, at most this many characters.
    Text(usize),
    /// A table of pairs, a line each (`speed % ; torque %`), for load curves.
    Table,
}

impl Field {
    /// Understands what was typed; `None` when the field was left empty. The error is a sentence with fault and remedy.
    ///
    /// # Errors
    /// When it is no value of this field.
    pub fn understand(&self, text: &str, unit: &str) -> Result<Option<Typed>, String> {
        if text.trim().is_empty() {
            return Ok(None);
        }
        match self.kind {
            FieldKind::Quantity { kind, low, high, unit: usual } => {
                let typed = Typed::quantity(text, if unit.is_empty() { usual } else { unit }, kind)?;
                let number = typed.number().unwrap_or(f64::NAN);
                if self.key == "poles" && (low..=high).contains(&number) && number % 2.0 != 0.0 {
                    return Err(format!(
                        "{} cannot be: poles come in pairs, so that their number is even. Read the plate again.",
                        crate::typed::shorten(text)
                    ));
                }
                if (low..=high).contains(&number) {
                    return Ok(Some(typed));
                }
                let picked = kind.unit(typed.unit.as_deref().unwrap_or(usual)).unwrap_or(kind.usual());
                let with_unit = |number: &str| format!("{number} {}", picked.symbol).trim_end().to_owned();
                let end = |n: f64| plain(&engineering::rounding::significant(picked.from_coherent(n), 4));
                Err(format!(
                    "{} cannot be: {} is between {} and {}. Check the figure and its unit.",
                    with_unit(&crate::typed::shorten(text)),
                    self.label,
                    end(low),
                    with_unit(&end(high)),
                ))
            }
            FieldKind::Choice(options) => match options.iter().find(|(key, _)| *key == text) {
                Some(_) => Ok(Some(Typed::words(text))),
                None => {
                    let labels: Vec<&str> = options.iter().map(|(_, label)| *label).collect();
                    Err(format!(
                        "“{}” is none of the choices. Choose one of: {}.",
                        crate::typed::shorten(text),
                        labels.join(", ")
                    ))
                }
            },
            FieldKind::Flag => match text {
                "yes" | "no" => Ok(Some(Typed::words(text))),
                _ => Err("Choose yes or no.".to_owned()),
            },
            FieldKind::Text(longest) => words(text, longest).map(|t| Some(Typed::words(t))),
            FieldKind::Table => table(text).map(|_| Some(Typed::words(text))),
        }
    }
}

/// Without zeros that end a decimal fraction: an end of a range claims no digits.
fn plain(number: &str) -> String {
    if !number.contains('.') || number.contains('e') {
        return number.to_owned();
    }
    number.trim_end_matches('0').trim_end_matches('.').to_owned()
}

/// Accepts words up to a length, without control characters.
///
/// # Errors
/// A sentence with fault and remedy.
pub fn words(text: &str, longest: usize) -> Result<String, String> {
    let count = text.chars().count();
    if count > longest {
        return Err(format!("This has {count} characters; at most {longest} fit. Shorten it."));
    }
    if text.chars().any(|c| c.is_control() && c != '\n' && c != '\r' && c != '\t') {
        return Err("This holds characters that cannot be shown. Type it again without them.".to_owned());
    }
    Ok(text.to_owned())
}

/// Reads a table of pairs in percent: a line each, two numbers parted by a semicolon.
///
/// # Errors
/// A sentence with the line at fault and what would be right.
pub fn table(text: &str) -> Result<Vec<(f64, f64)>, String> {
    let lines: Vec<&str> = text.lines().filter(|l| !l.trim().is_empty()).collect();
    if !(2..=50).contains(&lines.len()) {
        return Err("Enter between 2 and 50 lines, each as “speed in % ; torque in %”.".to_owned());
    }
    let mut pairs = Vec::new();
    for (n, line) in lines.iter().enumerate() {
        let (left, right) = line
            .split_once(';')
            .ok_or_else(|| format!("Line {} has no semicolon. Write “speed in % ; torque in %”.", n + 1))?;
        let read =
            |t: &str| crate::typed::numeral::understand(t, Kind::Percent).map_err(|e| format!("Line {}: {e}", n + 1));
        let (speed, torque) = (read(left)?, read(right)?);
        if !(0.0..=300.0).contains(&speed) || !(-500.0..=500.0).contains(&torque) {
            return Err(format!("Line {}: speed is between 0 and 300 %, torque between −500 and 500 %.", n + 1));
        }
        if pairs.last().is_some_and(|(before, _)| *before >= speed) {
            return Err(format!("Line {}: speeds must rise from line to line.", n + 1));
        }
        pairs.push((speed, torque));
    }
    Ok(pairs)
}
