//! # temperature-rise
//!
//! Rise of the winding over its coolant after a load run, by resistance or by a sensor in the winding.
//!
//! By resistance: T₂ = R₂/R₁·(k + T₁) − k, k = 235 copper, 225 aluminium (row MN-19); rise = T₂ − T_coolant. Limit at a
//! coolant of 40 °C at most: class B 80 K, F 105 K, H 125 K (row MN-18, resistance method; taken for a sensor too,
//! which is cautious); lower by as many kelvins as the plate's ambient or the coolant lies above 40 °C (from memory). A
//! surface thermometer tells nothing about the winding. The motor maker's limit goes first; it holds up to the plate's
//! ambient.

use crate::checks::polarization_index::ThermalClass;
use crate::decision::Measured;
use crate::formulas::copper::{Conductor, temperature_from};
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Resistance, Temperature, TemperatureRise};
use crate::reading::Reading;
use crate::rounding::{decimals, significant};
use crate::sources::sensors::{MN_18, MN_19};

/// Name in the catalogue.
pub const NAME: &str = "temperature-rise";

/// Class B (130).
pub const CLASS_B: Limit = Limit { name: "rise, class B", value: 80.0, unit: "K", source: MN_18 };
/// Class F (155).
pub const CLASS_F: Limit = Limit { name: "rise, class F", value: 105.0, unit: "K", source: MN_18 };
/// Class H (180).
pub const CLASS_H: Limit = Limit { name: "rise, class H", value: 125.0, unit: "K", source: MN_18 };

/// Ambient for which a plate holds that names none.
const USUAL_AMBIENT: f64 = 40.0;

/// How the winding's temperature was found.
#[derive(Clone, Debug, PartialEq)]
pub enum Method {
    /// From the winding's resistance, cold and right after the run, at the same terminals.
    Resistance {
        /// Resistance before the run.
        cold: Option<Reading<Resistance>>,
        /// Winding temperature at that time.
        cold_at: Option<Reading<Temperature>>,
        /// Resistance right after the run.
        hot: Option<Reading<Resistance>>,
    },
    /// From a sensor in the winding.
    Sensor {
        /// What it showed at the end of the run.
        winding: Option<Reading<Temperature>>,
    },
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// How the winding's temperature was found.
    pub method: Option<Method>,
    /// Coolant (usually air) at the end of the run.
    pub coolant: Option<Reading<Temperature>>,
    /// What the winding is made of.
    pub conductor: Option<Conductor>,
    /// Thermal class, or the lower one to which the motor is used.
    pub thermal_class: Option<ThermalClass>,
    /// Ambient for which the motor's plate holds; 40 °C where it is silent.
    pub plate_ambient: Option<Temperature>,
    /// The motor maker's own maximum.
    pub maker_maximum: Option<TemperatureRise>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(MN_18);
    b.cite(MN_19);
    b.note("The rise belongs to the load, speed and time of this run; the motor maker's own limit goes first.");
    let limit = limit(&mut b, inputs);
    if let Some(limit) = limit {
        b.limit(format!("at most {} K", significant(limit, 3)));
        b.rule(LimitRule::linear("K").at_most(limit, format!("≤ {} K", significant(limit, 3))));
    }
    let winding = match &inputs.method {
        Some(Method::Resistance { cold, cold_at, hot }) => {
            by_resistance(&mut b, inputs.conductor, cold.as_ref(), cold_at.as_ref(), hot.as_ref())
        }
        Some(Method::Sensor { winding }) => {
            plausible::finite_reading(&mut b, winding.as_ref(), "winding temperature by its sensor")
                .map(|r| Winding { celsius: r.number(), terms: vec![(r.standard_uncertainty(), r.doubt())] })
        }
        None => {
            let _ = b.need(None::<Temperature>, "method: winding resistance or a sensor in the winding");
            None
        }
    };
    let coolant = plausible::finite_reading(&mut b, inputs.coolant.as_ref(), "coolant temperature");
    let (Some(limit), Some(winding), Some(coolant)) = (limit, winding, coolant) else { return b.not_assessed() };
    if !(-50.0..=400.0).contains(&winding.celsius) {
        return b.not_judged("Not assessed: the winding temperature is beyond what can be. Check both resistances.");
    }

