//! Load cases: loads on the structure with their values.
mod comb;

use super::Figure;
use super::canvas::{Canvas, Clear, along, ink, line};
use super::format::{Format, fitting};
use super::number::{number, quantity};
use super::place::Wish;
use super::scene::{Dash, Style};
use super::view::{Room, View};
use super::{member, support};
use crate::model::{Action, Direction, LoadCase, MemberLoad, Model};
use crate::units::Measure;

/// The figure `case.<name>`.
#[must_use]
pub fn load_case(model: &Model, case: &LoadCase) -> Figure {
    fitting(|format| drawn(model, case, format))
}

fn drawn(model: &Model, case: &LoadCase, format: Format) -> Figure {
    let elsewhere = "Values that found no room here stand in the tables of this load case";
    let mut canvas = Canvas::new(format, elsewhere);
    let view = View::new(model, Room { side: 22.0, above: 17.0, below: 18.0 }, format);
    support::draw(&mut canvas, &view, 0.15);
    member::draw_plain(&mut canvas, &view, 0.3, 0.35);
    member::joints(&mut canvas, &view);
    let mut sheet = Sheet { canvas, view, case, combs: comb::Stack::new(case) };
    let warm = warm_throughout(model, case);
    for load in &case.loads {
        let said_once = matches!((&load.acts, warm), (Action::Member { load: MemberLoad::Warm { top, bottom }, .. }, Some(k))
            if same(*top, k) && same(*bottom, k));
        if !said_once {
            sheet.load(&load.acts);
        }
    }
    if let Some(kelvin) = warm {
        let sign = if kelvin > 0.0 { "+" } else { "" };
        let words = format!("All members {sign}{}", sheet.say(Measure::Temperature, kelvin));
        sheet.canvas.note(words);
    }
    let Sheet { mut canvas, view, .. } = sheet;
    if case.self_weight != 0.0 {
        let factor = if (case.self_weight - 1.0).abs() < 1e-12 {
            String::new()
        } else {
            format!(", times {}", number(case.self_weight, 4))
        };
        canvas.note(format!("Self-weight of all members acts downward{factor}"));
    }
    let title = case.title.as_ref().map_or(String::new(), |t| format!(": {t}"));
    Figure {
        id: format!("case.{}", case.name),
        title: format!("Load case {}{title}. Structure {}.", case.name, view.ratio()),
        alternative: format!(
            "Loads of case {} on the structure: {} in all{}. Values stand in the tables.",
            case.name,
            case.loads.len(),
            if case.self_weight == 0.0 { "" } else { ", and self-weight" }
        ),
        scene: canvas.finish(),
    }
}

/// A load case under way.
struct Sheet<'a> {
    canvas: Canvas,
    view: View<'a>,
    case: &'a LoadCase,
    combs: comb::Stack,
}

