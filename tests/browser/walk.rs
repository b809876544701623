//! Goes from step to step by the page's own main button until the signature is next.

use super::answers::Answers;
use super::form::{self, Kind, Put};
use super::tablet::Tablet;

/// A record has about a hundred steps; more pages than this means going in circles.
const FAR_ENOUGH: usize = 220;

/// What was passed on the way.
#[derive(Debug, Default)]
pub struct Passed {
    pub steps: Vec<String>,
    pub holds: Vec<String>,
}

/// Walks from the page on screen; `pictures` are the steps of which a picture is kept.
pub async fn to_the_signature(tablet: &Tablet, answers: &mut Answers, pictures: &[&str]) -> Passed {
    let mut passed = Passed::default();
    for _ in 0..FAR_ENOUGH {
        let path = tablet.path().await;
        tablet.is_content().await;
        let faults = tablet.text(".faults").await;
        assert!(faults.is_empty(), "{path} was sent back: {faults}");
        assert!(!path.contains("recorded="), "{path} is not settled: {}", tablet.text("main").await);
        if path.ends_with("/sign") {
            return passed;
        } else if let Some((_, phase)) = path.split_once("/hold/") {
            release(tablet, phase, &mut passed).await;
        } else if let Some((_, step)) = path.split_once("/steps/") {
            take(tablet, step, answers, pictures).await;
            assert!(!passed.steps.contains(&step.to_owned()), "{step} comes a second time");
            passed.steps.push(step.to_owned());
        } else {
            panic!("{path} is neither step nor hold point nor signature");
        }
    }
    panic!("no end after {FAR_ENOUGH} pages: {passed:?}");
}

async fn release(tablet: &Tablet, phase: &str, passed: &mut Passed) {
    assert!(!passed.holds.contains(&phase.to_owned()), "{phase} is not released: {}", tablet.text("main").await);
    let form = "main form";
    form::fill(tablet, form, |c| if c.kind == Kind::Tick { Put::Value("yes".to_owned()) } else { Put::Nothing }).await;
    tablet.picture(&format!("hold-{phase}")).await;
    tablet.go_by("Release the hold point").await;
    passed.holds.push(phase.to_owned());
}

async fn take(tablet: &Tablet, step: &str, answers: &mut Answers, pictures: &[&str]) {
    let pictured = pictures.contains(&step);
    let main = tablet.text("footer.actions .go").await;
    if main == "Record and go on" {
        let controls = form::controls(tablet, "#step").await;
        let names: Vec<String> = controls.iter().map(|c| c.name.clone()).collect();
        for control in &controls {
            if let Put::Value(value) = answers.at(step, control, &names) {
                form::put(tablet, "#step", control, &value).await;
            }
        }
    }
    if pictured {
        tablet.picture(&format!("step-{step}")).await;
    }
    let button = tablet.one("footer.actions .go").await;
    tablet.go(&button).await;
}
