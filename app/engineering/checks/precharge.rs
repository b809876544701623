//! # precharge
//!
//! What the pre-charge resistor of a DC bus sees: time constant τ = R·C, 95 % after τ·ln 20 = 3.00·τ, first current V/R,
//! and the energy ½·C·V², whatever the resistance. Figures. Physics; a stiff supply is assumed. How many charges in a
//! row the resistor stands is the drive maker's to say.

use crate::formulas::capacitor::{charged_to_95_percent, energy, first_current, time_constant};
use crate::formulas::plausible::positive;
use crate::outcome::{Outcome, OutcomeBuilder};
use crate::quantity::{Capacitance, Resistance, Voltage};
use crate::rounding::significant;
use crate::sources::bus::DC_05;

/// Name in the catalogue.
pub const NAME: &str = "precharge";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Capacitance of the DC bus.
    pub capacitance: Option<Capacitance>,
    /// Pre-charge resistance.
    pub resistance: Option<Resistance>,
    /// Volts to which the bus is charged.
    pub bus_voltage: Option<Voltage>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(DC_05);
    b.note("The pause between charges that the drive's manual asks for goes first.");
    let capacitance = positive(&mut b, inputs.capacitance, "DC bus capacitance");
    let resistance = positive(&mut b, inputs.resistance, "pre-charge resistance");
    let voltage = positive(&mut b, inputs.bus_voltage, "DC bus volts");
    let (Some(c), Some(r), Some(v)) = (capacitance, resistance, voltage) else { return b.not_assessed() };
    let (microfarads, ohms, volts) =
        (significant(c.farads() * 1e6, 4), significant(r.ohms(), 4), significant(v.volts(), 4));
    let results = [
        ("time constant", "τ = R·C", format!("{ohms} Ω × {microfarads} µF"), time_constant(r, c).seconds(), "s"),
        ("95 % charged after", "τ·ln 20", "3.00·τ".to_owned(), charged_to_95_percent(r, c).seconds(), "s"),
        ("first current", "V/R", format!("{volts} V/{ohms} Ω"), first_current(r, v).amperes(), "A"),
        (
            "energy in the resistor",
            "½·C·V²",
            format!("½ × {microfarads} µF × ({volts} V)²"),
            energy(c, v).joules(),
            "J",
        ),
    ];
    for (name, formula, numbers, value, unit) in results {
        b.line(name, formula, numbers, format!("{} {unit}", significant(value, 4)));
        b.figure(name, value, 4, unit);
    }
    b.as_figure(format!(
        "95 % charged after {} s; each charge puts {} J into the resistor.",
        significant(charged_to_95_percent(r, c).seconds(), 3),
        significant(energy(c, v).joules(), 3)
    ))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::outcome::Verdict;

    fn bus(microfarads: f64, ohms: f64, volts: f64) -> Inputs {
        Inputs {
            capacitance: Some(Capacitance::from_farads(microfarads * 1e-6)),
            resistance: Some(Resistance::from_ohms(ohms)),
            bus_voltage: Some(Voltage::from_volts(volts)),
        }
    }

    /// C-DC-010 (row DC-05): 0.33 s, 0.9886 s, 5.65 A, 526.7 J.
    #[test]
    fn published_figures() {
        let outcome = check(&bus(3300.0, 100.0, 565.0));
        let values: Vec<_> = outcome.figures.iter().map(|f| f.value.as_str()).collect();
        assert_eq!((outcome.verdict, values), (Verdict::Figure, vec!["0.3300", "0.9886", "5.650", "526.7"]));
    }

    #[test]
    fn missing_and_impossible_inputs_are_named() {
        assert_eq!(check(&Inputs::default()).missing.len(), 3);
        assert_eq!(check(&bus(3300.0, 0.0, 565.0)).missing[0].what, "pre-charge resistance above zero");
        assert_eq!(check(&bus(f64::NAN, 100.0, 565.0)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&bus(1e300, 1e300, 1e300)).verdict, Verdict::NotAssessed);
    }
}
