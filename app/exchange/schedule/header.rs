//! Reading a header: what one heading may mean, and where the header rows stand in a sheet.

use super::units::{parted, unit_of};
use super::vocabulary::{self, Weight};
use super::{Target, bare, folded};
use crate::sheets::{Address, CellValue, Sheet};
use commissioning::plant::Sheet as Part;
use std::cell::RefCell;
use std::collections::BTreeMap;

/// How many rows from the top a header is looked for.
const LOOKED_AT: u32 = 40;

/// One thing a heading may mean, with how well it fits.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) struct Meaning {
    pub target: Target,
    pub score: i32,
}

/// A heading as understood.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub(super) struct Heading {
    /// On one line.
    pub text: String,
    /// Unit as written, when it states one.
    pub unit: Option<String>,
    /// What it may mean, best first.
    pub meanings: Vec<Meaning>,
}

/// Understands headings, each text once.
pub(super) struct Reader {
    known: RefCell<BTreeMap<String, Heading>>,
    /// Headings as our own workbooks write them, in plain spelling.
    own: BTreeMap<String, Target>,
}

impl Default for Reader {
    fn default() -> Self {
        let own = Target::all().into_iter().map(|t| (folded(&t.words()), t)).collect();
        Self { known: RefCell::default(), own }
    }
}

impl Reader {
    /// What this heading means.
    pub(super) fn heading(&self, text: &str) -> Heading {
        let text = bare(text);
        if let Some(known) = self.known.borrow().get(&text) {
            return known.clone();
        }
        let heading = understand(&text, &self.own);
        self.known.borrow_mut().insert(text, heading.clone());
        heading
    }

    /// The headings of these rows, column by column.
    pub(super) fn headings(&self, sheet: &Sheet, rows: (u32, u32)) -> Vec<Heading> {
        let lines: Vec<Vec<String>> = (rows.0..=rows.1).map(|row| line(sheet, row, rows)).collect();
        (0..sheet.width() as usize)
            .map(|column| {
                let mut parts: Vec<&str> = Vec::new();
                for line in &lines {
                    let part = line.get(column).map_or("", String::as_str);
                    if !part.is_empty() && parts.last() != Some(&part) {
                        parts.push(part);
                    }
                }
                self.heading(&parts.join(" "))
            })
            .collect()
    }

    /// Where the header stands: the rows that make the most columns understood, the fewest that do.
    pub(super) fn find(&self, sheet: &Sheet) -> Option<(u32, u32)> {
        let rows: Vec<u32> = (0..sheet.height().min(LOOKED_AT)).filter(|r| may_be_header(sheet, *r)).collect();
        let mut best: Option<((u32, u32), (usize, i32))> = None;
        for first in &rows {
            for more in 0..3 {
                let last = first + more;
                if !(*first..=last).all(|r| rows.contains(&r)) || (more > 0 && !is_group(sheet, *first)) {
                    continue;
                }
                let assigned = assign(&self.headings(sheet, (*first, last)));
                let count = assigned.iter().flatten().count();
                let rank = (count, -i32::try_from(more).unwrap_or(0));
                if count >= 2 && best.is_none_or(|(_, known)| rank > known) {
                    best = Some(((*first, last), rank));
                }
            }
        }
        best.map(|(rows, _)| self.with_units(sheet, rows))
    }

    /// A row of nothing but units under the header belongs to it.
    fn with_units(&self, sheet: &Sheet, rows: (u32, u32)) -> (u32, u32) {
        let below = rows.1 + 1;
        let cells: Vec<String> = sheet
            .rows
            .get(below as usize)
            .map_or_else(Vec::new, |row| row.iter().filter(|c| !c.is_empty()).map(CellValue::text).collect());
        let units = cells.iter().filter(|c| parted(c).1.is_some() && parted(c).0.is_empty()).count();
        if units >= 2 && units * 2 > cells.len() && rows.1 < rows.0 + 2 { (rows.0, below) } else { rows }
    }
}

/// The texts of a header row; a merged cell's words stand in all its columns. In a text file, which has no merged
/// cells, a group's words reach to the next group.
fn line(sheet: &Sheet, row: u32, rows: (u32, u32)) -> Vec<String> {
    let own = |row: u32, column: u32| bare(&sheet.shown(Address::new(row, column)).text());
    let mut texts: Vec<String> = (0..sheet.width()).map(|column| own(row, column)).collect();
    if row < rows.1 && sheet.merged.is_empty() {
        let below: Vec<String> = (0..sheet.width()).map(|column| own(row + 1, column)).collect();
        let mut group = String::new();
        for (text, below) in texts.iter_mut().zip(&below) {
            if text.is_empty() && !below.is_empty() {
                text.clone_from(&group);
            } else if !text.is_empty() {
                // A heading that has nothing under it is a column of its own, not a group.
                group = if below.is_empty() { String::new() } else { text.clone() };
            }
        }
    }
    texts
}

