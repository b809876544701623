//! # switching-frequency
//!
//! The drive's switching frequency against what drive, output filter and motor ask for.
//!
//! No general limit exists, so without a maker's bound this is a figure. Upper bounds: the highest at which the drive
//! gives its full current, the highest of an output filter. Lower bounds: the lowest of the filter, of the motor.

use crate::decision::Measured;
use crate::formulas::{marking, plausible};
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::Frequency;
use crate::rounding::significant;
use crate::sources::settings::SWITCHING;

/// Name in the catalogue.
pub const NAME: &str = "switching-frequency";

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Switching frequency as set.
    pub setting: Option<Frequency>,
    /// Highest at which the drive gives its full output current.
    pub full_current_up_to: Option<Frequency>,
    /// Lowest that the output filter stands.
    pub filter_minimum: Option<Frequency>,
    /// Highest that the output filter stands.
    pub filter_maximum: Option<Frequency>,
    /// Lowest that the motor maker asks for.
    pub motor_minimum: Option<Frequency>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(SWITCHING);
    let kilohertz = |f: Option<Frequency>| f.map(|f| f.hertz() / 1e3).filter(|k| k.is_finite() && *k > 0.0);
    let lows =
        [("filter's least", kilohertz(inputs.filter_minimum)), ("motor's least", kilohertz(inputs.motor_minimum))];
    let highs = [
        ("drive's most at full current", kilohertz(inputs.full_current_up_to)),
        ("filter's most", kilohertz(inputs.filter_maximum)),
    ];
    let known = |named: [(&'static str, Option<f64>); 2]| {
        named.into_iter().filter_map(|(name, k)| Some((name, k?))).collect::<Vec<_>>()
    };
    let (lows, highs) = (known(lows), known(highs));
    let low = lows.iter().map(|(_, k)| *k).max_by(f64::total_cmp);
    let high = highs.iter().map(|(_, k)| *k).min_by(f64::total_cmp);
    let shown = |k: f64| significant(k, 2);
    match (low, high) {
        (Some(l), Some(h)) => {
            b.limit(format!("{} to {} kHz", shown(l), shown(h)));
            b.rule(LimitRule::linear("kHz").between(
                l,
                format!("≥ {} kHz", shown(l)),
                h,
                format!("≤ {} kHz", shown(h)),
            ));
        }
        (Some(l), None) => {
            b.limit(format!("at least {} kHz", shown(l)));
            b.rule(LimitRule::linear("kHz").at_least(l, format!("≥ {} kHz", shown(l))));
        }
        (None, Some(h)) => {
            b.limit(format!("at most {} kHz", shown(h)));
            b.rule(LimitRule::linear("kHz").at_most(h, format!("≤ {} kHz", shown(h))));
        }
        (None, None) => b.limit("a figure: no maker's bound entered"),
    }
    let Some(set) = plausible::positive(&mut b, inputs.setting, "switching frequency as set") else {
        return b.not_assessed();
    };
    let set = set.hertz() / 1e3;
    let text = shown(set);
    b.figure("switching frequency", set, 2, "kHz");
    let mut broken = Vec::new();
    for ((name, k), upper) in lows.iter().map(|x| (x, false)).chain(highs.iter().map(|x| (x, true))) {
        let holds = if upper { marking::up_to(set, *k) } else { marking::up_to(*k, set) };
        b.line(
            &format!("against the {name}"),
            if upper { "f_sw ≤ bound" } else { "f_sw ≥ bound" },
            format!("{text} kHz against {} kHz", shown(*k)),
            if holds { "holds" } else { "broken" },
        );
        if !holds {
            broken.push(*name);
        }
    }
    if lows.is_empty() && highs.is_empty() {
        return b.as_figure(format!("Switching frequency {text} kHz. Lower is kinder to drive, cable and bearings, higher is quieter; the drive may derate above its standard value."));
    }
    let verdict = if broken.is_empty() { Verdict::Within } else { Verdict::Outside };
    marking::mark(&mut b, &Measured::exact(set), format!("{text} kHz"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Within => format!("Switching frequency {text} kHz, within the bounds entered."),
            _ => format!(
                "Switching frequency {text} kHz breaks the {}. Change it, or derate as the drive's manual says.",
                broken.join(" and the ")
            ),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;

    fn of(kilohertz: f64) -> Inputs {
        let k = |v: f64| Some(Frequency::from_hertz(v * 1e3));
        Inputs { setting: k(kilohertz), full_current_up_to: k(4.0), filter_minimum: k(2.0), ..Inputs::default() }
    }

    /// Bounds are the makers' own.
    #[test]
    fn at_just_inside_and_just_outside() {
        for (set, verdict) in
            [(4.0, Verdict::Within), (2.0, Verdict::Within), (4.1, Verdict::Outside), (1.9, Verdict::Outside)]
        {
            assert_eq!(check(&of(set)).verdict, verdict, "{set}");
        }
    }

    #[test]
    fn a_figure_without_bounds_and_missing_named() {
        let plain = Inputs { setting: Some(Frequency::from_hertz(4e3)), ..Inputs::default() };
        assert_eq!(check(&plain).verdict, Verdict::Figure);
        let outcome = check(&Inputs { setting: None, ..of(1.0) });
        assert_eq!(
            (outcome.missing[0].what.as_str(), outcome.limit.as_str()),
            ("switching frequency as set", "2.0 to 4.0 kHz")
        );
        assert!(outcome.rule.is_some());
        assert_eq!(check(&of(-1.0)).verdict, Verdict::NotAssessed);
    }
}
