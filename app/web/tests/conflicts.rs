//! Two tablets on one drive: mine and theirs are both shown; whichever is chosen, nothing is lost; a double send is one act.

use super::world::World;
use axum::http::StatusCode;

const MOTOR: &str = "/sites/larch-ferry/FN-204/motor";

/// What the page's form would send for a field it shows: text and the events it had seen.
async fn seen(world: &World, name: &str) -> String {
    let page = world.get("ines", MOTOR).await.text;
    let mark = format!("name=\"{name}.seen\" value=\"");
    page.split_once(&mark).map(|(_, rest)| rest.split('"').next().unwrap_or_default().to_owned()).unwrap_or_default()
}

#[tokio::test]
async fn a_stale_form_shows_mine_and_theirs_and_keeps_what_is_chosen() {
    let world = World::new().await;
    assert_eq!(world.post("ines", MOTOR, &[("motor.0.rpm", "1470")]).await.status, StatusCode::SEE_OTHER);
    let old = seen(&world, "motor.0.rpm").await;
    assert!(!old.is_empty());
    let theirs = [("motor.0.rpm", "1475"), ("motor.0.rpm.seen", old.as_str())];
    assert_eq!(world.post("ines", MOTOR, &theirs).await.status, StatusCode::SEE_OTHER);

    let mine = [("motor.0.rpm", "1465"), ("motor.0.rpm.seen", old.as_str()), ("motor.0.maker", "Vessel")];
    let page = world.post("ines", MOTOR, &mine).await;
    assert_eq!(page.status, StatusCode::PRECONDITION_FAILED, "{}", page.text);
    assert!(page.text.contains("1465") && page.text.contains("1475") && page.text.contains("Ines Lund"));
    assert!(page.text.contains("name=\"motor.0.maker\" value=\"Vessel\""), "the rest of the form goes along");

    let fresh = seen(&world, "motor.0.rpm").await;
    let keep = |choice: &'static str| {
        [
            ("motor.0.rpm", "1465"),
            ("motor.0.rpm.seen", fresh.as_str()),
            ("motor.0.maker", "Vessel"),
            ("motor.0.rpm.keep", choice),
        ]
        .to_vec()
    };
    assert_eq!(world.post("ines", MOTOR, &keep("theirs")).await.status, StatusCode::SEE_OTHER);
    let after = world.get("ines", MOTOR).await.text;
    assert!(after.contains("value=\"1475\"") && after.contains("value=\"Vessel\""));
    assert_eq!(world.post("ines", MOTOR, &keep("mine")).await.status, StatusCode::SEE_OTHER);
    let after = world.get("ines", MOTOR).await.text;
    assert!(
        after.contains("value=\"1465\"") && after.contains("<s>1475 rpm</s>"),
        "theirs is among the earlier values"
    );
}

#[tokio::test]
async fn a_field_i_did_not_touch_is_never_a_conflict() {
    let world = World::new().await;
    world.post("ines", MOTOR, &[("motor.0.rpm", "1470")]).await;
    let old = seen(&world, "motor.0.rpm").await;
    world.post("ines", MOTOR, &[("motor.0.rpm", "1475"), ("motor.0.rpm.seen", old.as_str())]).await;
    // My form still shows 1470; I only enter the maker.
    let answer = world
        .post(
            "ines",
            MOTOR,
            &[
                ("motor.0.rpm", "1470"),
                ("motor.0.rpm.unit", "rpm"),
                ("motor.0.rpm.seen", old.as_str()),
                ("motor.0.maker", "Vessel"),
            ],
        )
        .await;
    assert_eq!(answer.status, StatusCode::SEE_OTHER, "{}", answer.text);
    let page = world.get("ines", MOTOR).await.text;
    assert!(page.contains("value=\"1475\"") && page.contains("value=\"Vessel\""));
}

#[tokio::test]
async fn the_same_form_sent_five_times_is_one_act_and_with_other_content_none() {
    let world = World::new().await;
    let act = uuid::Uuid::now_v7().to_string();
    for _ in 0..5 {
        let answer = world
            .post("ines", "/sites/larch-ferry/-/new-drive", &[("act", &act), ("tag", "PU-101"), ("name", "Feed pump")])
            .await;
        assert_eq!(
            (answer.status, answer.location()),
            (StatusCode::SEE_OTHER, "/sites/larch-ferry/PU-101"),
            "{}",
            answer.text
        );
    }
    let other = world
        .post("ines", "/sites/larch-ferry/-/new-drive", &[("act", &act), ("tag", "PU-102"), ("name", "Feed pump")])
        .await;
    assert_eq!(other.status, StatusCode::UNPROCESSABLE_ENTITY);
    let found = world.get("ines", "/find?q=PU-10").await.text;
    assert!(found.contains("PU-101") && !found.contains("PU-102"));
}
