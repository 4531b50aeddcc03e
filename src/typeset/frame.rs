//! What is placed on paper: glyph runs, rules, paths. Lengths in points, x to the right, y downward.
use super::FaceName;

/// A glyph of a run.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Glyph {
    /// Its number in the face.
    pub id: u16,
    /// Space added after it, thousandths of the em.
    pub after: i16,
}

/// Glyphs of one face and size on one baseline.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Run {
    /// Face.
    pub face: FaceName,
    /// Size.
    pub size: f32,
    /// Left end.
    pub x: f32,
    /// Baseline.
    pub y: f32,
    /// Advance of the whole run.
    pub width: f32,
    /// First glyph in the frame's list.
    pub first: u32,
    /// Number of glyphs.
    pub count: u32,
    /// 0 black to 255 white.
    pub grey: u8,
}

/// A filled upright rectangle, such as a fraction's rule.
#[derive(Debug, Clone, Copy, PartialEq)]
#[allow(missing_docs, reason = "left, top, width, height")]
pub struct Rule {
    pub x: f32,
    pub y: f32,
    pub width: f32,
    pub height: f32,
    /// 0 black to 255 white.
    pub grey: u8,
}

/// Straight lines from point to point.
#[derive(Debug, Clone, PartialEq)]
pub struct Path {
    /// Points.
    pub points: Vec<[f32; 2]>,
    /// Whether the last point is joined to the first.
    pub closed: bool,
    /// Line width, lengths of dash and gap, grey.
    pub stroke: Option<(f32, &'static [f32], u8)>,
    /// Grey of the inside.
    pub fill: Option<u8>,
}

/// One thing placed.
#[derive(Debug, Clone, PartialEq)]
pub enum Item {
    /// Glyphs.
    Run(Run),
    /// A rectangle.
    Rule(Rule),
    /// Lines.
    Path(Box<Path>),
    /// What follows, up to [`Item::SpokenEnd`], is read back as this text.
    Spoken(Box<str>),
    /// Ends what [`Item::Spoken`] began.
    SpokenEnd,
}

/// A place that leads elsewhere in the document.
#[derive(Debug, Clone, PartialEq)]
#[allow(missing_docs, reason = "left, top, width, height")]
pub struct Link {
    pub x: f32,
    pub y: f32,
    pub width: f32,
    pub height: f32,
    /// Address of a step, a table, a cell, or a heading's anchor.
    pub to: Box<str>,
}

/// A place that links lead to.
#[derive(Debug, Clone, PartialEq)]
pub struct Anchor {
    /// Its name.
    pub name: Box<str>,
    /// Distance from the top.
    pub y: f32,
}

/// A place for the number of the sheet on which something stands, known only when all are set.
#[derive(Debug, Clone, PartialEq)]
pub struct Slot {
    /// Right end of the number.
    pub right: f32,
    /// Baseline.
    pub y: f32,
    /// Size.
    pub size: f32,
    /// A heading's anchor.
    pub to: Box<str>,
    /// The frame's item before which it is read.
    pub item: usize,
}

/// Things placed together.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Frame {
    /// In the order they are read.
    pub items: Vec<Item>,
    /// Glyphs of the runs.
    pub glyphs: Vec<Glyph>,
    /// Places that lead elsewhere.
    pub links: Vec<Link>,
    /// Places that links lead to.
    pub anchors: Vec<Anchor>,
    /// Numbers of sheets still to be filled in.
    pub slots: Vec<Slot>,
    /// Texts begun with [`Self::speak`] and not yet ended.
    speaking: u8,
}

impl Frame {
    /// Moves everything placed since `from` (a former length of [`Self::items`]).
    pub fn shift(&mut self, from: usize, dx: f32, dy: f32) {
        for item in &mut self.items[from..] {
            shift(item, dx, dy);
        }
    }

    /// Moves one item.
    pub fn shift_one(&mut self, item: usize, dx: f32, dy: f32) {
        if let Some(item) = self.items.get_mut(item) {
            shift(item, dx, dy);
        }
    }

