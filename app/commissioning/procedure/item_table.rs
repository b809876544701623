//! An item as its table in the procedure data: flat, with the keys of its kind and no others.

use super::{ChoiceOption, Item, ItemKind};
use engineering::Kind;
use serde::{Deserialize, Serialize};

/// The table.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub(super) struct ItemTable {
    key: String,
    label: String,
    #[serde(default, skip_serializing_if = "String::is_empty")]
    hint: String,
    kind: KindName,
    #[serde(default, skip_serializing_if = "Option::is_none")]
    quantity: Option<Kind>,
    #[serde(default, skip_serializing_if = "Option::is_none")]
    unit: Option<String>,
    #[serde(default, skip_serializing_if = "is_false")]
    instrument: bool,
    #[serde(default, skip_serializing_if = "Option::is_none")]
    low: Option<f64>,
    #[serde(default, skip_serializing_if = "Option::is_none")]
    high: Option<f64>,
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    options: Vec<ChoiceOption>,
    #[serde(default, skip_serializing_if = "is_false")]
    optional: bool,
    #[serde(default, skip_serializing_if = "is_false")]
    left_alone_only: bool,
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    when: Vec<String>,
}

#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
enum KindName {
    Reading,
    Confirmation,
    Choice,
    Note,
    Photo,
}

#[expect(clippy::trivially_copy_pass_by_ref, reason = "serde asks for a reference")]
const fn is_false(flag: &bool) -> bool {
    !*flag
}

impl TryFrom<ItemTable> for Item {
    type Error = String;

    fn try_from(table: ItemTable) -> Result<Self, String> {
        let ItemTable { key, label, hint, kind, quantity, unit, instrument, low, high, options, .. } = table;
        let ItemTable { optional, left_alone_only, when, .. } = table;
        if left_alone_only && !optional {
            return Err(format!("item `{key}`: only an optional item can be left_alone_only"));
        }
        let measures = quantity.is_some() || unit.is_some() || instrument || low.is_some() || high.is_some();
        if measures && kind != KindName::Reading {
            return Err(format!("item `{key}`: only a reading has quantity, unit, instrument, low or high"));
        }
        if !options.is_empty() && kind != KindName::Choice {
            return Err(format!("item `{key}`: only a choice has options"));
        }
        let kind = match kind {
            KindName::Reading => {
                let quantity = quantity.ok_or_else(|| format!("item `{key}`: a reading names its quantity"))?;
                ItemKind::Reading { quantity, unit, instrument, low, high }
            }
            KindName::Choice if options.len() < 2 => {
                return Err(format!("item `{key}`: a choice has two options or more"));
            }
            KindName::Choice => ItemKind::Choice { options },
            KindName::Confirmation => ItemKind::Confirmation,
            KindName::Note => ItemKind::Note,
            KindName::Photo => ItemKind::Photo,
        };
        Ok(Self { key, label, hint, kind, optional, left_alone_only, when })
    }
}

impl From<Item> for ItemTable {
    fn from(item: Item) -> Self {
        let Item { key, label, hint, kind, optional, left_alone_only, when } = item;
        let mut table = Self {
            key,
            label,
            hint,
            kind: KindName::Note,
            quantity: None,
            unit: None,
            instrument: false,
            low: None,
            high: None,
            options: Vec::new(),
            optional,
            left_alone_only,
            when,
        };
        match kind {
            ItemKind::Reading { quantity, unit, instrument, low, high } => {
                table.kind = KindName::Reading;
                (table.quantity, table.unit, table.instrument) = (Some(quantity), unit, instrument);
                (table.low, table.high) = (low, high);
            }
            ItemKind::Choice { options } => {
                table.kind = KindName::Choice;
                table.options = options;
            }
            ItemKind::Confirmation => table.kind = KindName::Confirmation,
            ItemKind::Note => {}
            ItemKind::Photo => table.kind = KindName::Photo,
        }
        table
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn read(text: &str) -> Result<Item, String> {
        toml::from_str(text).map_err(|e| e.to_string())
    }

    #[test]
    fn an_item_has_the_keys_of_its_kind_and_no_others() {
        let reading = "key = 'a'\nlabel = 'A'\nkind = 'reading'\n";
        assert!(read(&format!("{reading}quantity = 'voltage'\nlow = 0.0")).is_ok());
        for (text, fault) in [
            (reading.to_owned(), "names its quantity"),
            (format!("{reading}quantity = 'voltage'\ncolour = 'red'"), "unknown field `colour`"),
            (format!("{reading}quantity = 'voltage'\noptions = [{{ key = 'x', label = 'X' }}]"), "only a choice"),
            ("key = 'a'\nlabel = 'A'\nkind = 'note'\nlow = 1.0".to_owned(), "only a reading"),
            ("key = 'a'\nlabel = 'A'\nkind = 'note'\nleft_alone_only = true".to_owned(), "only an optional"),
            ("key = 'a'\nlabel = 'A'\nkind = 'choice'".to_owned(), "two options"),
            ("key = 'a'\nlabel = 'A'\nkind = 'drawing'".to_owned(), "unknown variant"),
        ] {
            let said = read(&text).unwrap_err();
            assert!(said.contains(fault), "{said}");
        }
    }

    #[test]
    fn every_item_survives_json() {
        for (_, step) in crate::world::procedure().steps() {
            for item in &step.items {
                let text = serde_json::to_string(item).unwrap();
                assert_eq!(serde_json::from_str::<Item>(&text).unwrap(), *item, "{text}");
            }
        }
    }
}
