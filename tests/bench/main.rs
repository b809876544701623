//! `cargo bench`: every figure is a ratio to a bare baseline, taken alternately in the same run.

#![expect(clippy::expect_used, reason = "a benchmark that cannot go on has nothing better to do than stop")]

mod alternate;
mod bare_formulas;
mod checks;
mod document;
mod pages;
mod saves;
mod start;

fn main() {
    // `cargo test --benches` and `cargo bench -- --list` only want to know that it builds.
    if std::env::args().any(|a| a == "--list" || a == "--test") {
        return;
    }
    let wanted: Vec<String> = std::env::args().skip(1).filter(|a| !a.starts_with('-')).collect();
    let asked = |name: &str| wanted.is_empty() || wanted.iter().any(|w| name.contains(w.as_str()));
    println!("| measure | ours | baseline | ratio | target |\n|---|---|---|---|---|");
    if asked("checks") {
        checks::run();
    }
    if asked("document") {
        document::run();
    }
    if asked("saves") {
        saves::run();
    }
    if asked("start") {
        start::run();
    }
    if asked("pages") {
        pages::run();
    }
}
