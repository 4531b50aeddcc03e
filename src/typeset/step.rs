//! A step: its number where the eye starts, its words, three lines with their equals signs in one column,
//! addresses below, and room for the checker at the outer edge.
use super::FaceName;
use super::block::Column;
use super::flow::Slab;
use super::frame::{Anchor, Frame, Item, Path};
use super::geometry::{BASELINE, FINE, Geometry, LEADING, SMALL, TEXT};
use super::maths::{Filling, Line, Maths};
use super::paragraph::{Paragraph, body_type};
use super::text::{Setter, Type};
use super::uses;
use crate::formula::{Symbol, with_numbers, with_symbols};
use crate::sheet::{Sheet, Step};

/// Size of formulas on a step.
const FORMULA: f32 = 10.4;
/// Least width of the column left of the equals signs, and the width of the column that holds them.
const LEFT_SIDE: f32 = 34.0;
const EQUALS: f32 = 15.0;
/// Indent of a formula's second and later lines.
const INDENT: f32 = 16.0;
/// Space between two lines of formula, and above the first.
const BETWEEN: f32 = 4.6;
/// Column of the labels of fine print, and its distance from line to line over its size.
const LABEL: f32 = 22.0;
const FINE_LEADING: f32 = 1.42;
/// Room that `by` takes beside the addresses, with the space before it.
const BESIDE: f32 = 30.0;
/// A number is not set smaller than this part of its size to fit its column.
const NUMBER_LEAST: f32 = 0.8;
/// Space below a step.
const BELOW: f32 = 13.0;

/// Sets a step as strips that may be parted only where it is taller than a sheet.
pub(super) fn set(step: &Step, column: Column<'_>, setter: &mut Setter<'_>) -> Vec<Slab> {
    let Column { sheet, geometry, .. } = column;
    let mut page = StepPage { sheet, setter, geometry, slabs: Vec::new() };
    page.title(step);
    page.formula(step);
    let by = by(step);
    let said = page.addresses(step, by.as_deref());
    page.remarks([("by", if said { None } else { by.as_deref() }), ("note", step.note.as_deref())]);
    uses::set(column.uses.users(step.result), &mut page.slabs, page.setter, geometry);
    let last = page.slabs.len().saturating_sub(1);
    for (at, slab) in page.slabs.iter_mut().enumerate() {
        slab.keep = at < last;
    }
    if let Some(first) = page.slabs.first_mut() {
        first.before = BELOW;
        first.frame.anchors.push(Anchor { name: step.number.as_str().into(), y: 0.0 });
    }
    if let Some(last) = page.slabs.last_mut() {
        last.after = BELOW;
    }
    page.slabs
}

struct StepPage<'p, 'f> {
    sheet: &'p Sheet,
    setter: &'p mut Setter<'f>,
    geometry: &'p Geometry,
    slabs: Vec<Slab>,
}

impl StepPage<'_, '_> {
    fn push(&mut self, frame: Frame, height: f32, before: f32) {
        self.slabs.push(Slab { frame, height, before, ..Slab::default() });
    }

    fn title(&mut self, step: &Step) {
        let title = Paragraph::plain(step.definition.title(), body_type());
        self.slabs.extend(numbered(&step.number, &title, self.setter, self.geometry));
    }

    fn formula(&mut self, step: &Step) {
        let ledger = &self.sheet.ledger;
        let entry_of =
            |symbol: &Symbol| step.operands.iter().find(|(s, _)| s == symbol).map(|(_, id)| ledger.entry(*id));
        let tree = step.definition.tree();
        let symbol = step.definition.symbol();

        let mut frame = Frame::default();
        frame.speak(&format!("{symbol} = {}", with_symbols(tree)));
        let mut maths = Maths { setter: self.setter, frame: &mut frame };
        let left = maths.symbol(symbol, None, FORMULA);
        let (left_width, left_height, left_depth) = (left.width, left.height, left.depth);
        frame.shift(left.from, self.geometry.text, 0.0);
        let equals = self.geometry.text + (left_width + 5.0).max(LEFT_SIDE);
        let lines =
            self.side(&mut frame, equals, |maths, width| maths.lines(tree, Filling::Symbols, FORMULA, width, INDENT));
        self.stack(frame, &lines, left_height, left_depth);

        let mut frame = Frame::default();
        let spoken = with_numbers(tree, &|symbol| {
            entry_of(symbol).map_or_else(
                || crate::formula::Operand {
                    printed: crate::units::Printed { count: 0, place: 0 },
                    unit: symbol.to_string(),
                },
                |entry| entry.operand(),
            )
        });
        frame.speak(&format!("= {spoken}"));
        let number = |symbol: &Symbol| entry_of(symbol).map(|entry| (entry.printed, &*entry.unit.text));
        let lines = self.side(&mut frame, equals, |maths, width| {
            maths.lines(tree, Filling::Numbers(&number), FORMULA, width, INDENT)
        });
        self.stack(frame, &lines, 0.0, 0.0);
        self.result(step, equals);
    }

