//! The workbook of a site: drives, nameplates, verdicts, findings, parameters, a sheet each.

use super::drive_book::{ParameterLine, cells, headings};
use super::{Heading, NotWritten, OutCell, Table, plates, xlsx};
use commissioning::plant::Place;
use commissioning::{Timestamp, Typed};
use std::collections::BTreeMap;

/// A drive in the list.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct DriveLine {
    /// Plant tag.
    pub tag: String,
    /// What it drives, in words.
    pub name: String,
    /// Where it stands in the plant.
    pub location: String,
    /// Where its record stands, in words.
    pub status: String,
    /// Revision of its record; 0 when none was begun.
    pub revision: usize,
    /// How many checks are within.
    pub within: usize,
    /// How many are marginal.
    pub marginal: usize,
    /// How many are outside.
    pub outside: usize,
    /// How many are not assessed.
    pub not_assessed: usize,
    /// How many findings are open.
    pub open_findings: usize,
}

/// A drive's plates and sheets.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct PlateLine {
    /// Plant tag.
    pub tag: String,
    /// What it drives, in words.
    pub name: String,
    /// What its fields hold.
    pub fields: BTreeMap<Place, Typed>,
}

/// A verdict.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct VerdictLine {
    /// Plant tag.
    pub tag: String,
    /// The step it is shown at, in words.
    pub step: String,
    /// The check's name.
    pub check: String,
    /// What it was run for; empty where it runs once.
    pub of: String,
    /// The verdict, in words.
    pub verdict: String,
    /// The check's sentence.
    pub summary: String,
    /// The limit, in words.
    pub limit: String,
}

/// A finding.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct FindingLine {
    /// Plant tag.
    pub tag: String,
    /// Its number in the record.
    pub number: usize,
    /// How grave, in words.
    pub severity: String,
    /// Where it stands, in words.
    pub state: String,
    /// What was found.
    pub text: String,
    /// How it was settled or why accepted.
    pub settled: String,
}

/// Everything the workbook of a site holds.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct SiteBook {
    /// Its name.
    pub site: String,
    /// Drives.
    pub drives: Vec<DriveLine>,
    /// Their plates.
    pub plates: Vec<PlateLine>,
    /// Verdicts.
    pub verdicts: Vec<VerdictLine>,
    /// Findings.
    pub findings: Vec<FindingLine>,
    /// Parameters of all drives: tag and line.
    pub parameters: Vec<(String, ParameterLine)>,
}

impl SiteBook {
    /// The tables, in the order of the sheets.
    #[must_use]
    pub fn tables(&self) -> Vec<Table> {
        vec![self.drives(), plates::table(&self.plates), self.verdicts(), self.findings(), self.parameters()]
    }

    /// The workbook's bytes.
    ///
    /// # Errors
    /// When it is larger than the format allows.
    pub fn xlsx(&self, made: Timestamp) -> Result<Vec<u8>, NotWritten> {
        xlsx(&self.site, &self.tables(), made)
    }

    fn drives(&self) -> Table {
        let row = |d: &DriveLine| {
            let words = [&d.tag, &d.name, &d.location, &d.status].map(OutCell::text);
            let counts = [d.revision, d.within, d.marginal, d.outside, d.not_assessed, d.open_findings];
            words.into_iter().chain(counts.map(OutCell::count)).collect()
        };
        table(
            "Drives",
            &[
                "plant tag",
                "name",
                "location",
                "record",
                "revision",
                "within",
                "marginal",
                "outside",
                "not assessed",
                "open findings",
            ],
            self.drives.iter().map(row).collect(),
        )
    }

    fn verdicts(&self) -> Table {
        let row = |v: &VerdictLine| {
            [&v.tag, &v.step, &v.check, &v.of, &v.verdict, &v.summary, &v.limit].map(OutCell::text).to_vec()
        };
        table(
            "Verdicts",
            &["plant tag", "step", "check", "of", "verdict", "in words", "limit"],
            self.verdicts.iter().map(row).collect(),
        )
    }

    fn findings(&self) -> Table {
        let row = |f: &FindingLine| {
            let words = [&f.severity, &f.state, &f.text, &f.settled].map(OutCell::text);
            [OutCell::text(&f.tag), OutCell::count(f.number)].into_iter().chain(words).collect()
        };
        table(
            "Findings",
            &["plant tag", "number", "severity", "state", "found", "settled"],
            self.findings.iter().map(row).collect(),
        )
    }

    fn parameters(&self) -> Table {
        let row =
            |(tag, line): &(String, ParameterLine)| std::iter::once(OutCell::text(tag)).chain(cells(line)).collect();
        let headings = std::iter::once(Heading::new("plant tag")).chain(headings()).collect();
        Table { name: "Parameters".to_owned(), headings, rows: self.parameters.iter().map(row).collect() }
    }
}

fn table(name: &str, headings: &[&str], rows: Vec<Vec<OutCell>>) -> Table {
    Table { name: name.to_owned(), headings: headings.iter().map(|h| Heading::new(h)).collect(), rows }
}
