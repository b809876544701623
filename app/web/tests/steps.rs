//! A step through its page: what was typed survives a refusal, a stale form shows both, verdicts follow the typing, order leaves its mark.

use super::job::{DRIVE, begin, fill_sheets, hidden, prepare, view};
use super::world::World;
use axum::http::StatusCode;

pub async fn begun() -> World {
    let mut world = World::new().await;
    prepare(&mut world).await;
    fill_sheets(&world, "ines").await;
    begin(&world, "ines").await;
    world
}

pub const SUPPLY: &str = "/sites/larch-ferry/FN-204/steps/supply-volts";

/// Names of the step's readings as its page has them.
pub fn names(page: &str) -> Vec<String> {
    page.match_indices("inputmode=\"decimal\"")
        .filter_map(|(n, _)| page[..n].rsplit_once("name=\"")?.1.split('"').next().map(str::to_owned))
        .collect()
}

#[tokio::test]
async fn the_limit_stands_there_before_the_reading_and_verdicts_follow_the_typing() {
    let world = begun().await;
    let page = world.get("ines", SUPPLY).await.text;
    assert!(page.contains("class=\"limits\""), "{page}");
    let names = names(&page);
    assert!(names.len() >= 3, "{names:?}");
    let live = |volts: &'static str| names.iter().map(move |n| (n.as_str(), volts)).collect::<Vec<_>>();
    let good = world.post("ines", &format!("{SUPPLY}/live"), &live("400")).await;
    assert_eq!(good.status, StatusCode::OK, "{}", good.text);
    assert!(!good.text.contains("<html") && !good.text.contains("verdict outside"));
    let bad = world.post("ines", &format!("{SUPPLY}/live"), &live("300")).await;
    assert!(bad.text.contains("verdict outside"), "{}", bad.text);
    assert_eq!(view(&world).await.drive.record.as_ref().expect("begun").entries.len(), 0, "judging records nothing");
}

#[tokio::test]
async fn a_wrong_figure_comes_back_as_typed_with_what_would_be_right() {
    let world = begun().await;
    let names = names(&world.get("ines", SUPPLY).await.text);
    let answer = world.post("ines", SUPPLY, &[(names[0].as_str(), "4oo"), (names[1].as_str(), "401")]).await;
    assert_eq!(answer.status, StatusCode::UNPROCESSABLE_ENTITY);
    assert!(
        answer.text.contains("value=\"4oo\"") && answer.text.contains("value=\"401\""),
        "what was typed is still there"
    );
    assert!(answer.text.contains("class=\"error\"") && answer.text.contains("One field needs attention"));
    assert!(
        view(&world).await.drive.record.as_ref().expect("begun").entries.is_empty(),
        "nothing was recorded by half"
    );
}

#[tokio::test]
async fn two_tablets_on_one_reading_get_both_and_lose_neither() {
    let world = begun().await;
    let name = names(&world.get("ines", SUPPLY).await.text)[0].clone();
    let (seen_name, unit_name) = (format!("{name}.seen"), format!("{name}.unit"));
    assert_eq!(
        world.post("ines", SUPPLY, &[(name.as_str(), "398"), (unit_name.as_str(), "V")]).await.status,
        StatusCode::SEE_OTHER
    );
    let old = hidden(&world.get("ines", SUPPLY).await.text, &seen_name);
    assert!(!old.is_empty());
    let send = |volts: &'static str, seen: String| {
        [
            (name.clone(), volts.to_owned()),
            (unit_name.clone(), "V".to_owned()),
            (seen_name.clone(), seen),
            ("reason".to_owned(), "read again".to_owned()),
        ]
    };
    let post = async |who: &str, pairs: &[(String, String)]| {
        let pairs: Vec<(&str, &str)> = pairs.iter().map(|(n, v)| (n.as_str(), v.as_str())).collect();
        world.post(who, SUPPLY, &pairs).await
    };
    assert_eq!(post("max", &send("402", old.clone())).await.status, StatusCode::SEE_OTHER);
    let stale = post("ines", &send("395", old.clone())).await;
    assert_eq!(stale.status, StatusCode::PRECONDITION_FAILED, "{}", stale.text);
    assert!(stale.text.contains("395") && stale.text.contains("402") && stale.text.contains("Max Ode"));
    let untouched = post("ines", &send("398", old)).await;
    assert_eq!(untouched.status, StatusCode::SEE_OTHER, "a field I did not touch is no conflict: {}", untouched.text);
    assert!(world.get("ines", SUPPLY).await.text.contains("value=\"402\""));
}

