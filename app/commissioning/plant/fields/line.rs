//! How a line of a field table is written: the quantity, choice, flag and words constructors.

use crate::plant::field::{Field, FieldKind};
use engineering::Kind;

/// Lowest and highest value that can be true at all, in the coherent unit.
pub(super) type Span = (f64, f64);

pub(super) const fn quantity(
    group: &'static str,
    key: &'static str,
    label: &'static str,
    (kind, unit): (Kind, &'static str),
    (low, high): Span,
    hint: &'static str,
) -> Field {
    Field { key, label, hint, group, kind: FieldKind::Quantity { kind, unit, low, high }, required: false }
}

pub(super) const fn choice(
    group: &'static str,
    key: &'static str,
    label: &'static str,
    options: &'static [(&'static str, &'static str)],
    hint: &'static str,
) -> Field {
    Field { key, label, hint, group, kind: FieldKind::Choice(options), required: false }
}

pub(super) const fn flag(group: &'static str, key: &'static str, label: &'static str, hint: &'static str) -> Field {
    Field { key, label, hint, group, kind: FieldKind::Flag, required: false }
}

pub(super) const fn text(group: &'static str, key: &'static str, label: &'static str, hint: &'static str) -> Field {
    Field { key, label, hint, group, kind: FieldKind::Text(200), required: false }
}

pub(super) const fn table(group: &'static str, key: &'static str, label: &'static str, hint: &'static str) -> Field {
    Field { key, label, hint, group, kind: FieldKind::Table, required: false }
}

/// The same field, without which the sheet is not complete.
pub(super) const fn required(field: Field) -> Field {
    Field { required: true, ..field }
}
