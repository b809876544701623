//! Values in words: as typed with their unit, choices by their label, who and when, what stood before.

use commissioning::Typed;
use commissioning::plant::{Field, FieldKind, Recorded, Slot};
use commissioning::procedure::{Item, ItemKind};
use commissioning::record::{Entry, InstrumentUsed};
use serde_json::{Value, json};

/// Minutes after which the tablet's own time is printed beside the receipt.
const LATE_MINUTES: i64 = 5;

/// A field's value as printed.
pub(super) fn of_field(field: Option<&Field>, typed: &Typed) -> String {
    match field.map(|f| f.kind) {
        Some(FieldKind::Choice(options)) => options
            .iter()
            .find(|(key, _)| *key == typed.text)
            .map_or_else(|| typed.shown(), |(_, label)| (*label).to_owned()),
        _ => typed.shown(),
    }
}

/// An entry's value as printed.
pub(super) fn of_entry(item: Option<&Item>, entry: &Entry) -> String {
    match item.map(|i| &i.kind) {
        Some(ItemKind::Choice { options }) => {
            options.iter().find(|o| o.key == entry.value.text).map_or_else(|| entry.value.shown(), |o| o.label.clone())
        }
        Some(ItemKind::Confirmation) if entry.value.text == "yes" => "confirmed".to_owned(),
        Some(ItemKind::Photo) => match &entry.photo {
            Some(photo) => format!("picture {}{}", photo.hash.get(..8).unwrap_or_default(), caption(&photo.caption)),
            None => entry.value.shown(),
        },
        _ => entry.value.shown(),
    }
}

fn caption(text: &str) -> String {
    if text.is_empty() { String::new() } else { format!(", {text}") }
}

/// Who and when; beyond five minutes the time it was taken by the tablet's clock.
pub(super) fn when<T>(recorded: &Recorded<T>) -> String {
    let late = recorded
        .tablet
        .filter(|t| (recorded.received.moment() - t.moment()).whole_minutes() > LATE_MINUTES)
        .map(|t| format!(", taken {} by the tablet's clock", t.shown()));
    format!("{}{}", recorded.received.shown(), late.unwrap_or_default())
}

/// An instrument beside its reading; all of it stands once in the list of instruments.
pub(super) fn instrument_mark(used: &InstrumentUsed) -> String {
    let due = if used.0.due.is_empty() { "no calibration date".to_owned() } else { format!("due {}", used.0.due) };
    format!("{}, {due}", used.0.mark)
}

/// An instrument in one line.
pub(super) fn instrument(used: &InstrumentUsed) -> String {
    let i = &used.0;
    let due = if i.due.is_empty() { "no calibration date".to_owned() } else { format!("calibration due {}", i.due) };
    format!("{}, {}, serial {}, {due}", i.mark, i.description, i.serial)
}

/// A slot as rows: what stood before struck through, then what stands; more than one standing needs a choice.
pub(super) fn rows<T>(slot: &Slot<T>, show: impl Fn(&T) -> Option<Value>) -> Vec<Value> {
    let mut rows = Vec::new();
    let chosen = slot.standing().len() == 1;
    for (recorded, struck) in slot.earlier().iter().map(|r| (r, true)).chain(slot.standing().iter().map(|r| (r, false)))
    {
        let Some(mut shown) = show(&recorded.value).or_else(|| struck.then(|| json!({ "value": "taken back" }))) else {
            continue;
        };
        if let Value::Object(map) = &mut shown {
            map.insert("struck".to_owned(), struck.into());
            map.insert("choose".to_owned(), (!struck && !chosen).into());
            map.insert("by".to_owned(), recorded.by_name.clone().into());
            map.insert("when".to_owned(), when(recorded).into());
            map.insert("reason".to_owned(), recorded.reason.clone().unwrap_or_default().into());
        }
        rows.push(shown);
    }
    rows
}

/// Hexadecimal in groups of four, as it is compared by eye.
pub(super) fn grouped(hash: &str) -> String {
    hash.as_bytes().chunks(4).map(String::from_utf8_lossy).collect::<Vec<_>>().join(" ")
}

/// A check's title.
pub(super) fn named(check: &str) -> String {
    commissioning::judge::catalogue::title(check).to_owned()
}