#[tokio::test]
async fn overwriting_a_reading_asks_why_and_keeps_the_first() {
    let world = begun().await;
    let name = names(&world.get("ines", SUPPLY).await.text)[0].clone();
    let (seen_name, unit_name) = (format!("{name}.seen"), format!("{name}.unit"));
    world.post("ines", SUPPLY, &[(name.as_str(), "398"), (unit_name.as_str(), "V")]).await;
    let seen = hidden(&world.get("ines", SUPPLY).await.text, &seen_name);
    let mut pairs = vec![(name.as_str(), "399"), (unit_name.as_str(), "V"), (seen_name.as_str(), seen.as_str())];
    let refused = world.post("ines", SUPPLY, &pairs).await;
    assert_eq!(refused.status, StatusCode::UNPROCESSABLE_ENTITY);
    assert!(refused.text.contains("Say why this is overwritten") && refused.text.contains("value=\"399\""));
    assert!(
        refused.text.contains("<details class=\"reason\" open>") && refused.text.contains("autofocus"),
        "the box that is asked for lies open and takes the cursor: {}",
        refused.text
    );
    pairs.push(("reason", "read at the wrong terminals"));
    assert_eq!(world.post("ines", SUPPLY, &pairs).await.status, StatusCode::SEE_OTHER);
    let page = world.get("ines", SUPPLY).await.text;
    assert!(page.contains("<s>398 V</s>") && page.contains("reason: read at the wrong terminals"), "{page}");
}

#[tokio::test]
async fn out_of_order_is_kept_with_a_finding_and_settling_otherwise_wants_a_reason() {
    let world = begun().await;
    let path = format!("{DRIVE}/steps/test-voltage");
    let page = world.get("ines", &path).await.text;
    assert!(page.contains("hold point has not been released") && page.contains("Hands inside"), "{page}");
    let answer = world.post("ines", &path, &[("test-voltage.0", "500"), ("test-voltage.0.unit", "V")]).await;
    assert_eq!(answer.status, StatusCode::SEE_OTHER, "{}", answer.text);
    assert!(world.get("ines", &path).await.text.contains("out of order"));
    assert!(world.get("ines", &format!("{DRIVE}/findings")).await.text.contains("before its hold point was released"));

    let otherwise = format!("{DRIVE}/steps/permit/otherwise");
    assert!(world.get("ines", &format!("{otherwise}?how=could-not-be-done")).await.text.contains("stops start-up"));
    let refused = world.post("ines", &otherwise, &[("how", "could-not-be-done"), ("reason", " ")]).await;
    assert_eq!(refused.status, StatusCode::UNPROCESSABLE_ENTITY);
    let settled =
        world.post("ines", &otherwise, &[("how", "could-not-be-done"), ("reason", "no permit office here")]).await;
    assert_eq!(settled.status, StatusCode::SEE_OTHER, "{}", settled.text);
    assert!(world.get("ines", &format!("{DRIVE}/steps/permit")).await.text.contains("no permit office here"));
    assert_eq!(world.post("ines", &format!("{DRIVE}/steps/permit/resume"), &[]).await.status, StatusCode::SEE_OTHER);
    assert!(world.get("ines", &format!("{DRIVE}/hold/insulation")).await.text.contains("not met"));
}

#[tokio::test]
async fn a_reader_sees_a_step_and_cannot_fill_it_in() {
    let world = begun().await;
    let page = world.get("rolf", SUPPLY).await;
    assert_eq!(page.status, StatusCode::OK);
    assert!(!page.text.contains("id=\"step\"") && !page.text.contains("Record and go on"));
    assert_eq!(world.post("rolf", SUPPLY, &[]).await.status, StatusCode::FORBIDDEN);
}

#[tokio::test]
async fn a_form_with_settings_and_entries_is_recorded_whole_or_not_at_all() {
    let world = begun().await;
    let path = format!("{DRIVE}/steps/set-ramps");
    let page = world.get("ines", &path).await.text;
    let span = names(&page).into_iter().find(|n| n.ends_with(".intended")).expect("a setting");
    let unit = format!("{span}.unit");
    let settings = async || view(&world).await.drive.record.as_ref().expect("begun").parameters.len();
    let mut pairs = vec![(span.as_str(), "50"), (unit.as_str(), "Hz"), ("ramps-keyed.0", "perhaps")];
    let refused = world.post("ines", &path, &pairs).await;
    assert_eq!(refused.status, StatusCode::UNPROCESSABLE_ENTITY, "{}", refused.text);
    assert!(refused.text.contains("Nothing was recorded yet"));
    assert_eq!(settings().await, 0, "what the page says is so");
    let act = uuid::Uuid::now_v7().to_string();
    pairs[2].1 = "yes";
    pairs.push(("act", act.as_str()));
    for _ in 0..2 {
        let kept = world.post("ines", &path, &pairs).await;
        assert_eq!(kept.status, StatusCode::SEE_OTHER, "a form sent twice is one: {}", kept.text);
        assert_eq!(settings().await, 1);
    }
}
