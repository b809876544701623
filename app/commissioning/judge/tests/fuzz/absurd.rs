//! Records made of anything: every field, setting and reading with what nobody would type, from a number that names them.

use crate::judge::tests::case::recorded;
use crate::people::{AccuracyRow, Instrument};
use crate::plant::{Field, FieldKind, Place, Sheet, Site, Slot, fields};
use crate::procedure::{ChoiceOption, ItemKind, Procedure};
use crate::record::entry::InstrumentUsed;
use crate::record::{Drive, Entry, EntryPlace, ParameterColumn, ParameterPlace, functions};
use crate::world::World;
use crate::{InstrumentId, Typed};
use engineering::Kind;
use uuid::Uuid;

/// Splitmix64, after Steele, Lea and Flood 2014: the same record from the same number on every machine.
pub(super) struct Dice(u64);

impl Dice {
    pub(super) const fn new(seed: u64) -> Self {
        Self(seed)
    }

    fn next(&mut self) -> u64 {
        self.0 = self.0.wrapping_add(0x9E37_79B9_7F4A_7C15);
        let mut z = self.0;
        z = (z ^ (z >> 30)).wrapping_mul(0xBF58_476D_1CE4_E5B9);
        z = (z ^ (z >> 27)).wrapping_mul(0x94D0_49BB_1331_11EB);
        z ^ (z >> 31)
    }

    /// From 0 up to below this.
    fn below(&mut self, count: usize) -> usize {
        (self.next() % count.max(1) as u64) as usize
    }

    /// From 0 to 1.
    fn part(&mut self) -> f64 {
        (self.next() >> 11) as f64 / (1u64 << 53) as f64
    }

    fn chance(&mut self, part: f64) -> bool {
        self.part() < part
    }

    fn pick<'a, T>(&mut self, of: &'a [T]) -> &'a T {
        &of[self.below(of.len())]
    }
}

/// How wild a record is.
#[derive(Clone, Copy)]
pub(super) struct Wildness {
    /// How many of the places are filled.
    filled: f64,
    /// How many of the numbers are ones that no form would let through.
    impossible: f64,
}

/// The tables of the demo drives: what a sound record says, for records that are absurd in a few places only.
const TABLES: &[&str] = &[
    include_str!("../../../../../seed-demo/tables/agitator.toml"),
    include_str!("../../../../../seed-demo/tables/dust-fan.toml"),
    include_str!("../../../../../seed-demo/tables/reclaim-belt.toml"),
    include_str!("../../../../../seed-demo/tables/screw-feeder.toml"),
    include_str!("../../../../../seed-demo/tables/service-hoist.toml"),
    include_str!("../../../../../seed-demo/tables/shore-pump.toml"),
    include_str!("../../../../../seed-demo/tables/storm-pump.toml"),
    include_str!("../../../../../seed-demo/tables/wash-pump.toml"),
];
/// What is the same at all of them.
const USUAL: &str = include_str!("../../../../../seed-demo/tables/usual.toml");

/// What a sound record says, by place; all the tables there are.
pub(super) struct Sound(Vec<toml::Table>, toml::Table);

impl Sound {
    pub(super) fn read() -> Self {
        let tables: Vec<toml::Table> = TABLES.iter().map(|text| toml::from_str(text).unwrap()).collect();
        assert!(tables.iter().all(|t| t.contains_key("sheets") && t.contains_key("columns")), "another form of tables");
        Self(tables, toml::from_str(USUAL).unwrap())
    }

    /// The text at a key, or in one row of it.
    fn text(value: Option<&toml::Value>, row: usize) -> Option<&str> {
        match value? {
            toml::Value::Array(rows) => rows.get(row)?.as_str(),
            one => one.as_str(),
        }
    }

    fn field(table: &toml::Table, sheet: Sheet, column: u8, key: &str) -> Option<String> {
        let of_column = table["columns"].as_array().and_then(|all| all.get(usize::from(column))?.get(key));
        let of_sheet = table["sheets"].get(sheet.key()).and_then(|s| s.get(key));
        Self::text(of_sheet.or(of_column.filter(|_| sheet == Sheet::Motor)), 0).map(str::to_owned)
    }

    fn entry(&self, table: &toml::Table, item: &str, row: usize) -> Option<String> {
        let of = |table: &toml::Table| Self::text(table.get("entries")?.get(item), row).map(str::to_owned);
        of(table).or_else(|| of(&self.1))
    }

    fn setting(table: &toml::Table, function: &str) -> Option<String> {
        let value = table.get("settings")?.get(function)?;
        Self::text(Some(value), 1).or_else(|| Self::text(Some(value), 0)).map(str::to_owned)
    }
}

