//! Comparison with limits (steps C): one row a member or node, kind and combination.
use super::{Extremes, MemberForces, SectionValues};
use crate::catalogue::check::{self, deflection, euler, shear, slenderness, stress};
use crate::catalogue::symbol::{I, IZ, L, RI, RZ};
use crate::formula::{Scope, Symbol, Value, Worksheet};
use crate::model::{
    Combination, DeflectionCheck, DeflectionLimit, EffectiveLength, Member, MemberKind, Model, Purpose,
};
use crate::units::Measure;

/// One row of the comparison with limits.
#[derive(Debug, Clone, PartialEq)]
pub struct Check {
    /// `<subject>.<combination>.<kind>`.
    pub id: String,
    /// `stress`, `shear`, `deflection`, `deflection.x` …
    pub kind: String,
    /// Member, node or `structure`.
    pub subject: String,
    /// Combination.
    pub combination: String,
    /// Demand and limit, SI, as far as they are known.
    pub demand: Option<f64>,
    /// Limit, SI.
    pub limit: Option<f64>,
    /// Kind of quantity of demand and limit.
    pub measure: Measure,
    /// Demand over limit; `None` where it was not checked.
    pub ratio: Option<f64>,
    /// Place of the demand along the member, m.
    pub place: Option<f64>,
    /// Whether the ratio tells only part of the check, such as buckling in the plane alone.
    pub partial: bool,
    /// Why it was not checked, or not wholly.
    pub why: Option<String>,
    /// The step that compares, where it was worked.
    pub step: Option<String>,
}

impl Check {
    /// Whether it keeps its limit; `None` where it was not checked, or only in part and that part keeps it.
    #[must_use]
    pub fn ok(&self) -> Option<bool> {
        self.ratio.map(|ratio| ratio <= 1.0).filter(|ok| !(*ok && self.partial))
    }
}

/// Ratios that exceed 1 by rounding alone are 1.
fn settled(ratio: f64) -> f64 {
    if (ratio - 1.0).abs() <= 1e-12 { 1.0 } else { ratio }
}

struct Bench<'w, 'a> {
    scope: Scope<'w>,
    model: &'a Model,
    subject: &'a str,
    combination: &'a str,
    rows: Vec<Check>,
}

impl Bench<'_, '_> {
    fn row(&mut self, kind: &str, measure: Measure) -> Check {
        Check {
            id: format!("{}.{}.{kind}", self.subject, self.combination),
            kind: kind.to_owned(),
            subject: self.subject.to_owned(),
            combination: self.combination.to_owned(),
            demand: None,
            limit: None,
            measure,
            ratio: None,
            place: None,
            partial: false,
            why: None,
            step: None,
        }
    }

    fn number(&self, nn: u16) -> Option<String> {
        Some(format!("{}.{}.C{nn:02}", self.subject, self.combination))
    }

    fn compare(&mut self, nn: u16, definition: &'static std::sync::LazyLock<crate::formula::Definition>) -> f64 {
        settled(self.scope.compare('C', nn, definition, 1.0).si)
    }

    fn limit(&mut self, symbol: &Symbol, path: &str, value: f64, measure: Measure) -> Value {
        let value = self.scope.sheet().input(format_args!("INPUT.{path}"), value, measure);
        self.scope.set(symbol, value);
        value
    }
}

/// Works every check of a member under a combination.
#[allow(clippy::too_many_arguments, reason = "a check draws on everything worked of its member")]
pub fn work_member_checks(
    sheet: &mut dyn Worksheet,
    model: &Model,
    (index, member): (usize, &Member),
    combination: &Combination,
    section: &SectionValues,
    forces: &MemberForces,
    extremes: &Extremes,
    largest_force: f64,
) -> Vec<Check> {
    let mut scope = Scope::new(sheet, &member.name, Some(&combination.name));
    scope.inherit(&forces.known);
    let mut bench = Bench { scope, model, subject: &member.name, combination: &combination.name, rows: Vec::new() };
    if combination.is_for(Purpose::Stress) && model.checks.stress.covers(index) {
        bench.stress(member, extremes);
    }
    if combination.is_for(Purpose::Shear) && model.checks.shear.covers(index) {
        bench.shear(member, section, extremes);
    }
    if combination.is_for(Purpose::Deflection) {
        for check in &model.checks.deflection {
            if let DeflectionCheck::Member { member: checked, limit } = check
                && *checked == index
            {
                bench.deflection(member, *limit, extremes);
            }
        }
    }
    let compressed = extremes.least_axial.filter(|n| n.value.si < -1e-9 * largest_force);
    if let Some(least) = compressed {
        bench.scope.set(&check::N_LEAST, least.value);
        let buckling = model.checks.buckling.filter(|_| combination.is_for(Purpose::Buckling));
        let slender = model.checks.slenderness.filter(|_| combination.is_for(Purpose::Slenderness));
        if buckling.is_some() || slender.is_some() {
            bench.effective_lengths(member);
        }
        if let Some(safety) = buckling {
            bench.buckling(safety, least.value);
        }
        if let Some(limit) = slender {
            bench.slenderness(limit);
        }
    }
    bench.rows
}

