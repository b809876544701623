//! # pe-continuity
//!
//! Resistance of a protective conductor from end to end against what its length, section and metal make.
//!
//! Up to ρ·l/A at its temperature + 0.05 Ω for clamps and joints (common practice) within; beyond twice that outside;
//! between marginal. IEC 60204-1 asks for the expected range and names no fixed figure. A limit of the design counts
//! besides: beyond it is outside. Temperature not stated: assumed 20 °C, which gives the smaller limit in a warm plant.
//! Compensate the test leads first.

use crate::decision::Measured;
use crate::formulas::conductor::{at_temperature, of_length, per_kilometre};
use crate::formulas::copper::Conductor;
use crate::formulas::marking::{graded, mark};
use crate::formulas::plausible::{finite, positive, reading_not_negative};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{CrossSection, Length, Resistance, Temperature};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::earthing::{CONTINUITY_ALLOWANCE, PE_01};
use crate::sources::supply::{CB_10, CB_11};

/// Name in the catalogue.
pub const NAME: &str = "pe-continuity";

/// For clamps and joints.
pub const ALLOWANCE: Limit = Limit { name: "clamps and joints", value: 0.05, unit: "Ω", source: CONTINUITY_ALLOWANCE };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Resistance from end to end, test leads compensated.
    pub reading: Option<Reading<Resistance>>,
    /// Length of the conductor.
    pub length: Option<Length>,
    /// Its section.
    pub section: Option<CrossSection>,
    /// Its metal.
    pub metal: Option<Conductor>,
    /// Its temperature.
    pub temperature: Option<Temperature>,
    /// Largest resistance by the design.
    pub design_maximum: Option<Resistance>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    for source in [PE_01, CONTINUITY_ALLOWANCE, CB_11, CB_10] {
        b.cite(source);
    }
    b.note("A site or project limit goes first. Test with 0.2 A or more; a parallel path can hide a broken conductor.");
    let length = positive(&mut b, inputs.length, "length of the protective conductor");
    let section = positive(&mut b, inputs.section, "section of the protective conductor");
    let (Some(length), Some(section)) = (length, section) else { return b.not_assessed() };
    let metal = b.assume(inputs.metal, Conductor::Copper, "metal of the protective conductor", "copper");
    let temperature =
        b.assume(inputs.temperature, Temperature::from_celsius(20.0), "temperature of the conductor", "20 °C");
    let Some(temperature) = finite(&mut b, Some(temperature), "temperature of the conductor") else {
        return b.not_assessed();
    };
    if !(-60.0..=200.0).contains(&temperature.celsius()) {
        return b.not_judged("Not assessed: no conductor in use has that temperature. Read it again.");
    }
    let expected = at_temperature(of_length(per_kilometre(section, metal), length), temperature).ohms();
    let expected = positive(&mut b, Some(Resistance::from_ohms(expected)), "expected resistance");
    let Some(expected) = expected.map(Resistance::ohms) else { return b.not_assessed() };
    let (mut limit, mut fault) = (expected + ALLOWANCE.value, 2.0 * (expected + ALLOWANCE.value));
    let made = significant(limit, 3);
    if let Some(design) = inputs.design_maximum {
        let Some(design) = positive(&mut b, Some(design), "largest resistance by the design") else {
            return b.not_assessed();
        };
        b.line(
            "limit of the design",
            "beyond it outside",
            String::new(),
            format!("{} Ω", significant(design.ohms(), 3)),
        );
        (limit, fault) = (limit.min(design.ohms()), fault.min(design.ohms()));
    }
    let (limit_shown, fault_shown) = (significant(limit, 3), significant(fault, 3));
    let resistivity = match metal {
        Conductor::Copper => "17.241",
        Conductor::Aluminium => "28.264",
    };
    b.line(
        "expected resistance",
        "ρ·l/A·(1 + 0.00393·(T − 20))",
        format!(
            "{resistivity} Ω·mm²/km × {} m/{} mm², T = {} °C",
            significant(length.metres(), 3),
            significant(section.square_millimetres(), 3),
            significant(temperature.celsius(), 3)
        ),
        format!("{} Ω", significant(expected, 3)),
    );
    b.line("limit", "R + 0.05 Ω", format!("{} Ω + 0.05 Ω", significant(expected, 3)), format!("{made} Ω"));
    b.figure("expected resistance", expected, 3, "Ω");
    b.limit(format!("at most {limit_shown} Ω; beyond {fault_shown} Ω outside"));
    b.rule(LimitRule::linear("Ω").at_most(limit, format!("≤ {limit_shown} Ω")).tick(fault, format!("{fault_shown} Ω")));
    let Some(reading) = reading_not_negative(&mut b, inputs.reading.as_ref(), "resistance of the protective conductor")
    else {
        return b.not_assessed();
    };
    let measured = Measured::direct(&reading);
    let verdict = graded(&measured, limit, fault);
    let shown = significant(measured.value, 3);
    mark(&mut b, &measured, format!("{shown} Ω"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("{shown} Ω, beyond {fault_shown} Ω; with joints this conductor makes {made} Ω. Do not energise; look for a loose, painted or broken joint."),
            Verdict::Marginal => format!("{shown} Ω against {limit_shown} Ω: higher than expected, or the instrument's word does not settle it. Clean and tighten the joints, compensate the leads, measure again."),
            _ => format!("{shown} Ω, at most {limit_shown} Ω."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn measured(ohms: f64) -> Inputs {
        let tester = Accuracy {
            percent_of_reading: 1.0,
            digits: 0.0,
            resolution: 0.001,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            reading: Some(Reading::with(Resistance::from_ohms(ohms), tester)),
            length: Some(Length::from_metres(30.0)),
            section: Some(CrossSection::from_square_millimetres(10.0)),
            metal: Some(Conductor::Copper),
            temperature: Some(Temperature::from_celsius(20.0)),
            design_maximum: None,
        }
    }

    /// 30 m of 10 mm² copper: ρ·l/A = 0.05172 Ω (IEC 60028), below the 0.0549 Ω of IEC 60228 (C-PE-005); limit 0.1017 Ω.
    #[test]
    fn at_just_inside_and_just_outside() {
        for (ohms, verdict) in [
            (0.0549, Verdict::Within),
            (0.1006, Verdict::Within),
            (0.1017, Verdict::Marginal),
            (0.1500, Verdict::Marginal),
            (0.2050, Verdict::Marginal),
            (0.2060, Verdict::Outside),
        ] {
            assert_eq!(check(&measured(ohms)).verdict, verdict, "{ohms}");
        }
        let bare = Inputs { reading: Some(Reading::bare(Resistance::from_ohms(0.01))), ..measured(0.0) };
        assert_eq!(check(&bare).verdict, Verdict::Marginal);
    }

    /// C-PE-005: 30 m of 10 mm² copper; the design's own figure goes first where it is smaller.
    #[test]
    fn the_designs_limit_counts_besides() {
        let design = |limit, ohms| {
            check(&Inputs { design_maximum: Some(Resistance::from_ohms(limit)), ..measured(ohms) }).verdict
        };
        assert_eq!((design(0.08, 0.078), design(0.08, 0.09)), (Verdict::Within, Verdict::Outside));
        assert_eq!((design(0.15, 0.12), design(0.15, 0.16)), (Verdict::Marginal, Verdict::Outside));
        assert_eq!((design(1.0, 0.15), design(1.0, 0.25)), (Verdict::Marginal, Verdict::Outside));
    }

    #[test]
    fn the_limit_is_there_before_the_reading_and_says_what_was_assumed() {
        let waiting = check(&Inputs { reading: None, metal: None, temperature: None, ..measured(0.0) });
        assert_eq!(waiting.limit, "at most 0.102 Ω; beyond 0.203 Ω outside");
        assert_eq!((waiting.assumed.len(), waiting.rule.is_some(), waiting.missing.len()), (2, true, 1));
        assert_eq!(
            check(&Inputs { section: Some(CrossSection::from_square_millimetres(0.0)), ..measured(0.05) }).verdict,
            Verdict::NotAssessed
        );
        assert_eq!(check(&measured(f64::NAN)).verdict, Verdict::NotAssessed);
        let aluminium = check(&Inputs { metal: Some(Conductor::Aluminium), ..measured(0.13) });
        assert_eq!(aluminium.verdict, Verdict::Within);
    }
}
