//! A figure: its scene to scale, smaller only where the sheet asks for it, and its caption.
use super::FaceName;
use super::flow::Slab;
use super::frame::{Anchor, Frame, Item as Placed, Path, Rule};
use super::geometry::{Geometry, SMALL};
use super::paragraph::Paragraph;
use super::text::{Setter, Type};
use crate::figure::{Anchor as End, Dash, Figure, Item, Scene, Stroke, Style, TextItem};

const MM: f32 = 72.0 / 25.4;
const APART: f32 = 12.0;

/// Sets a figure as one strip, its caption below it.
pub(super) fn set(figure: &Figure, setter: &mut Setter<'_>, g: &Geometry) -> Vec<Slab> {
    let width = figure.scene.width as f32 * MM;
    let height = figure.scene.height as f32 * MM;
    let caption = Paragraph::plain(&figure.title, Type::new(FaceName::Italic, SMALL + 0.5));
    let lines = caption.lines(setter, g.right - g.text);
    let leading = SMALL * 1.45;
    let below = 8.0 + leading * lines.len() as f32;
    let wide = g.right - g.left;
    let scale = (wide / width.max(1.0)).min((g.body() - below - 4.0) / height.max(1.0)).min(1.0);
    let left = if width * scale > g.right - g.text + 0.5 { g.left + (wide - width * scale) / 2.0 } else { g.text };
    let mut frame = Frame::default();
    frame.anchors.push(Anchor { name: figure.id.as_str().into(), y: 0.0 });
    scene(&figure.scene, setter, &mut frame, left, scale);
    let mut y = height * scale + 8.0 + SMALL;
    setter.set(&mut frame, "Figure", Type::new(FaceName::Bold, SMALL), g.left, y);
    for line in lines {
        caption.set(setter, &mut frame, line, g.text, y);
        y += leading;
    }
    vec![Slab { frame, height: height * scale + below, before: APART, after: APART, ..Slab::default() }]
}

fn scene(scene: &Scene, setter: &mut Setter<'_>, frame: &mut Frame, left: f32, scale: f32) {
    let at = |[x, y]: [f64; 2]| [left + x as f32 * MM * scale, y as f32 * MM * scale];
    for item in &scene.items {
        match item {
            Item::Path { points, closed, stroke, fill } => {
                if points.len() > 1 {
                    let points = points.iter().map(|&point| at(point)).collect();
                    let stroke = stroke.map(|stroke| line(stroke, scale));
                    let fill = fill.map(grey);
                    frame.items.push(Placed::Path(Box::new(Path { points, closed: *closed, stroke, fill })));
                }
            }
            Item::Text(text) => words(text, setter, frame, at(text.at), scale),
        }
    }
}

fn line(stroke: Stroke, scale: f32) -> (f32, &'static [f32], u8) {
    let dash: &[f32] = match stroke.dash {
        Dash::Solid => &[],
        Dash::Dashed => &[3.4, 2.2],
        Dash::Dotted => &[0.7, 1.7],
        Dash::Chain => &[7.0, 1.8, 1.4, 1.8],
    };
    (stroke.width as f32 * MM * scale.max(0.6), dash, grey(stroke.grey))
}

fn words(text: &TextItem, setter: &mut Setter<'_>, frame: &mut Frame, [x, y]: [f32; 2], scale: f32) {
    let face = match text.style {
        Style::Regular => FaceName::Regular,
        Style::Italic => FaceName::Italic,
        Style::Bold => FaceName::Bold,
    };
    let kind = Type::new(face, text.size as f32 * scale);
    let width = setter.width(&text.text, kind);
    let x = match text.anchor {
        End::Start => x,
        End::Middle => x - width / 2.0,
        End::End => x - width,
    };
    if text.halo {
        let (size, grey) = (kind.size, 255);
        let rule = Rule { x: x - 1.0, y: y - 0.78 * size, width: width + 2.0, height: 1.02 * size, grey };
        frame.items.push(Placed::Rule(rule));
    }
    setter.set(frame, &text.text, kind, x, y);
}

fn grey(value: f64) -> u8 {
    (value.clamp(0.0, 1.0) * 255.0).round() as u8
}
