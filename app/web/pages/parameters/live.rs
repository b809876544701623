//! What the checks of a group say while it is being filled in: nothing is recorded.

use super::changes;
use super::group::{GroupAt, judged, panels};
use crate::extract::DriveAt;
use crate::posted::Posted;
use commissioning::judge::View;
use commissioning::record::draft;
use maud::Markup;

/// The fragment that takes the place of the page's verdicts.
pub async fn show(at: DriveAt, GroupAt(group): GroupAt, posted: Posted) -> Markup {
    let (drive, _) = draft::with_parameters(&at.drive, &changes::of(&at, group, &posted));
    panels(&judged(&View { drive: &drive, ..at.view() }, group))
}
