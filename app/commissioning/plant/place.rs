//! Where a plant value stands: sheet, rating column, field.

use serde::{Deserialize, Serialize};
use std::fmt;

/// A sheet of fields.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum Sheet {
    /// The site: belongs to the site's chain.
    Site,
    /// The supply: at the site, and again at a drive where its own differs (the drive's goes first).
    Supply,
    /// The drive in the plant: location and fitted options.
    Drive,
    /// The drive's nameplate and data sheet figures.
    DrivePlate,
    /// The motor's nameplate; several rating columns.
    Motor,
    /// The motor cable and protective conductor.
    Cable,
    /// The driven load.
    Load,
    /// Further inputs, all optional.
    Further,
}

impl Sheet {
    /// All, in the order screens list them.
    pub const ALL: [Self; 8] =
        [Self::Site, Self::Supply, Self::Drive, Self::DrivePlate, Self::Motor, Self::Cable, Self::Load, Self::Further];

    /// As addresses and events name it.
    #[must_use]
    pub const fn key(self) -> &'static str {
        match self {
            Self::Site => "site",
            Self::Supply => "supply",
            Self::Drive => "drive",
            Self::DrivePlate => "drive-plate",
            Self::Motor => "motor",
            Self::Cable => "cable",
            Self::Load => "load",
            Self::Further => "further",
        }
    }

    /// As screens name it.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Site => "Site",
            Self::Supply => "Supply",
            Self::Drive => "Drive in the plant",
            Self::DrivePlate => "Drive nameplate",
            Self::Motor => "Motor nameplate",
            Self::Cable => "Motor cable",
            Self::Load => "Driven load",
            Self::Further => "Further inputs",
        }
    }

    /// The sheet of this key.
    #[must_use]
    pub fn from_key(key: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|s| s.key() == key)
    }

    /// How many rating columns a plate of this sheet may have.
    #[must_use]
    pub const fn columns(self) -> u8 {
        if matches!(self, Self::Motor) { 4 } else { 1 }
    }
}

/// Where a plant value stands. `column` counts from 0; fields outside the rating columns stand in column 0.
#[derive(Clone, Debug, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Place {
    /// Which sheet.
    pub sheet: Sheet,
    /// Which rating column.
    pub column: u8,
    /// Which field, by key.
    pub field: String,
}

impl Place {
    /// In column 0.
    pub fn new(sheet: Sheet, field: impl Into<String>) -> Self {
        Self { sheet, column: 0, field: field.into() }
    }

    /// In a rating column.
    pub fn in_column(sheet: Sheet, column: u8, field: impl Into<String>) -> Self {
        Self { sheet, column, field: field.into() }
    }
}

/// As forms name it: `motor.0.rated-current`.
impl fmt::Display for Place {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{}.{}.{}", self.sheet.key(), self.column, self.field)
    }
}