    /// Makes items smaller about the left end `x` of the baseline y = 0.
    pub fn scale(&mut self, items: std::ops::Range<usize>, x: f32, factor: f32) {
        for item in self.items.get_mut(items).into_iter().flatten() {
            match item {
                Item::Run(run) => {
                    run.x = x + (run.x - x) * factor;
                    run.y *= factor;
                    run.width *= factor;
                    run.size *= factor;
                }
                Item::Rule(rule) => {
                    rule.x = x + (rule.x - x) * factor;
                    rule.y *= factor;
                    rule.width *= factor;
                    rule.height *= factor;
                }
                _ => {}
            }
        }
    }

    /// Parts the frame: everything placed since `from` becomes a frame of its own.
    pub fn split_off(&mut self, from: usize) -> Self {
        let mut other = Self { items: self.items.split_off(from), ..Self::default() };
        for item in &mut other.items {
            if let Item::Run(run) = item {
                let glyphs = &self.glyphs[run.first as usize..(run.first + run.count) as usize];
                run.first = other.glyphs.len() as u32;
                other.glyphs.extend_from_slice(glyphs);
            }
        }
        other
    }

    /// Takes over another frame, moved.
    pub fn append(&mut self, other: Self, dx: f32, dy: f32) {
        let offset = self.glyphs.len() as u32;
        let items = self.items.len();
        self.glyphs.extend_from_slice(&other.glyphs);
        self.items.extend(other.items.into_iter().map(|mut item| {
            shift(&mut item, dx, dy);
            if let Item::Run(run) = &mut item {
                run.first += offset;
            }
            item
        }));
        self.links.extend(other.links.into_iter().map(|link| Link { x: link.x + dx, y: link.y + dy, ..link }));
        self.slots.extend(other.slots.into_iter().map(|slot| Slot {
            right: slot.right + dx,
            y: slot.y + dy,
            item: slot.item + items,
            ..slot
        }));
        self.anchors.extend(other.anchors.into_iter().map(|anchor| Anchor { y: anchor.y + dy, ..anchor }));
    }

    /// What is placed from now on is read back as `text`; within another such text this one is not said again.
    pub fn speak(&mut self, text: &str) {
        if self.speaking == 0 {
            self.items.push(Item::Spoken(text.into()));
        }
        self.speaking += 1;
    }

    /// Ends what [`Self::speak`] began.
    pub fn end_speech(&mut self) {
        self.speaking = self.speaking.saturating_sub(1);
        if self.speaking == 0 {
            self.items.push(Item::SpokenEnd);
        }
    }

    /// Places a rectangle.
    pub fn rule(&mut self, x: f32, y: f32, width: f32, height: f32) {
        self.items.push(Item::Rule(Rule { x, y, width, height, grey: 0 }));
    }

    /// Places the outline of a rectangle.
    pub fn outline(&mut self, x: f32, y: f32, width: f32, height: f32, line: f32) {
        let points = vec![[x, y], [x + width, y], [x + width, y + height], [x, y + height]];
        let path = Path { points, closed: true, stroke: Some((line, &[], 0)), fill: None };
        self.items.push(Item::Path(Box::new(path)));
    }

    /// The glyphs of a run.
    #[must_use]
    pub fn glyphs_of(&self, run: &Run) -> &[Glyph] {
        &self.glyphs[run.first as usize..(run.first + run.count) as usize]
    }
}

fn shift(item: &mut Item, dx: f32, dy: f32) {
    match item {
        Item::Run(run) => {
            run.x += dx;
            run.y += dy;
        }
        Item::Rule(rule) => {
            rule.x += dx;
            rule.y += dy;
        }
        Item::Path(path) => path.points.iter_mut().for_each(|[x, y]| {
            *x += dx;
            *y += dy;
        }),
        Item::Spoken(_) | Item::SpokenEnd => {}
    }
}
