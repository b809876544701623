//! A walker that does a whole commissioning through the pages: it fills each item by its kind and releases each hold point.

use super::every_page::is_sound;
use super::world::{Answer, World, noon};
use crate::progress::{self, Next};
use axum::body::Body;
use axum::http::{Request, StatusCode, header};
use commissioning::agenda;
use commissioning::journal::Deed;
use commissioning::people::{AccuracyRow, Instrument, Role};
use commissioning::plant::{FieldKind, Sheet};
use commissioning::procedure::{Item, ItemKind, Step, applies};
use commissioning::record::functions;
use commissioning::{InstrumentId, PersonId};
use engineering::Kind;
use store::DriveView;
use uuid::Uuid;

pub const DRIVE: &str = "/sites/larch-ferry/FN-204";
pub const PASSWORD: &str = "eleven geese over a weir";

/// What a fan drive's sheets hold: an invented 400 V, 50 Hz, four-pole motor of 7.5 kW.
const SHEETS: [(Sheet, &[(&str, &str)]); 6] = [
    (Sheet::Drive, &[("location", "dryer house")]),
    (Sheet::Supply, &[("volts", "400"), ("hertz", "50"), ("earthing", "tn-s"), ("fault-current", "5")]),
    (
        Sheet::DrivePlate,
        &[
            ("maker", "Vessel"),
            ("continuous-current", "18"),
            ("rated-power", "7.5"),
            ("waiting-time", "5"),
            ("short-circuit-rating", "10"),
        ],
    ),
    (
        Sheet::Motor,
        &[
            ("machine", "induction"),
            ("volts", "400"),
            ("amps", "14.7"),
            ("hertz", "50"),
            ("rpm", "1465"),
            ("power", "7.5"),
            ("power-factor", "0.83"),
            ("efficiency", "88.7"),
            ("connection", "delta"),
            ("cooling", "separate"),
        ],
    ),
    (
        Sheet::Cable,
        &[
            ("length", "30"),
            ("cross-section", "4"),
            ("metal", "copper"),
            ("pe-cross-section", "4"),
            ("pe-metal", "copper"),
            ("pe-length", "30"),
            ("pe-in-cable", "yes"),
        ],
    ),
    (Sheet::Load, &[("kind", "fan"), ("profile", "quadratic")]),
];

/// Passwords, an instrument, and someone who is engineer and supervisor at once.
pub async fn prepare(world: &mut World) {
    for login in ["ines", "tor"] {
        let person = world.person(login).await;
        world.app.store.set_password(person, PASSWORD, noon()).await.expect("a password");
        world.open(login, person).await;
    }
    let ada = world.person("ada").await;
    let max = PersonId(Uuid::now_v7());
    world
        .act(
            Some(ada),
            Deed::AddPerson {
                person: max,
                login: "max".to_owned(),
                name: "Max Ode".to_owned(),
                roles: vec![Role::Engineer, Role::Supervisor],
            },
        )
        .await;
    world.app.store.set_password(max, PASSWORD, noon()).await.expect("a password");
    world.open("max", max).await;
    let row = |kind: Kind| AccuracyRow {
        kind,
        unit: kind.usual().symbol.to_owned(),
        percent_of_reading: "0.5".to_owned(),
        digits: "1".to_owned(),
        resolution: "0.01".to_owned(),
        percent_of_full_scale: "0".to_owned(),
        full_scale: "1000".to_owned(),
    };
    let instrument = Instrument {
        id: InstrumentId(Uuid::now_v7()),
        mark: "IT-07".to_owned(),
        description: "multimeter".to_owned(),
        serial: "4711".to_owned(),
        due: "2027-03-31".to_owned(),
        accuracy: vec![row(Kind::Voltage), row(Kind::Current)],
        active: true,
    };
    world.act(Some(ada), Deed::KeepInstrument { instrument, seen: Vec::new() }).await;
}

/// The drive as it stands.
pub async fn view(world: &World) -> DriveView {
    world.app.store.drive_view("larch-ferry", "FN-204").await.expect("reads").expect("is there")
}

