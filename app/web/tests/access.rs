//! Every route × everyone: let in or not as the access table says; a route without a row fails; a form without its token is refused.

use super::world::{PEOPLE, World};
use crate::access::{TABLE, Who, row};
use crate::routes;
use axum::http::{Method, StatusCode};

/// An address for a route pattern, in the test world.
fn sample(path: &str) -> String {
    let mut address = path.to_owned();
    for (segment, value) in [
        ("{site}", "larch-ferry"),
        ("{drive}", "FN-204"),
        ("{login}", "ines"),
        ("{instrument}", "01890000-0000-7000-8000-000000000000"),
        ("{step}", "nameplates"),
        ("{phase}", "make-safe"),
        ("{hash}", "0"),
        ("{name}", "none.css"),
    ] {
        address = address.replace(segment, value);
    }
    let sheet = if path.contains("/-/") { "supply" } else { "motor" };
    let address = address.replace("{sheet}", sheet);
    // Ids of things that are not there: the door is judged before the thing is looked for.
    let mut parts: Vec<String> = address.split('/').map(str::to_owned).collect();
    for part in parts.iter_mut().filter(|p| p.starts_with('{')) {
        "01890000-0000-7000-8000-000000000000".clone_into(part);
    }
    parts.join("/")
}

#[test]
fn every_route_has_a_row_and_every_row_a_route() {
    for (method, path) in routes::all() {
        assert!(row(method, path).is_some(), "{method} {path} has no row in the access table");
    }
    for access in TABLE {
        assert!(
            routes::all().iter().any(|(m, p)| m.as_str() == access.method && *p == access.path),
            "{} {} is no route",
            access.method,
            access.path
        );
    }
}

#[tokio::test]
async fn each_person_is_let_in_where_the_table_says_and_nowhere_else() {
    let world = World::new().await;
    for access in TABLE {
        let address = sample(access.path);
        for (login, _, role) in PEOPLE.into_iter().map(|(l, n, r)| (l, n, Some(r))).chain([("", "nobody", None)]) {
            // A form without a token: whoever is let in is then told about the form, so that nothing is changed here.
            let answer = match access.method {
                "GET" => world.get(login, &address).await,
                _ => world.post_bare(login, &address, &[]).await,
            };
            let may = match (access.who, role) {
                (Who::Anyone, _) => true,
                (Who::Any(roles), Some(role)) => roles.contains(&role),
                (Who::Any(_), None) => false,
            };
            let turned_away = answer.text.contains("Not yours to do")
                || (login.is_empty()
                    && answer.status == StatusCode::SEE_OTHER
                    && answer.location().starts_with("/sign-in"));
            let goes_to_sign_in_anyway = access.who == Who::Anyone;
            assert_eq!(
                !turned_away || goes_to_sign_in_anyway,
                may,
                "{login:?} {} {address}: {}",
                access.method,
                answer.status
            );
            assert!(
                answer.status != StatusCode::INTERNAL_SERVER_ERROR,
                "{login:?} {} {address}: {}",
                access.method,
                answer.text
            );
        }
    }
}

#[tokio::test]
async fn a_form_without_its_token_changes_nothing() {
    let world = World::new().await;
    for (method, path) in routes::all().iter().filter(|(m, _)| *m == Method::POST) {
        let who = match row(method, path) {
            Some(Who::Any(roles)) => PEOPLE.iter().find(|p| roles.contains(&p.2)).map_or("", |p| p.0),
            _ => "",
        };
        for token in ["", "0000", &world.token("someone else")] {
            let answer = world
                .post_bare(who, &sample(path), &[("token", token), ("act", "01890000-0000-7000-8000-00000000000a")])
                .await;
            let not_here = answer.status == StatusCode::NOT_FOUND;
            let anyone = who.is_empty() && token == world.token("");
            assert!(
                anyone || not_here || answer.status == StatusCode::FORBIDDEN,
                "{method} {path} took a form with the token {token:?}: {}",
                answer.status
            );
        }
    }
}

#[tokio::test]
async fn another_sites_form_is_refused_before_anything_reads_it() {
    let world = World::new().await;
    let request = axum::http::Request::post("/theme")
        .header("sec-fetch-site", "cross-site")
        .header("content-type", "application/x-www-form-urlencoded")
        .body(axum::body::Body::from("theme=dark"))
        .expect("a request");
    let answer = world.send(request).await;
    assert_eq!(answer.status, StatusCode::FORBIDDEN);
    assert!(!answer.headers.get_all("set-cookie").iter().any(|c| c.to_str().expect("ascii").contains("theme")));
}