impl Bench<'_, '_> {
    fn stress(&mut self, member: &Member, extremes: &Extremes) {
        let mut row = self.row("stress", Measure::Stress);
        let (Some(tension), Some(compression)) = (extremes.tension, extremes.compression) else {
            row.why = Some("the section has no fibre distances".into());
            self.rows.push(row);
            return;
        };
        let limits = &member.allowable;
        let mut missing = Vec::new();
        let senses = [
            (tension, 1.0, limits.tension, 0, check::TENSION_LIMIT, &stress::TENSION, "tensile"),
            (compression, -1.0, limits.compression, 1, check::COMPRESSION_LIMIT, &stress::COMPRESSION, "compressive"),
        ];
        let any_stress = tension.value.si.abs().max(compression.value.si.abs());
        for (nn, (extreme, sign, limit, path, symbol, definition, word)) in senses.into_iter().enumerate() {
            if sign * extreme.value.si <= 1e-9 * any_stress {
                continue;
            }
            let Some(limit) = limit else {
                missing.push(word);
                continue;
            };
            self.limit(&symbol, &allowable_address(&member.allowable_path[path]), limit, Measure::Stress);
            self.scope.set(&check::SIGMA, extreme.value);
            let nn = nn as u16 + 1;
            let ratio = self.compare(nn, definition);
            self.scope.sheet().remark(limits.source.as_deref(), None);
            if row.ratio.is_none_or(|before| ratio > before) {
                row.demand = Some(extreme.value.si.abs());
                row.place = Some(extreme.x);
                row.limit = Some(limit);
                row.ratio = Some(ratio);
                row.step = self.number(nn);
            }
        }
        if any_stress == 0.0 && (limits.tension.is_some() || limits.compression.is_some()) {
            row.demand = Some(0.0);
            row.limit = limits.tension.or(limits.compression);
            row.ratio = Some(0.0);
        } else if any_stress == 0.0 {
            missing.push("tensile or compressive");
        }
        if !missing.is_empty() {
            // What is known to be beyond its limit is said, whatever else could not be compared.
            row.partial = row.ratio.is_some();
            let alone = if row.partial { "; limit and ratio are those of the other stress alone" } else { "" };
            row.why = Some(format!("no allowable {} stress is given{alone}", missing.join(" or ")));
        }
        self.rows.push(row);
    }

    fn shear(&mut self, member: &Member, section: &SectionValues, extremes: &Extremes) {
        let Some(peak) = extremes.shear else { return };
        let mut row = self.row("shear", Measure::Stress);
        self.scope.set(&check::VMAX, peak.value);
        let written = peak.value.id != u32::MAX || peak.value.si != 0.0;
        let tau = if let (Some(moment), Some(width), true) = (section.shear_moment, section.shear_width, written) {
            self.scope.set(&check::Q, moment);
            self.scope.set(&check::BW, width);
            Some(self.scope.work('S', 11, &shear::STRESS))
        } else if section.shear_area.is_some() && written {
            let tau = self.scope.work('S', 11, &shear::MEAN_STRESS);
            self.scope.sheet().remark(None, Some("Taken as spread evenly over the shear area given."));
            Some(tau)
        } else {
            None
        };
        // Without any shear force there is no shear stress, whatever the section.
        row.demand = tau.map(|t| t.si).or((!written).then_some(0.0));
        row.place = Some(peak.x);
        row.limit = member.allowable.shear;
        row.why = match (tau, member.allowable.shear) {
            (_, None) => Some("no allowable shear stress is given".into()),
            (None, Some(_)) if !written => {
                row.ratio = Some(0.0);
                None
            }
            (None, _) => Some("the section has no shear area".into()),
            (Some(_), Some(limit)) => {
                self.limit(&check::SHEAR_LIMIT, &allowable_address(&member.allowable_path[2]), limit, Measure::Stress);
                row.ratio = Some(self.compare(11, &shear::UTILISATION));
                self.scope.sheet().remark(member.allowable.source.as_deref(), None);
                row.step = self.number(11);
                None
            }
        };
        self.rows.push(row);
    }

