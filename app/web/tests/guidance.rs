//! What a page says beyond its fields: why one stays at a step, what waits for an answer, what is folded, what stood before.

use super::every_page::is_sound;
use super::job::{DRIVE, hidden, pairs_of, view};
use super::steps::{SUPPLY, begun, names};
use super::world::{Answer, World};
use axum::http::StatusCode;

/// Fills the supply step in with these volts everywhere.
pub async fn supply(world: &World, volts: &str) -> Answer {
    let now = view(world).await;
    let (_, step) = now.procedure.step("supply-volts").expect("listed");
    let mut pairs = pairs_of(&now, step);
    for (name, value) in &mut pairs {
        if !name.ends_with(".unit") && !name.ends_with(".instrument") && value.parse::<f64>().is_ok() {
            volts.clone_into(value);
        }
    }
    pairs.push(("reason".to_owned(), "read again".to_owned()));
    let page = world.get("ines", SUPPLY).await.text;
    let seen: Vec<(String, String)> =
        names(&page).iter().map(|n| (format!("{n}.seen"), hidden(&page, &format!("{n}.seen")))).collect();
    let pairs: Vec<(&str, &str)> = pairs.iter().chain(&seen).map(|(n, v)| (n.as_str(), v.as_str())).collect();
    world.post("ines", SUPPLY, &pairs).await
}

#[tokio::test]
async fn a_step_with_something_outside_is_not_left_unseen() {
    let world = begun().await;
    let bad = supply(&world, "300").await;
    assert_eq!((bad.status, bad.location()), (StatusCode::SEE_OTHER, format!("{SUPPLY}?recorded=whole").as_str()));
    let page = world.get("ines", bad.location()).await.text;
    is_sound(SUPPLY, &page);
    assert!(page.contains("Outside here:") && page.contains("Supply voltage"), "{page}");
    assert!(page.contains("/findings?step=supply-volts#raise") && page.contains("Next step: "), "{page}");
    assert!(!world.get("rolf", bad.location()).await.text.contains("Outside here:"), "only for who can act on it");
    let good = supply(&world, "400").await;
    assert!(good.status == StatusCode::SEE_OTHER && !good.location().starts_with(SUPPLY), "{}", good.location());
}

#[tokio::test]
async fn another_instrument_alone_asks_for_a_reason_and_keeps_the_choice() {
    let world = begun().await;
    let page = world.get("ines", SUPPLY).await.text;
    let name = names(&page)[0].clone();
    let (seen, unit) = (format!("{name}.seen"), format!("{name}.unit"));
    world.post("ines", SUPPLY, &[(name.as_str(), "398"), (unit.as_str(), "V")]).await;
    let stood = hidden(&world.get("ines", SUPPLY).await.text, &seen);
    let meter = view(&world).await.installation.instruments.keys().next().expect("one").to_string();
    let answer = world
        .post(
            "ines",
            SUPPLY,
            &[
                (name.as_str(), "398"),
                (unit.as_str(), "V"),
                (seen.as_str(), stood.as_str()),
                ("instrument.voltage", meter.as_str()),
                ("instrument.voltage.shown", ""),
            ],
        )
        .await;
    assert_eq!(answer.status, StatusCode::UNPROCESSABLE_ENTITY, "{}", answer.text);
    assert!(answer.text.contains("<details class=\"reason\" open>") && answer.text.contains("autofocus"));
    assert!(answer.text.contains(&format!("value=\"{meter}\" selected")) && answer.text.contains("value=\"398\""));
}

#[tokio::test]
async fn readings_recorded_together_say_so_once() {
    let world = begun().await;
    supply(&world, "400").await;
    let page = world.get("ines", SUPPLY).await.text;
    assert_eq!(page.matches("recorded 2026-11-17 12:00 UTC · Ines Lund").count(), 1, "{page}");
}

