//! The results file: every number in SI base units at full precision, as the input contract sets it out.
use crate::analysis::Solution;
use crate::model::Model;
use crate::work::{Check, CombinationWork, Extreme, Prepared};
use serde_json::{Map, Value as Json, json};

/// Writes the results of a package.
#[must_use]
pub fn write(
    model: &Model,
    sha256: &str,
    prepared: &Prepared,
    solution: &Solution,
    work: &[CombinationWork],
) -> String {
    let mut combinations = Map::new();
    for ((combination, solved), worked) in model.combinations.iter().zip(&solution.combinations).zip(work) {
        let mut displacements = Map::new();
        for (node, [x, y, r]) in model.nodes.iter().zip(&solved.displacements) {
            displacements.insert(node.name.clone(), json!({"x": x, "y": y, "r": r}));
        }
        let mut reactions = Map::new();
        for support in &model.supports {
            let [x, y, r] = worked.nodes[support.node].reaction.map(|v| v.map_or(0.0, |v| v.si));
            reactions.insert(model.nodes[support.node].name.clone(), json!({"x": x, "y": y, "r": r}));
        }
        let members = model
            .members
            .iter()
            .enumerate()
            .map(|(at, member)| {
                let slack = solved.members[at].slack;
                (
                    member.name.clone(),
                    of_member(prepared.bases[at].length, &worked.forces[at], &worked.extremes[at], slack),
                )
            })
            .collect::<Map<_, _>>();
        let [x, y, moment] = worked.balance.left_over.map(|v| v.map_or(0.0, |v| v.si));
        combinations.insert(
            combination.name.clone(),
            json!({
                "displacements": displacements,
                "reactions": reactions,
                "members": members,
                "equilibrium": {"x": x, "y": y, "moment": moment},
                "critical_load_factor": solved.critical.as_ref().map(|c| c.factor),
            }),
        );
    }
    let sections = model
        .sections
        .iter()
        .zip(&prepared.sections)
        .map(|(section, values)| {
            let mut entry = Map::new();
            for (key, value) in
                [("area", values.area), ("inertia", values.inertia), ("top", values.top), ("bottom", values.bottom)]
            {
                if let Some(value) = value {
                    entry.insert(key.into(), json!(value.si));
                }
            }
            (section.name.clone(), Json::Object(entry))
        })
        .collect::<Map<_, _>>();
    let checks: Vec<Json> = work.iter().flat_map(|w| &w.checks).map(of_check).collect();
    let results = json!({
        "calcsheaf": 1,
        "input_sha256": sha256,
        "combinations": combinations,
        "sections": sections,
        "checks": checks,
    });
    let mut text = serde_json::to_string_pretty(&results).unwrap_or_default();
    text.push('\n');
    text
}

fn of_member(length: f64, forces: &crate::work::MemberForces, extremes: &crate::work::Extremes, slack: bool) -> Json {
    let end = |at: usize| {
        let mut entry = Map::new();
        for (key, value) in [("n", forces.n[at]), ("v", forces.v[at]), ("m", forces.m[at])] {
            if let Some(value) = value {
                entry.insert(key.into(), json!(value.si));
            }
        }
        Json::Object(entry)
    };
    let strain = |at: usize| {
        let mut entry = Map::new();
        for (key, value) in [("axial", forces.axial_strain[at]), ("curvature", forces.curvature[at])] {
            if let Some(value) = value {
                entry.insert(key.into(), json!(value.si));
            }
        }
        Json::Object(entry)
    };
    let mut entry = Map::new();
    entry.insert("length".into(), json!(length));
    entry.insert("start".into(), end(0));
    entry.insert("end".into(), end(1));
    entry.insert("strain".into(), json!({"start": strain(0), "end": strain(1)}));
    if let Some(peak) = extremes.moment {
        entry.insert("peak_moment".into(), json!({"x": peak.x, "m": peak.value.si}));
    }
    if let Some(peak) = extremes.deflection {
        entry.insert("peak_deflection".into(), json!({"x": peak.x, "v": peak.value.si}));
    }
    if let (Some(tension), Some(compression)) = (extremes.tension, extremes.compression) {
        let at_end =
            |at: usize| json!({"top": forces.top[at].map(|v| v.si), "bottom": forces.bottom[at].map(|v| v.si)});
        let peak = |peak: Extreme| json!({"value": peak.value.si, "x": peak.x, "fibre": peak.fibre.word()});
        entry.insert(
            "stress".into(),
            json!({"start": at_end(0), "end": at_end(1), "largest_tension": peak(tension), "largest_compression": peak(compression)}),
        );
    }
    if slack {
        entry.insert("slack".into(), json!(true));
    }
    Json::Object(entry)
}

fn of_check(check: &Check) -> Json {
    let mut entry = Map::new();
    entry.insert("id".into(), json!(check.id));
    entry.insert("kind".into(), json!(check.kind));
    entry.insert("subject".into(), json!(check.subject));
    entry.insert("combination".into(), json!(check.combination));
    entry.insert("demand".into(), json!(check.demand));
    entry.insert("limit".into(), json!(check.limit));
    entry.insert("ratio".into(), json!(check.ratio));
    entry.insert("ok".into(), json!(check.ok()));
    if let Some(why) = &check.why {
        entry.insert("why".into(), json!(why));
    }
    Json::Object(entry)
}
