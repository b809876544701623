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
    tablet.tap_words("Begin the record").await;
    let step = tablet.path().await;
    assert!(step.ends_with("/steps/permit"), "the first step is next: {step}");
    let loaded = tablet.web.execute("return document.scripts.length > 0 && performance.getEntriesByType('resource').some(e => e.name.endsWith('.js'))", vec![]).await;
    assert!(!loaded.expect("answers").convert::<bool>().expect("yes or no"), "the page's script did not run");
    form::fill(&tablet, "#step", |c| {
        if c.name == "permit-reference.0" { Put::Value("Permit 77, shift office".to_owned()) } else { Put::Nothing }
    })
    .await;
    tablet.tap_words("Record and go on").await;
    assert_ne!(tablet.path().await, step, "it goes on: {}", tablet.text("main").await);
    tablet.open(&step).await;
    let kept = tablet.one("[name='permit-reference.0']").await.prop("value").await.expect("a value");
    assert_eq!(kept.as_deref(), Some("Permit 77, shift office"));
    assert!(tablet.text("#step .state").await.starts_with("recorded "), "and says so");
    tablet.picture("recorded").await;
}
