//! # harmonic-distortion
//!
//! Harmonics of the input current against IEEE 519 at the point of common coupling; elsewhere a figure.
//!
//! Total demand distortion TDD = THD·I₁/I_L and each order I_h/I_L = (I_h/I₁)·I₁/I_L, I_L the maximum demand current,
//! limits by Isc/I_L (120 V to 69 kV). Even orders: edition not stated, assumed 2014, the stricter. At a drive's own
//! terminals IEEE 519 does not apply: THD is shown beside the 30.0 % of an ideal six-pulse bridge (orders to the 50th) and
//! judged by the specification where that names a limit.

use crate::decision::Measured;
use crate::formulas::distortion_limit::{Edition, of_order, short_circuit_ratio, total};
use crate::formulas::marking::mark;
use crate::formulas::plausible::{positive, positive_reading, reading_not_negative};
use crate::formulas::rectifier::ideal_distortion;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Current, Ratio};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::supply::{SP_06, SP_07, SP_08};

/// Name in the catalogue.
pub const NAME: &str = "harmonic-distortion";

/// One harmonic.
#[derive(Clone, Debug, PartialEq)]
pub struct Harmonic {
    /// Its order, 2 to 50.
    pub order: u32,
    /// Its current over the fundamental.
    pub part: Reading<Ratio>,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Total harmonic distortion of the current.
    pub distortion: Option<Reading<Ratio>>,
    /// Fundamental current at the same time.
    pub fundamental: Option<Reading<Current>>,
    /// Single orders, as far as measured.
    pub harmonics: Vec<Harmonic>,
    /// Whether this was measured at the point of common coupling.
    pub at_common_coupling: Option<bool>,
    /// Maximum demand current there.
    pub demand: Option<Current>,
    /// Short-circuit current there.
    pub short_circuit: Option<Current>,
    /// Edition of IEEE 519 in force.
    pub edition: Option<Edition>,
    /// Largest distortion at the drive's input by the specification.
    pub specified_maximum: Option<Ratio>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(SP_06);
    if inputs.at_common_coupling != Some(true) {
        return at_the_drive(b, inputs);
    }
    b.cite(SP_07);
    let demand = positive(&mut b, inputs.demand, "maximum demand current");
    let short_circuit = positive(&mut b, inputs.short_circuit, "short-circuit current at the point of common coupling");
    let ratio = demand
        .zip(short_circuit)
        .and_then(|(demand, isc)| positive(&mut b, Some(short_circuit_ratio(isc, demand)), "short-circuit ratio"));
    if let (Some(ratio), Some(demand), Some(isc)) = (ratio, demand, short_circuit) {
        let limit = total(ratio).fraction() * 100.0;
        let shown = significant(limit, 3);
        b.line(
            "short-circuit ratio",
            "Isc/I_L",
            format!("{} A/{} A", significant(isc.amperes(), 4), significant(demand.amperes(), 4)),
            significant(ratio.fraction(), 3),
        );
        b.limit(format!("total demand distortion at most {shown} %"));
        b.rule(LimitRule::linear("%").at_most(limit, format!("≤ {shown} %")));
    }
    let distortion =
        reading_not_negative(&mut b, inputs.distortion.as_ref(), "total harmonic distortion of the current");
    let fundamental = positive_reading(&mut b, inputs.fundamental.as_ref(), "fundamental input current");
    let (Some(ratio), Some(demand), Some(distortion), Some(fundamental)) = (ratio, demand, distortion, fundamental)
    else {
        return b.not_assessed();
    };

