//! Taking a cell's text apart: one figure with its unit, several figures, a conductor's count, or none at all.

use crate::schedule::unit_of;
use engineering::Kind;

/// Longest text, in bytes, in which a figure is looked for.
const LONGEST: usize = 100;

/// One figure as it stands, and the unit beside it when there is one.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) struct Figure {
    pub digits: String,
    pub unit: Option<&'static str>,
}

/// What a text holds.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) enum Found {
    /// One figure.
    One(Figure),
    /// Several: `400/690 V`, `3 kW (4 hp)`, `380-415`.
    Several(Vec<Figure>),
    /// Conductors and their cross-section: `3x95+50`.
    Conductors(Figure),
    /// None that is understood; what is in the way.
    None(String),
}

/// What this text holds, for a quantity of this kind.
pub(super) fn find(text: &str, kind: Kind) -> Found {
    let text = text.trim();
    if text.len() > LONGEST {
        return Found::None(String::new());
    }
    if let Some(figure) = one(text, kind) {
        return Found::One(figure);
    }
    if kind == Kind::CrossSection
        && let Some(figure) = conductors(text)
    {
        return Found::Conductors(figure);
    }
    let several = several(text, kind);
    if several.len() > 1 { Found::Several(several) } else { Found::None(in_the_way(text)) }
}

/// A figure and after it nothing but a unit of this kind.
fn one(text: &str, kind: Kind) -> Option<Figure> {
    let ends = text
        .char_indices()
        .filter(|(_, c)| c.is_ascii_digit() || matches!(c, '.' | ','))
        .map(|(i, c)| i + c.len_utf8());
    for end in ends {
        let (digits, after) = (text.get(..end)?, text.get(end..)?);
        // Still within the digits; a unit that begins with one (1/min) stands after a blank.
        if after.starts_with(|c: char| c.is_ascii_digit() || matches!(c, '.' | ',')) {
            continue;
        }
        let after = after.trim();
        let figure = |unit| Figure { digits: digits.trim().to_owned(), unit };
        if super::decimal::shown(digits) == super::decimal::Shown::NoNumber {
            continue;
        }
        if after.is_empty() {
            return Some(figure(None));
        }
        if let Some(unit) = unit_of(kind, after) {
            return Some(figure(Some(unit)));
        }
        // A number of poles is often written with its word.
        let word = after.trim_start_matches('-').to_lowercase();
        if kind == Kind::Count && matches!(word.as_str(), "p" | "pole" | "poles" | "polig" | "pol" | "pôles") {
            return Some(figure(None));
        }
    }
    None
}

/// Runs of digits in a text, with their commas and points: what shows how a whole file writes its numbers.
pub(crate) fn figures_in(text: &str) -> Vec<String> {
    text.split(|c: char| !(c.is_ascii_digit() || matches!(c, '.' | ',')))
        .map(|run| run.trim_matches(['.', ',']).to_owned())
        .filter(|run| run.contains(['.', ',']))
        .collect()
}

fn several(text: &str, kind: Kind) -> Vec<Figure> {
    // Star and delta beside volts and amps: 400Δ/690Y V.
    let text = match kind {
        Kind::Voltage | Kind::Current => text.replace(['Δ', '∆', '△', 'Y', 'D'], " "),
        _ => text.to_owned(),
    };
    let parts =
        text.split(['/', '(', ')', ';', '–', '…', '|']).flat_map(ranges).map(str::trim).filter(|p| !p.is_empty());
    let mut figures = Vec::new();
    for part in parts {
        match one(part, kind) {
            Some(figure) => figures.push(figure),
            None => return Vec::new(),
        }
    }
    // A unit written once at the end counts for those before it: 400/690 V.
    let mut unit = None;
    for figure in figures.iter_mut().rev() {
        figure.unit = figure.unit.or(unit);
        unit = figure.unit;
    }
    figures
}

