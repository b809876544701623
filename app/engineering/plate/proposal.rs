//! A single misreading proposed: which figure, how it was misread, and what it would be.

use super::{Mark, Name, Plate};

/// How a figure may have been misread or mistyped.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub enum Mistake {
    /// Kilowatts for horsepower, or the other way.
    Unit,
    /// Volts or amperes of the other connection.
    OtherConnection,
    /// The frequency of the other column, 50 for 60 Hz or the other way.
    OtherFrequency,
    /// The speed that belongs to the other frequency.
    SpeedOfOtherFrequency,
    /// The speed of another number of poles.
    SpeedOfOtherPoles,
    /// Another number of poles.
    PoleNumber,
    /// Two neighbouring digits exchanged.
    DigitsExchanged,
    /// A digit left out.
    DigitLost,
    /// A digit written twice.
    DigitDoubled,
    /// The decimal point in another place.
    DecimalPoint,
    /// Power factor and efficiency exchanged.
    FactorsExchanged,
    /// A figure exchanged between two columns.
    ColumnsExchanged,
}

impl Mistake {
    /// Every kind.
    pub const ALL: [Self; 12] = [
        Self::Unit,
        Self::OtherConnection,
        Self::OtherFrequency,
        Self::SpeedOfOtherFrequency,
        Self::SpeedOfOtherPoles,
        Self::PoleNumber,
        Self::DigitsExchanged,
        Self::DigitLost,
        Self::DigitDoubled,
        Self::DecimalPoint,
        Self::FactorsExchanged,
        Self::ColumnsExchanged,
    ];

    /// In words.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Unit => "another unit of power",
            Self::OtherConnection => "a figure of the other connection",
            Self::OtherFrequency => "the other frequency",
            Self::SpeedOfOtherFrequency => "a speed of the other frequency",
            Self::SpeedOfOtherPoles => "a speed of another number of poles",
            Self::PoleNumber => "another number of poles",
            Self::DigitsExchanged => "two digits exchanged",
            Self::DigitLost => "a digit left out",
            Self::DigitDoubled => "a digit written twice",
            Self::DecimalPoint => "the decimal point",
            Self::FactorsExchanged => "power factor and efficiency exchanged",
            Self::ColumnsExchanged => "a figure of another column",
        }
    }

    /// How much it takes to believe in it; less is likelier (common practice, no source: row MN-25).
    pub(super) const fn cost(self) -> f64 {
        match self {
            Self::Unit | Self::OtherFrequency => 1.0,
            Self::OtherConnection | Self::DecimalPoint | Self::FactorsExchanged | Self::ColumnsExchanged => 1.5,
            Self::DigitsExchanged | Self::DigitDoubled => 2.0,
            Self::SpeedOfOtherPoles | Self::PoleNumber => 2.5,
            Self::DigitLost | Self::SpeedOfOtherFrequency => 3.0,
        }
    }
}

/// One misreading with the figures it would make.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Proposal {
    /// How it was misread.
    pub mistake: Mistake,
    /// Column from 0, name, what is read now, what it would be.
    pub change: (usize, Name, Mark, Mark),
    /// The other figure, where two were exchanged.
    pub with: Option<(usize, Name, Mark, Mark)>,
    /// Added to what its kind costs.
    pub(super) extra: f64,
}

impl Proposal {
    pub(super) fn new(mistake: Mistake, column: usize, name: Name, now: Mark, would_be: Mark) -> Self {
        Self { mistake, change: (column, name, now, would_be), with: None, extra: 0.0 }
    }

    /// The plate as it would read.
    #[must_use]
    pub fn applied(&self, plate: &Plate) -> Plate {
        let mut plate = *plate;
        for (column, name, _, would_be) in [Some(self.change), self.with].into_iter().flatten() {
            plate.put(column, name, would_be);
        }
        plate
    }

    /// Whether it changes the same figures to the same values.
    pub(super) fn comes_to_the_same(&self, other: &Self) -> bool {
        let same = |a: (usize, Name, Mark, Mark), b: (usize, Name, Mark, Mark)| {
            (a.0, a.1) == (b.0, b.1) && (a.3.value / b.3.value - 1.0).abs() < 0.005
        };
        same(self.change, other.change)
            && match (self.with, other.with) {
                (None, None) => true,
                (Some(a), Some(b)) => same(a, b),
                _ => false,
            }
    }

    /// What it would be, in one sentence.
    #[must_use]
    pub fn sentence(&self, several_columns: bool) -> String {
        let (column, name, now, would_be) = self.change;
        let place = if several_columns && name != Name::Poles {
            format!("Rating column {}, {}", column + 1, name.words())
        } else {
            capital(name.words())
        };
        let about = if would_be.digits.is_none() { "about " } else { "" };
        let because = match self.mistake {
            Mistake::Unit => "the unit",
            Mistake::OtherConnection if name == Name::Volts => "the volts of the other connection",
            Mistake::OtherConnection => "the amperes of the other connection",
            other => other.words(),
        };
        match (self.mistake, self.with) {
            (Mistake::FactorsExchanged, Some((.., other, into))) => format!(
                "{place} {} and efficiency {} exchanged would fit: power factor {}, efficiency {}.",
                now.shown(name),
                other.shown(Name::Efficiency),
                would_be.shown(name),
                into.shown(Name::Efficiency)
            ),
            (_, Some((other, ..))) => format!(
                "{place} read as {}; {} would fit, exchanged with column {}.",
                now.shown(name),
                would_be.shown(name),
                other + 1
            ),
            (Mistake::DigitLost, None) => {
                format!(
                    "{place} read as {}; {} or near it would fit: {because}.",
                    now.shown(name),
                    would_be.shown(name)
                )
            }
            (_, None) => {
                format!("{place} read as {}; {about}{} would fit: {because}.", now.shown(name), would_be.shown(name))
            }
        }
    }
}

fn capital(words: &str) -> String {
    let mut letters = words.chars();
    letters.next().map_or_else(String::new, |first| first.to_uppercase().chain(letters).collect())
}
