//! The sheets of the plant: every field that was entered, column by column, with who, when and what stood before.

use super::Pages;
use super::verdicts::full;
use super::words::{of_field, rows};
use commissioning::plant::{Field, Place, Sheet, fields};
use commissioning::record::canonical::FieldPart;
use serde_json::{Value, json};

impl Pages<'_> {
    /// One table a sheet; empty sheets are left out.
    pub(super) fn plates(&self) -> Vec<Value> {
        Sheet::ALL
            .iter()
            .flat_map(|sheet| {
                let site =
                    (!self.file.site.fields.is_empty()).then_some((self.file.site.fields.as_slice(), " of the site"));
                let own = Some((self.file.drive.fields.as_slice(), ""));
                [site, own]
                    .into_iter()
                    .flatten()
                    .filter_map(|(parts, of)| self.plate(*sheet, parts, of))
                    .collect::<Vec<_>>()
            })
            .collect()
    }

    fn plate(&self, sheet: Sheet, parts: &[FieldPart], of: &str) -> Option<Value> {
        let groups: Vec<Value> = (0..sheet.columns())
            .flat_map(|column| {
                let described: &[Field] = if column == 0 { fields::of(sheet) } else { &[] };
                let list: Vec<&Field> = fields::in_columns(sheet).iter().chain(described).collect();
                list.into_iter().filter_map(|f| row(sheet, column, f, parts)).collect::<Vec<_>>()
            })
            .collect();
        let suffix = if sheet == Sheet::Site { "" } else { of };
        (!groups.is_empty()).then(|| json!({ "heading": format!("{}{suffix}", sheet.words()), "rows": groups }))
    }

    /// Nameplate checks: those that belong to no step.
    pub(super) fn plate_checks(&self) -> Vec<Value> {
        self.file.verdicts.iter().filter(|j| j.step.is_empty() && !self.is_parameter_check(j)).map(full).collect()
    }
}

fn row(sheet: Sheet, column: u8, field: &Field, parts: &[FieldPart]) -> Option<Value> {
    let place = Place::in_column(sheet, column, field.key);
    let part = parts.iter().find(|p| p.place == place)?;
    let values = rows(&part.slot, |typed| {
        typed.as_ref().map(|t| json!({ "value": of_field(Some(field), t), "words": t.unit.is_none() }))
    });
    let in_column = fields::in_columns(sheet).iter().any(|f| f.key == field.key);
    let group = if in_column { format!("{}, column {}", field.group, column + 1) } else { field.group.to_owned() };
    (!values.is_empty()).then(|| json!({ "group": group, "label": field.label, "values": values }))
}
