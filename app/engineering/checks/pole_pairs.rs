//! # pole-pairs
//!
//! Pole pairs that frequency and speed of the plate imply: p = ⌊60·f/n⌋, n_s = 60·f/p, s = (n_s − n)/n_s.
//! At or up to 0.5 % above a synchronous speed: outside, an induction motor does not reach it. A printed pole number
//! that disagrees: outside. A speed that as the larger pole pair would slip by far too much, and lies nearer above the
//! synchronous speed of the next pole count, is outside too: a motor does not reach it under load; the plate's 60 Hz or
//! 50 Hz column and single digits that would explain it are named. Slip above 8 % from 1 kW, above 15 % below (common practice): marginal. Power not stated:
//! assumed 1 kW or more, which is stricter. The printed speed counts as rounded to its last digit.

use crate::decision::Measured;
use crate::formulas::plausible::{finite, positive};
use crate::formulas::synchronous::{pole_pairs, slip, synchronous_speed};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::printed::Printed;
use crate::quantity::{Frequency, Power, Speed};
use crate::rounding::significant;
use crate::sources::nameplate::{MN_03, SLIP_BY_SIZE};
use crate::sources::settings::MN_01;

/// Name in the catalogue.
pub const NAME: &str = "pole-pairs";

/// Largest slip from 1 kW.
pub const SLIP: Limit = Limit { name: "rated slip from 1 kW", value: 0.08, unit: "1", source: SLIP_BY_SIZE };
/// Largest slip below 1 kW.
pub const SMALL_SLIP: Limit = Limit { name: "rated slip below 1 kW", value: 0.15, unit: "1", source: SLIP_BY_SIZE };

/// Up to here above a synchronous speed a plate is read as that speed, not as a large slip of the next one.
const ABOVE: f64 = 1.005;

