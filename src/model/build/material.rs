//! `materials:` and the stress limits that materials and members carry.
use super::super::keys::{ALLOWABLE, MATERIAL, Sign};
use super::super::{Allowable, Material};
use super::fields::Fields;
use super::leaf::quantity_of;
use crate::diagnostic::Diagnostics;
use crate::units::{Dimension, Measure, STANDARD_GRAVITY};

pub(super) fn read(root: &Fields<'_>, faults: &mut Diagnostics) -> Vec<Material> {
    let entries = root.entries("materials", faults).iter();
    entries
        .map(|field| {
            let name = field.key.clone();
            let fields = Fields::open(&field.value, format!("material `{name}`"), &MATERIAL, faults);
            let Some(fields) = fields else { return unknown(name) };
            Material {
                modulus: fields.quantity("E", faults).unwrap_or(f64::NAN),
                shear_modulus: fields.quantity("G", faults),
                density: density(&fields, faults),
                expansion: fields.quantity("expansion", faults).or(at_fault(&fields, "expansion")),
                allowable: allowable(&fields, faults),
                name,
            }
        })
        .collect()
}

/// A material of which nothing is known, and of which nothing shall be missed.
fn unknown(name: String) -> Material {
    let allowable = Allowable::default();
    Material {
        name,
        modulus: f64::NAN,
        shear_modulus: None,
        density: Some(f64::NAN),
        expansion: Some(f64::NAN),
        allowable,
    }
}

/// The placeholder of a value that was given but is at fault, so that it is not missed as well.
fn at_fault(fields: &Fields<'_>, key: &str) -> Option<f64> {
    fields.get(key).map(|_| f64::NAN)
}

/// Mass per volume; a weight per volume is divided by standard gravity, kg/m³.
fn density(fields: &Fields<'_>, faults: &mut Diagnostics) -> Option<f64> {
    const EITHER: &[Dimension] = &[Dimension::DENSITY, Dimension::WEIGHT_DENSITY];
    let read =
        fields.read("density", faults, |raw, what| quantity_of(raw, what, Measure::Density, EITHER, Sign::NotNegative));
    match read {
        Some((weight, Dimension::WEIGHT_DENSITY)) => Some(weight / STANDARD_GRAVITY),
        Some((density, _)) => Some(density),
        None => at_fault(fields, "density"),
    }
}

/// The stress limits of a material or a member.
pub(super) fn allowable(holder: &Fields<'_>, faults: &mut Diagnostics) -> Allowable {
    let Some(fields) = holder.block("allowable", &ALLOWABLE, faults) else { return Allowable::default() };
    Allowable {
        tension: fields.quantity("tension", faults),
        compression: fields.quantity("compression", faults),
        shear: fields.quantity("shear", faults),
        source: fields.text("source", faults),
    }
}
