//! # slip-at-no-load
//!
//! How far the uncoupled motor stays behind its synchronous speed, against its rated slip.
//!
//! Slip speed Δn = 60·f/p − n; rated Δn_N = 60·f_N/p − n_N (rows MN-01, VF-06: at constant flux the slip speed does not
//! depend on the frequency). Above 30 % of rated slip, or faster than synchronous, is marginal, never more (common
//! practice, row NL-09). Slip compensation in the drive raises the speed; without load it should do nothing.

use crate::decision::Measured;
use crate::formulas::synchronous::{pole_pairs, synchronous_speed};
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Frequency, Speed};
use crate::reading::Reading;
use crate::rounding::{decimals, significant};
use crate::sources::runs::{NO_LOAD_SLIP, VF_06};
use crate::sources::settings::MN_01;

/// Name in the catalogue.
pub const NAME: &str = "slip-at-no-load";

/// Most of the rated slip.
pub const SHARE: Limit =
    Limit { name: "slip without load over rated slip", value: 30.0, unit: "%", source: NO_LOAD_SLIP };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Shaft speed of the uncoupled run.
    pub speed: Option<Reading<Speed>>,
    /// Output frequency during the run.
    pub frequency: Option<Reading<Frequency>>,
    /// Whether the motor ran uncoupled.
    pub uncoupled: Option<bool>,
    /// Rated frequency.
    pub rated_frequency: Option<Frequency>,
    /// Rated speed.
    pub rated_speed: Option<Speed>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(MN_01);
    b.cite(VF_06);
    b.cite(NO_LOAD_SLIP);
    b.limit("0 to 30 % of rated slip; beyond is marginal, never more (common practice)");
    b.rule(LimitRule::linear("%").between(0.0, "synchronous", SHARE.value, "≤ 30 %"));
    let rated_frequency = plausible::positive(&mut b, inputs.rated_frequency, "rated frequency");
    let rated_speed = plausible::positive(&mut b, inputs.rated_speed, "rated speed");
    let frequency = plausible::positive_reading(&mut b, inputs.frequency.as_ref(), "output frequency of the run");
    let uncoupled = b.need(inputs.uncoupled, "whether the motor ran uncoupled");
    let speed = plausible::positive_reading(&mut b, inputs.speed.as_ref(), "shaft speed of the run");
    if uncoupled == Some(false) {
        return b.not_judged("Not assessed: the motor was coupled, so its slip is that of the load.");
    }
    let (Some(f_n), Some(n_n), Some(f), Some(_), Some(n)) = (rated_frequency, rated_speed, frequency, uncoupled, speed)
    else {
        return b.not_assessed();
    };
    let rated =
        pole_pairs(f_n, n_n).map(|p| (p, synchronous_speed(f_n, p).rpm() - n_n.rpm())).filter(|(_, slip)| *slip > 0.0);
    let Some((pairs, rated_slip)) = rated else {
        return b.not_judged("Not assessed: rated speed and rated frequency do not fit together. Check the nameplate.");
    };

    let synchronous = synchronous_speed(f.value, pairs).rpm();
    let slip = synchronous - n.number();
    let share = slip / rated_slip * 100.0;
    let shown = significant(share, 3);
    let (at, dn, dn_n) = (decimals(synchronous, 1), decimals(slip, 1), decimals(rated_slip, 1));
    b.line(
        "rated slip",
        "Δn_N = 60·f_N/p − n_N",
        format!("60 × {} Hz / {pairs} − {} rpm", significant(f_n.hertz(), 4), significant(n_n.rpm(), 4)),
        format!("{dn_n} rpm"),
    );
    b.line(
        "slip of the run",
        "Δn = 60·f/p − n",
        format!("{at} rpm − {} rpm", decimals(n.number(), 1)),
        format!("{dn} rpm"),
    );
    b.line("share", "Δn/Δn_N", format!("{dn} rpm / {dn_n} rpm"), format!("{shown} %"));
    b.figure("slip of the run", slip, 3, "rpm");
    b.figure("share of rated slip", share, 3, "%");
    let per_rpm = 100.0 / rated_slip;
    let measured = Measured::combined(
        share,
        &[
            (n.standard_uncertainty().map(|u| u * per_rpm), n.doubt()),
            (f.standard_uncertainty().map(|u| u * 60.0 / f64::from(pairs) * per_rpm), f.doubt()),
        ],
    );
    // A motor exactly at synchronous speed is as good as one just behind it: only a clear lead counts.
    let verdict = if measured.value + measured.expanded < -1e-6 {
        Verdict::Marginal
    } else {
        marking::hint(measured.at_most(SHARE.value))
    };
    marking::mark(&mut b, &measured, format!("{shown} %"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Within => format!("Without load the motor is {dn} rpm behind synchronous speed, {shown} % of its rated slip."),
            _ if slip < 0.0 => format!("The motor turns {} rpm faster than synchronous: slip compensation, a wrong rated speed, or something drives it.", decimals(-slip, 1)),
            _ if share > SHARE.value => format!("Without load the motor is {dn} rpm behind, {shown} % of its rated slip: friction, too few volts per hertz, or a rated speed keyed wrong."),
            _ => format!("Without load the motor is {dn} rpm behind, {shown} % of its rated slip: the instruments cannot tell it from 30 %, or their accuracy is in doubt."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(rpm: f64, hertz: f64) -> Inputs {
        let fine = |resolution: f64| Accuracy {
            percent_of_reading: 0.0,
            digits: 1.0,
            resolution,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            speed: Some(Reading::with(Speed::from_rpm(rpm), fine(0.1))),
            frequency: Some(Reading::with(Frequency::from_hertz(hertz), fine(0.001))),
            uncoupled: Some(true),
            rated_frequency: Some(Frequency::from_hertz(50.0)),
            rated_speed: Some(Speed::from_rpm(1470.0)),
        }
    }

    /// Common practice, no source (row NL-09): rated slip 30 rpm, so 9 rpm is the border, at any frequency.
    #[test]
    fn at_just_inside_and_just_outside_is_never_outside() {
        for (rpm, hertz, verdict) in [
            (1498.0, 50.0, Verdict::Within),
            (1491.5, 50.0, Verdict::Within),
            (1491.0, 50.0, Verdict::Marginal),
            (1480.0, 50.0, Verdict::Marginal),
            (748.0, 25.0, Verdict::Within),
            (740.0, 25.0, Verdict::Marginal),
            (1500.0, 50.0, Verdict::Within),
            (1505.0, 50.0, Verdict::Marginal),
        ] {
            assert_eq!(check(&of(rpm, hertz)).verdict, verdict, "{rpm} {hertz}");
        }
    }

    #[test]
    fn coupled_missing_and_impossible() {
        assert_eq!(check(&Inputs { uncoupled: Some(false), ..of(1498.0, 50.0) }).verdict, Verdict::NotAssessed);
        let outcome = check(&Inputs { speed: None, ..of(1498.0, 50.0) });
        assert_eq!(outcome.missing[0].what, "shaft speed of the run");
        assert!(outcome.rule.is_some() && !outcome.limit.is_empty());
        for rated in [0.0, 1500.0, 3200.0, f64::NAN] {
            assert_eq!(
                check(&Inputs { rated_speed: Some(Speed::from_rpm(rated)), ..of(1498.0, 50.0) }).verdict,
                Verdict::NotAssessed,
                "{rated}"
            );
        }
    }
}
