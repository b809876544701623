//! The invented instruments: what each can tell, and when its calibration runs out.

use crate::DemoFault;
use crate::case::{self, Typed};
use crate::crew::account;
use crate::hand::{Hand, named};
use commissioning::journal::Deed;
use commissioning::people::{AccuracyRow, Instrument};
use commissioning::{InstrumentId, Timestamp};
use engineering::Kind;
use serde::Deserialize;

#[derive(Deserialize)]
#[serde(deny_unknown_fields)]
struct Shelf {
    instrument: Vec<Row>,
}

/// An instrument of the table; its calibration runs out so many days after the demo's moment.
#[derive(Deserialize)]
#[serde(deny_unknown_fields)]
struct Row {
    mark: String,
    description: String,
    serial: String,
    due_in_days: i64,
    #[serde(default)]
    accuracy: Vec<Typed>,
}

/// The identifier of the instrument with this mark.
pub(crate) fn instrument(mark: &str) -> InstrumentId {
    InstrumentId(named(&format!("instrument {mark}")))
}

/// Puts every instrument on the list.
pub(crate) fn lay_out(hand: &mut Hand<'_>, now: Timestamp) -> Result<(), DemoFault> {
    let shelf: Shelf = case::read("instruments", include_str!("tables/instruments.toml"))?;
    for row in shelf.instrument {
        let accuracy = row.accuracy.iter().map(|typed| accuracy(&row.mark, typed)).collect::<Result<_, _>>()?;
        let due = Timestamp::new(now.moment() + time::Duration::days(row.due_in_days)).date();
        let id = instrument(&row.mark);
        let mark = row.mark.clone();
        let instrument = Instrument {
            id,
            mark: row.mark,
            description: row.description,
            serial: row.serial,
            due,
            accuracy,
            active: true,
        };
        hand.act(Some(account("odile")), Deed::KeepInstrument { instrument, seen: Vec::new() }, 120, &mark)?;
    }
    Ok(())
}

fn accuracy(mark: &str, typed: &Typed) -> Result<AccuracyRow, DemoFault> {
    let of = |key: &str| typed.get(key).cloned().unwrap_or_default();
    let wanted = of("quantity");
    let kind = kind_named(&wanted)
        .ok_or_else(|| DemoFault::Table("instruments".to_owned(), format!("{mark}: no quantity “{wanted}”")))?;
    Ok(AccuracyRow {
        kind,
        unit: typed.get("unit").cloned().unwrap_or_else(|| kind.usual().symbol.to_owned()),
        percent_of_reading: of("of-reading"),
        digits: of("digits"),
        resolution: of("resolution"),
        percent_of_full_scale: of("of-full-scale"),
        full_scale: of("full-scale"),
    })
}

/// The kind of quantity that messages call by this name.
pub(crate) fn kind_named(words: &str) -> Option<Kind> {
    Kind::ALL.iter().copied().find(|k| k.words() == words)
}
