//! Where a record leads: on in the same phase, or nowhere while something it made outside waits to be seen.

use super::every_page::is_sound;
use super::guidance::supply;
use super::job::{DRIVE, pairs_of, view};
use super::steps::{SUPPLY, begun, names};
use super::world::{Answer, World};
use crate::components::{StripCell, strip};
use crate::progress::{self, Next};
use axum::http::StatusCode;
use commissioning::agenda::{self, StepState};
use commissioning::journal::Deed;

async fn post(world: &World, step: &str, pairs: &[(&str, &str)]) -> Answer {
    let answer = world.post("ines", &format!("{DRIVE}/steps/{step}"), pairs).await;
    assert_eq!(answer.status, StatusCode::SEE_OTHER, "{step}: {}", answer.text);
    answer
}

#[tokio::test]
async fn out_of_order_one_goes_on_in_the_same_phase_and_then_in_the_next() {
    let world = begun().await;
    let mut agenda = agenda::of(&view(&world).await.view());
    let at = agenda.phases.iter().position(|p| !p.open() && p.steps.len() > 2 && p.left() > 2).expect("one waits");
    let id = |n: usize, step: usize, agenda: &agenda::Agenda| agenda.phases[n].steps[step].id.clone();
    let step = |next: Next| match next {
        Next::Step { id, .. } => id,
        other => panic!("{other:?}"),
    };
    for one in &mut agenda.phases[at].steps {
        one.state = StepState::Open;
    }
    let (first, second, last) =
        (id(at, 0, &agenda), id(at, 1, &agenda), agenda.phases[at].steps.last().expect("steps").id.clone());
    assert_eq!(step(progress::after(&agenda, &first)), second);
    assert_eq!(step(progress::after(&agenda, &last)), first, "one that was passed over in this phase comes first");
    for one in &mut agenda.phases[at].steps {
        one.state = StepState::Settled;
    }
    let following = agenda.phases[at + 1..].iter().find(|p| p.left() > 0).expect("more");
    match progress::after(&agenda, &last) {
        Next::Hold { phase, .. } => assert_eq!(phase, following.id),
        Next::Step { id, .. } => assert!(following.steps.iter().any(|s| s.id == id), "{id}"),
        Next::Signature => panic!("much is left"),
    }
}

#[tokio::test]
async fn what_becomes_outside_at_another_step_is_said_by_name_where_it_was_brought_about() {
    let world = begun().await;
    // 15 MΩ at 40 °C stays 15 MΩ; at 0 °C it is a sixteenth of that at 40 °C (IEEE Std 43-2013, halving each 10 K).
    post(&world, "insulation-to-earth", &[("ir-60s.0", "15"), ("ir-60s.0.unit", "MΩ")]).await;
    let cold = [("winding-temperature.0", "0"), ("winding-temperature.0.unit", "°C")];
    let answer = post(&world, "test-conditions", &cold).await;
    assert!(answer.location().contains("&brought=insulation-resistance~insulation-to-earth"), "{}", answer.location());
    let page = world.get("ines", answer.location()).await.text;
    is_sound("test-conditions", &page);
    let said = page.split_once("this is outside now, elsewhere:").expect("said").1;
    assert!(said.contains(&format!("<a href=\"{DRIVE}/steps/insulation-to-earth\">")), "{said}");
    let made_up = format!("{DRIVE}/steps/test-conditions?recorded=whole&brought=supply-voltage~supply-volts");
    assert!(!world.get("ines", &made_up).await.text.contains("elsewhere:"), "an address makes nothing outside");
}

#[tokio::test]
async fn a_live_bus_says_which_finding_was_raised_and_asks_to_measure_again() {
    let world = begun().await;
    let now = view(&world).await;
    let (_, step) = now.procedure.step("prove-dead").expect("listed");
    let mut pairs = pairs_of(&now, step);
    for (name, value) in &mut pairs {
        if name == "bus-after-waiting.0" {
            "560".clone_into(value);
        }
    }
    let pairs: Vec<(&str, &str)> = pairs.iter().map(|(n, v)| (n.as_str(), v.as_str())).collect();
    let answer = post(&world, "prove-dead", &pairs).await;
    let page = world.get("ines", answer.location()).await.text;
    is_sound("prove-dead", &page);
    let said = page.split_once("class=\"stay\"").expect("stays").1.split_once("class=\"step").expect("step").0;
    assert!(said.contains("was raised for this: stops start-up.") && said.contains("Measure again"), "{said}");
    assert!(
        !said.contains("Raise a finding") && !said.contains("aise a finding,") && !said.contains("Next step"),
        "{said}"
    );
}

