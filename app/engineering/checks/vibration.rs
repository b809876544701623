//! # vibration
//!
//! Broadband vibration velocity on a bearing housing against the zones of ISO 20816-3 (row VB-01).
//!
//! Group 1: above 300 kW, or shaft height 315 mm and more. Group 2: 15 to 300 kW. Foundation rigid or flexible. Up to
//! zone boundary B/C within, to C/D marginal, beyond outside; where the site accepts up to A/B only, to A/B within, to
//! B/C marginal. Below 15 kW whatever the height, below 120 rpm or for other machines: a figure. 10 to 1000 Hz, from
//! 2 Hz below 600 rpm. The machine maker's own limit goes first.

use crate::decision::Measured;
use crate::formulas::{marking, plausible};
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Length, Power, Speed, VibrationVelocity};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::sensors::VB_01;

/// Name in the catalogue.
pub const NAME: &str = "vibration";

/// Machine group.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Group {
    /// Above 300 kW, or shaft height 315 mm and more.
    Large,
    /// 15 to 300 kW, shaft height 160 to 315 mm.
    Medium,
    /// Another machine, to which the standard's groups do not apply.
    Other,
}

/// How the machine stands.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Foundation {
    /// Stiff against the machine.
    Rigid,
    /// Lowest natural frequency below the main excitation.
    Flexible,
}

/// Up to which boundary the site accepts.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Accepted {
    /// Zone A only.
    ZoneA,
    /// Zones A and B.
    ZoneB,
}

/// Zone of ISO 20816-3.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Zone {
    /// Newly commissioned.
    A,
    /// Unrestricted long-term running.
    B,
    /// Limited time only.
    C,
    /// Can damage the machine.
    D,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Highest reading on the bearing housings, r.m.s.
    pub reading: Option<Reading<VibrationVelocity>>,
    /// Shaft height: it makes a machine of 15 kW and more a large one.
    pub shaft_height: Option<Length>,
    /// Up to which boundary the site accepts; zone B until it has chosen.
    pub accepted: Option<Accepted>,
    /// Foundation.
    pub foundation: Option<Foundation>,
    /// Rated power.
    pub rated_power: Option<Power>,
    /// Speed during the reading.
    pub speed: Option<Speed>,
    /// The machine maker's own maximum.
    pub maker_maximum: Option<VibrationVelocity>,
}

/// Boundaries A/B, B/C and C/D; `None` for other machines.
#[must_use]
pub fn boundaries(group: Group, foundation: Foundation) -> Option<[VibrationVelocity; 3]> {
    let edges = match (group, foundation) {
        (Group::Large, Foundation::Rigid) => Some([2.3, 4.5, 7.1]),
        (Group::Large, Foundation::Flexible) => Some([3.5, 7.1, 11.0]),
        (Group::Medium, Foundation::Rigid) => Some([1.4, 2.8, 4.5]),
        (Group::Medium, Foundation::Flexible) => Some([2.3, 4.5, 7.1]),
        (Group::Other, _) => None,
    };
    edges.map(|edges: [f64; 3]| edges.map(VibrationVelocity::from_millimetres_per_second))
}

/// The zone of a velocity; a boundary belongs to the better zone.
#[must_use]
pub fn zone(velocity: VibrationVelocity, boundaries: [VibrationVelocity; 3]) -> Zone {
    let v = velocity.millimetres_per_second();
    match boundaries.iter().position(|edge| v <= edge.millimetres_per_second()) {
        Some(0) => Zone::A,
        Some(1) => Zone::B,
        Some(2) => Zone::C,
        _ => Zone::D,
    }
}

