//! An old or locked-down tablet: without script, an entry is recorded by a plain form.

use super::form::{self, Put};
use super::program::Program;
use super::tablet::Tablet;
use super::{SITE, TURN, UPRIGHT};

#[tokio::test]
async fn an_entry_is_recorded_without_script() {
    let _turn = TURN.lock().await;
    let demo = Program::demo();
    let engineer = demo.person("startup engineer");
    let tablet = Tablet::new(&demo.address, UPRIGHT, "plain").await;
    tablet.devtools("Emulation.setScriptExecutionDisabled", serde_json::json!({ "value": true })).await;
    tablet.sign_in(&engineer).await;
    tablet.open(&format!("{SITE}/P-110")).await;
    tablet.go_by("Begin the record").await;
    let step = tablet.path().await;
    assert!(step.ends_with("/steps/permit"), "the first step is next: {step}");
    // Where the page's script runs, it marks a form that is being sent.
    let marked = "const form = document.querySelector('#step'); form.dispatchEvent(new Event('submit', { cancelable: true })); return form.dataset.sent !== undefined";
    let marked: bool = tablet.web.execute(marked, vec![]).await.and_then(|a| a.convert()).expect("yes or no");
    assert!(!marked, "the page's script does not run");
    form::fill(&tablet, "#step", |c| {
        if c.name == "permit-reference.0" { Put::Value("Permit 77, shift office".to_owned()) } else { Put::Nothing }
    })
    .await;
    tablet.go_by("Record and go on").await;
    assert_ne!(tablet.path().await, step, "it goes on: {}", tablet.text("main").await);
    tablet.open(&step).await;
    let kept = tablet.one("[name='permit-reference.0']").await.prop("value").await.expect("a value");
    assert_eq!(kept.as_deref(), Some("Permit 77, shift office"));
    assert!(tablet.text("#step .state").await.starts_with("recorded "), "and says so");
    tablet.picture("recorded").await;
}