/// Beyond so many times the largest usual slip nobody takes a plate as that pole count (common practice, no source).
const HOPELESS: f64 = 1.5;

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Rated frequency.
    pub rated_frequency: Option<Frequency>,
    /// Rated speed as printed.
    pub rated_speed: Option<Printed<Speed>>,
    /// Rated power, for the slip to expect.
    pub rated_power: Option<Power>,
    /// Number of poles (not pairs) where the plate prints it.
    pub printed_poles: Option<u32>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(MN_01);
    b.cite(MN_03);
    b.cite(SLIP_BY_SIZE);
    let power = inputs.rated_power.map(|p| p.watts());
    let large = b.assume(
        power.map(|w| w >= 1000.0),
        true,
        "rated motor power",
        "1 kW or more, whose slip limit is the stricter",
    );
    let limit = if large { SLIP } else { SMALL_SLIP };
    let percent = significant(limit.value * 100.0, 2);
    b.limit(format!("below a synchronous speed, with at most {percent} % slip"));
    let frequency = positive(&mut b, inputs.rated_frequency, "rated motor frequency");
    if let Some(frequency) = frequency {
        let rule = (1..=4).fold(LimitRule::linear("rpm"), |rule, p| {
            let n_s = synchronous_speed(frequency, p).rpm();
            rule.between(n_s * (1.0 - limit.value), "", n_s, significant(n_s, 4))
        });
        b.rule(rule);
    }
    let speed = positive(&mut b, inputs.rated_speed.map(|s| s.value), "rated motor speed");
    finite(
        &mut b,
        inputs.rated_speed.and_then(|s| s.half_width).or(Some(Speed::from_rpm(0.0))),
        "rounding of the rated speed",
    );
    let (Some(frequency), Some(speed), Some(printed)) = (frequency, speed, inputs.rated_speed) else {
        return b.not_assessed();
    };
    let rpm = significant(speed.rpm(), 5);

    let Some(pairs) = pole_pairs(frequency, speed) else {
        let fastest = significant(synchronous_speed(frequency, 1).rpm(), 4);
        if speed.rpm() < synchronous_speed(frequency, 1).rpm() {
            return b.not_judged(format!(
                "Not assessed: {rpm} rpm would mean more poles than a motor has. Read the speed again."
            ));
        }
        return b.judged(
            Verdict::Outside,
            format!("{rpm} rpm lies above {fastest} rpm, the fastest synchronous speed at this frequency. Read speed and frequency again, from the same column of the plate."),
        );
    };
    if let Some(meant) = meant_pairs(inputs, frequency, speed, pairs, limit.value) {
        return above_synchronous(b, (frequency, speed), (pairs, meant), limit.value);
    }
    let n_s = synchronous_speed(frequency, pairs);
    let s = slip(n_s, speed).fraction();
    let n_s_shown = significant(n_s.rpm(), 4);
    let hertz = significant(frequency.hertz(), 4);
    b.line("pole pairs", "p = ⌊60·f/n⌋", format!("⌊60 × {hertz} Hz/{rpm} rpm⌋"), pairs.to_string());
    b.line("synchronous speed", "n_s = 60·f/p", format!("60 × {hertz} Hz/{pairs}"), format!("{n_s_shown} rpm"));
    b.line(
        "slip",
        "s = (n_s − n)/n_s",
        format!("({n_s_shown} − {rpm})/{n_s_shown}"),
        format!("{} %", significant(s * 100.0, 3)),
    );
    b.text_figure("poles", (2 * pairs).to_string());
    b.figure("synchronous speed", n_s.rpm(), 4, "rpm");
    b.figure("slip", s * 100.0, 3, "%");

    let reached =
        [Some(pairs), pairs.checked_add(1)].into_iter().flatten().map(|p| synchronous_speed(frequency, p).rpm());
    let at_or_above = reached.into_iter().find(|n| speed.rpm() >= n * (1.0 - 1e-6) && speed.rpm() <= n * ABOVE);
    // Half a printed digit may hide the slip that keeps the plate within.
    let smallest_slip = slip(n_s, Speed::from_rpm(printed.high())).fraction();
    let (verdict, summary) = if let Some(n) = at_or_above {
        (
            Verdict::Outside,
            format!(
                "{rpm} rpm is at or above the synchronous speed of {} rpm; an induction motor does not reach it. Read the plate again; a synchronous motor does not belong here.",
                significant(n, 4)
            ),
        )
    } else if inputs.printed_poles.is_some_and(|poles| poles != 2 * pairs) {
        let printed = inputs.printed_poles.unwrap_or_default();
        (
            Verdict::Outside,
            format!(
                "The plate prints {printed} poles, but {rpm} rpm at {hertz} Hz means {}. Read poles, speed and frequency again.",
                2 * pairs
            ),
        )
    } else if Measured::exact(smallest_slip).at_most(limit.value) == Verdict::Within {
        (
            Verdict::Within,
            format!("{} poles, synchronous speed {n_s_shown} rpm, slip {} %.", 2 * pairs, significant(s * 100.0, 2)),
        )
    } else {
        (
            Verdict::Marginal,
            format!(
                "{rpm} rpm means {} poles with {} % slip, more than the {percent} % that this size suggests. Read speed and frequency again, from the same column of the plate.",
                2 * pairs,
                significant(s * 100.0, 2)
            ),
        )
    };
    b.rule(
        LimitRule::linear("rpm")
            .between(
                n_s.rpm() * (1.0 - limit.value),
                format!("{percent} % slip"),
                n_s.rpm(),
                format!("{n_s_shown} rpm"),
            )
            .reading(speed.rpm(), 0.0, format!("{rpm} rpm"), verdict),
    );
    b.judged(verdict, summary)
}

/// The pole pairs of the plate, where its speed lies above their synchronous speed: those printed, else the next count
/// when the larger one slips beyond hope and the speed is nearer to the next.
fn meant_pairs(inputs: &Inputs, frequency: Frequency, speed: Speed, pairs: u32, usual_slip: f64) -> Option<u32> {
    let above = |p: u32| speed.rpm() > synchronous_speed(frequency, p).rpm() * ABOVE;
    let as_these = slip(synchronous_speed(frequency, pairs), speed).fraction();
    if as_these <= usual_slip {
        return None;
    }
    let printed = inputs.printed_poles.filter(|poles| *poles >= 2 && poles % 2 == 0).map(|poles| poles / 2);
    if let Some(printed) = printed.filter(|p| above(*p)) {
        return Some(printed);
    }
    let next = pairs.checked_add(1)?;
    let nearer = speed.rpm() / synchronous_speed(frequency, next).rpm()
        < synchronous_speed(frequency, pairs).rpm() / speed.rpm();
    (as_these > HOPELESS * usual_slip && nearer && above(next)).then_some(next)
}

