//! Which column becomes what: what a person confirmed, and how it is remembered.

use super::{Proposal, Target, bare};
use serde::{Deserialize, Serialize};
use sha2::{Digest, Sha256};

/// The decimal sign of a column.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum DecimalSign {
    /// 1485.5; a comma groups thousands.
    Point,
    /// 1485,5; a point groups thousands.
    Comma,
}

/// One column that becomes something.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct MappedColumn {
    /// Column, from 0.
    pub column: u32,
    /// Header as it stands, on one line.
    pub header: String,
    /// What it becomes; `None` leaves it out.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub target: Option<Target>,
    /// Unit of cells that state none; empty where there is none.
    #[serde(default, skip_serializing_if = "String::is_empty")]
    pub unit: String,
    /// Decimal sign, when a person settled it for the whole column.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub decimal: Option<DecimalSign>,
}

/// Which column becomes what.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Mapping {
    /// Fingerprint of the header, to know the same layout again.
    pub fingerprint: String,
    /// First and last row of the header, from 0; `None` when the first row is a drive already.
    pub header_rows: Option<(u32, u32)>,
    /// Its columns.
    pub columns: Vec<MappedColumn>,
}

impl Mapping {
    /// This mapping for another file, when its header is the same; the header may have moved up or down.
    #[must_use]
    pub fn again(&self, proposal: &Proposal) -> Option<Self> {
        let same = self.fingerprint == proposal.fingerprint;
        same.then(|| Self { header_rows: proposal.header_rows, ..self.clone() })
    }

    /// The first row below the header, from 0.
    #[must_use]
    pub fn first_row(&self) -> u32 {
        self.header_rows.map_or(0, |(_, last)| last.saturating_add(1))
    }

    /// The column that becomes this.
    #[must_use]
    pub fn column_of(&self, target: &Target) -> Option<&MappedColumn> {
        self.columns.iter().find(|c| c.target.as_ref() == Some(target))
    }

    /// What is wrong with it, in sentences; empty when it can be used.
    #[must_use]
    pub fn faults(&self) -> Vec<String> {
        let mut faults = Vec::new();
        if self.column_of(&Target::Tag).is_none() {
            faults.push("No column gives the plant tag. Pick the one that does.".to_owned());
        }
        for (index, column) in self.columns.iter().enumerate() {
            let Some(target) = &column.target else { continue };
            if self.columns.iter().take(index).any(|c| c.target.as_ref() == Some(target)) {
                faults.push(format!("Two columns are to become “{}”. Leave one of them out.", target.words()));
            }
            if let Some((kind, _)) = target.quantity()
                && kind.unit(&column.unit).is_none()
            {
                faults.push(format!(
                    "“{}” is no unit of {}. Pick one of: {}.",
                    commissioning::typed::shorten(&column.unit),
                    target.words(),
                    kind.units().iter().map(|u| u.symbol).collect::<Vec<_>>().join(", ")
                ));
            }
        }
        faults
    }
}

/// What tells one layout from another: the header texts in their columns, whatever stands above them.
pub(super) fn fingerprint<'a>(headers: impl Iterator<Item = (u32, &'a str)>) -> String {
    let mut hash = Sha256::new();
    for (column, header) in headers {
        let header = bare(header).to_lowercase();
        if !header.is_empty() {
            hash.update(format!("{column}\u{1f}{header}\u{1e}").as_bytes());
        }
    }
    hash.finalize().iter().take(16).map(|b| format!("{b:02x}")).collect()
}
