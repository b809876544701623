//! What a limit rule shows: the ruler, its acceptable span, its limits and the readings on it.

use crate::outcome::Verdict;
use crate::rounding::to_significant;

/// How the ruler is divided.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(rename_all = "kebab-case"))]
pub enum Scale {
    /// Even steps.
    Linear,
    /// Decades.
    Logarithmic,
}

/// A span in which readings are acceptable; `None` runs to the end of the ruler.
#[derive(Clone, Debug, PartialEq)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(deny_unknown_fields))]
pub struct Band {
    /// Lower end.
    pub from: Option<f64>,
    /// Upper end.
    pub to: Option<f64>,
}

/// A limit's mark with its words, for instance `≥ 5 MΩ`.
#[derive(Clone, Debug, PartialEq)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(deny_unknown_fields))]
pub struct Tick {
    /// Where.
    pub at: f64,
    /// Its words.
    pub label: String,
}

/// A reading: place, whisker, shape by verdict, words.
#[derive(Clone, Debug, PartialEq)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(deny_unknown_fields))]
pub struct Marker {
    /// Where.
    pub at: f64,
    /// Half length of the uncertainty whisker; zero for none.
    pub whisker: f64,
    /// Its words, with unit.
    pub label: String,
    /// Gives the shape.
    pub verdict: Verdict,
}

/// The ruler. The drawing crate turns it into a picture; nothing else draws limits.
#[derive(Clone, Debug, PartialEq)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(deny_unknown_fields))]
pub struct LimitRule {
    /// How it is divided.
    pub scale: Scale,
    /// Unit of all its numbers.
    pub unit: String,
    /// Acceptable spans.
    pub bands: Vec<Band>,
    /// Limits.
    pub ticks: Vec<Tick>,
    /// Readings; empty before the reading is taken.
    pub markers: Vec<Marker>,
}

impl LimitRule {
    /// An empty linear ruler in this unit.
    #[must_use]
    pub fn linear(unit: &str) -> Self {
        Self { scale: Scale::Linear, unit: unit.to_owned(), bands: Vec::new(), ticks: Vec::new(), markers: Vec::new() }
    }

    /// An empty ruler in decades.
    #[must_use]
    pub fn logarithmic(unit: &str) -> Self {
        Self { scale: Scale::Logarithmic, ..Self::linear(unit) }
    }

    /// Acceptable from `limit` up, with the limit's words.
    #[must_use]
    pub fn at_least(mut self, limit: f64, label: impl Into<String>) -> Self {
        self.bands.push(Band { from: Some(round(limit)), to: None });
        self.ticks.push(Tick { at: round(limit), label: label.into() });
        self
    }

    /// Acceptable up to `limit`.
    #[must_use]
    pub fn at_most(mut self, limit: f64, label: impl Into<String>) -> Self {
        self.bands.push(Band { from: None, to: Some(round(limit)) });
        self.ticks.push(Tick { at: round(limit), label: label.into() });
        self
    }

    /// Acceptable between two limits.
    #[must_use]
    pub fn between(mut self, low: f64, low_label: impl Into<String>, high: f64, high_label: impl Into<String>) -> Self {
        self.bands.push(Band { from: Some(round(low)), to: Some(round(high)) });
        self.ticks.push(Tick { at: round(low), label: low_label.into() });
        self.ticks.push(Tick { at: round(high), label: high_label.into() });
        self
    }

    /// A further mark without a band, for instance "twice the limit".
    #[must_use]
    pub fn tick(mut self, at: f64, label: impl Into<String>) -> Self {
        self.ticks.push(Tick { at: round(at), label: label.into() });
        self
    }

    /// A reading with its whisker (U).
    #[must_use]
    pub fn reading(mut self, at: f64, whisker: f64, label: impl Into<String>, verdict: Verdict) -> Self {
        self.markers.push(Marker { at: round(at), whisker: round(whisker), label: label.into(), verdict });
        self
    }

    /// Whether every number on it can be drawn.
    #[must_use]
    pub fn is_finite(&self) -> bool {
        self.ticks.iter().all(|t| t.at.is_finite())
            && self.markers.iter().all(|m| m.at.is_finite() && m.whisker.is_finite())
            && self.bands.iter().all(|b| b.from.is_none_or(f64::is_finite) && b.to.is_none_or(f64::is_finite))
    }
}

/// Six significant digits: what a digest may depend on.
fn round(value: f64) -> f64 {
    to_significant(value, 6)
}