    let rise = winding.celsius - coolant.number();
    let shown = decimals(rise, 0);
    b.line(
        "rise",
        "ΔT = T₂ − T_coolant",
        format!("{} °C − {} °C", decimals(winding.celsius, 1), decimals(coolant.number(), 1)),
        format!("{} K", decimals(rise, 1)),
    );
    b.figure("winding temperature", winding.celsius, 3, "°C");
    b.figure("temperature rise", rise, 3, "K");
    let plate = inputs.plate_ambient.map_or(USUAL_AMBIENT, Temperature::celsius);
    // The class's rise is reckoned from 40 °C; a plate for a hotter place has the lower limit built in already.
    let from = if inputs.maker_maximum.is_some() { plate } else { plate.max(USUAL_AMBIENT) };
    let allowed = limit - (coolant.number() - from).max(0.0);
    if allowed < limit {
        b.note(format!(
            "The coolant is above {} °C: the limit falls by as many kelvins (from memory); ask the motor maker.",
            significant(from, 3)
        ));
        let shown = significant(allowed, 3);
        b.limit(format!("at most {shown} K at a coolant of {} °C", significant(coolant.number(), 3)));
        b.rule(LimitRule::linear("K").at_most(allowed, format!("≤ {shown} K")));
    }
    let mut terms = winding.terms;
    terms.push((coolant.standard_uncertainty(), coolant.doubt()));
    let measured = Measured::combined(rise, &terms);
    let verdict = measured.at_most(allowed);
    marking::mark(&mut b, &measured, format!("{shown} K"), verdict);
    let limit = decimals(allowed, 0);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("The winding rose by {shown} K, more than {limit} K. Reduce the load or the time, look at cooling and low speed, before running on."),
            Verdict::Marginal => format!("The winding rose by {shown} K: the instruments cannot tell it from {limit} K, or their accuracy is in doubt."),
            _ => format!("The winding rose by {shown} K, at most {limit} K."),
        },
    )
}

/// The winding's temperature with its terms of doubt.
struct Winding {
    celsius: f64,
    terms: Vec<(Option<f64>, Option<String>)>,
}

fn by_resistance(
    b: &mut OutcomeBuilder,
    conductor: Option<Conductor>,
    cold: Option<&Reading<Resistance>>,
    cold_at: Option<&Reading<Temperature>>,
    hot: Option<&Reading<Resistance>>,
) -> Option<Winding> {
    let conductor = b.assume(conductor, Conductor::Copper, "conductor of the winding", "copper");
    let cold = plausible::positive_reading(b, cold, "cold winding resistance");
    let at = plausible::finite_reading(b, cold_at, "winding temperature when cold");
    let hot = plausible::positive_reading(b, hot, "hot winding resistance");
    let (cold, at, hot) = (cold?, at?, hot?);
    let celsius = temperature_from(cold.value, at.value, hot.value, conductor).celsius();
    let (k, ratio) = (conductor.constant(), hot.number() / cold.number());
    b.line(
        "hot winding",
        "T₂ = R₂/R₁·(k + T₁) − k",
        format!(
            "{} Ω / {} Ω × ({k} + {}) − {k}",
            significant(hot.number(), 4),
            significant(cold.number(), 4),
            decimals(at.number(), 1)
        ),
        format!("{} °C", decimals(celsius, 1)),
    );
    let warm = k + at.number();
    Some(Winding {
        celsius,
        terms: vec![
            (hot.standard_uncertainty().map(|u| u * warm / cold.number()), hot.doubt()),
            (cold.standard_uncertainty().map(|u| u * warm * ratio / cold.number()), cold.doubt()),
            (at.standard_uncertainty().map(|u| u * ratio), at.doubt()),
        ],
    })
}

