//! One relation between figures of a plate: what they give, what is possible, and by how much they miss it.

/// What is related.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub enum Relates {
    /// η·cos φ as printed with P/(√3·U·I).
    Product,
    /// Efficiency that follows from the others, where it is not printed.
    ImpliedEfficiency,
    /// Power factor that follows from the others, where it is not printed.
    ImpliedPowerFactor,
    /// P/(√3·U·I), where neither is printed.
    Ratings,
    /// A power factor or an efficiency below one.
    PartOfOne,
    /// The printed power factor with those of induction motors.
    PowerFactor,
    /// Slip against the nearest synchronous speed.
    Slip,
    /// Poles that speed and frequency give, with those printed.
    Poles,
    /// Poles that speed and frequency give, with those that motors have.
    PoleCount,
    /// The share of all losses that the slip puts into the rotor.
    RotorShare,
    /// The printed efficiency with the class tables.
    ClassTable,
    /// Poles of two columns.
    PolesOfColumns,
    /// Speeds of two columns, each over its frequency.
    SpeedsOfColumns,
    /// Apparent powers of two columns, each over its shaft power.
    ApparentOfColumns,
    /// Shaft powers of two columns, each over its frequency.
    PowersOfColumns,
}

impl Relates {
    /// What the value is, in words.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::Product | Self::Ratings => "efficiency × power factor from the ratings",
            Self::ImpliedEfficiency => "implied efficiency",
            Self::ImpliedPowerFactor => "implied power factor",
            Self::PartOfOne => "power factor or efficiency",
            Self::PowerFactor => "power factor",
            Self::Slip => "slip",
            Self::Poles => "poles from speed and frequency, against those printed",
            Self::PoleCount => "poles from speed and frequency",
            Self::RotorShare => "share of the losses that the slip puts into the rotor",
            Self::ClassTable => "efficiency, against the class tables",
            Self::PolesOfColumns => "poles of one column over those of the other",
            Self::SpeedsOfColumns => "speed over frequency, one column over the other",
            Self::ApparentOfColumns => "apparent over shaft power, one column over the other",
            Self::PowersOfColumns => "power over frequency, one column over the other",
        }
    }

    /// As a formula.
    #[must_use]
    pub const fn formula(self) -> &'static str {
        match self {
            Self::Product | Self::Ratings => "η·cos φ = P/(√3·U·I)",
            Self::ImpliedEfficiency => "η = P/(√3·U·I·cos φ)",
            Self::ImpliedPowerFactor => "cos φ = P/(√3·U·I·η)",
            Self::PartOfOne => "0 < cos φ, η < 1",
            Self::PowerFactor => "cos φ",
            Self::Slip => "s = (n_s − n)/n_s",
            Self::Poles | Self::PoleCount => "2p = 2·⌊60·f/n⌋",
            Self::RotorShare => "s/(1 − s)·η/(1 − η)",
            Self::ClassTable => "η",
            Self::PolesOfColumns => "p₁/p₂",
            Self::SpeedsOfColumns => "(n₁/f₁)/(n₂/f₂)",
            Self::ApparentOfColumns => "(U₁·I₁/P₁)/(U₂·I₂/P₂)",
            Self::PowersOfColumns => "(P₁/f₁)/(P₂/f₂)",
        }
    }
}

/// A relation with its numbers, rounding included.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Relation {
    /// What is related.
    pub relates: Relates,
    /// Column from 0, and the other one where two are compared.
    pub columns: (usize, Option<usize>),
    /// Lowest value that the rounding of the figures leaves open, and the highest.
    pub open: (f64, f64),
    /// The value of the figures as they stand.
    pub value: f64,
    /// Lowest and highest possible value.
    pub possible: (f64, f64),
    /// What a plate usually has, and how far it usually strays; for the ranking alone.
    pub(crate) usual: (f64, f64),
    /// Breaking it is a contradiction; otherwise it is only unusual (common practice).
    pub firm: bool,
}

impl Relation {
    /// By how many half-widths of the possible range the value misses it; 0 when it does not.
    #[must_use]
    pub fn excess(&self) -> f64 {
        let miss = (self.open.0 - self.possible.1).max(self.possible.0 - self.open.1);
        if miss > 0.0 { miss / self.half_width() } else { 0.0 }
    }

    /// Half the possible range; one pole pair where only one value is possible.
    #[must_use]
    pub fn half_width(&self) -> f64 {
        let half = (self.possible.1 - self.possible.0) / 2.0;
        if half > 1e-9 { half } else { 1.0 }
    }

    /// Whether the figures miss what is possible.
    #[must_use]
    pub fn is_broken(&self) -> bool {
        self.excess() > 0.0
    }

    /// How unusual the value is, in squared strays over two, capped.
    pub(crate) fn strain(&self) -> f64 {
        let z = (self.value - self.usual.0) / self.usual.1;
        if z.is_finite() { (z * z / 2.0).min(6.0) } else { 6.0 }
    }
}
