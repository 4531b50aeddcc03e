//! What is printed reads back as itself, and hostile text is refused in words.
use super::*;
use crate::formula::{Operand, Program, with_numbers, with_symbols};
use crate::units::{Dimension, Printed};
use proptest::prelude::*;

/// Trees as formulas hold them: sums and products of two or more, sums not opening with a sum.
fn trees() -> impl Strategy<Value = Tree> {
    let leaf = prop_oneof![
        4 => prop::sample::select(vec!["a", "κ₁", "σ_top", "N_Ed", "v₂", "φ₁₂", "x_m2"])
            .prop_map(|text| Tree::Symbol(Symbol::new(text))),
        1 => (1_i32..400).prop_map(|n| Tree::Number(f64::from(n) / 8.0)),
        1 => Just(Tree::Pi),
    ];
    leaf.prop_recursive(5, 40, 4, |inner| {
        let several = || prop::collection::vec(inner.clone(), 2..4);
        let boxed = || inner.clone().prop_map(Box::new);
        prop_oneof![
            3 => several().prop_map(Tree::Sum),
            3 => several().prop_map(Tree::Product),
            3 => (boxed(), boxed()).prop_map(|(above, below)| Tree::Quotient(above, below)),
            2 => (boxed(), prop::sample::select(vec![2_i8, 3, 4, -1])).prop_map(|(part, n)| Tree::Power(part, n)),
            2 => boxed().prop_map(Tree::Negative),
            1 => boxed().prop_map(Tree::Root),
            1 => boxed().prop_map(Tree::Absolute),
            1 => several().prop_map(Tree::Max),
            1 => several().prop_map(Tree::Min),
            1 => boxed().prop_map(Tree::Sine),
            1 => boxed().prop_map(Tree::ArcTangent),
        ]
    })
}

fn number_of(symbol: &Symbol, seed: i64) -> Operand {
    let mix = symbol.as_str().bytes().fold(seed, |sum, byte| (sum * 31 + i64::from(byte)) % 20_011);
    let unit = ["", "mm", "kN·m/rad", "1/m", "N/mm²"][(mix % 5) as usize];
    let count = if mix == 10_000 { 7 } else { mix - 10_000 };
    Operand { printed: Printed { count, place: (mix % 13) as i32 - 9 }, unit: unit.into() }
}

proptest! {
    #[test]
    fn what_is_printed_reads_back(tree in trees(), at in prop::collection::vec(0.3_f64..2.0, 7)) {
        let text = with_symbols(&tree);
        let read = parse_symbols(&text).map_err(|fault| TestCaseError::fail(format!("{text}: {fault:?}")))?;
        prop_assert_eq!(with_symbols(&read), text);
        let (before, after) = (Program::new(&tree), Program::new(&read));
        prop_assert_eq!(before.symbols(), after.symbols());
        let (before, after) = (before.evaluate(&at), after.evaluate(&at));
        prop_assert!(before.to_bits() == after.to_bits() || (before - after).abs() <= 1e-12 * before.abs() || before.is_nan());
    }

    #[test]
    fn numbers_in_place_read_back_digit_for_digit(tree in trees(), seed in 0_i64..10_000) {
        let text = with_numbers(&tree, &|symbol| number_of(symbol, seed));
        let read = parse_numbers(&text).map_err(|fault| TestCaseError::fail(format!("{text}: {fault:?}")))?;
        let mut leaves = Vec::new();
        collect(&read, &mut leaves);
        let mut expected = Vec::new();
        printed_leaves(&tree, seed, &mut expected);
        prop_assert_eq!(leaves.len(), expected.len());
        for (leaf, (value, operand)) in leaves.iter().zip(expected) {
            // `(−3)` may be the number −3 or the negative of 3; which, the formula in symbols tells.
            prop_assert!((leaf.printed.value().abs() - value.abs()).abs() <= 1e-15 * value.abs(), "{}", text);
            if let Some(operand) = operand {
                prop_assert_eq!(leaf.printed.count.abs(), operand.printed.count.abs());
                prop_assert_eq!(leaf.printed.place, operand.printed.place);
                prop_assert_eq!(&*leaf.unit.text, operand.unit.as_str());
            }
        }
    }

    #[test]
    fn no_text_is_too_much(text in "[ ()|√·/+−²⁻×10a-z₀π,.°]{0,60}") {
        let _ = parse_symbols(&text);
        let _ = parse_numbers(&text);
        let _ = parse_printed(&text);
    }

    #[test]
    fn no_character_is_too_much(text in any::<String>()) {
        let _ = parse_symbols(&text);
        let _ = parse_numbers(&text);
        let _ = parse_printed(&text);
    }
}

