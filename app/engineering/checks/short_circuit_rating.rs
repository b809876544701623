//! # short-circuit-rating
//!
//! Prospective short-circuit current at the drive against its marked rating.
//!
//! Stated by the design, or I = U/(√3·√(R_c² + (X_s + X_T + X_c)²)): source, transformer z·U²/S, cable of IEC 60228 at
//! 20 °C with 0.08 Ω/km reactance (assumed), source and transformer as pure reactance, which gives the larger current.
//! Source not stated: infinite; cable not stated: none; both the larger current. Line-fed motors add about 4 times their
//! full-load current. The rating holds only with the protective device that its maker names.

use crate::decision::Measured;
use crate::formulas::conductor::{Build, largest_per_kilometre, of_length};
use crate::formulas::fault_current::{Transformer, prospective};
use crate::formulas::marking::up_to;
use crate::formulas::plausible::{not_negative, positive};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{ApparentPower, CrossSection, Current, Length, Resistance};
use crate::rounding::significant;
use crate::sources::supply::{CB_09, SP_01, SP_02, SP_03};

/// Name in the catalogue.
pub const NAME: &str = "short-circuit-rating";

/// What running motors add, over their full-load current.
pub const MOTORS: Limit = Limit { name: "contribution of running motors", value: 4.0, unit: "1", source: SP_01 };
/// Usual reactance of one kilometre of cable, in ohms.
const REACTANCE: Resistance = Resistance::from_ohms(0.08);

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Marked short-circuit current rating of the drive or its panel.
    pub rating: Option<Current>,
    /// Prospective current at the drive as the design states it; replaces the calculation.
    pub stated_prospective: Option<Current>,
    /// The transformer that feeds it.
    pub transformer: Option<Transformer>,
    /// Fault level ahead of the transformer.
    pub source_level: Option<ApparentPower>,
    /// Length of the cable between.
    pub cable_length: Option<Length>,
    /// Section of one of its conductors.
    pub cable_section: Option<CrossSection>,
    /// Conductors in parallel.
    pub parallel: Option<u32>,
    /// Sum of the full-load currents of line-fed motors on the same transformer.
    pub motors_full_load: Option<Current>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(SP_03);
    b.note("The rating holds only with the protective device, its class and size, that the drive's maker names. Local codes go first.");
    let rating = positive(&mut b, inputs.rating, "short-circuit current rating of the drive");
    if let Some(rating) = rating {
        let shown = kiloamperes(rating.amperes());
        b.limit(format!("at most {shown} kA"));
        b.rule(LimitRule::linear("kA").at_most(rating.amperes() / 1000.0, format!("≤ {shown} kA")));
    }
    let Some(found) = current(&mut b, inputs) else { return b.not_assessed() };
    let shown = kiloamperes(found);
    b.figure("prospective short-circuit current", found / 1000.0, 4, "kA");
    let Some(rating) = rating else { return b.not_assessed() };
    let verdict =
        if up_to(found, rating.amperes()) { Verdict::Within } else { Measured::exact(found).at_most(rating.amperes()) };
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(found / 1000.0, 0.0, format!("{shown} kA"), verdict));
    }
    let limit = kiloamperes(rating.amperes());
    b.judged(
        verdict,
        if verdict == Verdict::Within {
            format!("Prospective current {shown} kA, rating {limit} kA.")
        } else {
            format!("Prospective current {shown} kA exceeds the rating of {limit} kA. Do not energise before current-limiting protection or a reactor that the drive's maker accepts is in place.")
        },
    )
}

fn kiloamperes(amperes: f64) -> String {
    significant(amperes / 1000.0, 4)
}

