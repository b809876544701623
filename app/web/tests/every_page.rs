//! Every page renders for everyone who may see it: one h1, a title, labels tied to inputs, nothing inline, headers set.

use super::world::World;
use axum::http::StatusCode;

const PAGES: [(&str, &str); 32] = [
    ("", "/sign-in"),
    ("", "/about"),
    ("", "/invitation"),
    ("ines", "/"),
    ("tor", "/"),
    ("ada", "/"),
    ("rolf", "/"),
    ("ines", "/find"),
    ("ines", "/find?q=fn"),
    ("ines", "/find?q=nothing-has-this"),
    ("ines", "/password"),
    ("ada", "/people"),
    ("ada", "/new-person"),
    ("ada", "/people/ines"),
    ("rolf", "/signers"),
    ("ines", "/instruments"),
    ("ada", "/instruments"),
    ("ada", "/new-instrument"),
    ("rolf", "/sites"),
    ("ines", "/new-site"),
    ("rolf", "/sites/larch-ferry/-/site"),
    ("ines", "/sites/larch-ferry/-/supply"),
    ("ines", "/sites/larch-ferry/-/new-drive"),
    ("ines", "/sites/larch-ferry/FN-204/drive"),
    ("ines", "/sites/larch-ferry/FN-204/drive-plate"),
    ("ines", "/sites/larch-ferry/FN-204/motor"),
    ("ines", "/sites/larch-ferry/FN-204/motor?columns=4"),
    ("tor", "/sites/larch-ferry/FN-204/motor"),
    ("ines", "/sites/larch-ferry/FN-204/cable"),
    ("ines", "/sites/larch-ferry/FN-204/load"),
    ("ines", "/sites/larch-ferry/FN-204/supply"),
    ("ines", "/sites/larch-ferry/FN-204/further"),
];

/// What holds for every page of the book, whatever is on it.
pub fn is_sound(path: &str, text: &str) {
    assert!(text.starts_with("<!DOCTYPE html>"), "{path}");
    assert_eq!(text.matches("<h1").count(), 1, "{path} has one heading of the first order");
    assert!(text.contains("<html lang=\"en\"") && text.contains("class=\"skip\""), "{path}");
    assert!(
        !text.contains(" style=") && !text.contains("<style") && !text.contains(" onclick"),
        "{path} has something inline"
    );
    for (n, _) in text.match_indices("<script") {
        assert!(text[n..].starts_with("<script type=\"module\" src=\"/static/"), "{path} has a script of its own");
    }
    let ids: Vec<&str> = values(text, " id=\"");
    let mut sorted = ids.clone();
    sorted.sort_unstable();
    sorted.dedup();
    // The search box stands in the menu and on a few pages.
    assert!(ids.len() - sorted.len() <= 1, "{path} gives an id twice: {ids:?}");
    for target in values(text, "<label for=\"") {
        assert!(ids.contains(&target), "{path}: the label for {target} has no input");
    }
    for described in values(text, "aria-describedby=\"") {
        for id in described.split(' ') {
            assert!(ids.contains(&id), "{path}: nothing has the id {id}");
        }
    }
    let posts = text.matches("<form method=\"post\"").count();
    assert_eq!(text.matches("name=\"token\"").count(), posts, "{path}: every form carries its token");
    assert_eq!(text.matches("name=\"act\"").count(), posts, "{path}: every form carries its act");
}

fn values<'a>(text: &'a str, before: &str) -> Vec<&'a str> {
    text.match_indices(before)
        .map(|(n, _)| &text[n + before.len()..])
        .map(|rest| rest.split('"').next().unwrap_or_default())
        .collect()
}

#[tokio::test]
async fn every_page_renders_for_those_who_may_see_it() {
    let world = World::new().await;
    for (login, path) in PAGES {
        let answer = world.get(login, path).await;
        assert_eq!(answer.status, StatusCode::OK, "{login} {path}: {}", answer.text);
        is_sound(path, &answer.text);
        let policy = answer.headers.get("content-security-policy").expect("set").to_str().expect("ascii");
        assert!(policy.starts_with("default-src 'none'") && !policy.contains("unsafe"), "{path}");
        assert_eq!(answer.headers.get("cache-control").expect("set"), "no-store", "{path}");
    }
}

#[tokio::test]
async fn an_empty_installation_leads_to_set_up() {
    let world = World::empty();
    assert_eq!(world.get("", "/").await.location(), "/sign-in");
    assert_eq!(world.get("", "/sign-in").await.location(), "/set-up");
    let page = world.get("", "/set-up").await;
    assert_eq!(page.status, StatusCode::OK);
    is_sound("/set-up", &page.text);
}

#[tokio::test]
async fn what_is_not_here_says_so_and_helps() {
    let world = World::new().await;
    for path in [
        "/nowhere",
        "/sites/larch-ferry/FN-999/motor",
        "/sites/elsewhere/FN-204/motor",
        "/sites/larch-ferry/FN-204/gearbox",
        "/sites/larch-ferry/FN-204/site",
        "/people/nobody",
        "/instruments/7",
    ] {
        let who = if path.starts_with("/people") { "ada" } else { "ines" };
        let answer = world.get(who, path).await;
        assert_eq!(answer.status, StatusCode::NOT_FOUND, "{path}");
        is_sound(path, &answer.text);
        assert!(answer.text.contains("Find a drive by tag or name"), "{path}");
    }
    for path in ["/static/../app.rs", "/static/0/asleft.css", "/static/..%2f..%2fetc/passwd"] {
        assert_eq!(world.get("", path).await.status, StatusCode::NOT_FOUND, "{path}");
    }
    assert_eq!(world.post("ines", "/sites", &[]).await.status, StatusCode::METHOD_NOT_ALLOWED);
}

#[tokio::test]
async fn stylesheet_and_script_are_kept_under_their_content() {
    let world = World::new().await;
    for address in [crate::links::stylesheet(), crate::links::script()] {
        let answer = world.get("", &address).await;
        assert_eq!(answer.status, StatusCode::OK, "{address}");
        assert!(answer.headers.get("cache-control").expect("set").to_str().expect("ascii").contains("immutable"));
    }
}

#[tokio::test]
async fn the_theme_is_a_choice_that_stays_and_goes_back_only_here() {
    let world = World::new().await;
    let answer = world.post("ines", "/theme", &[("theme", "dark"), ("back", "/sites")]).await;
    assert_eq!(answer.location(), "/sites");
    assert!(answer.headers.get("set-cookie").expect("set").to_str().expect("ascii").starts_with("asleft-theme=dark"));
    for elsewhere in ["https://elsewhere.example/", "//elsewhere.example", "/\\elsewhere.example", "javascript:1"] {
        assert_eq!(
            world.post("ines", "/theme", &[("theme", "dark"), ("back", elsewhere)]).await.location(),
            "/",
            "{elsewhere}"
        );
    }
}
