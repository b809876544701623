//! Keeps docs/coverage.md and docs/glossary.md alive: every step and check named there exists.

use super::built_in;
use super::tests::CHECKS;
use std::collections::BTreeSet;
use std::path::Path;

fn page(name: &str) -> String {
    // Asked at run time first: a binary built from a copy of the tree must not read the copy's pages.
    let folder = std::env::var("CARGO_MANIFEST_DIR").unwrap_or_else(|_| env!("CARGO_MANIFEST_DIR").to_owned());
    let path = Path::new(&folder).join("../../docs").join(name);
    std::fs::read_to_string(&path).unwrap_or_else(|fault| panic!("docs/{name}: {fault}"))
}

/// What stands between backticks.
fn quoted(page: &str) -> Vec<&str> {
    page.split('`').skip(1).step_by(2).collect()
}

#[test]
fn coverage_names_only_steps_and_checks_that_exist() {
    let procedure = built_in().expect("the phase files are phases");
    let steps: BTreeSet<&str> = procedure.steps().map(|(_, s)| s.id.as_str()).collect();
    let page = page("coverage.md");
    let named = quoted(&page);
    assert!(named.len() > 100, "coverage.md answers line by line");
    for name in named {
        assert!(
            steps.contains(name) || CHECKS.contains(&name),
            "coverage.md names `{name}`, which is neither step nor check"
        );
    }
}

#[test]
fn every_row_of_the_coverage_is_answered() {
    let page = page("coverage.md");
    let rows: Vec<&str> = page
        .lines()
        .filter(|l| l.starts_with("| ") && !l.starts_with("| expected") && !l.starts_with("| ---"))
        .collect();
    assert!(rows.len() >= 50, "only {} rows", rows.len());
    for row in rows {
        assert!(
            row.contains('`') || row.contains("out of scope") || row.contains("program itself"),
            "unanswered: {row}"
        );
    }
}

#[test]
fn the_glossary_explains_the_words_in_use() {
    let page = page("glossary.md").to_lowercase();
    for word in [
        "site",
        "drive",
        "nameplate",
        "procedure",
        "phase",
        "step",
        "hold point",
        "isolation",
        "entry",
        "reading",
        "check",
        "verdict",
        "working",
        "parameter record",
        "finding",
        "record",
        "instrument",
        "journal",
        "handover package",
        "outbox",
        "limit rule",
    ] {
        assert!(page.contains(&format!("**{word}**")), "{word} is not explained");
    }
}
