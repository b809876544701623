//! How far the estimates from a nameplate lie from textbook machines solved exactly; kept as a page of the documents.

use crate::machines::{circuit, machines};
use crate::number;
use engineering::formulas::equivalent_circuit::Circuit;
use engineering::formulas::load_current::{current_between, torque_between};
use engineering::formulas::magnetising::{Bracket, USUAL_BREAKDOWN, bracket};
use engineering::formulas::variable_frequency;
use engineering::motion::available_torque::BREAKDOWN_MARGIN;
use engineering::{Current, Power, Ratio, Speed};
use serde_json::Value;
use std::fmt::Write as _;
use std::path::PathBuf;

/// A textbook machine, its rated point solved, and what its nameplate would lead us to.
struct Case {
    id: String,
    source: String,
    circuit: Circuit,
    slip: Ratio,
    rated: Current,
    idle: Current,
    lambda: Ratio,
    by_plate: Bracket,
    by_assumption: Bracket,
}

const FLUX: Ratio = Ratio::from_fraction(1.0);

impl Case {
    fn of(body: &Value) -> Self {
        let circuit = circuit(body);
        let slip = circuit.slip_for(Power::from_watts(number(body, "rated_w"))).expect("within its power");
        let point = circuit.at(slip);
        let ratio = circuit.breakdown().1.newton_metres() / circuit.torque(slip).newton_metres();
        let by = |lambda: f64| {
            bracket(point.current, point.power_factor, Ratio::from_fraction(lambda)).expect("a plausible plate")
        };
        Self {
            id: body["id"].as_str().expect("an id").to_owned(),
            source: body["source"].as_str().expect("a source").to_owned(),
            circuit,
            slip,
            rated: point.current,
            idle: circuit.ideal_no_load_current(),
            lambda: Ratio::from_fraction(ratio),
            by_plate: by(ratio),
            by_assumption: by(USUAL_BREAKDOWN.value),
        }
    }

    /// The slip below breakdown at which this rises with slip to the wanted value.
    fn slip_where(&self, value: impl Fn(Ratio) -> f64, wanted: f64) -> Ratio {
        let (mut low, mut high) = (1e-9, self.circuit.breakdown().0.fraction());
        for _ in 0..200 {
            let middle = f64::midpoint(low, high);
            if value(Ratio::from_fraction(middle)) < wanted { low = middle } else { high = middle }
        }
        Ratio::from_fraction(high)
    }

    /// Exact slip at a share of rated torque.
    fn slip_at(&self, share: f64) -> Ratio {
        let torque = |s| self.circuit.torque(s).newton_metres();
        self.slip_where(torque, share * torque(self.slip))
    }

    /// Exact torque over rated torque at a multiple of rated current.
    fn torque_at(&self, multiple: f64) -> f64 {
        let slip = self.slip_where(|s| self.circuit.at(s).current.amperes(), multiple * self.rated.amperes());
        self.circuit.torque(slip).newton_metres() / self.circuit.torque(self.slip).newton_metres()
    }
}

/// By how many percent an estimate lies above (+) or below (−) the exact value.
fn off(estimate: f64, exact: f64) -> f64 {
    (estimate / exact - 1.0) * 100.0
}

/// With its sign; what rounds to nothing has none.
fn signed(value: f64, places: usize) -> String {
    let text = format!("{value:+.places$}");
    if text.chars().any(|c| ('1'..='9').contains(&c)) { text.replace('-', "−") } else { text[1..].to_owned() }
}

const SHARES: [f64; 5] = [0.25, 0.5, 0.75, 1.0, 1.25];
const MULTIPLES: [f64; 3] = [1.1, 1.5, 2.0];

