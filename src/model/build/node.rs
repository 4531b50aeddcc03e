//! `nodes:` names and coordinates.
use super::super::Node;
use super::super::keys::NODE;
use super::fields::Fields;
use crate::diagnostic::Diagnostics;

pub(super) fn read(root: &Fields<'_>, faults: &mut Diagnostics) -> Vec<Node> {
    let entries = root.entries("nodes", faults).iter();
    entries
        .map(|field| {
            let name = field.key.clone();
            let fields = Fields::open(&field.value, format!("node `{name}`"), &NODE, faults);
            let mut coordinate =
                |key| fields.as_ref().and_then(|fields| fields.quantity(key, faults)).unwrap_or(f64::NAN);
            Node { x: coordinate("x"), y: coordinate("y"), name }
        })
        .collect()
}
