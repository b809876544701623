//! Units as people write them in headers and cells, brought to the symbols that the fields know.

use engineering::Kind;

/// Other spellings, in small letters without blanks and points, and the symbol they mean.
const SPELLINGS: &[(&str, &str)] = &[
    ("volt", "V"),
    ("volts", "V"),
    ("vac", "V"),
    ("v~", "V"),
    ("v", "V"),
    ("kv", "kV"),
    ("vdc", "V"),
    ("amp", "A"),
    ("amps", "A"),
    ("ampere", "A"),
    ("amperes", "A"),
    ("aac", "A"),
    ("a", "A"),
    ("ka", "kA"),
    ("ma", "mA"),
    ("kw", "kW"),
    ("kilowatt", "kW"),
    ("kilowatts", "kW"),
    ("watt", "W"),
    ("watts", "W"),
    ("w", "W"),
    ("hp", "hp"),
    ("bhp", "hp"),
    ("horsepower", "hp"),
    ("ps", "PS"),
    ("cv", "PS"),
    ("ch", "PS"),
    ("kva", "kVA"),
    ("mva", "MVA"),
    ("hz", "Hz"),
    ("hertz", "Hz"),
    ("khz", "kHz"),
    ("rpm", "rpm"),
    ("r/min", "rpm"),
    ("rev/min", "rpm"),
    ("1/min", "rpm"),
    ("min-1", "rpm"),
    ("min^-1", "rpm"),
    ("min⁻¹", "rpm"),
    ("min−1", "rpm"),
    ("u/min", "rpm"),
    ("upm", "rpm"),
    ("tr/min", "rpm"),
    ("t/min", "rpm"),
    ("/min", "rpm"),
    ("s-1", "1/s"),
    ("s⁻¹", "1/s"),
    ("rps", "1/s"),
    ("percent", "%"),
    ("prozent", "%"),
    ("pct", "%"),
    ("pu", "of 1"),
    ("ohm", "Ω"),
    ("ohms", "Ω"),
    ("mohm", "mΩ"),
    ("kohm", "kΩ"),
    ("\u{3c9}", "Ω"),
    ("k\u{3c9}", "kΩ"),
    ("c", "°C"),
    ("degc", "°C"),
    ("°c", "°C"),
    ("degf", "°F"),
    ("°f", "°F"),
    ("k", "K"),
    ("s", "s"),
    ("sec", "s"),
    ("secs", "s"),
    ("second", "s"),
    ("seconds", "s"),
    ("sek", "s"),
    ("ms", "ms"),
    ("min", "min"),
    ("mins", "min"),
    ("minutes", "min"),
    ("h", "h"),
    ("hr", "h"),
    ("hrs", "h"),
    ("std", "h"),
    ("m", "m"),
    ("mtr", "m"),
    ("mtrs", "m"),
    ("metre", "m"),
    ("metres", "m"),
    ("meter", "m"),
    ("meters", "m"),
    ("lfm", "m"),
    ("ft", "ft"),
    ("feet", "ft"),
    ("foot", "ft"),
    ("km", "km"),
    ("mm", "mm"),
    ("mm2", "mm²"),
    ("mm^2", "mm²"),
    ("mm²", "mm²"),
    ("sqmm", "mm²"),
    ("qmm", "mm²"),
    ("mcm", "kcmil"),
    ("kcmil", "kcmil"),
    ("kgm2", "kg·m²"),
    ("kgm²", "kg·m²"),
    ("kg*m2", "kg·m²"),
    ("kg·m2", "kg·m²"),
    ("kgm^2", "kg·m²"),
    ("lbft2", "lb·ft²"),
    ("nm", "N·m"),
    ("n·m", "N·m"),
    ("lbft", "lbf·ft"),
    ("ftlb", "lbf·ft"),
    ("kg", "kg"),
    ("kgs", "kg"),
    ("lb", "lb"),
    ("lbs", "lb"),
    ("mm/s", "mm/s"),
    ("m/s", "m/s"),
    ("uf", "µF"),
    ("µf", "µF"),
    ("\u{3bc}f", "µF"),
    ("us", "µs"),
    ("\u{3bc}s", "µs"),
];