/// What the sheets, the steps and the settings say, and with which instruments the readings were taken.
pub(super) struct Absurd {
    pub(super) drive: Drive,
    pub(super) site: Site,
    pub(super) procedure: Procedure,
}

/// Numbers that a damaged or foreign record could hold in the place of the understood one.
const IMPOSSIBLE: &[&str] =
    &["NaN", "inf", "-inf", "1e308", "-1e308", "1e-308", "5e-324", "-0", "", "words", "0", "-1", "1e30"];

/// Words in the place of a choice, a flag, a date or a table.
const ODD_WORDS: &[&str] =
    &["", "yes", "no", "1", "-3", "999", "not-needed", "½", "kW", "0 ; 0\n100 ; 100", "50;-400\n60;400"];

impl Absurd {
    /// The record of this number.
    pub(super) fn of(seed: u64, procedure: &Procedure, sound: &Sound) -> Self {
        let mut dice = Dice::new(seed);
        let table = if dice.chance(0.7) { Some(dice.pick(&sound.0)) } else { None };
        let kept = *dice.pick(&[0.5, 0.9, 0.98, 1.0]);
        let filled = *dice.pick(&[0.3, 0.7, 0.95, 1.0]);
        let impossible = *dice.pick(&[0.0, 0.0, 0.01, 0.2]);
        let how = Wildness { filled, impossible };
        let world = World::begun();
        let (site, drive) = (world.site.clone().unwrap(), world.drive().clone());
        let mut made = Self { drive, site, procedure: procedure.clone() };
        // Each place keeps what the table says, or is filled with anything.
        made.sheets(&mut dice, how, |dice, sheet, column, key| {
            table.filter(|_| dice.chance(kept)).and_then(|t| Sound::field(t, sheet, column, key))
        });
        made.settings(&mut dice, how, |dice, function| {
            table.filter(|_| dice.chance(kept)).and_then(|t| Sound::setting(t, function))
        });
        made.entries(&mut dice, how, |dice, item, row| {
            table.filter(|_| dice.chance(kept)).and_then(|t| sound.entry(t, item, row))
        });
        made
    }

    fn sheets(&mut self, dice: &mut Dice, how: Wildness, sound: impl Fn(&mut Dice, Sheet, u8, &str) -> Option<String>) {
        for sheet in Sheet::ALL {
            let mut places: Vec<(u8, &Field)> = fields::of(sheet).iter().map(|f| (0, f)).collect();
            // Most plates have one rating column, and a check that needs it wants it whole.
            let columns = if dice.chance(0.2) { sheet.columns() } else { 1 };
            places.extend((0..columns).flat_map(|c| fields::in_columns(sheet).iter().map(move |f| (c, f))));
            for (column, field) in places {
                if !dice.chance(how.filled) {
                    continue;
                }
                let said = sound(dice, sheet, column, field.key);
                let typed = said.map_or_else(|| value(dice, &field.kind, how), |text| typed(&field.kind, &text));
                let values = if sheet == Sheet::Site { &mut self.site.fields } else { &mut self.drive.fields };
                values.insert(Place::in_column(sheet, column, field.key), slot(Some(typed)));
            }
        }
    }

    fn settings(&mut self, dice: &mut Dice, how: Wildness, sound: impl Fn(&mut Dice, &str) -> Option<String>) {
        let record = self.drive.record.as_mut().unwrap();
        for function in functions::FUNCTIONS {
            for column in [ParameterColumn::Intended, ParameterColumn::AsLeft] {
                if dice.chance(how.filled) {
                    let place = ParameterPlace { function: function.key.to_owned(), column };
                    let said = sound(dice, function.key);
                    let typed =
                        said.map_or_else(|| value(dice, &function.kind, how), |text| typed(&function.kind, &text));
                    record.parameters.insert(place, slot(Some(typed)));
                }
            }
        }
    }

    fn entries(&mut self, dice: &mut Dice, how: Wildness, sound: impl Fn(&mut Dice, &str, usize) -> Option<String>) {
        let record = self.drive.record.as_mut().unwrap();
        for (_, step) in self.procedure.steps() {
            for item in &step.items {
                for row in 0..u16::try_from(step.rows.len().max(1)).unwrap() {
                    if !dice.chance(how.filled) {
                        continue;
                    }
                    let (value, instrument) = match &item.kind {
                        ItemKind::Reading { quantity, unit, low, high, .. } => {
                            let unit = unit.clone().unwrap_or_else(|| quantity.usual().symbol.to_owned());
                            let (low, high) = (low.unwrap_or(0.0), high.unwrap_or(1e6));
                            let said =
                                sound(dice, &item.key, usize::from(row)).map(|text| parted(*quantity, &unit, &text));
                            let number = said.unwrap_or_else(|| number(dice, *quantity, &unit, (low, high), how));
                            (number, instrument(dice, *quantity))
                        }
                        ItemKind::Choice { options } => {
                            let said = sound(dice, &item.key, usize::from(row));
                            (Typed::words(said.unwrap_or_else(|| choice(dice, options))), None)
                        }
                        ItemKind::Confirmation if dice.chance(0.9) => (Typed::words("yes"), None),
                        _ => (Typed::words(*dice.pick(ODD_WORDS)), None),
                    };
                    let entry = Entry { value, instrument, photo: None, out_of_order: false, accepted_because: None };
                    record.entries.insert(EntryPlace::in_row(&item.key, row), slot(entry));
                }
            }
        }
    }

