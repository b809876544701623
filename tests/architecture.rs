//! Holds the layers, the headings, the file lengths and where SQL may stand, as DEVELOPERS.md draws them.

use std::fs;
use std::path::{Path, PathBuf};

const LONGEST_FILE: usize = 400;

/// Which workspace crates each crate may use; anything else is a change of architecture.
const EDGES: &[(&str, &[&str])] = &[
    ("app/engineering", &[]),
    ("app/commissioning", &["engineering"]),
    ("app/drawing", &["engineering", "commissioning"]),
    ("app/store", &["engineering", "commissioning"]),
    ("app/handover", &["engineering", "commissioning", "drawing"]),
    ("app/exchange", &["engineering", "commissioning"]),
    ("app/web", &["engineering", "commissioning", "drawing", "store", "handover", "exchange"]),
    ("seed-demo", &["engineering", "commissioning", "store"]),
];

fn root() -> PathBuf {
    PathBuf::from(env!("CARGO_MANIFEST_DIR"))
}

fn files_under(folder: &Path, ending: &str, found: &mut Vec<PathBuf>) {
    for entry in fs::read_dir(folder).expect("folder is readable") {
        let path = entry.expect("entry is readable").path();
        if path.is_dir() {
            files_under(&path, ending, found);
        } else if path.extension().is_some_and(|e| e == ending) {
            found.push(path);
        }
    }
}

fn rust_files() -> Vec<PathBuf> {
    let mut found = Vec::new();
    for folder in ["app", "seed-demo", "tests"] {
        files_under(&root().join(folder), "rs", &mut found);
    }
    assert!(found.len() > 100, "the walk found the tree");
    found
}

fn shown(path: &Path) -> String {
    path.strip_prefix(root()).expect("inside the project").display().to_string()
}

/// The names under a heading of a manifest, up to the next heading.
fn names_under(manifest: &str, heading: &str) -> Vec<String> {
    manifest
        .lines()
        .skip_while(|l| l.trim() != heading)
        .skip(1)
        .take_while(|l| !l.starts_with('['))
        .filter_map(|l| l.split(['.', '=', ' ']).next())
        .filter(|name| !name.is_empty() && !name.starts_with('#'))
        .map(str::to_owned)
        .collect()
}

#[test]
fn each_crate_uses_only_what_stands_below_it() {
    let ours: Vec<&str> = EDGES.iter().map(|(path, _)| path.rsplit('/').next().expect("named")).collect();
    for (path, allowed) in EDGES {
        let manifest = fs::read_to_string(root().join(path).join("Cargo.toml")).expect("manifest");
        for name in names_under(&manifest, "[dependencies]") {
            assert!(!ours.contains(&name.as_str()) || allowed.contains(&name.as_str()), "{path} must not use {name}");
        }
    }
}

#[test]
fn every_crate_folder_is_in_the_list_of_layers() {
    for entry in fs::read_dir(root().join("app")).expect("app") {
        let path = entry.expect("entry").path();
        if path.is_dir() {
            let name = shown(&path);
            assert!(EDGES.iter().any(|(known, _)| *known == name), "{name} has no row in tests/architecture.rs");
        }
    }
}

#[test]
fn the_engineering_depends_on_libm_alone() {
    let manifest = fs::read_to_string(root().join("app/engineering/Cargo.toml")).expect("manifest");
    assert_eq!(
        names_under(&manifest, "[dependencies]"),
        ["libm", "serde"],
        "serde only as an option, see docs/decisions/0002"
    );
    assert!(manifest.contains("serde = { workspace = true, optional = true }"));
}

#[test]
fn what_a_layer_must_not_know_is_not_in_its_manifest() {
    for (path, absent) in [
        ("app/commissioning", &["rusqlite", "axum", "maud", "tokio"][..]),
        ("app/drawing", &["rusqlite", "axum", "maud", "typst"]),
        ("app/handover", &["rusqlite", "axum", "maud", "store"]),
        ("app/store", &["axum", "maud", "typst"]),
        ("app/exchange", &["rusqlite", "axum", "maud", "typst", "store", "handover"]),
        ("app/web", &["rusqlite", "typst"]),
    ] {
        let manifest = fs::read_to_string(root().join(path).join("Cargo.toml")).expect("manifest");
        for name in names_under(&manifest, "[dependencies]") {
            assert!(!absent.contains(&name.as_str()), "{path} must not know {name}");
        }
    }
}

#[test]
fn every_file_opens_with_what_it_is_for() {
    for path in rust_files() {
        let text = fs::read_to_string(&path).expect("readable");
        let first = text.lines().next().unwrap_or_default();
        assert!(first.starts_with("//! ") && first.len() > 12, "{} opens without a heading", shown(&path));
    }
}

#[test]
fn no_file_is_longer_than_a_thought() {
    for path in rust_files() {
        let lines = fs::read_to_string(&path).expect("readable").lines().count();
        assert!(lines <= LONGEST_FILE, "{} has {lines} lines; split it by thought", shown(&path));
    }
}

#[test]
fn no_file_is_named_after_nothing() {
    for path in rust_files() {
        let stem = path.file_stem().expect("named").to_string_lossy().into_owned();
        assert!(
            !["utils", "util", "helpers", "helper", "common", "misc", "manager", "service", "data", "info"]
                .contains(&stem.as_str()),
            "{}",
            shown(&path)
        );
    }
}

#[test]
fn sql_stands_only_in_the_store() {
    for path in rust_files() {
        let name = shown(&path);
        // Benchmarks compare with a bare database, which needs statements of its own.
        if name.starts_with("app/store/") || name == "tests/architecture.rs" || name.starts_with("tests/bench/") {
            continue;
        }
        let text = fs::read_to_string(&path).expect("readable");
        for word in ["SELECT ", "INSERT INTO", "UPDATE \"", "DELETE FROM", "rusqlite::"] {
            let sql = text.lines().any(|l| l.contains(word) && !l.trim_start().starts_with("//"));
            assert!(!sql, "{name} holds `{word}`");
        }
    }
}

#[test]
fn every_check_is_one_file_with_its_name_and_a_line_in_the_list() {
    let mut files = Vec::new();
    files_under(&root().join("app/engineering/checks"), "rs", &mut files);
    let list = fs::read_to_string(root().join("app/engineering/checks.rs")).expect("list");
    assert!(files.len() >= 32, "the first catalogue has at least 32 checks, found {}", files.len());
    for path in files.iter().filter(|p| p.parent().is_some_and(|d| d.ends_with("checks"))) {
        let stem = path.file_stem().expect("named").to_string_lossy().into_owned();
        let text = fs::read_to_string(path).expect("readable");
        let name = stem.replace('_', "-");
        assert!(text.starts_with(&format!("//! # {name}")), "{} does not open with its check's name", shown(path));
        assert!(text.contains(&format!("NAME: &str = \"{name}\"")), "{} does not bear its name", shown(path));
        assert!(list.contains(&format!("pub mod {stem};")), "{stem} is not in the list");
        assert!(text.contains("#[cfg(test)]"), "{} has no test", shown(path));
    }
}

#[test]
fn unescaped_markup_is_counted() {
    let mut files = Vec::new();
    files_under(&root().join("app/web"), "rs", &mut files);
    let count: usize =
        files.iter().map(|p| fs::read_to_string(p).expect("readable").matches("PreEscaped(").count()).sum();
    assert!(count <= MOST_UNESCAPED, "{count} places pass markup unescaped; {MOST_UNESCAPED} were reviewed");
}

/// Drawings arrive as finished SVG from the drawing crate; nothing else may pass unescaped.
const MOST_UNESCAPED: usize = 4;
