//! A second opinion on a step, sharing nothing with `retrace`: a small reader of numbers, units and formulas.
//!
//! It says by how much a changed step misses its closure; what it cannot read is wrong as well.
use std::collections::BTreeMap;

/// Size in SI and powers of length, mass, time and temperature (SI brochure; yard and pound agreement of 1959).
const UNITS: &[(&str, f64, [i32; 4])] = &[
    ("mm", 1e-3, [1, 0, 0, 0]),
    ("cm", 1e-2, [1, 0, 0, 0]),
    ("m", 1.0, [1, 0, 0, 0]),
    ("km", 1e3, [1, 0, 0, 0]),
    ("in", 0.0254, [1, 0, 0, 0]),
    ("ft", 0.3048, [1, 0, 0, 0]),
    ("N", 1.0, [1, 1, -2, 0]),
    ("kN", 1e3, [1, 1, -2, 0]),
    ("MN", 1e6, [1, 1, -2, 0]),
    ("lbf", 4.448_221_615_260_5, [1, 1, -2, 0]),
    ("kip", 4_448.221_615_260_5, [1, 1, -2, 0]),
    ("kg", 1.0, [0, 1, 0, 0]),
    ("g", 1e-3, [0, 1, 0, 0]),
    ("t", 1e3, [0, 1, 0, 0]),
    ("lb", 0.453_592_37, [0, 1, 0, 0]),
    ("s", 1.0, [0, 0, 1, 0]),
    ("Pa", 1.0, [-1, 1, -2, 0]),
    ("kPa", 1e3, [-1, 1, -2, 0]),
    ("MPa", 1e6, [-1, 1, -2, 0]),
    ("GPa", 1e9, [-1, 1, -2, 0]),
    ("psi", 4.448_221_615_260_5 / (0.0254 * 0.0254), [-1, 1, -2, 0]),
    ("ksi", 4_448.221_615_260_5 / (0.0254 * 0.0254), [-1, 1, -2, 0]),
    ("psf", 4.448_221_615_260_5 / (0.3048 * 0.3048), [-1, 1, -2, 0]),
    ("K", 1.0, [0, 0, 0, 1]),
    ("degF", 5.0 / 9.0, [0, 0, 0, 1]),
    ("rad", 1.0, [0; 4]),
    ("mrad", 1e-3, [0; 4]),
    ("deg", std::f64::consts::PI / 180.0, [0; 4]),
];

/// A value with its dimension; `None` for a bare zero, which fits anywhere.
#[derive(Debug, Clone, Copy)]
pub(super) struct Value {
    si: f64,
    dimension: Option<[i32; 4]>,
    /// One unit of the last printed place, in SI.
    unit: f64,
}

impl Value {
    /// Whether two numbers have the same size and the same last place.
    pub(super) fn prints_as(&self, other: &Value) -> bool {
        (self.si - other.si).abs() <= 1e-12 * self.si.abs() && (self.unit - other.unit).abs() <= 1e-12 * self.unit
    }
}

/// A step as this reader takes it apart.
#[derive(Debug, Clone)]
pub(super) struct Step {
    pub(super) title: String,
    pub(super) symbol: String,
    formula: String,
    numbers: String,
    result: String,
    pub(super) from: Vec<(String, String)>,
    pub(super) by: String,
}

impl Step {
    /// The lines between the fences.
    pub(super) fn read(body: &str) -> Option<Self> {
        let mut lines: Vec<String> = Vec::new();
        for line in body.lines() {
            let trimmed = line.trim();
            if line.starts_with(' ') && !trimmed.starts_with("= ") {
                let last = lines.last_mut()?;
                if !last.ends_with(['·', '/', '(', '|']) || last.ends_with(" ·") {
                    last.push(' ');
                }
                last.push_str(trimmed);
            } else {
                lines.push(trimmed.to_owned());
            }
        }
        let (symbol, formula) = lines.get(1)?.split_once(" = ")?;
        let mut step = Self {
            title: lines[0].clone(),
            symbol: symbol.to_owned(),
            formula: formula.to_owned(),
            numbers: lines.get(2)?.strip_prefix("= ")?.to_owned(),
            result: lines.get(3)?.strip_prefix("= ")?.to_owned(),
            from: Vec::new(),
            by: String::new(),
        };
        for line in &lines[4..] {
            if let Some(entries) = line.strip_prefix("from: ") {
                for entry in entries.split(" · ") {
                    let (symbol, address) = entry.split_once(' ')?;
                    step.from.push((symbol.to_owned(), address.to_owned()));
                }
            } else if let Some(by) = line.strip_prefix("by: ") {
                step.by = by.to_owned();
            } else if !line.starts_with("note: ") {
                return None;
            }
        }
        Some(step)
    }

