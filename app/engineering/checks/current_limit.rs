//! # current-limit
//!
//! The drive's current limit against what the load needs and what drive, motor and coupling stand.
//!
//! At least the amperes of breakaway and of acceleration: I = √(I_m² + (I_N² − I_m²)·(T/T_N)²), the end of the bracket
//! of I_m that takes more (row NL-05). At most: the drive's overload current; the amperes at λ·T_N/1.3 (row VF-03, the
//! margin is common practice); the amperes at which the motor gives the torque that coupling or gearbox stand, each
//! with the end that takes less. Every bound is its own line; a bound that nobody states is missing by name.

use crate::decision::Measured;
use crate::formulas::load_current::current_between;
use crate::formulas::{magnetising, marking, plausible};
use crate::limit_rule::LimitRule;
use crate::motion::available_torque::BREAKDOWN_MARGIN;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Current, Power, Ratio, Speed, Torque};
use crate::rounding::significant;
use crate::sources::motion::{RATED_TORQUE, VF_03};
use crate::sources::runs::NL_05;

/// Name in the catalogue.
pub const NAME: &str = "current-limit";

/// What the check takes. All torques at the motor shaft.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Current limit as set, in amperes.
    pub setting: Option<Current>,
    /// Rated current.
    pub rated_current: Option<Current>,
    /// Rated power factor.
    pub power_factor: Option<Ratio>,
    /// Breakdown over rated torque, λ.
    pub breakdown: Option<Ratio>,
    /// Rated shaft power.
    pub rated_power: Option<Power>,
    /// Rated speed.
    pub rated_speed: Option<Speed>,
    /// Torque to break away.
    pub breakaway_torque: Option<Torque>,
    /// Largest torque while accelerating: load and inertia together.
    pub acceleration_torque: Option<Torque>,
    /// Overload current of the drive at the duty chosen.
    pub drive_overload_current: Option<Current>,
    /// Largest torque of the coupling.
    pub coupling_torque: Option<Torque>,
    /// Largest input torque of the gearbox.
    pub gearbox_torque: Option<Torque>,
}

/// One bound: its name, its amperes, and whether the setting must stay below it.
struct Bound {
    name: &'static str,
    amperes: f64,
    upper: bool,
}

impl Bound {
    fn holds(&self, setting: f64) -> bool {
        if self.upper { marking::up_to(setting, self.amperes) } else { marking::up_to(self.amperes, setting) }
    }
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(NL_05);
    b.cite(RATED_TORQUE);
    b.cite(VF_03);
    b.note("Makers of drive, coupling and gearbox have the last word on what these stand.");
    let bounds = bounds(&mut b, inputs);
    let low = bounds.iter().filter(|x| !x.upper).max_by(|x, y| x.amperes.total_cmp(&y.amperes));
    let high = bounds.iter().filter(|x| x.upper).min_by(|x, y| x.amperes.total_cmp(&y.amperes));
    let shown = |bound: &Bound| significant(bound.amperes, 3);
    let rule = LimitRule::linear("A");
    match (low, high) {
        (Some(low), Some(high)) => {
            b.limit(format!("from {} A ({}) to {} A ({})", shown(low), low.name, shown(high), high.name));
            b.rule(if low.amperes > high.amperes {
                // No setting meets both, so there is no span to draw.
                rule.tick(low.amperes, format!("≥ {} A", shown(low))).tick(high.amperes, format!("≤ {} A", shown(high)))
            } else {
                rule.between(low.amperes, format!("≥ {} A", shown(low)), high.amperes, format!("≤ {} A", shown(high)))
            });
        }
        (Some(low), None) => {
            b.limit(format!("at least {} A ({})", shown(low), low.name));
            b.rule(rule.at_least(low.amperes, format!("≥ {} A", shown(low))));
        }
        (None, Some(high)) => {
            b.limit(format!("at most {} A ({})", shown(high), high.name));
            b.rule(rule.at_most(high.amperes, format!("≤ {} A", shown(high))));
        }
        (None, None) => {}
    }
    let Some(setting) = plausible::positive(&mut b, inputs.setting, "current limit as set") else {
        return b.not_assessed();
    };