    /// Sets the equals sign and what stands to its right.
    fn side(
        &mut self,
        frame: &mut Frame,
        equals: f32,
        set: impl FnOnce(&mut Maths<'_, '_>, f32) -> Vec<Line>,
    ) -> Vec<Line> {
        let mut maths = Maths { setter: self.setter, frame };
        let sign = maths.text("= ", FORMULA);
        let mut lines = set(&mut maths, self.geometry.right - equals - EQUALS);
        frame.shift_one(sign.from, equals, 0.0);
        for (at, line) in lines.iter_mut().enumerate() {
            let x = equals + EQUALS + if at == 0 { 0.0 } else { INDENT };
            for item in line.from..line.to {
                frame.shift_one(item, x, 0.0);
            }
        }
        lines
    }

    /// Turns the lines of a formula, all still on one baseline, into strips one below the other.
    ///
    /// The first strip is read back as the whole formula, the others as nothing.
    fn stack(&mut self, mut frame: Frame, lines: &[Line], height: f32, depth: f32) {
        let first = self.slabs.len();
        for (at, line) in lines.iter().enumerate().rev() {
            let mut part = if at > 0 { frame.split_off(line.from) } else { std::mem::take(&mut frame) };
            let [above, below] = if at > 0 { [0.0; 2] } else { [height, depth] };
            let baseline = BETWEEN + line.height.max(0.72 * FORMULA).max(above);
            part.shift(0, 0.0, baseline);
            if at > 0 {
                part.items.insert(0, Item::Spoken("".into()));
                part.items.push(Item::SpokenEnd);
            } else {
                part.end_speech();
            }
            let height = baseline + line.depth.max(0.2 * FORMULA).max(below);
            self.slabs.insert(first, Slab { frame: part, height, ..Slab::default() });
        }
    }

    fn result(&mut self, step: &Step, equals: f32) {
        let entry = self.sheet.ledger.entry(step.result);
        let value = entry.operand().text();
        let mut frame = Frame::default();
        let baseline = BETWEEN + 0.8 * FORMULA;
        let compared = step.comparison.map(|c| format!(" {} {} {}", c.relation(), number(c.limit), c.verdict()));
        frame.speak(&format!("= {value}{}", compared.as_deref().unwrap_or("")));
        let mut maths = Maths { setter: self.setter, frame: &mut frame };
        let sign = maths.text("= ", FORMULA);
        frame.shift(sign.from, equals, baseline);
        let mut x = equals + EQUALS;
        x += self.setter.set(&mut frame, &value, Type::new(FaceName::Bold, FORMULA), x, baseline);
        if let Some(comparison) = step.comparison {
            let limit = format!("{} {}", comparison.relation(), number(comparison.limit));
            x += 7.0;
            x += self.setter.set(&mut frame, &limit, Type::new(FaceName::Regular, FORMULA), x, baseline);
            x += 12.0;
            let grey = if comparison.ok { 0 } else { 255 };
            let kind = Type { face: FaceName::Bold, size: TEXT, grey };
            if !comparison.ok {
                let width = self.setter.width(comparison.verdict(), kind);
                frame.rule(x - 4.0, baseline - 0.86 * TEXT, width + 8.0, 1.16 * TEXT);
            }
            self.setter.set(&mut frame, comparison.verdict(), kind, x, baseline);
        }
        frame.end_speech();
        self.push(frame, baseline + 0.3 * FORMULA, 0.0);
    }

    /// Each symbol with the address it was taken from; what the step rests on stands beside them where there is
    /// room, which is what is returned.
    fn addresses(&mut self, step: &Step, by: Option<&str>) -> bool {
        if step.operands.is_empty() {
            return false;
        }
        let g = *self.geometry;
        let fine = Type::new(FaceName::Regular, FINE);
        let mut frame = Frame::default();
        let leading = FINE * FINE_LEADING;
        let mut y = BETWEEN + FINE;
        self.setter.set(&mut frame, "from", Type::new(FaceName::Italic, FINE), g.text, y);
        let left = g.text + LABEL;
        let mut x = left;
        for (at, (symbol, id)) in step.operands.iter().enumerate() {
            let address = &self.sheet.ledger.entry(*id).address;
            frame.speak(symbol.as_str());
            let set = Maths { setter: self.setter, frame: &mut frame }.symbol(symbol, None, FINE);
            frame.end_speech();
            let gap = Maths { setter: self.setter, frame: &mut frame }.text(" ", FINE);
            let (from, to, mut width) = (set.from, gap.from + 1, set.width + gap.width);
            width += self.setter.width(address, fine);
            if x + width > g.right && x > left {
                (x, y) = (left, y + leading);
            }
            frame.shift_one(gap.from, set.width, 0.0);
            for item in from..to {
                frame.shift_one(item, x, y);
            }
            let mut at_x = x + set.width + gap.width;
            at_x = self.address(&mut frame, address, fine, [at_x, left], &mut y, leading);
            x = at_x;
            // At the end of a line the point falls away where there is no room for it.
            if at + 1 < step.operands.len() && x + 3.0 + self.setter.width(" · ", fine) <= g.right {
                x += 1.5 + self.setter.set(&mut frame, " · ", fine, x + 1.5, y) + 1.5;
            }
        }
        let room = by.is_some_and(|by| x + BESIDE + self.setter.width(by, fine) <= g.right);
        if let (true, Some(by)) = (room, by) {
            x += BESIDE - LABEL + 8.0;
            x += self.setter.set(&mut frame, "by ", Type::new(FaceName::Italic, FINE), x, y) + 1.0;
            self.setter.set(&mut frame, by, fine, x, y);
        }
        self.push(frame, y + 0.25 * FINE, 0.0);
        room
    }

