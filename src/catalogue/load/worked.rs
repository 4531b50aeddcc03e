//! One load worked on one member: which formulas apply, in which order, under which numbers.
use super::bench::{Bench, Known, nn};
use super::{component, couple, fixed_end, line, point, strain, taper, uniform};
use crate::catalogue::symbol::*;
use crate::formula::{Scope, Symbol, Value, Worksheet};
use crate::model::{Direction, MemberKind, MemberLoad};

/// The values of one load as they stand in the input.
#[derive(Debug, Clone, Copy, Default)]
#[allow(missing_docs, reason = "named as the symbols of the same letters")]
pub struct LoadInputs {
    pub w1: Option<Value>,
    pub w2: Option<Value>,
    pub a: Option<Value>,
    pub b: Option<Value>,
    pub p: Option<Value>,
    pub m: Option<Value>,
    pub top: Option<Value>,
    pub bottom: Option<Value>,
    pub too_long: Option<Value>,
}

/// A load in member axes, for what happens between the ends. `None` stands for zero, for `b` the member's end.
#[derive(Debug, Clone, Copy, PartialEq)]
#[allow(missing_docs, reason = "named as the symbols of the same letters")]
pub enum Local {
    Line {
        a: Option<Value>,
        b: Option<Value>,
        along: Option<[Value; 2]>,
        across: Option<[Value; 2]>,
    },
    Point {
        a: Value,
        along: Option<Value>,
        across: Option<Value>,
    },
    Couple {
        a: Value,
        m: Value,
    },
    /// A free curvature; uniform strain changes nothing between the ends.
    Curvature(Value),
}

/// What a load does: fixed-end actions, shares handed to the joints, resultant.
#[derive(Debug, Clone, Default)]
pub struct Worked {
    /// In member axes, unless the joints take all of it.
    pub local: Option<Local>,
    /// N_F1, N_F2, V_F1, V_F2, M_F1, M_F2, and the middle node's load of a three-node bar.
    pub fixed: [Option<Value>; 7],
    /// Global X, Y and couple handed to the start joint and to the end joint.
    pub share: [[Option<Value>; 3]; 2],
    /// Resultant in global X and Y, moment about the global origin.
    pub resultant: [Option<Value>; 3],
}

impl Worked {
    /// Whether it strains the member without any force, as warming and lack of fit do.
    #[must_use]
    pub fn is_strain(&self) -> bool {
        self.resultant.iter().all(Option::is_none) && self.share.iter().flatten().all(Option::is_none)
    }
}

/// Base of the step numbers of self-weight; the k-th load of a case on a member has base 100·k.
const SELF_WEIGHT_BASE: u16 = 50;

/// Works the `k`-th load (from 1) of a case on a member.
///
/// `known` holds the member's geometry and rigidities; `shear` is given where the member has shear flexibility.
pub fn work(
    sheet: &mut dyn Worksheet,
    (member, case): (&str, &str),
    known: &[(Symbol, Value)],
    kind: MemberKind,
    k: usize,
    load: &MemberLoad,
    inputs: &LoadInputs,
) -> Worked {
    let mut scope = Scope::new(sheet, member, Some(case));
    scope.inherit(known);
    let pairs = [
        (W1, inputs.w1),
        (W2, inputs.w2),
        (PA, inputs.a),
        (PB, inputs.b),
        (P, inputs.p),
        (MC, inputs.m),
        (TT, inputs.top),
        (TB, inputs.bottom),
        (TL, inputs.too_long),
    ];
    for (symbol, value) in pairs {
        if let Some(value) = value {
            scope.set(&symbol, value);
        }
    }
    let mut bench = Bench { scope: &mut scope, base: 100 * k as u16, kind, worked: Worked::default() };
    match load {
        MemberLoad::Line { direction, per_plan, over, start, end } => {
            bench.line(*direction, *per_plan, over.is_some(), (*start - *end).abs() > 0.0);
        }
        MemberLoad::Point { direction, at, .. } => bench.point(*direction, *at),
        MemberLoad::Moment { at, .. } => bench.couple(*at),
        MemberLoad::Warm { top, bottom } => bench.warm((*top - *bottom).abs() > 0.0),
        MemberLoad::TooLong { .. } => bench.too_long(),
    }
    bench.worked
}