    let amperes = setting.amperes();
    let set = significant(amperes, 3);
    b.figure("current limit", amperes, 3, "A");
    if let Some(rated) = inputs.rated_current.filter(|r| r.amperes() > 0.0) {
        b.figure("current limit over rated motor current", amperes / rated.amperes() * 100.0, 3, "%");
    }
    for bound in &bounds {
        let sign = if bound.upper { "I_lim ≤ bound" } else { "I_lim ≥ bound" };
        let holds = if bound.holds(amperes) { "holds" } else { "broken" };
        b.line(&format!("against {}", bound.name), sign, format!("{set} A against {} A", shown(bound)), holds);
    }
    let below: Vec<&str> = bounds.iter().filter(|x| !x.upper && !x.holds(amperes)).map(|x| x.name).collect();
    let above: Vec<&str> = bounds.iter().filter(|x| x.upper && !x.holds(amperes)).map(|x| x.name).collect();
    let complete = bounds.len() >= 5;
    let verdict = if !below.is_empty() || !above.is_empty() { Verdict::Outside } else { Verdict::Within };
    if verdict == Verdict::Within && !complete {
        b.note(format!("{set} A breaks none of the bounds that are known."));
        return b.not_assessed();
    }
    let crossed = low.zip(high).is_some_and(|(low, high)| low.amperes > high.amperes);
    marking::mark(&mut b, &Measured::exact(amperes), format!("{set} A"), verdict);
    let mut said = Vec::new();
    if !below.is_empty() {
        said.push(format!("too low for {}", below.join(" and ")));
    }
    if !above.is_empty() {
        said.push(format!("above {}", above.join(" and ")));
    }
    b.judged(
        verdict,
        match verdict {
            Verdict::Within => {
                format!("Current limit {set} A: enough to start, and within what drive, motor and coupling stand.")
            }
            _ if crossed => format!(
                "Current limit {set} A: {}. No setting meets every bound: ask for a longer ramp or a larger drive.",
                said.join(", ")
            ),
            _ => format!("Current limit {set} A: {}. Set it between the bounds.", said.join(", ")),
        },
    )
}

/// Every bound that can be worked out; the others are named as missing.
fn bounds(b: &mut OutcomeBuilder, inputs: &Inputs) -> Vec<Bound> {
    let mut bounds = Vec::new();
    let bracket = magnetising::work_out(b, inputs.rated_current, inputs.power_factor, inputs.breakdown);
    let rated_torque = plausible::rated_torque(b, inputs.rated_power, inputs.rated_speed).map(Torque::newton_metres);
    if let (Some(p), Some(n), Some(t)) = (inputs.rated_power, inputs.rated_speed, rated_torque) {
        b.line(
            "rated torque",
            "T_N = P/(2π·n/60)",
            format!("{} W at {} rpm", significant(p.watts(), 4), significant(n.rpm(), 4)),
            format!("{} N·m", significant(t, 4)),
        );
    }
    let breakaway = plausible::not_negative(b, inputs.breakaway_torque, "breakaway torque");
    let acceleration = plausible::not_negative(b, inputs.acceleration_torque, "acceleration torque");
    if let Some(drive) = plausible::positive(b, inputs.drive_overload_current, "overload current of the drive") {
        bounds.push(Bound { name: "the drive's overload current", amperes: drive.amperes(), upper: true });
    }
    let stands = coupling(b, inputs);
    let (Some(bracket), Some(rated_torque), Some(rated)) = (bracket, rated_torque, inputs.rated_current) else {
        return bounds;
    };
    let lambda = inputs.breakdown.map_or(magnetising::USUAL_BREAKDOWN.value, Ratio::fraction);
    let kept = Torque::from_newton_metres(lambda / BREAKDOWN_MARGIN * rated_torque);
    let wanted = [
        ("breakaway", breakaway, false),
        ("acceleration", acceleration, false),
        ("breakdown torque with its margin, λ·T_N/1.3", Some(kept), true),
        ("what coupling or gearbox stand", stands, true),
    ];
    for (name, torque, upper) in wanted {
        let Some(torque) = torque else { continue };
        let x = torque.newton_metres() / rated_torque;
        let unity = Ratio::from_fraction(1.0);
        let Some((least, most)) = current_between(rated, bracket, Ratio::from_fraction(x), unity) else { continue };
        let amperes = if upper { least.amperes() } else { most.amperes() };
        b.line(
            &format!("amperes of {name}, the cautious end of I_m"),
            "I = √(I_m² + (I_N² − I_m²)·(T/T_N)²)",
            format!("T = {} N·m, T/T_N = {}", significant(torque.newton_metres(), 4), significant(x, 3)),
            format!("{} A", significant(amperes, 3)),
        );
        bounds.push(Bound { name, amperes, upper });
    }
    bounds
}

