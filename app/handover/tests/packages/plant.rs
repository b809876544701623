//! An invented drive for the tests: its chain, its site's chain, its record, every value typed by an invented person.

use commissioning::journal::{Chain, Event, Fact, Head, Sealed, seal};
use commissioning::judge::View;
use commissioning::people::{AccuracyRow, Instrument};
use commissioning::plant::{Place, Sheet, Site};
use commissioning::procedure::{ItemKind, Procedure, built_in::built_in};
use commissioning::record::canonical::RecordFile;
use commissioning::record::{
    Drive, Entry, EntryPlace, InstrumentUsed, Meaning, ParameterColumn, ParameterPlace, Photo, ReleaseRole,
    SettledOtherwise, Severity, apply,
};
use commissioning::{ActId, DriveId, EventId, FindingId, InstrumentId, PersonId, SiteId, Timestamp, Typed};
use engineering::Kind;
use handover::{Material, Photograph};

/// How far the record is to be brought.
#[derive(Clone, Copy, PartialEq, Eq)]
pub enum Stage {
    InProgress,
    Signed,
    Accepted,
}

pub struct Plant {
    pub procedure: Procedure,
    pub drive: Option<Drive>,
    pub site: Option<Site>,
    pub chain: Vec<Sealed>,
    pub site_chain: Vec<Sealed>,
    pub photos: Vec<Photograph>,
    count: u128,
    by: (u128, &'static str),
}

fn id(n: u128) -> uuid::Uuid {
    uuid::Uuid::from_u128(0x0190_0000_0000_7000_8000_0000_0000_0000 + n)
}

fn instrument() -> InstrumentUsed {
    let row = |kind, unit: &str, percent: &str, digits: &str, resolution: &str| AccuracyRow {
        kind,
        unit: unit.into(),
        percent_of_reading: percent.into(),
        digits: digits.into(),
        resolution: resolution.into(),
        percent_of_full_scale: "0".into(),
        full_scale: "0".into(),
    };
    InstrumentUsed(Instrument {
        id: InstrumentId(id(900)),
        mark: "IT-07".into(),
        description: "insulation tester and multimeter".into(),
        serial: "S-3391".into(),
        due: "2027-03-31".into(),
        accuracy: vec![
            row(Kind::Resistance, "MΩ", "1.5", "2", "0.1"),
            row(Kind::Voltage, "V", "0.5", "2", "0.1"),
            row(Kind::Current, "A", "1", "2", "0.1"),
            row(Kind::Time, "s", "0", "1", "0.1"),
            row(Kind::Temperature, "°C", "0", "1", "0.5"),
        ],
        active: true,
    })
}

impl Plant {
    pub fn new() -> Self {
        let mut plant = Self {
            procedure: built_in().expect("built-in procedure"),
            drive: None,
            site: None,
            chain: Vec::new(),
            site_chain: Vec::new(),
            photos: Vec::new(),
            count: 0,
            by: (1, "Rhea Albrandt"),
        };
        plant.site_event(Fact::SiteCreated { tag: "marrow-fen".into(), name: "Marrow Fen pumping station".into() });
        plant.site_event(Fact::SiteFieldSet {
            place: Place::new(Sheet::Site, "client"),
            value: Some(Typed::words("Fenland drainage board")),
        });
        plant.site_event(Fact::DriveListed { drive: DriveId(id(11)), tag: "PU-101".into() });
        plant.event(
            Fact::DriveCreated { site: SiteId(id(10)), tag: "PU-101".into(), name: "Raw-water pump 1".into() },
            None,
        );
        plant
    }

    fn made(&mut self, chain: Chain, fact: Fact, supersedes: Vec<EventId>, reason: Option<String>) -> Event {
        self.count += 1;
        let act = ActId(id(10_000 + self.count));
        let minutes = i64::try_from(self.count).unwrap() * 2;
        let start = Timestamp::parse("2026-11-17T07:30:00Z").unwrap().moment();
        Event {
            id: EventId::of(act, 1),
            act,
            chain,
            person: PersonId(id(100 + self.by.0)),
            person_name: self.by.1.to_owned(),
            received: Timestamp::new(start + time::Duration::minutes(minutes)),
            tablet: None,
            supersedes,
            reason,
            fact,
        }
    }