/// The limit in kelvins with its line of working.
fn limit(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<f64> {
    if let Some(own) = inputs.maker_maximum.map(TemperatureRise::kelvins).filter(|k| k.is_finite() && *k > 0.0) {
        b.line("limit", "the maker's", String::new(), format!("{} K", significant(own, 3)));
        b.note("The maker's own maximum is used.");
        return Some(own);
    }
    let class = b.need(inputs.thermal_class, "thermal class")?;
    let limit = match class {
        ThermalClass::A => {
            return b.need(None, "the maker's maximum rise for class A");
        }
        ThermalClass::B => CLASS_B,
        ThermalClass::F => CLASS_F,
        ThermalClass::H => CLASS_H,
    };
    b.line(
        "limit",
        "rise of the class at 40 °C",
        format!("class {class:?}"),
        format!("{} K", significant(limit.value, 3)),
    );
    let hotter = finite_or_usual(b, inputs.plate_ambient)? - USUAL_AMBIENT;
    if hotter > 0.0 {
        b.line(
            "limit of this plate",
            "ΔT − (T_plate − 40 °C)",
            format!("{} K − {} K", significant(limit.value, 3), significant(hotter, 3)),
            format!("{} K", significant(limit.value - hotter, 3)),
        );
        b.note("The plate holds for air above 40 °C: the class's rise is lower by as many kelvins (from memory).");
        let left = TemperatureRise::from_kelvins(limit.value - hotter);
        return plausible::positive(b, Some(left), "rise left by the plate's ambient").map(TemperatureRise::kelvins);
    }
    Some(limit.value)
}

fn finite_or_usual(b: &mut OutcomeBuilder, plate: Option<Temperature>) -> Option<f64> {
    let plate = plate.unwrap_or(Temperature::from_celsius(USUAL_AMBIENT));
    plausible::finite(b, Some(plate), "ambient on the motor's plate").map(Temperature::celsius)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn of(hot: f64) -> Inputs {
        let fine = |resolution: f64| Accuracy {
            percent_of_reading: 0.0,
            digits: 1.0,
            resolution,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        let celsius = |t: f64| Some(Reading::with(Temperature::from_celsius(t), fine(0.1)));
        let ohms = |r: f64| Some(Reading::with(Resistance::from_ohms(r), fine(0.0001)));
        Inputs {
            method: Some(Method::Resistance { cold: ohms(0.5), cold_at: celsius(20.0), hot: ohms(hot) }),
            coolant: celsius(20.0),
            conductor: Some(Conductor::Copper),
            thermal_class: Some(ThermalClass::B),
            plate_ambient: None,
            maker_maximum: None,
        }
    }

    /// C-MN-039 (IEC 60034-1 cl. 8.6.2): 0.65 Ω hot is 96.5 °C, so 76.5 K above a coolant at 20 °C.
    #[test]
    fn the_reference_winding() {
        let outcome = check(&of(0.65));
        assert_eq!(
            (outcome.verdict, outcome.figures[0].value.as_str(), outcome.figures[1].value.as_str()),
            (Verdict::Within, "96.5", "76.5")
        );
    }

    /// Row MN-18 (from memory): class B 80 K, which is 0.656863 Ω here.
    #[test]
    fn at_just_inside_and_just_outside() {
        for (hot, verdict) in [(0.6562, Verdict::Within), (0.65686, Verdict::Marginal), (0.6575, Verdict::Outside)] {
            assert_eq!(check(&of(hot)).verdict, verdict, "{hot}");
        }
        let f = Inputs { thermal_class: Some(ThermalClass::F), ..of(0.6575) };
        assert_eq!(check(&f).verdict, Verdict::Within);
        let own = Inputs { maker_maximum: Some(TemperatureRise::from_kelvins(70.0)), ..of(0.65) };
        assert_eq!(check(&own).verdict, Verdict::Outside);
        // A plate for 50 °C leaves class B 70 K; the 76.5 K of this winding are then too many (row MN-18, from memory).
        let hot_place = Inputs { plate_ambient: Some(Temperature::from_celsius(50.0)), ..of(0.65) };
        assert_eq!((check(&hot_place).verdict, check(&hot_place).limit.as_str()), (Verdict::Outside, "at most 70.0 K"));
    }

    #[test]
    fn sensor_hot_coolant_missing_and_impossible() {
        let sensor = |t: f64, air: f64| Inputs {
            method: Some(Method::Sensor { winding: Some(Reading::bare(Temperature::from_celsius(t))) }),
            coolant: Some(Reading::bare(Temperature::from_celsius(air))),
            ..of(0.65)
        };
        assert_eq!(check(&sensor(90.0, 30.0)).verdict, Verdict::Marginal);
        assert_eq!(check(&sensor(130.0, 30.0)).verdict, Verdict::Outside);
        assert_eq!(check(&sensor(128.0, 50.0)).verdict, Verdict::Outside);
        let outcome = check(&Inputs { method: None, ..of(0.65) });
        assert_eq!(outcome.missing[0].what, "method: winding resistance or a sensor in the winding");
        assert!(outcome.rule.is_some() && outcome.limit == "at most 80.0 K");
        assert_eq!(check(&of(0.0)).verdict, Verdict::NotAssessed);
        assert_eq!(check(&of(50.0)).verdict, Verdict::NotAssessed);
    }
}
