//! # reflected-wave
//!
//! Peak voltage at the motor terminals by cable reflection against what the winding is made for.
//!
//! Critical length l_c = v·t_r/2; peak U_dc·(1 + G·l/l_c), from l_c on U_dc·(1 + G), G = (Z_m − Z_c)/(Z_m + Z_c). First
//! reflection only: double pulses can exceed it, so measure where it matters. Limits: NEMA MG 1 part 30 1000 V with
//! 2 µs, part 31 3.1·U_N with 0.1 µs (both to 600 V rated), IEC 60034-18-41 overshoot factor of U_dc, or the maker's.
//! A rise faster than the limit's is marginal. A dv/dt filter slows the rise by its data; a sine filter ends it.
//! Beyond the longest cable that the drive's manual allows it is outside, whatever the wave does. Not stated: assumed 0.1 µs, 150 m/µs, G of row CB-04, bus √2·U + 10 %.

use crate::decision::Measured;
use crate::formulas::marking::{mark, up_to};
use crate::formulas::plausible::{not_negative, positive};
use crate::formulas::reflection::{coefficient, critical_length, peak, usual_coefficient};
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Duration, Length, Power, Ratio, Resistance, Voltage};
use crate::rounding::significant;
use crate::sources::supply::{CB_01, CB_02, CB_03, CB_04, CB_06, CB_07, CB_08};

/// Name in the catalogue.
pub const NAME: &str = "reflected-wave";

/// What the motor's winding is made for.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Withstand {
    /// NEMA MG 1 part 30, general purpose.
    GeneralPurpose,
    /// NEMA MG 1 part 31, inverter duty.
    InverterDuty,
    /// IEC 60034-18-41 stress category A.
    CategoryA,
    /// Category B.
    CategoryB,
    /// Category C.
    CategoryC,
    /// Category D.
    CategoryD,
    /// As the motor's maker states: peak, and shortest rise time.
    Maker(Voltage, Duration),
}

/// What stands between drive and cable.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Filter {
    /// Nothing.
    None,
    /// A dv/dt filter with the rise time of its data sheet.
    SlowedRise(Duration),
    /// A sine filter.
    Sine,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Length of the motor cable.
    pub cable_length: Option<Length>,
    /// What the winding is made for.
    pub withstand: Option<Withstand>,
    /// Rated motor volts.
    pub rated_voltage: Option<Voltage>,
    /// Rated motor power, for the usual reflection.
    pub rated_power: Option<Power>,
    /// DC bus volts to reckon with, braking included.
    pub bus_voltage: Option<Voltage>,
    /// Line volts, where the bus is not stated.
    pub supply_voltage: Option<Voltage>,
    /// Rise time of the drive's output.
    pub rise_time: Option<Duration>,
    /// Way of the wave in one second.
    pub travelled_in_a_second: Option<Length>,
    /// Surge impedance of the motor.
    pub motor_impedance: Option<Resistance>,
    /// Surge impedance of the cable.
    pub cable_impedance: Option<Resistance>,
    /// Output filter.
    pub filter: Option<Filter>,
    /// Longest cable of this kind, with this filter, by the drive's manual or the filter's sheet.
    pub longest_cable: Option<Length>,
}

