//! A verdict: shape and word, what it says, the limit rule, the working with its sources, what was assumed and what is missing.

use super::svg::drawn;
use commissioning::judge::Judged;
use engineering::Verdict;
use engineering::outcome::{Line, Outcome};
use maud::{Markup, html};

/// The class of a verdict in the stylesheet.
const fn class(verdict: Verdict) -> &'static str {
    match verdict {
        Verdict::Figure => "figure",
        Verdict::Within => "within",
        Verdict::NotAssessed => "not-assessed",
        Verdict::Marginal => "marginal",
        Verdict::Outside => "outside",
    }
}

/// Shape and word.
#[must_use]
pub fn verdict_mark(verdict: Verdict) -> Markup {
    html! { span class=(format!("mark {}", class(verdict))) { span aria-hidden="true" { (verdict.shape()) } " " (verdict.words()) } }
}

/// Counts of verdicts in a row, in shapes and words; those that are nought are left out.
#[must_use]
pub fn counts(counts: &[(Verdict, usize)]) -> Markup {
    html! {
        span.counts {
            @for (verdict, count) in counts.iter().filter(|(_, n)| *n > 0) {
                span class=(format!("mark {}", class(*verdict))) { span aria-hidden="true" { (verdict.shape()) } " " (count) " " (verdict.words()) @if *verdict == Verdict::Figure && *count > 1 { "s" } }
            }
        }
    }
}

/// A check as screens name it: its name in the catalogue, as words.
#[must_use]
pub fn check_title(name: &str) -> String {
    let title = commissioning::judge::catalogue::title(name);
    // A record frozen long ago may hold a check that the catalogue no longer has: its name as words then.
    if title == name { in_words(name) } else { title.to_owned() }
}

fn in_words(name: &str) -> String {
    let mut letters = name.chars();
    letters
        .next()
        .map_or_else(String::new, |c| c.to_uppercase().collect::<String>() + &letters.as_str().replace('-', " "))
}

/// One check. `open` shows the working unfolded.
#[must_use]
pub fn verdict_panel(title: &str, judged: &Judged, open: bool) -> Markup {
    let outcome = &judged.outcome;
    html! {
        section class=(format!("verdict {}", class(outcome.verdict))) {
            h3 { (verdict_mark(outcome.verdict)) span.title { (title) @if !judged.of.is_empty() { " · " (judged.of) } } }
            p.summary { (outcome.summary) }
            @if let Some(rule) = &outcome.rule { figure.rule { (drawn(drawing::limit_rule(rule, drawing::Style::Screen))) } }
            @if !outcome.limit.is_empty() { p.limit { span.quiet { "limit " } (outcome.limit) } }
            @if !outcome.needed.is_empty() { p.limit { (outcome.needed) } }
            @if !outcome.figures.is_empty() {
                dl.figures { @for f in &outcome.figures { div { dt { (f.name) } dd { (f.value) @if !f.unit.is_empty() { " " (f.unit) } } } } }
            }
            @for note in &outcome.notes { p.note { (note) } }
            (working(outcome, open))
        }
    }
}

fn working(outcome: &Outcome, open: bool) -> Markup {
    if outcome.working.is_empty()
        && outcome.sources.is_empty()
        && outcome.assumed.is_empty()
        && outcome.missing.is_empty()
    {
        return html! {};
    }
    html! {
        details.working open[open] {
            summary { "Working" @if !outcome.assumed.is_empty() { span.quiet { " · " (outcome.assumed.len()) " assumed" } } }
            @if !outcome.missing.is_empty() { p { span.quiet { "Missing: " } (outcome.missing.iter().map(|m| m.what.as_str()).collect::<Vec<_>>().join(", ")) } }
            @if !outcome.working.is_empty() { dl { @for l in &outcome.working { (line(l)) } } }
            @if !outcome.assumed.is_empty() { ul.assumed { @for a in &outcome.assumed { li { "assumed: " (a.what) ", " (a.taken) } } } }
            @if !outcome.sources.is_empty() {
                ul.sources { @for s in &outcome.sources { li { (s.text) " " span.status { "(" (s.status.words()) @if s.safety { ", safety may depend on it" } ")" } } } }
            }
        }
    }
}

fn line(line: &Line) -> Markup {
    html! {
        dt { (line.what) }
        dd {
            @if !line.formula.is_empty() { div.formula { (line.formula) } }
            div.formula { @if !line.numbers.is_empty() { (line.numbers) " = " } b { (line.result) } }
        }
    }
}

/// Several checks, the worst first, their working folded; those that wait for inputs stand folded at the end.
#[must_use]
pub fn verdict_panels(judged: &[Judged]) -> Markup {
    panels(judged, |_| false)
}

/// As a reviewer reads them: the working of whatever is not plainly within lies open, of all of them when `all` is asked for.
#[must_use]
pub fn verdict_panels_to_review(judged: &[Judged], all: bool) -> Markup {
    panels(judged, |verdict| all || verdict != Verdict::Within)
}

fn panels(judged: &[Judged], open: impl Fn(Verdict) -> bool) -> Markup {
    let mut said: Vec<&Judged> = judged.iter().filter(|j| j.outcome.verdict != Verdict::NotAssessed).collect();
    said.sort_by_key(|j| std::cmp::Reverse(j.outcome.verdict));
    let waiting: Vec<&Judged> = judged.iter().filter(|j| j.outcome.verdict == Verdict::NotAssessed).collect();
    html! {
        @for j in &said { (verdict_panel(&check_title(&j.outcome.check), j, open(j.outcome.verdict))) }
        @if !waiting.is_empty() {
            details.waiting open[said.is_empty()] {
                summary { (verdict_mark(Verdict::NotAssessed)) span.quiet { " " (waiting.len()) @if waiting.len() == 1 { " check waits" } @else { " checks wait" } " for inputs" } }
                ul { @for j in &waiting { li { b { (check_title(&j.outcome.check)) @if !j.of.is_empty() { " · " (j.of) } } br; (j.outcome.summary) } } }
            }
        }
    }
}
