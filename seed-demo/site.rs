//! The invented site: its sheet, its supply, and the making of drives with their plates.

use crate::DemoFault;
use crate::case::{self, Case, Typed};
use crate::crew::account;
use crate::hand::{Hand, named};
use commissioning::journal::{Change, Deed};
use commissioning::plant::{FieldKind, Sheet, fields};
use commissioning::{DriveId, SiteId};
use serde::Deserialize;
use std::collections::BTreeMap;

/// Tag of the site, as in its address.
pub(crate) const TAG: &str = "gannet-haven";
const NAME: &str = "Gannet Haven bulk terminal";

#[derive(Deserialize)]
struct Table {
    sheets: BTreeMap<String, Typed>,
}

/// The identifier of the site.
pub(crate) fn id() -> SiteId {
    SiteId(named(TAG))
}

/// The identifier of the drive with this tag.
pub(crate) fn drive(tag: &str) -> DriveId {
    DriveId(named(&format!("drive {tag}")))
}

/// Makes the site and fills in its sheets.
pub(crate) fn open(hand: &mut Hand<'_>) -> Result<(), DemoFault> {
    let table: Table = case::read("site", include_str!("tables/site.toml"))?;
    let who = Some(account("lucan"));
    let deed = Deed::CreateSite { site: id(), tag: TAG.to_owned(), name: NAME.to_owned() };
    hand.act(who, deed, 300, TAG)?;
    for (key, typed) in &table.sheets {
        let sheet = sheet(TAG, key)?;
        let changes = typed.iter().map(|(field, text)| change(sheet, 0, field, text)).collect();
        let deed = Deed::SetSiteFields { site: id(), sheet, changes, reason: String::new() };
        hand.act(who, deed, 400, key)?;
    }
    Ok(())
}

/// Makes a drive and fills in its plates and sheets, sheet by sheet.
pub(crate) fn add_drive(hand: &mut Hand<'_>, case: &Case, who: &str) -> Result<DriveId, DemoFault> {
    let (drive, who) = (drive(&case.tag), Some(account(who)));
    let deed = Deed::CreateDrive { site: id(), drive, tag: case.tag.clone(), name: case.name.clone() };
    hand.act(who, deed, 240, &case.tag)?;
    for (key, typed) in &case.sheets {
        let sheet = sheet(&case.tag, key)?;
        let mut changes: Vec<_> = typed.iter().map(|(field, text)| change(sheet, 0, field, text)).collect();
        if sheet == Sheet::Drive {
            changes.extend(not_fitted(typed));
        }
        if sheet == Sheet::Motor {
            for (column, typed) in (0u8..).zip(&case.columns) {
                changes.extend(typed.iter().map(|(field, text)| change(sheet, column, field, text)));
            }
        }
        let deed = Deed::SetDriveFields { drive, sheet, changes, reason: String::new() };
        hand.act(who, deed, 350, &format!("{}, {}", case.tag, sheet.words()))?;
    }
    Ok(drive)
}

/// What the table does not mention is not fitted, and the engineer says so: an option left open keeps its steps waiting.
fn not_fitted(typed: &Typed) -> impl Iterator<Item = Change<(u8, String)>> {
    fields::of(Sheet::Drive).iter().filter(|f| !typed.contains_key(f.key)).filter_map(|f| match f.kind {
        FieldKind::Flag => Some(change(Sheet::Drive, 0, f.key, "no")),
        FieldKind::Choice(options) if options.iter().any(|(key, _)| *key == "none") => {
            Some(change(Sheet::Drive, 0, f.key, "none"))
        }
        _ => None,
    })
}

fn sheet(table: &str, key: &str) -> Result<Sheet, DemoFault> {
    Sheet::from_key(key).ok_or_else(|| DemoFault::Table(table.to_owned(), format!("no sheet “{key}”")))
}

fn change(sheet: Sheet, column: u8, field: &str, text: &str) -> Change<(u8, String)> {
    let kind = fields::find(sheet, field).map(|f| f.kind);
    let (text, unit) = parted(text, matches!(kind, Some(FieldKind::Quantity { .. })));
    blank((column, field.to_owned()), text, unit)
}

/// A number and the unit behind it, where one is given; the usual unit is meant otherwise.
pub(crate) fn parted(text: &str, quantity: bool) -> (&str, &str) {
    if quantity { text.split_once(' ').unwrap_or((text, "")) } else { (text, "") }
}

/// A change of a field in which nothing stood before.
pub(crate) fn blank<P>(place: P, text: &str, unit: &str) -> Change<P> {
    let (text, unit) = (text.to_owned(), unit.to_owned());
    Change { place, text, unit, instrument: None, photo: None, seen: Vec::new() }
}
