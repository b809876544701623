//! The record's pages render for everyone who may see them, before a record is begun and after; findings, parameters and board do their work.

use super::every_page::is_sound;
use super::job::{DRIVE, begin, fill_sheets, hidden, prepare, view};
use super::world::World;
use axum::http::StatusCode;

const PAGES: [&str; 14] = [
    "",
    "/steps/permit",
    "/steps/prove-dead",
    "/steps/motor-nameplate",
    "/steps/uncoupled-run",
    "/steps/set-ramps",
    "/steps/settings-as-left",
    "/hold/insulation",
    "/parameters",
    "/parameters/ramps-and-stopping",
    "/findings",
    "/record",
    "/package",
    "/journal",
];

#[tokio::test]
async fn every_page_of_a_drive_is_sound_before_and_after_its_record_begins() {
    let mut world = World::new().await;
    prepare(&mut world).await;
    for round in ["before", "after"] {
        for page in PAGES {
            for login in ["ines", "tor", "rolf", "max"] {
                let answer = world.get(login, &format!("{DRIVE}{page}")).await;
                assert_eq!(answer.status, StatusCode::OK, "{round} {login} {page}: {}", answer.text);
                is_sound(page, &answer.text);
            }
        }
        if round == "before" {
            fill_sheets(&world, "ines").await;
            begin(&world, "ines").await;
        }
    }
    for (login, path) in [
        ("rolf", "/queue"),
        ("tor", "/sites/larch-ferry"),
        ("ines", "/sites/larch-ferry?text=nothing-has-this&status=signed&page=9"),
    ] {
        let answer = world.get(login, path).await;
        assert_eq!(answer.status, StatusCode::OK, "{}", answer.text);
        is_sound(path, &answer.text);
    }
    for path in ["/steps/none", "/hold/make-safe", "/hold/none", "/parameters/none", "/findings/none"] {
        assert_eq!(world.get("ines", &format!("{DRIVE}{path}")).await.status, StatusCode::NOT_FOUND, "{path}");
    }
    for (login, path) in [("tor", "/accept"), ("ines", "/sign")] {
        let answer = world.get(login, &format!("{DRIVE}{path}")).await;
        assert!(matches!(answer.status, StatusCode::CONFLICT | StatusCode::OK), "{path}: {}", answer.status);
    }
}

#[tokio::test]
async fn a_finding_is_raised_settled_and_only_a_supervisor_accepts_one() {
    let mut world = World::new().await;
    prepare(&mut world).await;
    begin(&world, "ines").await;
    let path = format!("{DRIVE}/findings");
    let refused = world.post("ines", &path, &[("text", "Gland of the motor cable is loose")]).await;
    assert_eq!(refused.status, StatusCode::UNPROCESSABLE_ENTITY);
    assert!(
        refused.text.contains("Gland of the motor cable is loose")
            && refused.text.contains("Choose what the finding holds up")
    );
    let raise = [
        ("text", "Gland of the motor cable is loose"),
        ("severity", "stops-start-up"),
        ("step", "enclosure"),
        ("act", "01890000-0000-7000-8000-0000000000aa"),
    ];
    for _ in 0..3 {
        assert_eq!(
            world.post("ines", &path, &raise).await.status,
            StatusCode::SEE_OTHER,
            "sent again it is the same finding"
        );
    }
    let record = view(&world).await.drive.record.clone().expect("begun");
    let finding = record.findings.values().next().expect("one").id;
    assert_eq!(record.findings.len(), 1);
    let one = format!("{path}/{finding}");
    is_sound(&one, &world.get("tor", &one).await.text);
    assert_eq!(
        world.post("ines", &format!("{one}/accept"), &[("reason", "it may stay")]).await.status,
        StatusCode::FORBIDDEN
    );
    assert_eq!(
        world.post("ines", &format!("{one}/settle"), &[("how", "")]).await.status,
        StatusCode::UNPROCESSABLE_ENTITY
    );
    assert_eq!(
        world.post("ines", &format!("{one}/settle"), &[("how", "tightened")]).await.status,
        StatusCode::SEE_OTHER
    );
    assert!(world.get("ines", &path).await.text.contains("tightened"));
    assert_eq!(
        world.post("tor", &format!("{one}/accept"), &[("reason", "it may stay")]).await.status,
        StatusCode::CONFLICT
    );
}

