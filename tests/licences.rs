//! Every crate that is built in has a licence from the list, and comes from the registry or from this tree.

use std::collections::BTreeSet;
use std::process::Command;

/// Licences that may stand in a crate's expression; one side of an `OR` is enough.
const ACCEPTED: &[&str] = &[
    "MIT",
    "MIT-0",
    "Apache-2.0",
    "Apache-2.0 WITH LLVM-exception",
    "BSD-1-Clause",
    "BSD-2-Clause",
    "BSD-3-Clause",
    "0BSD",
    "ISC",
    "Zlib",
    "BSL-1.0",
    "CC0-1.0",
    "Unlicense",
    "Unicode-3.0",
    "Unicode-DFS-2016",
    "MPL-2.0",
    "CDLA-Permissive-2.0",
    "OFL-1.1",
    "GUST-Font-License",
    "bzip2-1.0.6",
    "NCSA",
];

/// Whether an expression can be met with accepted licences: an `AND` needs all, an `OR` one.
fn acceptable(expression: &str) -> bool {
    let plain = expression.replace(['(', ')'], " ").replace('/', " OR ");
    plain.split(" OR ").any(|choice| choice.split(" AND ").all(|part| ACCEPTED.contains(&part.trim())))
}

#[test]
fn every_dependency_has_an_accepted_licence() {
    let platform = format!("{}-unknown-linux-gnu", std::env::consts::ARCH);
    let output = Command::new(env!("CARGO"))
        .args(["metadata", "--format-version", "1", "--locked", "--offline", "--filter-platform", &platform])
        .current_dir(env!("CARGO_MANIFEST_DIR"))
        .output()
        .expect("cargo runs");
    assert!(output.status.success(), "{}", String::from_utf8_lossy(&output.stderr));
    let metadata: serde_json::Value = serde_json::from_slice(&output.stdout).expect("metadata is JSON");
    let packages = metadata["packages"].as_array().expect("packages");
    assert!(packages.len() > 100, "the whole tree is there");
    let mut refused = BTreeSet::new();
    for package in packages {
        let name = package["name"].as_str().unwrap_or_default();
        let source = package["source"].as_str().unwrap_or("here");
        assert!(source == "here" || source.starts_with("registry+"), "{name} comes from {source}");
        let licence = package["license"].as_str().unwrap_or_default();
        if !acceptable(licence) {
            refused.insert(format!("{name}: “{licence}”"));
        }
    }
    assert!(refused.is_empty(), "licences to look at: {refused:#?}");
}

#[test]
fn expressions_are_read_as_they_are_written() {
    assert!(acceptable("MIT OR Apache-2.0"));
    assert!(acceptable("GPL-3.0 OR MIT"));
    assert!(acceptable("(MIT OR Apache-2.0) AND Unicode-3.0"));
    assert!(!acceptable("GPL-3.0-only"));
    assert!(!acceptable("MIT AND GPL-3.0-only"));
    assert!(!acceptable(""));
}

/// `deny.toml` is what cargo-deny reads where it is installed: it must say what this test says.
#[test]
fn the_list_for_cargo_deny_is_this_list() {
    let path = concat!(env!("CARGO_MANIFEST_DIR"), "/deny.toml");
    let deny: toml::Table = toml::from_str(&std::fs::read_to_string(path).expect("deny.toml")).expect("TOML");
    let allowed = deny["licenses"]["allow"].as_array().expect("a list").iter();
    let allowed: BTreeSet<&str> = allowed.map(|l| l.as_str().expect("text")).collect();
    assert_eq!(allowed, ACCEPTED.iter().copied().collect());
    for kind in ["unknown-registry", "unknown-git"] {
        assert_eq!(deny["sources"][kind].as_str(), Some("deny"), "{kind}");
    }
    let lock = std::fs::read_to_string(concat!(env!("CARGO_MANIFEST_DIR"), "/Cargo.lock")).expect("Cargo.lock");
    let banned = deny["bans"]["deny"].as_array().expect("a list");
    assert!(!banned.is_empty());
    for entry in banned {
        let name = entry["crate"].as_str().expect("a name");
        assert!(!lock.contains(&format!("name = \"{name}\"\n")), "{name} is banned and built in");
    }
}