impl Sheet<'_> {
    fn say(&self, measure: Measure, value: f64) -> String {
        quantity(&self.view.model.display, measure, value, 4)
    }

    fn load(&mut self, action: &Action) {
        match action {
            Action::Node { node, forces } => {
                let at = self.view.node(*node);
                self.force(at, [forces[0], 0.0], Some(*node));
                self.force(at, [0.0, forces[1]], Some(*node));
                self.couple(at, forces[2]);
            }
            Action::Member { member, load } => self.on_member(*member, load),
            Action::Settle { node, movement } => self.settle(*node, *movement),
        }
    }

    fn on_member(&mut self, at: usize, load: &MemberLoad) {
        let member = &self.view.model.members[at];
        let (length, axis, normal) = self.view.axes(member);
        match load {
            MemberLoad::Line { .. } => comb::draw(&mut self.canvas, &self.view, &mut self.combs, at, load),
            MemberLoad::Point { direction, force, at } => {
                let along = match direction {
                    Direction::GlobalX => [1.0, 0.0],
                    Direction::GlobalY => [0.0, 1.0],
                    Direction::LocalX => [axis[0], -axis[1]],
                    Direction::LocalY => [normal[0], -normal[1]],
                };
                let place = self.view.on(member, *at, 0.0);
                self.force(place, along.map(|v| v * force), None);
            }
            MemberLoad::Moment { moment, at } => {
                let place = self.view.on(member, *at, 0.0);
                self.couple(place, *moment);
            }
            MemberLoad::Warm { top, bottom } => {
                let signed =
                    |k: f64| format!("{}{}", if k > 0.0 { "+" } else { "" }, self.say(Measure::Temperature, k));
                let words = if (top - bottom).abs() < 1e-12 {
                    signed(*top)
                } else {
                    format!("top {}, bottom {}", signed(*top), signed(*bottom))
                };
                self.beside(at, length, words);
            }
            MemberLoad::TooLong { by } => {
                let middle = self.view.on(member, 0.7 * length, 0.0);
                for shift in [-0.5, 0.5] {
                    let foot = along(middle, axis, shift);
                    self.canvas.line(along(foot, normal, -1.2), along(foot, normal, 1.2), ink(0.25), Clear::Hard);
                }
                let words =
                    format!("{} too {}", self.say(Measure::Length, by.abs()), if *by < 0.0 { "short" } else { "long" });
                self.beside(at, length, words);
            }
        }
    }

    fn beside(&mut self, at: usize, length: f64, words: String) {
        let member = &self.view.model.members[at];
        let (_, _, normal) = self.view.axes(member);
        let anchors = [0.7, 0.5, 0.6, 0.35, 0.25].map(|t| self.view.on(member, t * length, 0.0)).to_vec();
        self.canvas.label(Wish { anchors, toward: Some(normal), gap: 1.0, far: false }, Style::Regular, words);
    }

    /// A force (global, N) at a place. Its tip lies there, unless a member lies in the way of its tail.
    fn force(&mut self, at: [f64; 2], force: [f64; 2], node: Option<usize>) {
        let size = force[0].hypot(force[1]);
        if size == 0.0 {
            return;
        }
        let direction = [force[0] / size, -force[1] / size];
        let largest = largest_force(self.case);
        let long = 6.0 + 5.0 * size / largest.max(size);
        let lies = |sense: f64| {
            let model = self.view.model;
            node.is_some_and(|node| {
                model.members.iter().filter(|m| m.from == node || m.to == node).any(|m| {
                    let (_, axis, _) = self.view.axes(m);
                    let out = if m.from == node { axis } else { axis.map(|v| -v) };
                    sense * (out[0] * direction[0] + out[1] * direction[1]) > 0.93
                })
            })
        };
        // Members on both sides: the arrow stands beside them, on the left of its way or above.
        let (behind, ahead) = (lies(-1.0), lies(1.0));
        let beside = if direction[1].abs() < 0.5 { [0.0, -1.0] } else { [-1.0, 0.0] };
        let at = if behind && ahead { along(at, beside, 2.2) } else { at };
        // A tail pointing down would stand in the support's symbol.
        let held = node.is_some_and(|node| self.view.model.supports.iter().any(|s| s.node == node));
        let blocked = behind || held && direction[1] < -0.9 && !ahead;
        let (tail, tip) = if blocked {
            (along(at, direction, 1.0), along(at, direction, 1.0 + long))
        } else {
            (along(at, direction, -1.0 - long), along(at, direction, -1.0))
        };
        self.canvas.arrow(tail, tip, ink(0.45), Clear::Hard);
        let (anchor, out) = if blocked { (tip, direction) } else { (tail, direction.map(|v| -v)) };
        let words = self.say(Measure::Force, size);
        let middle = [(tail[0] + tip[0]) / 2.0, (tail[1] + tip[1]) / 2.0];
        self.canvas.label(
            Wish { anchors: vec![anchor, middle], toward: Some(out), gap: 0.7, far: false },
            Style::Regular,
            words,
        );
    }

    fn couple(&mut self, at: [f64; 2], couple: f64) {
        if couple == 0.0 {
            return;
        }
        self.canvas.turning(at, 3.6, couple > 0.0, ink(0.45));
        let words = self.say(Measure::Moment, couple.abs());
        self.canvas.label(
            Wish { anchors: vec![at], toward: Some([0.7, -0.7]), gap: 4.4, far: false },
            Style::Regular,
            words,
        );
    }

    fn settle(&mut self, node: usize, movement: [Option<f64>; 3]) {
        let turned = self.view.model.supports.iter().find(|s| s.node == node).map_or(0.0, |support| support.turned);
        let axes = [[turned.cos(), -turned.sin()], [-turned.sin(), -turned.cos()]];
        let at = self.view.node(node);
        for (k, axis) in axes.iter().enumerate() {
            let Some(by) = movement[k].filter(|by| *by != 0.0) else { continue };
            let direction = axis.map(|v| v * by.signum());
            let side = [-direction[1], direction[0]];
            let start = along(at, side, if k == 0 { 6.0 } else { -6.0 });
            let tip = along(start, direction, 9.0);
            self.canvas.line(along(start, side, -1.5), along(start, side, 1.5), ink(0.2), Clear::Hard);
            self.canvas.line(start, along(tip, direction, -1.8), line(0.35, Dash::Dashed, 0.0), Clear::Hard);
            self.canvas.head(tip, direction, 2.0);
            let words = format!("{} imposed", self.say(Measure::Length, by.abs()));
            let middle = along(start, direction, 5.0);
            self.canvas.label(
                Wish { anchors: vec![middle, tip], toward: Some(side.map(|v| -v)), gap: 0.9, far: false },
                Style::Regular,
                words,
            );
        }
        if let Some(turn) = movement[2].filter(|turn| *turn != 0.0) {
            self.canvas.turning(at, 4.6, turn > 0.0, line(0.35, Dash::Dashed, 0.0));
            let words = format!("{} imposed", self.say(Measure::Rotation, turn.abs()));
            self.canvas.label(
                Wish { anchors: vec![at], toward: Some([0.7, -0.7]), gap: 5.2, far: false },
                Style::Regular,
                words,
            );
        }
    }
}

/// Whether two temperatures are one.
fn same(a: f64, b: f64) -> bool {
    (a - b).abs() < 1e-12
}

/// The even warming that every member gets, K, where it is the same for all.
fn warm_throughout(model: &Model, case: &LoadCase) -> Option<f64> {
    let even = |load: &crate::model::Load| match &load.acts {
        Action::Member { member, load: MemberLoad::Warm { top, bottom } } if same(*top, *bottom) => {
            Some((*member, *top))
        }
        _ => None,
    };
    let (_, kelvin) = case.loads.iter().find_map(even)?;
    let all: Vec<usize> =
        case.loads.iter().filter_map(even).filter(|(_, k)| same(*k, kelvin)).map(|(m, _)| m).collect();
    let once = |at: usize| all.iter().filter(|m| **m == at).count() == 1;
    (model.members.len() > 1 && (0..model.members.len()).all(once)).then_some(kelvin)
}

/// Largest force of a case, N.
fn largest_force(case: &LoadCase) -> f64 {
    case.loads
        .iter()
        .map(|load| match &load.acts {
            Action::Node { forces, .. } => forces[0].abs().max(forces[1].abs()),
            Action::Member { load: MemberLoad::Point { force, .. }, .. } => force.abs(),
            _ => 0.0,
        })
        .fold(0.0, f64::max)
}