#[tokio::test]
async fn parameters_are_kept_by_group_marked_where_they_differ_and_never_lost_between_two() {
    let mut world = World::new().await;
    prepare(&mut world).await;
    fill_sheets(&world, "ines").await;
    begin(&world, "ines").await;
    let path = format!("{DRIVE}/parameters/ramps-and-stopping");
    let set = [
        ("acceleration-time.intended", "20"),
        ("acceleration-time.intended.unit", "s"),
        ("acceleration-time.as-left", "30"),
        ("acceleration-time.as-left.unit", "s"),
        ("acceleration-time.code", "row 12"),
    ];
    assert_eq!(world.post("ines", &path, &set).await.status, StatusCode::SEE_OTHER);
    let list = world.get("tor", &format!("{DRIVE}/parameters")).await.text;
    assert!(list.contains("row 12") && list.contains("differs"), "{list}");
    let wrong = world
        .post("ines", &path, &[("deceleration-time.intended", "soon"), ("deceleration-time.intended.unit", "s")])
        .await;
    assert_eq!(wrong.status, StatusCode::UNPROCESSABLE_ENTITY);
    assert!(wrong.text.contains("value=\"soon\""));
    let seen = hidden(&world.get("ines", &path).await.text, "acceleration-time.intended.seen");
    let one = |value: &'static str| {
        [
            ("acceleration-time.intended", value),
            ("acceleration-time.intended.unit", "s"),
            ("acceleration-time.intended.seen", seen.as_str()),
        ]
    };
    assert_eq!(world.post("max", &path, &one("25")).await.status, StatusCode::SEE_OTHER);
    let stale = world.post("ines", &path, &one("22")).await;
    assert_eq!(stale.status, StatusCode::PRECONDITION_FAILED);
    assert!(stale.text.contains("25 s") && stale.text.contains("22 s") && stale.text.contains("Max Ode"));
    let live = world.post("ines", &format!("{path}/live"), &one("0.01")).await;
    assert_eq!(live.status, StatusCode::OK);
    assert!(!live.text.contains("<html"));
    assert_eq!(
        world
            .post("ines", &format!("{DRIVE}/parameters/rows"), &[("label", "Fan runs on after stop")])
            .await
            .location(),
        format!("{DRIVE}/parameters/free-rows")
    );
    assert!(world.get("ines", &format!("{DRIVE}/parameters/free-rows")).await.text.contains("Fan runs on after stop"));
    assert_eq!(
        world.post("ines", &format!("{DRIVE}/parameters/rows"), &[("label", "")]).await.status,
        StatusCode::UNPROCESSABLE_ENTITY
    );
}

#[tokio::test]
async fn the_board_finds_by_text_and_by_where_a_record_stands() {
    let mut world = World::new().await;
    prepare(&mut world).await;
    let board = world.get("rolf", "/sites/larch-ferry?text=fn-2&status=not-begun").await.text;
    assert!(board.contains("FN-204") && !board.contains("Add a drive"));
    assert!(world.get("ines", "/sites/larch-ferry?status=accepted").await.text.contains("No drive fits"));
    begin(&world, "ines").await;
    let board = world.get("rolf", "/sites/larch-ferry?status=in-progress").await.text;
    assert!(board.contains("FN-204") && board.contains("in progress"));
}

#[tokio::test]
async fn the_report_folds_what_is_within_and_opens_all_of_it_on_demand() {
    let mut world = World::new().await;
    prepare(&mut world).await;
    fill_sheets(&world, "ines").await;
    begin(&world, "ines").await;
    let within = |page: &str| -> (usize, usize) {
        let panels = page.split("<section class=\"verdict within\">").skip(1);
        let first: Vec<&str> = panels.filter_map(|p| p.split("</section>").next()).collect();
        let with = |mark: &str| first.iter().filter(|p| p.contains(mark)).count();
        (with("<details class=\"working\">"), with("<details class=\"working\" open>"))
    };
    let folded = world.get("tor", &format!("{DRIVE}/record")).await.text;
    let (closed, open) = within(&folded);
    assert!(closed > 0 && open == 0, "{closed} closed, {open} open");
    assert!(folded.contains("/record?working=all"));
    let full = world.get("tor", &format!("{DRIVE}/record?working=all")).await.text;
    assert_eq!(within(&full), (0, closed));
    assert!(!full.contains("<details class=\"working\">"), "every working lies open");
    is_sound("/record", &full);
}

#[tokio::test]
async fn the_drive_page_counts_as_the_board_does() {
    let mut world = World::new().await;
    prepare(&mut world).await;
    fill_sheets(&world, "ines").await;
    begin(&world, "ines").await;
    let now = view(&world).await;
    let row = world.app.store.board(now.site.id, store::BoardFilter::default()).await.expect("reads").rows.remove(0);
    let all = commissioning::judge::Counts::of(&commissioning::judge::all(&now.view()));
    assert!(row.counts.not_assessed < all.not_assessed, "most checks wait for steps that nobody reached");
    let said = |counts| crate::components::counts(&crate::verdicts::numbers(counts)).into_string();
    let page = world.get("ines", DRIVE).await.text;
    assert!(page.contains(&said(&row.counts)) && !page.contains(&said(&all)), "{page}");
}
