//! The bench on which loads are worked: which fixed-end formulas follow from a load's sums, and what goes to the joints.
use super::{fixed_end, resultant, share};
use crate::catalogue::symbol::*;
use crate::formula::{Definition, Scope, Symbol, Value};
use crate::model::MemberKind;
use std::sync::LazyLock;

use super::worked::Worked;

/// Numbers of the steps of one load, after the base that belongs to it.
pub(super) mod nn {
    pub(in super::super) const ALONG_1: u16 = 1;
    pub(in super::super) const ALONG_2: u16 = 2;
    pub(in super::super) const ACROSS_1: u16 = 3;
    pub(in super::super) const ACROSS_2: u16 = 4;
    pub(in super::super) const BACK: u16 = 5;
    pub(in super::super) const SLOPE_ACROSS: u16 = 6;
    pub(in super::super) const BASE_ACROSS: u16 = 7;
    pub(in super::super) const SLOPE_ALONG: u16 = 8;
    pub(in super::super) const BASE_ALONG: u16 = 9;
    pub(in super::super) const SUM_ACROSS: u16 = 10;
    pub(in super::super) const FIRST_ACROSS: u16 = 11;
    pub(in super::super) const SECOND_ACROSS: u16 = 12;
    pub(in super::super) const THIRD_ACROSS: u16 = 13;
    pub(in super::super) const SUM_ALONG: u16 = 14;
    pub(in super::super) const FIRST_ALONG: u16 = 15;
    pub(in super::super) const SECOND_ALONG: u16 = 16;
    pub(in super::super) const MOMENT_START: u16 = 20;
    pub(in super::super) const MOMENT_END: u16 = 21;
    pub(in super::super) const SHEAR_START: u16 = 22;
    pub(in super::super) const SHEAR_END: u16 = 23;
    pub(in super::super) const AXIAL_START: u16 = 24;
    pub(in super::super) const AXIAL_END: u16 = 25;
    pub(in super::super) const MIDDLE: u16 = 26;
    pub(in super::super) const JOINT: u16 = 27;
    pub(in super::super) const SHARE: u16 = 31;
    pub(in super::super) const CENTROID_WARMING: u16 = 35;
    pub(in super::super) const FREE_CURVATURE: u16 = 36;
    pub(in super::super) const RESULTANT: u16 = 40;
}

/// One load on one member while it is worked.
pub(super) struct Bench<'s, 'w> {
    pub(super) scope: &'s mut Scope<'w>,
    pub(super) base: u16,
    pub(super) kind: MemberKind,
    pub(super) worked: Worked,
}

/// A definition that is built when it is first used.
pub(super) type Known = LazyLock<Definition>;

impl Bench<'_, '_> {
    pub(super) fn step(&mut self, nn: u16, definition: &Known) -> Value {
        self.scope.work('L', self.base + nn, definition)
    }

    pub(super) fn value(&self, symbol: &Symbol) -> Option<Value> {
        self.scope.get(symbol)
    }

    pub(super) fn si(&self, symbol: &Symbol) -> f64 {
        self.value(symbol).map_or(0.0, |v| v.si)
    }

    /// A part of the load that vanishes with a direction cosine.
    pub(super) fn part(&mut self, cosine: Symbol, nn: u16, definition: &Known) -> Option<Value> {
        (self.si(&cosine) != 0.0).then(|| self.step(nn, definition))
    }

    pub(super) const fn bends(&self) -> bool {
        matches!(self.kind, MemberKind::Beam | MemberKind::Frame)
    }

    pub(super) const fn stretches(&self) -> bool {
        matches!(self.kind, MemberKind::Bar3 | MemberKind::Frame)
    }

    /// The parts that the member itself carries between its ends.
    pub(super) fn carried<T>(&self, along: Option<T>, across: Option<T>) -> Option<(Option<T>, Option<T>)> {
        let along = along.filter(|_| self.stretches());
        let across = across.filter(|_| self.bends());
        (along.is_some() || across.is_some()).then_some((along, across))
    }

