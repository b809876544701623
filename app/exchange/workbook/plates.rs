//! The plates of many drives as one table that our own reading takes back: a row a drive, a column a field.

use super::{Heading, OutCell, PlateLine, Table};
use crate::schedule::Target;
use commissioning::Typed;
use commissioning::plant::{FieldKind, Place};
use commissioning::typed::numeral;
use std::collections::BTreeMap;

/// The table: only fields that some drive has, in the order of the sheets.
pub(super) fn table(lines: &[PlateLine]) -> Table {
    let targets: Vec<(Target, Place)> = Target::all()
        .into_iter()
        .filter_map(|t| match &t {
            Target::Field(place) if lines.iter().any(|l| l.fields.contains_key(place)) => {
                let place = place.clone();
                Some((t, place))
            }
            _ => None,
        })
        .collect();
    let units: Vec<&str> = targets.iter().map(|(target, place)| unit(target, place, lines)).collect();
    let mut headings = vec![Heading::new(&Target::Tag.words()), Heading::new(&Target::Name.words())];
    headings.extend(targets.iter().zip(&units).map(|((target, _), unit)| Heading::with_unit(&target.words(), unit)));
    let rows = lines
        .iter()
        .map(|line| {
            let mut row = vec![OutCell::text(&line.tag), OutCell::text(&line.name)];
            row.extend(targets.iter().zip(&units).map(|((target, place), unit)| {
                line.fields.get(place).map_or(OutCell::Empty, |typed| cell(target, typed, unit))
            }));
            row
        })
        .collect();
    Table { name: "Nameplates".to_owned(), headings, rows }
}

/// The unit that most drives have in this column.
fn unit<'a>(target: &Target, place: &Place, lines: &'a [PlateLine]) -> &'a str {
    let Some((_, usual)) = target.quantity() else { return "" };
    let mut counts: BTreeMap<&str, usize> = BTreeMap::new();
    for unit in lines.iter().filter_map(|l| l.fields.get(place)).filter_map(|t| t.unit.as_deref()) {
        *counts.entry(unit).or_default() += 1;
    }
    let most = counts.values().max().copied().unwrap_or(0);
    let usual = Some(usual).filter(|u| counts.get(u) == Some(&most));
    usual.or_else(|| counts.into_iter().find(|(_, n)| *n == most).map(|(u, _)| u)).unwrap_or("")
}

/// A number in the column's unit; another unit stands in the cell with its figure.
fn cell(target: &Target, typed: &Typed, unit: &str) -> OutCell {
    let Some(field) = target.description() else { return OutCell::Empty };
    match field.kind {
        FieldKind::Quantity { kind, .. } => {
            if typed.unit.as_deref().unwrap_or_default() != unit {
                return OutCell::text(with_unit(typed));
            }
            match (numeral::prefix(&typed.text, kind), numeral::understand(&typed.text, kind)) {
                (None, Ok(number)) => number_cell(&typed.text, number),
                _ => OutCell::text(with_unit(typed)),
            }
        }
        FieldKind::Choice(options) => {
            let label =
                options.iter().find(|(key, _)| *key == typed.text).map_or(typed.text.as_str(), |(_, label)| label);
            OutCell::text(label)
        }
        _ => OutCell::text(&typed.text),
    }
}

/// A number with the decimals that were typed.
pub(super) fn number_cell(text: &str, number: f64) -> OutCell {
    match OutCell::decimal(text) {
        cell @ OutCell::Number(..) => cell,
        _ => {
            let plain = crate::sheets::decimal(number);
            let decimals = plain.split_once('.').map_or(0, |(_, d)| d.len());
            OutCell::Number(number, u8::try_from(decimals.min(9)).unwrap_or(9))
        }
    }
}

/// Figure and unit in one cell; a figure that could be read two ways gets a nought at its end, as 1.4850.
pub(super) fn with_unit(typed: &Typed) -> String {
    if crate::rows::figure_shown(&typed.text) == crate::rows::FigureShown::Either && typed.text.contains('.') {
        Typed { text: format!("{}0", typed.text.trim()), ..typed.clone() }.shown()
    } else {
        typed.shown()
    }
}