    let scale = fundamental.number() / demand.amperes();
    // Both readings move the product, each by its own share.
    let over_demand = |part: &Reading<Ratio>| {
        let percent = part.number() * scale * 100.0;
        Measured::combined(
            percent,
            &[
                (part.standard_uncertainty().map(|u| u * scale * 100.0), part.doubt()),
                (fundamental.standard_uncertainty().map(|u| u / fundamental.number() * percent), fundamental.doubt()),
            ],
        )
    };
    let measured = over_demand(&distortion);
    let limit = total(ratio).fraction() * 100.0;
    let mut verdict = measured.at_most(limit);
    let shown = significant(measured.value, 3);
    b.figure("total demand distortion", measured.value, 3, "%");
    b.line(
        "total demand distortion",
        "THD·I₁/I_L",
        format!(
            "{} % × {} A/{} A",
            significant(distortion.number() * 100.0, 3),
            significant(fundamental.number(), 4),
            significant(demand.amperes(), 4)
        ),
        format!("{shown} %"),
    );
    if let Some(doubt) = &measured.doubt {
        b.note(format!("Marginal at best: {doubt}."));
    }
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(measured.value, measured.expanded, format!("{shown} %"), verdict));
    }
    let mut beyond = Vec::new();
    if verdict != Verdict::Within {
        beyond.push(format!("total {shown} % against {} %", significant(limit, 3)));
    }
    let edition = if inputs.harmonics.iter().any(|h| h.order % 2 == 0) {
        b.cite(SP_08);
        b.assume(inputs.edition, Edition::Of2014, "edition of IEEE 519", "2014, stricter on even orders")
    } else {
        inputs.edition.unwrap_or(Edition::Of2014)
    };
    if inputs.harmonics.is_empty() {
        b.note("No single orders are entered, so only the total is judged.");
    }
    for harmonic in &inputs.harmonics {
        let name = format!("harmonic {}", harmonic.order);
        let allowed = b.need(of_order(ratio, harmonic.order, edition), &format!("{name} with an order from 2 to 50"));
        let part = reading_not_negative(&mut b, Some(&harmonic.part), &name);
        let (Some(allowed), Some(part)) = (allowed, part) else { return b.not_assessed() };
        let one = over_demand(&part);
        let allowed = allowed.fraction() * 100.0;
        let judged = one.at_most(allowed);
        let value = significant(one.value, 3);
        b.figure(&name, one.value, 3, "%");
        b.line(
            &name,
            "I_h/I_L",
            format!("{} % of I₁", significant(part.number() * 100.0, 3)),
            format!("{value} %, at most {} %", significant(allowed, 3)),
        );
        if judged != Verdict::Within {
            beyond.push(format!("{name} {value} % against {} %", significant(allowed, 3)));
        }
        verdict = verdict.worse(judged);
    }
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("Beyond or too near the limits: {}. Consider a line reactor, a filter, or another supply arrangement with whoever runs the network.", beyond.join("; ")),
            Verdict::Marginal => format!("The instrument cannot settle it, or its accuracy is in doubt: {}.", beyond.join("; ")),
            _ => format!("Total demand distortion {shown} %, at most {} %.", significant(limit, 3)),
        },
    )
}

