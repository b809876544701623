//! # full-load-current
//!
//! Full-load current by NFPA 70 table 430.250, for sizing conductors and short-circuit devices only. A figure: overload
//! and drive are set by the nameplate current. A power that meets a row to 2 % takes it, any other the next larger row.

use crate::formulas::full_load_table::{entry, has_column};
use crate::formulas::plausible::positive;
use crate::outcome::{Outcome, OutcomeBuilder};
use crate::quantity::{Current, Power, Voltage};
use crate::rounding::significant;
use crate::sources::nameplate::MN_12;

/// Name in the catalogue.
pub const NAME: &str = "full-load-current";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Rated shaft power.
    pub rated_power: Option<Power>,
    /// Rated line volts.
    pub rated_voltage: Option<Voltage>,
    /// Nameplate current, for comparison.
    pub rated_current: Option<Current>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(MN_12);
    b.note("For sizing conductors and short-circuit devices where NFPA 70 applies; overload and drive are set by the nameplate current.");
    let power = positive(&mut b, inputs.rated_power, "rated motor power");
    let voltage = positive(&mut b, inputs.rated_voltage, "rated motor voltage");
    let (Some(power), Some(voltage)) = (power, voltage) else { return b.not_assessed() };
    let volts = significant(voltage.volts(), 4);
    if !has_column(voltage) {
        return b.not_judged(format!("Not assessed: the table has no column for {volts} V."));
    }
    let Some(found) = entry(power, voltage) else {
        return b.not_judged(format!("Not assessed: the table has no entry for this power at {volts} V."));
    };
    let (horsepower, column) = (significant(found.horsepower, 3), significant(found.column.volts(), 3));
    let amperes = significant(found.current.amperes(), 3);
    b.line("table entry", "row and column", format!("{horsepower} hp, {column} V"), format!("{amperes} A"));
    b.figure("full-load current by table", found.current.amperes(), 3, "A");
    if let Some(plate) = inputs.rated_current {
        let Some(plate) = positive(&mut b, Some(plate), "rated motor current") else { return b.not_assessed() };
        b.figure("nameplate current over table", plate.amperes() / found.current.amperes() * 100.0, 3, "%");
    }
    b.as_figure(format!("{amperes} A by the row of {horsepower} hp at {column} V, for sizing only."))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::outcome::Verdict;

    fn motor(watts: f64, volts: f64) -> Inputs {
        Inputs {
            rated_power: Some(Power::from_watts(watts)),
            rated_voltage: Some(Voltage::from_volts(volts)),
            rated_current: None,
        }
    }

    /// C-MN-029 and C-MN-030: NFPA 70, table 430.250.
    #[test]
    fn published_entries() {
        for (horsepower, volts, shown) in [(10.0, 460.0, "14.0"), (50.0, 230.0, "130")] {
            let outcome = check(&motor(horsepower * 745.7, volts));
            assert_eq!((outcome.verdict, outcome.figures[0].value.as_str()), (Verdict::Figure, shown));
        }
    }

    #[test]
    fn what_the_table_does_not_have() {
        assert!(check(&motor(7500.0, 400.0)).summary.contains("no column for 400.0 V"));
        assert_eq!(check(&motor(900_000.0, 460.0)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&motor(0.0, 460.0)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&Inputs { rated_power: None, ..motor(1.0, 460.0) }).missing[0].what, "rated motor power");
    }
}
