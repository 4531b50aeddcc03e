//! Stress through the depth of one section: axial part, bending part, both together, beside the outline.
use super::Figure;
use super::canvas::{Canvas, Clear, SIZE, along, ink, line};
use super::number::{bare, number, quantity};
use super::scene::{Anchor, Dash, Style};
use super::section::outline;
use super::text;
use crate::model::{Display, Section};
use crate::units::Measure;

/// Stress at the top and the bottom fibre, SI, and as the sheet prints it.
#[derive(Debug, Clone, Default)]
pub struct Fibres {
    /// What it is, such as `bending`.
    pub words: String,
    /// Top and bottom, SI.
    pub values: [f64; 2],
    /// Top and bottom as printed.
    pub printed: [String; 2],
}

/// A section with the parts of its stress in the order in which they are added up, their sum last.
pub struct Depth<'a> {
    /// The member.
    pub member: String,
    /// The combination.
    pub combination: String,
    /// Distance from the member's start, m.
    pub place: f64,
    /// The section.
    pub section: &'a Section,
    /// Distances of the top and the bottom fibre from the centroid, m.
    pub reach: [f64; 2],
    /// Parts and sum; one alone is the whole stress.
    pub parts: Vec<Fibres>,
}

/// Depth on paper, mm.
const TALL: f64 = 34.0;
/// Largest width of the outline, mm.
const WIDE: f64 = 30.0;
/// Largest stress, mm.
const LARGEST: f64 = 11.5;
/// Distance from block to block, mm.
const PITCH: f64 = 33.0;
/// Top of the section on paper, mm.
const TOP: f64 = 16.0;

/// The figure `<member>.<combination>.depth`; `None` where there is no depth or no stress.
#[must_use]
pub fn depth(display: &Display, depth: &Depth<'_>) -> Option<Figure> {
    let [top, bottom] = depth.reach;
    let whole = top + bottom;
    let largest = depth.parts.iter().flat_map(|part| part.values).map(f64::abs).fold(0.0, f64::max);
    if !(whole > 0.0 && largest > 0.0 && whole.is_finite() && largest.is_finite()) {
        return None;
    }
    let mut canvas = Canvas::default();
    let points = depth.section.kind.outline(&depth.section.given).loops;
    let width = 2.0 * points.iter().flatten().map(|p| p[0].abs()).fold(0.0, f64::max);
    let scale = (TALL / whole).min(if width > 0.0 { WIDE / width } else { f64::INFINITY });
    let level = |y: f64| TOP + scale * (top - y);
    outline(&mut canvas, &depth.section.kind.outline(&depth.section.given), &|p| [34.0 + scale * p[0], level(p[1])]);
    let first = 71.0;
    let last = first + PITCH * (depth.parts.len().saturating_sub(1)) as f64;
    let half = 0.5 * scale * width;
    canvas.line(
        [34.0 - half - 3.0, level(0.0)],
        [last + LARGEST + 3.0, level(0.0)],
        line(0.15, Dash::Chain, 0.0),
        Clear::Hard,
    );
    let x = 34.0 - half - 6.0;
    for (from, to) in [(top, 0.0), (0.0, -bottom)] {
        let (a, b) = ([x, level(from)], [x, level(to)]);
        canvas.line(a, b, ink(0.13), Clear::Hard);
        for end in [a, b] {
            canvas.line(along(end, [0.7, -0.7], -1.0), along(end, [0.7, -0.7], 1.0), ink(0.35), Clear::Hard);
        }
        let said = bare(display, Measure::Length, from - to, 4);
        canvas.fixed([x - 1.0, (a[1] + b[1]) / 2.0 + 0.9], Anchor::End, SIZE, Style::Regular, &said);
    }
    let faces = [(level(top) - 1.6, "top"), (level(-bottom) + 3.6, "bottom")];
    for (y, words) in faces {
        canvas.fixed([34.0, y], Anchor::Middle, SIZE, Style::Italic, words);
    }
    for (at, part) in depth.parts.iter().enumerate() {
        let zero = first + PITCH * at as f64;
        let out = |value: f64| zero + LARGEST * value / largest;
        block(&mut canvas, zero, [level(top), level(-bottom)], part.values.map(out));
        canvas.fixed([zero, TOP - 8.4], Anchor::Middle, SIZE, Style::Bold, &part.words);
        for ((value, printed), y) in part.values.iter().zip(&part.printed).zip([level(top) - 1.6, level(-bottom) + 3.6])
        {
            // A long number stays between its neighbours.
            let spare = ((PITCH - text::width(printed, SIZE)) / 2.0 - 0.4).max(0.0);
            let x = out(*value).clamp(zero - spare, zero + spare);
            canvas.fixed([x, y], Anchor::Middle, SIZE, Style::Regular, printed);
        }
        if at + 1 < depth.parts.len() {
            let sign = if at + 2 < depth.parts.len() { "+" } else { "=" };
            canvas.fixed([zero + PITCH / 2.0, TOP - 8.4], Anchor::Middle, SIZE + 2.0, Style::Regular, sign);
        }
    }
    let unit = display.unit(Measure::Stress);
    let place = quantity(display, Measure::Span, depth.place, 4);
    let said: Vec<String> = depth
        .parts
        .iter()
        .map(|part| format!("{} {} at the top and {} at the bottom", part.words, part.printed[0], part.printed[1]))
        .collect();
    Some(Figure {
        id: format!("{}.{}.depth", depth.member, depth.combination),
        title: format!(
            "Stress through the depth of {}, section {}, at {place} from its start under {}, in {}: tension to the \
             right. Depths in {}, scale 1 : {}.",
            depth.member,
            depth.section.name,
            depth.combination,
            unit.text,
            display.unit(Measure::Length).text,
            number(1000.0 / scale, 3)
        ),
        alternative: format!(
            "Stress in {} over the depth of member {} at {place} from its start: {}.",
            unit.text,
            depth.member,
            said.join("; ")
        ),
        scene: canvas.finish(),
    })
}

/// The stress as a block beside the line where it is zero, ruled across.
fn block(canvas: &mut Canvas, zero: f64, [top, bottom]: [f64; 2], [out_top, out_bottom]: [f64; 2]) {
    let count = ((bottom - top) / 2.2).round().max(2.0) as usize;
    for k in 1..count {
        let t = k as f64 / count as f64;
        let (y, x) = (top + t * (bottom - top), out_top + t * (out_bottom - out_top));
        if (x - zero).abs() > 0.3 {
            canvas.line([zero, y], [x, y], line(0.1, Dash::Solid, 0.55), Clear::Soft);
        }
    }
    canvas.path(vec![[zero, top], [out_top, top], [out_bottom, bottom], [zero, bottom]], false, ink(0.3), Clear::Hard);
    canvas.line([zero, top - 0.8], [zero, bottom + 0.8], ink(0.35), Clear::Hard);
}
