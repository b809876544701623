//! # earth-voltages
//!
//! The three volts from phase to protective earth, measured at the supply, against the earthing system chosen.
//!
//! Star with earthed neutral: each U/√3. One corner earthed: one near nought, the two others U. U is the mean of the
//! three line volts measured, else the nominal. Within 10 % of that (common practice, no source); beyond 25 % the readings
//! contradict the choice and are outside. An insulated or high-resistance earthed system floats: nothing is judged, but
//! what the readings look like is said. Filters and varistors with an earth link suit some systems only; the drive's
//! manual decides.

use crate::decision::Measured;
use crate::formulas::marking::{graded, mark};
use crate::formulas::plausible::{not_negative, positive};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::Voltage;
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::earthing::{TO_EARTH, TO_EARTH_ALLOWANCE};

/// Name in the catalogue.
pub const NAME: &str = "earth-voltages";

/// Deviation from the geometry up to which the readings fit, over the volts expected.
pub const FITS: Limit =
    Limit { name: "volts to earth from the geometry", value: 0.10, unit: "1", source: TO_EARTH_ALLOWANCE };
/// Deviation beyond which they contradict it.
pub const CONTRADICTS: Limit =
    Limit { name: "volts to earth that contradict the geometry", value: 0.25, unit: "1", source: TO_EARTH_ALLOWANCE };

/// How the supply is earthed.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Earthing {
    /// Star point earthed directly: TN and TT.
    EarthedStar,
    /// One phase earthed.
    CornerEarthed,
    /// Not earthed: IT.
    Insulated,
    /// Star point earthed through a high resistance.
    HighResistance,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// L1, L2, L3 to protective earth.
    pub to_earth: [Option<Reading<Voltage>>; 3],
    /// Line to line, where measured.
    pub lines: [Option<Reading<Voltage>>; 3],
    /// Nominal line to line, where not all three were measured.
    pub nominal: Option<Voltage>,
    /// The earthing system chosen.
    pub earthing: Option<Earthing>,
}

/// Names of the three readings.
const PHASES: [&str; 3] = ["volts L1 to PE", "volts L2 to PE", "volts L3 to PE"];

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(TO_EARTH);
    b.cite(TO_EARTH_ALLOWANCE);
    let earthing = b.need(inputs.earthing, "earthing system of the supply");
    let line = line_volts(&mut b, inputs);
    if let (Some(earthing), Some(line)) = (earthing, &line) {
        state(&mut b, earthing, line.volts);
    }
    let mut readings = Vec::new();
    for (name, reading) in PHASES.into_iter().zip(&inputs.to_earth) {
        if not_negative(&mut b, reading.as_ref().map(|r| r.value), name).is_some() {
            readings.extend(reading.clone());
        }
    }
    let (Some(earthing), Some(line)) = (earthing, line) else { return b.not_assessed() };
    let u = line.volts;
    let [l1, l2, l3] = readings.as_slice() else { return b.not_assessed() };
    for (name, reading) in PHASES.into_iter().zip(&readings) {
        b.figure(name, reading.number(), 4, "V");
    }
    let shown = readings.iter().map(|r| significant(r.number(), 3)).collect::<Vec<_>>().join(", ");
    let looks = looks_like(&readings, u);
    match earthing {
        Earthing::Insulated | Earthing::HighResistance => {
            let words = match looks {
                Some(Earthing::CornerEarthed) => {
                    "One phase lies near earth: on such a system that is an earth fault to find, or one corner is earthed after all."
                }
                _ => "Such a system floats, and a meter loads it: steady equal readings prove nothing.",
            };
            b.as_figure(format!("{shown} V to earth. {words}"))
        }
        Earthing::EarthedStar => {
            let share = 1.0 / 3.0_f64.sqrt();
            let parts = [(l1, share), (l2, share), (l3, share)];
            judge(b, &parts, &line, &format!("{shown} V to earth"), "an earthed star point", looks)
        }
        Earthing::CornerEarthed => {
            let lowest = readings.iter().map(Reading::number).fold(f64::INFINITY, f64::min);
            let mut earthed = false;
            let mut parts = Vec::new();
            for reading in &readings {
                // Only one corner can be the earthed one.
                let this = !earthed && reading.number() <= lowest;
                earthed |= this;
                parts.push((reading, if this { 0.0 } else { 1.0 }));
            }
            judge(b, &parts, &line, &format!("{shown} V to earth"), "an earthed corner", looks)
        }
    }
}

/// The line volts, with the three readings behind them where they were measured.
struct Line<'a> {
    volts: f64,
    readings: &'a [Option<Reading<Voltage>>],
}