/// The smaller of what coupling and gearbox stand; missing when neither is known.
fn coupling(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<Torque> {
    let stated = [inputs.coupling_torque, inputs.gearbox_torque]
        .into_iter()
        .flatten()
        .min_by(|x, y| x.newton_metres().total_cmp(&y.newton_metres()));
    plausible::positive(b, stated, "torque that coupling or gearbox stand")
}

#[cfg(test)]
mod tests {
    use super::*;

    /// 21 A, cos φ 0.85, λ 3.0: bracket 8.00 to 11.06 A as in C-NL-001; 97.44 N·m as in C-MN-010.
    fn of(amperes: f64) -> Inputs {
        Inputs {
            setting: Some(Current::from_amperes(amperes)),
            rated_current: Some(Current::from_amperes(21.0)),
            power_factor: Some(Ratio::from_fraction(0.85)),
            breakdown: Some(Ratio::from_fraction(3.0)),
            rated_power: Some(Power::from_watts(15e3)),
            rated_speed: Some(Speed::from_rpm(1470.0)),
            breakaway_torque: Some(Torque::from_newton_metres(97.441_802)),
            acceleration_torque: Some(Torque::from_newton_metres(60.0)),
            drive_overload_current: Some(Current::from_amperes(31.5)),
            coupling_torque: Some(Torque::from_newton_metres(200.0)),
            gearbox_torque: None,
        }
    }

    /// Rated torque takes rated current whatever I_m is (row NL-05), so 21 A is the least here and 31.5 A the most.
    #[test]
    fn at_just_inside_and_just_outside() {
        assert_eq!(check(&of(21.01)).verdict, Verdict::Within);
        assert_eq!(check(&of(20.9)).verdict, Verdict::Outside);
        assert_eq!(check(&of(31.5)).verdict, Verdict::Within);
        assert_eq!(check(&of(31.6)).verdict, Verdict::Outside);
        assert!(check(&of(20.9)).summary.contains("too low for breakaway"));
    }

    /// By hand for λ 1.6, T = 1.2308·T_N: √(11.062² + (21² − 11.062²)·1.2308²) = 24.6 A (row VF-03).
    #[test]
    fn breakdown_and_coupling_bound_the_limit() {
        let weak = Inputs { breakdown: Some(Ratio::from_fraction(1.6)), ..of(31.0) };
        let outcome = check(&weak);
        assert_eq!(outcome.verdict, Verdict::Outside);
        assert!(outcome.limit.contains("24.6 A"), "{}", outcome.limit);
        let soft = Inputs { gearbox_torque: Some(Torque::from_newton_metres(110.0)), ..of(30.0) };
        let outcome = check(&soft);
        assert!(outcome.verdict == Verdict::Outside && outcome.summary.contains("coupling or gearbox"));
        let crossed = check(&Inputs { coupling_torque: Some(Torque::from_newton_metres(50.0)), ..of(25.0) });
        assert!(crossed.summary.contains("No setting meets every bound"));
    }

    #[test]
    fn each_missing_bound_is_named_and_a_broken_one_still_counts() {
        let partial = Inputs { coupling_torque: None, breakaway_torque: None, ..of(25.0) };
        let outcome = check(&partial);
        assert_eq!(outcome.verdict, Verdict::NotAssessed);
        let names: Vec<_> = outcome.missing.iter().map(|m| m.what.as_str()).collect();
        assert_eq!(names, ["breakaway torque", "torque that coupling or gearbox stand"]);
        assert!(outcome.rule.is_some() && outcome.limit.starts_with("from "));
        assert_eq!(check(&Inputs { setting: Some(Current::from_amperes(40.0)), ..partial }).verdict, Verdict::Outside);
        let still = Inputs { rated_speed: Some(Speed::from_rpm(0.0)), ..of(25.0) };
        assert_eq!(check(&still).verdict, Verdict::NotAssessed);
        assert_eq!(
            check(&Inputs { power_factor: Some(Ratio::from_fraction(1.2)), ..of(25.0) }).verdict,
            Verdict::NotAssessed
        );
    }
}
