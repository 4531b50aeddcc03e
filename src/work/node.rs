//! Balance of every node (steps N) and of the whole (steps R), from end forces, loads and reactions.
use super::factor::times_factor;
use super::{CaseLoad, MemberForces, factor};
use crate::formula::{Definition, Scope, Symbol, Tree, Value, Worksheet, source};
use crate::model::{Action, Combination, MemberKind, Model};
use crate::units::Measure;

/// Worked loads: by member, by case.
pub type AllLoads = [Vec<Vec<CaseLoad>>];

/// Reaction and balance at a node. Directions: global X, Y, rotation.
#[derive(Debug, Clone, Copy, Default)]
pub struct NodeBalance {
    /// Force of the support on the structure, where the node has a support.
    pub reaction: [Option<Value>; 3],
    /// Forces of springs, in the support's axes.
    pub spring: [Option<Value>; 3],
    /// What is left over where nothing reacts.
    pub residual: [Option<Value>; 3],
}

const WORDS: [&str; 3] = ["global X", "global Y", "moments"];

/// One term of a balance: its factor, its value, and whether it is taken off.
type Part = (Option<Value>, Value, bool);

struct Parts {
    terms: Vec<Tree>,
    count: usize,
}

impl Parts {
    fn add(&mut self, scope: &mut Scope<'_>, factor: Option<Value>, value: Value, minus: bool) {
        self.count += 1;
        let part = Symbol::indexed("F", self.count);
        scope.set(&part, value);
        let term = times_factor(scope, self.count, factor, part);
        self.terms.push(if minus { -term } else { term });
    }
}

/// Works the balance of one node under one combination.
///
/// `movement` holds the node's stated movements, needed where it rests on springs.
pub fn work_node(
    sheet: &mut dyn Worksheet,
    model: &Model,
    node: usize,
    combination: &Combination,
    forces: &[MemberForces],
    loads: &AllLoads,
    movement: [Value; 3],
) -> NodeBalance {
    let name = &model.nodes[node].name;
    let support = model.supports.iter().find(|s| s.node == node);
    let mut balance = NodeBalance::default();
    let factors: Vec<(usize, f64, Option<Value>)> = combination
        .factors
        .iter()
        .map(|(case, size)| (*case, *size, factor(sheet, model, combination, *case, *size)))
        .collect();
    let mut sums: [Option<(Vec<Part>, usize)>; 3] = [None, None, None];
    for (direction, sum) in sums.iter_mut().enumerate() {
        let parts = collect(sheet, model, node, direction, forces, loads, &factors);
        if !parts.is_empty() {
            *sum = Some((parts, direction));
        }
    }
    let mut scope = Scope::new(sheet, name, Some(&combination.name));
    for (parts, direction) in sums.into_iter().flatten() {
        let mut written = Parts { terms: Vec::new(), count: 0 };
        for (factor, value, minus) in parts {
            written.add(&mut scope, factor, value, minus);
        }
        let measure = if direction == 2 { Measure::Moment } else { Measure::Force };
        let nn = direction as u16 + 1;
        if let Some(support) = support.filter(|s| reacts(s, direction)) {
            let symbol = Symbol::new(["R_x", "R_y", "R_r"][direction]);
            let title = format!("Reaction in {} that balances the node", WORDS[direction]);
            let tree = Tree::Negative(Box::new(Tree::sum(written.terms)));
            balance.reaction[direction] =
                Some(scope.work('N', nn, &Definition::new(symbol, title, measure, tree).from(&source::STATICS)));
            let _ = support;
        } else {
            let symbol = Symbol::new(["B_x", "B_y", "B_r"][direction]);
            let title = format!("Balance of the node in {}", WORDS[direction]);
            let tree = Tree::sum(written.terms);
            balance.residual[direction] =
                Some(scope.balance('N', nn, &Definition::new(symbol, title, measure, tree).from(&source::STATICS)));
        }
    }
    if let Some(support) = support {
        support_laws(&mut scope, model, support, combination, &mut balance, movement);
    }
    balance
}

/// Whether a support can react in a global direction.
fn reacts(support: &crate::model::Support, direction: usize) -> bool {
    let holds = |d: usize| support.hold[d] || support.spring[d].is_some();
    if direction == 2 {
        holds(2)
    } else if support.turned == 0.0 {
        holds(direction)
    } else {
        holds(0) || holds(1)
    }
}

fn collect(
    sheet: &mut dyn Worksheet,
    model: &Model,
    node: usize,
    direction: usize,
    forces: &[MemberForces],
    loads: &AllLoads,
    factors: &[(usize, f64, Option<Value>)],
) -> Vec<Part> {
    let mut parts = Vec::new();
    for (at, member) in model.members.iter().enumerate() {
        for (end, end_node) in [member.from, member.to].into_iter().enumerate() {
            if end_node != node {
                continue;
            }
            if direction < 2 {
                parts.extend(forces[at].on_joint[end][direction].map(|v| (None, v, false)));
            } else if matches!(member.kind, MemberKind::Beam | MemberKind::Frame) && !member.hinge[end] {
                parts.extend(forces[at].m[end].map(|v| (None, v, end == 1)));
            }
            for (case, size, factor) in factors {
                if *size == 0.0 {
                    continue;
                }
                for load in &loads[at][*case] {
                    parts.extend(load.worked.share[end][direction].map(|v| (*factor, v, false)));
                }
            }
        }
    }
    for (case, size, factor) in factors {
        if *size == 0.0 {
            continue;
        }
        let case = &model.cases[*case];
        for load in &case.loads {
            if let Action::Node { node: loaded, forces } = &load.acts
                && *loaded == node
                && forces[direction] != 0.0
            {
                parts.push((*factor, node_load(sheet, &case.name, load.entry, direction, forces[direction]), false));
            }
        }
    }
    parts
}

