//! Where the pages of a drive's record are: steps, hold points, settings, findings, the record, its package and journal.

use super::{drive as of_drive, encode};
use commissioning::FindingId;

/// Begin a drive's record.
#[must_use]
pub fn begin(site: &str, drive: &str) -> String {
    format!("{}/begin", of_drive(site, drive))
}

/// A step.
#[must_use]
pub fn step(site: &str, drive: &str, step: &str) -> String {
    format!("{}/steps/{}", of_drive(site, drive), encode(step))
}

/// A step after something was recorded at it that does not lead on: `partly`, `whole`, or `nothing`; and the verdicts
/// elsewhere that this brought about.
#[must_use]
pub fn step_recorded(site: &str, drive: &str, step: &str, how: &str, brought: &str) -> String {
    let also = if brought.is_empty() { String::new() } else { format!("&brought={}", encode(brought)) };
    format!("{}?recorded={how}{also}", self::step(site, drive, step))
}

/// The live verdicts of a step.
#[must_use]
pub fn step_live(site: &str, drive: &str, step: &str) -> String {
    format!("{}/live", self::step(site, drive, step))
}

/// Settle a step without its entries; `how` as the form names it.
#[must_use]
pub fn otherwise(site: &str, drive: &str, step: &str, how: &str) -> String {
    let page = format!("{}/otherwise", self::step(site, drive, step));
    if how.is_empty() { page } else { format!("{page}?how={}", encode(how)) }
}

/// Take back that a step was settled otherwise.
#[must_use]
pub fn resume(site: &str, drive: &str, step: &str) -> String {
    format!("{}/resume", self::step(site, drive, step))
}

/// The hold point before a phase.
#[must_use]
pub fn hold(site: &str, drive: &str, phase: &str) -> String {
    format!("{}/hold/{}", of_drive(site, drive), encode(phase))
}

/// The parameter record.
#[must_use]
pub fn parameters(site: &str, drive: &str) -> String {
    format!("{}/parameters", of_drive(site, drive))
}

/// The parameter record after something was kept in a group: says what, where it stands.
#[must_use]
pub fn parameters_saved(site: &str, drive: &str, group: &str, count: usize) -> String {
    format!("{}?saved={count}&of={}#group-{}", parameters(site, drive), encode(group), encode(group))
}

/// A sheet after something was kept: `sheet` is its address.
#[must_use]
pub fn saved(sheet: &str, count: usize) -> String {
    format!("{sheet}?saved={count}")
}

/// A group of the parameter record, by its address name.
#[must_use]
pub fn parameter_group(site: &str, drive: &str, group: &str) -> String {
    format!("{}/{}", parameters(site, drive), encode(group))
}

/// The live verdicts of a group of the parameter record.
#[must_use]
pub fn parameter_group_live(site: &str, drive: &str, group: &str) -> String {
    format!("{}/live", parameter_group(site, drive, group))
}

/// Add a free row to the parameter record.
#[must_use]
pub fn parameter_rows(site: &str, drive: &str) -> String {
    format!("{}/rows", parameters(site, drive))
}

/// Findings.
#[must_use]
pub fn findings(site: &str, drive: &str) -> String {
    format!("{}/findings", of_drive(site, drive))
}

/// The form that raises a finding at a step.
#[must_use]
pub fn raise_finding_at(site: &str, drive: &str, step: &str) -> String {
    format!("{}?step={}#raise", findings(site, drive), encode(step))
}

/// A finding.
#[must_use]
pub fn finding(site: &str, drive: &str, finding: FindingId) -> String {
    format!("{}/{finding}", findings(site, drive))
}

/// Settle a finding.
#[must_use]
pub fn settle_finding(site: &str, drive: &str, finding: FindingId) -> String {
    format!("{}/settle", self::finding(site, drive, finding))
}

/// Accept a finding as it is.
#[must_use]
pub fn accept_finding(site: &str, drive: &str, finding: FindingId) -> String {
    format!("{}/accept", self::finding(site, drive, finding))
}

/// The form that accepts a finding, on that finding's page.
#[must_use]
pub fn accept_form(site: &str, drive: &str, finding: FindingId) -> String {
    format!("{}#accept", self::finding(site, drive, finding))
}

/// The record, read from top to bottom.
#[must_use]
pub fn record(site: &str, drive: &str) -> String {
    format!("{}/record", of_drive(site, drive))
}

/// The record with every part open, to be read through or printed.
#[must_use]
pub fn record_whole(site: &str, drive: &str) -> String {
    format!("{}?whole=yes", record(site, drive))
}

/// The same with the working of every verdict.
#[must_use]
pub fn record_in_full(site: &str, drive: &str) -> String {
    format!("{}?working=all", record(site, drive))
}

/// A step in the record.
#[must_use]
pub fn record_at(site: &str, drive: &str, step: &str) -> String {
    format!("{}#step-{}", record(site, drive), encode(step))
}

/// Make a remark.
#[must_use]
pub fn remarks(site: &str, drive: &str) -> String {
    format!("{}/remarks", of_drive(site, drive))
}

/// Sign as performed and recorded.
#[must_use]
pub fn sign(site: &str, drive: &str) -> String {
    format!("{}/sign", of_drive(site, drive))
}

/// Sign as reviewed and accepted.
#[must_use]
pub fn accept(site: &str, drive: &str) -> String {
    format!("{}/accept", of_drive(site, drive))
}

/// Return a signed record.
#[must_use]
pub fn send_back(site: &str, drive: &str) -> String {
    format!("{}/return", of_drive(site, drive))
}

/// Reopen an accepted record.
#[must_use]
pub fn reopen(site: &str, drive: &str) -> String {
    format!("{}/reopen", of_drive(site, drive))
}

/// The handover package.
#[must_use]
pub fn package(site: &str, drive: &str) -> String {
    format!("{}/package", of_drive(site, drive))
}

/// The handover package as one file.
#[must_use]
pub fn package_file(site: &str, drive: &str) -> String {
    format!("{}/download", package(site, drive))
}

/// The journal of a drive.
#[must_use]
pub fn journal(site: &str, drive: &str, page: u32) -> String {
    let first = format!("{}/journal", of_drive(site, drive));
    if page > 1 { format!("{first}?page={page}") } else { first }
}

/// The journal of a drive as a file.
#[must_use]
pub fn journal_file(site: &str, drive: &str) -> String {
    format!("{}/journal/events", of_drive(site, drive))
}