    /// An address that leads to its place, cut where it alone is wider than the line.
    fn address(
        &mut self,
        frame: &mut Frame,
        address: &str,
        fine: Type,
        [x, left]: [f32; 2],
        y: &mut f32,
        leading: f32,
    ) -> f32 {
        let mut paragraph = Paragraph::default();
        paragraph.add(address, fine, Some(address));
        let (width, _) = paragraph.widths(self.setter);
        let room = self.geometry.right - x;
        let moved = width > room && x > left;
        let (x, room) = if moved { (left, self.geometry.right - left) } else { (x, room) };
        let mut end = x;
        for (at, line) in paragraph.lines(self.setter, room).into_iter().enumerate() {
            if at > 0 || moved {
                *y += leading;
            }
            paragraph.set(self.setter, frame, line, x, *y);
            end = x + line.width;
        }
        end
    }

    fn remarks(&mut self, remarks: [(&str, Option<&str>); 2]) {
        for (label, text) in remarks {
            let Some(text) = text else { continue };
            let paragraph = Paragraph::plain(text, Type::new(FaceName::Regular, FINE));
            self.slabs.extend(labelled(label, &paragraph, self.setter, self.geometry));
        }
    }
}

/// Fine print beside its label, in the same column as a step's addresses.
pub(super) fn labelled(label: &str, text: &Paragraph, setter: &mut Setter<'_>, g: &Geometry) -> Vec<Slab> {
    let leading = FINE * FINE_LEADING;
    let baseline = leading - 0.25 * FINE;
    let left = g.text + LABEL;
    let mut slabs = Vec::new();
    for (at, line) in text.lines(setter, g.right - left).into_iter().enumerate() {
        let mut frame = Frame::default();
        if at == 0 {
            setter.set(&mut frame, label, Type::new(FaceName::Italic, FINE), g.text, baseline);
        }
        text.set(setter, &mut frame, line, left, baseline);
        slabs.push(Slab { frame, height: leading, ..Slab::default() });
    }
    slabs
}

/// Source and method of a step in one line.
fn by(step: &Step) -> Option<String> {
    let by = step.methods();
    (!by.is_empty()).then(|| by.join("; "))
}

/// A number where the eye starts, the words beside it, a square to tick: the first lines of a step or a table.
///
/// A number too long for its column is set smaller, and above the words where even that is too long.
pub(super) fn numbered(number: &str, words: &Paragraph, setter: &mut Setter<'_>, g: &Geometry) -> Vec<Slab> {
    let mut slabs = Vec::new();
    let mut frame = Frame::default();
    let room = g.text - g.left - 8.0;
    let mut kind = Type::new(FaceName::Bold, SMALL);
    let scale = room / setter.width(number, kind).max(1.0);
    let beside = scale >= NUMBER_LEAST;
    if beside {
        kind.size *= scale.min(1.0);
    } else {
        kind.size *= ((g.right - g.left) / room * scale).min(1.0);
    }
    setter.set(&mut frame, number, kind, g.left, BASELINE);
    tick(&mut frame, g, BASELINE);
    if !beside {
        slabs.push(Slab { frame: std::mem::take(&mut frame), height: LEADING, ..Slab::default() });
    }
    for line in words.lines(setter, g.right - g.text) {
        words.set(setter, &mut frame, line, g.text, BASELINE);
        slabs.push(Slab { frame: std::mem::take(&mut frame), height: LEADING, ..Slab::default() });
    }
    if !frame.items.is_empty() {
        slabs.push(Slab { frame, height: LEADING, ..Slab::default() });
    }
    slabs
}

/// A square to tick and a line for initials, in the checker's column.
fn tick(frame: &mut Frame, geometry: &Geometry, baseline: f32) {
    frame.outline(geometry.check + 8.0, baseline - 7.4, 8.0, 8.0, 0.5);
    let line = vec![[geometry.check + 21.0, baseline + 0.6], [geometry.edge, baseline + 0.6]];
    let stroke = Some((0.4, &[0.4_f32, 1.6] as &[f32], 0));
    frame.items.push(Item::Path(Box::new(Path { points: line, closed: false, stroke, fill: None })));
}

/// A bound as printed: a plain number with a typographic minus.
fn number(value: f64) -> String {
    format!("{value}").replace('-', "−")
}