/// Line volts: the mean of what was measured, else nominal.
fn line_volts<'a>(b: &mut OutcomeBuilder, inputs: &'a Inputs) -> Option<Line<'a>> {
    if let [Some(x), Some(y), Some(z)] = &inputs.lines {
        let mean = (x.number() + y.number() + z.number()) / 3.0;
        if mean.is_finite() && mean > 0.0 {
            b.line("line volts", "mean of the three measured", String::new(), format!("{} V", significant(mean, 4)));
            return Some(Line { volts: mean, readings: &inputs.lines });
        }
    }
    let volts = positive(b, inputs.nominal, "line volts")?.volts();
    b.line("line volts", "nominal, the three were not measured", String::new(), format!("{} V", significant(volts, 4)));
    Some(Line { volts, readings: &[] })
}

/// The limit in words and on the ruler, reading or not.
fn state(b: &mut OutcomeBuilder, earthing: Earthing, u: f64) {
    let span = |at: f64| (at * (1.0 - FITS.value), at * (1.0 + FITS.value));
    let shown = |at: f64| significant(at, 3);
    match earthing {
        Earthing::EarthedStar => {
            let star = u / 3.0_f64.sqrt();
            let (low, high) = span(star);
            b.limit(format!("earthed star point: each {} to {} V", shown(low), shown(high)));
            b.rule(LimitRule::linear("V").between(
                low,
                format!("≥ {} V", shown(low)),
                high,
                format!("≤ {} V", shown(high)),
            ));
            b.line("each to earth", "U/√3", format!("{} V/√3", shown(u)), format!("{} V", shown(star)));
        }
        Earthing::CornerEarthed => {
            let (low, high) = span(u);
            let near = u * FITS.value;
            b.limit(format!("earthed corner: one at most {} V, two {} to {} V", shown(near), shown(low), shown(high)));
            b.rule(LimitRule::linear("V").between(0.0, "", near, format!("≤ {} V", shown(near))).between(
                low,
                format!("≥ {} V", shown(low)),
                high,
                format!("≤ {} V", shown(high)),
            ));
            b.line("to earth", "0, U, U", format!("U = {} V", shown(u)), format!("0, {0} and {0} V", shown(u)));
        }
        Earthing::Insulated => b.limit("none: the system is not earthed"),
        Earthing::HighResistance => b.limit("none: the star point floats behind its resistance"),
    }
}

/// The earthing that the readings speak for by themselves, if any.
fn looks_like(readings: &[Reading<Voltage>], u: f64) -> Option<Earthing> {
    let near =
        |reading: &Reading<Voltage>, at: f64, over: f64| (reading.number() - at).abs() <= CONTRADICTS.value * over;
    let star = u / 3.0_f64.sqrt();
    if readings.iter().all(|r| near(r, star, star)) {
        return Some(Earthing::EarthedStar);
    }
    let low = readings.iter().filter(|r| near(r, 0.0, u)).count();
    let full = readings.iter().filter(|r| near(r, u, u)).count();
    (low == 1 && full == 2).then_some(Earthing::CornerEarthed)
}

