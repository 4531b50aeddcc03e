//! Formulas for what happens at a place between the ends: end values carried along, each load from where it begins.
//!
//! A load counts from its own place on; a load that has ended is continued and the continuation taken off again.
use crate::catalogue::load::Local;
use crate::catalogue::symbol::*;
use crate::formula::{Definition, Scope, Source, Symbol, Tree, Value, source};
use crate::units::Measure;

/// A place along a member: its symbol, its distance, and whether a jump there counts.
#[derive(Debug, Clone)]
pub struct At {
    /// Symbol of the distance.
    pub symbol: Symbol,
    /// Distance from the start, m.
    pub x: f64,
    /// Whether loads at this very place count.
    pub after: bool,
}

/// The factored loads of a member, ready to be set into formulas.
#[derive(Debug, Clone)]
pub struct Between {
    loads: Vec<Term>,
    has_shear_flexibility: bool,
}

#[derive(Debug, Clone)]
struct Term {
    factor: Option<Symbol>,
    load: Local,
    index: usize,
}

impl Between {
    /// Makes the loads' symbols known in the scope. A factor of `None` is 1.
    pub fn new(scope: &mut Scope<'_>, loads: &[(Option<Value>, Local)]) -> Self {
        let mut terms = Vec::new();
        for (at, (factor, load)) in loads.iter().enumerate() {
            let index = at + 1;
            let mut set = |stem: &str, value: Value| scope.set(&Symbol::indexed(stem, index), value);
            if let Some(factor) = factor {
                set("γ", *factor);
            }
            match load {
                Local::Line { a, b, along, across } => {
                    a.iter().for_each(|v| set("a", *v));
                    b.iter().for_each(|v| set("b", *v));
                    for (stems, pair) in [(["p", "q"], across), (["u", "t"], along)] {
                        if let Some([first, last]) = pair {
                            set(stems[0], *first);
                            set(stems[1], *last);
                        }
                    }
                }
                Local::Point { a, along, across } => {
                    set("a", *a);
                    along.iter().for_each(|v| set("H", *v));
                    across.iter().for_each(|v| set("P", *v));
                }
                Local::Couple { a, m } => {
                    set("a", *a);
                    set("m", *m);
                }
                Local::Curvature(curvature) => set("κ_T", *curvature),
            }
            terms.push(Term { factor: factor.map(|_| Symbol::indexed("γ", index)), load: *load, index });
        }
        let has_shear_flexibility = scope.get(&BV).is_some() && scope.get(&PHI).is_some();
        Self { loads: terms, has_shear_flexibility }
    }

    /// Axial force at a place.
    #[must_use]
    pub fn axial(&self, at: &At, symbol: &Symbol) -> Definition {
        let mut terms = vec![N1.tree()];
        for term in &self.loads {
            match &term.load {
                Local::Line { along: Some(pair), .. } => {
                    terms.extend(term.line(at, "u", "t", pair, 1).into_iter().map(|t| -t))
                }
                Local::Point { along: Some(_), a, .. } if reached(a.si, at) => {
                    terms.push(-term.factored(term.symbol("H")))
                }
                _ => {}
            }
        }
        define(symbol, "Axial force", at, Measure::Force, signed_sum(terms), &source::STATICS)
    }

    /// Shear force at a place.
    #[must_use]
    pub fn shear(&self, at: &At, symbol: &Symbol) -> Definition {
        define(symbol, "Shear force", at, Measure::Force, signed_sum(self.shear_terms(at)), &source::STATICS)
    }

    fn shear_terms(&self, at: &At) -> Vec<Tree> {
        let mut terms = vec![V1.tree()];
        for term in &self.loads {
            match &term.load {
                Local::Line { across: Some(pair), .. } => terms.extend(term.line(at, "p", "q", pair, 1)),
                Local::Point { across: Some(_), a, .. } if reached(a.si, at) => {
                    terms.push(term.factored(term.symbol("P")))
                }
                _ => {}
            }
        }
        terms
    }

    /// Bending moment at a place.
    #[must_use]
    pub fn moment(&self, at: &At, symbol: &Symbol) -> Definition {
        let x = at.symbol.tree();
        let mut terms = vec![M1.tree(), V1 * x];
        terms.extend(self.across(at, 2));
        for term in &self.loads {
            if let Local::Couple { a, .. } = &term.load
                && reached(a.si, at)
            {
                terms.push(-term.factored(term.symbol("m")));
            }
        }
        define(symbol, "Bending moment", at, Measure::Moment, signed_sum(terms), &source::STATICS)
    }

    /// Slope from the chord at a place; zero where the deflection peaks.
    #[must_use]
    pub fn slope(&self, at: &At, symbol: &Symbol) -> Definition {
        let x = || at.symbol.tree();
        let mut bent = vec![M1 * x(), V1 * x().squared() / 2];
        bent.extend(self.across(at, 3));
        bent.extend(self.couples(at, 1));
        let mut terms = vec![T1.tree(), signed_sum(bent) / BB];
        terms.extend(self.free(|curvature| curvature * x()));
        if self.has_shear_flexibility {
            terms.push(-(signed_sum(self.shear_terms(at)) / BV));
        }
        define(symbol, "Slope from the chord", at, Measure::Rotation, signed_sum(terms), &source::BENDING)
    }

