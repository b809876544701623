//! # connection-fit
//!
//! Whether the motor's connection as found suits the drive's volts at the intended base frequency.
//!
//! r = (U/f_b)/(U_plate/f_plate), U_plate being the volts of the connection found. Within ±5 % (IEC 60034-1, zone A)
//! within; to ±10 % (zone B) marginal; beyond outside. A base frequency raised above the plate's (a 230 V delta winding
//! on 400 V: 87 Hz) is marginal until the motor maker's word for speed and insulation is entered. A drive cannot give
//! more than its supply. Output volts not stated: assumed equal to the supply; base frequency not stated: the plate's.

use crate::decision::Measured;
use crate::formulas::plausible::positive;
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Frequency, Voltage};
use crate::rounding::significant;
use crate::sources::nameplate::VF_05;
use crate::sources::settings::MN_13;

/// Name in the catalogue.
pub const NAME: &str = "connection-fit";

/// Deviation of the flux that is good without reserve.
pub const ZONE_A: Limit = Limit { name: "deviation of rated flux, zone A", value: 0.05, unit: "1", source: MN_13 };
/// Deviation of the flux beyond which nothing is accepted.
pub const ZONE_B: Limit = Limit { name: "deviation of rated flux, zone B", value: 0.10, unit: "1", source: MN_13 };

/// How the six winding ends are linked.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Connection {
    /// Star (or the high-voltage links of a dual-voltage motor).
    Star,
    /// Delta (or the low-voltage links).
    Delta,
}

impl Connection {
    const fn words(self) -> &'static str {
        match self {
            Self::Star => "star (high volts)",
            Self::Delta => "delta (low volts)",
        }
    }

    const fn other(self) -> Self {
        match self {
            Self::Star => Self::Delta,
            Self::Delta => Self::Star,
        }
    }
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Plate volts in star.
    pub star_voltage: Option<Voltage>,
    /// Plate volts in delta.
    pub delta_voltage: Option<Voltage>,
    /// Plate frequency of that column.
    pub plate_frequency: Option<Frequency>,
    /// Nominal line volts of the drive's supply.
    pub supply_voltage: Option<Voltage>,
    /// Volts that the drive is to give at its base frequency, where chosen.
    pub output_voltage: Option<Voltage>,
    /// Base frequency that is intended.
    pub base_frequency: Option<Frequency>,
    /// Connection as found.
    pub found: Option<Connection>,
    /// Whether the motor's maker allows a base frequency above the plate's, for speed and for insulation.
    pub maker_allows_raised_base: Option<bool>,
}

/// Base frequency at which these output volts give a winding its rated flux: f·U/U_plate.
#[must_use]
pub fn base_frequency(plate: Voltage, frequency: Frequency, output: Voltage) -> Frequency {
    Frequency::from_hertz(frequency.hertz() * output.volts() / plate.volts())
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(MN_13);
    b.limit("flux within ±5 % of rated, at most ±10 %");
    b.rule(
        LimitRule::linear("%")
            .between(100.0 - ZONE_A.value * 100.0, "95 %", 100.0 + ZONE_A.value * 100.0, "105 %")
            .tick(100.0 - ZONE_B.value * 100.0, "90 %")
            .tick(100.0 + ZONE_B.value * 100.0, "110 %"),
    );
    let supply = inputs.supply_voltage.or(inputs.output_voltage);
    let supply = positive(&mut b, supply, "supply voltage");
    let hertz = positive(&mut b, inputs.plate_frequency, "rated motor frequency");
    let found = b.need(inputs.found, "motor connection as found");
    let volts_of = |connection| match connection {
        Connection::Star => inputs.star_voltage,
        Connection::Delta => inputs.delta_voltage,
    };
    let plate = found.and_then(|c| positive(&mut b, volts_of(c), &format!("plate volts in {}", c.words())));
    let (Some(supply), Some(hertz), Some(found), Some(plate)) = (supply, hertz, found, plate) else {
        return b.not_assessed();
    };
    let output = b.assume(inputs.output_voltage, supply, "output volts at base frequency", "equal to the supply volts");
    let base = b.assume(inputs.base_frequency, hertz, "base frequency", "the plate's frequency");
    let output = positive(&mut b, Some(output), "output volts at base frequency");
    let base = positive(&mut b, Some(base), "base frequency");
    let (Some(output), Some(base)) = (output, base) else { return b.not_assessed() };

    let flux = |plate: Voltage| output.volts() / base.hertz() / (plate.volts() / hertz.hertz()) * 100.0;
    let (u, f) = (significant(output.volts(), 4), significant(base.hertz(), 4));
    b.line(
        &format!("flux over rated flux, connected {}", found.words()),
        "(U/f_b)/(U_plate/f_plate)",
        format!("({u} V/{f} Hz)/({} V/{} Hz)", significant(plate.volts(), 4), significant(hertz.hertz(), 4)),
        format!("{} %", significant(flux(plate), 4)),
    );
    b.figure("flux over rated flux", flux(plate), 4, "%");
    let suiting = base_frequency(plate, hertz, output);
    b.figure("base frequency for rated flux as connected", suiting.hertz(), 4, "Hz");
    let shown = significant(flux(plate), 4);
    let grade = grade(flux(plate));
    let mut verdict = grade;
    let mut sentences = Vec::new();
    match grade {
        Verdict::Within => sentences.push(format!("Connected {}, {u} V at {f} Hz gives {shown} % of rated flux.", found.words())),
        Verdict::Marginal => sentences.push(format!("Connected {}, {u} V at {f} Hz gives {shown} % of rated flux, beyond ±5 %. Set volts and base frequency by the plate.", found.words())),
        _ => {
            let other = volts_of(found.other()).filter(|v| self::grade(flux(*v)) != Verdict::Outside);
            let way = match other {
                Some(_) => format!("Connect the motor {}, with the drive isolated and proved dead, or choose a base frequency of {} Hz if maker and plant allow it.", found.other().words(), significant(suiting.hertz(), 3)),
                None => format!("Check plate and drive volts; rated flux as connected needs a base frequency of {} Hz.", significant(suiting.hertz(), 3)),
            };
            sentences.push(format!("Connected {}, {u} V at {f} Hz gives {shown} % of rated flux. {way}", found.words()));
        }
    }
    // A few parts in a thousand are the rounding of √3 on plates, not a wish for more volts than there are.
    if output.volts() > supply.volts() * 1.005 {
        verdict = Verdict::Outside;
        sentences = vec![format!("The drive cannot give {u} V from a supply of {} V.", significant(supply.volts(), 4))];
    } else if base.hertz() > hertz.hertz() * (1.0 + ZONE_A.value) && grade != Verdict::Outside {
        b.cite(VF_05);
        b.note("Above the plate's frequency at rated flux the motor draws the plate current of this connection at higher power; the drive is sized for that current, and speed, vibration and iron losses rise.");
        match inputs.maker_allows_raised_base {
            Some(true) => b.note("The motor maker's word for the raised base frequency is entered."),
            Some(false) => {
                verdict = Verdict::Outside;
                sentences.push("The motor's maker does not allow this base frequency.".to_owned());
            }
            None => {
                verdict = verdict.worse(Verdict::Marginal);
                sentences.push(
                    "Marginal until the motor maker's word for this speed and for the insulation is entered."
                        .to_owned(),
                );
            }
        }
    }
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(flux(plate), 0.0, format!("{shown} %"), verdict));
    }
    b.judged(verdict, sentences.join(" "))
}

