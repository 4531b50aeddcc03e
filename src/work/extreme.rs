//! What peaks between a member's ends, and where (steps X).
use super::MemberForces;
use super::combination::FactoredLoad;
use crate::catalogue::between::{At, Between, Ends, Field, Peak, Quantity, place_of_zero_shear};
use crate::catalogue::load::Local;
use crate::catalogue::symbol::*;
use crate::formula::{Definition, Scope, Symbol, Value, Worksheet, source};
use crate::model::{Combination, Member, MemberKind};
use crate::units::Measure;

/// Face of a member.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Fibre {
    /// The +y face.
    Top,
    /// The −y face.
    Bottom,
}

impl Fibre {
    /// The word in the results file.
    #[must_use]
    pub const fn word(self) -> &'static str {
        match self {
            Self::Top => "top",
            Self::Bottom => "bottom",
        }
    }
}

/// An extreme along a member: where, and the worked value.
#[derive(Debug, Clone, Copy)]
pub struct Extreme {
    /// Distance from the start, m.
    pub x: f64,
    /// Its value; worked between the ends, an end's own value there.
    pub value: Value,
    /// The fibre, of a stress.
    pub fibre: Fibre,
    /// Axial force at the place of a stress.
    pub axial: Option<Value>,
    /// Moment there.
    pub moment: Option<Value>,
}

impl Extreme {
    /// An extreme of a force or a movement.
    const fn plain(x: f64, value: Value) -> Self {
        Self { x, value, fibre: Fibre::Top, axial: None, moment: None }
    }
}

/// Extremes of a member under a combination; `None` where the kind has no such thing.
#[derive(Debug, Clone, Default)]
#[allow(missing_docs, reason = "named as in the results file")]
pub struct Extremes {
    pub moment: Option<Extreme>,
    pub shear: Option<Extreme>,
    pub deflection: Option<Extreme>,
    /// Place of the largest deflection, as an operand.
    pub deflection_place: Option<Value>,
    pub tension: Option<Extreme>,
    pub compression: Option<Extreme>,
    /// Smallest axial force: the largest compression.
    pub least_axial: Option<Extreme>,
    /// Forces along the member, for diagrams.
    pub field: Option<Field>,
}

/// Numbers of the first step of each extreme.
mod base {
    pub(super) const MOMENT: u16 = 1;
    pub(super) const TENSION: u16 = 11;
    pub(super) const COMPRESSION: u16 = 21;
    pub(super) const SHEAR: u16 = 31;
    pub(super) const DEFLECTION: u16 = 41;
    pub(super) const AXIAL: u16 = 51;
}

struct Seeker<'w, 'a> {
    scope: Scope<'w>,
    names: (&'a str, &'a str),
    length: f64,
    between: Between,
    field: Field,
    loads: &'a [FactoredLoad<'a>],
    forces: &'a MemberForces,
    /// Places already worked: symbol and distance.
    places: Vec<(Symbol, f64)>,
    deflection_place: Option<Value>,
}

