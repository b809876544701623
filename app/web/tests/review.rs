//! A whole job through the pages: begun, walked, signed, returned, signed again, accepted, taken as a package, reopened.

use super::every_page::is_sound;
use super::job::{DRIVE, PASSWORD, begin, fill_sheets, hidden, prepare, view, walk};
use super::world::World;
use axum::http::StatusCode;
use commissioning::agenda;
use commissioning::plant::{Field, FieldKind, Place, Sheet, fields};
use commissioning::record::Status;

async fn sign(world: &World, login: &str, which: &str, password: &str) -> super::world::Answer {
    let path = format!("{DRIVE}/{which}");
    let page = world.get(login, &path).await;
    assert_eq!(page.status, StatusCode::OK, "{}", page.text);
    is_sound(&path, &page.text);
    world.post(login, &path, &[("digest", &hidden(&page.text, "digest")), ("password", password)]).await
}

/// Nothing is signed while it is open which options are fitted: all that the sheets left open is answered with no.
async fn say_no_to_every_open_option(world: &World) {
    let now = view(world).await;
    let none =
        |f: &Field| matches!(f.kind, FieldKind::Choice(options) if options.iter().any(|(key, _)| *key == "none"));
    let open = |f: &&Field| {
        let slot = now.drive.fields.get(&Place::new(Sheet::Drive, f.key));
        (matches!(f.kind, FieldKind::Flag) || none(f))
            && slot.and_then(|s| s.current()).is_none_or(|r| r.value.is_none())
    };
    let answers: Vec<(String, &str)> = fields::of(Sheet::Drive)
        .iter()
        .filter(open)
        .map(|f| (format!("drive.0.{}", f.key), if none(f) { "none" } else { "no" }))
        .collect();
    let pairs: Vec<(&str, &str)> = answers.iter().map(|(n, v)| (n.as_str(), *v)).collect();
    let answer = world.post("ines", &format!("{DRIVE}/drive"), &pairs).await;
    assert_eq!(answer.status, StatusCode::SEE_OTHER, "{}", answer.text);
}

/// A session goes on under the token that signing gave it; the test's own is opened anew.
async fn in_again(world: &mut World, login: &'static str) {
    let person = world.person(login).await;
    world.open(login, person).await;
}

#[tokio::test]
async fn a_whole_job_from_the_first_step_to_the_package() {
    let mut world = World::new().await;
    world.app.signing_key = Some(world.app.store.folder().join("signing-key.pem").into());
    world.pages = crate::routes::router(world.app.clone());
    prepare(&mut world).await;
    fill_sheets(&world, "ines").await;
    begin(&world, "ines").await;
    let one = world.get("max", &format!("{DRIVE}/steps/permit")).await;
    assert_eq!(one.status, StatusCode::OK);
    let early = world.get("ines", &format!("{DRIVE}/sign")).await;
    assert!(early.text.contains("steps are left"), "{}", early.text);
    let walked = walk(&world, "ines").await;
    assert!(walked > 60, "{walked} steps");

    say_no_to_every_open_option(&world).await;
    // Signed by the engineer: a wrong password changes nothing and keeps the page.
    let wrong = sign(&world, "ines", "sign", "not the password").await;
    assert_eq!(wrong.status, StatusCode::UNPROCESSABLE_ENTITY);
    assert!(wrong.text.contains("This is not your password"));
    let signed = sign(&world, "ines", "sign", PASSWORD).await;
    assert_eq!(signed.status, StatusCode::SEE_OTHER, "{}", signed.text);
    assert!(
        signed.headers.get("set-cookie").expect("a new token").to_str().expect("ascii").contains("asleft-session=")
    );
    in_again(&mut world, "ines").await;

    // The supervisor reads it; the verdicts are those frozen at the signature.
    let queue = world.get("tor", "/queue").await;
    is_sound("/queue", &queue.text);
    assert!(queue.text.contains("FN-204") && queue.text.contains("Ines Lund"));
    let report = world.get("tor", &format!("{DRIVE}/record")).await;
    is_sound("/record", &report.text);
    assert!(report.text.contains("as they were frozen at the signature") && report.text.contains("IT-07"));
    assert!(view(&world).await.drive.record.as_ref().expect("begun").frozen.is_some());

    // Nothing can be recorded while it waits.
    let permit = permit_note(&world).await;
    let late = world.post("ines", &format!("{DRIVE}/steps/permit"), &[(permit.as_str(), "later")]).await;
    assert_eq!(late.status, StatusCode::CONFLICT, "{}", late.text);
    assert!(world.get("ines", &format!("{DRIVE}/steps/permit")).await.text.contains("waits for review"));

    // Remarked on, returned, changed with a reason, signed again.
    let remark =
        world.post("tor", &format!("{DRIVE}/remarks"), &[("step", "permit"), ("text", "Whose permit is it?")]).await;
    assert_eq!(remark.location(), format!("{DRIVE}/record#step-permit"));
    let back = world.post("tor", &format!("{DRIVE}/return"), &[("reason", "")]).await;
    assert_eq!(back.status, StatusCode::UNPROCESSABLE_ENTITY);
    let back = world.post("tor", &format!("{DRIVE}/return"), &[("reason", "Name the permit office.")]).await;
    assert_eq!(back.location(), "/queue", "{}", back.text);
    for path in [DRIVE.to_owned(), format!("{DRIVE}/record"), "/".to_owned()] {
        let page = world.get("ines", &path).await.text;
        assert!(page.contains("Name the permit office.") && page.contains("Returned"), "{path}");
    }
    change_the_permit(&world).await;
    let finding = [("text", "One gland is loose"), ("severity", "before-handover"), ("step", "enclosure")];
    assert_eq!(world.post("ines", &format!("{DRIVE}/findings"), &finding).await.status, StatusCode::SEE_OTHER);
    let again = sign(&world, "ines", "sign", PASSWORD).await;
    assert_eq!(again.status, StatusCode::SEE_OTHER, "{}", again.text);
    in_again(&mut world, "ines").await;
    let report = world.get("tor", &format!("{DRIVE}/record")).await.text;
    assert!(
        report.contains("Changed since it was sent back")
            && report.contains("mark-changed")
            && report.contains("Whose permit is it?")
    );

    accept(&mut world).await;
    let package = world.get("rolf", &format!("{DRIVE}/package/download")).await;
    assert_eq!(package.status, StatusCode::OK, "{}", package.text);
    assert!(
        package.text.starts_with("PK")
            && package.text.contains("handover.pdf")
            && package.text.contains("SHA256SUMS.sig")
    );
    let named = package.headers.get("content-disposition").expect("named").to_str().expect("ascii");
    assert_eq!(named, "attachment; filename=\"larch-ferry-FN-204-r1-handover.zip\"");

    let reopened = world.post("tor", &format!("{DRIVE}/reopen"), &[("reason", "Gearbox changed.")]).await;
    assert_eq!(reopened.status, StatusCode::SEE_OTHER, "{}", reopened.text);
    let now = view(&world).await;
    let record = now.drive.record.as_ref().expect("begun");
    assert_eq!((record.revision, record.signatures.iter().all(|s| s.superseded)), (2, true));
    assert!(
        world.get("tor", &format!("{DRIVE}/record")).await.text.contains("superseded: the record went on after it")
    );
}

