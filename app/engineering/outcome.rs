//! What a check says: verdict, working, figures, limit rule, sources, what was assumed and what is missing.

use crate::limit_rule::LimitRule;
use crate::rounding;
use crate::source::{Source, Status};

/// The verdict, in the words of the glossary.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(rename_all = "kebab-case"))]
pub enum Verdict {
    /// A figure without a verdict.
    Figure,
    /// Inside the limit by more than the instrument's doubt.
    Within,
    /// An input is missing.
    NotAssessed,
    /// Closer to the limit than the instrument can tell, or no instrument named.
    Marginal,
    /// Beyond the limit.
    Outside,
}

impl Verdict {
    /// In words.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Figure => "figure",
            Self::Within => "within",
            Self::NotAssessed => "not assessed",
            Self::Marginal => "marginal",
            Self::Outside => "outside",
        }
    }

    /// Its shape, so that nothing hangs on colour alone.
    #[must_use]
    pub const fn shape(self) -> &'static str {
        match self {
            Self::Figure => "–",
            Self::Within => "●",
            Self::NotAssessed => "○",
            Self::Marginal => "▲",
            Self::Outside => "■",
        }
    }

    /// The worse of two.
    #[must_use]
    pub fn worse(self, other: Self) -> Self {
        self.max(other)
    }
}

/// A named result with its unit, rounded as shown.
#[derive(Clone, Debug, PartialEq, Eq)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(deny_unknown_fields))]
pub struct Figure {
    /// What it is.
    pub name: String,
    /// Its number as a decimal, rounded.
    pub value: String,
    /// Its unit's symbol; empty for text.
    pub unit: String,
}

/// One line of working: what it is, the symbols, the numbers put in, the result.
#[derive(Clone, Debug, PartialEq, Eq)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(deny_unknown_fields))]
pub struct Line {
    /// What this line works out, in words.
    pub what: String,
    /// The formula in symbols: `R₄₀ = R·K`.
    pub formula: String,
    /// The same with numbers and units: `21.0 MΩ × 0.25`.
    pub numbers: String,
    /// The result with unit: `5.3 MΩ`.
    pub result: String,
}

/// An input that nobody entered, so that a usual value stands in, said openly.
#[derive(Clone, Debug, PartialEq, Eq)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(deny_unknown_fields))]
pub struct Assumption {
    /// Which input.
    pub what: String,
    /// The value taken, with unit, and why that one.
    pub taken: String,
}

/// An input without which there is no verdict.
#[derive(Clone, Debug, PartialEq, Eq)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(deny_unknown_fields))]
pub struct Missing {
    /// Which input, in the words of the screen: "winding temperature".
    pub what: String,
}

/// A source as kept with a verdict.
#[derive(Clone, Debug, PartialEq, Eq)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(deny_unknown_fields))]
pub struct CitedSource {
    /// Short identifier.
    pub id: String,
    /// Standard, clause, table.
    pub text: String,
    /// How far confirmed.
    pub status: Status,
    /// Safety may depend on it.
    pub safety: bool,
}

/// All that a check says. Its strings are final: screen and package print them as they stand.
#[derive(Clone, Debug, PartialEq)]
#[cfg_attr(feature = "serde", derive(serde::Serialize, serde::Deserialize), serde(deny_unknown_fields))]
pub struct Outcome {
    /// Name in the catalogue, for instance `insulation-resistance`.
    pub check: String,
    /// The verdict.
    pub verdict: Verdict,
    /// One or two plain sentences: result against limit, or what is missing, or what to do.
    pub summary: String,
    /// The limit in words, present before any reading is: "at least 20.0 MΩ at 20 °C".
    pub limit: String,
    /// The reading that this instrument needs to be within, when one can be said.
    pub needed: String,
    /// Named results.
    pub figures: Vec<Figure>,
    /// The ruler, when there is a limit to draw.
    pub rule: Option<LimitRule>,
    /// The working, line by line.
    pub working: Vec<Line>,
    /// Sources.
    pub sources: Vec<CitedSource>,
    /// What was assumed.
    pub assumed: Vec<Assumption>,
    /// What is missing.
    pub missing: Vec<Missing>,
    /// Why the verdict is marginal at best; yields to the maker; and the like. One sentence each.
    pub notes: Vec<String>,
}

