//! One member under one combination: movements, strain, stress, end force (steps L, D, E, S, F).
use super::factor::times_factor;
use super::relative;
use super::{CaseLoad, MemberBase};
use crate::catalogue::element::{bar, bar3, bending, joint, movement};
use crate::catalogue::symbol::*;
use crate::formula::{Definition, Scope, Source, Symbol, Tree, Value, Worksheet, source};
use crate::model::{Combination, Member, MemberKind};
use crate::units::Measure;
use std::sync::LazyLock;

/// Stated movements of a member's ends: global x, y and the member's own rotation.
#[derive(Debug, Clone, Copy)]
pub struct Movements {
    /// Start, end.
    pub ends: [[Value; 3]; 2],
    /// Middle node of a three-node bar.
    pub middle: Option<[Value; 2]>,
    /// A tension-only bar that carries nothing under this combination.
    pub slack: bool,
}

/// What a member does under a combination. Start first, end second; `None` where the kind has no such thing.
#[derive(Debug, Clone, Default)]
#[allow(missing_docs, reason = "named as in the results file")]
pub struct MemberForces {
    pub n: [Option<Value>; 2],
    pub v: [Option<Value>; 2],
    pub m: [Option<Value>; 2],
    pub axial_strain: [Option<Value>; 2],
    pub curvature: [Option<Value>; 2],
    /// Stress of the top and the bottom fibre; equal for bars.
    pub top: [Option<Value>; 2],
    pub bottom: [Option<Value>; 2],
    /// Force on the start and the end joint in global X and Y; the couples are m and −m.
    pub on_joint: [[Option<Value>; 2]; 2],
    /// Rotation of the start relative to the chord.
    pub start_rotation: Option<Value>,
    /// Elongation and, of a three-node bar, movement of its middle.
    pub elongation: Option<Value>,
    /// Fixed-end actions of the combination: N_F1, N_F2, V_F1, V_F2, M_F1, M_F2, F_m.
    pub fixed: [Option<Value>; 7],
    /// Every symbol known at the end, for the steps that follow.
    pub known: Vec<(Symbol, Value)>,
}

/// A load with the factor of its case: as an operand, and as a number.
pub type FactoredLoad<'a> = (Option<Value>, f64, &'a CaseLoad);

type Known = LazyLock<Definition>;

/// Works a member under a combination. `loads` holds each load with the factor of its case.
pub fn work_member(
    sheet: &mut dyn Worksheet,
    member: &Member,
    combination: &Combination,
    base: &MemberBase,
    loads: &[FactoredLoad<'_>],
    movements: &Movements,
) -> MemberForces {
    let mut scope = Scope::new(sheet, &member.name, Some(&combination.name));
    scope.inherit(&base.known);
    let [[x1, y1, p1], [x2, y2, p2]] = movements.ends;
    for (symbol, value) in [(XU1, x1), (YU1, y1), (P1, p1), (XU2, x2), (YU2, y2), (P2, p2)] {
        scope.set(&symbol, value);
    }
    let mut chain = Chain { scope, kind: member.kind, out: MemberForces::default() };
    // Warming and lack of fit do nothing to a bar that is slack.
    let acting: Vec<FactoredLoad<'_>> =
        loads.iter().filter(|(_, _, load)| !(movements.slack && load.worked.is_strain())).copied().collect();
    chain.fixed_end(&acting);
    chain.movements(movements.middle);
    if movements.slack {
        chain.slack(loads);
    } else {
        chain.strains();
        chain.stresses();
        chain.forces();
    }
    chain.out.known = chain.scope.known().to_vec();
    chain.out
}

struct Chain<'w> {
    scope: Scope<'w>,
    kind: MemberKind,
    out: MemberForces,
}

