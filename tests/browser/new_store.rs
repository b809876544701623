//! The first day: an empty store is set up with the printed code, people come in, the first drive gets its record.

use super::form::{self, Control, Put};
use super::program::{Program, SignIn};
use super::tablet::Tablet;
use super::{LYING, TURN};

const DRIVE: &str = "/sites/larch-quay/PU-7";

/// A fan motor's plate, invented: 5.5 kW, four poles. Synchronous speed 120 f / p = 1500 r/min; 5500 W over
/// √3 · 400 V · 11.2 A · 0.81 is 0.875: the figures hold together.
const MOTOR: &[(&str, &str)] = &[
    ("machine", "induction"),
    ("volts", "400"),
    ("amps", "11.2"),
    ("hertz", "50"),
    ("rpm", "1455"),
    ("power", "5.5"),
    ("power-factor", "0.81"),
    ("efficiency", "87.7"),
];

#[tokio::test]
async fn a_new_store_gets_its_first_drive() {
    let _turn = TURN.lock().await;
    let folder = tempfile::tempdir().expect("a folder");
    let program = Program::serve(folder.path());
    let tablet = Tablet::new(&program.address, LYING, "new-store").await;
    let chief = SignIn { login: "runa".to_owned(), password: "slate roofs in march rain".to_owned() };
    set_up(&tablet, &program, &chief).await;
    tablet.sign_in(&chief).await;
    tablet.whole_picture("home-empty", LYING).await;
    let code = invite(&tablet).await;
    create(&tablet, "/new-site", &[("name", "Larch Quay works"), ("tag", "larch-quay")], "Create").await;
    tablet.whole_picture("site-sheet", LYING).await;
    tablet.sign_out().await;

    // The engineer comes with the code, chooses a password and makes the drive.
    let engineer = SignIn { login: "aske".to_owned(), password: "eleven geese over a weir".to_owned() };
    create(
        &tablet,
        "/invitation",
        &[("code", &code), ("new", &engineer.password), ("again", &engineer.password)],
        "Set password",
    )
    .await;
    tablet.sign_in(&engineer).await;
    create(&tablet, "/sites/larch-quay/-/new-drive", &[("tag", "PU-7"), ("name", "Condensate pump")], "Create").await;
    assert_eq!(tablet.path().await, DRIVE);
    tablet.whole_picture("drive-empty", LYING).await;
    let motor: Vec<(String, &str)> = MOTOR.iter().map(|(f, v)| (format!("motor.0.{f}"), *v)).collect();
    let motor: Vec<(&str, &str)> = motor.iter().map(|(n, v)| (n.as_str(), *v)).collect();
    tablet.open(&format!("{DRIVE}/motor")).await;
    fill(&tablet, &motor).await;
    tablet.whole_picture("motor", LYING).await;
    tablet.go_by("Record").await;
    assert_eq!(tablet.text(".faults").await, "");
    tablet.open(DRIVE).await;
    assert!(
        !tablet.text("aside").await.contains("outside"),
        "the plate holds together: {}",
        tablet.text("aside").await
    );
    tablet.go_by("Begin the record").await;
    assert!(tablet.path().await.starts_with(&format!("{DRIVE}/steps/")), "{}", tablet.path().await);
    tablet.is_content().await;
}

async fn set_up(tablet: &Tablet, program: &Program, chief: &SignIn) {
    let line =
        program.said.iter().find(|l| l.contains("code: ")).unwrap_or_else(|| panic!("no code in {:?}", program.said));
    let code = line.rsplit("code: ").next().expect("the code").trim();
    tablet.open("/").await;
    assert_eq!(tablet.path().await, "/set-up", "an empty store asks to be set up");
    let said = [
        ("code", code),
        ("firm", "Larch Start-up"),
        ("name", "Runa Vik"),
        ("login", &chief.login),
        ("new", &chief.password),
        ("again", &chief.password),
    ];
    fill(tablet, &said).await;
    tablet.whole_picture("set-up", LYING).await;
    tablet.go_by("Set up").await;
    assert!(tablet.path().await.starts_with("/sign-in"), "{}", tablet.text("main").await);
    tablet.is_content().await;
}

/// Adds the engineer; gives the one-time code.
async fn invite(tablet: &Tablet) -> String {
    create(tablet, "/new-person", &[("name", "Aske Holm"), ("login", "aske")], "Add").await;
    assert_eq!(tablet.path().await, "/people/aske");
    tablet.go_by("Make a one-time code").await;
    tablet.picture("code").await;
    let shown = tablet.one("p.value.code").await.text().await.expect("the code");
    shown.trim().to_owned()
}

/// Opens a page with a form, fills it in, sends it.
async fn create(tablet: &Tablet, path: &str, said: &[(&str, &str)], button: &str) {
    tablet.open(path).await;
    fill(tablet, said).await;
    tablet.go_by(button).await;
    assert_eq!(tablet.text(".faults").await, "", "{path}");
    assert_ne!(tablet.path().await, path, "{path} was taken: {}", tablet.text("main").await);
    tablet.is_content().await;
}

async fn fill(tablet: &Tablet, said: &[(&str, &str)]) {
    let mut put = 0;
    form::fill(tablet, "main form", |c: &Control| match said.iter().find(|(name, _)| *name == c.name) {
        Some((_, value)) => {
            put += 1;
            Put::Value((*value).to_owned())
        }
        None => Put::Nothing,
    })
    .await;
    assert_eq!(put, said.len(), "the form at {} has all of {said:?}", tablet.path().await);
}
