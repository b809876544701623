//! Words in place of boxes, keys and symbols: what a reader sees, what a check is called, how counts and moments are said.

use super::job::{DRIVE, pairs_of, view};
use super::steps::begun;
use crate::components::{check_title, counts};
use axum::http::StatusCode;
use engineering::Verdict;

/// What stands between the head and the foot of a page.
fn main_of(page: &str) -> &str {
    page.split_once("<main").and_then(|(_, rest)| rest.split_once("</main>")).expect("a page").0
}

#[tokio::test]
async fn a_reader_is_shown_words_and_no_boxes() {
    let world = begun().await;
    let now = view(&world).await;
    for id in ["permit", "supply-volts"] {
        let (_, step) = now.procedure.step(id).expect("listed");
        let pairs = pairs_of(&now, step);
        let pairs: Vec<(&str, &str)> = pairs.iter().map(|(n, v)| (n.as_str(), v.as_str())).collect();
        let answer = world.post("ines", &format!("{DRIVE}/steps/{id}"), &pairs).await;
        assert_eq!(answer.status, StatusCode::SEE_OTHER, "{}", answer.text);
    }
    let set = [("acceleration-time.intended", "20"), ("acceleration-time.intended.unit", "s")];
    world.post("ines", &format!("{DRIVE}/parameters/ramps-and-stopping"), &set).await;
    let pages = [
        ("steps/permit", "seen, line 1"),
        ("steps/supply-volts", "400.0 V, IT-07"),
        ("steps/set-ramps", "20 s"),
        ("steps/settings-as-left", "20 s"),
        ("steps/motor-nameplate", "1465"),
        ("motor", "14.7 A"),
        ("load", "Not stated: "),
        ("parameters", "20 s"),
        ("parameters/ramps-and-stopping", "20 s"),
        ("findings", "No findings"),
        ("hold/insulation", "What is declared at release"),
        ("../-/supply", "Not stated: "),
    ];
    for (page, words) in pages {
        let path = page
            .strip_prefix("..")
            .map_or_else(|| format!("{DRIVE}/{page}"), |rest| format!("/sites/larch-ferry{rest}"));
        for login in ["rolf", "tor"] {
            let text = world.get(login, &path).await.text;
            let main = main_of(&text);
            // A supervisor keeps the site's own sheets.
            if login == "rolf" || !page.starts_with("..") {
                for box_of in ["<input", "<select", "<textarea", "<button"] {
                    assert!(!main.contains(box_of), "{login} {path} has {box_of}: {main}");
                }
            }
            assert!(login == "tor" || main.contains(words), "{login} {path} does not say {words}: {main}");
        }
    }
}

#[tokio::test]
async fn a_hold_point_says_each_condition_once_and_checks_by_their_titles() {
    let world = begun().await;
    let now = view(&world).await;
    let holds = now.procedure.phases.iter().filter(|p| p.hold.is_some());
    let mut said = 0;
    for phase in holds {
        let text = world.get("ines", &format!("{DRIVE}/hold/{}", phase.id)).await.text;
        assert!(!text.contains("It waits for"), "{}", phase.id);
        for (key, title) in
            commissioning::judge::catalogue::names().map(|k| (k, commissioning::judge::catalogue::title(k)))
        {
            assert!(!key.contains('-') || !text.contains(&format!(" {key} ")), "{}: {key}", phase.id);
            said += text.matches(&format!("“{title}” at “")).count();
        }
    }
    assert!(said > 0, "some hold point waits for a check");
}

#[test]
fn a_check_is_called_by_its_title() {
    assert_eq!(check_title("bus-discharged"), "DC bus after waiting");
    assert_eq!(check_title("gone-since-long"), "Gone since long", "one that the catalogue no longer has");
}

#[tokio::test]
async fn counts_are_said_in_words_and_the_board_is_never_blank() {
    let shown = counts(&[(Verdict::Within, 3), (Verdict::Marginal, 1), (Verdict::Outside, 0)]).into_string();
    assert!(shown.contains("3 within") && shown.contains("1 marginal") && !shown.contains("outside"), "{shown}");
    let empty = super::world::World::new().await;
    let board = async |world: &super::world::World| world.get("rolf", "/sites/larch-ferry").await.text;
    let cell = |page: &str| {
        page.split_once("data-label=\"verdicts\">").expect("a cell").1.split_once("</td>").expect("ends").0.to_owned()
    };
    let first = cell(&board(&empty).await);
    assert!(first.contains("none yet") || first.contains(" within"), "{first}");
    let page = board(&begun().await).await;
    assert!(cell(&page).contains(" within"), "{}", cell(&page));
    assert!(page.contains("<th scope=\"col\">status</th>") && !page.to_lowercase().contains(">stands<"), "{page}");
}

#[test]
fn a_moment_has_its_date_and_its_zone() {
    let then = commissioning::Timestamp::parse("2026-12-01T09:05:44Z").expect("a moment");
    assert_eq!(crate::clock_words::moment(then), "2026-12-01 09:05 UTC");
}

#[tokio::test]
async fn a_witness_is_named_only_where_one_releases() {
    let world = begun().await;
    // Which option is picked decides, without a script: the stylesheet takes the field away for the engineer's own.
    let style = world.get("", &crate::links::stylesheet()).await.text;
    assert!(style.contains("form:has(input[name=role][value=engineer]:checked) .of-witness{display:none}"));
    let path = super::job::to_the_first_release(&world).await;
    let page = world.get("ines", &path).await.text;
    assert!(page.contains("<div class=\"of-witness\">") && page.contains("value=\"engineer\" checked"), "{page}");
}

#[tokio::test]
async fn a_calibration_date_is_picked_from_a_calendar() {
    let world = begun().await;
    let page = world.get("ada", "/new-instrument").await.text;
    assert!(page.contains("type=\"date\" name=\"due\""), "{page}");
}