/// Peak velocity in inches per second of a pure sine, for display only (row VB-03).
#[must_use]
pub fn peak_inches_per_second(rms: VibrationVelocity) -> f64 {
    rms.millimetres_per_second() * core::f64::consts::SQRT_2 / 25.4
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(VB_01);
    b.note("The machine maker's own limit goes first where there is one.");
    let own = inputs.maker_maximum.map(VibrationVelocity::millimetres_per_second).filter(|m| m.is_finite() && *m > 0.0);
    let group = group(inputs.rated_power, inputs.shaft_height);
    let strict = inputs.accepted == Some(Accepted::ZoneA);
    let slow = inputs.speed.is_some_and(|n| n.rpm() < 120.0);
    let figure_only = own.is_none() && (group == Some(Group::Other) || slow);
    let mut edges = None;
    if let Some(own) = own {
        b.limit(format!("at most {} mm/s, the maker's", significant(own, 2)));
        b.rule(LimitRule::linear("mm/s").at_most(own, format!("≤ {} mm/s", significant(own, 2))));
    } else if figure_only {
        b.limit("a figure: the standard's zones do not apply");
    } else {
        let group = b.need(group, "machine group, or rated power");
        let foundation = b.need(inputs.foundation, "foundation, rigid or flexible");
        edges = group.zip(foundation).and_then(|(g, f)| boundaries(g, f));
        let numbers = edges.map(|e| e.map(VibrationVelocity::millimetres_per_second));
        match numbers {
            Some([a, c, d]) if strict => {
                b.limit(format!("at most {a} mm/s (zone A, as the site accepts); beyond {c} mm/s is outside"));
                b.rule(LimitRule::linear("mm/s").at_most(a, format!("≤ {a} mm/s")).tick(c, "B/C").tick(d, "C/D"));
            }
            Some([a, c, d]) => {
                b.limit(format!("at most {c} mm/s (zones A and B); beyond {d} mm/s is outside"));
                b.rule(LimitRule::linear("mm/s").at_most(c, format!("≤ {c} mm/s")).tick(a, "A/B").tick(d, "C/D"));
            }
            None => {}
        }
    }
    let reading = plausible::reading_not_negative(&mut b, inputs.reading.as_ref(), "vibration velocity");
    if inputs.speed.is_some_and(|n| n.rpm() < 600.0) {
        b.note("Below 600 rpm the meter has to measure from 2 Hz up.");
    }
    let Some(reading) = reading else { return b.not_assessed() };
    let measured = Measured::direct(&reading);
    let shown = significant(measured.value, 2);
    if figure_only {
        b.figure("vibration velocity", measured.value, 2, "mm/s");
        return b.as_figure(format!("Vibration {shown} mm/s, a figure: the standard's zones hold from 15 kW and 120 rpm up. Compare it with sisters and later readings."));
    }
    let (good, bad) = match (own, edges.map(|e| e.map(VibrationVelocity::millimetres_per_second))) {
        (Some(own), _) => (own, own),
        (None, Some([a, c, _])) if strict => (a, c),
        (None, Some([_, c, d])) => (c, d),
        (None, None) => return b.not_assessed(),
    };
    b.figure("vibration velocity", measured.value, 2, "mm/s");
    if let Some(edges) = edges {
        let zone = format!("{:?}", zone(reading.value, edges));
        let edges = edges.map(VibrationVelocity::millimetres_per_second);
        b.line(
            "zone",
            "A/B, B/C, C/D",
            format!("{shown} mm/s against {}, {} and {} mm/s", edges[0], edges[1], edges[2]),
            format!("zone {zone}"),
        );
        b.text_figure("zone", zone);
    }
    let verdict = marking::graded(&measured, good, bad);
    marking::mark(&mut b, &measured, format!("{shown} mm/s"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("Vibration {shown} mm/s, beyond {} mm/s: stop. Check coupling, alignment, balance, foundation and whether the speed meets a resonance.", significant(bad, 2)),
            Verdict::Marginal => format!("Vibration {shown} mm/s: above {} mm/s, closer to a boundary than the meter can tell, or its accuracy is in doubt. Look for the cause before continuous running.", significant(good, 2)),
            _ => format!("Vibration {shown} mm/s, at most {} mm/s.", significant(good, 2)),
        },
    )
}