    /// The result as printed, without its comparison.
    pub(super) fn result(&self) -> &str {
        let end = [" ≤", " >"].iter().filter_map(|relation| self.result.find(relation)).min();
        &self.result[..end.unwrap_or(self.result.len())]
    }

    /// The number that stands in the place of each symbol, from the order of the two lines; none where they do not match.
    pub(super) fn operands(&self) -> Option<Operands> {
        let mut operands = Operands::new();
        let (names, numbers) = (atoms(&self.formula), atoms(&self.numbers));
        if names.len() != numbers.len() {
            return None;
        }
        for (name, number) in names.iter().zip(&numbers).filter(|(name, _)| name.starts_with(char::is_alphabetic)) {
            operands.insert(name.clone(), number_of(number)?);
        }
        Some(operands)
    }

    /// Why the step is wrong by itself, by more than its closure; `operands` and `sound` are those of the step unchanged.
    pub(super) fn misses(&self, sound: &Step, operands: &Operands) -> Option<&'static str> {
        let (Some(result), Some(sound_result)) = (number_of(self.result()), number_of(sound.result())) else {
            return Some("the result cannot be read");
        };
        match value_of(&self.numbers, &Operands::new()) {
            None => return Some("the numbers cannot be read"),
            Some(worked) if !agree(&worked, &result) => return Some("the numbers do not give the result"),
            Some(_) => {}
        }
        match value_of(&self.formula, operands) {
            None => return Some("the formula cannot be read"),
            Some(worked) if !agree(&worked, &sound_result) => return Some("the formula does not give the result"),
            Some(_) => {}
        }
        let mut appear: Vec<String> = Vec::new();
        for name in atoms(&self.formula).into_iter().filter(|name| name.starts_with(char::is_alphabetic)) {
            if !appear.contains(&name) {
                appear.push(name);
            }
        }
        if !appear.iter().eq(self.from.iter().map(|(symbol, _)| symbol)) {
            return Some("`from:` names other symbols");
        }
        self.verdict_misses(&result)
    }

    fn verdict_misses(&self, result: &Value) -> Option<&'static str> {
        let after = self.result[self.result().len()..].trim_start();
        if after.is_empty() {
            return None;
        }
        let (relation, rest) = after.split_once(' ')?;
        let (limit, ok) = match (rest.strip_suffix(" NOT OK"), rest.strip_suffix(" OK")) {
            (Some(limit), _) => (limit, false),
            (None, Some(limit)) => (limit, true),
            (None, None) => return Some("the verdict cannot be read"),
        };
        let Some(limit) = number_of(limit) else { return Some("the limit cannot be read") };
        let is_at_most = relation == "≤";
        if (result.si <= limit.si * (1.0 + 1e-12)) != is_at_most {
            return Some("the relation is untrue");
        }
        // A demand is within its limit at most; a limit to be reached is named so in words.
        let must_reach = self.title.contains("at least") || self.by.contains("at least");
        (is_at_most != (ok != must_reach)).then_some("the verdict does not follow")
    }
}

/// Symbols with the numbers in their places.
pub(super) type Operands = BTreeMap<String, Value>;

/// Whether a worked value is the printed one within one unit of its last place.
fn agree(worked: &Value, printed: &Value) -> bool {
    let dimensions = worked.dimension.zip(printed.dimension).is_none_or(|(a, b)| a == b);
    dimensions && (worked.si - printed.si).abs() <= printed.unit * (1.0 + 1e-6) + 1e-13 * printed.si.abs()
}

/// A number with its unit, standing by itself.
pub(super) fn number_of(text: &str) -> Option<Value> {
    let mut reader = Reader { text, operands: &Operands::new() };
    let negative = reader.eat("−");
    let number = reader.number()?;
    let is_read = reader.text.is_empty() && !(negative && number.si == 0.0);
    is_read.then_some(if negative { Value { si: -number.si, ..number } } else { number })
}

