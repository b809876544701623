//! Every phase with its hold point, every step with its entries, verdicts, charts and remarks.

use super::Pages;
use super::verdicts::full;
use super::words::{instrument_mark, of_entry, rows, when};
use commissioning::plant::Recorded;
use commissioning::procedure::{Item, Phase, Step};
use commissioning::record::{Entry, EntryPlace, ReleaseRole, SettledOtherwise};
use serde_json::{Value, json};

impl Pages<'_> {
    pub(super) fn phases(&self) -> Vec<Value> {
        self.procedure
            .phases
            .iter()
            .enumerate()
            .map(|(n, phase)| {
                let steps: Vec<Value> = phase.steps.iter().filter_map(|s| self.step(s)).collect();
                json!({
                    "title": phase.title,
                    "number": n + 1,
                    "purpose": phase.purpose,
                    "hold": self.hold(phase),
                    "steps": steps,
                })
            })
            .collect()
    }

    fn hold(&self, phase: &Phase) -> Option<Value> {
        let hold = phase.hold.as_ref()?;
        let release = self.record.releases.iter().find(|r| r.phase == phase.id);
        let released = release.map(|r| match r.role {
            ReleaseRole::Engineer => format!("Released by {}, {}.", r.printed_name, r.received.shown()),
            ReleaseRole::Witness => {
                format!("Released by {} as witness, recorded by {}, {}.", r.printed_name, r.by_name, r.received.shown())
            }
        });
        Some(json!({
            "title": hold.title,
            "declare": hold.declare,
            "released": released.unwrap_or_else(|| "Not released.".to_owned()),
        }))
    }

    /// A step that anything was recorded at, or that applies; steps of options that are not fitted are left out.
    fn step(&self, step: &Step) -> Option<Value> {
        let entries = self.entries(step);
        let otherwise = self.record.otherwise.iter().find(|o| o.step == step.id).map(|o| settled(&o.settled));
        let once: Vec<Value> = self
            .record
            .once_otherwise
            .iter()
            .filter(|o| o.step == step.id)
            .map(|o| json!([settled(&o.settled), format!("taken back by {}, {}", o.ended.by_name, when(&o.ended))]))
            .collect();
        let judged: Vec<Value> =
            self.file.verdicts.iter().filter(|j| j.step == step.id && !self.is_parameter_check(j)).map(full).collect();
        let remarks = self.remarks(&step.id);
        let charts: Vec<Value> = self
            .charts
            .iter()
            .filter(|c| c.step == step.id)
            .map(|c| json!({ "title": c.title, "svg": c.svg, "alt": c.words }))
            .collect();
        let applies = commissioning::procedure::applies(&step.when, &self.flags());
        let empty =
            entries.is_empty() && otherwise.is_none() && once.is_empty() && judged.is_empty() && remarks.is_empty();
        if empty && !applies {
            return None;
        }
        let elsewhere = match (&step.sheet, &step.parameters) {
            (Some(_), _) => "Entered in the sheets of the plant, further on.",
            (_, Some(_)) => "Entered in the parameter record, further on.",
            _ if empty && !step.items.is_empty() => "Nothing recorded.",
            _ => "",
        };
        Some(json!({
            "title": step.title,
            "isolation": self.isolation(&step.id),
            "otherwise": otherwise,
            "once": once,
            "entries": entries,
            "judged": judged,
            "charts": charts,
            "remarks": remarks,
            "elsewhere": elsewhere,
        }))
    }

    fn entries(&self, step: &Step) -> Vec<Value> {
        let rows_of = u16::try_from(step.rows.len().max(1)).unwrap_or(1);
        let mut shown = Vec::new();
        for row in 0..rows_of {
            for item in &step.items {
                let place = EntryPlace::in_row(item.key.clone(), row);
                let Some(part) = self.record.entries.iter().find(|e| e.place == place) else { continue };
                let values = rows(&part.slot, |entry| Some(entry_words(item, entry)));
                let label = match step.rows.get(usize::from(row)) {
                    Some(name) => format!("{name}: {}", item.label),
                    None => item.label.clone(),
                };
                shown.push(json!({ "label": label, "values": values }));
            }
        }
        shown
    }

    fn isolation(&self, step: &str) -> Vec<String> {
        self.record
            .isolations
            .iter()
            .filter(|i| i.step == step)
            .map(|i| {
                let lifted = i
                    .lifted
                    .as_ref()
                    .map_or_else(|| "still in force".to_owned(), |(at, by)| format!("lifted {} by {by}", at.shown()));
                format!("Isolated and proved dead, recorded by {}, {}; {lifted}.", i.by_name, i.from.shown())
            })
            .collect()
    }

    /// Remarks on a step, or on the whole record for the empty step.
    pub(super) fn remarks(&self, step: &str) -> Vec<String> {
        self.record
            .remarks
            .iter()
            .filter(|r| r.step == step)
            .map(|r| format!("{} ({}, {})", r.remark.value, r.remark.by_name, when(&r.remark)))
            .collect()
    }

    fn flags(&self) -> std::collections::BTreeSet<String> {
        self.file.rebuild().map(|r| r.drive.flags()).unwrap_or_default()
    }
}

fn settled(settled: &Recorded<(SettledOtherwise, String)>) -> String {
    let (how, why) = &settled.value;
    let how = match how {
        SettledOtherwise::NotApplicable => "Does not apply",
        SettledOtherwise::CouldNotBeDone => "Could not be done",
    };
    format!("{how}: {why} ({}, {})", settled.by_name, when(settled))
}

fn entry_words(item: &Item, entry: &Entry) -> Value {
    let mut notes = Vec::new();
    if entry.out_of_order {
        notes.push("arrived before its hold point was released".to_owned());
    }
    if let Some(reason) = &entry.accepted_because {
        notes.push(format!("beyond what is usual, accepted because: {reason}"));
    }
    json!({
        "value": of_entry(Some(item), entry),
        "words": entry.value.unit.is_none(),
        "instrument": entry.instrument.as_ref().map(instrument_mark).unwrap_or_default(),
        "notes": notes,
    })
}
