//! # motor-data-settings
//!
//! Motor volts, amperes, hertz, speed, power and power factor as keyed into the drive, against the nameplate.
//!
//! |set − plate| at most half a step of the drive's setting: within. Less than a whole step (cut off instead of
//! rounded): marginal. More: outside. Common practice (row MS-01). A value that the drive does not ask for is left out.
//! A setting that departs on purpose, such as 87 Hz in delta, is outside here and wants a reason beside it.

use crate::formulas::plausible;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Current, Frequency, Power, Quantity, Ratio, Speed, Voltage};
use crate::rounding::significant;
use crate::sources::settings::PLATE_SETTINGS;

/// Name in the catalogue.
pub const NAME: &str = "motor-data-settings";

/// One value: as set, as on the plate, and the smallest step of the setting.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Pair<Q> {
    /// As set in the drive.
    pub set: Option<Q>,
    /// As on the plate, in the connection in use.
    pub plate: Option<Q>,
    /// Smallest step of the setting.
    pub step: Option<Q>,
    /// The drive does not ask for this value.
    pub not_asked: bool,
}

impl<Q> Default for Pair<Q> {
    fn default() -> Self {
        Self { set: None, plate: None, step: None, not_asked: false }
    }
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Rated voltage.
    pub voltage: Pair<Voltage>,
    /// Rated current.
    pub current: Pair<Current>,
    /// Rated frequency.
    pub frequency: Pair<Frequency>,
    /// Rated speed.
    pub speed: Pair<Speed>,
    /// Rated power.
    pub power: Pair<Power>,
    /// Rated power factor.
    pub power_factor: Pair<Ratio>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(PLATE_SETTINGS);
    b.limit("each as on the plate, to half a step of the drive's setting (common practice)");
    // A drive shows small powers with one digit more.
    let fine = inputs.power.plate.is_some_and(|p| p.watts() < 10e3);
    let power_step = if fine { (10.0, "0.01 kW") } else { (100.0, "0.1 kW") };
    let found = [
        judge(&mut b, "voltage", inputs.voltage, (1.0, "1 V"), 1.0, "V"),
        judge(&mut b, "current", inputs.current, (0.1, "0.1 A"), 1.0, "A"),
        judge(&mut b, "frequency", inputs.frequency, (0.1, "0.1 Hz"), 1.0, "Hz"),
        judge(&mut b, "speed", inputs.speed, (1.0, "1 rpm"), 1.0, "rpm"),
        judge(&mut b, "power", inputs.power, power_step, 1e3, "kW"),
        judge(&mut b, "power factor", inputs.power_factor, (0.01, "0.01"), 1.0, ""),
    ];
    let of = |wanted: Verdict| {
        found.iter().filter(|(_, verdict)| *verdict == wanted).map(|(name, _)| *name).collect::<Vec<_>>()
    };
    let (wrong, cut, unknown, right) =
        (of(Verdict::Outside), of(Verdict::Marginal), of(Verdict::NotAssessed), of(Verdict::Within));
    if !wrong.is_empty() {
        return b.judged(
            Verdict::Outside,
            format!("Not as on the plate: {}. Correct it, or write down why it departs.", wrong.join(", ")),
        );
    }
    if !unknown.is_empty() {
        return b.not_assessed();
    }
    if right.is_empty() && cut.is_empty() {
        return b.not_judged("Not assessed: the drive asks for none of the motor's values.");
    }
    if !cut.is_empty() {
        return b.judged(
            Verdict::Marginal,
            format!(
                "Almost as on the plate: {} differs by less than a step. Round it to the nearest step.",
                cut.join(", ")
            ),
        );
    }
    b.judged(Verdict::Within, format!("As on the plate: {}.", right.join(", ")))
}

