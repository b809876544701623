//! Bringing header words of several languages and habits to one plain spelling.

/// Lower case, accents and umlauts written out, Greek letters named, everything else a blank.
pub(crate) fn folded(text: &str) -> String {
    let mut plain = String::with_capacity(text.len());
    for c in text.chars().flat_map(char::to_lowercase) {
        match c {
            'ä' | 'æ' => plain.push_str("ae"),
            'ö' | 'œ' => plain.push_str("oe"),
            'ü' => plain.push_str("ue"),
            'ß' => plain.push_str("ss"),
            'é' | 'è' | 'ê' | 'ë' => plain.push('e'),
            'à' | 'â' | 'á' => plain.push('a'),
            'î' | 'ï' | 'í' => plain.push('i'),
            'ô' | 'ó' => plain.push('o'),
            'û' | 'ù' | 'ú' => plain.push('u'),
            'ç' => plain.push('c'),
            'φ' | 'ϕ' | 'ф' => plain.push_str(" phi "),
            'η' => plain.push_str(" eta "),
            'δ' | '∆' => plain.push_str(" delta "),
            '°' => plain.push_str(" deg "),
            '\'' | '’' => plain.push(' '),
            c if c.is_alphanumeric() => plain.push(c),
            _ => plain.push(' '),
        }
    }
    plain.split_whitespace().collect::<Vec<_>>().join(" ")
}

/// Text on one line with single blanks, as it is shown and as it counts for a fingerprint.
pub(crate) fn bare(text: &str) -> String {
    text.split(|c: char| c.is_whitespace() || c == '\u{feff}' || c == '\u{200b}')
        .filter(|w| !w.is_empty())
        .collect::<Vec<_>>()
        .join(" ")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn spellings_meet() {
        for (text, plain) in [
            ("Kabellänge", "kabellaenge"),
            ("cosφ", "cos phi"),
            ("COS Φ", "cos phi"),
            ("N° d’équipement", "n deg d equipement"),
            ("Tag-No.", "tag no"),
            ("  Rated\ncurrent ", "rated current"),
        ] {
            assert_eq!(folded(text), plain);
        }
        assert_eq!(bare(" a\n b\u{a0}c "), "a b c");
    }
}