/// Builds an [`Outcome`]; the only way to one, so that the guards hold for every check.
#[derive(Debug)]
pub struct OutcomeBuilder {
    outcome: Outcome,
}

impl OutcomeBuilder {
    /// For the check of this name; a figure until told otherwise.
    #[must_use]
    pub fn new(check: &str) -> Self {
        Self {
            outcome: Outcome {
                check: check.to_owned(),
                verdict: Verdict::Figure,
                summary: String::new(),
                limit: String::new(),
                needed: String::new(),
                figures: Vec::new(),
                rule: None,
                working: Vec::new(),
                sources: Vec::new(),
                assumed: Vec::new(),
                missing: Vec::new(),
                notes: Vec::new(),
            },
        }
    }

    /// Gives back `value`, or notes by name that it is missing.
    pub fn need<T>(&mut self, value: Option<T>, what: &str) -> Option<T> {
        if value.is_none() && !self.outcome.missing.iter().any(|m| m.what == what) {
            self.outcome.missing.push(Missing { what: what.to_owned() });
        }
        value
    }

    /// Gives back `value`, or takes `usual` in its place and says so: `taken` names the value and why.
    pub fn assume<T>(&mut self, value: Option<T>, usual: T, what: &str, taken: &str) -> T {
        value.unwrap_or_else(|| {
            if self.outcome.assumed.iter().any(|a| a.what == what) {
                return usual;
            }
            self.outcome.assumed.push(Assumption { what: what.to_owned(), taken: taken.to_owned() });
            usual
        })
    }

    /// Cites a source once.
    pub fn cite(&mut self, source: Source) {
        if !self.outcome.sources.iter().any(|s| s.id == source.id) {
            self.outcome.sources.push(CitedSource {
                id: source.id.to_owned(),
                text: source.text.to_owned(),
                status: source.status,
                safety: source.safety,
            });
        }
    }

    /// Adds a figure of this many significant digits.
    pub fn figure(&mut self, name: &str, value: f64, digits: u32, unit: &str) {
        let value = rounding::significant(value, digits);
        self.outcome.figures.push(Figure { name: name.to_owned(), value, unit: unit.to_owned() });
    }

    /// Adds a figure that is a word.
    pub fn text_figure(&mut self, name: &str, text: impl Into<String>) {
        self.outcome.figures.push(Figure { name: name.to_owned(), value: text.into(), unit: String::new() });
    }

    /// Adds a line of working.
    pub fn line(&mut self, what: &str, formula: &str, numbers: impl Into<String>, result: impl Into<String>) {
        self.outcome.working.push(Line {
            what: what.to_owned(),
            formula: formula.to_owned(),
            numbers: numbers.into(),
            result: result.into(),
        });
    }

    /// Adds a note of one sentence.
    pub fn note(&mut self, note: impl Into<String>) {
        self.outcome.notes.push(note.into());
    }

    /// States the limit in words; do this as soon as it is known, reading or not.
    pub fn limit(&mut self, limit: impl Into<String>) {
        self.outcome.limit = limit.into();
    }

    /// States the reading that this instrument needs to be within.
    pub fn needed(&mut self, needed: impl Into<String>) {
        self.outcome.needed = needed.into();
    }

    /// Sets the ruler; do this as soon as the limit is known, reading or not.
    pub fn rule(&mut self, rule: LimitRule) {
        self.outcome.rule = Some(rule);
    }

    /// The ruler so far, taken out to be added to.
    #[must_use]
    pub fn take_rule(&mut self) -> Option<LimitRule> {
        self.outcome.rule.take()
    }