/// Ends outside: faster than the synchronous speed of the pole count that the plate means, with what would explain it.
fn above_synchronous(
    mut b: OutcomeBuilder,
    (frequency, speed): (Frequency, Speed),
    (pairs, meant): (u32, u32),
    usual_slip: f64,
) -> Outcome {
    let n_s = synchronous_speed(frequency, meant);
    let (rpm, n_s_shown) = (significant(speed.rpm(), 5), significant(n_s.rpm(), 4));
    let hertz = significant(frequency.hertz(), 4);
    let as_these = significant(slip(synchronous_speed(frequency, pairs), speed).fraction() * 100.0, 2);
    b.line("synchronous speed", "n_s = 60·f/p", format!("60 × {hertz} Hz/{meant}"), format!("{n_s_shown} rpm"));
    b.line(
        "speed above it",
        "n − n_s",
        format!("{rpm} rpm − {n_s_shown} rpm"),
        format!("{} rpm", significant(speed.rpm() - n_s.rpm(), 3)),
    );
    b.text_figure("poles", (2 * meant).to_string());
    b.figure("synchronous speed", n_s.rpm(), 4, "rpm");
    b.rule(
        LimitRule::linear("rpm")
            .between(
                n_s.rpm() * (1.0 - usual_slip),
                format!("{} % slip", significant(usual_slip * 100.0, 2)),
                n_s.rpm(),
                format!("{n_s_shown} rpm"),
            )
            .reading(speed.rpm(), 0.0, format!("{rpm} rpm"), Verdict::Outside),
    );
    let likely = likely_readings(frequency, speed, meant, usual_slip);
    let likely = if likely.is_empty() { String::new() } else { format!(" Likely: {}.", likely.join("; or ")) };
    b.judged(
        Verdict::Outside,
        format!("{rpm} rpm lies above the synchronous speed of {n_s_shown} rpm of {} poles at {hertz} Hz; an induction motor does not reach that under load, and as {} poles it would slip {as_these} %.{likely} Read speed and frequency again, from the same column of the plate.", 2 * meant, 2 * pairs),
    )
}

/// Readings of the same plate that would fit: the column of the other public frequency, one digit, two digits exchanged.
fn likely_readings(frequency: Frequency, speed: Speed, meant: u32, usual_slip: f64) -> Vec<String> {
    let fits = |frequency: Frequency, rpm: f64| {
        let s = slip(synchronous_speed(frequency, meant), Speed::from_rpm(rpm)).fraction();
        (s > 0.0 && s <= usual_slip).then_some(s)
    };
    let mut likely = Vec::new();
    for (is, other) in [(50.0, 60.0), (60.0, 50.0)] {
        if (frequency.hertz() - is).abs() < 0.5 && fits(Frequency::from_hertz(other), speed.rpm()).is_some() {
            likely.push(format!("the speed of the {other} Hz column beside {is} Hz"));
        }
    }
    let digits: Vec<char> = format!("{:.0}", speed.rpm()).chars().collect();
    let mut readings: Vec<(f64, String, &str)> = Vec::new();
    let mut take = |changed: Vec<char>, how: &'static str| {
        let text: String = changed.into_iter().collect();
        if let Some(s) = text.parse().ok().and_then(|rpm| fits(frequency, rpm)) {
            readings.push((s, text, how));
        }
    };
    for at in 0..digits.len() {
        let mut swapped = digits.clone();
        if at + 1 < digits.len() && digits.get(at) != digits.get(at + 1) {
            swapped.swap(at, at + 1);
            take(swapped, "two digits exchanged");
        }
        for other in '0'..='9' {
            let mut changed = digits.clone();
            if let Some(digit) = changed.get_mut(at).filter(|d| **d != other) {
                *digit = other;
                take(changed, "one digit misread");
            }
        }
    }
    // The least slip first: that is how full-load speeds are.
    readings.sort_by(|a, b| a.0.total_cmp(&b.0));
    likely.extend(readings.into_iter().take(2).map(|(_, text, how)| format!("{text} rpm, {how}")));
    likely
}

#[cfg(test)]
mod tests {
    use super::*;

    fn plate(hertz: f64, rpm: f64) -> Inputs {
        Inputs {
            rated_frequency: Some(Frequency::from_hertz(hertz)),
            rated_speed: Some(Printed::rounded(Speed::from_rpm(rpm), Speed::from_rpm(0.5))),
            rated_power: Some(Power::from_watts(15_000.0)),
            printed_poles: None,
        }
    }

    /// C-MN-006 to C-MN-009 (row MN-03): 4, 6, 8 and 2 poles, each with 1.67 % slip.
    #[test]
    fn published_plates() {
        for (hertz, rpm, poles, n_s) in [
            (50.0, 1475.0, "4", "1500"),
            (60.0, 1180.0, "6", "1200"),
            (60.0, 885.0, "8", "900.0"),
            (50.0, 2950.0, "2", "3000"),
        ] {
            let outcome = check(&plate(hertz, rpm));
            assert_eq!(outcome.verdict, Verdict::Within, "{outcome:?}");
            assert_eq!(outcome.figures[0].value.trim_end_matches(".0"), poles);
            assert_eq!(outcome.figures[1].value, n_s);
            assert_eq!(outcome.figures[2].value, "1.67");
        }
    }

