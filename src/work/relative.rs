//! Movements of a member relative to its start and its chord: worked from the movements of its nodes, or stated
//! (table `<combination>.D`) where they are the small difference of large movements.
//!
//! A stiff member in a frame that sways moves far and stretches little. To work its elongation from the movements
//! would take movements with more digits than a calculator shows. So the elongation is stated beside them: its member
//! law and the balance of its joints prove it to the last digit, and the movements prove it as far as they are printed.
use crate::catalogue::element::movement;
use crate::catalogue::symbol::*;
use crate::formula::{Definition, Scope, Symbol, Value};
use crate::units::Measure;
use std::sync::LazyLock;

type Known = LazyLock<Definition>;

/// A relative movement and the ways it is set out.
pub(super) struct Relative {
    /// Its step where it is worked; ten further on stands its gap where it is stated.
    nn: u16,
    /// Its column in the table where it is stated.
    column: &'static str,
    worked: &'static Known,
    /// The same from the movements, under a symbol of its own.
    moved: &'static Known,
    gap: &'static Known,
    /// What it is the difference of: products of a direction cosine, where there is one, and a movement.
    terms: &'static [(Option<Symbol>, Symbol)],
}

pub(super) static ELONGATION: Relative = Relative {
    nn: 3,
    column: "e",
    worked: &movement::ELONGATION,
    moved: &movement::ELONGATION_MOVED,
    gap: &movement::ELONGATION_GAP,
    terms: &[(Some(C), XU1), (Some(C), XU2), (Some(S), YU1), (Some(S), YU2)],
};
pub(super) static START_ROTATION: Relative = Relative {
    nn: 6,
    column: "θ_1",
    worked: &movement::START_ROTATION,
    moved: &movement::START_ROTATION_MOVED,
    gap: &movement::START_ROTATION_GAP,
    terms: &[(None, P1), (None, PSI)],
};
pub(super) static END_ROTATION: Relative = Relative {
    nn: 7,
    column: "θ_2",
    worked: &movement::END_ROTATION,
    moved: &movement::END_ROTATION_MOVED,
    gap: &movement::END_ROTATION_GAP,
    terms: &[(None, P2), (None, PSI)],
};
pub(super) static MIDDLE_MOVEMENT: Relative = Relative {
    nn: 10,
    column: "e_m",
    worked: &movement::MIDDLE_MOVEMENT,
    moved: &movement::MIDDLE_MOVEMENT_MOVED,
    gap: &movement::MIDDLE_MOVEMENT_GAP,
    terms: &[(Some(C), XU1), (Some(C), XUM), (Some(S), YU1), (Some(S), YUM)],
};

/// Column, kind and address of each relative movement of a member that may be stated under a combination.
pub fn relative_movements(combination: &str, member: &str) -> [(&'static str, Measure, String); 4] {
    [&ELONGATION, &START_ROTATION, &END_ROTATION, &MIDDLE_MOVEMENT]
        .map(|one| (one.column, one.worked.measure(), address(combination, member, one.column)))
}

/// Part of the movements below which their difference is stated.
const SMALL: f64 = 0.1;

impl Relative {
    pub(super) fn work(&self, scope: &mut Scope<'_>) -> Value {
        let si = scope.glance(self.worked);
        let of = |symbol: &Symbol| scope.get(symbol).map_or(0.0, |value| value.si);
        let terms = self.terms.iter().map(|(by, symbol)| (by.as_ref().map_or(1.0, of) * of(symbol)).abs());
        let largest = terms.fold(0.0, f64::max);
        if si.abs() >= SMALL * largest {
            return scope.work('D', self.nn, self.worked);
        }
        scope.work('D', self.nn, self.moved);
        let (member, combination) = scope.about();
        let address = address(combination.unwrap_or_default(), member, self.column);
        let value = scope.sheet().stated(format_args!("{address}"), si, largest, self.worked.measure());
        scope.set(self.worked.symbol(), value);
        scope.balance('D', self.nn + 10, self.gap);
        value
    }
}

fn address(combination: &str, member: &str, column: &str) -> String {
    format!("{combination}.D.{member}.{column}")
}