#[tokio::test]
async fn options_that_nobody_stated_are_asked_for_until_they_are() {
    let world = begun().await;
    let waiting = async || crate::unanswered::of(&view(&world).await.view());
    let before = waiting().await;
    let page = world.get("ines", DRIVE).await.text;
    assert!(
        before.steps > 1
            && page.contains(&format!("{} steps wait for an answer: which options are fitted?", before.steps))
    );
    assert!(page.contains(&format!("<a href=\"{DRIVE}/drive\">Drive in the plant</a>")), "{page}");
    let answer = world.post("ines", &format!("{DRIVE}/drive"), &[("drive.0.separate-fan", "no")]).await;
    assert_eq!(answer.status, StatusCode::SEE_OTHER, "{}", answer.text);
    let after = waiting().await;
    assert!(after.steps < before.steps, "answered with no it waits no longer: {after:?}");
    let labels = |u: &crate::unanswered::Unanswered| u.questions.iter().map(|(_, l)| l.len()).sum::<usize>();
    assert_eq!(labels(&after) + 1, labels(&before));
    world.post("ines", &format!("{DRIVE}/drive"), &[("drive.0.anti-condensation-heater", "yes")]).await;
    assert!(waiting().await.steps < after.steps, "answered with yes its steps are there");
}

#[tokio::test]
async fn how_a_step_was_once_settled_otherwise_stays_readable() {
    let world = begun().await;
    let path = format!("{DRIVE}/steps/permit");
    let pairs = [("how", "could-not-be-done"), ("reason", "office shut on Sundays")];
    assert_eq!(world.post("ines", &format!("{path}/otherwise"), &pairs).await.status, StatusCode::SEE_OTHER);
    assert_eq!(world.post("ines", &format!("{path}/resume"), &[]).await.status, StatusCode::SEE_OTHER);
    for page in [path, format!("{DRIVE}/record")] {
        let text = world.get("tor", &page).await.text;
        is_sound(&page, &text);
        assert!(
            text.contains("<s>could not be done: office shut on Sundays</s>") && text.contains("taken back "),
            "{page}"
        );
    }
}

#[tokio::test]
async fn the_record_is_folded_by_phases_and_the_whole_of_it_is_one_tap_away() {
    let world = begun().await;
    let folds = |page: &str| {
        let closed = page.matches("<details class=\"report-fold\">").count();
        (closed, page.matches("<details class=\"report-fold\" open>").count())
    };
    let plain = world.get("tor", &format!("{DRIVE}/record")).await.text;
    let (closed, open) = folds(&plain);
    assert!(closed > 5, "what nobody has begun is folded: {closed} closed, {open} open");
    assert!(plain.contains("steps settled</span>") && plain.contains("/record?whole=yes"));
    for query in ["whole=yes", "working=all"] {
        let whole = world.get("tor", &format!("{DRIVE}/record?{query}")).await.text;
        is_sound(query, &whole);
        assert_eq!(folds(&whole), (0, closed + open), "{query}");
    }
    supply(&world, "300").await;
    let outside = world.get("tor", &format!("{DRIVE}/record")).await.text;
    let phase = outside
        .split("<details class=\"report-fold\"")
        .find(|p| p.contains("id=\"step-supply-volts\""))
        .expect("there");
    assert!(phase.starts_with(" open>"), "what is outside lies open");
}

#[tokio::test]
async fn a_setting_that_has_its_value_is_one_line() {
    let world = begun().await;
    let path = format!("{DRIVE}/steps/set-ramps");
    let page = world.get("ines", &path).await.text;
    let all = page.matches("<details class=\"param\" open>").count();
    assert!(all > 3 && page.contains(&format!("0 of {all} functions have an intended value")), "{page}");
    let set = [
        ("acceleration-time.intended", "20"),
        ("acceleration-time.intended.unit", "s"),
        ("acceleration-time.code", "row 12"),
    ];
    let kept = world.post("ines", &format!("{DRIVE}/parameters/ramps-and-stopping"), &set).await;
    assert_eq!(kept.location(), format!("{DRIVE}/parameters?saved=2&of=ramps-and-stopping#group-ramps-and-stopping"));
    let list = world.get("ines", kept.location()).await.text;
    assert!(
        list.contains("Saved: ramps and stopping, 2 values changed.")
            && list.contains("id=\"group-ramps-and-stopping\"")
    );
    let page = world.get("ines", &path).await.text;
    assert_eq!(page.matches("<details class=\"param\" open>").count(), all - 1);
    assert!(
        page.contains("row 12 · intended 20 s · 2 of 5 filled in") && page.contains(&format!("1 of {all} functions"))
    );
    let left = world.get("ines", &format!("{DRIVE}/steps/settings-as-left")).await.text;
    is_sound("settings-as-left", &left);
    assert!(left.contains("1 of 1 to be entered as left"), "{left}");
}