/// One value; a figure where the drive does not ask for it.
fn judge<Q: Quantity>(
    b: &mut OutcomeBuilder,
    name: &'static str,
    pair: Pair<Q>,
    usual: (f64, &str),
    unit: f64,
    symbol: &str,
) -> (&'static str, Verdict) {
    if pair.not_asked {
        return (name, Verdict::Figure);
    }
    let plate = plausible::positive(b, pair.plate, &format!("rated {name} of the motor"));
    let set = plausible::positive(b, pair.set, &format!("motor {name} as set"));
    let (Some(plate), Some(set)) = (plate, set) else { return (name, Verdict::NotAssessed) };
    let stated = pair.step.filter(|s| s.coherent().is_finite() && s.coherent() > 0.0);
    let step =
        b.assume(stated, Q::from_coherent(usual.0), &format!("step of the motor {name} setting"), usual.1).coherent();
    let off = (set.coherent() - plate.coherent()).abs();
    // Values near 1500 carry about 1e-13 of conversion noise; a billionth of the plate is beyond doubt.
    let noise = plate.coherent() * 1e-9;
    let verdict = if off <= step / 2.0 + noise {
        Verdict::Within
    } else if off < step - noise {
        Verdict::Marginal
    } else {
        Verdict::Outside
    };
    let shown = |v: f64| significant(v / unit, 4);
    b.line(
        name,
        "|set − plate| ≤ step/2",
        format!(
            "|{} − {}| {symbol}, step {}",
            shown(set.coherent()),
            shown(plate.coherent()),
            significant(step / unit, 2)
        ),
        verdict.words(),
    );
    (name, verdict)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn pair<Q: Quantity>(set: f64, plate: f64, step: f64) -> Pair<Q> {
        Pair {
            set: Some(Q::from_coherent(set)),
            plate: Some(Q::from_coherent(plate)),
            step: Some(Q::from_coherent(step)),
            not_asked: false,
        }
    }

    fn of(amperes: f64) -> Inputs {
        Inputs {
            voltage: pair(400.0, 400.0, 1.0),
            current: pair(amperes, 20.94, 0.1),
            frequency: pair(50.0, 50.0, 0.1),
            speed: pair(1475.0, 1475.0, 1.0),
            power: pair(11e3, 11e3, 100.0),
            power_factor: pair(0.85, 0.85, 0.01),
        }
    }

    /// Common practice, no source (row MS-01).
    #[test]
    fn at_just_inside_and_just_outside() {
        for (set, verdict) in [
            (20.9, Verdict::Within),
            (21.0, Verdict::Marginal),
            (21.1, Verdict::Outside),
            (20.8, Verdict::Outside),
            (29.4, Verdict::Outside),
        ] {
            assert_eq!(check(&of(set)).verdict, verdict, "{set}");
        }
    }

    /// Row MN-07: a 15 hp plate is 11.185 kW; keyed as 11.2 kW it is as near as a step of 0.1 kW comes.
    #[test]
    fn horsepower_fits_at_the_drive_s_step() {
        let hp = Inputs { power: pair(11.2e3, 11_185.5, 100.0), ..of(20.9) };
        assert_eq!(check(&hp).verdict, Verdict::Within);
        let mixed = Inputs { power: pair(15e3, 11_185.5, 100.0), ..of(20.9) };
        assert!(check(&mixed).summary.contains("power"));
    }

    #[test]
    fn left_out_missing_and_assumed() {
        let outcome = check(&Inputs { power_factor: Pair { not_asked: true, ..Pair::default() }, ..of(20.9) });
        assert_eq!((outcome.verdict, outcome.working.len()), (Verdict::Within, 5));
        let missing = Inputs { speed: Pair { set: None, ..pair(1.0, 1475.0, 1.0) }, ..of(20.9) };
        assert_eq!(check(&missing).missing[0].what, "motor speed as set");
        assert_eq!(check(&missing).verdict, Verdict::NotAssessed);
        let assumed = Inputs { current: Pair { step: None, ..pair(20.9, 20.9, 0.1) }, ..of(20.9) };
        assert_eq!(check(&assumed).assumed.len(), 1);
        assert_eq!(check(&Inputs { speed: pair(1475.0, 0.0, 1.0), ..of(20.9) }).verdict, Verdict::NotAssessed);
        assert!(!check(&Inputs::default()).limit.is_empty());
    }
}
