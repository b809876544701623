//! A full record's package document against headless Chromium printing a page with the same record's text.

use super::alternate;
use commissioning::Timestamp;
use commissioning::record::canonical::RecordFile;
use handover::material::Material;
use std::process::Command;
use store::Store;

/// A store with the demo site, and when "now" is in it.
pub fn demo() -> (Store, Timestamp, seed_demo::Demo) {
    let now = Timestamp::parse("2026-11-30T16:00:00Z").expect("a moment");
    let store = Store::in_memory(now).expect("a store");
    let demo = seed_demo::load(&store, now).expect("the demo loads");
    (store, now, demo)
}

/// The record of the demo's accepted drive.
pub fn accepted() -> RecordFile {
    material().record
}

fn material() -> Material {
    let (store, _, demo) = demo();
    let runtime = tokio::runtime::Builder::new_current_thread().enable_all().build().expect("a runtime");
    let board = runtime
        .block_on(async {
            let site = store.site_by_tag(&demo.site_tag).await?.expect("the demo's site");
            store
                .board(
                    site.id,
                    store::BoardFilter { status: Some(store::StatusKey::Accepted), ..store::BoardFilter::default() },
                )
                .await
        })
        .expect("the board");
    let drive = board.rows.first().expect("one drive is accepted").drive;
    runtime.block_on(web::packaging::material(&store, drive)).expect("material").expect("the drive")
}

pub fn run() {
    let material = material();
    let folder = tempfile::tempdir().expect("a folder");
    let key = handover::key::load_or_create(&folder.path().join("key.pem")).expect("a key");
    let begun = std::time::Instant::now();
    let first = handover::package::assemble(&material, &key).expect("assembles");
    println!("| package, first in the process | {:.3?} | | | |", begun.elapsed());
    let page = folder.path().join("page.html");
    let rows: String =
        page_text(first.document(), folder.path()).lines().map(|l| format!("<tr><td>{l}</td></tr>")).collect();
    std::fs::write(&page, format!("<!doctype html><meta charset=utf-8><table>{rows}</table>")).expect("a page");
    let both = alternate::medians(
        5,
        || {
            handover::package::assemble(&material, &key).expect("assembles");
        },
        || {
            let printed = Command::new("chromium")
                .args([
                    "--headless",
                    "--no-sandbox",
                    "--disable-gpu",
                    "--no-first-run",
                    "--disable-background-networking",
                ])
                .arg(format!("--user-data-dir={}", folder.path().join("profile").display()))
                .arg(format!("--print-to-pdf={}", folder.path().join("printed.pdf").display()))
                .arg(format!("file://{}", page.display()))
                .output()
                .expect("chromium runs");
            assert!(printed.status.success());
        },
    );
    alternate::line("package of a full record (baseline: Chromium prints a table of the same text)", &both, "≤ 1/3");
}

/// The document's text, escaped for a page.
fn page_text(pdf: &[u8], folder: &std::path::Path) -> String {
    let path = folder.join("document.pdf");
    std::fs::write(&path, pdf).expect("a document");
    let output = Command::new("pdftotext").arg("-layout").arg(&path).arg("-").output().expect("pdftotext runs");
    String::from_utf8_lossy(&output.stdout).replace('&', "&amp;").replace('<', "&lt;")
}