    /// A demo drive's record as its table says it, every reading with an instrument in calibration.
    pub(super) fn sound(number: usize, procedure: &Procedure, sound: &Sound) -> Self {
        let mut dice = Dice::new(1);
        let how = Wildness { filled: 1.0, impossible: 0.0 };
        let table = &sound.0[number];
        let world = World::begun();
        let (site, drive) = (world.site.clone().unwrap(), world.drive().clone());
        let mut made = Self { drive, site, procedure: procedure.clone() };
        made.sheets(&mut dice, how, |_, sheet, column, key| {
            Some(Sound::field(table, sheet, column, key).unwrap_or_default())
        });
        made.settings(&mut dice, how, |_, function| Some(Sound::setting(table, function).unwrap_or_default()));
        made.entries(&mut dice, how, |_, item, row| Some(sound.entry(table, item, row).unwrap_or_default()));
        made.drop_empty();
        for place in made.readings() {
            made = made.with_entry(&place, |entry| {
                entry.instrument = made_of(procedure, &place).map(good);
            });
        }
        made
    }

    /// Takes out what the table says nothing of.
    fn drop_empty(&mut self) {
        let said = |typed: &Typed| !typed.text.is_empty();
        self.drive.fields.retain(|_, s| s.current().is_some_and(|r| r.value.as_ref().is_some_and(said)));
        self.site.fields.retain(|_, s| s.current().is_some_and(|r| r.value.as_ref().is_some_and(said)));
        let record = self.drive.record.as_mut().unwrap();
        record.parameters.retain(|_, s| s.current().is_some_and(|r| r.value.as_ref().is_some_and(said)));
        record.entries.retain(|_, s| s.current().is_some_and(|r| said(&r.value.value)));
    }

    /// Where a number was read that has a unit.
    pub(super) fn readings(&self) -> Vec<EntryPlace> {
        let entries = &self.drive.record.as_ref().unwrap().entries;
        let number = |s: &Slot<Entry>| s.current().is_some_and(|r| r.value.value.number().is_some());
        entries.iter().filter(|(_, s)| number(s)).map(|(place, _)| place.clone()).collect()
    }

    /// The same record with one entry changed.
    pub(super) fn with_entry(&self, place: &EntryPlace, change: impl FnOnce(&mut Entry)) -> Self {
        let mut drive = self.drive.clone();
        let entries = &mut drive.record.as_mut().unwrap().entries;
        let mut entry = entries[place].current().unwrap().value.clone();
        change(&mut entry);
        entries.insert(place.clone(), slot(entry));
        Self { drive, site: self.site.clone(), procedure: self.procedure.clone() }
    }

    /// The same record with every instrument this many times as wrong as its data sheet says; with zero, none named.
    pub(super) fn with_instruments(&self, times: f64) -> Self {
        let mut drive = self.drive.clone();
        for slot in drive.record.as_mut().unwrap().entries.values_mut() {
            let mut entry = slot.current().unwrap().value.clone();
            if times == 0.0 {
                entry.instrument = None;
            }
            if let Some(InstrumentUsed(used)) = &mut entry.instrument {
                for row in &mut used.accuracy {
                    for figure in [&mut row.percent_of_reading, &mut row.digits, &mut row.percent_of_full_scale] {
                        if let Ok(number) = figure.parse::<f64>() {
                            *figure = (number * times).to_string();
                        }
                    }
                }
            }
            *slot = self::slot(entry);
        }
        Self { drive, site: self.site.clone(), procedure: self.procedure.clone() }
    }
}

fn slot<T: Clone + PartialEq>(value: T) -> Slot<T> {
    let mut slot = Slot::default();
    slot.put(recorded(value), &[]);
    slot
}

fn choice(dice: &mut Dice, options: &[ChoiceOption]) -> String {
    if dice.chance(0.95) { dice.pick(options).key.clone() } else { (*dice.pick(ODD_WORDS)).to_owned() }
}

