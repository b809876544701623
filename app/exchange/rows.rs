//! Reading a schedule's rows with a mapping: each row becomes a drive, is left out and said why, or is refused.
//!
//! A figure that can be read two ways is asked about, never guessed, unless its whole column shows its decimal sign.
//! What a value may be is decided by the field itself, so that import and form agree.

mod cell;
mod choices;
mod compare;
mod contradiction;
mod decimal;
mod figure;
mod kind;
mod read;
#[cfg(test)]
mod tests;

pub use compare::{Compared, FieldChange, Known, Standing, absent, compare};
pub use decimal::column_sign;
pub use read::{Answers, Site, read};

use crate::schedule::Target;
use crate::sheets::Address;
use commissioning::Typed;
use commissioning::plant::Place;

pub(crate) use cell::{Outcome as CellOutcome, understand};
pub(crate) use decimal::{Shown as FigureShown, plain as figure_plain, shown as figure_shown};
pub(crate) use figure::figures_in;
pub(crate) use kind::said_unknown;

/// A row with what became of it.
#[derive(Clone, Debug, PartialEq)]
pub struct Row {
    /// As the spreadsheet counts, from 1.
    pub number: u32,
    /// What became of it.
    pub outcome: Outcome,
}

/// What became of a row.
#[derive(Clone, Debug, PartialEq)]
pub enum Outcome {
    /// Nothing stands in it.
    Blank,
    /// It is no drive: a sum, a heading, the header again. The sentence says which.
    Left(String),
    /// It cannot be taken. The sentence says why and what to do.
    Refused(String),
    /// A drive.
    Drive(Box<DriveRow>),
}

/// A drive as a row gives it.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct DriveRow {
    /// Plant tag.
    pub tag: String,
    /// What it drives, in words; empty when no column gives it.
    pub name: String,
    /// Values that were understood, in the order of the columns.
    pub values: Vec<Value>,
    /// Cells that were not.
    pub problems: Vec<Problem>,
    /// Cells that can be read more than one way.
    pub questions: Vec<Question>,
    /// When the plate contradicts itself: the check's own sentence.
    pub contradiction: Option<String>,
}

impl DriveRow {
    /// Whether nothing is left to correct or to answer.
    #[must_use]
    pub fn is_ready(&self) -> bool {
        self.problems.is_empty() && self.questions.is_empty()
    }

    /// The value of a field.
    #[must_use]
    pub fn value(&self, place: &Place) -> Option<&Value> {
        self.values.iter().find(|v| v.place == *place)
    }
}

/// A value that was understood.
#[derive(Clone, Debug, PartialEq)]
pub struct Value {
    /// Which field.
    pub place: Place,
    /// Where it stands.
    pub at: Address,
    /// As it stands in the cell, unit and all.
    pub as_typed: String,
    /// As a form would send it: without unit, without grouping where that could be misread.
    pub text: String,
    /// Its unit; empty where there is none.
    pub unit: String,
    /// As the field understands it.
    pub typed: Typed,
}

/// A cell that was not understood.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Problem {
    /// Where it stands.
    pub at: Address,
    /// What it was to become.
    pub target: Target,
    /// A sentence that names the cell, the fault and the remedy.
    pub sentence: String,
}

/// A cell that can be read more than one way.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Question {
    /// Where it stands.
    pub at: Address,
    /// What it is to become.
    pub target: Target,
    /// As it stands.
    pub as_typed: String,
    /// Why it is asked, in a sentence.
    pub sentence: String,
    /// The readings to choose from.
    pub readings: Vec<Reading>,
}

/// One way of reading a cell.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Reading {
    /// As a form would send it.
    pub text: String,
    /// Its unit; empty where there is none.
    pub unit: String,
    /// Why the field would refuse this reading, when it would.
    pub impossible: Option<String>,
}
