//! The generated sheet forms: what was typed comes back, every fault at its field, markup stays words, verdicts follow the typing.

use super::every_page::is_sound;
use super::world::World;
use axum::http::StatusCode;
use commissioning::plant::{FieldKind, Place, Sheet, fields};

const MOTOR: &str = "/sites/larch-ferry/FN-204/motor";

/// The same motor as row MN-01 of the reference values would have it: 15 kW, 400 V, 27.5 A at cosφ 0.86 and 91.8 %.
const GOOD: [(&str, &str); 8] = [
    ("motor.0.volts", "400"),
    ("motor.0.amps", "27,5"),
    ("motor.0.hertz", "50"),
    ("motor.0.rpm", "1470"),
    ("motor.0.power", "15"),
    ("motor.0.power-factor", "0.86"),
    ("motor.0.efficiency", "91.8"),
    ("motor.0.machine", "induction"),
];

#[tokio::test]
async fn a_plate_is_recorded_as_typed() {
    let world = World::new().await;
    let answer = world.post("ines", MOTOR, &GOOD).await;
    let told = format!("{MOTOR}?saved=8");
    assert_eq!((answer.status, answer.location()), (StatusCode::SEE_OTHER, told.as_str()), "{}", answer.text);
    assert!(world.get("ines", &told).await.text.contains("Saved: Motor nameplate, 8 fields changed."));
    let page = world.get("ines", MOTOR).await.text;
    assert!(page.contains("value=\"27,5\"") && page.contains("Ines Lund"), "as typed, and by whom");
}

#[tokio::test]
async fn every_fault_stands_at_its_field_and_what_was_typed_is_kept() {
    let world = World::new().await;
    let long = "9".repeat(10_000);
    let cases = [
        ("letters", "abc"),
        ("negative", "-5"),
        ("absurd", "900000000000"),
        ("two ways", "1,485"),
        ("two signs", "1..2"),
        ("long", long.as_str()),
        ("markup", "<script>alert(1)</script>"),
        ("quotes", "\"'><img src=x onerror=alert(1)>"),
    ];
    for (what, typed) in cases {
        let answer = world.post("ines", MOTOR, &[("motor.0.rpm", typed), ("motor.0.maker", "Vessel & Sons <b>")]).await;
        assert_eq!(answer.status, StatusCode::UNPROCESSABLE_ENTITY, "{what}");
        is_sound(what, &answer.text);
        assert_eq!(
            answer.text.matches("class=\"error\"").count(),
            1,
            "{what}: one error, at the one field that is wrong"
        );
        assert!(answer.text.contains("id=\"e-motor.0.rpm\""), "{what}");
        let escaped = typed.replace('&', "&amp;").replace('<', "&lt;").replace('>', "&gt;").replace('"', "&quot;");
        assert!(answer.text.contains(&format!("value=\"{escaped}\"")), "{what}: what was typed is kept");
        assert!(answer.text.contains("Vessel &amp; Sons &lt;b&gt;"), "{what}: the good field is kept too");
        assert!(
            !answer.text.contains("<script>alert") && !answer.text.contains("<img src=x"),
            "{what}: markup stays words"
        );
    }
    let page = world.get("ines", MOTOR).await.text;
    assert!(!page.contains("Vessel"), "nothing of a refused form is recorded");
}

#[tokio::test]
async fn a_wrong_unit_is_refused_and_an_empty_field_is_none() {
    let world = World::new().await;
    let answer = world.post("ines", MOTOR, &[("motor.0.volts", "400"), ("motor.0.volts.unit", "furlong")]).await;
    assert_eq!(answer.status, StatusCode::UNPROCESSABLE_ENTITY);
    assert!(answer.text.contains("id=\"e-motor.0.volts\""));
    let answer = world.post("ines", MOTOR, &[("motor.0.volts", "  "), ("motor.0.maker", "")]).await;
    assert_eq!(answer.status, StatusCode::SEE_OTHER, "nothing typed is nothing to record");
}

/// Every quantity of every sheet of a drive: letters in all of them give as many errors as fields.
#[tokio::test]
async fn one_error_for_every_wrong_field_of_every_sheet() {
    let world = World::new().await;
    for sheet in super::super::pages::sheets::frame::SHEETS {
        let quantities: Vec<String> = fields::of(sheet)
            .iter()
            .chain(fields::in_columns(sheet))
            .filter(|f| matches!(f.kind, FieldKind::Quantity { .. }))
            .map(|f| Place::new(sheet, f.key).to_string())
            .collect();
        let pairs: Vec<(&str, &str)> = quantities.iter().map(|name| (name.as_str(), "<i>many</i>")).collect();
        if pairs.is_empty() {
            continue;
        }
        let answer = world.post("ines", &format!("/sites/larch-ferry/FN-204/{}", sheet.key()), &pairs).await;
        assert_eq!(answer.status, StatusCode::UNPROCESSABLE_ENTITY, "{sheet:?}");
        assert_eq!(answer.text.matches("class=\"error\"").count(), pairs.len(), "{sheet:?}");
        assert!(!answer.text.contains("<i>many"), "{sheet:?}");
        is_sound(sheet.key(), &answer.text);
    }
    assert!(fields::of(Sheet::Motor).len() > 10, "the table is there");
}

#[tokio::test]
async fn verdicts_follow_what_is_typed_and_nothing_is_recorded() {
    let world = World::new().await;
    let live = format!("{MOTOR}/live");
    let right = world.post("ines", &live, &GOOD).await;
    assert_eq!(right.status, StatusCode::OK, "{}", right.text);
    assert!(right.text.contains("class=\"verdict") && !right.text.contains("<html"), "a fragment with panels");
    // Horsepower read as kilowatts: 20 hp typed as 20 kW makes the plate contradict itself.
    let mut wrong = GOOD;
    wrong[4].1 = "20";
    let wrong = world.post("ines", &live, &wrong).await.text;
    assert_ne!(right.text, wrong);
    assert!(wrong.contains("mark outside") || wrong.contains("mark marginal"), "{wrong}");
    assert!(wrong.contains("Power read as 20 kW; 20 hp would fit: the unit."), "{wrong}");
    assert!(
        world.post("ines", &live, &[("motor.0.volts", "<b>abc")]).await.status.is_success(),
        "half-typed is no error while typing"
    );
    assert!(!world.get("ines", MOTOR).await.text.contains("value=\"27,5\""));
}

#[tokio::test]
async fn a_supervisor_fills_in_sheets_until_the_record_is_begun() {
    let world = World::new().await;
    let path = "/sites/larch-ferry/FN-204/motor";
    let inputs = "name=\"motor.0.volts\"";
    let kept = world.post("tor", path, &[("motor.0.volts", "400"), ("motor.0.volts.unit", "V")]).await;
    assert_eq!(kept.status, StatusCode::SEE_OTHER, "{}", kept.text);
    assert!(world.get("tor", path).await.text.contains(inputs));
    assert!(world.get("tor", "/").await.text.contains("FN-204"), "what is begun by hand stands on the start page");
    assert!(!world.get("rolf", path).await.text.contains(inputs));
    super::job::begin(&world, "ines").await;
    assert!(!world.get("tor", path).await.text.contains(inputs));
    assert!(world.get("ines", path).await.text.contains(inputs));
}