    /// Deflection from the chord at a place.
    #[must_use]
    pub fn deflection(&self, at: &At, symbol: &Symbol) -> Definition {
        let x = || at.symbol.tree();
        let mut bent = vec![M1 * x().squared() / 2, V1 * x().cubed() / 6];
        bent.extend(self.across(at, 4));
        bent.extend(self.couples(at, 2));
        let mut terms = vec![T1 * x(), signed_sum(bent) / BB];
        terms.extend(self.free(|curvature| curvature * x().squared() / 2));
        if self.has_shear_flexibility {
            let mut sheared = vec![V1 * x()];
            sheared.extend(self.across(at, 2));
            terms.push(-(signed_sum(sheared) / BV));
        }
        define(symbol, "Deflection from the chord", at, Measure::Length, signed_sum(terms), &source::BENDING)
    }

    /// Loads across the member summed `times` times along it, from each load's place to `at`.
    fn across(&self, at: &At, times: u8) -> Vec<Tree> {
        let mut terms = Vec::new();
        for term in &self.loads {
            match &term.load {
                Local::Line { across: Some(pair), .. } => terms.extend(term.line(at, "p", "q", pair, times)),
                Local::Point { across: Some(_), a, .. } if at.x > a.si => {
                    terms.push(term.factored(over(
                        term.symbol("P") * raised(term.from(at, "a"), times - 1),
                        factorial(times - 1),
                    )));
                }
                _ => {}
            }
        }
        terms
    }

    fn couples(&self, at: &At, times: u8) -> Vec<Tree> {
        let mut terms = Vec::new();
        for term in &self.loads {
            if let Local::Couple { a, .. } = &term.load
                && at.x > a.si
            {
                terms
                    .push(-term.factored(over(term.symbol("m") * raised(term.from(at, "a"), times), factorial(times))));
            }
        }
        terms
    }

    fn free(&self, shape: impl Fn(Tree) -> Tree) -> Vec<Tree> {
        self.loads
            .iter()
            .filter(|term| matches!(term.load, Local::Curvature(_)))
            .map(|term| term.factored(shape(term.symbol("κ_T"))))
            .collect()
    }
}

/// Whether a load at `a` counts at the place.
fn reached(a: f64, at: &At) -> bool {
    if at.after { a <= at.x } else { a < at.x }
}

impl Term {
    fn symbol(&self, stem: &str) -> Tree {
        Symbol::indexed(stem, self.index).into()
    }

    fn factored(&self, tree: Tree) -> Tree {
        match &self.factor {
            Some(factor) => factor.tree() * tree,
            None => tree,
        }
    }

    /// Distance from the load's place to `at`.
    fn from(&self, at: &At, stem: &str) -> Tree {
        at.symbol.tree() - self.symbol(stem)
    }

    /// A line load summed `times` times from where it begins to `at`, what lies beyond its end taken off.
    fn line(&self, at: &At, first: &str, last: &str, pair: &[Value; 2], times: u8) -> Vec<Tree> {
        let Local::Line { a, b, .. } = &self.load else { return Vec::new() };
        if a.is_some_and(|a| at.x <= a.si) {
            return Vec::new();
        }
        let slope = (pair[0] != pair[1]).then(|| {
            let reach = match (a, b) {
                (Some(_), Some(_)) => self.symbol("b") - self.symbol("a"),
                _ => L.tree(),
            };
            (self.symbol(last) - self.symbol(first)) / reach
        });
        let distance = if a.is_some() { self.from(at, "a") } else { at.symbol.tree() };
        let mut terms = self.ramp(self.symbol(first), slope.as_ref(), &distance, times);
        if b.is_some_and(|b| at.x > b.si) {
            let beyond = self.from(at, "b");
            terms.extend(self.ramp(self.symbol(last), slope.as_ref(), &beyond, times).into_iter().map(|t| -t));
        }
        terms
    }

    fn ramp(&self, intensity: Tree, slope: Option<&Tree>, distance: &Tree, times: u8) -> Vec<Tree> {
        let mut terms = vec![self.factored(over(intensity * raised(distance.clone(), times), factorial(times)))];
        if let Some(slope) = slope {
            terms.push(self.factored(over(slope.clone() * raised(distance.clone(), times + 1), factorial(times + 1))));
        }
        terms
    }
}

fn raised(tree: Tree, power: u8) -> Tree {
    if power == 1 { tree } else { tree.power(power as i8) }
}

fn over(tree: Tree, divisor: i32) -> Tree {
    if divisor == 1 { tree } else { tree / divisor }
}

fn factorial(n: u8) -> i32 {
    (1..=i32::from(n)).product()
}

fn signed_sum(terms: Vec<Tree>) -> Tree {
    Tree::sum(terms)
}

fn define(symbol: &Symbol, what: &str, at: &At, measure: Measure, tree: Tree, source: &'static Source) -> Definition {
    Definition::new(symbol.clone(), format!("{what} at {}", at.symbol), measure, tree).from(source)
}

/// The place where the shear force vanishes under loads that are uniform over the whole member.
#[must_use]
pub fn place_of_zero_shear(between: &Between, symbol: &Symbol) -> Option<Definition> {
    let mut intensity = Vec::new();
    for term in &between.loads {
        match &term.load {
            Local::Line { a: None, b: None, across: Some([first, last]), .. } if first == last => {
                intensity.push(term.factored(term.symbol("p")));
            }
            Local::Line { across: None, .. } | Local::Curvature(_) | Local::Point { across: None, .. } => {}
            _ => return None,
        }
    }
    (!intensity.is_empty()).then(|| {
        Definition::new(
            symbol.clone(),
            "Place where the shear force vanishes and the moment peaks",
            Measure::Span,
            -(V1 / Tree::sum(intensity)),
        )
        .from(&source::STATICS)
    })
}
