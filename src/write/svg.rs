//! Drawings as SVG: text stays text, the same drawing gives the same bytes.
use crate::figure::{Anchor, Dash, Figure, Item, Stroke, Style, TextItem};
use std::fmt::Write;

/// A figure as an SVG document.
#[must_use]
pub fn write(figure: &Figure) -> String {
    let (width, height) = (number(figure.scene.width), number(figure.scene.height));
    let mut out = String::new();
    let _ = writeln!(
        out,
        "<svg xmlns=\"http://www.w3.org/2000/svg\" width=\"{width}mm\" height=\"{height}mm\" viewBox=\"0 0 {width} \
         {height}\" role=\"img\" font-family=\"serif\">"
    );
    let _ = writeln!(out, "<title>{}</title>", escape(&figure.title));
    let _ = writeln!(out, "<desc>{}</desc>", escape(&figure.alternative));
    let _ = writeln!(out, "<rect width=\"{width}\" height=\"{height}\" fill=\"#fff\"/>");
    for item in &figure.scene.items {
        match item {
            Item::Path { points, closed, stroke, fill } => path(&mut out, points, *closed, *stroke, *fill),
            Item::Text(item) => text(&mut out, item),
        }
    }
    out.push_str("</svg>\n");
    out
}

fn path(out: &mut String, points: &[[f64; 2]], closed: bool, stroke: Option<Stroke>, fill: Option<f64>) {
    out.push_str("<path d=\"");
    for (at, point) in points.iter().enumerate() {
        let _ = write!(out, "{}{} {}", if at == 0 { 'M' } else { 'L' }, number(point[0]), number(point[1]));
    }
    if closed {
        out.push('Z');
    }
    let _ = write!(out, "\" fill=\"{}\"", fill.map_or_else(|| "none".to_owned(), shade));
    if let Some(stroke) = stroke {
        let _ = write!(out, " stroke=\"{}\" stroke-width=\"{}\"", shade(stroke.grey), number(stroke.width));
        let dashes = match stroke.dash {
            Dash::Solid => "",
            Dash::Dashed => "2 1.2",
            Dash::Dotted => "0.4 0.9",
            Dash::Chain => "4 1 0.8 1",
        };
        if !dashes.is_empty() {
            let _ = write!(out, " stroke-dasharray=\"{dashes}\"");
        }
        out.push_str(" stroke-linejoin=\"round\"");
    }
    out.push_str("/>\n");
}

fn text(out: &mut String, item: &TextItem) {
    let anchor = match item.anchor {
        Anchor::Start => "start",
        Anchor::Middle => "middle",
        Anchor::End => "end",
    };
    let style = match item.style {
        Style::Regular => "",
        Style::Italic => " font-style=\"italic\"",
        Style::Bold => " font-weight=\"bold\"",
    };
    // A point is 25.4/72 mm, and user units are millimetres.
    let size = number(item.size * 25.4 / 72.0);
    let place = format!(
        "x=\"{}\" y=\"{}\" font-size=\"{size}\" text-anchor=\"{anchor}\"{style}",
        number(item.at[0]),
        number(item.at[1])
    );
    let halo =
        if item.halo { " stroke=\"#fff\" stroke-width=\"0.6\" paint-order=\"stroke\" fill=\"#000\"" } else { "" };
    let _ = writeln!(out, "<text {place}{halo}>{}</text>", escape(&item.text));
}

/// A grey as a colour.
fn shade(grey: f64) -> String {
    let level = (grey.clamp(0.0, 1.0) * 255.0).round() as u8;
    format!("#{level:02x}{level:02x}{level:02x}")
}

/// Millimetres to the hundredth.
fn number(value: f64) -> String {
    let text = format!("{value:.2}");
    if text == "-0.00" { "0.00".into() } else { text }
}

fn escape(text: &str) -> String {
    text.replace('&', "&amp;").replace('<', "&lt;").replace('>', "&gt;").replace('"', "&quot;")
}
