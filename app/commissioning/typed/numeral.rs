//! Numbers as people type them: comma or point, grouped thousands, `1.2G`, `500k`; what is ambiguous is asked, never guessed.

use engineering::Kind;

/// The unit in which a typed prefix counts.
pub const OHM: &str = "Ω";
/// What may be typed after a resistance: as typed, the prefix it means, and its factor.
const PREFIXES: [(char, &str, f64); 8] = [
    ('k', "k", 1e3),
    ('K', "k", 1e3),
    ('M', "M", 1e6),
    ('G', "G", 1e9),
    ('T', "T", 1e12),
    ('m', "m", 1e-3),
    ('µ', "µ", 1e-6),
    ('u', "µ", 1e-6),
];

/// Longest text that can be a number.
const LONGEST: usize = 40;

/// Understands a number as typed; the error is a sentence with fault and remedy.
///
/// A single comma or point is the decimal sign, except where exactly three digits follow one to three others with a
/// comma (`1,234`): that is ambiguous and refused. Blanks and apostrophes group digits. A trailing `k`, `M`, `G`, `T`,
/// `m`, `µ` or `u` multiplies, for resistances only: such a number counts in ohms, whatever unit stands beside it.
///
/// # Errors
/// When the text is empty, no number, or ambiguous.
pub fn understand(text: &str, kind: Kind) -> Result<f64, String> {
    let trimmed = text.trim();
    if trimmed.is_empty() {
        return Err("Nothing was entered. Type the number.".to_owned());
    }
    if trimmed.chars().count() > LONGEST {
        return Err(format!("This is too long for a number (more than {LONGEST} characters). Type only the number."));
    }
    let (digits, multiplier) = split_multiplier(trimmed, kind);
    let plain = plain_decimal(digits)?;
    let number: f64 = plain.parse().map_err(|_| {
        format!("“{}” is not a number. Type digits with one decimal comma or point.", super::shorten(trimmed))
    })?;
    let result = number * multiplier;
    if result.is_finite() { Ok(result) } else { Err("This number is too large.".to_owned()) }
}

/// The prefix that a text carries at its end (`k` in `500k`); only resistances are typed so.
#[must_use]
pub fn prefix(text: &str, kind: Kind) -> Option<&'static str> {
    if kind != Kind::Resistance {
        return None;
    }
    Some(parted(text.trim()).1).filter(|prefix| !prefix.is_empty())
}

/// A resistance's text without its prefix, and the prefix; an empty one where there is none.
pub(super) fn parted(text: &str) -> (&str, &'static str) {
    let found = PREFIXES.iter().find_map(|(typed, prefix, _)| Some((text.strip_suffix(*typed)?.trim_end(), *prefix)));
    found.unwrap_or((text, ""))
}

fn split_multiplier(text: &str, kind: Kind) -> (&str, f64) {
    if prefix(text, kind).is_none() {
        return (text, 1.0);
    }
    let (rest, prefix) = parted(text);
    (rest, PREFIXES.iter().find(|(_, known, _)| *known == prefix).map_or(1.0, |(.., factor)| *factor))
}