/// Group by rated power and shaft height. Below 15 kW the standard does not apply, however tall the machine.
fn group(power: Option<Power>, height: Option<Length>) -> Option<Group> {
    let kilowatts = power.map(|p| p.watts() / 1e3).filter(|k| k.is_finite() && *k > 0.0);
    let metres = height.map(Length::metres).filter(|h| h.is_finite() && *h > 0.0);
    match (kilowatts, metres) {
        (Some(k), _) if k < 15.0 => Some(Group::Other),
        (Some(k), _) if k > 300.0 => Some(Group::Large),
        (_, Some(h)) if h >= 0.315 => Some(Group::Large),
        (Some(_), _) => Some(Group::Medium),
        (None, Some(h)) if h >= 0.160 => Some(Group::Medium),
        // A small frame alone does not tell whether 15 kW are reached.
        (None, _) => None,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(velocity: f64, kilowatts: f64, foundation: Foundation) -> Inputs {
        let meter = Accuracy {
            percent_of_reading: 1.0,
            digits: 0.0,
            resolution: 0.0,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            reading: Some(Reading::with(VibrationVelocity::from_millimetres_per_second(velocity), meter)),
            foundation: Some(foundation),
            rated_power: Some(Power::from_watts(kilowatts * 1e3)),
            speed: Some(Speed::from_rpm(1475.0)),
            ..Inputs::default()
        }
    }

    /// ISO 20816-3:2022 (row VB-01): C-VB-001 to C-VB-005; C-VB-006: 1.4 mm/s is 0.078 in/s peak.
    #[test]
    fn zones_of_the_reference_cases() {
        for (group, foundation, v, expected) in [
            (Group::Medium, Foundation::Rigid, 1.2, Zone::A),
            (Group::Medium, Foundation::Rigid, 3.0, Zone::C),
            (Group::Large, Foundation::Flexible, 6.9, Zone::B),
            (Group::Large, Foundation::Rigid, 7.5, Zone::D),
            (Group::Medium, Foundation::Flexible, 4.4, Zone::B),
        ] {
            let edges = boundaries(group, foundation).expect("a group of the standard");
            assert_eq!(zone(VibrationVelocity::from_millimetres_per_second(v), edges), expected, "{v}");
        }
        assert!(
            (peak_inches_per_second(VibrationVelocity::from_millimetres_per_second(1.4)) - 0.077_948_779).abs() < 1e-4
        );
    }

    #[test]
    fn at_just_inside_and_just_outside() {
        for (v, verdict) in [
            (2.7, Verdict::Within),
            (2.8, Verdict::Marginal),
            (4.5, Verdict::Marginal),
            (4.6, Verdict::Outside),
            (0.0, Verdict::Within),
        ] {
            assert_eq!(check(&of(v, 75.0, Foundation::Rigid)).verdict, verdict, "{v}");
        }
        let own = Inputs {
            maker_maximum: Some(VibrationVelocity::from_millimetres_per_second(1.8)),
            ..of(2.0, 5.5, Foundation::Rigid)
        };
        assert_eq!(check(&own).verdict, Verdict::Outside);
    }

    /// ISO 20816-3:2022 (row VB-01): group 2 on a rigid foundation has A/B at 1.4 mm/s, which a new machine is to keep.
    #[test]
    fn a_site_that_accepts_zone_a_only_has_the_lower_limits() {
        let strict = |v| check(&Inputs { accepted: Some(Accepted::ZoneA), ..of(v, 75.0, Foundation::Rigid) });
        for (v, verdict) in [(1.3, Verdict::Within), (2.0, Verdict::Marginal), (2.9, Verdict::Outside)] {
            assert_eq!(strict(v).verdict, verdict, "{v}");
        }
        assert_eq!(strict(1.0).limit, "at most 1.4 mm/s (zone A, as the site accepts); beyond 2.8 mm/s is outside");
        assert_eq!(check(&of(2.0, 75.0, Foundation::Rigid)).verdict, Verdict::Within);
    }

    /// ISO 20816-3:2022 (row VB-01) holds above 15 kW; 315 mm and more make group 1.
    #[test]
    fn the_shaft_height_never_takes_a_small_motor_into_the_standard() {
        let tall = |kilowatts, millimetres: f64| Inputs {
            shaft_height: Some(Length::from_metres(millimetres / 1e3)),
            ..of(6.0, kilowatts, Foundation::Rigid)
        };
        assert_eq!(check(&tall(11.0, 160.0)).verdict, Verdict::Figure);
        assert_eq!(check(&tall(14.9, 400.0)).verdict, Verdict::Figure);
        assert_eq!(check(&tall(15.0, 132.0)).verdict, Verdict::Outside);
        assert_eq!(check(&tall(110.0, 315.0)).verdict, Verdict::Marginal);
    }

    #[test]
    fn small_or_slow_is_a_figure_and_missing_is_named() {
        assert_eq!(check(&of(9.0, 11.0, Foundation::Rigid)).verdict, Verdict::Figure);
        assert_eq!(
            check(&Inputs { speed: Some(Speed::from_rpm(100.0)), ..of(9.0, 75.0, Foundation::Rigid) }).verdict,
            Verdict::Figure
        );
        let outcome = check(&Inputs { foundation: None, ..of(2.0, 75.0, Foundation::Rigid) });
        assert_eq!(
            (outcome.verdict, outcome.missing[0].what.as_str()),
            (Verdict::NotAssessed, "foundation, rigid or flexible")
        );
        let outcome = check(&Inputs { reading: None, ..of(2.0, 75.0, Foundation::Rigid) });
        assert!(outcome.rule.is_some() && outcome.limit.starts_with("at most 2.8 mm/s"));
        assert_eq!(check(&of(-1.0, 75.0, Foundation::Rigid)).verdict, Verdict::NotAssessed);
    }
}