    fn site_event(&mut self, fact: Fact) {
        let event = self.made(Chain::Site(SiteId(id(10))), fact, Vec::new(), None);
        let head = self.site_chain.last().map_or_else(Head::empty, Sealed::head);
        self.site_chain.push(seal(&head, &event).unwrap());
        apply::to_site(&mut self.site, &event).unwrap();
    }

    /// An event of the drive; with a reason it supersedes the event before it of the same place.
    pub fn event(&mut self, fact: Fact, over: Option<(Vec<EventId>, &str)>) -> EventId {
        let (supersedes, reason) = over.map_or((Vec::new(), None), |(s, r)| (s, Some(r.to_owned())));
        let event = self.made(Chain::Drive(DriveId(id(11))), fact, supersedes, reason);
        let head = self.chain.last().map_or_else(Head::empty, Sealed::head);
        let sealed = seal(&head, &event).unwrap();
        apply::to_drive(&mut self.drive, &event, &sealed.head()).unwrap();
        self.chain.push(sealed);
        event.id
    }

    pub fn field(&mut self, sheet: Sheet, key: &str, text: &str, unit: &str) {
        let field = commissioning::plant::fields::find(sheet, key).unwrap_or_else(|| panic!("field {key}"));
        let value = field.understand(text, unit).unwrap_or_else(|e| panic!("{key}: {e}"));
        self.event(Fact::FieldSet { place: Place::new(sheet, key), value }, None);
    }

    fn typed(&self, item: &str, text: &str, unit: &str) -> (String, Entry) {
        let (step, found) = self.procedure.item(item).unwrap_or_else(|| panic!("item {item}"));
        let (value, used) = match &found.kind {
            ItemKind::Reading { quantity, .. } => (
                Typed::quantity(text, unit, *quantity).unwrap(),
                [Kind::Resistance, Kind::Voltage, Kind::Current, Kind::Time, Kind::Temperature].contains(quantity),
            ),
            _ => (Typed::words(text), false),
        };
        let instrument = used.then(instrument);
        (step.id.clone(), Entry { value, instrument, photo: None, out_of_order: false, accepted_because: None })
    }

    pub fn entry(&mut self, item: &str, row: u16, text: &str, unit: &str) -> EventId {
        let (step, entry) = self.typed(item, text, unit);
        self.event(Fact::EntryMade { place: EntryPlace::in_row(item, row), step, entry }, None)
    }

    pub fn correct(&mut self, before: EventId, item: &str, text: &str, unit: &str, why: &str) {
        let (step, entry) = self.typed(item, text, unit);
        self.event(Fact::EntryMade { place: EntryPlace::new(item), step, entry }, Some((vec![before], why)));
    }

    pub fn photo(&mut self, item: &str, caption: &str, bytes: Vec<u8>) {
        use sha2::Digest as _;
        let hash = commissioning::journal::chain::hexadecimal(&sha2::Sha256::digest(&bytes));
        let (step, mut entry) = self.typed(item, caption, "");
        let size = u64::try_from(bytes.len()).unwrap();
        entry.photo =
            Some(Photo { hash: hash.clone(), media: "image/png".into(), bytes: size, caption: caption.into() });
        self.event(Fact::EntryMade { place: EntryPlace::new(item), step, entry }, None);
        self.photos.push(Photograph { hash, media: "image/png".into(), bytes });
    }

    pub fn set(&mut self, function: &str, column: ParameterColumn, text: &str, unit: &str) {
        let value = match commissioning::record::functions::find(function).map(|f| f.kind) {
            Some(commissioning::plant::FieldKind::Quantity { kind, .. })
                if !matches!(column, ParameterColumn::Code | ParameterColumn::Explanation) =>
            {
                Typed::quantity(text, unit, kind).unwrap()
            }
            _ => Typed::words(text),
        };
        self.event(
            Fact::ParameterSet { place: ParameterPlace { function: function.into(), column }, value: Some(value) },
            None,
        );
    }

