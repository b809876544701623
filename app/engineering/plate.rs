//! A motor's nameplate as a whole: figures as printed, what relates them, and which single misreading would explain a contradiction.

pub mod digits;
pub mod misreading;
pub mod proposal;
mod ranking;
pub mod relation;
mod relations;
pub mod usual;

use crate::formulas::efficiency_class::Class;
use crate::unit::{Kind, Unit};
use digits::Digits;

/// A figure that every rating column may print, and the pole number, which stands once.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub enum Name {
    /// Line volts.
    Volts,
    /// Line amperes.
    Amps,
    /// Frequency.
    Hertz,
    /// Speed.
    Speed,
    /// Shaft power.
    Power,
    /// Power factor.
    PowerFactor,
    /// Efficiency.
    Efficiency,
    /// Number of poles.
    Poles,
}

impl Name {
    /// The figures of a rating column.
    pub const OF_A_COLUMN: [Self; 7] =
        [Self::Volts, Self::Amps, Self::Hertz, Self::Speed, Self::Power, Self::PowerFactor, Self::Efficiency];

    /// In words.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Volts => "voltage",
            Self::Amps => "current",
            Self::Hertz => "frequency",
            Self::Speed => "speed",
            Self::Power => "power",
            Self::PowerFactor => "power factor",
            Self::Efficiency => "efficiency",
            Self::Poles => "number of poles",
        }
    }

    /// Which units may stand beside it.
    #[must_use]
    pub const fn kind(self) -> Kind {
        match self {
            Self::Volts => Kind::Voltage,
            Self::Amps => Kind::Current,
            Self::Hertz => Kind::Frequency,
            Self::Speed => Kind::Speed,
            Self::Power => Kind::Power,
            Self::PowerFactor => Kind::Number,
            Self::Efficiency => Kind::Percent,
            Self::Poles => Kind::Count,
        }
    }
}

/// A figure as printed: its digits where they are plain, its unit, its number.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Mark {
    pub(crate) digits: Option<Digits>,
    pub(crate) unit: Unit,
    pub(crate) value: f64,
    pub(crate) half: f64,
}

impl Mark {
    /// A figure as typed; `None` when its text is no plain decimal above zero or the unit is none of its own.
    #[must_use]
    pub fn read(name: Name, text: &str, unit: &str) -> Option<Self> {
        let unit = *name.kind().unit(unit)?;
        Self::of(name, Digits::read(text)?, unit)
    }

    /// Ratings by name are exact as they stand; every other figure is open by half a step of its last digit.
    pub(crate) fn of(name: Name, digits: Digits, unit: Unit) -> Option<Self> {
        let value = digits.number() * unit.factor;
        let nominal = match name {
            Name::Volts | Name::Hertz | Name::Poles => true,
            Name::Power => usual::is_rating(digits.number(), unit),
            _ => false,
        };
        let half = if nominal { 0.0 } else { digits.half_step() * unit.factor };
        (value > 0.0).then_some(Self { digits: Some(digits), unit, value, half })
    }

    /// The same figure times a factor, its digits no longer known.
    pub(crate) fn times(self, factor: f64) -> Self {
        Self { digits: None, value: self.value * factor, half: self.half * factor, ..self }
    }

    pub(crate) fn low(self) -> f64 {
        self.value - self.half
    }

    pub(crate) fn high(self) -> f64 {
        self.value + self.half
    }

    /// The number in the unit it is printed in.
    #[must_use]
    pub fn number(&self) -> f64 {
        self.unit.from_coherent(self.value)
    }

    /// As printed, with its unit; three digits where the digits are not known.
    #[must_use]
    pub fn shown(&self, name: Name) -> String {
        let number = self.digits.map_or_else(
            || crate::rounding::significant(self.number(), if name == Name::Speed { 4 } else { 3 }),
            |d| d.text(),
        );
        if self.unit.symbol.is_empty() { number } else { format!("{number} {}", self.unit.symbol) }
    }
}

/// The figures of one rating column, in the order of [`Name::OF_A_COLUMN`].
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Column([Option<Mark>; 7]);

impl Column {
    /// With one more figure; the pole number stands on the [`Plate`] and is left out here.
    #[must_use]
    pub fn with(mut self, name: Name, mark: Option<Mark>) -> Self {
        self.put(name, mark);
        self
    }

    pub(crate) fn put(&mut self, name: Name, mark: Option<Mark>) {
        if let Some(place) = self.0.get_mut(name as usize) {
            *place = mark;
        }
    }

    /// A figure of the column.
    #[must_use]
    pub fn get(&self, name: Name) -> Option<Mark> {
        self.0.get(name as usize).copied().flatten()
    }
}

/// Rating columns that a plate may have.
pub const MOST_COLUMNS: usize = 4;

/// A whole plate.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Plate {
    /// Its rating columns, those without figures empty.
    pub columns: [Column; MOST_COLUMNS],
    /// Number of poles, where printed.
    pub poles: Option<Mark>,
    /// Efficiency class, where printed.
    pub class: Option<Class>,
}

impl Plate {
    /// A figure by column and name.
    #[must_use]
    pub fn get(&self, column: usize, name: Name) -> Option<Mark> {
        if name == Name::Poles { self.poles } else { self.columns.get(column)?.get(name) }
    }

    pub(crate) fn put(&mut self, column: usize, name: Name, mark: Mark) {
        if name == Name::Poles {
            self.poles = Some(mark);
        } else if let Some(column) = self.columns.get_mut(column) {
            column.put(name, Some(mark));
        }
    }

    /// Whether more than one column has figures.
    #[must_use]
    pub fn has_several(&self) -> bool {
        self.columns.iter().filter(|c| **c != Column::default()).count() > 1
    }
}
