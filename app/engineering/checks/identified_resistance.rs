//! # identified-resistance
//!
//! The stator resistance that the drive identified, against the one measured between the motor's leads.
//!
//! Star equivalent of one phase R = R_LL/2, whatever the connection; brought to the temperature of identification by
//! R₂ = R₁·(k + T₂)/(k + T₁) (row MN-19); plus one conductor of the motor cable, which the drive sees too.
//! More than 20 % apart is marginal, never more (common practice, row WB-02).

use crate::decision::Measured;
use crate::formulas::copper::{Conductor, resistance_at};
use crate::formulas::{marking, plausible, triple};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Resistance, Temperature};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::sensors::MN_19;
use crate::sources::windings::IDENTIFIED;

/// Name in the catalogue.
pub const NAME: &str = "identified-resistance";

/// Beyond this the two do not agree.
pub const APART: Limit =
    Limit { name: "identified against measured resistance", value: 20.0, unit: "%", source: IDENTIFIED };

/// How the drive shows its resistance.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Shown {
    /// One phase of the star equivalent.
    StarPhase,
    /// Between two lines.
    LineToLine,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Resistance that the drive identified.
    pub identified: Option<Resistance>,
    /// How the drive shows it.
    pub shown: Option<Shown>,
    /// Measured between U and V.
    pub u_v: Option<Reading<Resistance>>,
    /// Measured between V and W.
    pub v_w: Option<Reading<Resistance>>,
    /// Measured between W and U.
    pub w_u: Option<Reading<Resistance>>,
    /// Winding temperature when measured.
    pub measured_at: Option<Reading<Temperature>>,
    /// Winding temperature when identified.
    pub identified_at: Option<Temperature>,
    /// Resistance of one conductor of the motor cable; zero when measured through the cable.
    pub cable_conductor: Option<Resistance>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(IDENTIFIED);
    b.cite(MN_19);
    b.limit("at most 20 % apart; beyond is marginal, never more (common practice)");
    b.rule(LimitRule::linear("%").between(-APART.value, "−20 %", APART.value, "+20 %"));
    let identified = plausible::positive(&mut b, inputs.identified, "stator resistance identified by the drive");
    let shown = b.assume(inputs.shown, Shown::StarPhase, "how the drive shows it", "one phase of the star equivalent");
    let named = [
        (&inputs.u_v, "winding resistance U-V"),
        (&inputs.v_w, "winding resistance V-W"),
        (&inputs.w_u, "winding resistance W-U"),
    ];
    let readings = named.map(|(r, what)| plausible::positive_reading(&mut b, r.as_ref(), what));
    let warm = "20 °C, as if nothing had warmed up";
    let read = inputs.measured_at.as_ref().map(|r| r.value);
    let from = b.assume(read, Temperature::from_celsius(20.0), "winding temperature when measured", warm);
    let to = b.assume(inputs.identified_at, from, "winding temperature when identified", "the same as when measured");
    let cable = b.assume(
        inputs.cable_conductor,
        Resistance::from_ohms(0.0),
        "resistance of one cable conductor",
        "0 Ω, so the drive may rightly read more",
    );
    let (Some(identified), [Some(u_v), Some(v_w), Some(w_u)]) = (identified, readings) else { return b.not_assessed() };
    let readings = [u_v, v_w, w_u];
    let plausible_temperature = |t: Temperature| (-50.0..=200.0).contains(&t.celsius());
    if !(plausible_temperature(from) && plausible_temperature(to) && cable.ohms().is_finite() && cable.ohms() >= 0.0) {
        return b.not_judged("Not assessed: a winding temperature or the cable's resistance is beyond what can be.");
    }
    let Some(spread) = triple::spread(&readings) else { return b.not_assessed() };

    let phase = spread.mean / 2.0;
    let warmed = resistance_at(Resistance::from_ohms(phase), from, to, Conductor::Copper).ohms();
    let expected = warmed + cable.ohms();
    let seen = if shown == Shown::StarPhase { identified.ohms() } else { identified.ohms() / 2.0 };
    let apart = (seen / expected - 1.0) * 100.0;
    let off = significant(apart, 2);
    b.line(
        "star equivalent",
        "R = R̄_LL/2",
        format!("{} Ω / 2", significant(spread.mean, 4)),
        format!("{} Ω", significant(phase, 4)),
    );
    b.line(
        "at the temperature of identification",
        "R₂ = R₁·(235 + T₂)/(235 + T₁)",
        format!(
            "{} Ω × (235 + {}) / (235 + {})",
            significant(phase, 4),
            significant(to.celsius(), 3),
            significant(from.celsius(), 3)
        ),
        format!("{} Ω", significant(warmed, 4)),
    );
    b.line(
        "with one cable conductor",
        "R = R₂ + R_cable",
        format!("{} Ω + {} Ω", significant(warmed, 4), significant(cable.ohms(), 3)),
        format!("{} Ω", significant(expected, 4)),
    );
    b.line(
        "apart",
        "R_drive/R − 1",
        format!("{} Ω / {} Ω − 1", significant(seen, 4), significant(expected, 4)),
        format!("{off} %"),
    );
    b.figure("expected star-phase resistance", expected, 4, "Ω");
    b.figure("identified star-phase resistance", seen, 4, "Ω");
    b.figure("apart", apart, 2, "%");
    // Relative doubt of the mean of three, carried to the percentage.
    let scale = (apart + 100.0) / (3.0 * spread.mean) * (warmed / expected);
    let mut terms = readings.map(|r| (r.standard_uncertainty().map(|u| u * scale.abs()), r.doubt())).to_vec();
    // One temperature taken for both moments moves nothing; two that were entered do, even where they read alike.
    if let Some(thermometer) = inputs.measured_at.as_ref().filter(|_| inputs.identified_at.is_some()) {
        let each_kelvin = (apart + 100.0) * (warmed / expected) / (Conductor::Copper.constant() + from.celsius());
        terms.push((thermometer.standard_uncertainty().map(|u| u * each_kelvin.abs()), thermometer.doubt()));
    }
    let measured = Measured::combined(apart, &terms);
    let verdict = marking::hint(measured.between(-APART.value, APART.value));
    marking::mark(&mut b, &measured, format!("{off} %"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Within => format!("Identified and measured resistance are {off} % apart."),
            _ if apart.abs() > APART.value => format!("Identified and measured resistance are {off} % apart. Check connection, cable length, the ohms shown as phase or line, and identify again on a cold motor."),
            _ => format!("Identified and measured resistance are {off} % apart; the instrument cannot tell it from 20 %, or its accuracy is in doubt."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    /// A thermometer that may be this many kelvins off.
    fn thermometer(celsius: f64, off: f64) -> Reading<Temperature> {
        let accuracy = Accuracy {
            percent_of_reading: 0.0,
            digits: 1.0,
            resolution: off,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Reading::with(Temperature::from_celsius(celsius), accuracy)
    }

    /// MN-19 by hand: 0.5 Ω at 20 °C is 0.5 × 275/255 Ω at 40 °C. 19 % apart is within 20 %; a kelvin is 119 %/255 of it,
    /// so a thermometer 4 K off, U = 2 × 4/√3 K, moves it by 2.2 % and cannot tell. Taken for both moments it moves nothing.
    #[test]
    fn the_thermometer_counts_where_two_temperatures_were_entered() {
        let with = |off: f64, identified_at: f64| {
            let seen = 1.19 * 0.5 * (235.0 + identified_at) / 255.0;
            let at = Some(Temperature::from_celsius(identified_at));
            Inputs { measured_at: Some(thermometer(20.0, off)), identified_at: at, ..of(seen, 1.0) }
        };
        assert_eq!(check(&with(0.1, 40.0)).verdict, Verdict::Within);
        assert_eq!(check(&with(4.0, 40.0)).verdict, Verdict::Marginal);
        assert_eq!(check(&Inputs { identified_at: None, ..with(4.0, 20.0) }).verdict, Verdict::Within);
        let bare = Some(Reading::bare(Temperature::from_celsius(20.0)));
        assert_eq!(check(&Inputs { measured_at: bare, ..with(0.1, 40.0) }).verdict, Verdict::Marginal);
    }

    fn of(identified: f64, line_to_line: f64) -> Inputs {
        let meter = Accuracy {
            percent_of_reading: 0.1,
            digits: 0.0,
            resolution: 0.0,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        let reading = Some(Reading::with(Resistance::from_ohms(line_to_line), meter));
        Inputs {
            identified: Some(Resistance::from_ohms(identified)),
            shown: Some(Shown::StarPhase),
            u_v: reading.clone(),
            v_w: reading.clone(),
            w_u: reading,
            measured_at: Some(thermometer(20.0, 0.0)),
            identified_at: Some(Temperature::from_celsius(20.0)),
            cable_conductor: Some(Resistance::from_ohms(0.0)),
        }
    }

    /// Common practice, no source (row WB-02): 1.0 Ω between lines is 0.5 Ω a phase.
    #[test]
    fn at_just_inside_and_just_outside_is_never_outside() {
        assert_eq!(check(&of(0.5, 1.0)).verdict, Verdict::Within);
        assert_eq!(check(&of(0.598, 1.0)).verdict, Verdict::Within);
        assert_eq!(check(&of(0.6, 1.0)).verdict, Verdict::Marginal);
        assert_eq!(check(&of(1.0, 1.0)).verdict, Verdict::Marginal);
        assert_eq!(check(&of(0.3, 1.0)).verdict, Verdict::Marginal);
    }

    /// C-MN-039 (IEC 60034-1 cl. 8.6.2): 0.5 Ω at 20 °C is 0.65 Ω at 96.5 °C.
    #[test]
    fn temperature_and_cable_are_carried() {
        let hot = Inputs { identified_at: Some(Temperature::from_celsius(96.5)), ..of(0.65, 1.0) };
        assert_eq!(check(&hot).figures[0].value, "0.6500");
        let cable = Inputs { cable_conductor: Some(Resistance::from_ohms(0.5)), ..of(1.0, 1.0) };
        assert_eq!(check(&cable).verdict, Verdict::Within);
        let line = Inputs { shown: Some(Shown::LineToLine), ..of(1.0, 1.0) };
        assert_eq!(check(&line).verdict, Verdict::Within);
    }

    #[test]
    fn missing_assumed_and_impossible() {
        let outcome = check(&Inputs { v_w: None, measured_at: None, ..of(0.5, 1.0) });
        assert_eq!(outcome.missing[0].what, "winding resistance V-W");
        assert!(outcome.assumed.len() == 1 && outcome.rule.is_some());
        assert_eq!(check(&of(0.0, 1.0)).verdict, Verdict::NotAssessed);
        let absurd = Inputs { measured_at: Some(thermometer(-235.0, 0.0)), ..of(0.5, 1.0) };
        assert_eq!(check(&absurd).verdict, Verdict::NotAssessed);
    }
}