    fn deflection(&mut self, member: &Member, limit: DeflectionLimit, extremes: &Extremes) {
        let mut row = self.row("deflection", Measure::Length);
        let Some(peak) = extremes.deflection else {
            row.why = Some("a bar stays straight between its ends".into());
            self.rows.push(row);
            return;
        };
        let name = &member.name;
        let limit = match limit {
            DeflectionLimit::SpanOver(divisor) => {
                self.limit(&check::SPAN_DIVISOR, &format!("checks.deflection.{name}.n"), divisor, Measure::Number);
                self.scope.work('C', 21, &deflection::LIMIT)
            }
            DeflectionLimit::Absolute(limit) => {
                self.limit(&check::DELTA_LIMIT, &format!("checks.deflection.{name}.limit"), limit, Measure::Length)
            }
        };
        row.demand = Some(peak.value.si.abs());
        row.place = Some(peak.x);
        row.limit = Some(limit.si);
        if peak.value.si == 0.0 {
            row.ratio = Some(0.0);
        } else {
            self.scope.set(&check::DELTA, peak.value);
            row.ratio = Some(self.compare(22, &deflection::UTILISATION));
            row.step = self.number(22);
        }
        self.rows.push(row);
    }

    fn effective_lengths(&mut self, member: &Member) {
        let name = &member.name;
        let planes = [
            (
                Some(member.in_plane.unwrap_or(EffectiveLength::Factor(1.0))),
                "in_plane",
                check::K_IN,
                check::L_IN,
                31,
                &euler::LENGTH_IN,
            ),
            (member.out_of_plane, "out_of_plane", check::K_OUT, check::L_OUT, 33, &euler::LENGTH_OUT),
        ];
        for (given, key, factor, length, nn, definition) in planes {
            match given {
                Some(EffectiveLength::Factor(value)) => {
                    self.limit(&factor, &format!("members.{name}.{key}"), value, Measure::Number);
                    self.scope.work('C', nn, definition);
                }
                Some(EffectiveLength::Length(value)) => {
                    self.limit(&length, &format!("members.{name}.{key}_length"), value, Measure::Span);
                }
                None => {}
            }
        }
    }

    fn buckling(&mut self, safety: f64, force: Value) {
        let mut row = self.row("buckling", Measure::Force);
        row.demand = Some(force.si.abs());
        self.limit(&check::SAFETY, "checks.buckling.safety", safety, Measure::Number);
        if self.scope.get(&I).is_none() {
            row.why = Some("the section has no second moment of area".into());
            self.rows.push(row);
            return;
        }
        self.scope.work('C', 32, &euler::LOAD_IN);
        let out = self.scope.get(&check::L_OUT).is_some() && self.scope.get(&IZ).is_some();
        if out {
            self.scope.work('C', 34, &euler::LOAD_OUT);
            row.limit = Some(self.scope.work('C', 35, &euler::ALLOWED).si);
            row.ratio = Some(self.compare(36, &euler::UTILISATION));
            row.step = self.number(36);
        } else {
            row.limit = Some(self.scope.work('C', 35, &euler::ALLOWED_IN).si);
            row.ratio = Some(self.compare(36, &euler::UTILISATION_IN));
            row.step = self.number(36);
            row.partial = true;
            row.why = Some(if self.scope.get(&check::L_OUT).is_none() {
                "NOT CHECKED out of the plane, for which no effective length is given; limit and ratio are those in the plane alone".into()
            } else {
                "NOT CHECKED out of the plane, for which the section has no second moment of area; limit and ratio are those in the plane alone".into()
            });
        }
        self.rows.push(row);
    }