#[tokio::test]
async fn a_reason_is_asked_only_where_something_stands_that_it_would_overwrite() {
    let world = begun().await;
    let asks = async |path: &str| world.get("ines", path).await.text.contains("Give a reason for the change");
    assert!(!asks(SUPPLY).await && !asks(&format!("{DRIVE}/steps/set-ramps")).await);
    assert!(!asks("/sites/larch-ferry/-/site").await && asks(&format!("{DRIVE}/motor")).await);
    let name = names(&world.get("ines", SUPPLY).await.text)[0].clone();
    post(&world, "supply-volts", &[(name.as_str(), "398"), (&format!("{name}.unit"), "V")]).await;
    assert!(asks(SUPPLY).await);
}

#[tokio::test]
async fn a_sheet_says_at_once_that_the_plates_disagree() {
    let world = World::new().await;
    let motor = format!("{DRIVE}/motor");
    let wrong = [
        ("motor.0.volts", "400"),
        ("motor.0.amps", "275"),
        ("motor.0.hertz", "50"),
        ("motor.0.rpm", "1470"),
        ("motor.0.power", "15"),
        ("motor.0.power-factor", "0.86"),
        ("motor.0.efficiency", "91.8"),
        ("motor.0.machine", "induction"),
    ];
    let answer = world.post("ines", &motor, &wrong).await;
    let page = world.get("ines", answer.location()).await.text;
    is_sound("motor", &page);
    assert!(page.contains("With this the plates do not all agree:") && page.contains("href=\"#plates\""), "{page}");
    assert!(!world.get("ines", &motor).await.text.contains("do not all agree:"), "only where it was just kept");
}

#[tokio::test]
async fn an_instrument_whose_calibration_ran_out_says_so_and_stands_after_those_that_fit() {
    let world = begun().await;
    let known = view(&world).await.installation.instruments.values().find(|i| i.mark == "IT-07").expect("kept").clone();
    let ada = world.person("ada").await;
    let other =
        |mark: &str, due: &str, accuracy: &[commissioning::people::AccuracyRow]| commissioning::people::Instrument {
            id: commissioning::InstrumentId(uuid::Uuid::now_v7()),
            mark: mark.to_owned(),
            due: due.to_owned(),
            accuracy: accuracy.to_vec(),
            ..known.clone()
        };
    for instrument in [other("IT-01", "2026-01-31", &known.accuracy), other("IT-00", "2027-03-31", &[])] {
        world.act(Some(ada), Deed::KeepInstrument { instrument, seen: Vec::new() }).await;
    }
    let page = world.get("ines", SUPPLY).await.text;
    let page = page.split_once("Instrument for voltage").expect("one for all volts").1;
    let at = |mark: &str| page.find(&format!(">{mark} · ")).unwrap_or_else(|| panic!("{mark} is offered"));
    assert!(
        at("IT-07") < at("IT-01") && at("IT-01") < at("IT-00"),
        "fitting ones first, run out ones after them: {page}"
    );
    assert!(page.contains("calibration ran out on 2026-01-31") && page.contains("accuracy not known"), "{page}");
}

#[tokio::test]
async fn a_settled_phase_with_something_outside_does_not_look_like_a_clean_one() {
    let cell = |trouble| StripCell {
        short: "Supply".to_owned(),
        title: "Supply".to_owned(),
        address: "/".to_owned(),
        left: 0,
        waits: false,
        trouble,
        now: false,
    };
    let (clean, odd) = (strip(&[cell(None)]).into_string(), strip(&[cell(Some(("■", "outside")))]).into_string());
    assert!(clean.contains("done\"") && !clean.contains("outside"), "{clean}");
    assert!(odd.contains("troubled\"") && odd.contains("settled, outside") && odd.contains('■'), "{odd}");

    let world = begun().await;
    assert_eq!(supply(&world, "300").await.status, StatusCode::SEE_OTHER);
    let page = world.get("tor", DRIVE).await.text;
    assert!(page.contains("<span class=\"trouble\">"), "said beside the phase: {page}");
}