/// Works the self-weight of a member, whose weight per length is known.
pub fn work_self_weight(
    sheet: &mut dyn Worksheet,
    (member, case): (&str, &str),
    known: &[(Symbol, Value)],
    kind: MemberKind,
) -> Worked {
    let mut scope = Scope::new(sheet, member, Some(case));
    scope.inherit(known);
    let mut bench = Bench { scope: &mut scope, base: SELF_WEIGHT_BASE, kind, worked: Worked::default() };
    let along = bench.part(S, nn::ALONG_1, &component::WEIGHT_ALONG);
    let across = bench.part(C, nn::ACROSS_1, &component::WEIGHT_ACROSS);
    bench.uniform(along, across);
    bench.worked
}

impl Bench<'_, '_> {
    fn line(&mut self, direction: Direction, per_plan: bool, partial: bool, sloping: bool) {
        use component as of;
        let [x1, x2, y1, y2]: [&Known; 4] = match (direction, per_plan) {
            (Direction::GlobalX, false) => {
                [&of::LINE_X_ALONG_1, &of::LINE_X_ALONG_2, &of::LINE_X_ACROSS_1, &of::LINE_X_ACROSS_2]
            }
            (Direction::GlobalY, false) => {
                [&of::LINE_Y_ALONG_1, &of::LINE_Y_ALONG_2, &of::LINE_Y_ACROSS_1, &of::LINE_Y_ACROSS_2]
            }
            (Direction::GlobalX, true) => {
                [&of::PLAN_X_ALONG_1, &of::PLAN_X_ALONG_2, &of::PLAN_X_ACROSS_1, &of::PLAN_X_ACROSS_2]
            }
            (Direction::GlobalY, true) => {
                [&of::PLAN_Y_ALONG_1, &of::PLAN_Y_ALONG_2, &of::PLAN_Y_ACROSS_1, &of::PLAN_Y_ACROSS_2]
            }
            _ => [&of::OWN_ALONG_1, &of::OWN_ALONG_2, &of::OWN_ACROSS_1, &of::OWN_ACROSS_2],
        };
        let (has_along, has_across) = self.directions(direction, per_plan);
        let mut pair = |has: bool, first: (u16, &Known), second: (u16, &Known)| {
            has.then(|| {
                let start = self.step(first.0, first.1);
                let end = if sloping { self.step(second.0, second.1) } else { start };
                [start, end]
            })
        };
        let along = pair(has_along, (nn::ALONG_1, x1), (nn::ALONG_2, x2));
        let across = pair(has_across, (nn::ACROSS_1, y1), (nn::ACROSS_2, y2));
        if !partial && !sloping {
            return self.uniform(along.map(|p| p[0]), across.map(|p| p[0]));
        }
        for (pair, first, second) in [(along, WX1, WX2), (across, WY1, WY2)] {
            if let Some([start, end]) = pair {
                self.scope.set(&first, start);
                self.scope.set(&second, end);
            }
        }
        let (a, b) = (self.value(&PA), self.value(&PB));
        if across.is_some() {
            self.sums_across(partial);
        }
        if along.is_some() {
            self.sums_along(partial);
        }
        self.spread(along.is_some(), across.is_some());
        self.worked.local = self.carried(along, across).map(|(along, across)| Local::Line { a, b, along, across });
        self.resultant(along.is_some(), across.is_some());
    }

    fn sums_across(&mut self, partial: bool) {
        let [sum, first, second, third]: [&Known; 4] = if partial {
            self.step(nn::SLOPE_ACROSS, &line::SLOPE_ACROSS);
            self.step(nn::BASE_ACROSS, &line::BASE_ACROSS);
            [&line::SUM_ACROSS, &line::FIRST_ACROSS, &line::SECOND_ACROSS, &line::THIRD_ACROSS]
        } else {
            [&taper::SUM_ACROSS, &taper::FIRST_ACROSS, &taper::SECOND_ACROSS, &taper::THIRD_ACROSS]
        };
        self.step(nn::SUM_ACROSS, sum);
        self.step(nn::FIRST_ACROSS, first);
        if self.bends() {
            self.step(nn::SECOND_ACROSS, second);
            self.step(nn::THIRD_ACROSS, third);
        }
    }

