//! What each member adds to the stability of the whole: its stiffness along, and its chain across.
use super::axial::Axial;
use super::chain::{Chain, Reduced};
use crate::analysis::structure::{Element, R1, R2, U1, U2, UM, V1, V2};
use crate::model::MemberKind;

/// Length of a piece in terms of √(EI/N) above which it is cut: the error of a cubic piece is u⁴/720, here 1e-5.
const LONGEST_PIECE: f64 = 0.3;
/// Most pieces between two breaks of the axial force.
const MOST_PIECES: f64 = 64.0;

/// A member in the search for the critical load.
#[derive(Debug, Clone)]
pub(super) struct Part {
    /// Freedoms along the member and their elastic stiffness.
    along: (&'static [usize], Vec<f64>),
    across: Across,
}

#[derive(Debug, Clone)]
enum Across {
    /// Pieces that bend, the ends turning with their nodes or hinges, or freely in a bar.
    ///
    /// A bar under constant force leans like a string whatever its bow; `string` has its N/L, free of the rounding of
    /// the chain.
    Chain { chain: Chain, freedoms: &'static [usize], string: Option<f64> },
    /// A bar without second moment of area: it leans as a straight line, mean axial force over length.
    String(f64),
}

/// A member at one load factor.
#[derive(Debug, Clone)]
pub(super) struct Loaded {
    pub(super) freedoms: &'static [usize],
    pub(super) stiffness: Vec<f64>,
    pub(super) reduced: Option<Reduced>,
}

impl Part {
    /// Cuts a member finely enough for load factors up to about `factor`, every piece into `split` again.
    pub(super) fn new(element: &Element, length: f64, axial: &Axial, factor: f64, split: usize) -> Self {
        let whole = || element.stiffness.clone();
        let along: (&'static [usize], Vec<f64>) = match element.kind {
            MemberKind::Bar => (&[U1, U2], whole()),
            MemberKind::Bar3 => (&[U1, UM, U2], whole()),
            MemberKind::Beam => (&[], Vec::new()),
            MemberKind::Frame => (&[U1, U2], [0, 3, 18, 21].map(|place| element.stiffness[place]).to_vec()),
        };
        let across = match element.bending_rigidity {
            Some(bending) if bending > 0.0 => {
                let places = places(axial, length, bending, factor, split);
                let freedoms: &'static [usize] = if element.is_bar() { &[V1, V2] } else { &[V1, R1, V2, R2] };
                let chain = Chain::new(places, bending, element.shear_flexibility, axial, element.is_bar());
                let string = axial.constant_force().map(|force| force / length);
                Across::Chain { chain, freedoms, string }
            }
            _ => Across::String(axial.mean(length) / length),
        };
        Self { along, across }
    }

    /// Freedoms that it joins.
    pub(super) fn freedoms(element: &Element) -> &'static [usize] {
        match element.kind {
            MemberKind::Bar => &[U1, V1, U2, V2],
            MemberKind::Bar3 => &[U1, V1, U2, V2, UM],
            MemberKind::Beam => &[V1, R1, V2, R2],
            MemberKind::Frame => &[U1, V1, R1, U2, V2, R2],
        }
    }

    /// Its stiffness along, then across, at a load factor.
    pub(super) fn at(&self, factor: f64) -> [Loaded; 2] {
        let (freedoms, stiffness) = &self.along;
        let along = Loaded { freedoms, stiffness: stiffness.clone(), reduced: None };
        let across = match &self.across {
            Across::Chain { chain, freedoms, string } => {
                let reduced = chain.reduce(factor);
                let m = reduced.matrix;
                let stiffness = match (freedoms.len(), string) {
                    (2, Some(force)) => lean(factor * force),
                    (2, None) => vec![m[0][0], m[0][2], m[2][0], m[2][2]],
                    _ => m.concat(),
                };
                Loaded { freedoms, stiffness, reduced: Some(reduced) }
            }
            Across::String(force) => Loaded { freedoms: &[V1, V2], stiffness: lean(factor * force), reduced: None },
        };
        [along, across]
    }

    /// Places of the joints between its pieces, the ends included; the ends alone where it stays straight.
    pub(super) fn places(&self, length: f64) -> Vec<f64> {
        match &self.across {
            Across::Chain { chain, .. } => chain.places.clone(),
            Across::String(_) => vec![0.0, length],
        }
    }

    /// Whether its pieces are short enough for a load factor.
    pub(super) fn fine_enough(&self, element: &Element, length: f64, axial: &Axial, factor: f64) -> bool {
        match (&self.across, element.bending_rigidity) {
            (Across::Chain { chain, .. }, Some(bending)) => {
                places(axial, length, bending, factor, 1).len() <= chain.places.len()
            }
            _ => true,
        }
    }
}

fn lean(k: f64) -> Vec<f64> {
    vec![k, -k, -k, k]
}

/// Where to cut: at every break of the axial force, and in between into pieces that are short for the force there.
fn places(axial: &Axial, length: f64, bending: f64, factor: f64, split: usize) -> Vec<f64> {
    let mut stops: Vec<f64> = axial.breaks(length).collect();
    stops.push(length);
    let mut places = vec![0.0];
    for stop in stops {
        let from = places.last().copied().unwrap_or(0.0);
        let stretch = stop - from;
        if stretch <= 1e-6 * length {
            continue;
        }
        let [start, end] = axial.straight_within(from, stop);
        let bend = stretch * (factor * start.abs().max(end.abs()) / bending).sqrt();
        let least = 2.0 * (2.0 * stretch / length).ceil();
        // An even number, so that the middle is one of the places.
        let count = (2.0 * (0.5 * bend / LONGEST_PIECE).ceil()).clamp(least, MOST_PIECES) * split as f64;
        places.extend((1..count as usize).map(|piece| from + stretch * piece as f64 / count));
        places.push(stop);
    }
    places
}