    /// Ends without a verdict because inputs are missing; call after every [`Self::need`].
    #[must_use]
    pub fn not_assessed(mut self) -> Outcome {
        let names: Vec<&str> = self.outcome.missing.iter().map(|m| m.what.as_str()).collect();
        self.outcome.summary = if names.is_empty() {
            "Not assessed.".to_owned()
        } else {
            format!("Not assessed: {} missing.", names.join(", "))
        };
        self.end(Verdict::NotAssessed)
    }

    /// Ends without a verdict for another reason, in a sentence.
    #[must_use]
    pub fn not_judged(mut self, because: impl Into<String>) -> Outcome {
        self.outcome.summary = because.into();
        self.end(Verdict::NotAssessed)
    }

    /// Ends as a figure, which has no verdict.
    #[must_use]
    pub fn as_figure(mut self, summary: impl Into<String>) -> Outcome {
        self.outcome.summary = summary.into();
        self.end(Verdict::Figure)
    }

    /// Ends with a verdict and its sentence.
    #[must_use]
    pub fn judged(mut self, verdict: Verdict, summary: impl Into<String>) -> Outcome {
        self.outcome.summary = summary.into();
        self.end(verdict)
    }

    /// No outcome leaves with a number that is not one: the arithmetic left its range, and the outcome says so.
    fn end(mut self, verdict: Verdict) -> Outcome {
        let none = |text: &str| text.contains(rounding::NOT_A_NUMBER);
        let said = &self.outcome;
        let broken = said.figures.iter().any(|f| none(&f.value))
            || [&said.summary, &said.limit, &said.needed].into_iter().any(|text| none(text))
            || said.working.iter().any(|line| none(&line.what) || none(&line.numbers) || none(&line.result))
            || said.notes.iter().any(|note| none(note))
            || said.assumed.iter().any(|a| none(&a.taken))
            || said.missing.iter().any(|m| none(&m.what))
            || said.rule.as_ref().is_some_and(|r| !r.is_finite());
        if broken {
            self.outcome.figures.retain(|f| !none(&f.value));
            self.outcome.notes.retain(|note| !none(note));
            self.outcome.assumed.retain(|a| !none(&a.taken));
            self.outcome.missing.retain(|m| !none(&m.what));
            self.outcome.rule = None;
            self.outcome.working.clear();
            self.outcome.needed.clear();
            if none(&self.outcome.limit) {
                self.outcome.limit.clear();
            }
            self.outcome.summary =
                "Not assessed: with these inputs the arithmetic leaves its range. Check the nameplate and the reading."
                    .to_owned();
            self.outcome.verdict = Verdict::NotAssessed;
        } else {
            self.outcome.verdict = verdict;
        }
        self.outcome
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::rounding::significant;

    #[test]
    fn no_text_leaves_with_a_number_that_is_none() {
        let broken = significant(f64::NAN, 3);
        let fill: [fn(&mut OutcomeBuilder, &str); 8] = [
            |b, text| b.limit(text),
            |b, text| b.needed(text),
            |b, text| b.line("what", "a/b", text, "1"),
            |b, text| b.line("what", "a/b", "0/0", text),
            |b, text| b.line(text, "a/b", "0/0", "1"),
            |b, text| b.note(text),
            |b, text| b.assume(None, (), "what", text),
            |b, text| assert!(b.need(None::<()>, text).is_none()),
        ];
        for fill in fill {
            let mut b = OutcomeBuilder::new("x");
            fill(&mut b, &broken);
            let outcome = b.judged(Verdict::Within, "Fine.");
            assert_eq!(outcome.verdict, Verdict::NotAssessed);
            assert!(!format!("{outcome:?}").contains(&broken), "{outcome:?}");
        }
        assert_eq!(OutcomeBuilder::new("x").judged(Verdict::Within, broken).verdict, Verdict::NotAssessed);
    }
}