    fn sums_along(&mut self, partial: bool) {
        let [sum, first, second]: [&Known; 3] = if partial {
            self.step(nn::SLOPE_ALONG, &line::SLOPE_ALONG);
            self.step(nn::BASE_ALONG, &line::BASE_ALONG);
            [&line::SUM_ALONG, &line::FIRST_ALONG, &line::SECOND_ALONG]
        } else {
            [&taper::SUM_ALONG, &taper::FIRST_ALONG, &taper::SECOND_ALONG]
        };
        self.step(nn::SUM_ALONG, sum);
        self.step(nn::FIRST_ALONG, first);
        if self.kind == MemberKind::Bar3 {
            self.step(nn::SECOND_ALONG, second);
        }
    }

    /// Whether a load in a direction has parts along and across the member.
    fn directions(&self, direction: Direction, per_plan: bool) -> (bool, bool) {
        let (c, s) = (self.si(&C) != 0.0, self.si(&S) != 0.0);
        match direction {
            Direction::GlobalX => (c && (s || !per_plan), s),
            Direction::GlobalY => (s && (c || !per_plan), c),
            Direction::LocalX => (!per_plan, false),
            Direction::LocalY => (false, true),
        }
    }

    fn uniform(&mut self, along: Option<Value>, across: Option<Value>) {
        if along.is_some() {
            self.step(nn::SUM_ALONG, &uniform::SUM_ALONG);
            if self.kind == MemberKind::Frame {
                self.worked.fixed[0] = Some(self.step(nn::AXIAL_START, &uniform::AXIAL_START));
                self.worked.fixed[1] = Some(self.step(nn::AXIAL_END, &uniform::AXIAL_END));
            } else {
                self.step(nn::FIRST_ALONG, &uniform::FIRST_ALONG);
                if self.kind == MemberKind::Bar3 {
                    // The quadratic shape is exact for a uniform load: its end strains need no load part.
                    self.step(nn::SECOND_ALONG, &uniform::SECOND_ALONG);
                    self.worked.fixed[6] = Some(self.step(nn::MIDDLE, &fixed_end::THREE_NODE_MIDDLE));
                } else {
                    self.along_by_sums();
                }
            }
        }
        if across.is_some() {
            self.step(nn::SUM_ACROSS, &uniform::SUM_ACROSS);
            self.step(nn::FIRST_ACROSS, &uniform::FIRST_ACROSS);
            if self.bends() {
                self.worked.fixed[4] = Some(self.step(nn::MOMENT_START, &uniform::MOMENT_START));
                self.worked.fixed[5] = Some(self.step(nn::MOMENT_END, &uniform::MOMENT_END));
                self.worked.fixed[2] = Some(self.step(nn::SHEAR_START, &uniform::SHEAR_START));
                self.worked.fixed[3] = Some(self.step(nn::SHEAR_END, &uniform::SHEAR_END));
            } else {
                self.across_to_joints();
            }
        }
        self.shares();
        self.worked.local = self.carried(along, across).map(|(along, across)| Local::Line {
            a: None,
            b: None,
            along: along.map(|w| [w, w]),
            across: across.map(|w| [w, w]),
        });
        self.resultant(along.is_some(), across.is_some());
    }

    /// The end that a place coincides with, within rounding.
    fn end_at(&self, at: f64) -> Option<usize> {
        let length = self.si(&L);
        if at.abs() <= 1e-9 * length {
            Some(0)
        } else if (length - at).abs() <= 1e-9 * length {
            Some(1)
        } else {
            None
        }
    }

    fn point(&mut self, direction: Direction, at: f64) {
        let [x, y]: [&Known; 2] = match direction {
            Direction::GlobalX => [&component::POINT_X_ALONG, &component::POINT_X_ACROSS],
            Direction::GlobalY => [&component::POINT_Y_ALONG, &component::POINT_Y_ACROSS],
            _ => [&component::POINT_OWN_ALONG, &component::POINT_OWN_ACROSS],
        };
        let (has_along, has_across) = self.directions(direction, false);
        let along = has_along.then(|| self.step(nn::ALONG_1, x));
        let across = has_across.then(|| self.step(nn::ACROSS_1, y));
        if across.is_some() {
            self.step(nn::SUM_ACROSS, &point::SUM_ACROSS);
            self.step(nn::FIRST_ACROSS, &point::FIRST_ACROSS);
        }
        if along.is_some() {
            self.step(nn::SUM_ALONG, &point::SUM_ALONG);
            self.step(nn::FIRST_ALONG, &point::FIRST_ALONG);
        }
        if let Some(end) = self.end_at(at) {
            for (part, symbols) in [(along, [QX1, QX2]), (across, [QY1, QY2])] {
                if let Some(part) = part {
                    self.scope.set(&symbols[end], part);
                }
            }
            self.shares();
        } else {
            self.point_inside(along, across);
        }
        self.resultant(along.is_some(), across.is_some());
    }