/// Rewrites what was typed with a decimal point and no grouping, or says why it cannot.
fn plain_decimal(text: &str) -> Result<String, String> {
    let not_a_number =
        || format!("“{}” is not a number. Type digits with one decimal comma or point.", super::shorten(text));
    let (sign, body) = match text.strip_prefix(['-', '−']) {
        Some(rest) => ("-", rest),
        None => ("", text.strip_prefix('+').unwrap_or(text)),
    };
    let body: String = ungroup(body).ok_or_else(not_a_number)?;
    let commas = body.matches(',').count();
    let points = body.matches('.').count();
    let plain = match (commas, points) {
        (0, 0 | 1) => body.clone(),
        (1, 0) => {
            let (whole, decimals) = body.split_once(',').unwrap_or((&body, ""));
            if decimals.len() == 3 && (1..=3).contains(&whole.len()) && !whole.starts_with('0') {
                return Err(format!(
                    "“{}” can be read two ways. Type {whole}.{decimals} for the decimal or {whole}{decimals} for the whole number.",
                    super::shorten(text)
                ));
            }
            format!("{whole}.{decimals}")
        }
        (1, 1) => {
            // The later sign is the decimal one; the earlier must group thousands.
            let (group, decimal) = if body.find(',') < body.find('.') { (',', '.') } else { ('.', ',') };
            let (whole, decimals) = body.split_once(decimal).ok_or_else(not_a_number)?;
            let whole = ungroup_by(whole, group).ok_or_else(not_a_number)?;
            format!("{whole}.{decimals}")
        }
        (_, 0) => ungroup_by(&body, ',').ok_or_else(not_a_number)?,
        (0, _) => ungroup_by(&body, '.').ok_or_else(not_a_number)?,
        _ => return Err(not_a_number()),
    };
    let has_digit = plain.bytes().any(|b| b.is_ascii_digit());
    if has_digit && plain.bytes().all(|b| b.is_ascii_digit() || b == b'.') {
        Ok(format!("{sign}{plain}"))
    } else {
        Err(not_a_number())
    }
}

/// Takes out blanks and apostrophes that stand before groups of three.
fn ungroup(body: &str) -> Option<String> {
    let is_blank = |c: char| c.is_whitespace() || c == '\'' || c == '’';
    if !body.contains(is_blank) {
        return Some(body.to_owned());
    }
    let whole_end = body.find(['.', ',']).unwrap_or(body.len());
    let (whole, rest) = body.split_at(whole_end);
    let groups: Vec<&str> = whole.split(is_blank).collect();
    let grouped = groups.iter().skip(1).all(|g| g.len() == 3) && (1..=3).contains(&groups.first()?.len());
    (grouped && !rest.contains(is_blank)).then(|| format!("{}{rest}", groups.concat()))
}

fn ungroup_by(whole: &str, sign: char) -> Option<String> {
    let groups: Vec<&str> = whole.split(sign).collect();
    let grouped = groups.iter().skip(1).all(|g| g.len() == 3) && (1..=3).contains(&groups.first()?.len());
    grouped.then(|| groups.concat())
}

/// A decimal of at most twelve significant digits, without exponent where that is readable; the same everywhere.
#[must_use]
pub fn twelve_digits(value: f64) -> String {
    let rounded = engineering::rounding::to_significant(value, 12);
    format!("{rounded}")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn comma_and_point_both_decide() {
        for (text, number) in [
            ("21,0", 21.0),
            ("21.0", 21.0),
            ("1 485", 1485.0),
            ("0,86", 0.86),
            ("-10.5", -10.5),
            ("1.234,5", 1234.5),
            ("1,234.5", 1234.5),
            ("1'500'000", 1_500_000.0),
            ("0,125", 0.125),
            ("1.485", 1.485),
            (".5", 0.5),
        ] {
            assert_eq!(understand(text, Kind::Number), Ok(number), "{text}");
        }
    }

    #[test]
    fn what_can_be_read_two_ways_is_asked() {
        let message = understand("1,485", Kind::Speed).expect_err("ambiguous");
        assert!(message.contains("1.485") && message.contains("1485"), "{message}");
    }

    #[test]
    fn multipliers_belong_to_resistances() {
        assert_eq!(understand("1.2G", Kind::Resistance), Ok(1.2e9));
        assert_eq!(understand("500k", Kind::Resistance), Ok(5e5));
        assert!(understand("500k", Kind::Voltage).is_err());
    }

    #[test]
    fn nonsense_is_refused_with_a_remedy() {
        for text in ["", "abc", "1..2", "--1", "1e999", "<b>", "NaN", "inf", "1,2,3", ",", "1 2", &"9".repeat(10_000)] {
            assert!(understand(text, Kind::Number).is_err(), "{text}");
        }
    }
}
