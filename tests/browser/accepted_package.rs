//! The whole job: an engineer takes the fresh drive through every step and signs, a supervisor accepts, the package verifies.

use super::answers::{Answers, DRIVE};
use super::form::{self, Put};
use super::program::{Program, asleft};
use super::tablet::Tablet;
use super::{LYING, SITE, TURN, UPRIGHT, walk};
use std::fs::File;
use std::path::{Path, PathBuf};
use std::time::{Duration, Instant};
use thirtyfour::prelude::*;

/// Steps of which a picture is kept.
const PICTURES: &[&str] = &[
    "permit",
    "prove-dead",
    "motor-nameplate",
    "terminal-links",
    "insulation-to-earth",
    "winding-resistance",
    "bus-voltage",
    "set-motor-data",
    "set-limits",
    "uncoupled-run",
    "reference-scaling",
    "load-run",
    "vibration",
    "settings-as-left",
];

const FINDING: &str = "The lamp over panel W2 is dark; the terminal's electrician will replace it.";

#[tokio::test]
async fn a_fresh_drive_becomes_an_accepted_package() {
    let _turn = TURN.lock().await;
    let demo = Program::demo();
    let (engineer, supervisor) = (demo.person("startup engineer"), demo.person("supervisor"));
    let tablet = Tablet::new(&demo.address, UPRIGHT, "job").await;

    // The engineer, tablet upright in hand.
    tablet.sign_in(&engineer).await;
    tablet.open(SITE).await;
    let to_drive = tablet.one(&format!("main a[href='{DRIVE}']")).await;
    tablet.go(&to_drive).await;
    tablet.go_by("Begin the record").await;
    let mut answers = Answers::read();
    answers.picture = tablet.picture("links").await.to_str().expect("a plain path").to_owned();
    let passed = walk::to_the_signature(&tablet, &mut answers, PICTURES).await;
    assert!(passed.steps.len() > 80, "a whole procedure: {passed:?}");
    assert!(passed.holds.len() >= 4, "with its hold points: {passed:?}");
    raise(&tablet).await;
    sign(&tablet, "sign", &engineer.password).await;
    tablet.sign_out().await;

    // The supervisor, tablet on the desk.
    tablet.turn(LYING).await;
    tablet.sign_in(&supervisor).await;
    tablet.open("/queue").await;
    tablet.picture("queue").await;
    let review = tablet.one(&format!("ol.queue a.go[href='{DRIVE}/record']")).await;
    tablet.go(&review).await;
    tablet.whole_picture("record", LYING).await;
    assert!(tablet.text("article.report").await.contains(FINDING), "the finding stands in the record");
    tablet.is_content().await;
    accept_finding(&tablet).await;
    tablet.open(&format!("{DRIVE}/record")).await;
    tablet.go_by("Accept …").await;
    sign(&tablet, "accept", &supervisor.password).await;
    tablet.go_by("Handover package").await;
    tablet.picture("package").await;
    tablet.tap(&tablet.words("Download the package").await).await;
    let package = downloaded(tablet.downloads.path());
    tablet.is_content().await;

    // The receiver, years later, without the store.
    verifies(&package);
    let unpacked = unpack(&package);
    verifies(unpacked.path());
}

/// Raises what has to be closed before handover.
async fn raise(tablet: &Tablet) {
    tablet.open(&format!("{DRIVE}/findings")).await;
    form::fill(tablet, &format!("form[action='{DRIVE}/findings']"), |c| match c.name.as_str() {
        "severity" => Put::Value("before-handover".to_owned()),
        "text" => Put::Value(FINDING.to_owned()),
        _ => Put::Nothing,
    })
    .await;
    tablet.go_by("Raise the finding").await;
    tablet.is_content().await;
}

/// The signature: what is signed, the password, and back at the drive.
async fn sign(tablet: &Tablet, page: &str, password: &str) {
    if !tablet.path().await.ends_with(page) {
        tablet.open(&format!("{DRIVE}/{page}")).await;
    }
    tablet.whole_picture(page, LYING).await;
    tablet.one("main input[name=password]").await.send_keys(password).await.expect("types");
    tablet.go_by("Sign").await;
    assert_eq!(tablet.path().await, DRIVE, "{}", tablet.text("main").await);
    tablet.is_content().await;
}

/// The supervisor accepts the finding by name, with a reason.
async fn accept_finding(tablet: &Tablet) {
    tablet.open(&format!("{DRIVE}/findings")).await;
    let links = tablet.web.find_all(By::Css(format!("main a[href^='{DRIVE}/findings/']"))).await.expect("links");
    tablet.go(links.first().expect("the finding")).await;
    tablet
        .one("textarea[name=reason]")
        .await
        .send_keys("It lights a corridor and takes no part in the drive's work.")
        .await
        .expect("types");
    tablet.go_by("Accept the finding").await;
    tablet.is_content().await;
}

/// The file that the browser saved.
fn downloaded(folder: &Path) -> PathBuf {
    let begun = Instant::now();
    while begun.elapsed() < Duration::from_secs(90) {
        let files = std::fs::read_dir(folder).expect("the folder").map(|f| f.expect("a file").path());
        if let Some(done) = files.into_iter().find(|f| f.extension().is_some_and(|e| e == "zip")) {
            return done;
        }
        std::thread::sleep(Duration::from_millis(200));
    }
    panic!("nothing was saved in {}", folder.display());
}

fn verifies(package: &Path) {
    let checked = asleft().arg("verify").arg(package).output().expect("runs");
    let said = [checked.stdout, checked.stderr].map(|words| String::from_utf8_lossy(&words).into_owned()).concat();
    assert_eq!(checked.status.code(), Some(0), "{said}");
    assert!(said.contains("P-110") && said.contains("Nothing was changed."), "{said}");
}

fn unpack(package: &Path) -> tempfile::TempDir {
    let folder = tempfile::tempdir().expect("a folder");
    let mut archive = zip::ZipArchive::new(File::open(package).expect("the package")).expect("a zip file");
    archive.extract(folder.path()).expect("unpacks");
    let pdf = folder.path().join("handover.pdf");
    let inside =
        std::fs::read_dir(folder.path()).expect("the folder").map(|f| f.expect("a file").path()).find(|p| p.is_dir());
    let pdf = if pdf.exists() { pdf } else { inside.unwrap_or_default().join("handover.pdf") };
    let kept = Path::new(env!("CARGO_TARGET_TMPDIR")).join("screenshots/job/handover.pdf");
    std::fs::copy(pdf, kept).expect("the document is there");
    folder
}