    fn point_inside(&mut self, along: Option<Value>, across: Option<Value>) {
        if along.is_some() {
            if self.kind == MemberKind::Bar3 {
                self.step(nn::SECOND_ALONG, &point::SECOND_ALONG);
            }
            self.along_by_sums();
        }
        if across.is_some() {
            if !self.bends() {
                self.across_to_joints();
            } else if self.value(&PHI).is_none() {
                self.step(nn::BACK, &point::BACK_DISTANCE);
                self.worked.fixed[4] = Some(self.step(nn::MOMENT_START, &point::MOMENT_START));
                self.worked.fixed[5] = Some(self.step(nn::MOMENT_END, &point::MOMENT_END));
                self.worked.fixed[2] = Some(self.step(nn::SHEAR_START, &point::SHEAR_START));
                self.worked.fixed[3] = Some(self.step(nn::SHEAR_END, &point::SHEAR_END));
            } else {
                self.step(nn::SECOND_ACROSS, &point::SECOND_ACROSS);
                self.step(nn::THIRD_ACROSS, &point::THIRD_ACROSS);
                self.spread(false, true);
            }
        }
        self.shares();
        if let (Some((along, across)), Some(a)) = (self.carried(along, across), self.value(&PA)) {
            self.worked.local = Some(Local::Point { a, along, across });
        }
    }

    fn couple(&mut self, at: f64) {
        let Some(m) = self.value(&MC) else { return };
        self.worked.resultant[2] = Some(m);
        if !self.bends() {
            self.step(nn::JOINT + 2, &couple::JOINT_START);
            self.step(nn::JOINT + 3, &couple::JOINT_END);
            self.shares();
        } else if let Some(end) = self.end_at(at) {
            self.worked.share[end][2] = Some(m);
        } else {
            let [start, end]: [&Known; 2] = if self.value(&PHI).is_none() {
                [&couple::MOMENT_START_SLENDER, &couple::MOMENT_END_SLENDER]
            } else {
                [&couple::MOMENT_START, &couple::MOMENT_END]
            };
            self.worked.fixed[4] = Some(self.step(nn::MOMENT_START, start));
            self.worked.fixed[5] = Some(self.step(nn::MOMENT_END, end));
            self.worked.fixed[2] = Some(self.step(nn::SHEAR_START, &couple::SHEAR_START));
            self.worked.fixed[3] = Some(self.step(nn::SHEAR_END, &couple::SHEAR_END));
            self.worked.local = self.value(&PA).map(|a| Local::Couple { a, m });
        }
    }

    fn warm(&mut self, gradient: bool) {
        if gradient {
            self.step(nn::CENTROID_WARMING, &strain::CENTROID_WARMING);
        } else if let Some(top) = self.value(&TT) {
            self.scope.set(&TC, top);
        }
        if self.kind != MemberKind::Beam {
            self.worked.fixed[0] = Some(self.step(nn::AXIAL_START, &strain::AXIAL_START));
            self.worked.fixed[1] = Some(self.step(nn::AXIAL_END, &strain::AXIAL_END));
        }
        if gradient && self.bends() {
            let free = self.step(nn::FREE_CURVATURE, &strain::FREE_CURVATURE);
            self.worked.fixed[4] = Some(self.step(nn::MOMENT_START, &strain::MOMENT_START));
            self.worked.fixed[5] = Some(self.step(nn::MOMENT_END, &strain::MOMENT_END));
            self.worked.local = Some(Local::Curvature(free));
        }
    }

    fn too_long(&mut self) {
        if self.kind != MemberKind::Beam {
            self.worked.fixed[0] = Some(self.step(nn::AXIAL_START, &strain::MISFIT_START));
            self.worked.fixed[1] = Some(self.step(nn::AXIAL_END, &strain::MISFIT_END));
        }
    }
}
