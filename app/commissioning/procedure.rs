//! The commissioning procedure as data: phases, hold points, steps, what is entered at each and which checks it serves.

use engineering::Kind;
use serde::{Deserialize, Serialize};
use std::collections::BTreeSet;

pub mod built_in;
mod item_table;

/// Whether something with this `when` applies under these fitted options; `!x` asks that `x` is not fitted.
#[must_use]
pub fn applies(when: &[String], flags: &BTreeSet<String>) -> bool {
    when.iter().all(|w| w.strip_prefix('!').map_or_else(|| flags.contains(w), |not| !flags.contains(not)))
}

/// A version of a procedure. A record keeps the version it began with.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Procedure {
    /// Rises with every change of wording or order.
    pub version: u32,
    /// Name, as chosen by the firm.
    pub name: String,
    /// Phases in order.
    pub phases: Vec<Phase>,
}

/// A phase: steps in order, perhaps behind a hold point.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Phase {
    /// Stable identifier and address: `make-safe`.
    pub id: String,
    /// Full title: "Test insulation and windings".
    pub title: String,
    /// One word for the phase strip: "Insulation".
    pub short: String,
    /// What this phase is for, one or two sentences.
    pub purpose: String,
    /// Conditions and a release by name before this phase opens.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub hold: Option<HoldPoint>,
    /// Steps in order.
    #[serde(rename = "step", default)]
    pub steps: Vec<Step>,
}

/// A hold point: opens when its conditions are met and it is released by name.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct HoldPoint {
    /// What it guards: "before voltage is applied".
    pub title: String,
    /// What the person who releases it declares, in words, one sentence each; all are shown and confirmed at release.
    #[serde(default)]
    pub declare: Vec<String>,
    /// What the program can tell by itself.
    #[serde(default)]
    pub conditions: Vec<Condition>,
}

/// A condition that the program can tell from the record.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(tag = "condition", rename_all = "kebab-case", deny_unknown_fields)]
pub enum Condition {
    /// Every applicable step of the phase is settled.
    PhaseSettled {
        /// Which.
        phase: String,
    },
    /// The step is settled.
    StepSettled {
        /// Which.
        step: String,
    },
    /// "Isolated and proved dead" is in force.
    IsolationInForce,
    /// Isolation has been lifted.
    IsolationLifted,
    /// No open finding stops start-up.
    NoFindingStopsStartUp,
    /// None of these checks is outside or not assessed for want of a reading.
    ChecksJudged {
        /// Names in the catalogue.
        checks: Vec<String>,
    },
    /// None of these checks is outside, unless a finding about it was accepted by name; one that is not assessed
    /// for want of an input does not hold.
    NoneOutside {
        /// Names in the catalogue.
        checks: Vec<String>,
    },
}

/// A step: one thing to do.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Step {
    /// Stable identifier and address: `insulation-to-earth`.
    pub id: String,
    /// What it is.
    pub title: String,
    /// What to do: imperative, at most two short sentences.
    pub instruction: String,
    /// Cautions, apart from instructions.
    #[serde(default)]
    pub cautions: Vec<String>,
    /// Why and how, a few sentences.
    #[serde(default)]
    pub why: String,
    /// Fitted-options flags that must all be set for this step to apply; `!flag` must not be set.
    #[serde(default)]
    pub when: Vec<String>,
    /// Hands inside: isolation must be in force.
    #[serde(default)]
    pub needs_isolation: bool,
    /// Entering this step's confirmation items puts isolation in force (`enter`) or lifts it (`lift`).
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub isolation: Option<IsolationAct>,
    /// Leads or channels were exchanged here: directions observed before count as not observed.
    #[serde(default)]
    pub voids_directions: bool,
    /// A sheet to fill in for this step, by name: the step is settled when its required fields are.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub sheet: Option<String>,
    /// The parameter record belongs to this step: the functions of this group (`*` for all).
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub parameters: Option<String>,
    /// Labels of the rows, when the items are columns of a table: "25 %", "50 %".
    #[serde(default)]
    pub rows: Vec<String>,
    /// What is entered.
    #[serde(rename = "item", default)]
    pub items: Vec<Item>,
    /// Checks shown at this step.
    #[serde(default)]
    pub checks: Vec<String>,
    /// Raising the finding of an unfinished step: stops start-up rather than handover.
    #[serde(default)]
    pub stops_start_up: bool,
}

/// What a step does to isolation when it is recorded.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum IsolationAct {
    /// Isolated and proved dead from here on.
    Enter,
    /// Lifted from here on.
    Lift,
}

/// One thing to enter.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(try_from = "item_table::ItemTable", into = "item_table::ItemTable")]
pub struct Item {
    /// Unique in the whole procedure; checks find their readings by it: `ir-60s`.
    pub key: String,
    /// Label.
    pub label: String,
    /// A hint under the field.
    pub hint: String,
    /// What kind of entry.
    pub kind: ItemKind,
    /// May stay empty.
    pub optional: bool,
    /// May stay empty only while the step is left alone (`not-needed`); otherwise it is asked for like any other.
    pub left_alone_only: bool,
    /// Flags under which it applies, as for a step.
    pub when: Vec<String>,
}

/// The kinds of entry.
#[derive(Clone, Debug, PartialEq)]
pub enum ItemKind {
    /// A quantity with unit, perhaps with an instrument.
    Reading {
        /// Which quantity.
        quantity: Kind,
        /// Unit shown first, if not the kind's usual one.
        unit: Option<String>,
        /// Whether an instrument is named.
        instrument: bool,
        /// Lowest believable value in the coherent unit; below it the entry wants a reason.
        low: Option<f64>,
        /// Highest believable value in the coherent unit.
        high: Option<f64>,
    },
    /// A tick by name.
    Confirmation,
    /// One of several.
    Choice {
        /// What may be chosen.
        options: Vec<ChoiceOption>,
    },
    /// Words.
    Note,
    /// A picture.
    Photo,
}

/// One option of a choice.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct ChoiceOption {
    /// Stored.
    pub key: String,
    /// Shown.
    pub label: String,
}

impl Step {
    /// Whether the choice made says that nothing had to be done here (`not-needed`): such a step neither asks for
    /// isolation nor changes it, and voids no direction. `standing` gives the standing value of an item.
    #[must_use]
    pub fn left_alone<'a>(&self, standing: impl Fn(&str) -> Option<&'a str>) -> bool {
        self.items.iter().any(|i| matches!(i.kind, ItemKind::Choice { .. }) && standing(&i.key) == Some("not-needed"))
    }
}

impl Procedure {
    /// The step of this id with its phase.
    #[must_use]
    pub fn step(&self, id: &str) -> Option<(&Phase, &Step)> {
        self.steps().find(|(_, s)| s.id == id)
    }

    /// The phase of this id.
    #[must_use]
    pub fn phase(&self, id: &str) -> Option<&Phase> {
        self.phases.iter().find(|p| p.id == id)
    }

    /// Every step with its phase, in order.
    pub fn steps(&self) -> impl Iterator<Item = (&Phase, &Step)> {
        self.phases.iter().flat_map(|p| p.steps.iter().map(move |s| (p, s)))
    }

    /// The item of this key with its step.
    #[must_use]
    pub fn item(&self, key: &str) -> Option<(&Step, &Item)> {
        self.steps().find_map(|(_, s)| s.items.iter().find(|i| i.key == key).map(|i| (s, i)))
    }
}
