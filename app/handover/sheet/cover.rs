//! The first page: which drive, is it sound, what to key in, who stands for it.

use super::Pages;
use super::verdicts::{full, gravity, heading};
use super::words::{grouped, of_field};
use commissioning::judge::{Counts, Judged};
use commissioning::plant::{Place, Sheet, fields};
use commissioning::record::functions::to_restore;
use commissioning::record::{FindingState, ParameterColumn};
use engineering::Verdict;
use serde_json::{Value, json};

/// Checks that a receiver asks for first, when nothing is odd.
const FIRST: &[&str] = &[
    "insulation-resistance",
    "supply-unbalance",
    "measured-acceleration",
    "load-current",
    "pe-continuity",
    "rotation",
    "stop-time",
    "vibration",
    "winding-balance",
    "bus-peak",
    "current-balance",
];
/// Verdicts that fit the page.
const SHOWN: usize = 7;
/// Parameters that fit the page, both columns together.
const KEYED: usize = 18;

impl Pages<'_> {
    pub(super) fn cover(&self) -> Value {
        let counts = Counts::of(&self.file.verdicts);
        let open = self.record.findings.iter().filter(|f| f.is_open()).count();
        let accepted = self.record.findings.iter().filter(|f| matches!(f.state, FindingState::Accepted { .. })).count();
        let settled = self.record.findings.len() - open - accepted;
        let (keys, more) = self.keys();
        let (judged, left_out) = self.foremost();
        json!({
            "plates": self.short_plates(),
            "counts": [
                ["●", counts.within, "within"], ["▲", counts.marginal, "marginal"],
                ["■", counts.outside, "outside"], ["○", counts.not_assessed, "not assessed"],
            ],
            "findings": findings_words(open, settled, accepted),
            "judged": judged,
            "left-out": left_out,
            "not-assessed": self.not_assessed(),
            "keys": keys,
            "more": more,
        })
    }

    /// The standing value of a drive field in words.
    pub(super) fn drive_words(&self, sheet: Sheet, key: &str) -> Option<String> {
        self.drive_place(&Place::new(sheet, key))
    }

    fn drive_place(&self, place: &Place) -> Option<String> {
        let part = self.file.drive.fields.iter().find(|f| f.place == *place)?;
        let typed = part.slot.current()?.value.as_ref()?;
        Some(of_field(fields::find(place.sheet, &place.field), typed))
    }

    fn short_plates(&self) -> Value {
        let column = self
            .file
            .drive
            .fields
            .iter()
            .find(|f| f.place == Place::new(Sheet::Motor, "column-in-use"))
            .and_then(|f| f.slot.current()?.value.as_ref()?.text.parse::<u8>().ok())
            .map_or(0, |n| n.saturating_sub(1));
        let motor = |keys: &[&str]| {
            let parts = keys.iter().filter_map(|k| {
                self.drive_place(&Place::in_column(Sheet::Motor, column, *k))
                    .or_else(|| self.drive_words(Sheet::Motor, k))
            });
            parts.collect::<Vec<_>>().join(" · ")
        };
        let of = |sheet: Sheet, keys: &[&str]| {
            keys.iter().filter_map(|k| self.drive_words(sheet, k)).collect::<Vec<_>>().join(" · ")
        };
        let span = |sheet: Sheet, keys: &[&str]| {
            keys.iter().filter_map(|k| self.drive_words(sheet, k)).collect::<Vec<_>>().join(" to ")
        };
        let (d, l, c) = (Sheet::DrivePlate, Sheet::Load, Sheet::Cable);
        json!([
            { "heading": "Motor", "rows": [
                ["power", motor(&["power"])], ["volts, amps", motor(&["volts", "connection", "amps"])],
                ["hertz, speed", motor(&["hertz", "rpm"])], ["cosφ, efficiency", motor(&["power-factor", "efficiency"])],
                ["type", motor(&["type"])], ["serial", motor(&["serial"])],
            ]},
            { "heading": "Drive", "rows": [
                ["input", span(d, &["input-volts-low", "input-volts-high"])], ["output", of(d, &["continuous-current"])],
                ["overload", of(d, &["overload", "overload-time"])], ["firmware", of(d, &["firmware"])],
                ["type", of(d, &["type"])], ["serial", of(d, &["serial"])],
            ]},
            { "heading": "Load and cable", "rows": [
                ["load", of(l, &["kind", "profile"])], ["inertia", of(l, &["inertia"])],
                ["speed range", span(l, &["speed-low", "speed-high"])], ["direction", of(l, &["direction"])],
                ["cable", of(c, &["cross-section", "length"])], ["stop time", of(l, &["stop-time"])],
            ]},
        ])
    }

    /// All that is outside, then marginal, then what a receiver asks for first.
    fn foremost(&self) -> (Vec<Value>, usize) {
        let rank = |j: &Judged| FIRST.iter().position(|c| *c == j.outcome.check).unwrap_or(FIRST.len());
        let mut list: Vec<&Judged> = self
            .file
            .verdicts
            .iter()
            .filter(|j| matches!(j.outcome.verdict, Verdict::Outside | Verdict::Marginal | Verdict::Within))
            .collect();
        list.sort_by_key(|j| (gravity(j.outcome.verdict), rank(j)));
        // Of what is within, each check once: its first run stands for the others.
        let mut seen = std::collections::BTreeSet::new();
        list.retain(|j| j.outcome.verdict != Verdict::Within || seen.insert(j.outcome.check.as_str()));
        let odd = list.iter().filter(|j| j.outcome.verdict != Verdict::Within).count();
        (list.iter().take(SHOWN).map(|j| full(j)).collect(), odd.saturating_sub(SHOWN))
    }

    fn not_assessed(&self) -> String {
        let names: Vec<String> =
            self.file.verdicts.iter().filter(|j| j.outcome.verdict == Verdict::NotAssessed).map(heading).collect();
        match names.len() {
            0 => String::new(),
            n if n <= 4 => format!("Not assessed: {}.", names.join("; ")),
            n => format!("Not assessed: {}; and {} more, each named at its step.", names[..3].join("; "), n - 3),
        }
    }

    /// The first of the parameters as left, in the order of the sheet, and how many more there are; rows that were set for
    /// a test only are not keyed into a restored drive.
    fn keys(&self) -> (Vec<Value>, usize) {
        let all: Vec<Value> = to_restore()
            .map(|f| (f.key, f.label))
            .chain(self.record.free_rows.iter().map(|r| (r.key.as_str(), r.label.as_str())))
            .filter_map(|(key, label)| {
                let left = self.parameter(key, ParameterColumn::AsLeft)?;
                let code = self.parameter(key, ParameterColumn::Code).unwrap_or_default();
                Some(json!({ "label": label, "code": code, "value": left }))
            })
            .collect();
        let more = all.len().saturating_sub(KEYED);
        (all.into_iter().take(KEYED).collect(), more)
    }

    pub(super) fn short_head(&self) -> String {
        grouped(self.file.head.hash.get(..12).unwrap_or_default())
    }
}

fn findings_words(open: usize, settled: usize, accepted: usize) -> String {
    let mut parts = vec![match open {
        0 => "no finding open".to_owned(),
        1 => "1 finding open".to_owned(),
        n => format!("{n} findings open"),
    }];
    if settled > 0 {
        parts.push(format!("{settled} settled"));
    }
    if accepted > 0 {
        parts.push(format!("{accepted} accepted as it is"));
    }
    parts.join(" · ")
}