    fn slenderness(&mut self, limit: f64) {
        let mut row = self.row("slenderness", Measure::Number);
        row.limit = Some(limit);
        let has = |scope: &Scope<'_>, symbol: &Symbol| scope.get(symbol).is_some();
        if !has(&self.scope, &RI) {
            row.why = Some("the section has no second moment of area".into());
            self.rows.push(row);
            return;
        }
        let lambda_in = self.scope.work('C', 41, &slenderness::IN).si;
        row.demand = Some(lambda_in);
        if has(&self.scope, &check::L_OUT) && has(&self.scope, &RZ) {
            let lambda_out = self.scope.work('C', 42, &slenderness::OUT).si;
            row.demand = Some(lambda_in.max(lambda_out));
            self.limit(&check::LAMBDA_LIMIT, "checks.slenderness.limit", limit, Measure::Number);
            row.ratio = Some(self.compare(43, &slenderness::UTILISATION));
            row.step = self.number(43);
        } else {
            self.limit(&check::LAMBDA_LIMIT, "checks.slenderness.limit", limit, Measure::Number);
            row.ratio = Some(self.compare(43, &slenderness::UTILISATION_IN));
            row.step = self.number(43);
            row.partial = true;
            row.why = Some(if has(&self.scope, &check::L_OUT) {
                "NOT CHECKED out of the plane, for which the section has no second moment of area; demand and ratio are those in the plane alone".into()
            } else {
                "NOT CHECKED out of the plane, for which no effective length is given; demand and ratio are those in the plane alone".into()
            });
        }
        self.rows.push(row);
    }
}

/// Works the checks of node movements under a combination.
pub fn work_node_checks(
    sheet: &mut dyn Worksheet,
    model: &Model,
    combination: &Combination,
    movement: &dyn Fn(&mut dyn Worksheet, usize) -> [Value; 3],
) -> Vec<Check> {
    if !combination.is_for(Purpose::Deflection) {
        return Vec::new();
    }
    let mut rows = Vec::new();
    for check in &model.checks.deflection {
        let DeflectionCheck::Node { node, direction, limit } = check else { continue };
        let name = &model.nodes[*node].name;
        let word = ["x", "y", "r"][*direction];
        let moved = movement(sheet, *node)[*direction];
        let scope = Scope::new(sheet, name, Some(&combination.name));
        let mut bench = Bench { scope, model, subject: name, combination: &combination.name, rows: Vec::new() };
        let (measure, symbol, limit_symbol, definition) = if *direction == 2 {
            (Measure::Rotation, check::ROTATION, check::ROTATION_LIMIT, &deflection::NODE_ROTATION)
        } else {
            (Measure::Length, check::DELTA, check::DELTA_LIMIT, &deflection::UTILISATION)
        };
        let mut row = bench.row(&format!("deflection.{word}"), measure);
        bench.limit(&limit_symbol, &format!("checks.deflection.{name}.{word}"), *limit, measure);
        bench.scope.set(&symbol, moved);
        row.demand = Some(moved.si.abs());
        row.limit = Some(*limit);
        let nn = 81 + *direction as u16;
        row.ratio = Some(bench.compare(nn, definition));
        row.step = bench.number(nn);
        rows.push(row);
    }
    rows
}

/// Works the check of the critical load factor of the whole.
pub fn work_stability_check(
    sheet: &mut dyn Worksheet,
    model: &Model,
    combination: &Combination,
    factor: Option<f64>,
) -> Option<Check> {
    let least = model.checks.stability.filter(|_| combination.is_for(Purpose::Stability))?;
    let scope = Scope::new(sheet, "structure", Some(&combination.name));
    let mut bench = Bench { scope, model, subject: "structure", combination: &combination.name, rows: Vec::new() };
    let mut row = bench.row("stability", Measure::Number);
    row.limit = Some(least);
    let Some(factor) = factor else {
        // Nothing is compressed: no load, however large, makes it buckle.
        row.ratio = Some(0.0);
        return Some(row);
    };
    row.demand = Some(factor);
    bench.limit(&check::ALPHA_LEAST, "checks.stability.at_least", least, Measure::Number);
    let name = &combination.name;
    let stated = bench.scope.sheet().stated(format_args!("{name}.B.structure.α_cr"), factor, factor, Measure::Number);
    bench.scope.set(&check::ALPHA_CR, stated);
    row.ratio = Some(bench.compare(51, &crate::catalogue::check::stability::UTILISATION));
    row.step = bench.number(51);
    let _ = (bench.model, L);
    Some(row)
}

/// `materials.S275.allowable.tension` stands in the table of materials as `materials.S275.tension`.
fn allowable_address(path: &str) -> String {
    path.replace(".allowable.", ".")
}

/// Whether a kind of member is checked for shear.
#[must_use]
pub const fn carries_shear(kind: MemberKind) -> bool {
    matches!(kind, MemberKind::Beam | MemberKind::Frame)
}
