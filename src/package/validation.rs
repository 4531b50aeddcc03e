//! What this version is validated on, and which features of an input no case covers.
use crate::model::Model;

/// One line a group of cases of the project's own tests.
pub(super) const COVERED: &[&str] = &[
    "Beam tables: simple, fixed, propped, overhanging and continuous beams under uniform, partial, straight-line, point and couple loads (AISC Steel Construction Manual, Table 3-23; Roark; Weaver and Gere).",
    "Plane trusses: joint movements, bar forces, settlement, inclined roller, warming and lack of fit (Kassimali; Logan; Hibbeler; Timoshenko).",
    "Plane frames: portals with fixed and pinned feet, inclined legs, hinges, springs (Kleinlogel; Logan; McGuire, Gallagher and Ziemian; TU Delft open textbooks).",
    "Three-node bars under end, uniform and varying axial load (Timoshenko and Gere; Cook).",
    "Temperature, uniform and through the depth (Timoshenko and Gere; TU Delft open textbooks).",
    "Section properties of hot-rolled I sections, hollow sections, angles, tees and built-up sections (EN 10365, EN 10210-2, AISC Table 1-1).",
    "Elastic critical loads of columns and portals (Timoshenko and Gere, Theory of Elastic Stability).",
    "Random structures against a separate solver, number by number.",
];

/// Features this input uses that no case covers by itself.
pub(super) fn uncovered(model: &Model) -> Vec<String> {
    let mut lines = Vec::new();
    let shear = model
        .members
        .iter()
        .any(|m| model.materials[m.material].shear_modulus.is_some() && model.sections[m.section].shear_area.is_some());
    if shear {
        lines.push(
            "Shear deformation: covered by random structures against a separate solver, by no published case.".into(),
        );
    }
    lines
}