    #[test]
    fn at_above_and_far_below_synchronous_speed() {
        assert_eq!(check(&plate(50.0, 1500.0)).verdict, Verdict::Outside);
        assert_eq!(check(&plate(50.0, 1503.0)).verdict, Verdict::Outside);
        assert_eq!(check(&plate(50.0, 3550.0)).verdict, Verdict::Outside);
        assert_eq!(check(&plate(50.0, 1499.0)).verdict, Verdict::Within);
        // C-MN-005: 1250 rpm at 50 Hz is no whole pole count with a usual slip.
        assert_eq!(check(&plate(50.0, 1250.0)).verdict, Verdict::Marginal);
    }

    /// Row MN-03: n_s = 60·f/p, which an induction motor does not reach under load.
    #[test]
    fn a_speed_above_the_synchronous_one_is_no_two_pole_motor_with_half_its_speed_lost() {
        let fast = check(&plate(50.0, 1575.0));
        assert_eq!((fast.verdict, fast.figures[0].value.as_str()), (Verdict::Outside, "4"));
        let said = &fast.summary;
        assert!(said.contains("above the synchronous speed of 1500 rpm of 4 poles at 50.00 Hz"), "{said}");
        assert!(
            said.contains("as 2 poles it would slip 48 %") && said.contains("1475 rpm, one digit misread"),
            "{said}"
        );
        let column = check(&plate(50.0, 1760.0)).summary;
        assert!(column.contains("the speed of the 60 Hz column beside 50 Hz"), "{column}");
        assert_eq!(check(&plate(60.0, 1850.0)).verdict, Verdict::Outside);
        assert_eq!(check(&plate(50.0, 1050.0)).figures[0].value, "6", "5 % above 1000 rpm");
        let swapped = check(&plate(50.0, 1745.0)).summary;
        assert!(swapped.contains("1475 rpm, two digits exchanged"), "{swapped}");
        let printed = check(&Inputs { printed_poles: Some(4), ..plate(50.0, 2300.0) }).summary;
        assert!(printed.contains("of 4 poles") && printed.contains("as 2 poles"), "{printed}");
        assert!(check(&plate(50.0, 1475.0)).summary.starts_with("4 poles"), "a sound plate stays as it was");
    }

    #[test]
    fn slip_at_its_limit_by_size() {
        assert_eq!(check(&plate(50.0, 1380.0)).verdict, Verdict::Within);
        assert_eq!(check(&plate(50.0, 1379.0)).verdict, Verdict::Marginal);
        // 1379.7 rpm as it stands slips 8.02 %; printed to the whole rpm it can be 1380.2, 7.99 %.
        let exact = Inputs { rated_speed: Some(Printed::nominal(Speed::from_rpm(1379.7))), ..plate(50.0, 1.0) };
        assert_eq!((check(&plate(50.0, 1379.7)).verdict, check(&exact).verdict), (Verdict::Within, Verdict::Marginal));
        let small = Inputs { rated_power: Some(Power::from_watts(550.0)), ..plate(50.0, 1300.0) };
        assert_eq!(check(&small).verdict, Verdict::Within);
        let unstated = check(&Inputs { rated_power: None, ..plate(50.0, 1300.0) });
        assert_eq!((unstated.verdict, unstated.assumed.len()), (Verdict::Marginal, 1));
    }

    #[test]
    fn printed_poles_that_disagree_are_outside_and_bad_plates_not_assessed() {
        assert_eq!(check(&Inputs { printed_poles: Some(4), ..plate(50.0, 1475.0) }).verdict, Verdict::Within);
        assert_eq!(check(&Inputs { printed_poles: Some(6), ..plate(50.0, 1475.0) }).verdict, Verdict::Outside);
        for rpm in [0.0, -1475.0, f64::NAN, f64::INFINITY, 1e-3] {
            assert_eq!(check(&plate(50.0, rpm)).verdict, Verdict::NotAssessed, "{rpm}");
        }
    }

    #[test]
    fn the_limit_is_there_before_the_speed() {
        let outcome = check(&Inputs { rated_speed: None, ..plate(50.0, 1.0) });
        assert_eq!(outcome.limit, "below a synchronous speed, with at most 8.0 % slip");
        assert!(outcome.rule.is_some());
        assert_eq!(outcome.missing[0].what, "rated motor speed");
    }
}
