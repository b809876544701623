//! A verdict with all it rests on: shape, word, rule, working, limit, source, what was assumed and what is missing.

use super::words::named;
use commissioning::judge::Judged;
use drawing::{Style, limit_rule, limit_rule_words};
use engineering::Verdict;
use serde_json::{Value, json};

/// One verdict for the template.
pub(super) fn full(judged: &Judged) -> Value {
    let o = &judged.outcome;
    let name = heading(judged);
    let figures: Vec<String> =
        o.figures.iter().map(|f| format!("{}: {} {}", f.name, f.value, f.unit).trim_end().to_owned()).collect();
    let working: Vec<Value> = o
        .working
        .iter()
        .map(|l| json!({ "what": l.what, "formula": l.formula, "numbers": l.numbers, "result": l.result }))
        .collect();
    let sources: Vec<String> = o.sources.iter().map(|s| format!("{} ({})", s.text, s.status.words())).collect();
    json!({
        "name": name,
        "shape": o.verdict.shape(),
        "word": o.verdict.words(),
        "summary": o.summary,
        "limit": o.limit,
        "figures": figures,
        "rule": o.rule.as_ref().map(|r| limit_rule(r, Style::Print)),
        "alt": o.rule.as_ref().map(limit_rule_words),
        "working": working,
        "sources": sources,
        "assumed": o.assumed.iter().map(|a| format!("{}: {}", a.what, a.taken)).collect::<Vec<_>>(),
        "missing": o.missing.iter().map(|m| m.what.clone()).collect::<Vec<_>>(),
        "notes": o.notes,
        "safety": o.sources.iter().any(|s| s.safety),
    })
}

/// The check's name with what it was run for.
pub(super) fn heading(judged: &Judged) -> String {
    let name = named(&judged.outcome.check);
    if judged.of.is_empty() { name } else { format!("{name}, {}", judged.of) }
}

/// Gravest first.
pub(super) fn gravity(verdict: Verdict) -> u8 {
    match verdict {
        Verdict::Outside => 0,
        Verdict::Marginal => 1,
        Verdict::Within => 2,
        Verdict::NotAssessed => 3,
        Verdict::Figure => 4,
    }
}
