//! Steps that wait for an answer: whether they apply hangs on a fitted option that nobody has stated yet.

use crate::judge::View;
use crate::plant::{Field, FieldKind, Place, Sheet, fields};
use crate::procedure::{Step, applies};
use std::collections::BTreeSet;

/// How many steps wait, and for which fields of which sheets.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Unanswered {
    /// Steps.
    pub steps: usize,
    /// The questions, sheet by sheet: labels of the fields.
    pub questions: Vec<(Sheet, Vec<&'static str>)>,
}

/// What waits at a drive.
#[must_use]
pub fn unanswered(view: &View<'_>) -> Unanswered {
    let flags = view.flags();
    let mut found = Unanswered::default();
    for (_, step) in view.procedure.steps().filter(|(_, s)| !applies(&s.when, &flags)) {
        let Some(asked) = open_questions(view, step, &flags) else { continue };
        found.steps += 1;
        for (sheet, field) in asked {
            match found.questions.iter_mut().find(|(s, _)| *s == sheet) {
                Some((_, labels)) if labels.contains(&field.label) => {}
                Some((_, labels)) => labels.push(field.label),
                None => found.questions.push((sheet, vec![field.label])),
            }
        }
    }
    found
}

impl Unanswered {
    /// As a sentence that says what to answer and where; `None` when nothing waits.
    #[must_use]
    pub fn words(&self) -> Option<String> {
        let wait = match self.steps {
            0 => return None,
            1 => "1 step waits".to_owned(),
            steps => format!("{steps} steps wait"),
        };
        let sheet = |(sheet, labels): &(Sheet, Vec<&str>)| format!("sheet “{}” ({})", sheet.words(), labels.join(", "));
        let sheets: Vec<String> = self.questions.iter().map(sheet).collect();
        Some(format!("{wait} for an answer: which options are fitted? Say yes or no on: {}.", sheets.join("; ")))
    }
}

/// The questions a step waits for; `None` where an answer given already says that it does not apply.
fn open_questions(view: &View<'_>, step: &Step, flags: &BTreeSet<String>) -> Option<Vec<(Sheet, &'static Field)>> {
    let mut open = Vec::new();
    for asked in &step.when {
        if let Some(not) = asked.strip_prefix('!') {
            if flags.contains(not) {
                return None;
            }
        } else if !flags.contains(asked) {
            let (sheet, field) = question(asked)?;
            if is_stated(view, &Place::new(sheet, field.key)) {
                return None;
            }
            open.push((sheet, field));
        }
    }
    Some(open).filter(|open| !open.is_empty())
}

/// The field whose answer sets an option.
fn question(option: &str) -> Option<(Sheet, &'static Field)> {
    if option.starts_with("load:") {
        return Some((Sheet::Load, fields::find(Sheet::Load, "kind")?));
    }
    // `key:value` is one answer to a choice.
    let key = option.split_once(':').map_or(option, |(key, _)| key);
    Sheet::ALL.into_iter().filter(|sheet| *sheet != Sheet::Site).find_map(|sheet| {
        let field = fields::find(sheet, key)?;
        matches!(field.kind, FieldKind::Flag | FieldKind::Choice(_)).then_some((sheet, field))
    })
}

fn is_stated(view: &View<'_>, place: &Place) -> bool {
    let of_site = || {
        place.sheet == Sheet::Supply
            && view.site.fields.get(place).and_then(|s| s.current()).is_some_and(|r| r.value.is_some())
    };
    view.drive.field(place).is_some() || of_site()
}
