//! # efficiency-class
//!
//! Nominal efficiency of each class at the motor's power and poles, and the class that its printed efficiency reaches.
//! A figure. 50 Hz: IEC 60034-30-1 by interpolation, 0.12 to 1000 kW. 60 Hz: 10 CFR 431.25, levels of IE2 and IE3,
//! 1 to 200 hp; below 1.5 kW the IEC table is believed to differ. Efficiencies compare at a tenth of a percent.

use crate::formulas::efficiency_class::{Class, at_50_hertz, at_60_hertz};
use crate::formulas::plausible::{positive, proper_fraction};
use crate::outcome::{Outcome, OutcomeBuilder};
use crate::quantity::{Frequency, Power, Ratio};
use crate::rounding::{decimals, significant};
use crate::sources::nameplate::{MN_08, MN_09, MN_10};

/// Name in the catalogue.
pub const NAME: &str = "efficiency-class";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Rated shaft power.
    pub rated_power: Option<Power>,
    /// Number of poles.
    pub poles: Option<u32>,
    /// Rated frequency, 50 or 60 Hz.
    pub rated_frequency: Option<Frequency>,
    /// Efficiency as printed.
    pub efficiency: Option<Ratio>,
    /// Class as printed.
    pub printed_class: Option<Class>,
}

/// The list of a frequency: nominal efficiency of a class at a power and a number of poles.
type Nominal = fn(Class, Power, u32) -> Option<Ratio>;

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    let power = positive(&mut b, inputs.rated_power, "rated motor power");
    let poles = b.need(inputs.poles, "number of poles");
    let frequency = positive(&mut b, inputs.rated_frequency, "rated motor frequency");
    let (Some(power), Some(poles), Some(frequency)) = (power, poles, frequency) else { return b.not_assessed() };
    let (nominal, words): (Nominal, _) = match frequency.hertz() {
        f if (f - 50.0).abs() < 1e-6 => {
            b.cite(MN_08);
            (at_50_hertz, "IEC 60034-30-1, 50 Hz")
        }
        f if (f - 60.0).abs() < 1e-6 => {
            b.cite(MN_09);
            b.cite(MN_10);
            if power.watts() < 1500.0 {
                b.note("Below 1.5 kW the IEC table for 60 Hz is believed to differ from this one.");
            }
            (at_60_hertz, "10 CFR 431.25, 60 Hz")
        }
        _ => return b.not_judged("Not assessed: efficiency classes are published for 50 and 60 Hz."),
    };
    let listed: Vec<(Class, f64)> = Class::ALL
        .into_iter()
        .filter_map(|c| nominal(c, power, poles).map(|e| (c, (e.fraction() * 1000.0).round() / 10.0)))
        .collect();
    if listed.is_empty() {
        return b.not_judged("Not assessed: no class is published for this power and number of poles.");
    }
    let kilowatts = significant(power.watts() / 1000.0, 4);
    for (class, percent) in &listed {
        b.line(
            &format!("nominal efficiency {}", class.words()),
            words,
            format!("{kilowatts} kW, {poles} poles"),
            format!("{} %", decimals(*percent, 1)),
        );
        b.figure(&format!("nominal efficiency {}", class.words()), *percent, 3, "%");
    }
    let Some(printed) = inputs.efficiency else {
        b.note("No efficiency is printed to compare.");
        return b.as_figure(format!("Nominal efficiencies at {kilowatts} kW and {poles} poles are listed."));
    };
    let Some(printed) = proper_fraction(&mut b, Some(printed), "rated efficiency") else { return b.not_assessed() };
    let tenths = (printed.fraction() * 1000.0).round() / 10.0;
    let reached = listed.iter().rev().find(|(_, percent)| tenths >= *percent).map(|(class, _)| *class);
    let reached_words = reached.map_or("below the lowest class listed", Class::words);
    b.text_figure("class reached by the printed efficiency", reached_words);
    if let Some(class) = inputs.printed_class {
        match listed.iter().find(|(c, _)| *c == class) {
            Some((_, percent)) if tenths < *percent => b.note(format!(
                "The plate prints {}, whose nominal efficiency is {} %, more than the {} % printed. Read both again.",
                class.words(),
                decimals(*percent, 1),
                decimals(tenths, 1)
            )),
            Some(_) => {}
            None => b.note(format!("No figure for the printed class {} at this frequency.", class.words())),
        }
    }
    b.as_figure(format!("{} % at {kilowatts} kW and {poles} poles: {reached_words}.", decimals(tenths, 1)))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::outcome::Verdict;

    fn plate(kilowatts: f64, poles: u32, hertz: f64, percent: f64) -> Inputs {
        Inputs {
            rated_power: Some(Power::from_watts(kilowatts * 1000.0)),
            poles: Some(poles),
            rated_frequency: Some(Frequency::from_hertz(hertz)),
            efficiency: Some(Ratio::from_fraction(percent / 100.0)),
            printed_class: None,
        }
    }

    /// C-MN-021 to C-MN-025: IEC 60034-30-1:2014.
    #[test]
    fn published_classes() {
        for (kilowatts, poles, class, percent) in [
            (15.0, 4, "IE3", 92.1),
            (90.0, 2, "IE4", 95.8),
            (5.5, 6, "IE2", 86.0),
            (7.5, 4, "IE1", 86.0),
            (315.0, 4, "IE3", 96.0),
        ] {
            let reached =
                |percent| check(&plate(kilowatts, poles, 50.0, percent)).figures.last().expect("figure").value.clone();
            assert_eq!(reached(percent), class);
            assert_ne!(reached(percent - 0.1), class);
        }
    }

    /// C-MN-040: 10 CFR 431.25, 10 hp with 4 poles, 91.7 %.
    #[test]
    fn sixty_hertz_and_a_class_that_is_not_reached() {
        let outcome = check(&plate(7.457, 4, 60.0, 91.7));
        assert_eq!((outcome.verdict, outcome.figures.last().expect("figure").value.as_str()), (Verdict::Figure, "IE3"));
        let wrong = check(&Inputs { printed_class: Some(Class::Ie3), ..plate(15.0, 4, 50.0, 91.0) });
        assert!(wrong.notes.iter().any(|n| n.contains("more than the 91.0 % printed")));
    }

    #[test]
    fn what_is_missing_or_not_published() {
        assert_eq!(check(&Inputs { poles: None, ..plate(15.0, 4, 50.0, 92.0) }).missing[0].what, "number of poles");
        for odd in [
            plate(15.0, 3, 50.0, 92.0),
            plate(15.0, 4, 16.7, 92.0),
            plate(0.05, 4, 50.0, 50.0),
            plate(15.0, 4, 50.0, 120.0),
            plate(f64::NAN, 4, 50.0, 92.0),
        ] {
            assert_eq!(check(&odd).verdict, Verdict::NotAssessed);
        }
        assert_eq!(check(&Inputs { efficiency: None, ..plate(15.0, 4, 50.0, 0.0) }).verdict, Verdict::Figure);
    }
}
