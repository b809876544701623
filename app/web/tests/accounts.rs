//! Set-up, sign-in, invitations, passwords, instruments: from nothing to a firm at work, through the pages.

use super::world::World;
use axum::http::StatusCode;

const PASSWORD: &str = "slow heron over wet gravel";

#[tokio::test]
async fn from_the_one_time_code_to_a_session() {
    let world = World::empty();
    let code = world.app.store.setup_code().await.expect("reads").expect("nothing is set up");
    let form = |code: &str, again: &str| {
        [
            ("code", code),
            ("firm", "Hollin Drives"),
            ("name", "Ada Quist"),
            ("login", "Ada"),
            ("role", "administrator"),
            ("new", PASSWORD),
            ("again", again),
        ]
        .map(|(n, v)| (n.to_owned(), v.to_owned()))
    };
    for (code, again, field) in [("wrong", PASSWORD, "e-code"), (code.as_str(), "other", "e-again")] {
        let pairs = form(code, again);
        let pairs: Vec<(&str, &str)> = pairs.iter().map(|(n, v)| (n.as_str(), v.as_str())).collect();
        let answer = world.post("", "/set-up", &pairs).await;
        assert_eq!(answer.status, StatusCode::UNPROCESSABLE_ENTITY);
        assert!(
            answer.text.contains(field) && answer.text.contains("Hollin Drives") && !answer.text.contains(PASSWORD),
            "{}",
            answer.text
        );
    }
    let pairs = form(&code, PASSWORD);
    let pairs: Vec<(&str, &str)> = pairs.iter().map(|(n, v)| (n.as_str(), v.as_str())).collect();
    let done = world.post("", "/set-up", &pairs).await;
    assert_eq!((done.status, done.location()), (StatusCode::SEE_OTHER, "/sign-in"), "{}", done.text);
    assert_eq!(world.get("", "/set-up").await.location(), "/sign-in", "only once");

    let wrong = world.post("", "/sign-in", &[("login", "ada"), ("password", "not this one at all")]).await;
    let unknown = world.post("", "/sign-in", &[("login", "nobody"), ("password", "not this one at all")]).await;
    assert_eq!((wrong.status, unknown.status), (StatusCode::UNPROCESSABLE_ENTITY, StatusCode::UNPROCESSABLE_ENTITY));
    let without_ids = |text: &str| {
        text.split("name=\"act\" value=\"")
            .map(|part| part.split_once('"').map_or(part, |(_, rest)| rest).to_owned())
            .collect::<String>()
    };
    assert_eq!(
        without_ids(&wrong.text).replace("ada", "nobody"),
        without_ids(&unknown.text),
        "the same answer whether the name is known or not"
    );

    let right = world.post("", "/sign-in", &[("login", " ADA "), ("password", PASSWORD), ("back", "/sites")]).await;
    assert_eq!((right.status, right.location()), (StatusCode::SEE_OTHER, "/sites"), "{}", right.text);
    let cookie = right.headers.get("set-cookie").expect("a session").to_str().expect("ascii");
    assert!(
        cookie.starts_with("asleft-session=") && cookie.contains("HttpOnly") && cookie.contains("SameSite=Lax"),
        "{cookie}"
    );
}

#[tokio::test]
async fn a_weak_password_leaves_nothing_half_set_up() {
    let world = World::empty();
    let code = world.app.store.setup_code().await.expect("reads").expect("nothing is set up");
    for weak in ["short", "passwordpassword", "ada is my own name"] {
        let answer = world
            .post(
                "",
                "/set-up",
                &[
                    ("code", &code),
                    ("firm", "Hollin Drives"),
                    ("name", "Ada Quist"),
                    ("login", "ada"),
                    ("role", "administrator"),
                    ("new", weak),
                    ("again", weak),
                ],
            )
            .await;
        assert_eq!(answer.status, StatusCode::UNPROCESSABLE_ENTITY, "{weak}");
        assert!(answer.text.contains("e-new"), "{weak}");
        assert_eq!(world.get("", "/set-up").await.status, StatusCode::OK, "{weak}: still to be set up");
    }
}

#[tokio::test]
async fn an_administrator_adds_a_person_who_sets_their_own_password() {
    let world = World::new().await;
    let added =
        world.post("ada", "/new-person", &[("name", "Mika Sand"), ("login", "mika"), ("role", "engineer")]).await;
    assert_eq!((added.status, added.location()), (StatusCode::SEE_OTHER, "/people/mika"), "{}", added.text);
    let page = world.post("ada", "/people/mika/invitation", &[]).await.text;
    let code = page
        .split_once("<p class=\"value code\">")
        .and_then(|(_, rest)| rest.split('<').next())
        .expect("the code")
        .to_owned();
    assert!(!world.get("ada", "/people/mika").await.text.contains(&code), "shown once");
    let set = world.post("", "/invitation", &[("code", &code), ("new", PASSWORD), ("again", PASSWORD)]).await;
    assert_eq!(set.location(), "/sign-in", "{}", set.text);
    let again = world.post("", "/invitation", &[("code", &code), ("new", PASSWORD), ("again", PASSWORD)]).await;
    assert!(again.status == StatusCode::UNPROCESSABLE_ENTITY && again.text.contains("e-code"), "a code works once");
    assert_eq!(
        world.post("", "/sign-in", &[("login", "mika"), ("password", PASSWORD)]).await.status,
        StatusCode::SEE_OTHER
    );

    let off = world.post("ada", "/people/mika", &[("name", "Mika Sand"), ("role", "engineer"), ("active", "no")]).await;
    assert_eq!(off.status, StatusCode::SEE_OTHER, "{}", off.text);
    assert_eq!(
        world.post("", "/sign-in", &[("login", "mika"), ("password", PASSWORD)]).await.status,
        StatusCode::UNPROCESSABLE_ENTITY
    );
}