/// Peak volts, and shortest rise time where there is one, that a winding stands; `None` where NEMA sets none.
#[must_use]
pub fn withstand_limit(withstand: Withstand, rated: Voltage, bus: Voltage) -> Option<(Voltage, Option<Duration>)> {
    let nema = |volts: f64, microseconds: f64| {
        (rated.volts() <= 600.0)
            .then(|| (Voltage::from_volts(volts), Some(Duration::from_seconds(microseconds * 1e-6))))
    };
    let overshoot = |factor: f64| Some((Voltage::from_volts(factor * bus.volts()), None));
    match withstand {
        Withstand::GeneralPurpose => nema(1000.0, 2.0),
        Withstand::InverterDuty => nema(3.1 * rated.volts(), 0.1),
        Withstand::CategoryA => overshoot(1.1),
        Withstand::CategoryB => overshoot(1.5),
        Withstand::CategoryC => overshoot(2.0),
        Withstand::CategoryD => overshoot(2.5),
        Withstand::Maker(volts, rise) => Some((volts, Some(rise))),
    }
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    for source in [CB_01, CB_02, CB_03] {
        b.cite(source);
    }
    b.note("First reflection only; double pulses can exceed it, and only a measurement at the motor terminals tells. The motor maker's word goes first.");
    if let Some(longest) = inputs.longest_cable {
        let Some(longest) = positive(&mut b, Some(longest), "longest cable by the maker") else {
            return b.not_assessed();
        };
        let Some(length) = not_negative(&mut b, inputs.cable_length, "length of the motor cable") else {
            return b.not_assessed();
        };
        let (shown, limit) = (significant(length.metres(), 3), significant(longest.metres(), 3));
        b.line("longest cable", "l ≤ the maker's", format!("{shown} m against {limit} m"), "");
        if !up_to(length.metres(), longest.metres()) {
            b.limit(format!("cable at most {limit} m, by the maker"));
            return b.judged(Verdict::Outside, format!("The motor cable is {shown} m long, the maker allows {limit} m. Shorten it, or fit an output filter that allows this length."));
        }
    }
    let withstand = b.need(inputs.withstand, "voltage stress that the motor is made for");
    match withstand {
        Some(Withstand::GeneralPurpose) => b.cite(CB_06),
        Some(Withstand::InverterDuty) => b.cite(CB_07),
        Some(Withstand::Maker(..)) | None => {}
        Some(_) => b.cite(CB_08),
    }
    let rated = positive(&mut b, inputs.rated_voltage, "rated motor voltage");
    let bus = bus(&mut b, inputs);
    let (Some(withstand), Some(rated), Some(bus)) = (withstand, rated, bus) else {
        // Named now, so that one look tells everything that is missing.
        let _ = b.need(inputs.cable_length, "length of the motor cable");
        return b.not_assessed();
    };
    let Some((limit, shortest)) = withstand_limit(withstand, rated, bus) else {
        return b.not_judged(
            "Not assessed: NEMA MG 1 sets these limits up to 600 V rated. Enter the motor maker's peak and rise time.",
        );
    };
    let Some(limit) = positive(&mut b, Some(limit), "peak voltage that the motor stands") else {
        return b.not_assessed();
    };
    let shortest = match shortest {
        Some(stated) => {
            let Some(stated) = positive(&mut b, Some(stated), "shortest rise time that the motor stands") else {
                return b.not_assessed();
            };
            Some(stated)
        }
        None => None,
    };
    let limit_shown = significant(limit.volts(), 4);
    let rise_words =
        shortest.map_or(String::new(), |t| format!(", rise not below {} µs", significant(t.seconds() * 1e6, 2)));
    b.limit(format!("peak at most {limit_shown} V{rise_words}"));
    b.rule(LimitRule::linear("V").at_most(limit.volts(), format!("≤ {limit_shown} V")));
    let filter = b.assume(inputs.filter, Filter::None, "output filter", "none");
    let rise = match filter {
        Filter::Sine => return b.as_figure("A sine filter ends the reflection: the motor sees near-sinusoidal volts. Its own drop and the drive's settings for it count instead."),
        Filter::SlowedRise(rise) => rise,
        Filter::None => b.assume(inputs.rise_time, Duration::from_seconds(0.1e-6), "rise time of the drive", "0.1 µs, fast"),
    };
    let rise = positive(&mut b, Some(rise), "rise time");
    let way = b.assume(
        inputs.travelled_in_a_second,
        Length::from_metres(150e6),
        "speed of the wave",
        "150 m/µs, the slower of the usual",
    );
    let way = positive(&mut b, Some(way), "speed of the wave");
    let reflected = reflection(&mut b, inputs);
    let cable = not_negative(&mut b, inputs.cable_length, "length of the motor cable");
    let (Some(rise), Some(way), Some(reflected), Some(cable)) = (rise, way, reflected, cable) else {
        return b.not_assessed();
    };

    let critical = critical_length(way, rise);
    let top = peak(bus, reflected, cable, critical).volts();
    let (microseconds, shown) = (significant(rise.seconds() * 1e6, 3), significant(top, 4));
    b.line(
        "critical length",
        "v·t_r/2",
        format!("{} m/µs × {microseconds} µs/2", significant(way.metres() / 1e6, 3)),
        format!("{} m", significant(critical.metres(), 3)),
    );
    b.line(
        "peak at the motor",
        "U_dc·(1 + G·min(l/l_c, 1))",
        format!(
            "{} V × (1 + {} × min({} m/{} m, 1))",
            significant(bus.volts(), 4),
            significant(reflected.fraction(), 3),
            significant(cable.metres(), 3),
            significant(critical.metres(), 3)
        ),
        format!("{shown} V"),
    );
    b.figure("critical length", critical.metres(), 3, "m");
    b.figure("peak at the motor", top, 4, "V");
    b.figure("overshoot factor", top / bus.volts(), 3, "");
    let measured = Measured::exact(top);
    let mut verdict = if up_to(top, limit.volts()) { Verdict::Within } else { Verdict::Outside };
    let fast = shortest.is_some_and(|t| !up_to(t.seconds(), rise.seconds()));
    if fast {
        // Cable and motor slow the rise; by how much only a measurement at the terminals tells.
        verdict = verdict.worse(Verdict::Marginal);
    }
    mark(&mut b, &measured, format!("{shown} V"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("Up to {shown} V at the motor, above {limit_shown} V. Shorten the cable, fit a dv/dt or sine filter that the drive's maker accepts, or ask the motor's maker."),
            Verdict::Marginal => format!("Up to {shown} V at the motor, at most {limit_shown} V, but the rise of {microseconds} µs at the drive is faster than the motor's limit. Measure at the motor terminals or fit a filter."),
            _ => format!("Up to {shown} V at the motor, at most {limit_shown} V."),
        },
    )
}