/// What a formula gives.
fn value_of(text: &str, operands: &Operands) -> Option<Value> {
    let mut reader = Reader { text, operands };
    let value = reader.sum()?;
    reader.text.is_empty().then_some(value)
}

/// Symbols and numbers of a formula in order; a negative number in parentheses is one.
fn atoms(text: &str) -> Vec<String> {
    let mut found = Vec::new();
    let none = Operands::new();
    let mut reader = Reader { text, operands: &none };
    let mut opened = false;
    while let Some(c) = reader.text.chars().next() {
        let before = reader.text;
        let minus = opened && reader.eat("−");
        opened = false;
        if reader.text.starts_with(|c: char| c.is_ascii_digit()) {
            if reader.number().is_none() {
                reader.text = &before[c.len_utf8()..];
            }
            let closed = reader.text.starts_with(')');
            let text = &before[..before.len() - reader.text.len()];
            found.push(if minus && !closed { text['−'.len_utf8()..].to_owned() } else { text.to_owned() });
        } else if c.is_alphabetic() && !minus {
            let name = reader.name();
            if !["max", "min", "sin", "cos", "tan", "atan", "π"].contains(&name) {
                found.push(name.to_owned());
            }
        } else {
            reader.text = before;
            reader.eat(&c.to_string());
            opened = c == '(';
        }
    }
    found
}

/// A place in a formula.
struct Reader<'a> {
    text: &'a str,
    operands: &'a Operands,
}

impl<'a> Reader<'a> {
    fn eat(&mut self, text: &str) -> bool {
        match self.text.strip_prefix(text) {
            Some(rest) => {
                self.text = rest;
                true
            }
            None => false,
        }
    }

    fn take(&mut self, fits: impl Fn(char) -> bool) -> &'a str {
        let (taken, rest) = self.text.split_at(self.text.find(|c| !fits(c)).unwrap_or(self.text.len()));
        self.text = rest;
        taken
    }

    fn name(&mut self) -> &'a str {
        self.take(|c| c.is_alphanumeric() && !RAISED.contains(c) || "_′₀₁₂₃₄₅₆₇₈₉".contains(c))
    }

    /// A raised whole number; 1 where none stands.
    fn raised(&mut self) -> Option<i32> {
        let negative = self.eat("⁻");
        let digits: String = self
            .take(|c| RAISED.contains(c))
            .chars()
            .filter_map(|c| RAISED.chars().position(|r| r == c))
            .map(|d| d.to_string())
            .collect();
        match (digits.is_empty(), negative) {
            (true, false) => Some(1),
            (true, true) => None,
            (false, _) => digits.parse::<i32>().ok().map(|n| if negative { -n } else { n }),
        }
    }

    fn number(&mut self) -> Option<Value> {
        let digits = self.take(|c| c.is_ascii_digit() || c == '.');
        let decimals = digits.split_once('.').map_or(0, |(_, decimals)| decimals.len());
        let is_sound = digits.starts_with(|c: char| c.is_ascii_digit())
            && !digits.ends_with('.')
            && digits.matches('.').count() <= 1
            && !(digits.starts_with('0') && digits.len() > 1 && !digits.starts_with("0."));
        if !is_sound {
            return None;
        }
        let power = if self.eat("×10") { self.raised()? } else { 0 };
        let mut value = Value {
            si: format!("{digits}e{power}").parse().ok()?,
            dimension: Some([0; 4]),
            unit: 10_f64.powi(power - i32::try_from(decimals).ok()?),
        };
        let unit = self.text.strip_prefix(' ').unwrap_or("");
        if unit.starts_with(|c: char| c.is_alphabetic()) || unit.starts_with("1/") {
            self.eat(" ");
            let (scale, dimension) = unit_of(self.take(|c| !" ),|".contains(c)))?;
            value = Value { si: value.si * scale, dimension: Some(dimension), unit: value.unit * scale };
        } else if value.si == 0.0 {
            value.dimension = None;
        }
        Some(value)
    }

    fn sum(&mut self) -> Option<Value> {
        let negative = self.eat("−");
        let mut whole = self.fraction()?;
        if negative {
            whole.si = -whole.si;
        }
        loop {
            let sign = if self.eat(" + ") {
                1.0
            } else if self.eat(" − ") {
                -1.0
            } else {
                return Some(whole);
            };
            let term = self.fraction()?;
            whole = joined(whole, term, |a, b| a + sign * b)?;
        }
    }

    fn fraction(&mut self) -> Option<Value> {
        let mut whole = self.power()?;
        while self.eat("·") {
            let factor = self.power()?;
            whole = multiplied(whole, factor, 1);
        }
        if self.eat("/") {
            let below = self.power()?;
            whole = multiplied(whole, below, -1);
        }
        Some(whole)
    }

    fn power(&mut self) -> Option<Value> {
        let base = self.factor()?;
        let exponent = self.raised()?;
        let dimension = base.dimension.map(|d| d.map(|power| power * exponent));
        Some(Value { si: base.si.powi(exponent), dimension, ..base })
    }

    fn factor(&mut self) -> Option<Value> {
        if self.eat("(") {
            let inside = self.sum()?;
            return self.eat(")").then_some(inside);
        }
        if self.eat("|") {
            let inside = self.sum()?;
            return self.eat("|").then_some(Value { si: inside.si.abs(), ..inside });
        }
        if self.eat("√(") {
            let inside = self.sum()?;
            let is_even = inside.dimension.is_none_or(|d| d.iter().all(|power| power % 2 == 0));
            let root = Value { si: inside.si.sqrt(), dimension: inside.dimension.map(|d| d.map(|p| p / 2)), ..inside };
            return (self.eat(")") && is_even).then_some(root);
        }
        if self.text.starts_with(|c: char| c.is_ascii_digit()) {
            return self.number();
        }
        let name = self.name();
        if name == "π" {
            return Some(Value { si: std::f64::consts::PI, dimension: Some([0; 4]), unit: 0.0 });
        }
        if !self.eat("(") {
            return self.operands.get(name).copied();
        }
        let mut inside = self.sum()?;
        let of_ratio = |inside: Value, function: fn(f64) -> f64| {
            inside.dimension.is_none_or(|d| d == [0; 4]).then_some(Value { si: function(inside.si), ..inside })
        };
        inside = match name {
            "sin" => of_ratio(inside, f64::sin)?,
            "cos" => of_ratio(inside, f64::cos)?,
            "tan" => of_ratio(inside, f64::tan)?,
            "atan" => of_ratio(inside, f64::atan)?,
            "max" | "min" => {
                while self.eat(", ") {
                    let other = self.sum()?;
                    inside = joined(inside, other, if name == "max" { f64::max } else { f64::min })?;
                }
                inside
            }
            _ => return None,
        };
        self.eat(")").then_some(inside)
    }
}

