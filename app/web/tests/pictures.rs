//! Pictures through a step's form: kept before the entry, shown as a copy, given back as they came; a refused one takes nothing along.

use super::job::{DRIVE, begin, hidden, post_parts, prepare, small_picture, view};
use super::world::World;
use axum::http::StatusCode;

const PATH: &str = "/sites/larch-ferry/FN-204/steps/locks-and-tags";

/// The step's picture item.
async fn item(world: &World) -> String {
    let now = view(world).await;
    let (_, step) = now.procedure.step("locks-and-tags").expect("listed");
    step.items
        .iter()
        .find(|i| matches!(i.kind, commissioning::procedure::ItemKind::Photo))
        .expect("a picture")
        .key
        .clone()
}

#[tokio::test]
async fn a_picture_is_kept_shown_and_given_back() {
    let mut world = World::new().await;
    prepare(&mut world).await;
    begin(&world, "ines").await;
    let key = item(&world).await;
    let bytes = small_picture();
    let pairs = [(format!("{key}.0"), "lock on Q4".to_owned())];
    let answer = post_parts(&world, "ines", PATH, &pairs, &[format!("{key}.0.file")], &bytes).await;
    assert_eq!(answer.status, StatusCode::SEE_OTHER, "{}", answer.text);
    let page = world.get("ines", PATH).await.text;
    let hash = page.split_once("src=\"/photos/").expect("shown").1.split('"').next().expect("closed").to_owned();
    assert!(page.contains("lock on Q4"));
    let copy = world.get("rolf", &format!("/photos/{hash}")).await;
    assert_eq!((copy.status, copy.headers["content-type"].to_str().expect("ascii")), (StatusCode::OK, "image/jpeg"));
    let original = world.get("rolf", &format!("/photos/{hash}/original")).await;
    assert!(original.headers["content-disposition"].to_str().expect("ascii").starts_with("attachment; filename="));
    assert_eq!(
        world.app.store.photo(&hash).await.expect("reads").expect("kept").0,
        bytes,
        "the original is kept byte for byte"
    );
    assert_eq!(
        world.get("", &format!("/photos/{hash}")).await.status,
        StatusCode::SEE_OTHER,
        "nobody signed in sees none"
    );
}

#[tokio::test]
async fn a_refused_picture_says_why_and_one_received_goes_along() {
    let mut world = World::new().await;
    prepare(&mut world).await;
    begin(&world, "ines").await;
    let key = item(&world).await;
    let file = [format!("{key}.0.file")];
    let heic = post_parts(&world, "ines", PATH, &[], &file, b"\0\0\0\x18ftypheic\0\0\0\0heic").await;
    assert_eq!(heic.status, StatusCode::UNPROCESSABLE_ENTITY);
    assert!(heic.text.contains("HEIC"), "{}", heic.text);
    let whole = small_picture();
    let cut = post_parts(&world, "ines", PATH, &[], &file, &whole[..whole.len() / 2]).await;
    assert_eq!(cut.status, StatusCode::UNPROCESSABLE_ENTITY, "half a picture is none");
    // A form that is refused for another field keeps the picture that came with it.
    let long = [(format!("{key}.0"), "x".repeat(300))];
    let answer = post_parts(&world, "ines", PATH, &long, &file, &whole).await;
    assert_eq!(answer.status, StatusCode::UNPROCESSABLE_ENTITY);
    let kept = hidden(&answer.text, &format!("{key}.0.kept"));
    assert!(kept.contains("image/jpeg"), "{}", answer.text);
    let again = [(format!("{key}.0"), "lock".to_owned()), (format!("{key}.0.kept"), kept)];
    assert_eq!(post_parts(&world, "ines", PATH, &again, &[], b"").await.status, StatusCode::SEE_OTHER);
    // One that was never received here is not believed.
    let invented = [
        (format!("{key}.0"), "lock".to_owned()),
        (format!("{key}.0.kept"), format!("{} image/jpeg 5", "0".repeat(64))),
    ];
    post_parts(&world, "ines", PATH, &invented, &[], b"").await;
    let now = view(&world).await;
    assert!(
        now.drive.record.as_ref().expect("begun").entries.values().flat_map(|s| s.standing()).all(|r| r
            .value
            .photo
            .as_ref()
            .is_none_or(|p| p.hash != "0".repeat(64)))
    );
    for path in ["/photos/0", "/photos/..%2f..%2fetc%2fpasswd", "/photos/0/original"] {
        assert_eq!(world.get("ines", path).await.status, StatusCode::NOT_FOUND, "{path}");
    }
    assert_eq!(world.get("ines", DRIVE).await.status, StatusCode::OK);
}

#[tokio::test]
async fn kind_and_size_of_a_picture_carried_along_are_those_of_what_is_kept() {
    let mut world = World::new().await;
    prepare(&mut world).await;
    begin(&world, "ines").await;
    let key = item(&world).await;
    let bytes = small_picture();
    let kept = world.app.store.keep_photo(bytes.clone(), super::world::noon()).await.expect("kept");
    let lied = [
        (format!("{key}.0"), "lock".to_owned()),
        (format!("{key}.0.kept"), format!("{} text/html 5", kept.hash)),
        (format!("{key}.1.kept"), format!("{} text/html 5", kept.hash)),
    ];
    assert_eq!(post_parts(&world, "ines", PATH, &lied, &[], b"").await.status, StatusCode::SEE_OTHER);
    let now = view(&world).await;
    let record = now.drive.record.as_ref().expect("begun");
    let photos: Vec<_> =
        record.entries.values().flat_map(|s| s.standing()).filter_map(|r| r.value.photo.as_ref()).collect();
    assert_eq!(photos.len(), 1);
    assert_eq!((photos[0].media.as_str(), photos[0].bytes), ("image/jpeg", bytes.len() as u64));
}

#[tokio::test]
async fn pictures_wait_for_their_turn_before_anything_of_them_is_loaded() {
    let mut world = World::new().await;
    prepare(&mut world).await;
    begin(&world, "ines").await;
    let key = item(&world).await;
    let (pairs, file, bytes) = ([(format!("{key}.0"), "lock".to_owned())], [format!("{key}.0.file")], small_picture());
    let missing = format!("/photos/{}", "0".repeat(64));
    let wait = std::time::Duration::from_millis(300);
    let turns = crate::pictures::every_turn().await;
    assert!(tokio::time::timeout(wait, world.get("rolf", &missing)).await.is_err(), "it looked before its turn");
    let sent = post_parts(&world, "ines", PATH, &pairs, &file, &bytes);
    assert!(tokio::time::timeout(wait, sent).await.is_err(), "it unpacked before its turn");
    drop(turns);
    assert_eq!(world.get("rolf", &missing).await.status, StatusCode::NOT_FOUND);
    assert_eq!(post_parts(&world, "ines", PATH, &pairs, &file, &bytes).await.status, StatusCode::SEE_OTHER);
}
