//! A value as a person typed it, beside what the program understood.

pub mod numeral;

use engineering::Kind;
use serde::{Deserialize, Serialize};

/// Text exactly as typed, the unit picked, and the number in the coherent unit as a decimal (absent for words).
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Typed {
    /// As typed: `50.0` is not `50`. For a choice its key, for a flag `yes` or `no`.
    pub text: String,
    /// The unit's symbol, for a quantity.
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

    /// Understands a quantity as typed; the error is a sentence with fault and remedy.
    ///
    /// # Errors
    /// When the text is no number, is ambiguous, or the unit does not belong to this kind.
    pub fn quantity(text: &str, unit: &str, kind: Kind) -> Result<Self, String> {
        let known = kind.unit(unit).ok_or_else(|| {
            let list: Vec<&str> = kind.units().iter().map(|u| u.symbol).filter(|s| !s.is_empty()).collect();
            format!("“{}” is no unit of {}. Pick one of: {}.", shorten(unit), kind.words(), list.join(", "))
        })?;
        let number = numeral::understand(text, kind)?;
        Ok(Self {
            text: text.to_owned(),
            unit: Some(unit.to_owned()),
            si: Some(numeral::twelve_digits(known.to_coherent(number))),
        })
    }

    /// The number in the coherent unit.
    #[must_use]
    pub fn number(&self) -> Option<f64> {
        self.si.as_deref().and_then(|s| s.parse().ok())
    }

    /// The number in the unit that was picked.
    #[must_use]
    pub fn number_in_unit(&self, kind: Kind) -> Option<f64> {
        let unit = kind.unit(self.unit.as_deref().unwrap_or_default())?;
        Some(unit.from_coherent(self.number()?))
    }

    /// Text with its unit, as shown.
    #[must_use]
    pub fn shown(&self) -> String {
        match self.unit.as_deref() {
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