/// The value of a load on a node under its address in the input's table.
pub fn node_load(sheet: &mut dyn Worksheet, case: &str, entry: usize, direction: usize, value: f64) -> Value {
    let measure = if direction == 2 { Measure::Moment } else { Measure::Force };
    sheet.input(format_args!("INPUT.loads.{case}.nodes.{}.{}", entry + 1, ["fx", "fy", "m"][direction]), value, measure)
}

/// Springs give what their law says; free directions of turned supports give nothing.
fn support_laws(
    scope: &mut Scope<'_>,
    model: &Model,
    support: &crate::model::Support,
    combination: &Combination,
    balance: &mut NodeBalance,
    movement: [Value; 3],
) {
    let name = &model.nodes[support.node].name;
    let turned = support.turned != 0.0;
    let angle = Symbol::new("β");
    if turned {
        let value = scope.sheet().input(format_args!("INPUT.supports.{name}.turned"), support.turned, Measure::Angle);
        scope.set(&angle, value);
    }
    let [x, y, r] = ["x", "y", "r"].map(Symbol::new);
    for (symbol, value) in [(&x, movement[0]), (&y, movement[1]), (&r, movement[2])] {
        scope.set(symbol, value);
    }
    let cos = || Tree::Cosine(Box::new(angle.tree()));
    let sin = || Tree::Sine(Box::new(angle.tree()));
    for direction in 0..3 {
        let along = |x: Tree, y: Tree, r: Tree| match (direction, turned) {
            (0, false) => x,
            (1, false) => y,
            (0, true) => cos() * x + sin() * y,
            (1, true) => cos() * y - sin() * x,
            _ => r,
        };
        let nn = 10 + direction as u16;
        if support.spring[direction].is_some() {
            balance.spring[direction] =
                Some(spring(scope, model, support, combination, direction, along(x.tree(), y.tree(), r.tree())));
        }
        // The reaction's part along a direction of the support must be the spring's force, or nothing where it is free.
        if support.hold[direction] || (direction < 2 && !reacts(support, direction)) {
            continue;
        }
        let [reaction_x, reaction_y, reaction_r] = ["R_x", "R_y", "R_r"].map(Symbol::new);
        if direction < 2 && turned && balance.reaction[0].is_none() && balance.reaction[1].is_none() {
            continue;
        }
        if (direction == 2 || !turned) && balance.reaction[direction].is_none() {
            continue;
        }
        for (symbol, value) in
            [(&reaction_x, balance.reaction[0]), (&reaction_y, balance.reaction[1]), (&reaction_r, balance.reaction[2])]
        {
            scope.set(symbol, value.unwrap_or(Value::silent(0.0)));
        }
        let mut part = match (direction, turned, balance.reaction[0].is_some(), balance.reaction[1].is_some()) {
            (0, true, true, false) => cos() * reaction_x.tree(),
            (0, true, false, true) => sin() * reaction_y.tree(),
            (1, true, true, false) => -(sin() * reaction_x.tree()),
            (1, true, false, true) => cos() * reaction_y.tree(),
            _ => along(reaction_x.tree(), reaction_y.tree(), reaction_r.tree()),
        };
        let title = if let Some(force) = balance.spring[direction] {
            let symbol = Symbol::new("S_f");
            scope.set(&symbol, force);
            part = part - symbol;
            "Reaction less the spring's force"
        } else {
            "Reaction along the direction that is free to move"
        };
        let measure = if direction == 2 { Measure::Moment } else { Measure::Force };
        let definition = Definition::new(Symbol::new("B_s"), title, measure, part).from(&source::STATICS);
        scope.balance('N', nn + 10, &definition);
    }
}

/// Force of a spring on the structure: its stiffness times its shortening from where it was set.
fn spring(
    scope: &mut Scope<'_>,
    model: &Model,
    support: &crate::model::Support,
    combination: &Combination,
    direction: usize,
    moved: Tree,
) -> Value {
    let name = &model.nodes[support.node].name;
    let word = ["x", "y", "r"][direction];
    let (stiffness_measure, force_measure, movement_measure) = if direction == 2 {
        (Measure::RotationalSpring, Measure::Moment, Measure::Rotation)
    } else {
        (Measure::Spring, Measure::Force, Measure::Length)
    };
    let stiffness = Symbol::new("k");
    let value = support.spring[direction].unwrap_or(0.0);
    let value = scope.sheet().input(format_args!("INPUT.supports.{name}.spring_{word}"), value, stiffness_measure);
    scope.set(&stiffness, value);
    let mut set = Vec::new();
    for (case_index, size) in &combination.factors {
        let case = &model.cases[*case_index];
        for load in &case.loads {
            if let Action::Settle { node, movement } = &load.acts
                && *node == support.node
                && *size != 0.0
                && let Some(amount) = movement[direction].filter(|a| *a != 0.0)
            {
                let gamma = factor(scope.sheet(), model, combination, *case_index, *size);
                let address = format_args!("INPUT.loads.{}.settlements.{}.{word}", case.name, load.entry + 1);
                set.push((gamma, scope.sheet().input(address, amount, movement_measure)));
            }
        }
    }
    let mut shift = vec![moved];
    for (at, (gamma, amount)) in set.into_iter().enumerate() {
        let part = Symbol::indexed("d", at + 1);
        scope.set(&part, amount);
        let term = times_factor(scope, at + 1, gamma, part);
        shift.push(-term);
    }
    let tree = -(stiffness * Tree::sum(shift));
    let title = format!("Force of the spring in its direction {word}");
    scope.work(
        'N',
        10 + direction as u16,
        &Definition::new(Symbol::new("S_f"), title, force_measure, tree).from(&source::STATICS),
    )
}
