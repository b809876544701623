//! Where a formula or a limit comes from, and how far that was confirmed.

/// How well a value is known. Shown beside every verdict that rests on it.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(rename_all = "kebab-case"))]
pub enum Status {
    /// A published page or file states it.
    Confirmed,
    /// Pure mathematics or physics.
    Arithmetic,
    /// From memory; nobody could confirm it.
    Memory,
    /// Common practice of the trade; no standard stands behind it.
    CommonPractice,
    /// The maker of this very drive, motor or load states it.
    Maker,
}

impl Status {
    /// In words, for the screen and the package.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Confirmed => "confirmed in published text",
            Self::Arithmetic => "arithmetic",
            Self::Memory => "from memory",
            Self::CommonPractice => "common practice, no source",
            Self::Maker => "stated by the maker",
        }
    }
}

/// A published source, as a constant that checks name.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Source {
    /// Short stable identifier, for instance `IR-02`.
    pub id: &'static str,
    /// Standard, clause and table, or handbook and example.
    pub text: &'static str,
    /// How far it was confirmed.
    pub status: Status,
    /// Safety may depend on it: the reader sees the status next to the result.
    pub safety: bool,
}