const RAISED: &str = "⁰¹²³⁴⁵⁶⁷⁸⁹";

fn joined(a: Value, b: Value, join: impl Fn(f64, f64) -> f64) -> Option<Value> {
    let agree = a.dimension.zip(b.dimension).is_none_or(|(a, b)| a == b);
    agree.then_some(Value { si: join(a.si, b.si), dimension: a.dimension.or(b.dimension), ..a })
}

fn multiplied(a: Value, b: Value, sign: i32) -> Value {
    let dimension = a.dimension.zip(b.dimension).map(|(a, b)| std::array::from_fn(|at| a[at] + sign * b[at]));
    Value { si: a.si * b.si.powi(sign), dimension, ..a }
}

/// Size and dimension of a unit such as `kN·m/rad`; each `/` divides by what follows it.
fn unit_of(text: &str) -> Option<(f64, [i32; 4])> {
    let (mut scale, mut dimension, mut sign) = (1.0, [0; 4], 1);
    for (at, part) in text.split_inclusive(['·', '/']).enumerate() {
        let divides_next = part.ends_with('/');
        let part = part.trim_end_matches(['·', '/']);
        let name = part.trim_end_matches(|c| RAISED.contains(c));
        let power: i32 = match &part[name.len()..] {
            "" => 1,
            raised => i32::try_from(RAISED.chars().position(|c| raised.starts_with(c))?).ok()?,
        };
        if !(name == "1" && at == 0 && divides_next) {
            let (_, size, powers) = UNITS.iter().find(|(symbol, ..)| *symbol == name)?;
            scale *= size.powi(sign * power);
            (0..4).for_each(|at| dimension[at] += sign * power * powers[at]);
        }
        sign = if divides_next { -1 } else { 1 };
    }
    Some((scale, dimension))
}
