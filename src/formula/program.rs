//! A formula compiled to a flat list of operations: evaluated and differentiated without walking a tree.
use super::{Symbol, Tree};

#[derive(Debug, Clone, Copy, PartialEq)]
enum Op {
    Constant(f64),
    Slot(u16),
    Negate(u16),
    Add(u16, u16),
    Multiply(u16, u16),
    Divide(u16, u16),
    Power(u16, i8),
    Root(u16),
    Absolute(u16),
    Max(u16, u16),
    Min(u16, u16),
    Sine(u16),
    Cosine(u16),
    Tangent(u16),
    ArcTangent(u16),
}

/// A compiled formula. Slots are its symbols in order of first appearance.
#[derive(Debug, Clone, PartialEq)]
pub struct Program {
    symbols: Vec<Symbol>,
    ops: Vec<Op>,
}

impl Program {
    /// Compiles a tree.
    #[must_use]
    pub fn new(tree: &Tree) -> Self {
        let mut program = Self { symbols: tree.symbols(), ops: Vec::new() };
        program.push(tree);
        program
    }

    /// The symbols whose values [`Self::evaluate`] takes, in that order.
    #[must_use]
    pub fn symbols(&self) -> &[Symbol] {
        &self.symbols
    }

    fn push(&mut self, tree: &Tree) -> u16 {
        let op = match tree {
            Tree::Number(number) => Op::Constant(*number),
            Tree::Pi => Op::Constant(std::f64::consts::PI),
            Tree::Symbol(symbol) => {
                let slot = self.symbols.iter().position(|s| s == symbol).unwrap_or(0);
                Op::Slot(slot as u16)
            }
            Tree::Negative(part) => Op::Negate(self.push(part)),
            Tree::Sum(parts) => return self.fold(parts, 0.0, Op::Add),
            Tree::Product(parts) => return self.fold(parts, 1.0, Op::Multiply),
            Tree::Max(parts) => return self.fold(parts, f64::NEG_INFINITY, Op::Max),
            Tree::Min(parts) => return self.fold(parts, f64::INFINITY, Op::Min),
            Tree::Quotient(above, below) => {
                let above = self.push(above);
                let below = self.push(below);
                Op::Divide(above, below)
            }
            Tree::Power(part, exponent) => Op::Power(self.push(part), *exponent),
            Tree::Root(part) => Op::Root(self.push(part)),
            Tree::Absolute(part) => Op::Absolute(self.push(part)),
            Tree::Sine(part) => Op::Sine(self.push(part)),
            Tree::Cosine(part) => Op::Cosine(self.push(part)),
            Tree::Tangent(part) => Op::Tangent(self.push(part)),
            Tree::ArcTangent(part) => Op::ArcTangent(self.push(part)),
        };
        self.ops.push(op);
        (self.ops.len() - 1) as u16
    }

    fn fold(&mut self, parts: &[Tree], empty: f64, join: fn(u16, u16) -> Op) -> u16 {
        let mut whole = None;
        for part in parts {
            let part = self.push(part);
            whole = Some(match whole {
                None => part,
                Some(before) => {
                    self.ops.push(join(before, part));
                    (self.ops.len() - 1) as u16
                }
            });
        }
        whole.unwrap_or_else(|| {
            self.ops.push(Op::Constant(empty));
            (self.ops.len() - 1) as u16
        })
    }

    /// The value of the formula; `values` stand in the order of [`Self::symbols`].
    #[must_use]
    pub fn evaluate(&self, values: &[f64]) -> f64 {
        const SMALL: usize = 64;
        if self.ops.len() <= SMALL {
            let mut results = [0.0; SMALL];
            self.run(values, &mut results)
        } else {
            self.run(values, &mut vec![0.0; self.ops.len()])
        }
    }

