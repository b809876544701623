//! Words that schedules use for the choices of a field, in English, German and French; collected by ourselves.

use crate::schedule::folded;
use commissioning::plant::{Place, Sheet};

type Words = &'static [&'static str];

/// Sheet, field, choice, words in plain spelling.
#[rustfmt::skip]
const WORDS: &[(Sheet, &str, &str, Words)] = &[
    (Sheet::Load, "kind", "pump", &["pump", "pumps", "pumpe", "pumpen", "pompe", "speisepumpe", "kreiselpumpe"]),
    (Sheet::Load, "kind", "fan", &["fan", "fans", "blower", "ventilator", "luefter", "geblaese", "ventilateur", "soufflante"]),
    (Sheet::Load, "kind", "conveyor", &["conveyor", "belt", "foerderband", "band", "foerderer", "convoyeur", "screw", "schnecke"]),
    (Sheet::Load, "kind", "hoist", &["hoist", "crane", "lift", "kran", "hubwerk", "hebezeug", "treuil", "pont roulant", "palan"]),
    (Sheet::Load, "kind", "compressor", &["compressor", "verdichter", "kompressor", "compresseur"]),
    (Sheet::Load, "kind", "mixer", &["mixer", "agitator", "stirrer", "ruehrwerk", "mischer", "agitateur", "melangeur"]),
    (Sheet::Load, "kind", "other", &["other", "sonstige", "autre"]),
    (Sheet::Motor, "connection", "star", &["star", "y", "wye", "stern", "etoile"]),
    (Sheet::Motor, "connection", "delta", &["delta", "d", "dreieck", "triangle"]),
    (Sheet::Motor, "cooling", "self", &["ic 411", "ic411", "self", "eigenlueftung", "tefc"]),
    (Sheet::Motor, "cooling", "separate", &["ic 416", "ic416", "forced", "fremdlueftung", "separate"]),
    (Sheet::Motor, "cooling", "surface", &["ic 410", "ic410", "tenv"]),
    (Sheet::Motor, "cooling", "air-stream", &["ic 418", "ic418", "teao"]),
    (Sheet::Motor, "thermal-class", "105", &["a", "cl a"]),
    (Sheet::Motor, "thermal-class", "120", &["e", "cl e"]),
    (Sheet::Motor, "thermal-class", "130", &["b", "cl b", "class b"]),
    (Sheet::Motor, "thermal-class", "155", &["f", "cl f", "class f", "classe f", "klasse f"]),
    (Sheet::Motor, "thermal-class", "180", &["h", "cl h", "class h", "classe h", "klasse h"]),
    (Sheet::Motor, "duty", "s1", &["continuous", "cont", "dauerbetrieb", "service continu"]),
    (Sheet::Motor, "machine", "induction", &["induction", "asynchronous", "asynchron", "asynchrone", "squirrel cage", "kaefiglaeufer"]),
    (Sheet::Motor, "machine", "permanent-magnet", &["permanent magnet", "pm", "pmsm", "permanentmagnet", "aimants permanents"]),
    (Sheet::Motor, "machine", "reluctance", &["reluctance", "synrm", "reluktanz", "reluctance synchrone"]),
    (Sheet::Cable, "metal", "copper", &["copper", "cu", "kupfer", "cuivre"]),
    (Sheet::Cable, "metal", "aluminium", &["aluminium", "aluminum", "al", "alu"]),
    (Sheet::Cable, "pe-metal", "copper", &["copper", "cu", "kupfer", "cuivre"]),
    (Sheet::Cable, "pe-metal", "aluminium", &["aluminium", "aluminum", "al", "alu"]),
];

/// The choice that these words mean; `None` when none or several fit.
pub(super) fn find(
    place: Option<&Place>,
    options: &[(&'static str, &'static str)],
    text: &str,
) -> Option<&'static str> {
    let plain = folded(text);
    let squeezed = plain.replace(' ', "");
    let itself = options.iter().find(|(key, label)| {
        let key = folded(key);
        key == plain || key == squeezed || folded(label) == plain || short(label) == plain
    });
    if let Some((key, _)) = itself {
        return Some(key);
    }
    let lines =
        || WORDS.iter().filter(|(sheet, field, ..)| place.is_some_and(|p| *sheet == p.sheet && *field == p.field));
    if let Some((_, _, key, _)) = lines().find(|(.., words)| words.contains(&plain.as_str())) {
        return Some(key);
    }
    // “Cooling water pump”: one word of it is a choice, and no other word is another.
    let mut found: Vec<&str> = Vec::new();
    for word in plain.split(' ').filter(|w| w.len() > 2) {
        for (_, _, key, words) in lines() {
            if words.contains(&word) && !found.contains(key) {
                found.push(key);
            }
        }
    }
    match found.as_slice() {
        [one] => Some(one),
        _ => None,
    }
}

/// A label up to its explanation: `S1 continuous` is also `S1`, `155 (F)` also `155`.
fn short(label: &str) -> String {
    folded(label.split([' ', '(']).next().unwrap_or(label))
}

/// Yes or no, as schedules mark it.
pub(super) fn yes_or_no(text: &str) -> Option<&'static str> {
    let text = text.trim();
    match folded(text).as_str() {
        "yes" | "y" | "ja" | "j" | "oui" | "o" | "x" | "1" | "true" | "wahr" | "vrai" => Some("yes"),
        "no" | "n" | "nein" | "non" | "0" | "false" | "falsch" | "faux" => Some("no"),
        _ if matches!(text, "✓" | "✔" | "☑" | "•") => Some("yes"),
        _ => None,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use commissioning::plant::{FieldKind, fields};

    fn choose(sheet: Sheet, field: &str, text: &str) -> Option<&'static str> {
        match fields::find(sheet, field).expect("listed").kind {
            FieldKind::Choice(options) => find(Some(&Place::new(sheet, field)), options, text),
            other => panic!("{other:?}"),
        }
    }

    #[test]
    fn words_of_three_languages_mean_the_choice() {
        assert_eq!(choose(Sheet::Load, "kind", "Cooling water pump"), Some("pump"));
        assert_eq!(choose(Sheet::Load, "kind", "Lüfter"), Some("fan"));
        assert_eq!(choose(Sheet::Load, "kind", "fan / pump"), None);
        assert_eq!(choose(Sheet::Load, "kind", "crusher"), None);
        assert_eq!(choose(Sheet::Motor, "connection", "Δ"), Some("delta"));
        assert_eq!(choose(Sheet::Motor, "connection", "Y"), Some("star"));
        assert_eq!(choose(Sheet::Motor, "efficiency-class", "IE 3"), Some("ie3"));
        assert_eq!(choose(Sheet::Motor, "duty", "S1"), Some("s1"));
        assert_eq!(choose(Sheet::Motor, "thermal-class", "F"), Some("155"));
        assert_eq!(choose(Sheet::Supply, "earthing", "TN-S"), Some("tn-s"));
        assert_eq!((yes_or_no("Ja"), yes_or_no("✓"), yes_or_no("perhaps")), (Some("yes"), Some("yes"), None));
    }

    #[test]
    fn every_word_belongs_to_a_choice_that_is_there() {
        for (sheet, field, key, words) in WORDS {
            let kind = fields::find(*sheet, field).expect("listed").kind;
            let FieldKind::Choice(options) = kind else { panic!("{field} is no choice") };
            assert!(options.iter().any(|(k, _)| k == key), "{field}: {key}");
            for word in *words {
                assert_eq!(folded(word), **word);
            }
        }
    }
}