/// A header row holds words in two columns at least, and few figures.
fn may_be_header(sheet: &Sheet, row: u32) -> bool {
    let cells = sheet.rows.get(row as usize).map_or(&[][..], Vec::as_slice);
    let (mut words, mut figures) = (0, 0);
    for cell in cells {
        match cell {
            CellValue::Text(text) if text.trim().starts_with(|c: char| c.is_ascii_digit()) => {
                if parted(text).1.is_some() && parted(text).0.is_empty() { words += 1 } else { figures += 1 }
            }
            CellValue::Text(text) if !text.trim().is_empty() && text.len() <= 120 => words += 1,
            CellValue::Empty | CellValue::Text(_) => {}
            _ => figures += 1,
        }
    }
    words >= 2 && figures * 4 <= words
}

/// A row above the last header row heads groups: two different texts at least, or it is a title.
fn is_group(sheet: &Sheet, row: u32) -> bool {
    let texts: std::collections::BTreeSet<String> = sheet
        .rows
        .get(row as usize)
        .into_iter()
        .flatten()
        .map(CellValue::text)
        .filter(|t| !t.trim().is_empty())
        .collect();
    texts.len() >= 2
}

/// Gives each column its best meaning; a meaning goes to the column that fits it best.
pub(super) fn assign(headings: &[Heading]) -> Vec<Option<Target>> {
    let mut wishes: Vec<(i32, usize, &Target)> = headings
        .iter()
        .enumerate()
        .flat_map(|(column, h)| h.meanings.iter().map(move |m| (m.score, column, &m.target)))
        .collect();
    wishes.sort_by(|a, b| b.0.cmp(&a.0).then(a.1.cmp(&b.1)));
    let mut given: Vec<Option<Target>> = vec![None; headings.len()];
    for (_, column, target) in wishes {
        let taken = given.iter().flatten().any(|t| t == target);
        if let Some(place) = given.get_mut(column)
            && place.is_none()
            && !taken
        {
            *place = Some(target.clone());
        }
    }
    given
}

fn understand(text: &str, own: &BTreeMap<String, Target>) -> Heading {
    let (rest, unit) = parted(text);
    let plain = folded(&rest);
    let words: Vec<&str> = plain.split(' ').filter(|w| !w.is_empty()).collect();
    let around: Vec<Part> = words.iter().filter_map(|w| vocabulary::context(w)).collect();
    let stripped: Vec<&str> = words.iter().copied().filter(|w| vocabulary::context(w).is_none()).collect();
    let mut meanings: Vec<Meaning> = Vec::new();
    let mut add = |target: Target, score: i32| {
        if score < 30 {
            return;
        }
        match meanings.iter_mut().find(|m| m.target == target) {
            Some(known) => known.score = known.score.max(score),
            None => meanings.push(Meaning { target, score }),
        }
    };
    // A heading as our own workbooks write it means exactly that.
    if let Some(own) = own.get(&plain).filter(|t| unit.as_deref().is_none_or(|u| suits(t, u))) {
        add(own.clone(), 200);
    }
    for (target, weight, phrases) in vocabulary::lines() {
        let Some(fit) = phrases.iter().filter_map(|p| fit(p, weight, &words, &stripped)).max() else { continue };
        let suits = unit.as_deref().is_none_or(|u| suits(&target, u));
        // The last words of a header can look like a unit and be none: “Motor A”. Only a quantity is refused by it.
        if suits || target.quantity().is_none() && !text.contains(['[', '(']) {
            let known = i32::from(unit.is_some() && suits) * 12;
            add(target.clone(), fit + known + context_of(&target, &around));
        }
    }
    if let (Some(unit), true) = (unit.as_deref(), stripped.len() <= 1) {
        for kind in engineering::Kind::ALL.iter().filter(|k| unit_of(**k, unit).is_some()) {
            if let Some(target) = vocabulary::by_unit(*kind, around.first().copied()) {
                add(target, if stripped.is_empty() { 58 } else { 34 });
            }
        }
    }
    meanings.sort_by_key(|m| -m.score);
    Heading { text: text.to_owned(), unit, meanings }
}

/// How well a phrase of the table fits the words of a heading.
fn fit(phrase: &str, weight: Weight, words: &[&str], stripped: &[&str]) -> Option<i32> {
    let wanted: Vec<&str> = phrase.split(' ').collect();
    let length = i32::try_from(wanted.len()).unwrap_or(0);
    let (whole, bare, part) = match weight {
        Weight::Plain => (100, 88, Some(60)),
        Weight::Hint => (56, 50, None),
    };
    match () {
        () if wanted == words => Some(whole + length),
        () if wanted == stripped => Some(bare + length),
        () => part.filter(|_| words.windows(wanted.len()).any(|w| w == wanted)).map(|p| p + 4 * length),
    }
}

fn suits(target: &Target, unit: &str) -> bool {
    target.quantity().is_some_and(|(kind, _)| unit_of(kind, unit).is_some())
}

/// A heading that speaks of the cable is no figure of the motor.
fn context_of(target: &Target, around: &[Part]) -> i32 {
    let Target::Field(place) = target else { return 0 };
    if around.is_empty() || place.sheet == Part::Drive {
        return 0;
    }
    if around.contains(&place.sheet) { 20 } else { -45 }
}
