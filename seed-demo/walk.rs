//! Walks one drive through the procedure, step by step, with what its table says was seen, read and set.

use crate::DemoFault;
use crate::case::{Case, Usual};
use crate::gear;
use crate::hand::{Hand, named};
use crate::picture;
use crate::site::{blank, parted};
use commissioning::journal::{Change, Deed};
use commissioning::plant::FieldKind;
use commissioning::procedure::{Item, ItemKind, Phase, Step, applies};
use commissioning::record::canonical::RecordFile;
use commissioning::record::functions::{self, FUNCTIONS};
use commissioning::record::{
    EntryPlace, Meaning, ParameterColumn, ParameterPlace, ReleaseRole, SettledOtherwise, Severity,
};
use commissioning::{DriveId, FindingId, PersonId};
use std::collections::BTreeSet;

/// One person's work on one drive.
pub(crate) struct Walk<'h, 's> {
    /// Who acts.
    pub(crate) hand: &'h mut Hand<'s>,
    /// The drive's table.
    pub(crate) case: &'h Case,
    /// What is the same everywhere.
    pub(crate) usual: &'h Usual,
    /// The drive.
    pub(crate) drive: DriveId,
    /// The engineer.
    pub(crate) who: PersonId,
}

impl Walk<'_, '_> {
    /// Begins the record and works until the step named is next, or to the end.
    pub(crate) fn until(&mut self, next: Option<&str>) -> Result<(), DemoFault> {
        self.act(Deed::BeginRecord { drive: self.drive }, 600, "beginning")?;
        let view = self.hand.view(self.drive)?;
        let (procedure, flags) = (view.procedure.clone(), view.view().flags());
        let mut keyed = BTreeSet::new();
        for phase in &procedure.phases {
            let steps: Vec<&Step> = phase.steps.iter().filter(|s| applies(&s.when, &flags)).collect();
            if steps.first().is_some_and(|s| Some(s.id.as_str()) == next) {
                return Ok(());
            }
            self.release(phase)?;
            for step in steps {
                if Some(step.id.as_str()) == next {
                    return Ok(());
                }
                self.take(step, &flags, &mut keyed)?;
            }
        }
        Ok(())
    }

    /// Signs as performed and recorded, or as reviewed and accepted.
    pub(crate) fn sign(&mut self, who: PersonId, meaning: Meaning) -> Result<(), DemoFault> {
        let view = self.hand.view(self.drive)?;
        let digest = RecordFile::shown(&view.view()).digest();
        let deed = Deed::Sign { drive: self.drive, meaning, digest };
        self.hand.signed(who, deed, 900, &format!("{}, signing", self.case.tag)).map(drop)
    }

    fn release(&mut self, phase: &Phase) -> Result<(), DemoFault> {
        let Some(hold) = &phase.hold else { return Ok(()) };
        let witness = self.case.witness.iter().find(|(at, _)| *at == phase.id).map(|(_, name)| name.clone());
        let role = if witness.is_some() { ReleaseRole::Witness } else { ReleaseRole::Engineer };
        let (printed_name, declared) = (witness.unwrap_or_default(), vec![true; hold.declare.len()]);
        let deed = Deed::ReleaseHold { drive: self.drive, phase: phase.id.clone(), role, printed_name, declared };
        self.act(deed, 300, &phase.id)
    }

    fn take(&mut self, step: &Step, flags: &BTreeSet<String>, keyed: &mut BTreeSet<String>) -> Result<(), DemoFault> {
        if let Some(otherwise) = self.case.otherwise.iter().find(|o| o.step == step.id) {
            let how = if otherwise.not_applicable {
                SettledOtherwise::NotApplicable
            } else {
                SettledOtherwise::CouldNotBeDone
            };
            let deed =
                Deed::SettleStep { drive: self.drive, step: step.id.clone(), how, reason: otherwise.reason.clone() };
            return self.act(deed, 120, &step.id);
        }
        if let Some(group) = step.parameters.as_deref().filter(|g| keyed.insert((*g).to_owned())) {
            self.key_in(group)?;
        }
        let mut changes = Vec::new();
        for item in step.items.iter().filter(|i| applies(&i.when, flags)) {
            for row in 0..u16::try_from(step.rows.len().max(1)).unwrap_or(1) {
                changes.extend(self.change(item, row)?);
            }
        }
        let seconds = 55 + 20 * i64::try_from(changes.len()).unwrap_or(0);
        if !changes.is_empty() {
            let deed = Deed::RecordEntries { drive: self.drive, step: step.id.clone(), changes, reason: String::new() };
            self.act(deed, seconds, &step.id)?;
        }
        self.put_right(step)?;
        self.find(step)
    }

    /// What is entered at an item's row; nothing where an optional one was left empty.
    fn change(&mut self, item: &Item, row: u16) -> Result<Option<Change<EntryPlace>>, DemoFault> {
        let said = [&self.case.entries, &self.usual.entries].into_iter().find_map(|e| e.get(&item.key));
        let text = match (said, &item.kind) {
            (Some(rows), _) => rows.row(row),
            (None, ItemKind::Confirmation) if !item.optional => Some("yes"),
            (None, _) if item.optional => None,
            (None, _) => return Err(self.faulty(format!("nothing is said of “{}”", item.key))),
        };
        let Some(text) = text else { return Ok(None) };
        let place = EntryPlace::in_row(item.key.clone(), row);
        let (text, unit) = parted(text, matches!(item.kind, ItemKind::Reading { .. }));
        let mut change = blank(place, text, unit);
        change.instrument = match self.instrument(item) {
            Some("none") | None => None,
            Some(mark) => Some(gear::instrument(mark)),
        };
        if matches!(item.kind, ItemKind::Photo) {
            let kept = self.hand.store.keep_photo_blocking(picture::star_links(), self.hand.calendar.at());
            change.photo = Some(kept.map_err(|e| DemoFault::Stopped(item.key.clone(), e.to_string()))?);
        }
        Ok(Some(change))
    }

