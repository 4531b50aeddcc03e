//! A number as it stands on paper: whole counts of its last printed place, so that print and value never differ.
use std::fmt;

/// A printed number: `count` units of `10^place`.
///
/// The text follows from these two alone: fixed point from 0.001 to 10,000,000, otherwise a power of ten in steps of three.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub struct Printed {
    /// How many units of the last printed place.
    pub count: i64,
    /// Exponent of ten of the last printed place.
    pub place: i32,
}

impl Printed {
    /// Rounds to the nearest unit of the last place; halves go away from zero.
    #[must_use]
    pub fn nearest(value: f64, place: i32) -> Self {
        Self { count: scaled(value, place).round() as i64, place }
    }

    /// Rounds away from zero, for a demand that must never look smaller than it is.
    ///
    /// What lies within a billionth of a unit above a printed value counts as that value.
    #[must_use]
    pub fn up(value: f64, place: i32) -> Self {
        let scaled = scaled(value, place);
        let size = (scaled.abs() - 1e-9 * scaled.abs().max(1.0)).ceil();
        Self { count: size.copysign(scaled) as i64, place }
    }

    /// The printed number as a value.
    #[must_use]
    pub fn value(self) -> f64 {
        // Whole counts and powers of ten up to 22 are exact, so one division or product rounds once, as reading
        // the decimal text would.
        match POWERS.get(self.place.unsigned_abs() as usize) {
            Some(power) if self.count.unsigned_abs() < 1 << 53 => {
                if self.place < 0 {
                    self.count as f64 / power
                } else {
                    self.count as f64 * power
                }
            }
            _ => format!("{}e{}", self.count, self.place).parse().unwrap_or(0.0),
        }
    }

    /// One unit of the last printed place.
    #[must_use]
    pub fn unit_of_last_place(self) -> f64 {
        power_of_ten(self.place)
    }

    /// Whether the number stands with a minus sign.
    #[must_use]
    pub const fn is_negative(self) -> bool {
        self.count < 0
    }

    /// Exponent of ten that is set apart in print, zero for fixed point.
    #[must_use]
    pub fn exponent(self) -> i32 {
        if self.count == 0 {
            return if (-4..=0).contains(&self.place) { 0 } else { 3 * (self.place + 3).div_euclid(3) };
        }
        let leading = self.place + self.count.unsigned_abs().ilog10() as i32;
        if self.place <= 0 && (-3..7).contains(&leading) {
            return 0;
        }
        let exponent = 3 * leading.div_euclid(3);
        // The last place must be visible: no zeros are printed that were not computed.
        if exponent < self.place { 3 * (self.place + 2).div_euclid(3) } else { exponent }
    }

    /// Digits before the power of ten, with a typographic minus.
    #[must_use]
    pub fn digits(self) -> String {
        let decimals = (self.exponent() - self.place).max(0) as usize;
        let count = self.count.unsigned_abs().to_string();
        let padded = format!("{count:0>width$}", width = decimals + 1);
        let (whole, fraction) = padded.split_at(padded.len() - decimals);
        let sign = if self.is_negative() { "−" } else { "" };
        if decimals == 0 { format!("{sign}{whole}") } else { format!("{sign}{whole}.{fraction}") }
    }
}

/// Powers of ten that a double holds exactly.
const POWERS: [f64; 23] = [
    1e0, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18, 1e19, 1e20,
    1e21, 1e22,
];

fn power_of_ten(exponent: i32) -> f64 {
    match POWERS.get(exponent.unsigned_abs() as usize) {
        Some(power) if exponent < 0 => 1.0 / power,
        Some(power) => *power,
        None => format!("1e{exponent}").parse().unwrap_or(0.0),
    }
}

fn scaled(value: f64, place: i32) -> f64 {
    let scaled = if place < 0 { value * power_of_ten(-place) } else { value / power_of_ten(place) };
    scaled.clamp(-9e18, 9e18)
}

impl fmt::Display for Printed {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.digits())?;
        let exponent = self.exponent();
        if exponent != 0 {
            f.write_str("×10")?;
            if exponent < 0 {
                f.write_str("⁻")?;
            }
            for digit in exponent.unsigned_abs().to_string().chars() {
                write!(f, "{}", ['⁰', '¹', '²', '³', '⁴', '⁵', '⁶', '⁷', '⁸', '⁹'][digit as usize - '0' as usize])?;
            }
        }
        Ok(())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[track_caller]
    fn check(value: f64, place: i32, expected: &str) {
        assert_eq!(Printed::nearest(value, place).to_string(), expected);
    }

    #[test]
    fn fixed_point_and_powers_of_ten() {
        check(2.34567, -3, "2.346");
        check(-0.0004, -2, "0.00");
        check(-3.2145, -3, "−3.215");
        check(1.102e-4, -7, "110.2×10⁻⁶");
        check(19_430_123.0, 4, "19.43×10⁶");
        check(210_000.0, 0, "210000");
        check(0.0, -9, "0.000×10⁻⁶");
        check(2.5e-12, -13, "2.5×10⁻¹²");
        check(5000.0, 2, "5.0×10³");
    }

    #[test]
    fn rounding_up_never_shows_less() {
        assert_eq!(Printed::up(1.00001, -3).to_string(), "1.001");
        assert_eq!(Printed::up(0.5, -3).to_string(), "0.500");
        assert_eq!(Printed::up(0.500_000_000_000_01, -3).to_string(), "0.500");
    }
}