/// Finds and works every extreme of a member.
pub fn work_extremes(
    sheet: &mut dyn Worksheet,
    member: &Member,
    combination: &Combination,
    (length, bending, shear_rigidity): (f64, f64, f64),
    loads: &[FactoredLoad<'_>],
    forces: &MemberForces,
) -> Extremes {
    let carried: Vec<(Option<Value>, f64, Local)> = loads
        .iter()
        .filter(|(_, size, _)| *size != 0.0)
        .filter_map(|(factor, size, load)| load.worked.local.map(|l| (*factor, *size, l)))
        .collect();
    let ends = Ends {
        length,
        start: [forces.n[0], forces.v[0], forces.m[0]].map(|v| v.map_or(0.0, |v| v.si)),
        start_rotation: forces.start_rotation.map_or(0.0, |v| v.si),
        bending: if forces.m[0].is_some() { bending } else { 0.0 },
        shear: shear_rigidity,
    };
    let numeric: Vec<(f64, Local)> = carried.iter().map(|(_, size, local)| (*size, *local)).collect();
    let field = Field::new(&ends, &numeric);
    let mut scope = Scope::new(sheet, &member.name, Some(&combination.name));
    scope.inherit(&forces.known);
    let written: Vec<(Option<Value>, Local)> = carried.iter().map(|(factor, _, local)| (*factor, *local)).collect();
    let between = Between::new(&mut scope, &written);
    let names = (member.name.as_str(), combination.name.as_str());
    let mut seeker =
        Seeker { scope, names, length, between, field, loads, forces, places: Vec::new(), deflection_place: None };
    let mut out = Extremes::default();
    if matches!(member.kind, MemberKind::Beam | MemberKind::Frame) {
        out.moment = Some(seeker.moment());
        out.shear = Some(seeker.shear());
        out.deflection = Some(seeker.deflection());
        out.deflection_place = seeker.deflection_place;
    }
    if forces.n[0].is_some() {
        out.least_axial = Some(seeker.axial());
    }
    out.tension = seeker.stress(base::TENSION, 1.0);
    out.compression = seeker.stress(base::COMPRESSION, -1.0);
    out.field = Some(seeker.field);
    out
}

impl Seeker<'_, '_> {
    /// The end a place coincides with.
    fn end(&self, x: f64) -> Option<usize> {
        let tolerance = 1e-9 * self.length;
        if x <= tolerance {
            Some(0)
        } else if x >= self.length - tolerance {
            Some(1)
        } else {
            None
        }
    }

    /// Makes the distance of a place known under a symbol and returns the place.
    ///
    /// A load's own place is an input; where loads are uniform over the member the place of zero shear has a
    /// formula; any other place is stated and proved by what vanishes there.
    fn place(&mut self, symbol: &Symbol, peak: &Peak, nn: u16, zero_shear: bool) -> At {
        let (x, after) = (peak.x, peak.after);
        let tolerance = 1e-9 * self.length;
        if let Some((known, at)) = self.places.iter().find(|(_, at)| (at - x).abs() <= tolerance).cloned() {
            return At { symbol: known, x: at, after };
        }
        let at_load = self.loads.iter().filter_map(|(_, _, load)| load.worked.local).flat_map(|local| match local {
            Local::Line { a, b, .. } => [a, b],
            Local::Point { a, .. } | Local::Couple { a, .. } => [Some(a), None],
            Local::Curvature(_) => [None, None],
        });
        if let Some(value) = at_load.flatten().find(|v| (v.si - x).abs() <= tolerance) {
            self.scope.set(symbol, value);
            self.places.push((symbol.clone(), value.si));
            return At { symbol: symbol.clone(), x: value.si, after };
        }
        let formula = zero_shear.then(|| place_of_zero_shear(&self.between, symbol)).flatten();
        let x = if let Some(definition) = formula {
            self.scope.work('X', nn, &definition).si
        } else {
            let (member, combination) = self.names;
            let length = self.length;
            let address = format_args!("{combination}.X.{member}.{symbol}");
            let value = self.scope.sheet().stated(address, x, length, Measure::Span);
            self.scope.set(symbol, value);
            if zero_shear {
                let at = At { symbol: symbol.clone(), x, after };
                let definition = self.between.shear(&at, &Symbol::new("V_x"));
                self.scope.balance('X', nn + 1, &definition);
            }
            x
        };
        self.places.push((symbol.clone(), x));
        At { symbol: symbol.clone(), x, after }
    }

    fn moment(&mut self) -> Extreme {
        let peak = self.field.peak(Quantity::M, f64::abs);
        self.at_place(&peak, Quantity::M, base::MOMENT, &XM, true)
    }

    fn shear(&mut self) -> Extreme {
        let peak = self.field.peak(Quantity::V, f64::abs);
        self.at_place(&peak, Quantity::V, base::SHEAR, &XV, false)
    }

    fn axial(&mut self) -> Extreme {
        let peak = self.field.peak(Quantity::N, |n| -n);
        self.at_place(&peak, Quantity::N, base::AXIAL, &XN, false)
    }

    fn at_place(&mut self, peak: &Peak, quantity: Quantity, nn: u16, symbol: &Symbol, zero_shear: bool) -> Extreme {
        let own = match quantity {
            Quantity::N => self.forces.n,
            Quantity::V => self.forces.v,
            _ => self.forces.m,
        };
        if let Some(end) = self.end(peak.x)
            && let Some(value) = own[end]
        {
            return Extreme::plain([0.0, self.length][end], value);
        }
        let at = self.place(symbol, peak, nn, zero_shear);
        let definition = match quantity {
            Quantity::N => self.between.axial(&at, &Symbol::new("N_x")),
            Quantity::V => self.between.shear(&at, &Symbol::new("V_x")),
            _ => self.between.moment(&at, &Symbol::new("M_x")),
        };
        let value = self.scope.work('X', nn + 2, &definition);
        Extreme::plain(at.x, value)
    }

    fn deflection(&mut self) -> Extreme {
        let peak = self.field.peak(Quantity::Deflection, f64::abs);
        if self.end(peak.x).is_some() {
            return Extreme::plain(0.0, Value::silent(0.0));
        }
        let at = self.place(&XDEF, &peak, base::DEFLECTION, false);
        self.deflection_place = self.scope.get(&at.symbol);
        let slope = self.field.at_slope(at.x);
        if slope {
            let definition = self.between.slope(&at, &Symbol::new("θ_x"));
            self.scope.balance('X', base::DEFLECTION + 1, &definition);
        }
        let definition = self.between.deflection(&at, &Symbol::new("v_x"));
        let value = self.scope.work('X', base::DEFLECTION + 2, &definition);
        Extreme::plain(at.x, value)
    }

    /// The largest stress in the sense of `sign` over both fibres and the whole length.
    fn stress(&mut self, nn: u16, sign: f64) -> Option<Extreme> {
        let [top, bottom] = [self.forces.top, self.forces.bottom];
        let (Some(_), Some(_)) = (top[0], bottom[0]) else { return None };
        let si = |scope: &Scope<'_>, symbol: &Symbol| scope.get(symbol).map(|v| v.si);
        let axial = if self.forces.n[0].is_some() { si(&self.scope, &A).map_or(0.0, |a| 1.0 / a) } else { 0.0 };
        let bent = self.forces.m[0].is_some();
        let mut best: Option<(Peak, Fibre)> = None;
        for (fibre, distance, turn) in [(Fibre::Top, YT, -1.0), (Fibre::Bottom, YB, 1.0)] {
            let bending = if bent { turn * si(&self.scope, &distance)? / si(&self.scope, &I)? } else { 0.0 };
            let peak = self.field.peak(Quantity::Mixed { axial, bending }, |stress| sign * stress);
            let better =
                best.is_none_or(|(before, _)| sign * peak.value > sign * before.value + 1e-11 * before.value.abs());
            if better {
                best = Some((peak, fibre));
            }
        }
        let (peak, fibre) = best?;
        if let Some(end) = self.end(peak.x) {
            let value = if fibre == Fibre::Top { top[end] } else { bottom[end] }?;
            let (axial, moment) = (self.forces.n[end], self.forces.m[end]);
            return Some(Extreme { x: [0.0, self.length][end], value, fibre, axial, moment });
        }
        let symbol = if sign > 0.0 { XT } else { XC };
        // Without axial load between the ends the stress peaks with the moment, where the shear vanishes.
        let steady = self.field.is_steady_axially();
        let at = self.place(&symbol, &peak, nn, steady);
        let mut terms = Vec::new();
        let [mut axial, mut moment] = [None; 2];
        if self.forces.n[0].is_some() {
            let n = Symbol::new("N_x");
            if steady {
                let value = self.scope.get(&N1)?;
                self.scope.set(&n, value);
                axial = Some(value);
            } else {
                axial = Some(self.scope.work('X', nn + 2, &self.between.axial(&at, &n)));
            }
            terms.push(n / A);
        }
        if bent {
            let m = Symbol::new("M_x");
            moment = Some(self.scope.work('X', nn + 3, &self.between.moment(&at, &m)));
            let part = m * if fibre == Fibre::Top { YT } else { YB } / I;
            terms.push(if fibre == Fibre::Top { -part } else { part });
        }
        let title = format!(
            "Largest {} stress, {} fibre at {}",
            if sign > 0.0 { "tensile" } else { "compressive" },
            fibre.word(),
            at.symbol
        );
        let definition = Definition::new(Symbol::new("σ_x"), title, Measure::Stress, crate::formula::Tree::sum(terms))
            .from(&source::BENDING);
        let value = self.scope.work('X', nn + 4, &definition);
        Some(Extreme { x: at.x, value, fibre, axial, moment })
    }
}
