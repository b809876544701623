//! Comma or point: what one figure shows about its decimal sign, and what a whole column shows.

use crate::schedule::DecimalSign;

/// What one figure shows.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Shown {
    /// It has neither comma nor point.
    Nothing,
    /// It can only be read with this decimal sign.
    Proves(DecimalSign),
    /// It can be read two ways: `1.485`, `1,485`.
    Either,
    /// It is no number.
    NoNumber,
}

const fn sign_of(mark: char) -> DecimalSign {
    if mark == ',' { DecimalSign::Comma } else { DecimalSign::Point }
}

const fn other(mark: char) -> char {
    if mark == ',' { '.' } else { ',' }
}

/// What stands before groups of three beside comma and point.
fn is_blank(c: char) -> bool {
    c.is_whitespace() || c == '\'' || c == '’'
}

/// What this figure shows.
pub(crate) fn shown(figure: &str) -> Shown {
    let body = figure.trim().trim_start_matches(['-', '−', '+']);
    if !body.chars().any(|c| c.is_ascii_digit())
        || !body.chars().all(|c| c.is_ascii_digit() || is_blank(c) || c == '.' || c == ',')
    {
        return Shown::NoNumber;
    }
    let marks: Vec<char> = body.chars().filter(|c| matches!(c, '.' | ',')).collect();
    let found = match marks.as_slice() {
        [] => Shown::Nothing,
        [mark] => {
            let (whole, decimals) = body.split_once(*mark).unwrap_or((body, ""));
            // A comma groups only where three digits follow one to three others, none of them a leading nought.
            let groups = decimals.len() == 3 && (1..=3).contains(&whole.len()) && !whole.starts_with('0');
            if groups && !whole.contains(is_blank) { Shown::Either } else { Shown::Proves(sign_of(*mark)) }
        }
        [first, .., last] if first != last => Shown::Proves(sign_of(*last)),
        [mark, ..] => Shown::Proves(sign_of(other(*mark))),
    };
    let read = |sign| plain(figure, sign).is_some();
    match found {
        Shown::Nothing if !read(DecimalSign::Point) => Shown::NoNumber,
        Shown::Proves(sign) if !read(sign) => Shown::NoNumber,
        found => found,
    }
}

/// The figure with a decimal point and no groups, read with this decimal sign.
pub(crate) fn plain(figure: &str, sign: DecimalSign) -> Option<String> {
    let (decimal, group) = if sign == DecimalSign::Comma { (',', '.') } else { ('.', ',') };
    let trimmed = figure.trim();
    let (minus, body) = match trimmed.strip_prefix(['-', '−']) {
        Some(rest) => ("-", rest.trim_start()),
        None => ("", trimmed.strip_prefix('+').unwrap_or(trimmed)),
    };
    let (whole, decimals) = body.split_once(decimal).unwrap_or((body, ""));
    let groups: Vec<&str> = whole.split(|c: char| c == group || is_blank(c)).collect();
    let digits = |part: &str| part.bytes().all(|b| b.is_ascii_digit());
    let grouped = groups.len() == 1
        || groups.iter().skip(1).all(|g| g.len() == 3) && groups.first().is_some_and(|g| (1..=3).contains(&g.len()));
    if !grouped || !groups.iter().all(|g| digits(g)) || !digits(decimals) || (whole.is_empty() && decimals.is_empty()) {
        return None;
    }
    let whole = groups.concat();
    let whole = if whole.is_empty() { "0" } else { &whole };
    Some(if decimals.is_empty() { format!("{minus}{whole}") } else { format!("{minus}{whole}.{decimals}") })
}

/// The decimal sign that a column of figures shows, when none of them shows the other.
pub fn column_sign<'a>(figures: impl Iterator<Item = &'a str>) -> Option<DecimalSign> {
    let (mut point, mut comma) = (false, false);
    for figure in figures {
        match shown(figure) {
            Shown::Proves(DecimalSign::Point) => point = true,
            Shown::Proves(DecimalSign::Comma) => comma = true,
            _ => {}
        }
    }
    match (point, comma) {
        (true, false) => Some(DecimalSign::Point),
        (false, true) => Some(DecimalSign::Comma),
        _ => None,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use DecimalSign::{Comma, Point};

    #[test]
    fn one_figure_shows_what_it_can() {
        for (figure, expected) in [
            ("1485", Shown::Nothing),
            ("1 485", Shown::Nothing),
            ("1\u{2009}485", Shown::Nothing),
            ("1.485", Shown::Either),
            ("1,485", Shown::Either),
            ("12,5", Shown::Proves(Comma)),
            ("0,863", Shown::Proves(Comma)),
            ("0.863", Shown::Proves(Point)),
            ("1485.500", Shown::Proves(Point)),
            ("1.234,5", Shown::Proves(Comma)),
            ("1,234.5", Shown::Proves(Point)),
            ("1.234.567", Shown::Proves(Comma)),
            ("1 485,250", Shown::Proves(Comma)),
            ("-10.5", Shown::Proves(Point)),
            ("1.23.4", Shown::NoNumber),
            ("12 34", Shown::NoNumber),
            ("75 kW", Shown::NoNumber),
            ("", Shown::NoNumber),
            (".", Shown::NoNumber),
        ] {
            assert_eq!(shown(figure), expected, "{figure}");
        }
    }

    #[test]
    fn a_column_decides_only_when_it_speaks_with_one_voice() {
        assert_eq!(column_sign(["1.485", "12,5"].into_iter()), Some(Comma));
        assert_eq!(column_sign(["1.485", "2.970"].into_iter()), None);
        assert_eq!(column_sign(["1.485", "12,5", "12.5"].into_iter()), None);
        assert_eq!(plain("1.485", Comma).as_deref(), Some("1485"));
        assert_eq!(plain("1.485", Point).as_deref(), Some("1.485"));
        assert_eq!(plain("−1'234,50", Comma).as_deref(), Some("-1234.50"));
    }
}
