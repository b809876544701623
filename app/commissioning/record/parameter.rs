//! Where a value of the parameter record stands.

use serde::{Deserialize, Serialize};

/// A column of the parameter record.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum ParameterColumn {
    /// The drive's own code for the function, free text.
    Code,
    /// As found.
    AsFound,
    /// Intended.
    Intended,
    /// As left.
    AsLeft,
    /// Why as left differs from intended.
    Explanation,
}

impl ParameterColumn {
    /// All, in the order of the sheet.
    pub const ALL: [Self; 5] = [Self::Code, Self::AsFound, Self::Intended, Self::AsLeft, Self::Explanation];

    /// As forms name it.
    #[must_use]
    pub const fn key(self) -> &'static str {
        match self {
            Self::Code => "code",
            Self::AsFound => "as-found",
            Self::Intended => "intended",
            Self::AsLeft => "as-left",
            Self::Explanation => "explanation",
        }
    }

    /// As screens name it.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Code => "drive's own code",
            Self::AsFound => "as found",
            Self::Intended => "intended",
            Self::AsLeft => "as left",
            Self::Explanation => "explanation",
        }
    }
}

/// Where a value of the parameter record stands.
#[derive(Clone, Debug, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct ParameterPlace {
    /// Generic function by key (`acceleration-time`), or a free row's own key (`row-1`).
    pub function: String,
    /// Column.
    pub column: ParameterColumn,
}
