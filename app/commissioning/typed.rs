//! A value as a person typed it, beside what the program understood.

pub mod numeral;

use engineering::Kind;
use serde::{Deserialize, Serialize};

/// Text exactly as typed, the unit it counts in, and the number in the coherent unit as a decimal (absent for words).
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Typed {
    /// As typed: `50.0` is not `50`. For a choice its key, for a flag `yes` or `no`.
    pub text: String,
    /// The unit's symbol, for a quantity: the one picked, or `Ω` where the text itself carries a prefix (`500k`).
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub unit: Option<String>,
    /// The number in the coherent unit, twelve significant digits, for a quantity.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub si: Option<String>,
}

impl Typed {
    /// Words, a choice's key or a flag.
    pub fn words(text: impl Into<String>) -> Self {
        Self { text: text.into(), unit: None, si: None }
    }

    /// Understands a quantity as typed; the error is a sentence with fault and remedy. A prefix typed after a
    /// resistance counts in ohms whatever unit was picked, or `500k` beside MΩ would be taken a million times too large.
    ///
    /// # Errors
    /// When the text is no number, is ambiguous, or the unit does not belong to this kind.
    pub fn quantity(text: &str, unit: &str, kind: Kind) -> Result<Self, String> {
        let known = kind.unit(unit).ok_or_else(|| {
            let list: Vec<&str> = kind.units().iter().map(|u| u.symbol).filter(|s| !s.is_empty()).collect();
            format!("“{}” is no unit of {}. Pick one of: {}.", shorten(unit), kind.words(), list.join(", "))
        })?;
        let number = numeral::understand(text, kind)?;
        let (unit, coherent) = match numeral::prefix(text, kind) {
            Some(_) => (numeral::OHM, number),
            None => (unit, known.to_coherent(number)),
        };
        let (text, unit) = (text.to_owned(), Some(unit.to_owned()));
        Ok(Self { text, unit, si: Some(numeral::twelve_digits(coherent)) })
    }

    /// The number in the coherent unit; what a damaged record holds in its place, such as `inf`, is none.
    #[must_use]
    pub fn number(&self) -> Option<f64> {
        self.si.as_deref().and_then(|s| s.parse().ok()).filter(|number: &f64| number.is_finite())
    }

    /// The number in the unit that was picked.
    #[must_use]
    pub fn number_in_unit(&self, kind: Kind) -> Option<f64> {
        let unit = kind.unit(self.unit.as_deref().unwrap_or_default())?;
        Some(unit.from_coherent(self.number()?))
    }

    /// Text with its unit, as shown; a prefix typed after a resistance stands with the ohms it counts: `500 kΩ`.
    #[must_use]
    pub fn shown(&self) -> String {
        match self.unit.as_deref() {
            Some(numeral::OHM) if numeral::prefix(&self.text, Kind::Resistance).is_some() => {
                let (digits, prefix) = numeral::parted(self.text.trim());
                format!("{digits} {prefix}{}", numeral::OHM)
            }
            Some(unit) if !unit.is_empty() => format!("{} {unit}", self.text.trim()),
            _ => self.text.trim().to_owned(),
        }
    }
}

/// Cuts what a person typed so that it fits a message.
#[must_use]
pub fn shorten(text: &str) -> String {
    let mut short: String = text.chars().take(40).collect();
    if text.chars().count() > 40 {
        short.push('…');
    }
    short
}

#[cfg(test)]
mod tests {
    use super::*;

    fn resistance(text: &str, unit: &str) -> Typed {
        Typed::quantity(text, unit, Kind::Resistance).unwrap()
    }

    /// SI prefixes (SI brochure, table 7): k is 10³ and M is 10⁶, so that 500k is half a megohm.
    #[test]
    fn a_prefix_typed_counts_in_ohms_whatever_unit_was_picked() {
        for (text, picked, ohms, shown) in [
            ("500k", "MΩ", 5e5, "500 kΩ"),
            ("500 K", "GΩ", 5e5, "500 kΩ"),
            ("1.2G", "MΩ", 1.2e9, "1.2 GΩ"),
            ("2M", "MΩ", 2e6, "2 MΩ"),
            ("85m", "mΩ", 0.085, "85 mΩ"),
            ("85u", "Ω", 85e-6, "85 µΩ"),
        ] {
            let typed = resistance(text, picked);
            assert_eq!((typed.number(), typed.unit.as_deref()), (Some(ohms), Some("Ω")), "{text} {picked}");
            assert_eq!(
                (typed.text.as_str(), typed.shown().as_str()),
                (text, shown),
                "kept as typed, shown as understood"
            );
            assert_eq!(typed, resistance(text, "Ω"), "sent again with another unit it is the same value");
        }
        assert_eq!(resistance("500", "MΩ").number(), Some(5e8));
        assert_eq!(resistance("500", "MΩ").shown(), "500 MΩ");
        assert!(
            Typed::quantity("500k", "V", Kind::Resistance).is_err(),
            "the unit must belong to the kind all the same"
        );
        assert!(Typed::quantity("5k", "V", Kind::Voltage).is_err());
    }

    #[test]
    fn a_number_that_is_none_counts_as_not_there() {
        for none in ["NaN", "inf", "-inf", "1e999", "words", ""] {
            assert_eq!(Typed { si: Some(none.to_owned()), ..resistance("5", "Ω") }.number(), None, "{none}");
        }
    }
}
