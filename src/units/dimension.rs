//! What a quantity is made of: powers of length, mass, time and temperature.
use std::fmt;
use std::ops::{Div, Mul};

/// Powers of the four base quantities; angles and strains are without dimension.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Default)]
pub struct Dimension {
    /// Power of length.
    pub length: i8,
    /// Power of mass.
    pub mass: i8,
    /// Power of time.
    pub time: i8,
    /// Power of temperature.
    pub temperature: i8,
}

const fn of(length: i8, mass: i8, time: i8, temperature: i8) -> Dimension {
    Dimension { length, mass, time, temperature }
}

impl Dimension {
    /// A plain number: ratios, angles, strains.
    pub const NONE: Self = of(0, 0, 0, 0);
    /// Length.
    pub const LENGTH: Self = of(1, 0, 0, 0);
    /// Area.
    pub const AREA: Self = of(2, 0, 0, 0);
    /// First moment of area, section modulus.
    pub const VOLUME: Self = of(3, 0, 0, 0);
    /// Second moment of area.
    pub const INERTIA: Self = of(4, 0, 0, 0);
    /// Mass.
    pub const MASS: Self = of(0, 1, 0, 0);
    /// Time.
    pub const TIME: Self = of(0, 0, 1, 0);
    /// Temperature difference.
    pub const TEMPERATURE: Self = of(0, 0, 0, 1);
    /// Force.
    pub const FORCE: Self = of(1, 1, -2, 0);
    /// Moment of a force; energy has the same dimension.
    pub const MOMENT: Self = of(2, 1, -2, 0);
    /// Force per length; spring stiffness has the same dimension.
    pub const LINE_LOAD: Self = of(0, 1, -2, 0);
    /// Force per area.
    pub const STRESS: Self = of(-1, 1, -2, 0);
    /// Mass per volume.
    pub const DENSITY: Self = of(-3, 1, 0, 0);
    /// Force per volume.
    pub const WEIGHT_DENSITY: Self = of(-2, 1, -2, 0);
    /// Length per time squared.
    pub const ACCELERATION: Self = of(1, 0, -2, 0);
    /// Strain per temperature difference.
    pub const EXPANSION: Self = of(0, 0, 0, -1);
    /// Rotation per length.
    pub const CURVATURE: Self = of(-1, 0, 0, 0);

    /// The dimension raised to a whole power.
    #[must_use]
    pub const fn power(self, n: i8) -> Self {
        of(self.length * n, self.mass * n, self.time * n, self.temperature * n)
    }

    /// The dimension of a square root, where every power is even.
    #[must_use]
    pub const fn root(self) -> Option<Self> {
        if self.length % 2 == 0 && self.mass % 2 == 0 && self.time % 2 == 0 && self.temperature % 2 == 0 {
            Some(of(self.length / 2, self.mass / 2, self.time / 2, self.temperature / 2))
        } else {
            None
        }
    }
}

impl Mul for Dimension {
    type Output = Self;
    fn mul(self, other: Self) -> Self {
        of(
            self.length + other.length,
            self.mass + other.mass,
            self.time + other.time,
            self.temperature + other.temperature,
        )
    }
}

impl Div for Dimension {
    type Output = Self;
    fn div(self, other: Self) -> Self {
        self * other.power(-1)
    }
}

impl fmt::Display for Dimension {
    /// The engineer's word where there is one, else the powers of the SI base units.
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let word = match *self {
            Self::NONE => "a plain number",
            Self::LENGTH => "a length",
            Self::AREA => "an area",
            Self::VOLUME => "a volume",
            Self::INERTIA => "a second moment of area",
            Self::MASS => "a mass",
            Self::TIME => "a time",
            Self::TEMPERATURE => "a temperature difference",
            Self::FORCE => "a force",
            Self::MOMENT => "a moment",
            Self::LINE_LOAD => "a force per length",
            Self::STRESS => "a stress",
            Self::DENSITY => "a density",
            Self::WEIGHT_DENSITY => "a force per volume",
            Self::ACCELERATION => "an acceleration",
            Self::EXPANSION => "a strain per temperature",
            Self::CURVATURE => "a rotation per length",
            _ => {
                return write!(f, "m^{} kg^{} s^{} K^{}", self.length, self.mass, self.time, self.temperature);
            }
        };
        f.write_str(word)
    }
}
