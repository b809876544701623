//! What a code sheet says of a function.

use commissioning::plant::{Field, FieldKind};
use commissioning::record::functions::{self, Function};
use serde::{Deserialize, Serialize};

/// The code sheet of a type of drive.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct CodeSheet {
    /// Type of drive, as the firm names it.
    pub drive_type: String,
    /// Its entries, in the order of the generic functions.
    pub entries: Vec<CodeEntry>,
}

/// Where and how one generic function is set.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct CodeEntry {
    /// Generic function by key: `acceleration-time`.
    pub function: String,
    /// The drive's own code.
    pub code: String,
    /// Unit in which the drive shows it; empty where there is none.
    #[serde(default, skip_serializing_if = "String::is_empty")]
    pub unit: String,
    /// Smallest step that can be set, in that unit; empty when not known.
    #[serde(default, skip_serializing_if = "String::is_empty")]
    pub resolution: String,
    /// What a new drive has; empty when not known.
    #[serde(default, skip_serializing_if = "String::is_empty")]
    pub default: String,
    /// Lowest that can be set; empty when not known.
    #[serde(default, skip_serializing_if = "String::is_empty")]
    pub lowest: String,
    /// Highest that can be set; empty when not known.
    #[serde(default, skip_serializing_if = "String::is_empty")]
    pub highest: String,
    /// For a choice: the generic meaning by key, and the drive's own word for it.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub meanings: Vec<(String, String)>,
}

impl CodeEntry {
    /// The generic function.
    #[must_use]
    pub fn generic(&self) -> Option<&'static Function> {
        functions::find(&self.function)
    }

    /// The generic meaning of the drive's own word.
    #[must_use]
    pub fn meaning_of(&self, word: &str) -> Option<&str> {
        let word = word.trim();
        self.meanings.iter().find(|(_, own)| own.trim().eq_ignore_ascii_case(word)).map(|(key, _)| key.as_str())
    }

    /// The drive's own word for a generic meaning.
    #[must_use]
    pub fn word_for(&self, meaning: &str) -> Option<&str> {
        self.meanings.iter().find(|(key, _)| key == meaning).map(|(_, own)| own.as_str())
    }
}

impl CodeSheet {
    /// The entry of a drive's code; blanks and large or small letters make no difference.
    #[must_use]
    pub fn by_code(&self, code: &str) -> Option<&CodeEntry> {
        let wanted = same_code(code);
        self.entries.iter().find(|e| same_code(&e.code) == wanted)
    }

    /// The entry of a generic function.
    #[must_use]
    pub fn by_function(&self, function: &str) -> Option<&CodeEntry> {
        self.entries.iter().find(|e| e.function == function)
    }
}

/// A code as it is compared.
pub(crate) fn same_code(code: &str) -> String {
    code.chars().filter(|c| !c.is_whitespace()).flat_map(char::to_uppercase).collect()
}

/// A function described as a field, so that its values are understood by the same rules.
pub(crate) fn as_field(function: &Function) -> Field {
    let Function { key, label, group, hint, kind } = *function;
    Field { key, label, hint, group, kind, required: false }
}

/// The function's unit for a drive's unit; `None` when the drive counts in something else, such as percent of rated.
pub(crate) fn unit_for(function: &Function, unit: &str) -> Option<&'static str> {
    match function.kind {
        FieldKind::Quantity { kind, unit: usual, .. } if unit.trim().is_empty() => {
            Some(usual).filter(|u| kind.unit(u).is_some())
        }
        FieldKind::Quantity { kind, .. } => crate::schedule::unit_of(kind, unit),
        _ => unit.trim().is_empty().then_some(""),
    }
}