/// Every reading against the share of the line volts that the geometry gives it.
fn judge(
    mut b: OutcomeBuilder,
    parts: &[(&Reading<Voltage>, f64)],
    line: &Line<'_>,
    shown: &str,
    chosen: &str,
    looks: Option<Earthing>,
) -> Outcome {
    let mut verdict = Verdict::Within;
    for (reading, share) in parts {
        let expected = share * line.volts;
        let over = if *share > 0.0 { expected } else { line.volts };
        let mut terms = vec![(reading.standard_uncertainty().map(|u| u / over), reading.doubt())];
        // The line volts move what is expected; where nothing is expected they only scale.
        let lines = line.readings.iter().flatten();
        terms.extend(lines.map(|l| (l.standard_uncertainty().map(|u| u * share / 3.0 / over), l.doubt())));
        let off = Measured::combined((reading.number() - expected).abs() / over, &terms);
        let this = graded(&off, FITS.value, CONTRADICTS.value);
        verdict = verdict.worse(this);
        let on_ruler = Measured { value: reading.number(), expanded: off.expanded * over, doubt: off.doubt };
        mark(&mut b, &on_ruler, format!("{} V", significant(on_ruler.value, 3)), this);
    }
    let instead = match looks {
        Some(Earthing::CornerEarthed) => " They speak for an earthed corner.",
        Some(Earthing::EarthedStar) => " They speak for an earthed star point.",
        _ => " They speak for no earthed system: an insulated one, an earth fault or a slip of the probe.",
    };
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("{shown} contradicts {chosen}.{instead} Find out which it is before voltage is applied: filter and varistors with an earth link can fail on another system."),
            Verdict::Marginal => format!("{shown}: near to {chosen}, but further off than 10 %, or the instrument cannot tell."),
            _ => format!("{shown} fits {chosen}."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(to_earth: [f64; 3], earthing: Earthing) -> Inputs {
        let meter = Accuracy {
            percent_of_reading: 0.7,
            digits: 0.0,
            resolution: 0.1,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            to_earth: to_earth.map(|v| Some(Reading::with(Voltage::from_volts(v), meter))),
            lines: [400.0; 3].map(|v| Some(Reading::with(Voltage::from_volts(v), meter))),
            nominal: None,
            earthing: Some(earthing),
        }
    }

    /// Geometry: 400/√3 = 230.9 V to an earthed star point; 0, 400 and 400 V with a corner earthed.
    #[test]
    fn readings_fit_or_contradict_the_earthing_chosen() {
        use Earthing::{CornerEarthed, EarthedStar};
        let star = [231.0, 230.4, 231.8];
        let corner = [0.6, 399.0, 401.0];
        for (readings, earthing, verdict) in [
            (star, EarthedStar, Verdict::Within),
            (corner, CornerEarthed, Verdict::Within),
            (corner, EarthedStar, Verdict::Outside),
            (star, CornerEarthed, Verdict::Outside),
            ([399.0, 401.0, 0.6], CornerEarthed, Verdict::Within),
            ([0.6, 0.6, 400.0], CornerEarthed, Verdict::Outside),
            // Common practice, no source: 10 % of 230.9 V is 254.0 V, 25 % is 288.7 V.
            ([231.0, 231.0, 251.0], EarthedStar, Verdict::Within),
            ([231.0, 231.0, 262.0], EarthedStar, Verdict::Marginal),
            ([231.0, 231.0, 293.0], EarthedStar, Verdict::Outside),
            ([231.0, 231.0, 0.0], EarthedStar, Verdict::Outside),
        ] {
            let outcome = check(&of(readings, earthing));
            assert_eq!(outcome.verdict, verdict, "{readings:?} {earthing:?}: {}", outcome.summary);
        }
        let said = check(&of(corner, EarthedStar)).summary;
        assert!(said.contains("contradicts an earthed star point. They speak for an earthed corner."), "{said}");
    }

    #[test]
    fn an_insulated_system_is_not_judged_but_an_earth_fault_is_said() {
        for earthing in [Earthing::Insulated, Earthing::HighResistance] {
            let even = check(&of([231.0, 230.0, 232.0], earthing));
            assert!(even.verdict == Verdict::Figure && even.summary.contains("prove nothing"), "{}", even.summary);
            let fault = check(&of([2.0, 399.0, 401.0], earthing));
            assert!(fault.verdict == Verdict::Figure && fault.summary.contains("earth fault"), "{}", fault.summary);
        }
    }

    #[test]
    fn missing_inputs_are_named_and_the_limit_is_there_before_the_reading() {
        let star = of([231.0; 3], Earthing::EarthedStar);
        let silent = check(&Inputs { earthing: None, ..star.clone() });
        assert_eq!(
            (silent.verdict, silent.missing[0].what.as_str()),
            (Verdict::NotAssessed, "earthing system of the supply")
        );
        let before = check(&Inputs { to_earth: [None, None, None], ..star.clone() });
        assert_eq!(before.limit, "earthed star point: each 208 to 254 V");
        assert_eq!((before.missing[0].what.as_str(), before.rule.is_some()), ("volts L1 to PE", true));
        let nominal = Inputs { lines: [None, None, None], nominal: Some(Voltage::from_volts(400.0)), ..star.clone() };
        assert_eq!(check(&nominal).verdict, Verdict::Within);
        assert_eq!(check(&Inputs { lines: [None, None, None], ..star.clone() }).missing[0].what, "line volts");
        let bare = |volts: f64| [volts; 3].map(|v| Some(Reading::bare(Voltage::from_volts(v))));
        assert_eq!(check(&Inputs { to_earth: bare(231.0), ..star.clone() }).verdict, Verdict::Marginal);
        assert_eq!(
            check(&Inputs { lines: bare(400.0), ..star }).verdict,
            Verdict::Marginal,
            "the line volts count too"
        );
        assert_eq!(check(&of([f64::NAN, 231.0, 231.0], Earthing::EarthedStar)).verdict, Verdict::NotAssessed);
    }
}