/// Verdict on the flux alone, in percent of rated.
fn grade(percent: f64) -> Verdict {
    let flux = Measured::exact(percent);
    let inside = |zone: Limit| {
        let reach = zone.value * 100.0 + 1e-9;
        flux.between(100.0 - reach, 100.0 + reach) == Verdict::Within
    };
    if inside(ZONE_A) {
        Verdict::Within
    } else if inside(ZONE_B) {
        Verdict::Marginal
    } else {
        Verdict::Outside
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn motor(delta: f64, star: f64, supply: f64, found: Connection) -> Inputs {
        Inputs {
            star_voltage: Some(Voltage::from_volts(star)),
            delta_voltage: Some(Voltage::from_volts(delta)),
            plate_frequency: Some(Frequency::from_hertz(50.0)),
            supply_voltage: Some(Voltage::from_volts(supply)),
            found: Some(found),
            ..Inputs::default()
        }
    }

    /// C-VF-003 (row VF-05): 230 V delta, 50 Hz on a 400 V drive has its rated flux at 86.96 Hz.
    #[test]
    fn raised_base_frequency() {
        let f = base_frequency(Voltage::from_volts(230.0), Frequency::from_hertz(50.0), Voltage::from_volts(400.0));
        assert!((f.hertz() - 86.956_522).abs() < 0.01);
        let raised = Inputs {
            base_frequency: Some(Frequency::from_hertz(87.0)),
            ..motor(230.0, 400.0, 400.0, Connection::Delta)
        };
        assert_eq!(check(&raised).verdict, Verdict::Marginal);
        assert_eq!(check(&Inputs { maker_allows_raised_base: Some(true), ..raised.clone() }).verdict, Verdict::Within);
        assert_eq!(check(&Inputs { maker_allows_raised_base: Some(false), ..raised }).verdict, Verdict::Outside);
    }

    #[test]
    fn the_wrong_links_are_outside_and_the_right_ones_named() {
        assert_eq!(check(&motor(230.0, 400.0, 400.0, Connection::Star)).verdict, Verdict::Within);
        let over = check(&motor(230.0, 400.0, 400.0, Connection::Delta));
        assert_eq!(over.verdict, Verdict::Outside);
        assert!(over.summary.contains("Connect the motor star"), "{}", over.summary);
        let under = check(&motor(400.0, 690.0, 400.0, Connection::Star));
        assert_eq!(under.verdict, Verdict::Outside);
        assert!(under.summary.contains("Connect the motor delta"), "{}", under.summary);
    }

    /// IEC 60034-1 clause 7.3 (row MN-13): zone A to 5 %, zone B to 10 %.
    #[test]
    fn at_just_inside_and_just_outside_the_zones() {
        for (supply, verdict) in [
            (420.0, Verdict::Within),
            (421.0, Verdict::Marginal),
            (440.0, Verdict::Marginal),
            (441.0, Verdict::Outside),
            (380.0, Verdict::Within),
            (360.0, Verdict::Marginal),
            (359.0, Verdict::Outside),
        ] {
            assert_eq!(check(&motor(230.0, 400.0, supply, Connection::Star)).verdict, verdict, "{supply}");
        }
    }

    #[test]
    fn missing_bad_and_impossible_inputs() {
        let unknown = check(&Inputs { found: None, ..motor(230.0, 400.0, 400.0, Connection::Star) });
        assert_eq!(unknown.missing[0].what, "motor connection as found");
        assert!(unknown.rule.is_some() && !unknown.limit.is_empty());
        assert_eq!(check(&motor(230.0, 0.0, 400.0, Connection::Star)).verdict, Verdict::NotAssessed);
        let wish =
            Inputs { output_voltage: Some(Voltage::from_volts(480.0)), ..motor(230.0, 480.0, 400.0, Connection::Star) };
        assert_eq!(check(&wish).verdict, Verdict::Outside);
    }
}