/// The prospective current in amperes, with its working.
fn current(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<f64> {
    if let Some(stated) = inputs.stated_prospective {
        let amperes = positive(b, Some(stated), "prospective current as stated")?.amperes();
        b.line("prospective current", "as the design states", String::new(), format!("{} kA", kiloamperes(amperes)));
        return Some(amperes);
    }
    b.cite(SP_01);
    let transformer = b.need(inputs.transformer, "transformer, or the prospective current")?;
    let rating = positive(b, Some(transformer.rating), "rated power of the transformer");
    let secondary = positive(b, Some(transformer.secondary), "secondary volts of the transformer");
    let impedance = positive(b, Some(transformer.impedance), "short-circuit impedance of the transformer");
    let (rating, secondary, impedance) = (rating?, secondary?, impedance?);
    let source = match inputs.source_level {
        Some(level) => {
            b.cite(SP_02);
            Some(positive(b, Some(level), "fault level ahead of the transformer")?)
        }
        None => None,
    };
    if source.is_none() {
        b.assume(None, (), "fault level ahead of the transformer", "infinite, which gives the larger current");
    }
    let (resistance, reactance) = cable(b, inputs)?;
    let fed = prospective(&transformer, source, resistance, reactance).amperes();
    b.line(
        "through the transformer",
        "U/(√3·√(R_c² + (X_s + z·U²/S + X_c)²))",
        format!(
            "S = {} kVA, U = {} V, z = {} %, R_c = {} Ω, X_c = {} Ω",
            significant(rating.volt_amperes() / 1000.0, 4),
            significant(secondary.volts(), 4),
            significant(impedance.fraction() * 100.0, 3),
            significant(resistance.ohms(), 3),
            significant(reactance.ohms(), 3)
        ),
        format!("{} kA", kiloamperes(fed)),
    );
    let motors = b.assume(
        inputs.motors_full_load,
        Current::from_amperes(0.0),
        "line-fed motors on the same transformer",
        "none; drives with a diode bridge do not feed back",
    );
    let motors = not_negative(b, Some(motors), "full-load current of line-fed motors")?.amperes();
    if motors > 0.0 {
        b.line(
            "from running motors",
            "4·I_FL",
            format!("4 × {} A", significant(motors, 4)),
            format!("{} kA", kiloamperes(MOTORS.value * motors)),
        );
    }
    Some(fed + MOTORS.value * motors)
}

/// Resistance and reactance of the cable; without a full description none, which gives the larger current.
fn cable(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<(Resistance, Resistance)> {
    let none = (Resistance::from_ohms(0.0), Resistance::from_ohms(0.0));
    let (Some(length), Some(section)) = (inputs.cable_length, inputs.cable_section) else {
        return Some(b.assume(None, none, "supply cable", "none, which gives the larger current"));
    };
    let length = not_negative(b, Some(length), "length of the supply cable")?;
    let section = positive(b, Some(section), "section of the supply cable")?;
    let Some(per_kilometre) = largest_per_kilometre(section, Build::Class2) else {
        return Some(b.assume(None, none, "supply cable", "none: its section is not on the list of IEC 60228"));
    };
    b.cite(CB_09);
    let parallel = b.assume(inputs.parallel, 1, "conductors in parallel", "one");
    let parallel = f64::from(b.need((parallel > 0).then_some(parallel), "conductors in parallel above zero")?);
    let reactance = b.assume(None, REACTANCE, "reactance of the supply cable", "0.08 Ω/km, as usual");
    let part = |of: Resistance| Resistance::from_ohms(of_length(of, length).ohms() / parallel);
    Some((part(per_kilometre), part(reactance)))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::{Ratio, Voltage};

    fn panel(kiloamperes: f64) -> Inputs {
        Inputs {
            rating: Some(Current::from_amperes(kiloamperes * 1000.0)),
            transformer: Some(Transformer {
                rating: ApparentPower::from_volt_amperes(1e6),
                secondary: Voltage::from_volts(480.0),
                impedance: Ratio::from_fraction(0.0575),
            }),
            ..Inputs::default()
        }
    }

    /// C-SP-001 with C-SP-005 and C-SP-006: 20.92 kA against 65 kA and against 5 kA (NFPA 70 110.10).
    #[test]
    fn published_transformer_and_ratings() {
        let good = check(&panel(65.0));
        assert_eq!((good.verdict, good.figures[0].value.as_str()), (Verdict::Within, "20.92"));
        assert_eq!(check(&panel(5.0)).verdict, Verdict::Outside);
        let stated = |ka: f64| Inputs { stated_prospective: Some(Current::from_amperes(ka * 1000.0)), ..panel(20.9) };
        assert_eq!(check(&stated(20.9)).verdict, Verdict::Within);
        assert_eq!(check(&stated(20.91)).verdict, Verdict::Outside);
    }

    /// C-SP-003 (row SP-02): with a source of 100 MVA 17.82 kA; 50 m of 95 mm² and 100 A of motors by hand.
    #[test]
    fn source_cable_and_motors_count() {
        let finite = Inputs { source_level: Some(ApparentPower::from_volt_amperes(100e6)), ..panel(18.0) };
        assert_eq!(check(&finite).figures[0].value, "17.82");
        let cable = Inputs {
            cable_length: Some(Length::from_metres(50.0)),
            cable_section: Some(CrossSection::from_square_millimetres(95.0)),
            motors_full_load: Some(Current::from_amperes(100.0)),
            ..panel(18.0)
        };
        // R = 0.193·0.05 = 9.65 mΩ, X = 13.248 + 4 = 17.248 mΩ, Z = 19.764 mΩ, I = 277.13 V/Z = 14.02 kA + 0.4 kA.
        assert_eq!(check(&cable).figures[0].value, "14.42");
    }

    #[test]
    fn the_limit_is_there_before_the_current() {
        let waiting = check(&Inputs { transformer: None, ..panel(65.0) });
        assert_eq!((waiting.limit.as_str(), waiting.rule.is_some()), ("at most 65.00 kA", true));
        assert_eq!(waiting.missing[0].what, "transformer, or the prospective current");
        assert_eq!(
            check(&Inputs { rating: None, ..panel(1.0) }).missing[0].what,
            "short-circuit current rating of the drive"
        );
        assert_eq!(check(&panel(f64::NAN)).verdict, Verdict::NotAssessed);
    }
}
