//! `supports:` held directions, springs, turn.
use super::super::Support;
use super::super::keys::{AXES, SPRING, SUPPORT, SUPPORT_WORDS};
use super::fields::Fields;
use super::leaf;
use super::names::{Directory, UNKNOWN};
use crate::diagnostic::{Code, Diagnostics};
use crate::input::{Raw, Shape};

pub(super) fn read(root: &Fields<'_>, directory: &Directory, faults: &mut Diagnostics) -> Vec<Support> {
    let entries = root.entries("supports", faults).iter();
    entries
        .filter_map(|field| {
            let node = match directory.nodes.find_key(field, "a support stands at a node that does not exist") {
                Ok(node) => node,
                Err(fault) => {
                    faults.push(fault);
                    UNKNOWN
                }
            };
            let subject = format!("the support of node `{}`", field.key);
            match &field.value.shape {
                Shape::Text(_) => short(&field.value, node, &subject, faults),
                _ => block(&field.value, node, &subject, faults),
            }
        })
        .collect()
}

fn short(raw: &Raw, node: usize, subject: &str, faults: &mut Diagnostics) -> Option<Support> {
    match leaf::word(raw, subject, SUPPORT_WORDS) {
        Ok(word) => Some(Support { node, hold: [true, true, word == "fixed"], spring: [None; 3], turned: 0.0 }),
        Err(fault) => {
            faults.push(fault.help("other supports are written `{hold: [y]}`, with any of x, y, r"));
            Some(Support { node, hold: [true; 3], spring: [None; 3], turned: 0.0 })
        }
    }
}

fn block(raw: &Raw, node: usize, subject: &str, faults: &mut Diagnostics) -> Option<Support> {
    let before = faults.len();
    let fields = Fields::open(raw, subject.to_owned(), &SUPPORT, faults)?;
    let mut hold = [false; 3];
    for item in fields.items("hold", faults) {
        match leaf::word(item, &fields.what("hold"), AXES) {
            Ok(word) => {
                for (held, _) in hold.iter_mut().zip(AXES).filter(|(_, axis)| **axis == word) {
                    if std::mem::replace(held, true) {
                        let fault = item.error(Code::NamedTwice);
                        faults.push(fault.message(format!("{subject} holds `{word}` twice")).label("held already"));
                    }
                }
            }
            Err(fault) => faults.push(fault),
        }
    }
    let mut spring = [None; 3];
    if let Some(springs) = fields.block("spring", &SPRING, faults) {
        for (at, axis) in AXES.iter().enumerate() {
            spring[at] = springs.quantity(axis, faults);
            if let Some(raw) = springs.get(axis).filter(|_| hold[at]) {
                let fault =
                    raw.error(Code::NotTogether).message(format!("{subject} both holds `{axis}` and springs it"));
                faults.push(fault.label("held already").help("take it out of `hold`, or take the spring out"));
            }
        }
    }
    let turned = fields.quantity("turned", faults).unwrap_or(0.0);
    if hold == [false; 3] && spring == [None; 3] && faults.len() == before {
        let fault = raw.error(Code::HoldsNothing).message(format!("{subject} holds nothing"));
        faults.push(fault.label("no direction is held or sprung").help("say what it holds, such as `{hold: [x, y]}`"));
    }
    Some(Support { node, hold, spring, turned })
}