#[tokio::test]
async fn signing_out_ends_the_session_on_the_server() {
    let world = World::new().await;
    assert_eq!(world.get("ines", "/").await.status, StatusCode::OK);
    let out = world.post("ines", "/sign-out", &[]).await;
    assert_eq!(out.location(), "/sign-in");
    assert_eq!(world.get("ines", "/sites").await.location(), "/sign-in?back=%2Fsites", "the old cookie opens nothing");
}

#[tokio::test]
async fn an_instrument_comes_with_its_accuracy_and_bad_input_comes_back() {
    let world = World::new().await;
    let good = [
        ("mark", "IT-07"),
        ("description", "Insulation tester"),
        ("serial", "88-<b>1"),
        ("due", "2027-03-31"),
        ("active", "yes"),
        ("accuracy.0.kind", "resistance"),
        ("accuracy.0.percent", "1,5"),
        ("accuracy.0.digits", "3"),
        ("accuracy.0.resolution", "0.1"),
        ("accuracy.0.unit", "MΩ"),
    ];
    let kept = world.post("ada", "/new-instrument", &good).await;
    assert_eq!((kept.status, kept.location()), (StatusCode::SEE_OTHER, "/instruments"), "{}", kept.text);
    let list = world.get("ines", "/instruments").await.text;
    assert!(list.contains("IT-07") && list.contains("resistance") && list.contains("88-&lt;b&gt;1"), "{list}");
    let mut bad = good;
    bad[3].1 = "31.3.2027";
    let refused = world.post("ada", "/new-instrument", &bad).await;
    assert_eq!(refused.status, StatusCode::UNPROCESSABLE_ENTITY, "{}", refused.text);
    assert!(
        refused.text.contains("e-due") && refused.text.contains("31.3.2027") && refused.text.contains("value=\"1,5\"")
    );
}

/// Signs in through the page and gives the kind of session and where the answer leads.
async fn sign_in(world: &World, pairs: &[(&str, &str)]) -> (store::SessionKind, String) {
    let answer = world.post("", "/sign-in", pairs).await;
    assert_eq!(answer.status, StatusCode::SEE_OTHER, "{}", answer.text);
    let cookie = answer.headers.get("set-cookie").expect("a session").to_str().expect("ascii").to_owned();
    let token = cookie.trim_start_matches("asleft-session=").split(';').next().expect("a token").to_owned();
    let session = world.app.store.session(&token, world.app.now()).await.expect("reads").expect("open");
    (session.kind, answer.location().to_owned())
}

#[tokio::test]
async fn a_session_is_short_unless_somebody_says_that_the_tablet_is_theirs() {
    let world = World::new().await;
    let ines = world.person("ines").await;
    world.app.store.set_password(ines, PASSWORD, world.app.now()).await.expect("a password");
    assert!(world.get("", "/sign-in").await.text.contains("This is my own tablet"));
    let name = [("login", "ines"), ("password", PASSWORD)];
    assert_eq!(sign_in(&world, &name).await.0, store::SessionKind::Strange);
    let own = [name.as_slice(), &[("own", "yes")]].concat();
    assert_eq!(sign_in(&world, &own).await.0, store::SessionKind::Enrolled);
}

#[tokio::test]
async fn nobody_makes_a_code_for_somebody_elses_account_unseen() {
    let mut world = World::new().await;
    let ines = world.person("ines").await;
    world.app.store.set_password(ines, PASSWORD, world.app.now()).await.expect("a password");
    world.open("ines", ines).await;
    assert!(!world.get("ines", "/").await.text.contains("one-time code"));
    let page = world.post("ada", "/people/ines/invitation", &[]).await.text;
    let code =
        page.split_once("<p class=\"value code\">").and_then(|(_, rest)| rest.split('<').next()).expect("a code");
    let told = world.get("ines", "/").await.text;
    assert!(told.contains("A one-time code for your account was made by Ada Quist"), "{told}");
    assert!(world.get("rolf", "/signers").await.text.contains("made by Ada Quist"));

    let other = "six swans under the bridge";
    world.post("", "/invitation", &[("code", code), ("new", other), ("again", other)]).await;
    let to = sign_in(&world, &[("login", "ines"), ("password", other), ("back", "/sites")]).await.1;
    assert_eq!(to, "/", "the start page comes first while there is something to tell");
    world.open("ines", ines).await;
    let told = world.get("ines", "/").await.text;
    assert!(told.contains("Your password was replaced") && told.contains("Ada Quist"), "{told}");
    super::every_page::is_sound("/", &told);
    let signers = world.get("rolf", "/signers").await.text;
    assert!(signers.contains("password set with it"), "{signers}");
    super::every_page::is_sound("/signers", &signers);
    assert!(world.get("ada", "/people/ines").await.text.contains("password set with it"));
}

#[tokio::test]
async fn an_engineer_keeps_instruments_and_a_reader_does_not() {
    let world = World::new().await;
    let form = [("mark", "MM-1"), ("description", "Multimeter"), ("serial", "12"), ("due", ""), ("active", "yes")];
    assert!(world.get("ines", "/instruments").await.text.contains("Add an instrument"));
    assert_eq!(world.post("ines", "/new-instrument", &form).await.status, StatusCode::SEE_OTHER);
    assert_eq!(world.post("rolf", "/new-instrument", &form).await.status, StatusCode::FORBIDDEN);
    assert!(!world.get("rolf", "/instruments").await.text.contains("Add an instrument"));
}