/// Fills in every sheet.
pub async fn fill_sheets(world: &World, login: &str) {
    for (sheet, fields) in SHEETS {
        let names: Vec<(String, &str)> = fields.iter().map(|(f, v)| (format!("{}.0.{f}", sheet.key()), *v)).collect();
        let pairs: Vec<(&str, &str)> = names.iter().map(|(n, v)| (n.as_str(), *v)).collect();
        let answer = world.post(login, &format!("{DRIVE}/{}", sheet.key()), &pairs).await;
        assert_eq!(answer.status, StatusCode::SEE_OTHER, "{sheet:?}: {}", answer.text);
    }
}

/// Begins the record.
pub async fn begin(world: &World, login: &str) {
    let answer = world.post(login, &format!("{DRIVE}/begin"), &[]).await;
    assert_eq!(answer.status, StatusCode::SEE_OTHER, "{}", answer.text);
    assert!(answer.location().starts_with(&format!("{DRIVE}/steps/")), "{}", answer.location());
}

/// Goes from step to step until the signature is next; every page on the way is sound. Gives how many steps it took.
pub async fn walk(world: &World, login: &str) -> usize {
    let mut walked = 0;
    let mut last = None;
    loop {
        let now = view(world).await;
        let next = progress::next(&agenda::of(&now.view()));
        assert_ne!(Some(&next), last.as_ref(), "the walk goes nowhere: {:?}", agenda::of(&now.view()).next());
        let address = next.address("larch-ferry", "FN-204");
        let page = world.get(login, &address).await;
        assert_eq!(page.status, StatusCode::OK, "{address}: {}", page.text);
        is_sound(&address, &page.text);
        let answer = match &next {
            Next::Signature => return walked,
            Next::Hold { phase, ready, .. } => {
                let sentences = agenda::of(&now.view())
                    .phases
                    .iter()
                    .find(|p| p.id == *phase)
                    .and_then(|p| p.hold.clone())
                    .map(|h| h.unmet);
                assert!(*ready, "{phase} waits: {sentences:?}");
                release(world, login, &address, &now, phase).await
            }
            Next::Step { id, .. } => fill(world, login, &address, &now, id).await,
        };
        assert_eq!(answer.status, StatusCode::SEE_OTHER, "{next:?}: {}", answer.text);
        walked += 1;
        last = Some(next);
    }
}

/// Walks on until a hold point is ready for its release; gives its address.
pub async fn to_the_first_release(world: &World) -> String {
    loop {
        let now = view(world).await;
        let next = progress::next(&agenda::of(&now.view()));
        let address = next.address("larch-ferry", "FN-204");
        match next {
            Next::Step { id, .. } => {
                let answer = fill(world, "ines", &address, &now, &id).await;
                assert_eq!(answer.status, StatusCode::SEE_OTHER, "{id}: {}", answer.text);
            }
            Next::Hold { .. } => return address,
            Next::Signature => panic!("no hold point on the way"),
        }
    }
}

async fn release(world: &World, login: &str, address: &str, now: &DriveView, phase: &str) -> Answer {
    let declare = now.procedure.phase(phase).and_then(|p| p.hold.as_ref()).expect("a hold point").declare.len();
    let names: Vec<String> = (0..declare).map(|n| format!("declared.{n}")).collect();
    let mut pairs: Vec<(&str, &str)> = names.iter().map(|n| (n.as_str(), "yes")).collect();
    pairs.extend([("role", "witness"), ("printed_name", "Ola Brandt")]);
    world.post(login, address, &pairs).await
}

