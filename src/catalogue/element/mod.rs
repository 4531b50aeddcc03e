//! Member kinds: geometry, movements in member axes, strain, stress and end force, and the stiffness they imply.
pub mod bar;
pub mod bar3;
pub mod bending;
pub mod depth;
pub mod geometry;
pub mod joint;
pub mod movement;
mod stiffness;

pub use stiffness::stiffness;

use crate::formula::Definition;

/// Makes lazily built definitions. The plain words come from the symbol table unless a title follows the symbol; each file lists its own as `ALL`.
macro_rules! definitions {
    ($($name:ident : $symbol:ident $($title:literal)?, $measure:ident, $tree:expr, $source:expr;)*) => {
        $(
            #[doc = concat!("`", stringify!($symbol), " = ", stringify!($tree), "`")]
            pub static $name: std::sync::LazyLock<crate::formula::Definition> = std::sync::LazyLock::new(|| {
                let titles = [$($title,)? crate::catalogue::meaning(&$symbol)];
                crate::formula::Definition::new($symbol, titles[0], crate::units::Measure::$measure, $tree)
                    .from($source)
            });
        )*
        /// Every definition of this file.
        pub static ALL: &[&std::sync::LazyLock<crate::formula::Definition>] = &[$(&$name),*];
    };
}
pub(crate) use definitions;

/// Every definition of every member kind.
pub fn all() -> impl Iterator<Item = &'static Definition> {
    [bar::ALL, bar3::ALL, bending::ALL, depth::ALL, geometry::ALL, joint::ALL, movement::ALL]
        .into_iter()
        .flatten()
        .map(|d| &***d)
}