/// What a table of the demo says, as it would be typed.
fn typed(kind: &FieldKind, text: &str) -> Typed {
    match kind {
        FieldKind::Quantity { kind, unit, .. } => parted(*kind, unit, text),
        _ => Typed::words(text),
    }
}

/// A number with its unit behind it, or in the usual one.
fn parted(kind: Kind, usual: &str, text: &str) -> Typed {
    let (number, unit) = text.rsplit_once(' ').filter(|(_, u)| kind.unit(u).is_some()).unwrap_or((text, usual));
    Typed::quantity(number, unit, kind).unwrap_or_else(|_| Typed::words(text))
}

fn value(dice: &mut Dice, kind: &FieldKind, how: Wildness) -> Typed {
    match kind {
        FieldKind::Quantity { kind, unit, low, high } => number(dice, *kind, unit, (*low, *high), how),
        FieldKind::Choice(options) if dice.chance(0.97) => Typed::words(dice.pick(options).0),
        FieldKind::Flag if dice.chance(0.97) => Typed::words(*dice.pick(&["yes", "no"])),
        FieldKind::Table if dice.chance(0.8) => Typed::words("0 ; 10\n50 ; 40\n100 ; 100"),
        _ => Typed::words(*dice.pick(ODD_WORDS)),
    }
}

/// A number somewhere in the believable range, often at its very ends, sometimes far outside.
fn number(dice: &mut Dice, kind: Kind, unit: &str, (low, high): (f64, f64), how: Wildness) -> Typed {
    if dice.chance(how.impossible) {
        // What was typed is shown as it stands, so it is something that can be shown.
        let si = (*dice.pick(IMPOSSIBLE)).to_owned();
        return Typed { text: "9".to_owned(), unit: Some(unit.to_owned()), si: Some(si) };
    }
    let coherent = match dice.below(10) {
        0 => low,
        1 => high,
        2 => low + (high - low) * dice.part(),
        // By magnitude, so that small and large are as frequent as middling.
        _ => {
            let floor = low.max(high * 1e-5).max(1e-9);
            floor * (high.max(floor) / floor).powf(dice.part())
        }
    };
    let picked = kind.unit(unit).unwrap_or(kind.usual());
    let text = engineering::rounding::significant(picked.from_coherent(coherent), 3);
    Typed::quantity(&text, picked.symbol, kind).unwrap_or_else(|_| Typed {
        text,
        unit: Some(unit.to_owned()),
        si: Some(coherent.to_string()),
    })
}

/// Which quantity is read at an item, where an instrument is named for it.
fn made_of(procedure: &Procedure, place: &EntryPlace) -> Option<Kind> {
    match procedure.item(&place.item)?.1.kind {
        ItemKind::Reading { quantity, instrument: true, .. } => Some(quantity),
        _ => None,
    }
}

/// An instrument of 0.01 % of reading and a little, in calibration.
fn good(kind: Kind) -> InstrumentUsed {
    let row = AccuracyRow {
        kind,
        unit: kind.usual().symbol.to_owned(),
        percent_of_reading: "0.01".to_owned(),
        digits: "1".to_owned(),
        resolution: "0.000001".to_owned(),
        percent_of_full_scale: String::new(),
        full_scale: String::new(),
    };
    InstrumentUsed(Instrument {
        id: InstrumentId(Uuid::from_u128(0x18)),
        mark: "MM-2".to_owned(),
        description: "Reference meter".to_owned(),
        serial: "2".to_owned(),
        due: "2099-01-01".to_owned(),
        accuracy: vec![row],
        active: true,
    })
}

fn instrument(dice: &mut Dice, kind: Kind) -> Option<InstrumentUsed> {
    if dice.chance(0.1) {
        return None;
    }
    let figure = |dice: &mut Dice| (*dice.pick(&["", "0", "0.1", "0.5", "2", "5", "30"])).to_owned();
    let row = AccuracyRow {
        kind,
        unit: kind.usual().symbol.to_owned(),
        percent_of_reading: figure(dice),
        digits: figure(dice),
        resolution: (*dice.pick(&["", "0.001", "0.1", "1"])).to_owned(),
        percent_of_full_scale: (*dice.pick(&["", "", "1"])).to_owned(),
        full_scale: (*dice.pick(&["", "", "1000", "0.001"])).to_owned(),
    };
    Some(InstrumentUsed(Instrument {
        id: InstrumentId(Uuid::from_u128(0x17)),
        mark: "MM-1".to_owned(),
        description: "Bench meter".to_owned(),
        serial: "1".to_owned(),
        due: (*dice.pick(&["2099-01-01", "2099-01-01", "2099-01-01", "2001-01-01", ""])).to_owned(),
        accuracy: if dice.chance(0.95) { vec![row] } else { Vec::new() },
        active: true,
    }))
}
