//! # pe-conductor
//!
//! Section of the protective conductor to the drive or to the motor, S_PE, against its phase section S.
//!
//! S up to 16 mm²: S; above 16 to 35: 16 mm²; above 35: S/2 (IEC 61800-5-1 table 2, same metal; aluminium beside copper
//! phases is enlarged to the same conductance). A separate conductor at least 2.5 mm² protected, 4 mm² not. To the drive,
//! with a touch current of 3.5 mA ac or 10 mA dc and more (assumed unless the manual says otherwise in full): besides
//! 10 mm² copper or 16 mm² aluminium, unless a second PE of the same section runs to a terminal of its own or the supply
//! disconnects when the PE breaks. Short-circuit withstand of the conductor is not part of this check.

use crate::decision::Measured;
use crate::formulas::conductor::per_kilometre;
use crate::formulas::copper::Conductor;
use crate::formulas::plausible::{not_negative, positive};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{CrossSection, Current};
use crate::rounding::significant;
use crate::sources::earthing::{PE_03, PE_04};

/// Name in the catalogue.
pub const NAME: &str = "pe-conductor";

/// Touch current from which more is asked, ac.
pub const TOUCH_AC: Limit = Limit { name: "touch current, ac", value: 0.0035, unit: "A", source: PE_03 };
/// Touch current from which more is asked, dc.
pub const TOUCH_DC: Limit = Limit { name: "touch current, dc", value: 0.010, unit: "A", source: PE_03 };

/// How the protective conductor runs.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Routing {
    /// In the cable with its phases.
    InCable,
    /// On its own, mechanically protected.
    SeparateProtected,
    /// On its own, not protected.
    SeparateUnprotected,
}

/// What the protective conductor earths.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Leg {
    /// The drive, at its input: it carries the touch current of the whole.
    #[default]
    ToDrive,
    /// The motor, from the drive: the table by phase section alone.
    ToMotor,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// What the conductor earths.
    pub leg: Leg,
    /// Section of a phase conductor beside it.
    pub phase_section: Option<CrossSection>,
    /// Metal of the phase conductors; that of the protective conductor where not entered.
    pub phase_metal: Option<Conductor>,
    /// Section of the protective conductor found.
    pub pe_section: Option<CrossSection>,
    /// Its metal.
    pub metal: Option<Conductor>,
    /// Its routing.
    pub routing: Option<Routing>,
    /// Whether the manual calls the touch current above 3.5 mA ac or 10 mA dc.
    pub touch_current_above: Option<bool>,
    /// Touch current of the drive, ac, by its maker.
    pub touch_current_ac: Option<Current>,
    /// Touch current of the drive, dc, by its maker.
    pub touch_current_dc: Option<Current>,
    /// Whether a second PE of the same section runs to a terminal of its own.
    pub second_pe: Option<bool>,
    /// Whether the supply disconnects by itself when the PE breaks.
    pub disconnects_on_break: Option<bool>,
    /// Section that the drive's manual asks for; raises the limit, never lowers it.
    pub maker_section: Option<CrossSection>,
}

/// Smallest section by the phase conductor alone (same metal).
#[must_use]
pub fn by_phase(phase: CrossSection) -> CrossSection {
    CrossSection::from_square_millimetres(match phase.square_millimetres() {
        s if s <= 16.0 => s,
        s if s <= 35.0 => 16.0,
        s => s / 2.0,
    })
}

/// Whether the touch current asks for more than the table by phase section; the cautious reading counts the limit in.
#[must_use]
pub fn high_leakage(ac: Current, dc: Current) -> bool {
    ac.amperes() >= TOUCH_AC.value || dc.amperes() >= TOUCH_DC.value
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(PE_04);
    b.cite(PE_03);
    b.note("The drive's manual and local rules go first; the conductor's short-circuit withstand is checked apart.");
    let Some(smallest) = smallest(&mut b, inputs) else { return b.not_assessed() };
    let limit = significant(smallest, 3);
    b.limit(format!("at least {limit} mm²"));
    b.rule(LimitRule::linear("mm²").at_least(smallest, format!("≥ {limit} mm²")));
    let Some(found) = positive(&mut b, inputs.pe_section, "section of the protective conductor") else {
        return b.not_assessed();
    };
    let found = found.square_millimetres();
    let verdict = Measured::exact(found * (1.0 + 1e-9)).at_least(smallest);
    let shown = significant(found, 3);
    b.figure("smallest section", smallest, 3, "mm²");
    if let Some(rule) = b.take_rule() {
        b.rule(rule.reading(found, 0.0, format!("{shown} mm²"), verdict));
    }
    b.judged(
        verdict,
        if verdict == Verdict::Within {
            format!("Protective conductor {shown} mm², at least {limit} mm².")
        } else {
            format!("Protective conductor {shown} mm², less than {limit} mm². Do not energise; fit a larger one, or a second of the same section to a terminal of its own where the table by phase section is met.")
        },
    )
}