    pub fn view(&self) -> View<'_> {
        View { drive: self.drive.as_ref().unwrap(), site: self.site.as_ref().unwrap(), procedure: &self.procedure }
    }

    pub fn sign(&mut self, meaning: Meaning, by: (u128, &'static str)) {
        self.by = by;
        let file = RecordFile::shown(&self.view());
        let fact = Fact::Signed {
            meaning,
            revision: file.record.as_ref().unwrap().revision,
            digest: file.digest(),
            head: file.head.clone(),
            catalogue: file.catalogue,
            verdicts: file.verdicts.clone(),
            site: Box::new(file.site.clone()),
        };
        self.event(fact, None);
    }

    pub fn material(&self) -> Material {
        Material {
            firm: "Hollin drive works".into(),
            record: RecordFile::shown(&self.view()),
            chain: self.chain.clone(),
            site_chain: self.site_chain.clone(),
            photos: self.photos.clone(),
        }
    }
}

/// A small picture: a valid PNG of one colour.
pub fn picture() -> Vec<u8> {
    vec![
        0x89, b'P', b'N', b'G', 0x0d, 0x0a, 0x1a, 0x0a, 0, 0, 0, 13, b'I', b'H', b'D', b'R', 0, 0, 0, 1, 0, 0, 0, 1, 8,
        0, 0, 0, 0, 0x3a, 0x7e, 0x9b, 0x55, 0, 0, 0, 10, b'I', b'D', b'A', b'T', 0x78, 0x9c, 0x63, 0x68, 0, 0, 0, 0x82,
        0, 0x81, 0xdd, 0x43, 0x6a, 0xf4, 0, 0, 0, 0, b'I', b'E', b'N', b'D', 0xae, 0x42, 0x60, 0x82,
    ]
}

/// A whole drive, as far as `stage`.
pub fn pump(stage: Stage) -> Plant {
    let mut p = Plant::new();
    for (sheet, key, text, unit) in [
        (Sheet::Drive, "location", "pump hall, bay 4", ""),
        (Sheet::Drive, "panel", "LC2", ""),
        (Sheet::Supply, "volts", "400", "V"),
        (Sheet::Supply, "hertz", "50", "Hz"),
        (Sheet::DrivePlate, "maker", "Ostrand", ""),
        (Sheet::DrivePlate, "type", "OD-150", ""),
        (Sheet::DrivePlate, "serial", "D-20431-A", ""),
        (Sheet::DrivePlate, "firmware", "4.12", ""),
        (Sheet::DrivePlate, "input-volts-low", "380", "V"),
        (Sheet::DrivePlate, "input-volts-high", "480", "V"),
        (Sheet::DrivePlate, "continuous-current", "150", "A"),
        (Sheet::Motor, "connection", "delta", ""),
        (Sheet::Motor, "volts", "400", "V"),
        (Sheet::Motor, "amps", "133", "A"),
        (Sheet::Motor, "hertz", "50", "Hz"),
        (Sheet::Motor, "rpm", "1485", "rpm"),
        (Sheet::Motor, "power", "75", "kW"),
        (Sheet::Motor, "power-factor", "0.86", ""),
        (Sheet::Motor, "efficiency", "94.9", "%"),
        (Sheet::Motor, "serial", "M-55120-7", ""),
        (Sheet::Motor, "machine", "induction", ""),
        (Sheet::Motor, "inertia", "0.9", "kg·m²"),
        (Sheet::Motor, "construction", "random-wound", ""),
        (Sheet::Cable, "length", "48", "m"),
        (Sheet::Cable, "cross-section", "70", "mm²"),
        (Sheet::Load, "kind", "pump", ""),
        (Sheet::Load, "profile", "quadratic", ""),
        (Sheet::Load, "inertia", "1.0", "kg·m²"),
        (Sheet::Load, "power", "62", "kW"),
        (Sheet::Load, "at-speed", "1485", "rpm"),
        (Sheet::Load, "direction", "clockwise", ""),
    ] {
        p.field(sheet, key, text, unit);
    }
    p.event(Fact::RecordBegun { procedure: p.procedure.version }, None);
    let phase = p.procedure.phases.iter().find(|ph| ph.hold.is_some()).unwrap().id.clone();
    p.event(Fact::HoldReleased { phase, role: ReleaseRole::Witness, printed_name: "Imre Vandal".into() }, None);
    p.entry("winding-temperature", 0, "20", "°C");
    let wrong = p.entry("ir-60s", 0, "41.0", "MΩ");
    p.correct(wrong, "ir-60s", "410", "MΩ", "decimal point misread");
    p.entry("ir-15s", 0, "210", "MΩ");
    p.entry("ir-30s", 0, "290", "MΩ");
    for (row, (hertz, volts, amps)) in
        [("12.5", "103", "38.1"), ("25", "201", "38.9"), ("37.5", "300", "39.4"), ("50", "399", "40.2")]
            .into_iter()
            .enumerate()
    {
        let row = u16::try_from(row).unwrap();
        p.entry("run-hz", row, hertz, "Hz");
        p.entry("run-volts", row, volts, "V");
        p.entry("run-i-u", row, amps, "A");
        p.entry("run-i-v", row, amps, "A");
        p.entry("run-i-w", row, amps, "A");
    }
    p.entry("start-time", 0, "15.3", "s");
    p.entry("start-to-hertz", 0, "50", "Hz");
    p.entry("direction-drive", 0, "clockwise", "");
    for (function, code, found, intended, left, unit) in [
        ("motor-volts", "row 3", "400", "400", "400", "V"),
        ("motor-amps", "row 4", "150", "133", "133", "A"),
        ("motor-hertz", "row 5", "50", "50", "50", "Hz"),
        ("motor-rpm", "row 6", "1470", "1485", "1485", "rpm"),
        ("acceleration-time", "row 12", "5", "15.0", "15.0", "s"),
        ("deceleration-time", "row 13", "5", "20.0", "20.0", "s"),
        ("minimum-frequency", "row 21", "0", "25", "25", "Hz"),
        ("maximum-frequency", "row 22", "50", "50", "50", "Hz"),
        ("current-limit", "=row 31", "225", "146", "146", "A"),
    ] {
        p.set(function, ParameterColumn::Code, code, "");
        p.set(function, ParameterColumn::AsFound, found, unit);
        p.set(function, ParameterColumn::Intended, intended, unit);
        p.set(function, ParameterColumn::AsLeft, left, unit);
    }
    p.event(Fact::ParameterRowAdded { key: "row-1".into(), label: "display line 2 shows".into() }, None);
    p.set("row-1", ParameterColumn::AsLeft, "motor amps", "");
    let finding = FindingId(id(500));
    let text = "#set page() *gland* of the motor cable is `loose` $x$ @ref <b> \\ 泵 ✓ ☐ 😀 مضخة";
    p.event(
        Fact::FindingRaised { finding, number: 1, severity: Severity::BeforeHandover, text: text.into(), step: None },
        None,
    );
    p.event(Fact::FindingSettled { finding, how: "tightened, pulled, holds".into() }, None);
    let first = p.procedure.steps().next().unwrap().1.id.clone();
    let could_not = Fact::StepSettled { step: first.clone(), how: SettledOtherwise::CouldNotBeDone };
    p.event(could_not, Some((Vec::new(), "crane in the way")));
    p.event(Fact::StepResumed { step: first }, None);
    let step = p.procedure.steps().last().unwrap().1.id.clone();
    p.event(
        Fact::StepSettled { step, how: SettledOtherwise::NotApplicable },
        Some((Vec::new(), "nothing of the kind here")),
    );
    p.event(
        Fact::RemarkMade { step: String::new(), text: format!("long word {} ends", "abcdefghij".repeat(20)) },
        None,
    );
    let item =
        p.procedure.steps().flat_map(|(_, s)| &s.items).find(|i| i.kind == ItemKind::Photo).map(|i| i.key.clone());
    p.photo(&item.expect("the procedure asks for pictures"), "nameplate of the motor", picture());
    if stage != Stage::InProgress {
        p.sign(Meaning::Performed, (1, "Rhea Albrandt"));
    }
    if stage == Stage::Accepted {
        p.sign(Meaning::Accepted, (2, "Mikko Ilvonen"));
    }
    p
}
