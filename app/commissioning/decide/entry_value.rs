//! From what was typed at an item to an entry: units, believable range, choices, photos.

use super::changes::as_typed;
use crate::Typed;
use crate::journal::Change;
use crate::people::Installation;
use crate::plant::field;
use crate::procedure::{Item, ItemKind};
use crate::record::{Entry, EntryPlace, InstrumentUsed, Photo};
use engineering::Kind;

/// What was typed, understood.
#[derive(Debug)]
pub(crate) struct Understood {
    /// The entry; `None` takes back what stands.
    pub(crate) entry: Option<Entry>,
    /// It lies outside what is believable: wants a reason. The sentence says so.
    pub(crate) unbelievable: Option<String>,
}

/// Understands a change at an item; `standing` is what stands there alone. The error names a sub-field (empty for the
/// value itself) and is a sentence.
pub(crate) fn understand(
    item: &Item,
    change: &Change<EntryPlace>,
    standing: Option<&Entry>,
    installation: &Installation,
) -> Result<Understood, (&'static str, String)> {
    let text = as_typed(&change.text);
    let value_error = |message: String| ("", message);
    if let ItemKind::Photo = item.kind {
        return photo(change, &text, standing).map_err(value_error);
    }
    if text.trim().is_empty() {
        return Ok(Understood { entry: None, unbelievable: None });
    }
    let mut unbelievable = None;
    let value = match &item.kind {
        ItemKind::Reading { quantity, unit, low, high, .. } => {
            let unit =
                if change.unit.is_empty() { unit.as_deref().unwrap_or(quantity.usual().symbol) } else { &change.unit };
            let value = Typed::quantity(&text, unit, *quantity).map_err(value_error)?;
            if let Some(sentence) = impossible(&value, *quantity, *low, &item.label) {
                return Err(value_error(sentence));
            }
            unbelievable = outside(&value, *quantity, *low, *high);
            value
        }
        ItemKind::Confirmation if text == "yes" => Typed::words(text),
        ItemKind::Confirmation => return Err(value_error("Tick it, or leave it empty.".to_owned())),
        ItemKind::Choice { options } => {
            if !options.iter().any(|o| o.key == text) {
                let labels: Vec<&str> = options.iter().map(|o| o.label.as_str()).collect();
                let shown = crate::typed::shorten(&text);
                return Err(value_error(format!(
                    "“{shown}” is none of the choices. Choose one of: {}.",
                    labels.join(", ")
                )));
            }
            Typed::words(text)
        }
        ItemKind::Note | ItemKind::Photo => Typed::words(field::words(&text, 4_000).map_err(value_error)?),
    };
    let names_instrument = matches!(item.kind, ItemKind::Reading { instrument: true, .. });
    let instrument = if names_instrument { instrument(change, standing, installation)? } else { None };
    let entry = Entry { value, instrument, photo: None, out_of_order: false, accepted_because: None };
    Ok(Understood { entry: Some(entry), unbelievable })
}

/// The instrument as it is today; one that was put away stays where it was named before.
fn instrument(
    change: &Change<EntryPlace>,
    standing: Option<&Entry>,
    installation: &Installation,
) -> Result<Option<InstrumentUsed>, (&'static str, String)> {
    let Some(id) = change.instrument else { return Ok(None) };
    let named_before = standing.and_then(|e| e.instrument.as_ref()).filter(|i| i.0.id == id);
    match installation.instruments.get(&id) {
        Some(known) if known.active || named_before.is_some() => Ok(Some(InstrumentUsed(known.clone()))),
        Some(known) => Err((".instrument", format!("{} was put away. Pick an instrument in use.", known.mark))),
        None => Err((".instrument", "This instrument does not exist. Pick one from the list.".to_owned())),
    }
}