    fn run(&self, values: &[f64], results: &mut [f64]) -> f64 {
        for (at, op) in self.ops.iter().enumerate() {
            let of = |i: u16| results[i as usize];
            results[at] = match *op {
                Op::Constant(number) => number,
                Op::Slot(slot) => values[slot as usize],
                Op::Negate(a) => -of(a),
                Op::Add(a, b) => of(a) + of(b),
                Op::Multiply(a, b) => of(a) * of(b),
                Op::Divide(a, b) => of(a) / of(b),
                Op::Power(a, n) => of(a).powi(i32::from(n)),
                Op::Root(a) => of(a).sqrt(),
                Op::Absolute(a) => of(a).abs(),
                Op::Max(a, b) => of(a).max(of(b)),
                Op::Min(a, b) => of(a).min(of(b)),
                Op::Sine(a) => of(a).sin(),
                Op::Cosine(a) => of(a).cos(),
                Op::Tangent(a) => of(a).tan(),
                Op::ArcTangent(a) => of(a).atan(),
            };
        }
        results[self.ops.len() - 1]
    }

    /// The value and its derivative by every slot, found backwards through the operations.
    #[must_use]
    pub fn gradient(&self, values: &[f64]) -> (f64, Vec<f64>) {
        let mut results = vec![0.0; self.ops.len()];
        let value = self.run(values, &mut results);
        let mut weight = vec![0.0; self.ops.len()];
        let mut by_slot = vec![0.0; self.symbols.len()];
        if let Some(last) = weight.last_mut() {
            *last = 1.0;
        }
        for (at, op) in self.ops.iter().enumerate().rev() {
            let w = weight[at];
            let of = |i: u16| results[i as usize];
            let mut give = |i: u16, amount: f64| weight[i as usize] += amount;
            match *op {
                Op::Constant(_) => {}
                Op::Slot(slot) => by_slot[slot as usize] += w,
                Op::Negate(a) => give(a, -w),
                Op::Add(a, b) => {
                    give(a, w);
                    give(b, w);
                }
                Op::Multiply(a, b) => {
                    give(a, w * of(b));
                    give(b, w * of(a));
                }
                Op::Divide(a, b) => {
                    give(a, w / of(b));
                    give(b, -w * of(a) / (of(b) * of(b)));
                }
                Op::Power(a, n) => give(a, w * f64::from(n) * of(a).powi(i32::from(n) - 1)),
                Op::Root(a) => give(a, if results[at] > 0.0 { w / (2.0 * results[at]) } else { 0.0 }),
                Op::Absolute(a) => give(a, w * of(a).signum()),
                Op::Max(a, b) | Op::Min(a, b) => {
                    // What is nearly as large (or small) can take over with the rounding of either: both count.
                    let near = (of(a) - of(b)).abs() <= NEAR * of(a).abs().max(of(b).abs());
                    let first = (of(a) >= of(b)) == matches!(op, Op::Max(..));
                    if near || first {
                        give(a, w);
                    }
                    if near || !first {
                        give(b, w);
                    }
                }
                Op::Sine(a) => give(a, w * of(a).cos()),
                Op::Cosine(a) => give(a, -w * of(a).sin()),
                Op::Tangent(a) => give(a, w / of(a).cos().powi(2)),
                Op::ArcTangent(a) => give(a, w / (1.0 + of(a).powi(2))),
            }
        }
        (value, by_slot)
    }
}

/// Part of a value within which another is nearly as large.
const NEAR: f64 = 0.01;

#[cfg(test)]
mod tests {
    use super::*;

    /// Derivatives against central differences of the same formula.
    #[test]
    fn gradient_agrees_with_differences() {
        let [a, b, c] = ["a", "b", "c"].map(Symbol::new);
        let tree = (a.clone() * b.squared() - Tree::Sine(Box::new(c.tree())) / a.tree()) + (b * c).root();
        let program = Program::new(&tree);
        let at = [1.3, 0.7, 0.4];
        let (value, gradient) = program.gradient(&at);
        assert!((value - program.evaluate(&at)).abs() < 1e-15);
        for slot in 0..3 {
            let shifted = |by: f64| {
                let mut values = at;
                values[slot] += by;
                program.evaluate(&values)
            };
            let difference = (shifted(1e-6) - shifted(-1e-6)) / 2e-6;
            assert!((gradient[slot] - difference).abs() < 1e-8, "slot {slot}");
        }
    }
}