async fn fill(world: &World, login: &str, address: &str, now: &DriveView, id: &str) -> Answer {
    let (_, step) = now.procedure.step(id).expect("listed");
    if let Some(sheet) = step.sheet.as_deref().filter(|_| step.items.is_empty()) {
        // Such a step is settled by its sheet alone: what it still needs is filled in there.
        assert_eq!(sheet, "further", "{id} should be settled by the sheets filled in before");
        return world.post(login, &format!("{DRIVE}/further"), &[("further.0.breakaway-time", "1")]).await;
    }
    let pairs = pairs_of(now, step);
    if step.items.iter().any(|i| matches!(i.kind, ItemKind::Photo)) {
        let pictures: Vec<String> = step
            .items
            .iter()
            .filter(|i| matches!(i.kind, ItemKind::Photo))
            .map(|i| format!("{}.0.file", i.key))
            .collect();
        return post_parts(world, login, address, &pairs, &pictures, &small_picture()).await;
    }
    let pairs: Vec<(&str, &str)> = pairs.iter().map(|(n, v)| (n.as_str(), v.as_str())).collect();
    world.post(login, address, &pairs).await
}

/// Every field of a step's form, filled in.
pub fn pairs_of(now: &DriveView, step: &Step) -> Vec<(String, String)> {
    let flags = now.view().flags();
    let rows = step.rows.len().max(1);
    let instrument = now.installation.instruments.keys().next().map(ToString::to_string).unwrap_or_default();
    let mut pairs = Vec::new();
    for item in step.items.iter().filter(|i| applies(&i.when, &flags) && (!i.optional || known(&i.key).is_some())) {
        for row in 0..rows {
            let name = format!("{}.{row}", item.key);
            let (text, unit) = text(item, row);
            if let Some(unit) = unit {
                pairs.push((format!("{name}.unit"), unit));
                pairs.push((format!("{name}.instrument"), instrument.clone()));
            }
            pairs.push((name, text));
        }
    }
    for f in step.parameters.iter().flat_map(|group| functions::group(group)) {
        pairs.extend(setting(now, step, f));
    }
    pairs
}

/// Intended values in the phase in which they are set, as left the same in the last.
fn setting(now: &DriveView, step: &Step, f: &functions::Function) -> Vec<(String, String)> {
    let place = |column| commissioning::record::ParameterPlace { function: f.key.to_owned(), column };
    let intended =
        now.drive.record.as_ref().and_then(|r| r.parameter(&place(commissioning::record::ParameterColumn::Intended)));
    let (column, text, unit) = match (step.parameters.as_deref(), intended) {
        (Some("*"), Some(intended)) => ("as-left", intended.text.clone(), intended.unit.clone()),
        (Some("*"), None) | (_, Some(_)) => return Vec::new(),
        _ => match f.kind {
            FieldKind::Quantity { kind, unit, low, high } => {
                let text =
                    known_setting(f.key).map_or_else(|| number(kind, unit, Some(low), Some(high)), str::to_owned);
                ("intended", text, Some(unit.to_owned()))
            }
            FieldKind::Choice(options) => ("intended", options[0].0.to_owned(), None),
            FieldKind::Flag => ("intended", "no".to_owned(), None),
            _ => ("intended", "as drawn".to_owned(), None),
        },
    };
    let name = format!("{}.{column}", f.key);
    let mut pairs = vec![(name.clone(), text)];
    pairs.extend(unit.map(|u| (format!("{name}.unit"), u)));
    pairs
}

/// What is typed at an item, with its unit.
fn text(item: &Item, row: usize) -> (String, Option<String>) {
    match &item.kind {
        ItemKind::Reading { quantity, unit, low, high, .. } => {
            let unit = unit.clone().unwrap_or_else(|| quantity.usual().symbol.to_owned());
            (known(&item.key).map_or_else(|| number(*quantity, &unit, *low, *high), str::to_owned), Some(unit))
        }
        ItemKind::Confirmation => ("yes".to_owned(), None),
        ItemKind::Choice { options } => (options[0].key.clone(), None),
        ItemKind::Note => (format!("seen, line {}", row + 1), None),
        ItemKind::Photo => ("as found".to_owned(), None),
    }
}

/// Readings that hold points look at, so that they are within.
fn known(key: &str) -> Option<&'static str> {
    Some(match key {
        "bus-after-waiting" | "bus-plus-to-earth" | "bus-minus-to-earth" | "input-dead" | "output-dead" => "3",
        "supply-u1-pe" | "supply-u2-pe" | "supply-u3-pe" => "231",
        "waited" => "6",
        "bus-energised" => "560",
        "discharge-time" => "6",
        "winding-temperature" => "25",
        "ambient-temperature" => "22",
        "relative-humidity" => "40",
        "ir-15s" => "800",
        "ir-30s" => "900",
        "ir-60s" => "1000",
        "test-voltage" => "500",
        "overload-restored" => "14.7",
        _ => return None,
    })
}

