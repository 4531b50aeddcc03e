//! What already stands on a sheet, kept by small squares so that a crowded one is searched as fast as an empty one.
use super::place::Area;

/// A straight line.
type Stretch = [[f64; 2]; 2];

/// Side of a square, mm.
const SIDE: f64 = 4.0;
/// Squares across and down, from [`LOW`] mm on; what lies outside counts to the squares at the edge.
const COUNT: [usize; 2] = [72, 96];
const LOW: f64 = -64.0;

/// What already stands on the sheet.
#[derive(Debug, Clone, Default)]
pub(super) struct Taken {
    /// Texts and symbols that no label may cover.
    areas: Squares<Area>,
    /// Lines that no label may cross.
    hard: Squares<Stretch>,
    /// Lines that a label crosses unwillingly.
    soft: Squares<Stretch>,
}

impl Taken {
    /// Keeps labels off an area.
    pub(super) fn area(&mut self, area: Area) {
        self.areas.add(area, &area, &|_| true);
    }

    /// Keeps labels off a line.
    pub(super) fn hard(&mut self, line: Stretch) {
        self.hard.add(line, &about(&line), &|square| square.crossed(&line));
    }

    /// Makes labels cross a line unwillingly.
    pub(super) fn soft(&mut self, line: Stretch) {
        self.soft.add(line, &about(&line), &|square| square.crossed(&line));
    }

    /// Whether anything that labels keep off meets an area.
    pub(super) fn covers(&self, area: &Area) -> bool {
        self.areas.any(area, &|other| area.meets(other)) || self.hard.any(area, &|line| area.crossed(line))
    }

    /// How many lines crossed unwillingly pass through an area.
    pub(super) fn soft_across(&self, area: &Area) -> usize {
        self.soft.count(area, &|line| area.crossed(line))
    }

    /// How many lines that no label may cross a line crosses.
    pub(super) fn hard_across(&self, line: &Stretch) -> usize {
        self.hard.count(&about(line), &|other| crosses(line, other))
    }

    /// How many areas a line passes through.
    pub(super) fn areas_across(&self, line: &Stretch) -> usize {
        self.areas.count(&about(line), &|area| area.crossed(line))
    }
}

/// The rectangle about a line.
fn about(line: &Stretch) -> Area {
    let [a, b] = line;
    Area { low: [a[0].min(b[0]), a[1].min(b[1])], high: [a[0].max(b[0]), a[1].max(b[1])] }
}

/// Whether two lines cross.
fn crosses(a: &Stretch, b: &Stretch) -> bool {
    let side =
        |p: [f64; 2], [from, to]: &Stretch| (to[0] - from[0]) * (p[1] - from[1]) - (to[1] - from[1]) * (p[0] - from[0]);
    side(a[0], b) * side(a[1], b) < 0.0 && side(b[0], a) * side(b[1], a) < 0.0
}

/// Things by the squares that they touch.
#[derive(Debug, Clone)]
struct Squares<T> {
    things: Vec<T>,
    squares: Vec<Vec<u32>>,
}

impl<T> Default for Squares<T> {
    fn default() -> Self {
        Self { things: Vec::new(), squares: vec![Vec::new(); COUNT[0] * COUNT[1]] }
    }
}

impl<T> Squares<T> {
    fn add(&mut self, thing: T, about: &Area, touches: &dyn Fn(&Area) -> bool) {
        let id = self.things.len() as u32;
        self.things.push(thing);
        let few = span(about, 0).len() * span(about, 1).len() <= 2;
        for y in span(about, 1) {
            for x in span(about, 0) {
                let corner = [x, y].map(|k| LOW + SIDE * k as f64);
                // A little more than the square, so that nothing on its edge is lost; all of what lies at the rim.
                let square = Area { low: corner.map(|v| v - 0.1), high: corner.map(|v| v + SIDE + 0.1) };
                let rim = x == 0 || y == 0 || x + 1 == COUNT[0] || y + 1 == COUNT[1];
                if few || rim || touches(&square) {
                    self.squares[y * COUNT[0] + x].push(id);
                }
            }
        }
    }

    fn any(&self, about: &Area, wanted: &dyn Fn(&T) -> bool) -> bool {
        span(about, 1).any(|y| {
            span(about, 0).any(|x| self.squares[y * COUNT[0] + x].iter().any(|id| wanted(&self.things[*id as usize])))
        })
    }

    fn count(&self, about: &Area, wanted: &dyn Fn(&T) -> bool) -> usize {
        let mut found: Vec<u32> = Vec::new();
        for y in span(about, 1) {
            for x in span(about, 0) {
                for id in &self.squares[y * COUNT[0] + x] {
                    if !found.contains(id) && wanted(&self.things[*id as usize]) {
                        found.push(*id);
                    }
                }
            }
        }
        found.len()
    }
}

/// The squares that an area reaches in one direction.
fn span(area: &Area, direction: usize) -> std::ops::Range<usize> {
    let square = |v: f64| (((v - LOW) / SIDE).floor().max(0.0) as usize).min(COUNT[direction] - 1);
    square(area.low[direction])..square(area.high[direction]) + 1
}
