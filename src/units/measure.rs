//! What kind of thing a quantity is, which decides the unit it is printed in.
use super::{Dimension, Unit, parse_unit};

/// Kinds of quantity that share a unit in print. The key is what `display:` may override.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub enum Measure {
    /// A plain number.
    Number,
    /// A ratio of demand to limit: printed rounded up.
    Ratio,
    /// Section dimensions, movements, eccentricities.
    Length,
    /// Coordinates, member lengths, places along a member.
    Span,
    /// Cross-sectional area.
    Area,
    /// First moment of area.
    AreaMoment,
    /// Second moment of area.
    Inertia,
    /// Force.
    Force,
    /// Moment of a force.
    Moment,
    /// Work and strain energy.
    Energy,
    /// Stress and elastic modulus.
    Stress,
    /// Force per length along a member.
    LineLoad,
    /// Rotation and slope.
    Rotation,
    /// Direction of a member or support.
    Angle,
    /// Strain.
    Strain,
    /// Curvature.
    Curvature,
    /// Temperature difference.
    Temperature,
    /// Mass density.
    Density,
    /// Acceleration.
    Acceleration,
    /// Thermal expansion coefficient.
    Expansion,
    /// Change of line load per length.
    LoadSlope,
    /// Translational spring stiffness.
    Spring,
    /// Rotational spring stiffness.
    RotationalSpring,
    /// Line load times length², the load integrals of the fixed-end terms.
    ForceArea,
    /// Line load times length⁴.
    ForceVolume,
    /// Flexural rigidity.
    Rigidity,
}

impl Measure {
    /// Every measure, in the order of the enum.
    pub const ALL: &'static [Self] = &[
        Self::Number,
        Self::Ratio,
        Self::Length,
        Self::Span,
        Self::Area,
        Self::AreaMoment,
        Self::Inertia,
        Self::Force,
        Self::Moment,
        Self::Energy,
        Self::Stress,
        Self::LineLoad,
        Self::Rotation,
        Self::Angle,
        Self::Strain,
        Self::Curvature,
        Self::Temperature,
        Self::Density,
        Self::Acceleration,
        Self::Expansion,
        Self::LoadSlope,
        Self::Spring,
        Self::RotationalSpring,
        Self::ForceArea,
        Self::ForceVolume,
        Self::Rigidity,
    ];

    /// Key under `display:`, dimension, metric unit, US unit.
    const fn row(self) -> (&'static str, Dimension, &'static str, &'static str) {
        use Dimension as D;
        match self {
            Self::Number => ("number", D::NONE, "", ""),
            Self::Ratio => ("ratio", D::NONE, "", ""),
            Self::Length => ("length", D::LENGTH, "mm", "in"),
            Self::Span => ("span", D::LENGTH, "m", "ft"),
            Self::Area => ("area", D::AREA, "mm2", "in2"),
            Self::AreaMoment => ("area_moment", D::VOLUME, "mm3", "in3"),
            Self::Inertia => ("inertia", D::INERTIA, "mm4", "in4"),
            Self::Force => ("force", D::FORCE, "kN", "kip"),
            Self::Moment => ("moment", D::MOMENT, "kN.m", "kip.ft"),
            Self::Energy => ("energy", D::MOMENT, "N.m", "kip.in"),
            Self::Stress => ("stress", D::STRESS, "MPa", "ksi"),
            Self::LineLoad => ("line_load", D::LINE_LOAD, "kN/m", "kip/ft"),
            Self::Rotation => ("rotation", D::NONE, "mrad", "mrad"),
            Self::Angle => ("angle", D::NONE, "deg", "deg"),
            Self::Strain => ("strain", D::NONE, "", ""),
            Self::Curvature => ("curvature", D::CURVATURE, "1/m", "1/ft"),
            Self::Temperature => ("temperature", D::TEMPERATURE, "K", "degF"),
            Self::Density => ("density", D::DENSITY, "kg/m3", "lb/ft3"),
            Self::Acceleration => ("acceleration", D::ACCELERATION, "m/s2", "ft/s2"),
            Self::Expansion => ("expansion", D::EXPANSION, "1/K", "1/degF"),
            Self::LoadSlope => ("load_slope", D::STRESS, "kN/m2", "kip/ft2"),
            Self::Spring => ("spring", D::LINE_LOAD, "kN/m", "kip/ft"),
            Self::RotationalSpring => ("rotational_spring", D::MOMENT, "kN.m/rad", "kip.ft/rad"),
            Self::ForceArea => {
                ("force_area", Dimension { length: 3, mass: 1, time: -2, temperature: 0 }, "kN.m2", "kip.ft2")
            }
            Self::ForceVolume => {
                ("force_volume", Dimension { length: 4, mass: 1, time: -2, temperature: 0 }, "kN.m3", "kip.ft3")
            }
            Self::Rigidity => {
                ("rigidity", Dimension { length: 3, mass: 1, time: -2, temperature: 0 }, "kN.m2", "kip.ft2")
            }
        }
    }

    /// The key that overrides its unit under `display:`.
    #[must_use]
    pub const fn key(self) -> &'static str {
        self.row().0
    }

    /// What it measures.
    #[must_use]
    pub const fn dimension(self) -> Dimension {
        self.row().1
    }

    /// The unit it is printed in, unless `display:` says otherwise.
    #[must_use]
    pub fn unit(self, system: System) -> Unit {
        let (_, _, metric, us) = self.row();
        let text = match system {
            System::Metric => metric,
            System::Us => us,
        };
        parse_unit(text).unwrap_or_else(|_| Unit::none())
    }
}

/// The two families of printed units.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum System {
    /// mm, m, kN, kN·m, MPa.
    #[default]
    Metric,
    /// in, ft, kip, kip·ft, ksi.
    Us,
}
