//! Orders of magnitude from simple spans.
use crate::catalogue::load::Local;
use crate::catalogue::symbol::{L, MF1, MF2, MMAX};
use crate::formula::{Definition, Scope, Symbol, Tree, Value, Worksheet, source};
use crate::model::{Combination, Member};
use crate::units::Measure;
use crate::work::factor::factor_symbol;
use crate::work::{Extremes, FactoredLoad, MemberForces};

/// Moment of a member against the sum of what each load would give on a simple span (steps X61, X62).
///
/// Where every load spans the member, is a point force or a couple the sum is of w·L²/8, P·a·b/L and m·max(a, b)/L;
/// any other load counts as if it stood at mid-span, W·L/4. The sum is an upper bound of the simple-span moment.
pub fn work_bound(
    sheet: &mut dyn Worksheet,
    member: &Member,
    combination: &Combination,
    loads: &[FactoredLoad<'_>],
    forces: &MemberForces,
    extremes: &Extremes,
) {
    let Some(peak) = extremes.moment.filter(|peak| peak.value.si != 0.0) else { return };
    let mut scope = Scope::new(sheet, &member.name, Some(&combination.name));
    scope.inherit(&forces.known);
    let mut terms = Vec::new();
    for (gamma, size, load) in loads {
        let Some(local) = load.worked.local.filter(|_| *size != 0.0) else { continue };
        let at = terms.len() + 1;
        let mut known = |stem: &str, value: Value| {
            let symbol = Symbol::indexed(stem, at);
            scope.set(&symbol, value);
            symbol
        };
        let term = match local {
            Local::Line { a: None, b: None, across: Some([first, last]), .. } if first == last => {
                Some(known("p", first).tree().absolute() * L.squared() / 8)
            }
            Local::Line { across: Some([first, last]), a, b, .. } => {
                let (first, last) = (known("p", first), known("q", last));
                let reach = match (a, b) {
                    (Some(a), Some(b)) => {
                        let (a, b) = (known("a", a), known("b", b));
                        b - a.tree()
                    }
                    _ => L.tree(),
                };
                let largest = Tree::Max(vec![first.tree().absolute(), last.tree().absolute()]);
                Some(largest * reach * L / 4)
            }
            Local::Point { a, across: Some(p), .. } => {
                let (p, a) = (known("P", p), known("a", a));
                Some(p.tree().absolute() * a.clone() * (L - a.tree()) / L)
            }
            Local::Couple { a, m } => {
                let (m, a) = (known("m", m), known("a", a));
                Some(m.tree().absolute() * Tree::Max(vec![a.tree(), L - a.tree()]) / L)
            }
            _ => None,
        };
        let Some(term) = term else { continue };
        terms.push(match factor_symbol(&mut scope, at, *gamma) {
            Some(factor) => factor.tree().absolute() * term,
            None => term,
        });
    }
    if terms.is_empty() {
        return;
    }
    let bound = Symbol::new("M_o");
    let title = "Order of magnitude: simple-span moments of the loads one by one, added";
    scope.work(
        'X',
        61,
        &Definition::new(bound.clone(), title, Measure::Moment, Tree::sum(terms)).from(&source::STATICS),
    );
    let largest = MMAX;
    scope.set(&largest, peak.value);
    let title = "Largest moment over that order of magnitude";
    let ratio = scope.work(
        'X',
        62,
        &Definition::new(Symbol::new("ρ_M"), title, Measure::Number, largest.tree().absolute() / bound)
            .from(&source::STATICS),
    );
    if ratio.si > 1.0 {
        scope.sheet().remark(None, Some("Above 1: the moment comes from the ends, not from the loads between them; see that sway or overhang explains it."));
    } else if ratio.si < 0.5 {
        scope.sheet().remark(
            None,
            Some("Below 0.5: the ends take most of the load's moment, or loads of both senses stand on the member."),
        );
    }
    if scope.get(&MF1).is_some_and(|m| m.si != 0.0) && scope.get(&MF2).is_some() {
        let fixed = Tree::Max(vec![MF1.tree().absolute(), MF2.tree().absolute()]);
        let title = "Largest moment over the larger fixed-end moment of the loads, w·L²/12 where one uniform load acts";
        let tree = MMAX.tree().absolute() / fixed;
        scope.work(
            'X',
            63,
            &Definition::new(Symbol::new("ρ_F"), title, Measure::Number, tree).from(&source::FIXED_END),
        );
    }
}