/// The form's name of the permit's note.
async fn permit_note(world: &World) -> String {
    let now = view(world).await;
    let (_, step) = now.procedure.step("permit").expect("listed");
    let note = step.items.iter().find(|i| matches!(i.kind, commissioning::procedure::ItemKind::Note));
    format!("{}.0", note.expect("a note").key)
}

/// One entry overwritten: by someone who is engineer and supervisor, who from then on cannot accept.
async fn change_the_permit(world: &World) {
    let (path, name) = (format!("{DRIVE}/steps/permit"), permit_note(world).await);
    let seen = hidden(&world.get("max", &path).await.text, &format!("{name}.seen"));
    let seen_name = format!("{name}.seen");
    let mut pairs = vec![(name.as_str(), "Mill permit office, 118"), (seen_name.as_str(), seen.as_str())];
    let refused = world.post("max", &path, &pairs).await;
    assert_eq!(refused.status, StatusCode::UNPROCESSABLE_ENTITY, "a reason is due after a signature");
    assert!(refused.text.contains("Mill permit office, 118") && refused.text.contains("Say why this is overwritten"));
    pairs.push(("reason", "asked by the supervisor"));
    let kept = world.post("max", &path, &pairs).await;
    assert_eq!(kept.status, StatusCode::SEE_OTHER, "{}", kept.text);
    let page = world.get("ines", &path).await.text;
    assert!(
        page.contains("<s>seen, line 1</s>") && page.contains("asked by the supervisor"),
        "the earlier value is one tap away"
    );
    assert!(agenda::of(&view(world).await.view()).complete());
}

/// Open findings hold it up; who entered something cannot accept; then it is accepted.
async fn accept(world: &mut World) {
    let now = view(world).await;
    let open: Vec<_> =
        now.drive.record.as_ref().expect("begun").findings.values().filter(|f| f.is_open()).map(|f| f.id).collect();
    assert!(!open.is_empty());
    let blocked = world.get("tor", &format!("{DRIVE}/accept")).await.text;
    is_sound("/accept", &blocked);
    assert!(open.iter().all(|id| blocked.contains(&format!("/findings/{id}#accept"))), "each is linked to its form");
    assert!(
        blocked.contains("Accept each by name") && !blocked.contains("type=\"password\""),
        "nothing to sign: {blocked}"
    );
    for finding in open {
        let answer =
            world.post("tor", &format!("{DRIVE}/findings/{finding}/accept"), &[("reason", "Seen and agreed.")]).await;
        assert_eq!((answer.status, answer.location()), (StatusCode::SEE_OTHER, format!("{DRIVE}/accept").as_str()));
    }
    let page = world.get("max", &format!("{DRIVE}/accept")).await.text;
    assert!(page.contains("Ask another supervisor") && !page.contains("type=\"password\""), "{page}");
    let own = sign(world, "max", "accept", PASSWORD).await;
    assert_eq!(own.status, StatusCode::FORBIDDEN, "{}", own.text);
    assert!(own.text.contains("Ask another supervisor"));
    let accepted = sign(world, "tor", "accept", PASSWORD).await;
    assert_eq!(accepted.status, StatusCode::SEE_OTHER, "{}", accepted.text);
    in_again(world, "tor").await;
    assert!(matches!(view(world).await.drive.record.as_ref().expect("begun").status, Status::Accepted { .. }));
    let journal = world.get("rolf", &format!("{DRIVE}/journal")).await;
    is_sound("/journal", &journal.text);
    assert!(journal.text.contains("signed as reviewed and accepted, revision 1"));
    let file = world.get("rolf", &format!("{DRIVE}/journal/events")).await.text;
    let head = view(world).await.drive.head.clone();
    assert_eq!(u64::try_from(file.lines().count()).expect("few"), head.sequence, "every event is a line");
    assert!(file.lines().last().expect("one").contains(&head.hash));
}
