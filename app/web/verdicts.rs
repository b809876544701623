//! The verdicts of a record as pages show them: those frozen at a signature, freshly worked out before.

use crate::components::{check_title, verdict_mark};
use commissioning::judge::{self, Counts, Judged, View};
use commissioning::procedure::Step;
use engineering::Verdict;
use maud::{Markup, html};

/// All of a drive.
#[must_use]
pub fn all(view: &View<'_>) -> Vec<Judged> {
    match frozen(view) {
        Some(frozen) => frozen.to_vec(),
        None => judge::all(view),
    }
}

/// Those shown at a step. A frozen list holds a check that says the same at several steps once, at the first.
#[must_use]
pub fn at_step(view: &View<'_>, step: &Step) -> Vec<Judged> {
    let Some(frozen) = frozen(view) else { return judge::step(view, &step.id) };
    let of_check = |check: &String| {
        let mut own = frozen.iter().filter(|j| j.outcome.check == *check && j.step == step.id).peekable();
        let shared = own.peek().is_none();
        let shared = frozen.iter().filter(move |j| shared && j.outcome.check == *check);
        own.chain(shared).cloned().collect::<Vec<_>>()
    };
    step.checks.iter().flat_map(of_check).collect()
}

fn frozen<'a>(view: &View<'a>) -> Option<&'a [Judged]> {
    view.drive.record.as_ref().and_then(|r| r.frozen.as_deref())
}

/// How many of each, gravest first.
#[must_use]
pub const fn numbers(counts: &Counts) -> [(Verdict, usize); 5] {
    [
        (Verdict::Outside, counts.outside),
        (Verdict::Marginal, counts.marginal),
        (Verdict::NotAssessed, counts.not_assessed),
        (Verdict::Within, counts.within),
        (Verdict::Figure, counts.figure),
    ]
}

/// The outside and marginal ones, gravest first.
#[must_use]
pub fn odd(judged: &[Judged]) -> Vec<&Judged> {
    let mut odd: Vec<&Judged> =
        judged.iter().filter(|j| matches!(j.outcome.verdict, Verdict::Outside | Verdict::Marginal)).collect();
    odd.sort_by_key(|j| std::cmp::Reverse(j.outcome.verdict));
    odd
}

/// The outside and marginal ones in words, each with a link to where it is shown.
#[must_use]
pub fn odd_in_words(judged: &[Judged], address: impl Fn(&Judged) -> String) -> Markup {
    html! {
        ul.odd {
            @for one in odd(judged) {
                li {
                    (verdict_mark(one.outcome.verdict))
                    div {
                        a href=(address(one)) { (check_title(&one.outcome.check)) @if !one.of.is_empty() { " · " (one.of) } }
                        p { (one.outcome.summary) }
                    }
                }
            }
        }
    }
}