    /// The mark of the instrument that an item is read with, where it names one.
    fn instrument(&self, item: &Item) -> Option<&str> {
        let ItemKind::Reading { quantity, instrument: true, .. } = &item.kind else { return None };
        let own = self.case.instruments.get(&item.key);
        let by_item =
            || self.usual.by_item.iter().filter(|(k, _)| item.key.starts_with(k.as_str())).max_by_key(|(k, _)| k.len());
        own.or_else(|| by_item().map(|(_, mark)| mark))
            .or_else(|| self.usual.by_quantity.get(quantity.words()))
            .map(String::as_str)
    }

    /// Keys in a group of settings; `*` is the last look, at which everything is written down as left.
    fn key_in(&mut self, group: &str) -> Result<(), DemoFault> {
        let last = group == "*";
        if group == functions::OTHER {
            for (label, _) in &self.case.free_rows {
                self.act(Deed::AddParameterRow { drive: self.drive, label: label.clone() }, 60, label)?;
            }
        }
        let mut changes = Vec::new();
        for (n, function) in FUNCTIONS.iter().enumerate().filter(|(_, f)| last || f.group == group) {
            let Some(setting) = self.case.settings.get(function.key) else { continue };
            let quantity = matches!(function.kind, FieldKind::Quantity { .. });
            let (found, intended, left, why) = setting.parts();
            let code = format!("row {}", self.case.first_row + n);
            let columns = if last {
                [
                    (ParameterColumn::AsLeft, Some(left)),
                    (ParameterColumn::Explanation, why),
                    (ParameterColumn::AsFound, None),
                ]
            } else {
                let code = Some(code.as_str());
                [
                    (ParameterColumn::Code, code),
                    (ParameterColumn::AsFound, found),
                    (ParameterColumn::Intended, Some(intended)),
                ]
            };
            for (column, text) in columns.iter().filter_map(|(c, t)| t.map(|t| (*c, t))) {
                let words = matches!(column, ParameterColumn::Code | ParameterColumn::Explanation);
                let (text, unit) = parted(text, quantity && !words);
                changes.push(blank(ParameterPlace { function: function.key.to_owned(), column }, text, unit));
            }
        }
        if last || group == functions::OTHER {
            for (n, (_, value)) in self.case.free_rows.iter().enumerate() {
                let function = format!("row-{}", n + 1);
                let at = |column| ParameterPlace { function: function.clone(), column };
                if last {
                    changes.push(blank(at(ParameterColumn::AsLeft), value, ""));
                } else {
                    let code = format!("row {}", self.case.first_row + FUNCTIONS.len() + n);
                    changes.push(blank(at(ParameterColumn::Code), &code, ""));
                    changes.push(blank(at(ParameterColumn::Intended), value, ""));
                }
            }
        }
        let seconds = 40 + 12 * i64::try_from(changes.len()).unwrap_or(0);
        self.act(Deed::SetParameters { drive: self.drive, changes, reason: String::new() }, seconds, group)
    }

    /// Puts entries of a step right, with the reason that is due.
    fn put_right(&mut self, step: &Step) -> Result<(), DemoFault> {
        let case = self.case;
        for correction in &case.corrections {
            let Some(item) = step.items.iter().find(|i| i.key == correction.item) else { continue };
            let drive = self.hand.drive(self.drive)?;
            let place = EntryPlace::new(item.key.clone());
            let seen = drive.record.as_ref().and_then(|r| r.entries.get(&place)).map(|s| s.seen()).unwrap_or_default();
            let (text, unit) = parted(&correction.text, true);
            let instrument = self.instrument(item).map(gear::instrument);
            let change = Change { instrument, seen, ..blank(place, text, unit) };
            let reason = correction.reason.clone();
            let deed = Deed::RecordEntries { drive: self.drive, step: step.id.clone(), changes: vec![change], reason };
            self.act(deed, 240, &step.id)?;
        }
        Ok(())
    }

    /// Raises and settles what the table says was found and put right at this step.
    fn find(&mut self, step: &Step) -> Result<(), DemoFault> {
        let case = self.case;
        for (n, found) in case.findings.iter().enumerate() {
            let finding = FindingId(named(&format!("finding {} {n}", case.tag)));
            if found.step == step.id {
                let severity = Severity::ALL.into_iter().find(|s| s.key() == found.severity);
                let severity = severity.ok_or_else(|| self.faulty(format!("no severity “{}”", found.severity)))?;
                let (text, at) = (found.text.clone(), Some(step.id.clone()));
                self.act(Deed::RaiseFinding { drive: self.drive, finding, severity, text, step: at }, 150, &step.id)?;
            }
            if let Some((_, how)) = found.settled.as_ref().filter(|(at, _)| *at == step.id) {
                self.act(Deed::SettleFinding { drive: self.drive, finding, how: how.clone() }, 150, &step.id)?;
            }
        }
        Ok(())
    }

    fn act(&mut self, deed: Deed, seconds: i64, place: &str) -> Result<(), DemoFault> {
        self.hand.act(Some(self.who), deed, seconds, &format!("{}, {place}", self.case.tag)).map(drop)
    }

    fn faulty(&self, why: String) -> DemoFault {
        DemoFault::Table(self.case.tag.clone(), why)
    }
}
