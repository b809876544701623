//! The table of one drive: its plates, what was read and set there, and what was found. A file a drive.

use crate::DemoFault;
use serde::Deserialize;
use std::collections::BTreeMap;

/// Text by key, as a person would type it: `"21.4"`, `"25 hp"`, `"yes"`.
pub(crate) type Typed = BTreeMap<String, String>;

/// A drive of the demo.
#[derive(Clone, Debug, Deserialize)]
#[serde(deny_unknown_fields, rename_all = "kebab-case")]
pub(crate) struct Case {
    /// Plant tag.
    pub(crate) tag: String,
    /// What it drives.
    pub(crate) name: String,
    /// Row of its setting list at which the first function stands: its settings are numbered plainly.
    pub(crate) first_row: usize,
    /// Sheets by key, fields by key.
    pub(crate) sheets: BTreeMap<String, Typed>,
    /// Rating columns of the motor plate.
    pub(crate) columns: Vec<Typed>,
    /// What was entered, by item: one text, or one a row.
    #[serde(default)]
    pub(crate) entries: BTreeMap<String, Rows>,
    /// Instruments that differ from the usual ones, by item.
    #[serde(default)]
    pub(crate) instruments: Typed,
    /// Settings by function.
    #[serde(default)]
    pub(crate) settings: BTreeMap<String, Setting>,
    /// Free rows of the parameter record: what it sets, and to what.
    #[serde(default)]
    pub(crate) free_rows: Vec<(String, String)>,
    /// Hold points that a witness from the client releases: the phase, and the printed name.
    #[serde(default)]
    pub(crate) witness: Vec<(String, String)>,
    /// Steps settled otherwise.
    #[serde(default)]
    pub(crate) otherwise: Vec<Otherwise>,
    /// Findings raised by the engineer.
    #[serde(default)]
    pub(crate) findings: Vec<Finding>,
    /// Entries put right afterwards.
    #[serde(default)]
    pub(crate) corrections: Vec<Correction>,
}

/// One text, or one for every row of a table.
#[derive(Clone, Debug, Deserialize)]
#[serde(untagged)]
pub(crate) enum Rows {
    /// Outside tables, or the same in every row.
    One(String),
    /// Row by row.
    Each(Vec<String>),
}

/// A setting: intended and left alike, or with what was found before it or left instead.
#[derive(Clone, Debug, Deserialize)]
#[serde(untagged)]
pub(crate) enum Setting {
    /// Intended, and left so.
    Plain(String),
    /// As found, then intended and left so.
    Found(String, String),
    /// Intended, as left, and why it differs.
    Left(String, String, String),
}

/// A step settled otherwise.
#[derive(Clone, Debug, Deserialize)]
#[serde(deny_unknown_fields)]
pub(crate) struct Otherwise {
    /// Which.
    pub(crate) step: String,
    /// Whether it does not apply; otherwise it could not be done.
    pub(crate) not_applicable: bool,
    /// Why.
    pub(crate) reason: String,
}

/// A finding.
#[derive(Clone, Debug, Deserialize)]
#[serde(deny_unknown_fields)]
pub(crate) struct Finding {
    /// At which step; raised when it is recorded.
    pub(crate) step: String,
    /// `information`, `before-handover` or `stops-start-up`.
    pub(crate) severity: String,
    /// What is wrong.
    pub(crate) text: String,
    /// What was done about it, and at which later step.
    pub(crate) settled: Option<(String, String)>,
}

/// An entry put right.
#[derive(Clone, Debug, Deserialize)]
#[serde(deny_unknown_fields)]
pub(crate) struct Correction {
    /// Which item.
    pub(crate) item: String,
    /// What it should have been.
    pub(crate) text: String,
    /// Why.
    pub(crate) reason: String,
}

/// What is the same at every drive unless its own table says otherwise.
#[derive(Clone, Debug, Deserialize)]
#[serde(deny_unknown_fields)]
pub(crate) struct Usual {
    /// What was entered.
    pub(crate) entries: BTreeMap<String, Rows>,
    /// Instrument by item.
    pub(crate) by_item: Typed,
    /// Instrument by kind of quantity, for the rest.
    pub(crate) by_quantity: Typed,
}

/// Reads a table.
pub(crate) fn read<T: serde::de::DeserializeOwned>(name: &str, text: &str) -> Result<T, DemoFault> {
    toml::from_str(text).map_err(|e| DemoFault::Table(name.to_owned(), e.to_string()))
}

impl Rows {
    /// The text of a row; an empty one is none.
    pub(crate) fn row(&self, row: u16) -> Option<&str> {
        let text = match self {
            Self::One(text) => Some(text.as_str()),
            Self::Each(rows) => rows.get(usize::from(row)).map(String::as_str),
        };
        text.filter(|t| !t.is_empty())
    }
}

impl Setting {
    /// As found, intended, as left, explanation.
    pub(crate) fn parts(&self) -> (Option<&str>, &str, &str, Option<&str>) {
        match self {
            Self::Plain(value) => (None, value, value, None),
            Self::Found(found, value) => (Some(found), value, value, None),
            Self::Left(intended, left, why) => (None, intended, left, Some(why)),
        }
    }
}