/// Away from the point of common coupling: what was read, beside the ideal bridge.
fn at_the_drive(mut b: OutcomeBuilder, inputs: &Inputs) -> Outcome {
    b.note("IEEE 519 applies at the point of common coupling, not at one drive's terminals.");
    let specified = match inputs.specified_maximum {
        Some(specified) => {
            let Some(specified) = positive(&mut b, Some(specified), "distortion by the specification") else {
                return b.not_assessed();
            };
            Some(specified.fraction() * 100.0)
        }
        None => None,
    };
    if let Some(limit) = specified {
        let shown = significant(limit, 3);
        b.limit(format!("total harmonic distortion at most {shown} %, by the specification"));
        b.rule(LimitRule::linear("%").at_most(limit, format!("≤ {shown} %")));
    } else {
        b.limit("no limit at the drive's own terminals");
    }
    let Some(distortion) =
        reading_not_negative(&mut b, inputs.distortion.as_ref(), "total harmonic distortion of the current")
    else {
        return b.not_assessed();
    };
    let ideal = ideal_distortion(50).fraction() * 100.0;
    let shown = significant(distortion.number() * 100.0, 3);
    b.figure("total harmonic distortion", distortion.number() * 100.0, 3, "%");
    b.figure("ideal six-pulse bridge, orders to the 50th", ideal, 3, "%");
    b.line(
        "ideal six-pulse bridge",
        "√Σ(1/h²), h = 6k ± 1 up to 50",
        String::new(),
        format!("{} %", significant(ideal, 3)),
    );
    for harmonic in &inputs.harmonics {
        let name = format!("harmonic {}", harmonic.order);
        let Some(part) = reading_not_negative(&mut b, Some(&harmonic.part), &name) else { return b.not_assessed() };
        b.figure(&name, part.number() * 100.0, 3, "%");
    }
    let Some(limit) = specified else { return b.as_figure(format!("Input current distortion {shown} %.")) };
    let measured = Measured::scaled(&distortion, 100.0);
    let verdict = measured.at_most(limit);
    mark(&mut b, &measured, format!("{shown} %"), verdict);
    let limit = significant(limit, 3);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("Input current distortion {shown} %, above the {limit} % of the specification. Consider a line reactor or a filter, and measure at full load."),
            Verdict::Marginal => format!("Input current distortion {shown} %: the instrument cannot tell it from {limit} %, or its accuracy is in doubt."),
            _ => format!("Input current distortion {shown} %, at most the {limit} % of the specification."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn exact<Q: crate::quantity::Quantity>(value: Q) -> Reading<Q> {
        Reading::with(
            value,
            Accuracy {
                percent_of_reading: 0.1,
                digits: 0.0,
                resolution: 0.0,
                percent_of_full_scale: 0.0,
                full_scale: 0.0,
            },
        )
    }

    fn coupling(percent: f64, fundamental: f64, isc: f64) -> Inputs {
        Inputs {
            distortion: Some(exact(Ratio::from_fraction(percent / 100.0))),
            fundamental: Some(exact(Current::from_amperes(fundamental))),
            at_common_coupling: Some(true),
            demand: Some(Current::from_amperes(800.0)),
            short_circuit: Some(Current::from_amperes(isc)),
            ..Inputs::default()
        }
    }

    fn order(order: u32, percent: f64) -> Harmonic {
        Harmonic { order, part: exact(Ratio::from_fraction(percent / 100.0)) }
    }

    /// C-SP-009 and C-SP-010: IEEE 519 table 2, 8 % at Isc/I_L = 25 and 5 % at 15.
    #[test]
    fn at_just_inside_and_just_outside_the_published_limits() {
        for (percent, isc, verdict) in [
            (7.98, 20_000.0, Verdict::Within),
            (8.0, 20_000.0, Verdict::Marginal),
            (8.02, 20_000.0, Verdict::Outside),
            (4.98, 12_000.0, Verdict::Within),
            (5.02, 12_000.0, Verdict::Outside),
        ] {
            assert_eq!(check(&coupling(percent, 800.0, isc)).verdict, verdict, "{percent}");
        }
        // Half the demand current halves the demand distortion.
        assert_eq!(check(&coupling(15.0, 400.0, 20_000.0)).verdict, Verdict::Within);
    }

    #[test]
    fn single_orders_count_each_for_itself() {
        let with = |harmonic, edition| {
            check(&Inputs { harmonics: vec![harmonic], edition, ..coupling(5.0, 800.0, 20_000.0) }).verdict
        };
        assert_eq!((with(order(5, 6.9), None), with(order(5, 7.1), None)), (Verdict::Within, Verdict::Outside));
        assert_eq!(
            (with(order(8, 2.0), None), with(order(8, 2.0), Some(Edition::Of2022))),
            (Verdict::Outside, Verdict::Within)
        );
        assert_eq!(with(order(51, 0.1), None), Verdict::NotAssessed);
    }

    /// C-SP-008: 30.0 % for the ideal bridge to the 50th order.
    #[test]
    fn at_the_drive_it_is_a_figure() {
        let outcome = check(&Inputs { at_common_coupling: None, ..coupling(45.0, 20.0, 1.0) });
        assert_eq!((outcome.verdict, outcome.figures[1].value.as_str()), (Verdict::Figure, "30.0"));
        let specified = |percent: f64| {
            let maximum = Some(Ratio::from_fraction(percent / 100.0));
            check(&Inputs { at_common_coupling: None, specified_maximum: maximum, ..coupling(45.0, 20.0, 1.0) })
        };
        assert_eq!((specified(48.0).verdict, specified(40.0).verdict), (Verdict::Within, Verdict::Outside));
        assert_eq!(specified(40.0).limit, "total harmonic distortion at most 40.0 %, by the specification");
    }

    #[test]
    fn the_limit_is_there_before_the_reading() {
        let waiting = check(&Inputs { distortion: None, ..coupling(0.0, 800.0, 20_000.0) });
        assert_eq!((waiting.limit.as_str(), waiting.rule.is_some()), ("total demand distortion at most 8.00 %", true));
        assert_eq!(waiting.missing[0].what, "total harmonic distortion of the current");
        assert_eq!(check(&coupling(f64::NAN, 800.0, 20_000.0)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&coupling(5.0, 800.0, 0.0)).verdict, Verdict::NotAssessed);
    }
}