/// Settings that hold points look at, so that they are within: the plate's, and limits that fit it.
fn known_setting(key: &str) -> Option<&'static str> {
    Some(match key {
        "motor-volts" | "base-volts" => "400",
        "motor-amps" | "overload-current" | "test-overload-current" => "14.7",
        "motor-hertz" | "base-frequency" | "maximum-frequency" | "test-maximum-frequency" => "50",
        "motor-rpm" => "1465",
        "motor-power" => "7.5",
        "motor-power-factor" => "0.83",
        "minimum-frequency" => "40",
        "current-limit" | "test-current-limit" => "15",
        "skip-1-low" | "skip-2-low" | "skip-3-low" => "30",
        "skip-1-high" | "skip-2-high" | "skip-3-high" => "32",
        "switching-frequency" => "4",
        _ => return None,
    })
}

/// A believable number in its unit.
fn number(kind: Kind, unit: &str, low: Option<f64>, high: Option<f64>) -> String {
    let usual: f64 = match kind {
        Kind::Voltage => 400.0,
        Kind::Current => 10.0,
        Kind::LoopCurrent => 0.012,
        Kind::Frequency => 40.0,
        Kind::Speed => 1200.0,
        Kind::Temperature => 30.0,
        Kind::Percent => 0.5,
        Kind::Resistance if unit == "MΩ" => 1e9,
        Kind::Resistance => 0.05,
        Kind::Power => 5000.0,
        _ => 1.0,
    };
    let value = usual.clamp(low.unwrap_or(f64::MIN), high.unwrap_or(f64::MAX));
    engineering::rounding::significant(kind.unit(unit).expect("a unit").from_coherent(value), 4).replace(' ', "")
}

/// A small picture, JPEG.
pub fn small_picture() -> Vec<u8> {
    let mut bytes = std::io::Cursor::new(Vec::new());
    image::DynamicImage::new_rgb8(32, 24).write_to(&mut bytes, image::ImageFormat::Jpeg).expect("encodes");
    bytes.into_inner()
}

/// Posts a form in parts as a browser does: the token first, then the fields, then the pictures.
pub async fn post_parts(
    world: &World,
    login: &str,
    path: &str,
    pairs: &[(String, String)],
    pictures: &[String],
    bytes: &[u8],
) -> Answer {
    const EDGE: &str = "edge-of-a-part";
    let mut body: Vec<u8> = Vec::new();
    let seal = [("token".to_owned(), world.token(login)), ("act".to_owned(), Uuid::now_v7().to_string())];
    for (name, value) in seal.iter().chain(pairs) {
        body.extend(format!("--{EDGE}\r\ncontent-disposition: form-data; name=\"{name}\"\r\n\r\n{value}\r\n").bytes());
    }
    for name in pictures {
        body.extend(format!("--{EDGE}\r\ncontent-disposition: form-data; name=\"{name}\"; filename=\"p.jpg\"\r\ncontent-type: image/jpeg\r\n\r\n").bytes());
        body.extend(bytes);
        body.extend(b"\r\n");
    }
    body.extend(format!("--{EDGE}--\r\n").bytes());
    let request = Request::post(path)
        .header(header::COOKIE, world.cookie(login))
        .header(header::CONTENT_TYPE, format!("multipart/form-data; boundary={EDGE}"))
        .header("sec-fetch-site", "same-origin")
        .body(Body::from(body))
        .expect("a request");
    world.send(request).await
}

/// Takes the value of a hidden field out of a page.
pub fn hidden(page: &str, name: &str) -> String {
    let mark = format!("name=\"{name}\" value=\"");
    page.split_once(&mark).map(|(_, rest)| rest.split('"').next().unwrap_or_default().to_owned()).unwrap_or_default()
}
