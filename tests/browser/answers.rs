//! What a person at the demo's fresh drive finds, reads and sets: taken from the table of that drive, where it stands
//! beside its plates.

use super::form::{Control, Kind, Put};
use toml::{Table, Value};

/// The fresh drive of the demo.
pub const DRIVE: &str = "/sites/gannet-haven/P-110";

const OF_THE_DRIVE: &str = include_str!("../../seed-demo/tables/wash-pump.toml");
const USUAL: &str = include_str!("../../seed-demo/tables/usual.toml");

/// The table.
pub struct Answers {
    own: Table,
    usual: Table,
    /// A picture to hand in where one is asked for.
    pub picture: String,
    rows_numbered: usize,
}

impl Answers {
    /// Reads it.
    pub fn read() -> Self {
        let own = OF_THE_DRIVE.parse().expect("the drive's table");
        let usual = USUAL.parse().expect("the usual table");
        Self { own, usual, picture: String::new(), rows_numbered: 100 }
    }

    /// What to do at a control of this step; `names` are all the names of its form.
    pub fn at(&mut self, step: &str, control: &Control, names: &[String]) -> Put {
        let name = control.name.as_str();
        if control.kind == Kind::Tick {
            return Put::Value("yes".to_owned());
        }
        if name.ends_with(".unit") {
            return Put::Nothing;
        }
        if name.starts_with("instrument.") || name.ends_with(".instrument") {
            return self.instrument(control, names);
        }
        if let Some(file) = name.strip_suffix(".file") {
            let wanted = file.starts_with("links-photo") && !self.picture.is_empty();
            return if wanted { Put::Value(self.picture.clone()) } else { Put::Nothing };
        }
        if name.starts_with("links-photo") && !self.picture.is_empty() {
            return Put::Value("Links as found".to_owned());
        }
        let (key, place) = name.rsplit_once('.').unwrap_or((name, ""));
        let said = match place.parse() {
            Ok(row) => self.entry(key, row),
            Err(_) => self.setting(step, key, place, control),
        };
        match said {
            Some(text) => Put::Value(text),
            None if control.needed && control.value.is_empty() => {
                panic!("step {step}: nothing is said of “{}”, {name}", control.label)
            }
            None => Put::Nothing,
        }
    }

    fn entry(&self, key: &str, row: usize) -> Option<String> {
        let found = [&self.own, &self.usual].into_iter().find_map(|t| t.get("entries")?.get(key))?;
        let text = match found {
            Value::Array(rows) => rows.get(row)?.as_str()?,
            one => one.as_str()?,
        };
        (!text.is_empty()).then(|| text.to_owned())
    }

    /// A column of the parameter record: numbered, found and intended where it is set, left in the last phase.
    fn setting(&mut self, step: &str, function: &str, column: &str, control: &Control) -> Option<String> {
        let setting = self.own.get("settings")?.get(function)?;
        let (found, kept) = match setting {
            Value::Array(both) => (both.first()?.as_str(), both.last()?.as_str()?.to_owned()),
            one => (None, one.as_str()?.to_owned()),
        };
        let last = step == "settings-as-left";
        match column {
            _ if !control.value.is_empty() => None,
            "as-left" if last => Some(kept),
            "intended" if !last => Some(kept),
            "as-found" if !last => found.map(str::to_owned),
            "code" if !last => {
                self.rows_numbered += 1;
                Some(format!("row {}", self.rows_numbered))
            }
            _ => None,
        }
    }

    /// The instrument whose mark the tables name: by item where they do, else by quantity.
    fn instrument(&self, control: &Control, names: &[String]) -> Put {
        let table = |name: &str| self.usual.get(name).and_then(Value::as_table).expect("a table of instruments");
        let own = control.name.strip_suffix(".instrument");
        let readings = names.iter().filter(|n| own.is_none_or(|own| *n == own));
        let by_item = readings
            .flat_map(|n| table("by_item").iter().filter(move |(k, _)| n.starts_with(k.as_str())))
            .max_by_key(|(k, _)| k.len());
        let quantity = control.name.trim_start_matches("instrument.").replace('-', " ");
        let mark = by_item.map(|(_, m)| m).or_else(|| table("by_quantity").get(&quantity)).and_then(Value::as_str);
        let fitting = |(_, shown): &&(String, String)| match mark {
            Some(mark) => shown.starts_with(mark),
            None => !shown.starts_with("none") && !shown.contains("accuracy not known"),
        };
        control.options.iter().find(fitting).map_or(Put::Nothing, |(value, _)| Put::Value(value.clone()))
    }
}