fn bus(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<Voltage> {
    if inputs.bus_voltage.is_some() {
        return positive(b, inputs.bus_voltage, "DC bus volts");
    }
    let supply = positive(b, inputs.supply_voltage, "DC bus volts or supply volts")?;
    Some(b.assume(
        None,
        Voltage::from_volts(std::f64::consts::SQRT_2 * supply.volts() * 1.1),
        "DC bus volts",
        "√2 times the supply volts and 10 % more; braking lifts it further",
    ))
}

fn reflection(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<Ratio> {
    if let (Some(motor), Some(cable)) = (inputs.motor_impedance, inputs.cable_impedance) {
        let motor = positive(b, Some(motor), "surge impedance of the motor");
        let cable = positive(b, Some(cable), "surge impedance of the cable");
        let (motor, cable) = (motor?, cable?);
        let found = coefficient(motor, cable);
        b.line(
            "reflection",
            "(Z_m − Z_c)/(Z_m + Z_c)",
            format!("{} Ω, {} Ω", significant(motor.ohms(), 4), significant(cable.ohms(), 3)),
            significant(found.fraction(), 3),
        );
        // A motor below the cable's impedance lowers the peak; the bus itself stays.
        return Some(Ratio::from_fraction(found.fraction().max(0.0)));
    }
    b.cite(CB_04);
    let power = match inputs.rated_power {
        Some(power) => positive(b, Some(power), "rated motor power")?,
        None => Power::from_watts(0.0),
    };
    let usual = usual_coefficient(power);
    Some(b.assume(
        None,
        usual,
        "reflection at the motor",
        &format!("{}, usual for this power or a smaller one", significant(usual.fraction(), 2)),
    ))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn cable(bus: f64, cable: f64, motor: f64, microseconds: f64, metres: f64) -> Inputs {
        Inputs {
            cable_length: Some(Length::from_metres(metres)),
            withstand: Some(Withstand::InverterDuty),
            rated_voltage: Some(Voltage::from_volts(400.0)),
            bus_voltage: Some(Voltage::from_volts(bus)),
            rise_time: Some(Duration::from_seconds(microseconds * 1e-6)),
            travelled_in_a_second: Some(Length::from_metres(150e6)),
            motor_impedance: Some(Resistance::from_ohms(motor)),
            cable_impedance: Some(Resistance::from_ohms(cable)),
            filter: Some(Filter::None),
            ..Inputs::default()
        }
    }

    /// The maker goes first (standing rule): 50 m is within by MG 1 part 31 here.
    #[test]
    fn a_cable_longer_than_the_maker_allows_is_outside() {
        let allowed = |metres| {
            let longest = Some(Length::from_metres(metres));
            check(&Inputs { longest_cable: longest, ..cable(565.0, 80.0, 1500.0, 0.1, 50.0) })
        };
        assert_eq!((allowed(50.0).verdict, allowed(49.0).verdict), (Verdict::Within, Verdict::Outside));
        assert_eq!(allowed(49.0).limit, "cable at most 49.0 m, by the maker");
    }

    /// C-CB-002 and C-CB-003 (rows CB-01 to CB-03): 1073 V on 50 m, 734 V on 5 m; C-CB-006: 3.1·460 = 1426 V, C-CB-005.
    #[test]
    fn published_peaks_and_limits() {
        let long = check(&cable(565.0, 80.0, 1500.0, 0.1, 50.0));
        assert_eq!(
            (long.verdict, long.figures[0].value.as_str(), long.figures[1].value.as_str()),
            (Verdict::Within, "7.50", "1073")
        );
        assert_eq!(check(&cable(565.0, 80.0, 1500.0, 0.2, 5.0)).figures[1].value, "734.3");
        let volts = |w| {
            withstand_limit(w, Voltage::from_volts(460.0), Voltage::from_volts(650.0))
                .map(|(v, t)| ((v.volts() * 10.0).round() / 10.0, t))
        };
        assert_eq!(volts(Withstand::InverterDuty), Some((1426.0, Some(Duration::from_seconds(0.1e-6)))));
        assert_eq!(volts(Withstand::GeneralPurpose), Some((1000.0, Some(Duration::from_seconds(2e-6)))));
    }

    #[test]
    fn at_just_inside_and_just_outside() {
        let of = |maker: f64| {
            check(&Inputs {
                withstand: Some(Withstand::Maker(Voltage::from_volts(maker), Duration::from_seconds(0.1e-6))),
                ..cable(565.0, 80.0, 1500.0, 0.1, 50.0)
            })
            .verdict
        };
        assert_eq!((of(1072.8), of(1072.7)), (Verdict::Within, Verdict::Outside));
        assert_eq!(check(&cable(565.0, 80.0, 1500.0, 0.09, 50.0)).verdict, Verdict::Marginal);
        let iec = |category, metres| {
            check(&Inputs { withstand: Some(category), ..cable(565.0, 80.0, 1500.0, 0.1, metres) }).verdict
        };
        assert_eq!(
            (iec(Withstand::CategoryB, 50.0), iec(Withstand::CategoryC, 50.0)),
            (Verdict::Outside, Verdict::Within)
        );
        assert_eq!(
            (iec(Withstand::CategoryA, 0.8), iec(Withstand::CategoryA, 0.9)),
            (Verdict::Within, Verdict::Outside)
        );
        assert_eq!(iec(Withstand::CategoryD, 200.0), Verdict::Within);
    }

    #[test]
    fn filters_and_what_is_not_stated() {
        let general = |filter| Inputs {
            withstand: Some(Withstand::GeneralPurpose),
            filter: Some(filter),
            ..cable(565.0, 80.0, 1500.0, 0.1, 50.0)
        };
        assert_eq!(check(&general(Filter::None)).verdict, Verdict::Outside);
        assert_eq!(check(&general(Filter::SlowedRise(Duration::from_seconds(2e-6)))).verdict, Verdict::Within);
        assert_eq!(check(&general(Filter::Sine)).verdict, Verdict::Figure);
        let bare = Inputs {
            cable_length: Some(Length::from_metres(50.0)),
            withstand: Some(Withstand::InverterDuty),
            rated_voltage: Some(Voltage::from_volts(400.0)),
            supply_voltage: Some(Voltage::from_volts(400.0)),
            ..Inputs::default()
        };
        let outcome = check(&bare);
        assert_eq!((outcome.verdict, outcome.assumed.len()), (Verdict::Within, 5));
        let waiting = check(&Inputs { cable_length: None, ..bare.clone() });
        assert!(waiting.rule.is_some() && waiting.limit.starts_with("peak at most 1240 V"));
        assert_eq!(waiting.missing[0].what, "length of the motor cable");
        assert_eq!(
            check(&Inputs { rated_voltage: Some(Voltage::from_volts(690.0)), ..bare }).verdict,
            Verdict::NotAssessed
        );
        assert_eq!(check(&cable(f64::NAN, 80.0, 1500.0, 0.1, 50.0)).verdict, Verdict::NotAssessed);
    }
}