/// The symbol that this spelling means among the units of a kind.
#[must_use]
pub fn unit_of(kind: Kind, text: &str) -> Option<&'static str> {
    let text = text.trim();
    if text.is_empty() {
        return None;
    }
    // The symbol itself goes first: large and small letters tell MW from mW and kA from KA.
    if let Some(exact) = kind.unit(text) {
        return Some(exact.symbol);
    }
    let plain: String = text.chars().filter(|c| !c.is_whitespace() && *c != '.').flat_map(char::to_lowercase).collect();
    SPELLINGS
        .iter()
        .filter(|(spelling, _)| *spelling == plain)
        .find_map(|(_, symbol)| kind.unit(symbol))
        .map(|u| u.symbol)
}

/// Whether this is a unit of anything.
pub(super) fn is_unit(text: &str) -> bool {
    Kind::ALL.iter().any(|kind| unit_of(*kind, text).is_some())
}

/// The unit that a header states: in brackets, after “in”, or as its last word. The rest of the header goes first.
pub(super) fn parted(header: &str) -> (String, Option<String>) {
    let header = super::bare(header);
    for (open, close) in [('[', ']'), ('(', ')'), ('{', '}')] {
        for (start, _) in header.match_indices(open) {
            let Some(length) = header.get(start..).and_then(|h| h.find(close)) else { continue };
            let inside = header.get(start + 1..start + length).unwrap_or_default();
            let inside = inside.trim().trim_start_matches("in ");
            if is_unit(inside) {
                let before = header.get(..start).unwrap_or_default();
                let after = header.get(start + length + 1..).unwrap_or_default();
                return (super::bare(&format!("{before} {after}")), Some(inside.to_owned()));
            }
        }
    }
    if is_unit(&header) {
        return (String::new(), Some(header));
    }
    if let Some((before, last)) = header.rsplit_once([' ', ',', '/']) {
        // A slash inside a unit (1/min) was not meant by the cut above.
        let words: Vec<&str> = header.split(' ').collect();
        let whole = words.last().copied().unwrap_or(last);
        let unit = if is_unit(whole) { whole } else { last };
        if is_unit(unit) {
            let rest = if unit == whole { header.strip_suffix(whole).unwrap_or(before) } else { before };
            let rest = rest.trim_end_matches([' ', ',', '/', '-', ':', '=']).trim_end_matches(" in");
            return (rest.to_owned(), Some(unit.to_owned()));
        }
    }
    (header, None)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn spellings_mean_the_symbols_of_their_kind() {
        for (kind, text, symbol) in [
            (Kind::Power, "KW", Some("kW")),
            (Kind::Power, "HP", Some("hp")),
            (Kind::Power, "PS", Some("PS")),
            (Kind::Power, "MW", Some("MW")),
            (Kind::Speed, "min⁻¹", Some("rpm")),
            (Kind::Speed, "U/min", Some("rpm")),
            (Kind::Speed, "tr/min", Some("rpm")),
            (Kind::CrossSection, "mm2", Some("mm²")),
            (Kind::CrossSection, "sq.mm", Some("mm²")),
            (Kind::Current, "Amps", Some("A")),
            (Kind::Current, "V", None),
            (Kind::Length, "m", Some("m")),
            (Kind::Number, "", None),
        ] {
            assert_eq!(unit_of(kind, text), symbol, "{text}");
        }
        for (spelling, symbol) in SPELLINGS {
            assert!(Kind::ALL.iter().any(|k| k.unit(symbol).is_some()), "{spelling} means no unit: {symbol}");
            assert!(is_unit(spelling), "{spelling}");
        }
    }

    #[test]
    fn a_header_states_its_unit_in_several_ways() {
        for (header, rest, unit) in [
            ("Power [kW]", "Power", Some("kW")),
            ("Speed (1/min)", "Speed", Some("1/min")),
            ("Leistung in kW", "Leistung", Some("kW")),
            ("Rated current, A", "Rated current", Some("A")),
            ("P / kW", "P", Some("kW")),
            ("kW", "", Some("kW")),
            ("n 1/min", "n", Some("1/min")),
            ("Drehzahl\n[min-1] 50 Hz", "Drehzahl 50 Hz", Some("min-1")),
            ("Tag (new)", "Tag (new)", None),
            ("Tag", "Tag", None),
        ] {
            assert_eq!(parted(header), (rest.to_owned(), unit.map(str::to_owned)), "{header}");
        }
    }
}
