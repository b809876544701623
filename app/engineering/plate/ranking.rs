//! Which misreadings explain a plate best: how little strain is left, and how readily each happens.

use super::proposal::{Mistake, Proposal};
use super::relation::Relation;
use super::{Name, Plate, misreading, relations, usual};

/// Most misreadings that are told.
const MOST_TOLD: usize = 5;
/// What a broken relation costs, and one that no longer forms.
const BROKEN: (f64, f64) = (20.0, 8.0);
const NOT_FORMED: f64 = 1.5;
/// How much dearer than the best an explanation may be.
const WORTH_TELLING: f64 = 12.0;

impl Plate {
    /// Every relation that the figures form.
    #[must_use]
    pub fn relations(&self) -> Vec<Relation> {
        let mut all = Vec::new();
        relations::each(self, &mut |r| all.push(r));
        all
    }

    /// The single misreadings that would explain a contradiction, likeliest first; none where nothing contradicts,
    /// and none where no single one explains it.
    #[must_use]
    pub fn misreadings(&self) -> Vec<Proposal> {
        let now = standing(self);
        if !now.broken {
            return Vec::new();
        }
        let mut told: Vec<(f64, Proposal)> = Vec::new();
        misreading::each(self, &mut |proposal| {
            let would_be = standing(&proposal.applied(self));
            if would_be.broken {
                return;
            }
            let lost = f64::from(now.formed.saturating_sub(would_be.formed));
            let cost = would_be.cost + lost * NOT_FORMED + proposal.mistake.cost() + proposal.extra;
            keep(&mut told, cost, proposal);
        });
        told.sort_by(|a, b| a.0.total_cmp(&b.0));
        let best = told.first().map_or(0.0, |(cost, _)| *cost);
        told.into_iter().filter(|(cost, _)| *cost <= best + WORTH_TELLING).take(MOST_TOLD).map(|(_, p)| p).collect()
    }
}

/// Keeps the cheaper of two that come to the same, and of every figure's lost digits the one that fits best.
fn keep(told: &mut Vec<(f64, Proposal)>, cost: f64, proposal: Proposal) {
    let lost = |p: &Proposal| p.mistake == Mistake::DigitLost;
    let place = |p: &Proposal| (p.change.0, p.change.1);
    let twin = told
        .iter_mut()
        .find(|(_, p)| p.comes_to_the_same(&proposal) || (lost(p) && lost(&proposal) && place(p) == place(&proposal)));
    match twin {
        Some(twin) if twin.0 > cost => *twin = (cost, proposal),
        Some(_) => {}
        None => told.push((cost, proposal)),
    }
}

struct Standing {
    broken: bool,
    cost: f64,
    formed: u32,
}

/// How well a plate stands: whether anything is broken, and what is unusual about it.
fn standing(plate: &Plate) -> Standing {
    let mut standing = Standing { broken: false, cost: 0.0, formed: 0 };
    relations::each(plate, &mut |relation| {
        standing.formed += 1;
        standing.cost += relation.strain();
        if relation.is_broken() {
            standing.broken = true;
            standing.cost += if relation.firm { BROKEN.0 } else { BROKEN.1 };
        }
    });
    for column in &plate.columns {
        if let Some(volts) = column.get(Name::Volts) {
            standing.cost += if usual::is_usual_voltage(volts.value) { 0.0 } else { 3.0 };
        }
        if let Some(hertz) = column.get(Name::Hertz) {
            let supply = usual::is_supply(crate::quantity::Frequency::from_hertz(hertz.value));
            standing.cost += if supply { 0.0 } else { 4.0 };
        }
        if let Some(power) = column.get(Name::Power) {
            standing.cost += if usual::is_rating(power.number(), power.unit) { 0.0 } else { 3.0 };
        }
    }
    standing
}
