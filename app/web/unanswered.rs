//! Steps that wait for an answer: whether they apply hangs on a fitted option that nobody has stated yet.

use crate::extract::DriveAt;
use crate::links;
use commissioning::judge::View;
use commissioning::plant::{Field, FieldKind, Place, Sheet, fields};
use commissioning::procedure::{Step, applies};
use maud::{Markup, html};
use std::collections::BTreeSet;

/// How many steps wait, and for which fields of which sheets.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Unanswered {
    /// Steps.
    pub steps: usize,
    /// The questions, sheet by sheet.
    pub questions: Vec<(Sheet, Vec<&'static str>)>,
}

/// What waits at a drive.
#[must_use]
pub fn of(view: &View<'_>) -> Unanswered {
    let flags = view.flags();
    let mut found = Unanswered::default();
    for (_, step) in view.procedure.steps().filter(|(_, s)| !applies(&s.when, &flags)) {
        let Some(asked) = open_questions(view, step, &flags) else { continue };
        found.steps += 1;
        for (sheet, field) in asked {
            let labels = match found.questions.iter().position(|(s, _)| *s == sheet) {
                Some(n) => found.questions.get_mut(n).map(|(_, labels)| labels),
                None => {
                    found.questions.push((sheet, Vec::new()));
                    found.questions.last_mut().map(|(_, labels)| labels)
                }
            };
            if let Some(labels) = labels.filter(|labels| !labels.contains(&field.label)) {
                labels.push(field.label);
            }
        }
    }
    found
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
    Sheet::ALL.into_iter().filter(|sheet| *sheet != Sheet::Site).find_map(|sheet| {
        let field = fields::find(sheet, option)?;
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

/// The sentence with the way to each sheet; nothing where every option was stated.
#[must_use]
pub fn notice(at: &DriveAt) -> Markup {
    let waiting = of(&at.view());
    html! {
        @if waiting.steps > 0 {
            div.notice.unanswered {
                p { b { (waiting.steps) @if waiting.steps == 1 { " step waits" } @else { " steps wait" } " for an answer: which options are fitted?" } }
                ul { @for (sheet, labels) in &waiting.questions { li { a href=(links::sheet(&at.site.tag, &at.drive.tag, *sheet)) { (sheet.words()) } ": " (labels.join(", ")) } } }
            }
        }
    }
}