impl Chain<'_> {
    fn step(&mut self, letter: char, nn: u16, definition: &Known) -> Value {
        self.scope.work(letter, nn, definition)
    }

    const fn stretches(&self) -> bool {
        !matches!(self.kind, MemberKind::Beam)
    }

    const fn bends(&self) -> bool {
        matches!(self.kind, MemberKind::Beam | MemberKind::Frame)
    }

    /// Fixed-end actions of the whole combination: each load's own times the factor of its case.
    fn fixed_end(&mut self, loads: &[FactoredLoad<'_>]) {
        for (at, symbol) in [NF1, NF2, VF1, VF2, MF1, MF2, FM].into_iter().enumerate() {
            let parts = parts(loads, at);
            if parts.is_empty() {
                continue;
            }
            let measure = if at == 4 || at == 5 { Measure::Moment } else { Measure::Force };
            let value =
                weighted_sum(&mut self.scope, &symbol, measure, &parts, ('L', at as u16 + 1), &source::FIXED_END);
            self.out.fixed[at] = Some(value);
        }
    }

    fn movements(&mut self, middle: Option<[Value; 2]>) {
        self.step('D', 1, &movement::RELATIVE_X);
        self.step('D', 2, &movement::RELATIVE_Y);
        if self.stretches() {
            self.out.elongation = Some(relative::ELONGATION.work(&mut self.scope));
        }
        if self.bends() {
            self.step('D', 4, &movement::CROSS_MOVEMENT);
            self.step('D', 5, &movement::CHORD_ROTATION);
            self.out.start_rotation = Some(relative::START_ROTATION.work(&mut self.scope));
            relative::END_ROTATION.work(&mut self.scope);
        }
        if let (MemberKind::Bar3, Some([x, y])) = (self.kind, middle) {
            self.scope.set(&XUM, x);
            self.scope.set(&YUM, y);
            self.step('D', 8, &movement::MIDDLE_X);
            self.step('D', 9, &movement::MIDDLE_Y);
            relative::MIDDLE_MOVEMENT.work(&mut self.scope);
        }
    }

    fn strains(&mut self) {
        let loaded = |fixed: Option<Value>| fixed.is_some();
        let [n1, n2, _, _, m1, m2, _] = self.out.fixed.map(loaded);
        match self.kind {
            MemberKind::Bar | MemberKind::Frame => {
                if n1 || n2 {
                    self.step('E', 1, &bar::STRAIN);
                    self.step('E', 11, &bar::LOAD_STRAIN_START);
                    self.step('E', 12, &bar::LOAD_STRAIN_END);
                    let start = self.step('E', 21, &bar::STRAIN_START);
                    let end = self.step('E', 22, &bar::STRAIN_END);
                    self.out.axial_strain = [Some(start), Some(end)];
                } else {
                    let strain = self.step('E', 1, &bar::STRAIN_UNLOADED);
                    self.scope.set(&E2, strain);
                    self.out.axial_strain = [Some(strain); 2];
                }
            }
            MemberKind::Bar3 => {
                let (start, end) = if n1 || n2 {
                    self.step('E', 1, &bar3::STRAIN_START_MOVEMENT);
                    self.step('E', 2, &bar3::STRAIN_END_MOVEMENT);
                    self.step('E', 11, &bar::LOAD_STRAIN_START);
                    self.step('E', 12, &bar::LOAD_STRAIN_END);
                    (self.step('E', 21, &bar3::STRAIN_START), self.step('E', 22, &bar3::STRAIN_END))
                } else {
                    (self.step('E', 1, &bar3::STRAIN_START_UNLOADED), self.step('E', 2, &bar3::STRAIN_END_UNLOADED))
                };
                self.out.axial_strain = [Some(start), Some(end)];
            }
            MemberKind::Beam => {}
        }
        if self.bends() {
            let slender = self.scope.get(&PHI).is_none();
            let [start, end]: [&Known; 2] = if slender {
                [&bending::CURVATURE_START_MOVEMENT, &bending::CURVATURE_END_MOVEMENT]
            } else {
                [&bending::CURVATURE_START_MOVEMENT_SHEAR, &bending::CURVATURE_END_MOVEMENT_SHEAR]
            };
            let mut curvature = [self.step('E', 3, start), self.step('E', 4, end)];
            for (at, loaded, part, total, symbol) in [
                (0, m1, &bending::LOAD_CURVATURE_START, &bending::CURVATURE_START, K1),
                (1, m2, &bending::LOAD_CURVATURE_END, &bending::CURVATURE_END, K2),
            ] {
                if loaded {
                    self.step('E', 13 + at as u16, part);
                    curvature[at] = self.step('E', 23 + at as u16, total);
                } else {
                    self.scope.set(&symbol, curvature[at]);
                }
            }
            self.out.curvature = curvature.map(Some);
        }
    }

    fn stresses(&mut self) {
        let has_fibres = self.scope.get(&YT).is_some() && self.scope.get(&YB).is_some();
        if !self.bends() {
            let start = self.step('S', 1, &bar::STRESS_START);
            let same = self.out.axial_strain[0] == self.out.axial_strain[1];
            let end = if same { start } else { self.step('S', 3, &bar::STRESS_END) };
            self.out.top = [Some(start), Some(end)];
            self.out.bottom = self.out.top;
        } else if has_fibres {
            let [t1, b1, t2, b2]: [&Known; 4] = if self.kind == MemberKind::Frame {
                [
                    &bending::STRESS_TOP_START,
                    &bending::STRESS_BOTTOM_START,
                    &bending::STRESS_TOP_END,
                    &bending::STRESS_BOTTOM_END,
                ]
            } else {
                [
                    &bending::BENDING_STRESS_TOP_START,
                    &bending::BENDING_STRESS_BOTTOM_START,
                    &bending::BENDING_STRESS_TOP_END,
                    &bending::BENDING_STRESS_BOTTOM_END,
                ]
            };
            let [t1, b1] = [self.step('S', 1, t1), self.step('S', 2, b1)];
            let [t2, b2] = [self.step('S', 3, t2), self.step('S', 4, b2)];
            self.out.top = [Some(t1), Some(t2)];
            self.out.bottom = [Some(b1), Some(b2)];
        }
    }

    fn forces(&mut self) {
        if self.stretches() {
            let start = self.step('F', 1, &bar::FORCE_START);
            let same = self.out.axial_strain[0] == self.out.axial_strain[1];
            let end = if same { start } else { self.step('F', 4, &bar::FORCE_END) };
            self.scope.set(&N2, end);
            self.out.n = [Some(start), Some(end)];
        }
        if self.bends() {
            let shear = |fixed: Option<Value>, plain, loaded| if fixed.is_some() { loaded } else { plain };
            let start: &Known = shear(self.out.fixed[2], &bending::SHEAR_START_UNLOADED, &bending::SHEAR_START);
            let end: &Known = shear(self.out.fixed[3], &bending::SHEAR_END_UNLOADED, &bending::SHEAR_END);
            let v1 = self.step('F', 2, start);
            let m1 = self.step('F', 3, &bending::MOMENT_START);
            let v2 = self.step('F', 5, end);
            let m2 = self.step('F', 6, &bending::MOMENT_END);
            self.out.v = [Some(v1), Some(v2)];
            self.out.m = [Some(m1), Some(m2)];
        }
        if self.kind == MemberKind::Bar3 {
            let loaded = self.out.fixed[6].is_some();
            self.scope.balance('N', 31, if loaded { &bar3::MIDDLE_BALANCE } else { &bar3::MIDDLE_BALANCE_UNLOADED });
        }
        let [x1, y1, x2, y2]: [&Known; 4] = match self.kind {
            MemberKind::Frame => [&joint::START_X, &joint::START_Y, &joint::END_X, &joint::END_Y],
            MemberKind::Beam => [&joint::BEAM_START_X, &joint::BEAM_START_Y, &joint::BEAM_END_X, &joint::BEAM_END_Y],
            _ => [&joint::BAR_START_X, &joint::BAR_START_Y, &joint::BAR_END_X, &joint::BAR_END_Y],
        };
        // A part that a direction cosine of zero makes vanish is not written out.
        let [c, s] = [C, S].map(|symbol| self.scope.get(&symbol).map_or(0.0, |v| v.si) != 0.0);
        let [has_x, has_y] = match self.kind {
            MemberKind::Frame => [true, true],
            MemberKind::Beam => [s, c],
            _ => [c, s],
        };
        let mut part = |has: bool, nn, definition| has.then(|| self.scope.work('F', nn, definition));
        self.out.on_joint = [[part(has_x, 11, x1), part(has_y, 12, y1)], [part(has_x, 13, x2), part(has_y, 14, y2)]];
    }

    /// A slack bar strains with its ends and carries nothing: taut, it would be in compression.
    fn slack(&mut self, loads: &[FactoredLoad<'_>]) {
        let mut loaded = false;
        for (at, symbol) in [NS1, NS2].into_iter().enumerate() {
            let parts = parts(loads, at);
            if !parts.is_empty() {
                let number = ('L', at as u16 + 8);
                weighted_sum(&mut self.scope, &symbol, Measure::Force, &parts, number, &source::FIXED_END);
                loaded = true;
            }
        }
        self.step('F', 7, if loaded { &bar::FORCE_IF_TAUT } else { &bar::FORCE_IF_TAUT_UNLOADED });
        self.scope.sheet().remark(None, Some("In compression the bar is slack: it carries nothing."));
        let zero = Value::silent(0.0);
        self.out.n = [Some(zero); 2];
        self.out.axial_strain = [Some(zero); 2];
        self.out.top = [Some(zero); 2];
        self.out.bottom = [Some(zero); 2];
        if self.out.fixed[6].is_some() {
            let [c, s] = [C, S].map(|symbol| self.scope.get(&symbol).map_or(0.0, |v| v.si) != 0.0);
            let mut part = |has: bool, nn, definition: &Known| has.then(|| self.scope.work('F', nn, definition));
            let [x1, y1, x2, y2]: [&Known; 4] = if self.out.fixed[0].is_some() && self.out.fixed[1].is_some() {
                [&joint::SLACK_START_X, &joint::SLACK_START_Y, &joint::SLACK_END_X, &joint::SLACK_END_Y]
            } else {
                [
                    &joint::SLACK_EVEN_START_X,
                    &joint::SLACK_EVEN_START_Y,
                    &joint::SLACK_EVEN_END_X,
                    &joint::SLACK_EVEN_END_Y,
                ]
            };
            self.out.on_joint = [[part(c, 11, x1), part(s, 12, y1)], [part(c, 13, x2), part(s, 14, y2)]];
        }
    }
}

/// One of the fixed-end actions of each load that has it, with the factor of its case.
fn parts(loads: &[FactoredLoad<'_>], at: usize) -> Vec<(Option<Value>, Value)> {
    loads
        .iter()
        .filter_map(|(factor, size, load)| load.worked.fixed[at].filter(|_| *size != 0.0).map(|v| (*factor, v)))
        .collect()
}

/// A sum of values, each times its factor, as a step of its own.
pub(super) fn weighted_sum(
    scope: &mut Scope<'_>,
    symbol: &Symbol,
    measure: Measure,
    parts: &[(Option<Value>, Value)],
    (letter, nn): (char, u16),
    source: &'static Source,
) -> Value {
    let stem = symbol.stem().to_owned();
    let terms = parts
        .iter()
        .enumerate()
        .map(|(at, (factor, value))| {
            let part = Symbol::indexed(&stem, at + 1);
            scope.set(&part, *value);
            times_factor(scope, at + 1, *factor, part)
        })
        .collect();
    let definition =
        Definition::new(symbol.clone(), crate::catalogue::meaning(symbol), measure, Tree::sum(terms)).from(source);
    scope.work(letter, nn, &definition)
}