fn page(cases: &[Case]) -> String {
    let mut page = String::from(
        "# Textbook machines against the estimates\n\nA nameplate does not give a motor's circuit, so the checks estimate from it. \
         Here three textbook machines whose circuits are published are solved exactly, each is given the nameplate that \
         follows from its circuit, and the estimates are held against the exact values. Signs: + the estimate is too high. This page is made by \
         `tests/independent/machines_page.rs`; the exact values agree with a second program (`tests/independent/machines.py`).\n\n",
    );
    for case in cases {
        let _ = writeln!(page, "- {}: {}", case.id, case.source);
    }
    page += "\nAll three are fed with rated volts and hertz. A drive keeps the flux the same way, less exactly near standstill.\n";
    let _ = write!(page, "\n{}", in_short(cases));
    page += "\n## Breakdown torque\n\nWhere the plate is silent λ is taken as 1.6, the floor of the standard. The ceiling of the torque within a current limit is λ·T_N/1.3.\n\n";
    page += "| machine | λ exact | λ assumed | ceiling with it, of exact breakdown torque |\n|---|---|---|---|\n";
    for case in cases {
        let ceiling = USUAL_BREAKDOWN.value / BREAKDOWN_MARGIN / case.lambda.fraction() * 100.0;
        let _ = writeln!(
            page,
            "| {} | {:.2} | {:.1} | {ceiling:.0} % |",
            case.id,
            case.lambda.fraction(),
            USUAL_BREAKDOWN.value
        );
    }
    page += "\n## Magnetising current\n\nThe bracket from rated current, cos φ and λ (rows NL-01, NL-02), with the exact λ and with the assumed one.\n\n";
    page += "| machine | exact, A | lower end, λ exact | lower end, λ assumed | upper end |\n|---|---|---|---|---|\n";
    for case in cases {
        let exact = case.idle.amperes();
        let end =
            |current: Current| format!("{:.2} A ({} %)", current.amperes(), signed(off(current.amperes(), exact), 0));
        let _ = writeln!(
            page,
            "| {} | {exact:.2} | {} | {} | {} |",
            case.id,
            end(case.by_plate.low),
            end(case.by_assumption.low),
            end(case.by_plate.high)
        );
    }
    page += "\n## Current under load\n\nI = √(I_m² + (I_N² − I_m²)·(T/T_N)²) (row NL-05) at both ends of the bracket (exact λ), and with the exact no-load current.\n\n";
    page += "| machine | T/T_N | exact, A | lower end | upper end | with the exact I_m |\n|---|---|---|---|---|---|\n";
    for case in cases {
        for share in SHARES {
            let exact = case.circuit.at(case.slip_at(share)).current.amperes();
            let by = |bracket: Bracket| {
                current_between(case.rated, bracket, Ratio::from_fraction(share), FLUX).expect("below rated")
            };
            let (low, high) = by(case.by_plate);
            let known = by(Bracket { low: case.idle, high: case.idle }).0;
            let _ = writeln!(
                page,
                "| {} | {share:.2} | {exact:.2} | {} % | {} % | {} % |",
                case.id,
                signed(off(low.amperes(), exact), 1),
                signed(off(high.amperes(), exact), 1),
                signed(off(known.amperes(), exact), 1)
            );
        }
    }
    page += "\n## Torque within a current limit\n\nT/T_N at a multiple of rated current, at both ends of the bracket (exact λ). The checks take the end that gives less, and the ceiling besides.\n\n";
    page += "| machine | I/I_N | exact T/T_N | end that gives less | end that gives more | taken, with the ceiling |\n|---|---|---|---|---|---|\n";
    for case in cases {
        for multiple in MULTIPLES {
            let (exact, less, more, taken) = torques(case, multiple);
            let _ = writeln!(
                page,
                "| {} | {multiple:.1} | {exact:.3} | {} % | {} % | {} % |",
                case.id,
                signed(off(less, exact), 1),
                signed(off(more, exact), 1),
                signed(off(taken, exact), 1)
            );
        }
    }
    page += "\n## Slip in proportion to torque\n\nΔn = Δn_N·T/T_N (row VF-06), against the exact slip at the same torque.\n\n";
    page += "| machine | T/T_N | exact slip, rpm | estimate, rpm | off, of rated slip | off, of the speed |\n|---|---|---|---|---|---|\n";
    for case in cases {
        for share in SHARES {
            let (exact, estimate) = slips(case, share);
            let rated = case.slip.fraction() * case.circuit.synchronous().rpm();
            let speed = case.circuit.synchronous().rpm() - exact;
            let _ = writeln!(
                page,
                "| {} | {share:.2} | {exact:.1} | {estimate:.1} | {} % | {} % |",
                case.id,
                signed((estimate - exact) / rated * 100.0, 1),
                signed((exact - estimate) / speed * 100.0, 2)
            );
        }
    }
    page
}