    /// Fixed-end actions and shares from the sums worked before.
    pub(super) fn spread(&mut self, along: bool, across: bool) {
        if along {
            self.along_by_sums();
        }
        if across {
            if self.bends() {
                let slender = self.value(&PHI).is_none();
                let [start, end]: [&Known; 2] = if slender {
                    [&fixed_end::MOMENT_START_SLENDER, &fixed_end::MOMENT_END_SLENDER]
                } else {
                    [&fixed_end::MOMENT_START, &fixed_end::MOMENT_END]
                };
                self.worked.fixed[4] = Some(self.step(nn::MOMENT_START, start));
                self.worked.fixed[5] = Some(self.step(nn::MOMENT_END, end));
                self.worked.fixed[2] = Some(self.step(nn::SHEAR_START, &fixed_end::SHEAR_START));
                self.worked.fixed[3] = Some(self.step(nn::SHEAR_END, &fixed_end::SHEAR_END));
            } else {
                self.across_to_joints();
            }
        }
        self.shares();
    }

    pub(super) fn along_by_sums(&mut self) {
        match self.kind {
            MemberKind::Frame => {
                self.worked.fixed[0] = Some(self.step(nn::AXIAL_START, &fixed_end::AXIAL_START));
                self.worked.fixed[1] = Some(self.step(nn::AXIAL_END, &fixed_end::AXIAL_END));
            }
            MemberKind::Bar3 => {
                self.worked.fixed[0] = Some(self.step(nn::AXIAL_START, &fixed_end::THREE_NODE_START));
                self.worked.fixed[1] = Some(self.step(nn::AXIAL_END, &fixed_end::THREE_NODE_END));
                self.worked.fixed[6] = Some(self.step(nn::MIDDLE, &fixed_end::THREE_NODE_MIDDLE));
            }
            MemberKind::Bar | MemberKind::Beam => {
                self.step(nn::JOINT, &fixed_end::JOINT_ALONG_START);
                self.step(nn::JOINT + 1, &fixed_end::JOINT_ALONG_END);
            }
        }
    }

    pub(super) fn across_to_joints(&mut self) {
        self.step(nn::JOINT + 2, &fixed_end::JOINT_ACROSS_START);
        self.step(nn::JOINT + 3, &fixed_end::JOINT_ACROSS_END);
    }

    /// Turns what goes to the joints into global axes.
    pub(super) fn shares(&mut self) {
        let ends: [(usize, Symbol, Symbol, [&Known; 6]); 2] = [
            (
                0,
                QX1,
                QY1,
                [
                    &share::START_X,
                    &share::START_Y,
                    &share::START_X_ALONG,
                    &share::START_Y_ALONG,
                    &share::START_X_ACROSS,
                    &share::START_Y_ACROSS,
                ],
            ),
            (
                1,
                QX2,
                QY2,
                [
                    &share::END_X,
                    &share::END_Y,
                    &share::END_X_ALONG,
                    &share::END_Y_ALONG,
                    &share::END_X_ACROSS,
                    &share::END_Y_ACROSS,
                ],
            ),
        ];
        let (c, s) = (self.si(&C) != 0.0, self.si(&S) != 0.0);
        for (end, along, across, of) in ends {
            let (has_along, has_across) = (self.value(&along).is_some(), self.value(&across).is_some());
            let [x, y] = match (has_along, has_across) {
                (true, true) => [Some(of[0]), Some(of[1])],
                (true, false) => [c.then_some(of[2]), s.then_some(of[3])],
                (false, true) => [s.then_some(of[4]), c.then_some(of[5])],
                (false, false) => [None, None],
            };
            let at = nn::SHARE + 2 * end as u16;
            self.worked.share[end][0] = x.map(|d| self.step(at, d));
            self.worked.share[end][1] = y.map(|d| self.step(at + 1, d));
        }
    }

    pub(super) fn resultant(&mut self, along: bool, across: bool) {
        let (c, s) = (self.si(&C) != 0.0, self.si(&S) != 0.0);
        let [x, y]: [Option<&Known>; 2] = match (along, across) {
            (true, true) => [Some(&resultant::BOTH_X), Some(&resultant::BOTH_Y)],
            (true, false) => [c.then_some(&resultant::ALONG_X), s.then_some(&resultant::ALONG_Y)],
            (false, true) => [s.then_some(&resultant::ACROSS_X), c.then_some(&resultant::ACROSS_Y)],
            (false, false) => [None, None],
        };
        self.worked.resultant[0] = x.map(|d| self.step(nn::RESULTANT, d));
        self.worked.resultant[1] = y.map(|d| self.step(nn::RESULTANT + 1, d));
        if along || across {
            let origin = resultant::about_origin(x.is_some(), y.is_some(), across);
            self.worked.resultant[2] = origin.map(|d| self.step(nn::RESULTANT + 2, d));
        }
    }
}