/// A time that passed is never negative, and none where the least believable one is above nothing: no reason helps.
fn impossible(value: &Typed, kind: Kind, low: Option<f64>, label: &str) -> Option<String> {
    let number = value.number()?;
    let never_none = low.is_some_and(|low| low > 0.0);
    if kind != Kind::Time || number > 0.0 || (number == 0.0 && !never_none) {
        return None;
    }
    let end = if never_none { "more than 0" } else { "not negative" };
    Some(format!("{} cannot be: “{label}” is {end}. Check the figure and its unit.", value.shown()))
}

fn outside(value: &Typed, kind: Kind, low: Option<f64>, high: Option<f64>) -> Option<String> {
    let number = value.number()?;
    if low.is_none_or(|low| number >= low) && high.is_none_or(|high| number <= high) {
        return None;
    }
    let picked = kind.unit(value.unit.as_deref().unwrap_or_default()).unwrap_or(kind.usual());
    let show = |n: f64| engineering::rounding::significant(picked.from_coherent(n), 4);
    let unit = picked.symbol;
    let range = match (low, high) {
        (Some(low), Some(high)) => format!("between {} and {} {unit}", show(low), show(high)),
        (Some(low), None) => format!("at least {} {unit}", show(low)),
        (None, Some(high)) => format!("at most {} {unit}", show(high)),
        (None, None) => return None,
    };
    let shown = value.shown();
    Some(format!(
        "{shown} is hard to believe: {range} is usual here. Check figure and unit; if it is right, give a reason."
    ))
}

/// A new picture, or a new caption under the one that stands. An empty form part leaves the picture where it is.
fn photo(change: &Change<EntryPlace>, caption: &str, standing: Option<&Entry>) -> Result<Understood, String> {
    let caption = field::words(caption.trim(), 200)?;
    let before = standing.and_then(|e| e.photo.clone());
    let picture: Option<Photo> = match (&change.photo, before) {
        (Some(new), _) => Some(new.clone()),
        (None, Some(before)) if caption.is_empty() => Some(before),
        (None, Some(before)) => Some(Photo { caption: caption.clone(), ..before }),
        (None, None) if caption.is_empty() => None,
        (None, None) => return Err("There is a caption but no picture. Take or choose the picture.".to_owned()),
    };
    let Some(mut picture) = picture else { return Ok(Understood { entry: None, unbelievable: None }) };
    let named =
        picture.hash.len() == 64 && picture.hash.bytes().all(|b| b.is_ascii_digit() || (b'a'..=b'f').contains(&b));
    if !named || !matches!(picture.media.as_str(), "image/jpeg" | "image/png" | "image/webp") {
        return Err("This is not a picture that was received. Send it again as JPEG, PNG or WebP.".to_owned());
    }
    if change.photo.is_some() && !caption.is_empty() {
        picture.caption = caption;
    }
    let value = Typed::words(picture.caption.clone());
    let entry = Entry { value, instrument: None, photo: Some(picture), out_of_order: false, accepted_because: None };
    Ok(Understood { entry: Some(entry), unbelievable: None })
}

#[cfg(test)]
mod tests {
    use super::*;

    fn said(item: &str, text: &str) -> Result<Understood, (&'static str, String)> {
        let procedure = crate::procedure::built_in::built_in().unwrap();
        let (_, item) = procedure.item(item).unwrap();
        let place = EntryPlace::new(item.key.as_str());
        let change =
            Change { place, text: text.into(), unit: String::new(), instrument: None, photo: None, seen: Vec::new() };
        understand(item, &change, None, &Installation::default())
    }

    #[test]
    fn a_time_waited_is_more_than_nothing_whatever_the_reason() {
        for text in ["0", "-5", "0.0"] {
            let (_, message) = said("waited", text).unwrap_err();
            assert!(message.contains("cannot be: “Time waited since switching off” is more than 0"), "{message}");
        }
        assert!(said("waited", "0.1").unwrap().unbelievable.is_some(), "hard to believe, and nothing more");
        assert!(said("waited", "5").unwrap().unbelievable.is_none());
        assert!(said("stop-seconds", "-1").unwrap_err().1.contains("is not negative"));
        assert!(said("stop-seconds", "0").is_ok());
    }
}
