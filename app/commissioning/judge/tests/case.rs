//! A drive made of a few fields and entries, to see what one check makes of them.

use crate::judge::{View, run};
use crate::people::{AccuracyRow, Instrument};
use crate::plant::{FieldKind, Place, Recorded, Sheet, Site, Slot, fields};
use crate::procedure::built_in::built_in;
use crate::procedure::{ItemKind, Procedure};
use crate::record::entry::InstrumentUsed;
use crate::record::{Drive, Entry, EntryPlace, ParameterColumn, ParameterPlace, SettledOtherwise, functions};
use crate::world::{ERIN, World};
use crate::{EventId, InstrumentId, Typed};
use engineering::{Outcome, Verdict};
use uuid::Uuid;

/// A field: sheet, key, what was typed.
pub(super) type Field = (Sheet, &'static str, &'static str);
/// An entry: item, what was typed; `item/2` is row 2.
pub(super) type Typing = (&'static str, &'static str);

pub(super) struct Case {
    drive: Drive,
    site: Site,
    procedure: Procedure,
}

impl Case {
    /// Of these fields and entries; every reading was taken with a meter of 0.1 % of reading.
    pub(super) fn of(set: &[Field], entered: &[Typing]) -> Self {
        let world = World::begun();
        let (site, drive) = (world.site.clone().unwrap(), world.drive().clone());
        let mut case = Self { drive, site, procedure: built_in().unwrap() };
        for (sheet, key, text) in set {
            case.set(*sheet, 0, key, text);
        }
        for (place, text) in entered {
            case.enter(place, text);
        }
        case
    }

    pub(super) fn set(&mut self, sheet: Sheet, column: u8, key: &str, text: &str) {
        let field = fields::find(sheet, key).unwrap_or_else(|| panic!("no field `{key}`"));
        let value = field.understand(text, "").unwrap_or_else(|e| panic!("{key}: {e}"));
        let values = if sheet == Sheet::Site { &mut self.site.fields } else { &mut self.drive.fields };
        let mut slot = Slot::default();
        slot.put(recorded(value), &[]);
        values.insert(Place::in_column(sheet, column, key), slot);
    }

    fn enter(&mut self, place: &str, text: &str) {
        let (item, row) = place.split_once('/').map_or((place, 0), |(item, row)| (item, row.parse().unwrap()));
        let (_, known) = self.procedure.item(item).unwrap_or_else(|| panic!("no item `{item}`"));
        let (value, instrument) = match &known.kind {
            ItemKind::Reading { quantity, unit, .. } => {
                let unit = unit.clone().unwrap_or_else(|| quantity.usual().symbol.to_owned());
                (Typed::quantity(text, &unit, *quantity).unwrap(), Some(meter(*quantity)))
            }
            _ => (Typed::words(text), None),
        };
        let entry = Entry { value, instrument, photo: None, out_of_order: false, accepted_because: None };
        let mut slot = Slot::default();
        slot.put(recorded(entry), &[]);
        self.drive.record.as_mut().unwrap().entries.insert(EntryPlace::in_row(item, row), slot);
    }

    /// Sets a row of the parameter record.
    pub(super) fn parameter(&mut self, place: ParameterPlace, text: &str, kind: engineering::Kind) {
        let value = Typed::quantity(text, kind.usual().symbol, kind).unwrap();
        let mut slot = Slot::default();
        slot.put(recorded(Some(value)), &[]);
        self.drive.record.as_mut().unwrap().parameters.insert(place, slot);
    }

    /// Keys in a row of the parameter record, whatever its kind.
    pub(super) fn keyed(&mut self, function: &str, column: ParameterColumn, text: &str) {
        let known = functions::find(function).unwrap_or_else(|| panic!("no function `{function}`"));
        let value = match known.kind {
            FieldKind::Quantity { kind, unit, .. } => Typed::quantity(text, unit, kind).unwrap(),
            _ => Typed::words(text),
        };
        let mut slot = Slot::default();
        slot.put(recorded(Some(value)), &[]);
        let place = ParameterPlace { function: function.to_owned(), column };
        self.drive.record.as_mut().unwrap().parameters.insert(place, slot);
    }

    /// Settles a step without its entries.
    pub(super) fn leave_out(&mut self, step: &str) {
        let value = (SettledOtherwise::NotApplicable, "not done here".to_owned());
        self.drive.record.as_mut().unwrap().otherwise.insert(step.to_owned(), recorded(value));
    }

    pub(super) fn view(&self) -> View<'_> {
        View { drive: &self.drive, site: &self.site, procedure: &self.procedure }
    }

    /// What a check says, for each thing it was run for.
    pub(super) fn runs(&self, check: &str) -> Vec<(String, Outcome)> {
        let view = self.view();
        run(&view, check, "").into_iter().map(|j| (j.of, j.outcome)).collect()
    }

    /// What a check says that runs once.
    pub(super) fn once(&self, check: &str) -> Outcome {
        let mut runs = self.runs(check);
        assert_eq!(runs.len(), 1, "{check} runs once");
        runs.remove(0).1
    }
}

pub(super) fn recorded<T>(value: T) -> Recorded<T> {
    Recorded {
        value,
        event: EventId("1-1".to_owned()),
        sequence: 1,
        by: ERIN,
        by_name: "Erin Alder".to_owned(),
        received: World::empty().now(),
        tablet: None,
        reason: None,
    }
}

fn meter(kind: engineering::Kind) -> InstrumentUsed {
    let row = AccuracyRow {
        kind,
        unit: kind.usual().symbol.to_owned(),
        percent_of_reading: "0.1".to_owned(),
        digits: String::new(),
        resolution: String::new(),
        percent_of_full_scale: String::new(),
        full_scale: String::new(),
    };
    InstrumentUsed(Instrument {
        id: InstrumentId(Uuid::from_u128(0x17)),
        mark: "MM-1".to_owned(),
        description: "Bench meter".to_owned(),
        serial: "1".to_owned(),
        due: "2099-01-01".to_owned(),
        accuracy: vec![row],
        active: true,
    })
}

/// A table of cases of one check that runs once: fields, entries, verdict, limit.
#[track_caller]
pub(super) fn hold(check: &str, base: &[Field], cases: &[(&[Field], &[Typing], Verdict, &str)]) {
    for (n, (set, entered, verdict, limit)) in cases.iter().enumerate() {
        let outcome = Case::of(&[base, set].concat(), entered).once(check);
        let said = (outcome.verdict, outcome.limit.as_str());
        assert_eq!(said, (*verdict, *limit), "{check}, case {n}: {} {:?}", outcome.summary, outcome.missing);
    }
}
