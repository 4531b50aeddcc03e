//! Deflections again by a unit load on a simple span.
use crate::catalogue::load::Local;
use crate::catalogue::symbol::{BB, BV, L, M1, M2, XDEF};
use crate::formula::{Definition, Scope, Symbol, Tree, Value, Worksheet, source};
use crate::model::{Combination, Member};
use crate::units::Measure;
use crate::work::factor::times_factor;
use crate::work::{Extremes, FactoredLoad, MemberForces};

/// The deflection again by unit load on a simple span, from the end moments and the loads (steps X71, X72).
///
/// # Source
/// With the unit force at x of a simple span L, b = L − x: ∫m·M gives x·b·(L + b)/(6L) for M₁, x·b·(L + x)/(6L) for
/// M₂; a uniform load gives x(L³ − 2Lx² + x³)/24, a force at a, beyond x, x(L − a)(L² − (L − a)² − x²)/(6L).
pub fn work_unit_load(
    sheet: &mut dyn Worksheet,
    member: &Member,
    combination: &Combination,
    loads: &[FactoredLoad<'_>],
    forces: &MemberForces,
    extremes: &Extremes,
) {
    let Some(peak) = extremes.deflection.filter(|peak| peak.value.si != 0.0 && peak.value.id != u32::MAX) else {
        return;
    };
    let mut scope = Scope::new(sheet, &member.name, Some(&combination.name));
    scope.inherit(&forces.known);
    if scope.get(&BV).is_some() {
        // The simple-span formulas know no shear deformation.
        return;
    }
    let x = XDEF;
    let Some(place) = extremes.deflection_place else { return };
    scope.set(&x, place);
    let x = || x.tree();
    let rest = || L - x();
    let mut terms = vec![-(M1 * x() * rest() * (L + rest()) / (6 * L)), -(M2 * x() * rest() * (L + x()) / (6 * L))];
    let mut free = Vec::new();
    for (at, (gamma, size, load)) in loads.iter().enumerate() {
        let Some(local) = load.worked.local.filter(|_| *size != 0.0) else { continue };
        let index = at + 1;
        let mut known = |stem: &str, value: Value| {
            let symbol = Symbol::indexed(stem, index);
            scope.set(&symbol, value);
            symbol
        };
        let (term, is_free) = match local {
            Local::Line { a: None, b: None, across: Some([first, last]), .. } if first == last => {
                (known("p", first) * x() * (L.cubed() - 2 * L * x().squared() + x().cubed()) / 24, false)
            }
            Local::Point { a, across: Some(p), .. } => {
                let beyond = a.si >= place.si;
                let (p, a) = (known("P", p), known("a", a));
                let back = || L - a.tree();
                let term = if beyond {
                    p * x() * back() * (L.squared() - back().squared() - x().squared()) / (6 * L)
                } else {
                    p * rest() * a.clone() * (L.squared() - a.squared() - rest().squared()) / (6 * L)
                };
                (term, false)
            }
            Local::Curvature(curvature) => (-(known("κ_T", curvature) * x() * rest() / 2), true),
            Local::Line { across: None, .. } | Local::Point { across: None, .. } => continue,
            // Loads over a part and couples have no short formula here.
            _ => return,
        };
        let term = times_factor(&mut scope, index, *gamma, term);
        if is_free { free.push(term) } else { terms.push(term) }
    }
    let mut all = vec![Tree::sum(terms) / BB];
    all.extend(free);
    let symbol = Symbol::new("v_u");
    let title = "The same deflection by a unit load on a simple span";
    scope.work(
        'X',
        71,
        &Definition::new(symbol.clone(), title, Measure::Length, Tree::sum(all)).from(&source::UNIT_LOAD),
    );
    let first = Symbol::new("v_x");
    scope.set(&first, peak.value);
    let difference = Definition::new(
        Symbol::new("B_v"),
        "Difference of the two deflections",
        Measure::Length,
        symbol - first.tree(),
    )
    .from(&source::UNIT_LOAD);
    scope.balance('X', 72, &difference);
}