fn printed_leaves(tree: &Tree, seed: i64, found: &mut Vec<(f64, Option<Operand>)>) {
    match tree {
        Tree::Number(number) => found.push((*number, None)),
        Tree::Symbol(symbol) => {
            let operand = number_of(symbol, seed);
            found.push((operand.printed.value(), Some(operand)));
        }
        _ => tree.parts().into_iter().for_each(|part| printed_leaves(part, seed, found)),
    }
}

fn collect<'t>(tree: &'t NumericTree, leaves: &mut Vec<&'t PrintedNumber>) {
    match tree {
        Parsed::Leaf(leaf) => leaves.push(leaf),
        Parsed::Pi => {}
        Parsed::Negative(part) | Parsed::Power(part, _) => collect(part, leaves),
        Parsed::Quotient(above, below) => {
            collect(above, leaves);
            collect(below, leaves);
        }
        Parsed::Sum(parts) | Parsed::Product(parts) | Parsed::Function(_, parts) => {
            parts.iter().for_each(|part| collect(part, leaves));
        }
    }
}

/// The line with numbers of the sheet's contract.
#[test]
fn units_and_operators_are_told_apart() {
    let text = "(6/(4000 mm)²)·((−3.214 mm) − (−0.1034 mm)) + (500.0 kN·m/rad)·2/(2.5 1/m) − 441.0×10⁻⁶ rad";
    let tree = parse_numbers(text).expect("a formula");
    let mut leaves = Vec::new();
    collect(&tree, &mut leaves);
    let found: Vec<(i64, i32, &str, &str)> = leaves
        .iter()
        .map(|leaf| (leaf.printed.count, leaf.printed.place, &*leaf.unit.text, &text[leaf.span.clone()]))
        .collect();
    assert_eq!(
        found,
        [
            (6, 0, "", "6"),
            (4000, 0, "mm", "4000 mm"),
            (-3214, -3, "mm", "−3.214 mm"),
            (-1034, -4, "mm", "−0.1034 mm"),
            (5000, -1, "kN·m/rad", "500.0 kN·m/rad"),
            (2, 0, "", "2"),
            (25, -1, "1/m", "2.5 1/m"),
            (4410, -7, "rad", "441.0×10⁻⁶ rad"),
        ]
    );
    assert_eq!(leaves[4].unit.dimension, Dimension::MOMENT);
}

#[test]
fn faults_say_where() {
    #[track_caller]
    fn check<T: std::fmt::Debug>(read: fn(&str) -> Result<T, FormulaFault>, text: &str, at: &str) {
        let fault = read(text).expect_err(text);
        assert_eq!(&text[fault.span.clone()], at, "{text}: {fault}");
        assert!(!fault.message.is_empty());
    }
    check(parse_symbols, "a + ", "");
    check(parse_symbols, "a+b", "+");
    check(parse_symbols, "a − −b", "−");
    check(parse_symbols, "a/b·c", "·");
    check(parse_symbols, "2a", "a");
    check(parse_symbols, "exp(a)", "exp");
    check(parse_symbols, "2 + 03", "03");
    check(parse_numbers, "00.5 mm", "00");
    check(parse_symbols, "sin(a, b)", ",");
    check(parse_symbols, "a¹²⁸", "¹²⁸");
    check(parse_symbols, "5 kN", " ");
    check(parse_symbols, "a - b", " ");
    check(parse_numbers, "a·(2 mm)", "a");
    check(parse_numbers, "3 mm/(2 mm)", "mm/(2");
    check(parse_numbers, "2×10³·3", "2×10³");
    check(parse_numbers, "3·2 mm", "2 mm");
    check(parse_numbers, "3 N.mm", "N.mm");
    check(parse_numbers, "3 m-128", "m-128");
    check(parse_numbers, "3 Nm", "Nm");
    check(parse_numbers, "3 N⁹·N⁹·N⁹·N⁹·N⁹·N⁹·N⁹·N⁹", "N⁹·N⁹·N⁹·N⁹·N⁹·N⁹·N⁹·N⁹");
    check(parse_numbers, "1234567890123456789", "1234567890123456789");
    check(parse_printed, "−0.00 mm", "−0.00 mm");
    check(parse_printed, "(−1 mm)", "(");
}

#[test]
fn deep_nesting_is_refused() {
    for (open, close) in [("(", ")"), ("|", "|"), ("√(", ")"), ("max(a, ", ")"), ("(−", ")")] {
        let nested = |depth: usize| format!("{}a{}", open.repeat(depth), close.repeat(depth));
        assert!(parse_symbols(&nested(DEEPEST)).is_ok(), "{open}");
        assert!(parse_symbols(&nested(DEEPEST + 1)).is_err(), "{open}");
        assert!(parse_symbols(&nested(200_000)).is_err(), "{open}");
        assert!(parse_numbers(&open.repeat(200_000)).is_err(), "{open}");
    }
    let long = vec!["a·b"; 50_000].join(" + ");
    assert!(parse_symbols(&long).is_ok());
}