/// Cuts `380-415` at a hyphen between digits.
fn ranges(text: &str) -> Vec<&str> {
    match text.split_once('-') {
        Some((low, high))
            if low.ends_with(|c: char| c.is_ascii_digit() || c.is_whitespace()) && !low.trim().is_empty() =>
        {
            vec![low, high]
        }
        _ => vec![text],
    }
}

/// `3x95`, `4G16`, `3x95+50`, `2 x 70 mm²`: the cross-section of the first conductors named.
fn conductors(text: &str) -> Option<Figure> {
    let plain: String = text.chars().filter(|c| !c.is_whitespace()).collect();
    let end = plain.find(|c: char| !c.is_ascii_digit())?;
    let (count, rest) = plain.split_at(end);
    let rest = rest.strip_prefix(['x', 'X', '×', 'G', 'g', '*'])?;
    let end = rest.find(|c: char| !(c.is_ascii_digit() || matches!(c, '.' | ','))).unwrap_or(rest.len());
    let (digits, after) = rest.split_at(end);
    let known = after.is_empty() || after.starts_with(['+', '/']) || unit_of(Kind::CrossSection, after).is_some();
    let right = !count.is_empty() && super::decimal::shown(digits) != super::decimal::Shown::NoNumber && known;
    right.then(|| Figure { digits: digits.to_owned(), unit: Some("mm²") })
}

/// What stands beside the digits, for a message.
fn in_the_way(text: &str) -> String {
    let digits = |c: char| c.is_ascii_digit() || c.is_whitespace() || matches!(c, '.' | ',' | '-' | '−' | '+');
    let beside = text.trim_start_matches(digits).trim_end_matches(|c: char| c.is_ascii_digit()).trim().to_owned();
    if beside.starts_with(char::is_alphabetic) { beside } else { String::new() }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn figure(digits: &str, unit: Option<&'static str>) -> Figure {
        Figure { digits: digits.to_owned(), unit }
    }

    #[test]
    fn figures_are_found_with_their_units() {
        for (kind, text, expected) in [
            (Kind::Power, "75 kW", Found::One(figure("75", Some("kW")))),
            (Kind::Power, "100HP", Found::One(figure("100", Some("hp")))),
            (Kind::Speed, "1 485 rpm", Found::One(figure("1 485", Some("rpm")))),
            (Kind::Speed, "1485 1/min", Found::One(figure("1485", Some("rpm")))),
            (Kind::Speed, "1.485 min⁻¹", Found::One(figure("1.485", Some("rpm")))),
            (Kind::Number, "0,86", Found::One(figure("0,86", None))),
            (Kind::Count, "4-pole", Found::One(figure("4", None))),
            (Kind::Count, "4P", Found::One(figure("4", None))),
            (Kind::Voltage, "400/690 V", Found::Several(vec![figure("400", Some("V")), figure("690", Some("V"))])),
            (Kind::Voltage, "400V/690V", Found::Several(vec![figure("400", Some("V")), figure("690", Some("V"))])),
            (Kind::Voltage, "400Δ/690Y V", Found::Several(vec![figure("400", Some("V")), figure("690", Some("V"))])),
            (Kind::Voltage, "380-415", Found::Several(vec![figure("380", None), figure("415", None)])),
            (Kind::Power, "3 kW (4 HP)", Found::Several(vec![figure("3", Some("kW")), figure("4", Some("hp"))])),
            (Kind::Power, "1/2", Found::Several(vec![figure("1", None), figure("2", None)])),
            (Kind::CrossSection, "3x95+50", Found::Conductors(figure("95", Some("mm²")))),
            (Kind::CrossSection, "4G2,5 mm²", Found::Conductors(figure("2,5", Some("mm²")))),
            (Kind::Current, "134 V", Found::None("V".to_owned())),
            (Kind::Current, "ca. 134", Found::None("ca.".to_owned())),
        ] {
            assert_eq!(find(text, kind), expected, "{text}");
        }
    }
}
