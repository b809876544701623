//! The input of a picture: the file, what was received before, its caption.

use super::at::kept;
use super::inputs::{Inputs, filled};
use crate::components::{FieldInput, InputKind, field, input_id};
use crate::links;
use commissioning::procedure::Item;
use commissioning::record::EntryPlace;
use maud::{Markup, html};

/// A picture with its caption; one already received goes along with a form that came back.
#[must_use]
pub fn input(i: &Inputs<'_>, item: &Item, place: &EntryPlace) -> Markup {
    let input = filled(i, item, place, InputKind::Line(200));
    let standing = i.at.at.drive.record.as_ref().and_then(|r| r.entry(place)).and_then(|e| e.value.photo.clone());
    let received = i.back.posted.and_then(|p| kept(p, &input.name));
    let shown = received.as_ref().or(standing.as_ref());
    let file = format!("{}.file", input.name);
    let caption = FieldInput {
        label: format!("Caption of “{}”", item.label),
        hint: String::new(),
        required: false,
        error: None,
        ..input.clone()
    };
    html! {
        div.field.picture.bad[input.error.is_some()] {
            label for=(input_id(&file)) { (item.label) @if input.required { span.needed { " needed" } } }
            @if let Some(photo) = shown {
                figure {
                    img src=(links::photo(&photo.hash)) alt=(format!("Picture for “{}”", item.label)) loading="lazy";
                    figcaption { @if received.is_some() { "received, not recorded yet" } @else { a href=(links::photo_original(&photo.hash)) { "original" } } }
                }
            }
            input.input id=(input_id(&file)) type="file" name=(file) accept="image/jpeg,image/png,image/webp";
            @if let Some(photo) = &received { input type="hidden" name=(format!("{}.kept", input.name)) value=(format!("{} {} {}", photo.hash, photo.media, photo.bytes)); }
            @if let Some(error) = &input.error { p.error { (error) } }
            p.hint { (input.hint) " JPEG, PNG or WebP, at most 15 MB. The original is kept as it is; pages show a copy without its position." }
        }
        (field(&caption))
    }
}