/// The largest errors in a sentence each.
fn in_short(cases: &[Case]) -> String {
    let most = |of: &dyn Fn(&Case) -> f64| cases.iter().map(of).fold(f64::NEG_INFINITY, f64::max);
    let too_much = most(&|case| off(torques(case, 1.5).3, torques(case, 1.5).0));
    let slip = most(&|case| {
        let rated = case.slip.fraction() * case.circuit.synchronous().rpm();
        SHARES
            .map(|share| ((slips(case, share).1 - slips(case, share).0) / rated * 100.0).abs())
            .into_iter()
            .fold(0.0, f64::max)
    });
    let current = most(&|case| {
        SHARES
            .map(|share| {
                let known = current_between(
                    case.rated,
                    Bracket { low: case.idle, high: case.idle },
                    Ratio::from_fraction(share),
                    FLUX,
                );
                let exact = case.circuit.at(case.slip_at(share)).current.amperes();
                off(known.expect("below rated").0.amperes(), exact).abs()
            })
            .into_iter()
            .fold(0.0, f64::max)
    });
    format!(
        "In short: the exact no-load current lies inside the bracket every time. With the exact no-load current the \
         current formula is at most {current:.1} % off from a quarter to five quarters of rated torque. At 1.5 times rated current \
         the torque taken is up to {too_much:.1} % more than these machines give at rated volts, which the margins on measured \
         ramps have to cover (a drive that holds the flux gives more than fixed volts do). Slip in proportion to torque \
         is at most {slip:.1} % of rated slip off.\n"
    )
}

/// Exact, smaller, larger and taken torque over rated torque at a multiple of rated current.
fn torques(case: &Case, multiple: f64) -> (f64, f64, f64, f64) {
    let current = Current::from_amperes(multiple * case.rated.amperes());
    let (less, more) = torque_between(case.rated, case.by_plate, current, FLUX).expect("below rated");
    let taken = less.fraction().min(case.lambda.fraction() / BREAKDOWN_MARGIN);
    (case.torque_at(multiple), less.fraction(), more.fraction(), taken)
}

/// Exact and estimated slip in rpm at a share of rated torque.
fn slips(case: &Case, share: f64) -> (f64, f64) {
    let field = case.circuit.synchronous().rpm();
    let rated = Speed::from_rpm(case.slip.fraction() * field);
    let estimate =
        variable_frequency::speed(case.circuit.frequency, case.circuit.pole_pairs, rated, Ratio::from_fraction(share));
    (case.slip_at(share).fraction() * field, field - estimate.rpm())
}

fn solved() -> Vec<Case> {
    machines().iter().map(Case::of).collect()
}

/// What the page says must stay so: the bracket holds the exact value, and no estimate errs by more than it admits.
#[test]
fn the_estimates_err_no_more_than_stated() {
    for case in solved() {
        let (id, exact) = (&case.id, case.idle.amperes());
        assert!(case.lambda.fraction() > USUAL_BREAKDOWN.value, "{id}: the assumed λ is on the low side");
        for bracket in [case.by_plate, case.by_assumption] {
            assert!(bracket.low.amperes() < exact && exact < bracket.high.amperes(), "{id}: {bracket:?} {exact}");
        }
        for share in SHARES {
            let exact = case.circuit.at(case.slip_at(share)).current.amperes();
            let by_idle = Bracket { low: case.idle, high: case.idle };
            let known = current_between(case.rated, by_idle, Ratio::from_fraction(share), FLUX).expect("below rated").0;
            assert!(off(known.amperes(), exact).abs() < 4.5, "{id} at {share}: {known:?} {exact}");
            let (exact, estimate) = slips(&case, share);
            let rated = case.slip.fraction() * case.circuit.synchronous().rpm();
            assert!(((estimate - exact) / rated).abs() < 0.09, "{id} at {share}: {exact} {estimate}");
        }
    }
}

#[test]
fn the_page_is_what_the_machines_say() {
    let path = PathBuf::from(env!("CARGO_MANIFEST_DIR")).join("../../docs/engineering-basis/machines.md");
    let page = page(&solved());
    if std::env::var_os("ASLEFT_WRITE_DOCS").is_some() {
        std::fs::write(&path, &page).expect("written");
    }
    let kept = std::fs::read_to_string(&path).unwrap_or_default();
    assert!(kept == page, "docs/engineering-basis/machines.md is out of date: write it anew with ASLEFT_WRITE_DOCS=1");
}
