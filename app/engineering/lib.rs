//! The engineering: quantities, published limits, formulas, checks and motion; same numbers in, same numbers out.
//!
//! Nothing here knows a clock, a file, a screen or a database. Transcendental functions come from `libm`, so that
//! two platforms agree to the last digit. Every check takes optional inputs, names each one that is missing, marks
//! each one that was assumed, and returns an [`Outcome`] with its verdict, working and source.

pub mod checks;
pub mod day;
pub mod decision;
pub mod formulas;
pub mod limit;
pub mod limit_rule;
pub mod motion;
pub mod outcome;
pub mod overload;
pub mod plate;
pub mod printed;
pub mod quantity;
pub mod reading;
pub mod rounding;
pub mod source;
pub mod sources;
pub mod unit;

pub use limit::Limit;
pub use limit_rule::{Band, LimitRule, Marker, Scale, Tick};
pub use outcome::{Assumption, Figure, Line, Missing, Outcome, OutcomeBuilder, Verdict};
pub use quantity::*;
pub use reading::{Accuracy, Calibration, Reading};
pub use source::{Source, Status};
pub use unit::{Kind, Unit};

/// Version of the check catalogue; kept with every verdict. Raise it when any check could answer differently.
pub const CATALOGUE_VERSION: u32 = 2;
