//! Keeps docs/engineering-basis equal to the headings of the checks and to the sources they cite; writes it when asked.

use std::fmt::Write as _;
use std::fs;
use std::path::{Path, PathBuf};

fn root() -> PathBuf {
    PathBuf::from(env!("CARGO_MANIFEST_DIR"))
}

fn rust_files(folder: &str) -> Vec<PathBuf> {
    let mut files: Vec<PathBuf> = fs::read_dir(root().join(folder))
        .expect("the folder is there")
        .map(|e| e.expect("entry").path())
        .filter(|p| p.extension().is_some_and(|e| e == "rs"))
        .collect();
    files.sort();
    files
}

/// The `//!` lines that open a file.
fn heading(path: &Path) -> String {
    let text = fs::read_to_string(path).expect("readable");
    text.lines()
        .take_while(|l| l.starts_with("//!"))
        .map(|l| l.trim_start_matches("//!").strip_prefix(' ').unwrap_or_default().to_owned() + "\n")
        .collect()
}

fn checks_page() -> String {
    let mut page = String::from(
        "# The checks\n\nEvery check of the catalogue: what it compares, with which formula and limit, from which source, and what it \
         assumes. This page is made from the headings of the checks themselves.\n",
    );
    let _ = writeln!(page, "\nCatalogue version {}.", engineering::CATALOGUE_VERSION);
    for file in rust_files("app/engineering/checks") {
        let _ = write!(page, "\n{}", heading(&file).replacen("# ", "## ", 1));
    }
    page
}

/// The text between `key: "` and the closing quotation mark, line joins taken out.
fn quoted(block: &str, key: &str) -> Option<String> {
    let after = block.split_once(&format!("{key}: \""))?.1;
    let mut text = String::new();
    let mut characters = after.chars();
    while let Some(c) = characters.next() {
        match c {
            '"' => return Some(text),
            '\\' => match characters.next()? {
                '\n' => {
                    let rest = characters.as_str().trim_start();
                    characters = rest.chars();
                }
                other => text.push(other),
            },
            other => text.push(other),
        }
    }
    None
}

fn sources_page() -> String {
    let mut page = String::from(
        "# The sources\n\nEvery published source that a check cites, with how far it was confirmed. Nobody here had the standards open: \
         the governing document is always the standard itself, in the edition that applies at the site. This page is made from the \
         source constants of the engineering crate.\n",
    );
    let mut rows = 0;
    for file in rust_files("app/engineering/sources") {
        let text = fs::read_to_string(&file).expect("readable");
        let area = file.file_stem().expect("named").to_string_lossy().replace('_', " ");
        let _ =
            write!(page, "\n## {area}\n\n| id | source | confirmed | safety may depend on it |\n|---|---|---|---|\n");
        for block in text.split("Source {").skip(1) {
            let (Some(id), Some(words)) = (quoted(block, "id"), quoted(block, "text")) else { continue };
            let status =
                block.split_once("Status::").map_or("", |(_, s)| s.split([',', '}', ' ']).next().unwrap_or_default());
            let status = match status {
                "Confirmed" => engineering::Status::Confirmed,
                "Arithmetic" => engineering::Status::Arithmetic,
                "Memory" => engineering::Status::Memory,
                "Maker" => engineering::Status::Maker,
                "CommonPractice" => engineering::Status::CommonPractice,
                other => panic!("{id} has the unknown status `{other}`"),
            };
            let safety = if block.split('}').next().unwrap_or_default().contains("safety: true") { "yes" } else { "" };
            let _ = writeln!(page, "| {id} | {words} | {} | {safety} |", status.words());
            rows += 1;
        }
    }
    assert!(rows > 60, "only {rows} sources were found");
    page
}

#[test]
fn the_pages_are_what_the_code_says() {
    for (name, page) in [("checks.md", checks_page()), ("sources.md", sources_page())] {
        let path = root().join("docs/engineering-basis").join(name);
        if std::env::var_os("ASLEFT_WRITE_DOCS").is_some() {
            fs::create_dir_all(path.parent().expect("folder")).expect("folder");
            fs::write(&path, &page).expect("written");
        }
        let kept = fs::read_to_string(&path).unwrap_or_default();
        assert!(kept == page, "docs/engineering-basis/{name} is out of date: write it anew with ASLEFT_WRITE_DOCS=1");
    }
}
