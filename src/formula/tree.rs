//! The tree of a formula, built with the ordinary operators.
use super::Symbol;
use std::ops::{Add, Div, Mul, Neg, Sub};

/// A formula as a tree of symbols and operators.
#[derive(Debug, Clone, PartialEq)]
pub enum Tree {
    /// A number that belongs to the formula itself, such as the 12 of b·h³/12.
    Number(f64),
    /// The circle constant.
    Pi,
    /// A quantity.
    Symbol(Symbol),
    /// A change of sign.
    Negative(Box<Tree>),
    /// A sum; a negative term is printed as a difference.
    Sum(Vec<Tree>),
    /// A product.
    Product(Vec<Tree>),
    /// A fraction.
    Quotient(Box<Tree>, Box<Tree>),
    /// A whole power.
    Power(Box<Tree>, i8),
    /// A square root.
    Root(Box<Tree>),
    /// A magnitude.
    Absolute(Box<Tree>),
    /// The largest of several.
    Max(Vec<Tree>),
    /// The smallest of several.
    Min(Vec<Tree>),
    /// Sine of an angle.
    Sine(Box<Tree>),
    /// Cosine of an angle.
    Cosine(Box<Tree>),
    /// Tangent of an angle.
    Tangent(Box<Tree>),
    /// Angle whose tangent is given.
    ArcTangent(Box<Tree>),
}

impl Tree {
    /// Its square.
    #[must_use]
    pub fn squared(self) -> Self {
        self.power(2)
    }

    /// Its cube.
    #[must_use]
    pub fn cubed(self) -> Self {
        self.power(3)
    }

    /// A whole power.
    #[must_use]
    pub fn power(self, exponent: i8) -> Self {
        Self::Power(Box::new(self), exponent)
    }

    /// Its square root.
    #[must_use]
    pub fn root(self) -> Self {
        Self::Root(Box::new(self))
    }

    /// Its magnitude.
    #[must_use]
    pub fn absolute(self) -> Self {
        Self::Absolute(Box::new(self))
    }

    /// The sum of several terms; one term stands by itself, none is zero.
    #[must_use]
    pub fn sum(mut terms: Vec<Self>) -> Self {
        match terms.len() {
            0 => Self::Number(0.0),
            1 => terms.remove(0),
            _ => Self::Sum(terms),
        }
    }

    /// The parts directly below this one.
    #[must_use]
    pub fn parts(&self) -> Vec<&Self> {
        match self {
            Self::Number(_) | Self::Pi | Self::Symbol(_) => vec![],
            Self::Sum(parts) | Self::Product(parts) | Self::Max(parts) | Self::Min(parts) => parts.iter().collect(),
            Self::Quotient(above, below) => vec![above, below],
            Self::Negative(part)
            | Self::Power(part, _)
            | Self::Root(part)
            | Self::Absolute(part)
            | Self::Sine(part)
            | Self::Cosine(part)
            | Self::Tangent(part)
            | Self::ArcTangent(part) => vec![part],
        }
    }

    /// Every symbol once, in order of first appearance.
    #[must_use]
    pub fn symbols(&self) -> Vec<Symbol> {
        fn walk(tree: &Tree, found: &mut Vec<Symbol>) {
            if let Tree::Symbol(symbol) = tree
                && !found.contains(symbol)
            {
                found.push(symbol.clone());
            }
            tree.parts().into_iter().for_each(|part| walk(part, found));
        }
        let mut found = Vec::new();
        walk(self, &mut found);
        found
    }
}

impl Symbol {
    /// The symbol as a formula.
    #[must_use]
    pub fn tree(&self) -> Tree {
        Tree::Symbol(self.clone())
    }

    /// Its square.
    #[must_use]
    pub fn squared(&self) -> Tree {
        self.tree().squared()
    }

    /// Its cube.
    #[must_use]
    pub fn cubed(&self) -> Tree {
        self.tree().cubed()
    }

    /// A whole power.
    #[must_use]
    pub fn power(&self, exponent: i8) -> Tree {
        self.tree().power(exponent)
    }
}

impl From<Symbol> for Tree {
    fn from(symbol: Symbol) -> Self {
        Self::Symbol(symbol)
    }
}

impl From<f64> for Tree {
    fn from(number: f64) -> Self {
        Self::Number(number)
    }
}

impl From<i32> for Tree {
    fn from(number: i32) -> Self {
        Self::Number(f64::from(number))
    }
}

fn add(left: Tree, right: Tree) -> Tree {
    let mut terms = if let Tree::Sum(terms) = left { terms } else { vec![left] };
    terms.push(right);
    Tree::Sum(terms)
}

fn subtract(left: Tree, right: Tree) -> Tree {
    add(left, Tree::Negative(Box::new(right)))
}

fn multiply(left: Tree, right: Tree) -> Tree {
    let mut factors = if let Tree::Product(factors) = left { factors } else { vec![left] };
    if let Tree::Product(more) = right {
        factors.extend(more);
    } else {
        factors.push(right);
    }
    Tree::Product(factors)
}

fn divide(left: Tree, right: Tree) -> Tree {
    Tree::Quotient(Box::new(left), Box::new(right))
}

macro_rules! operators {
    ($($trait:ident $method:ident $apply:ident),*) => { $(
        impl<T: Into<Tree>> $trait<T> for Tree {
            type Output = Tree;
            fn $method(self, other: T) -> Tree { $apply(self, other.into()) }
        }
        impl<T: Into<Tree>> $trait<T> for Symbol {
            type Output = Tree;
            fn $method(self, other: T) -> Tree { $apply(self.into(), other.into()) }
        }
        impl $trait<Tree> for i32 {
            type Output = Tree;
            fn $method(self, other: Tree) -> Tree { $apply(self.into(), other) }
        }
        impl $trait<Symbol> for i32 {
            type Output = Tree;
            fn $method(self, other: Symbol) -> Tree { $apply(self.into(), other.into()) }
        }
    )* };
}
operators!(Add add add, Sub sub subtract, Mul mul multiply, Div div divide);

impl Neg for Tree {
    type Output = Self;
    fn neg(self) -> Self {
        Self::Negative(Box::new(self))
    }
}

impl Neg for Symbol {
    type Output = Tree;
    fn neg(self) -> Tree {
        -Tree::from(self)
    }
}