/// The smallest section in mm², with its working.
fn smallest(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<f64> {
    let phase = positive(b, inputs.phase_section, "section of the phase conductors")?;
    let metal = b.assume(inputs.metal, Conductor::Copper, "metal of the protective conductor", "copper, as the phases");
    let mut section = by_phase(phase).square_millimetres();
    b.line(
        "by the phase section",
        "S ≤ 16: S; ≤ 35: 16 mm²; above: S/2",
        format!("S = {} mm²", significant(phase.square_millimetres(), 3)),
        format!("{} mm²", significant(section, 3)),
    );
    match (inputs.phase_metal, metal) {
        (Some(Conductor::Copper), Conductor::Aluminium) => {
            let one = CrossSection::from_square_millimetres(1.0);
            let ratio = per_kilometre(one, Conductor::Aluminium).ohms() / per_kilometre(one, Conductor::Copper).ohms();
            b.note("The table holds for one metal; the phases are copper and the protective conductor aluminium, so it is enlarged to the same conductance.");
            b.line(
                "aluminium beside copper",
                "S·ρ_Al/ρ_Cu",
                format!("{} mm² × {}", significant(section, 3), significant(ratio, 3)),
                format!("{} mm²", significant(section * ratio, 3)),
            );
            section *= ratio;
        }
        (Some(Conductor::Aluminium), Conductor::Copper) => b.note("The table holds for one metal; the phases are aluminium and the protective conductor copper, and nothing is taken off for that."),
        _ => {}
    }
    let own = match b.assume(
        inputs.routing,
        Routing::InCable,
        "routing of the protective conductor",
        "in the cable with its phases",
    ) {
        Routing::InCable => 0.0,
        Routing::SeparateProtected => 2.5,
        Routing::SeparateUnprotected => 4.0,
    };
    if own > section {
        section = own;
        b.line("on its own", "2.5 mm² protected, 4 mm² not", String::new(), format!("{} mm²", significant(own, 2)));
    }
    if inputs.leg == Leg::ToDrive {
        section = with_touch_current(b, inputs, metal, section)?;
    }
    if let Some(own) = inputs.maker_section {
        let own = positive(b, Some(own), "section that the drive's manual asks for")?.square_millimetres();
        // The manual may ask for more than the standard, not for less.
        section = section.max(own);
        b.line(
            "limit",
            "the larger of the standard's and the maker's",
            format!("the maker's {} mm²", significant(own, 3)),
            format!("{} mm²", significant(section, 3)),
        );
    }
    Some(section)
}

/// Whether the touch current is high: any word of the manual that says so counts, a low one only when it is complete.
fn touch_is_high(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<bool> {
    let zero = Current::from_amperes(0.0);
    let ac = not_negative(b, Some(inputs.touch_current_ac.unwrap_or(zero)), "touch current, ac")?;
    let dc = not_negative(b, Some(inputs.touch_current_dc.unwrap_or(zero)), "touch current, dc")?;
    let complete = inputs.touch_current_ac.is_some() && inputs.touch_current_dc.is_some();
    let stated = match inputs.touch_current_above {
        _ if high_leakage(ac, dc) => Some(true),
        Some(above) => Some(above),
        None => complete.then_some(false),
    };
    Some(b.assume(
        stated,
        true,
        "touch current of the drive",
        "3.5 mA ac or more, as of every drive with a filter, until the manual's class or both figures are entered",
    ))
}

/// The section after the rule for the touch current.
fn with_touch_current(b: &mut OutcomeBuilder, inputs: &Inputs, metal: Conductor, mut section: f64) -> Option<f64> {
    let high = touch_is_high(b, inputs)?;
    let relieved = if inputs.second_pe == Some(true) {
        Some("a second PE of the same section")
    } else if inputs.disconnects_on_break == Some(true) {
        Some("disconnection when the PE breaks")
    } else {
        None
    };
    b.text_figure("special measure required", if high { "yes" } else { "no" });
    if high {
        let asked: f64 = match metal {
            Conductor::Copper => 10.0,
            Conductor::Aluminium => 16.0,
        };
        match relieved {
            Some(measure) => b.line(
                "touch current",
                "10 mm² copper or 16 mm² aluminium, or another measure",
                measure,
                format!("{} mm²", significant(section, 3)),
            ),
            None => {
                section = section.max(asked);
                b.line(
                    "touch current",
                    "10 mm² copper or 16 mm² aluminium",
                    String::new(),
                    format!("{} mm²", significant(section, 3)),
                );
            }
        }
    }
    Some(section)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn conductor(phase: f64, milliamperes: f64, found: f64) -> Inputs {
        Inputs {
            phase_section: Some(CrossSection::from_square_millimetres(phase)),
            pe_section: Some(CrossSection::from_square_millimetres(found)),
            metal: Some(Conductor::Copper),
            routing: Some(Routing::InCable),
            touch_current_ac: Some(Current::from_amperes(milliamperes / 1000.0)),
            touch_current_dc: Some(Current::from_amperes(0.0)),
            ..Inputs::default()
        }
    }

    /// C-PE-001 to C-PE-004 (IEC 61800-5-1, rows PE-03 and PE-04).
    #[test]
    fn published_sections() {
        for (phase, milliamperes, smallest, special) in
            [(2.5, 5.0, 10.0, "yes"), (2.5, 2.0, 2.5, "no"), (25.0, 20.0, 16.0, "yes"), (95.0, 50.0, 47.5, "yes")]
        {
            let outcome = check(&conductor(phase, milliamperes, smallest));
            assert_eq!(outcome.verdict, Verdict::Within, "{outcome:?}");
            assert_eq!(outcome.figures[0].value, special);
            assert_eq!(check(&conductor(phase, milliamperes, smallest - 0.01)).verdict, Verdict::Outside);
            assert_eq!(check(&conductor(phase, milliamperes, smallest + 0.01)).verdict, Verdict::Within);
        }
    }

    /// IEC 61800-5-1 table 2 (row PE-04) holds for one metal; the touch current's rule (row PE-03) for the drive's input.
    #[test]
    fn to_the_motor_and_with_two_metals() {
        let motor = |found| check(&Inputs { leg: Leg::ToMotor, ..conductor(2.5, 5.0, found) });
        assert_eq!((motor(2.5).verdict, motor(2.4).verdict), (Verdict::Within, Verdict::Outside));
        assert!(motor(2.5).figures.iter().all(|f| f.name != "special measure required"));
        let mixed = |phase, found| {
            check(&Inputs {
                phase_metal: Some(phase),
                metal: Some(Conductor::Aluminium),
                ..conductor(25.0, 1.0, found)
            })
        };
        assert_eq!(mixed(Conductor::Aluminium, 16.0).verdict, Verdict::Within);
        assert_eq!(mixed(Conductor::Copper, 16.0).verdict, Verdict::Outside);
        assert_eq!(mixed(Conductor::Copper, 26.3).verdict, Verdict::Within);
        assert!(mixed(Conductor::Copper, 26.3).notes.iter().any(|n| n.contains("one metal")));
    }

    #[test]
    fn a_second_conductor_or_a_lower_touch_current_relieves() {
        assert_eq!(check(&conductor(2.5, 3.5, 2.5)).verdict, Verdict::Outside);
        assert_eq!(check(&conductor(2.5, 3.4, 2.5)).verdict, Verdict::Within);
        assert_eq!(check(&Inputs { second_pe: Some(true), ..conductor(2.5, 5.0, 2.5) }).verdict, Verdict::Within);
        assert_eq!(
            check(&Inputs { disconnects_on_break: Some(true), ..conductor(2.5, 5.0, 2.5) }).verdict,
            Verdict::Within
        );
        assert_eq!(
            check(&Inputs { routing: Some(Routing::SeparateUnprotected), ..conductor(2.5, 1.0, 2.5) }).verdict,
            Verdict::Outside
        );
        let aluminium = Inputs { metal: Some(Conductor::Aluminium), ..conductor(10.0, 5.0, 15.0) };
        assert_eq!(check(&aluminium).verdict, Verdict::Outside);
    }

    #[test]
    fn unstated_touch_current_is_assumed_high_and_the_maker_goes_first() {
        let bare = Inputs { touch_current_ac: None, touch_current_dc: None, ..conductor(2.5, 0.0, 2.5) };
        let unstated = check(&bare);
        assert_eq!((unstated.verdict, unstated.assumed.len()), (Verdict::Outside, 1));
        // One figure of the two is not the whole, and the manual's class is not talked down by a printed figure.
        let half = check(&Inputs { touch_current_dc: None, ..conductor(2.5, 2.0, 2.5) });
        assert_eq!((half.verdict, half.assumed.len()), (Verdict::Outside, 1));
        let above = Inputs { touch_current_above: Some(true), ..conductor(2.5, 2.0, 2.5) };
        assert_eq!((check(&above).verdict, check(&above).limit.as_str()), (Verdict::Outside, "at least 10.0 mm²"));
        let class_only = Inputs { touch_current_above: Some(false), ..bare };
        assert_eq!(check(&class_only).verdict, Verdict::Within);
        let figure_over = Inputs { touch_current_above: Some(false), ..conductor(2.5, 4.0, 2.5) };
        assert_eq!(check(&figure_over).verdict, Verdict::Outside);
        let maker =
            Inputs { maker_section: Some(CrossSection::from_square_millimetres(16.0)), ..conductor(2.5, 1.0, 10.0) };
        assert_eq!(check(&maker).verdict, Verdict::Outside);
        let less =
            Inputs { maker_section: Some(CrossSection::from_square_millimetres(4.0)), ..conductor(2.5, 5.0, 4.0) };
        assert_eq!(check(&less).verdict, Verdict::Outside);
        let waiting = check(&Inputs { pe_section: None, ..conductor(2.5, 5.0, 1.0) });
        assert_eq!((waiting.limit.as_str(), waiting.rule.is_some()), ("at least 10.0 mm²", true));
        assert_eq!(check(&conductor(0.0, 5.0, 10.0)).verdict, Verdict::NotAssessed);
    }
}
