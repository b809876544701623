//! What a column of a schedule can become: the plant tag, the name, or a field of a sheet.

use commissioning::plant::{Field, FieldKind, Place, Sheet, fields};
use serde::{Deserialize, Serialize};

/// What a column becomes.
#[derive(Clone, Debug, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum Target {
    /// The plant tag.
    Tag,
    /// What it drives, in words.
    Name,
    /// The site's tag or name: it only tells rows of another site apart.
    Site,
    /// A field of a sheet.
    Field(Place),
}

impl Target {
    /// A field, in the first rating column.
    pub(super) fn field(sheet: Sheet, key: &str) -> Self {
        Self::Field(Place::new(sheet, key))
    }

    /// Everything a column can become, in the order in which screens list it.
    #[must_use]
    pub fn all() -> Vec<Self> {
        let mut all = vec![Self::Tag, Self::Name, Self::Site];
        for sheet in [Sheet::Motor, Sheet::DrivePlate, Sheet::Cable, Sheet::Load, Sheet::Drive, Sheet::Supply] {
            let once = fields::of(sheet).iter().map(|f| (0, f));
            let columns = (0..sheet.columns()).flat_map(|c| fields::in_columns(sheet).iter().map(move |f| (c, f)));
            let fitting = columns.chain(once).filter(|(_, f)| f.kind != FieldKind::Table);
            all.extend(fitting.map(|(c, f)| Self::Field(Place::in_column(sheet, c, f.key))));
        }
        all
    }

    /// As forms name it: `tag`, `name`, `motor.0.power`.
    #[must_use]
    pub fn key(&self) -> String {
        match self {
            Self::Tag => "tag".to_owned(),
            Self::Name => "name".to_owned(),
            Self::Site => "site".to_owned(),
            Self::Field(place) => place.to_string(),
        }
    }

    /// The target of this key.
    #[must_use]
    pub fn from_key(key: &str) -> Option<Self> {
        Self::all().into_iter().find(|t| t.key() == key)
    }

    /// As screens name it.
    #[must_use]
    pub fn words(&self) -> String {
        match self {
            Self::Tag => "plant tag".to_owned(),
            Self::Name => "name".to_owned(),
            Self::Site => "site".to_owned(),
            Self::Field(place) => {
                let label = self.description().map_or(place.field.as_str(), |f| f.label);
                // Two conductors have a length: the heading of the form tells which.
                let alike = |f: &&Field| f.label == label;
                let twice =
                    fields::of(place.sheet).iter().chain(fields::in_columns(place.sheet)).filter(alike).count() > 1;
                let group = self.description().filter(|_| twice).map_or(String::new(), |f| format!(" ({})", f.group));
                let column = if place.column > 0 { format!(", column {}", place.column + 1) } else { String::new() };
                format!("{}{column}: {label}{group}", place.sheet.words())
            }
        }
    }

    /// The field's own description, for a field.
    #[must_use]
    pub fn description(&self) -> Option<&'static Field> {
        match self {
            Self::Field(place) => fields::find(place.sheet, &place.field),
            _ => None,
        }
    }

    /// The kind of quantity and its usual unit, for a quantity.
    #[must_use]
    pub fn quantity(&self) -> Option<(engineering::Kind, &'static str)> {
        match self.description()?.kind {
            FieldKind::Quantity { kind, unit, .. } => Some((kind, unit)),
            _ => None,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_target_is_found_again_by_its_key_and_by_its_written_form() {
        let all = Target::all();
        assert!(all.len() > 150, "{}", all.len());
        let words: std::collections::BTreeSet<String> = all.iter().map(|t| super::super::folded(&t.words())).collect();
        assert_eq!(words.len(), all.len(), "no two are called the same");
        for target in all {
            assert_eq!(Target::from_key(&target.key()), Some(target.clone()));
            let written = serde_json::to_string(&target).unwrap();
            assert_eq!(serde_json::from_str::<Target>(&written).unwrap(), target);
            assert!(!target.words().is_empty());
        }
    }
}
