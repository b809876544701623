//! The rows of the parameter record, by group, with the free rows that a drive needs besides.

use crate::extract::DriveAt;
use commissioning::Typed;
use commissioning::agenda::{Difference, differs};
use commissioning::plant::{FieldKind, Slot};
use commissioning::record::{ParameterColumn, ParameterPlace, functions};

/// The group that holds the free rows.
pub const FREE: &str = "free rows";

/// A row: a generic function, or a free one.
#[derive(Clone, Debug)]
pub struct Row {
    /// Its key.
    pub key: String,
    /// What it sets.
    pub label: String,
    /// One sentence; may be empty.
    pub hint: &'static str,
    /// What its values are.
    pub kind: FieldKind,
}

/// A group as addresses name it.
#[must_use]
pub fn address_name(group: &str) -> String {
    group.replace(' ', "-")
}

/// A group as headings name it.
#[must_use]
pub fn title(group: &str) -> String {
    let mut letters = group.chars();
    letters.next().map(|c| c.to_uppercase().chain(letters).collect()).unwrap_or_default()
}

/// The group of an address name; `*` and free rows too.
#[must_use]
pub fn group_of(name: &str) -> Option<&'static str> {
    functions::GROUPS.iter().copied().chain([FREE]).find(|g| address_name(g) == name)
}

/// The rows of a group; `*` stands for all.
#[must_use]
pub fn of(at: &DriveAt, group: &str) -> Vec<Row> {
    let known = functions::group(group).map(|f| Row {
        key: f.key.to_owned(),
        label: f.label.to_owned(),
        hint: f.hint,
        kind: f.kind,
    });
    let free = at.drive.record.iter().flat_map(|r| &r.free_rows).filter(|_| group == "*" || group == FREE);
    let free =
        free.map(|(key, label)| Row { key: key.clone(), label: label.clone(), hint: "", kind: FieldKind::Text(120) });
    known.chain(free).collect()
}

impl Row {
    /// Where its value of a column stands.
    #[must_use]
    pub fn place(&self, column: ParameterColumn) -> ParameterPlace {
        ParameterPlace { function: self.key.clone(), column }
    }

    /// What may be entered in a column.
    #[must_use]
    pub const fn kind_in(&self, column: ParameterColumn) -> FieldKind {
        match column {
            ParameterColumn::Code => FieldKind::Text(40),
            ParameterColumn::Explanation => FieldKind::Text(400),
            _ => self.kind,
        }
    }

    /// What stands and stood in a column.
    #[must_use]
    pub fn slot<'a>(&self, at: &'a DriveAt, column: ParameterColumn) -> Option<&'a Slot<Option<Typed>>> {
        at.drive.record.as_ref()?.parameters.get(&self.place(column))
    }

    /// What stands in a column.
    #[must_use]
    pub fn value<'a>(&self, at: &'a DriveAt, column: ParameterColumn) -> Option<&'a Typed> {
        at.drive.record.as_ref()?.parameter(&self.place(column))
    }

    /// Whether anything stands in it.
    #[must_use]
    pub fn any(&self, at: &DriveAt) -> bool {
        ParameterColumn::ALL.into_iter().any(|c| self.value(at, c).is_some())
    }

    /// Whether what was left is another value than intended.
    #[must_use]
    pub fn differs(&self, at: &DriveAt) -> bool {
        differs(self.value(at, ParameterColumn::Intended), self.value(at, ParameterColumn::AsLeft))
            == Difference::Different
    }
}

/// As forms name a place.
#[must_use]
pub fn name(place: &ParameterPlace) -> String {
    format!("{}.{}", place.function, place.column.key())
}
