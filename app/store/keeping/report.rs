//! What the check of a store found, as text for people and JSON for programs.

use serde::Serialize;

/// One thing that was looked at.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct ReportLine {
    /// What was looked at.
    pub part: String,
    /// Whether it is as it must be.
    pub ok: bool,
    /// What was found, in a sentence.
    pub found: String,
}

/// What the check of a store found.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct Report {
    /// Whether everything is as it must be.
    pub ok: bool,
    /// Everything that was looked at, in order.
    pub lines: Vec<ReportLine>,
    /// What is wrong, in sentences; empty when all is well.
    pub findings: Vec<String>,
}

impl Report {
    pub(crate) const fn new() -> Self {
        Self { ok: true, lines: Vec::new(), findings: Vec::new() }
    }

    /// Adds what one look found: nothing wrong, or these faults.
    pub(crate) fn add(&mut self, part: &str, fine: impl Into<String>, faults: Vec<String>) {
        let ok = faults.is_empty();
        let found = match faults.len() {
            0 => fine.into(),
            1 => "1 fault".to_owned(),
            many => format!("{many} faults"),
        };
        self.ok &= ok;
        self.lines.push(ReportLine { part: part.to_owned(), ok, found });
        self.findings.extend(faults.into_iter().map(|fault| format!("{part}: {fault}")));
    }

    /// As a person reads it.
    #[must_use]
    pub fn to_text(&self) -> String {
        let mut text = String::new();
        for line in &self.lines {
            let word = if line.ok { "fine " } else { "WRONG" };
            text.push_str(&format!("{word}  {}: {}\n", line.part, line.found));
        }
        for finding in &self.findings {
            text.push_str(&format!("  - {finding}\n"));
        }
        text.push_str(if self.ok { "The store is sound.\n" } else { "The store is not sound.\n" });
        text
    }

    /// As a program reads it.
    #[must_use]
    pub fn to_json(&self) -> String {
        serde_json::to_string_pretty(self).unwrap_or_default()
    }
}
