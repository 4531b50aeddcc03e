//! Where results go: beside a step stand the steps that draw on it.
use super::FaceName;
use super::flow::Slab;
use super::frame::Link;
use super::geometry::Geometry;
use super::head::fitted;
use super::text::{Setter, Type};
use crate::sheet::Sheet;
use std::collections::BTreeMap;

/// Steps that draw on each ledger entry, in the order in which they are worked.
#[derive(Debug, Default)]
pub(super) struct Uses<'s>(BTreeMap<u32, Vec<&'s str>>);

impl<'s> Uses<'s> {
    pub(super) fn of(sheet: &'s Sheet) -> Self {
        let mut uses: BTreeMap<u32, Vec<&str>> = BTreeMap::new();
        for step in &sheet.steps {
            for (_, id) in &step.operands {
                let users = uses.entry(*id).or_default();
                // One step may draw on an entry under two symbols.
                if users.last() != Some(&step.number.as_str()) {
                    users.push(&step.number);
                }
            }
        }
        Self(uses)
    }

    pub(super) fn users(&self, entry: u32) -> &[&'s str] {
        self.0.get(&entry).map_or(&[], Vec::as_slice)
    }
}

/// Size of these addresses, and their distance from line to line.
const SIZE: f32 = 7.2;
const LEADING: f32 = 9.8;

/// Writes the users of a step below its number, as many as there is room for beside the step's own lines.
pub(super) fn set(users: &[&str], slabs: &mut [Slab], setter: &mut Setter<'_>, g: &Geometry) {
    let Some(below) = slabs.get_mut(1..).filter(|below| !below.is_empty() && !users.is_empty()) else { return };
    let height: f32 = below.iter().map(|slab| slab.before + slab.height).sum();
    let room = (height / LEADING) as usize;
    let shown = if users.len() <= room { users.len() } else { room.saturating_sub(1) };
    let mut lines: Vec<(String, Option<&str>)> =
        users[..shown].iter().map(|user| (format!("→ {user}"), Some(*user))).collect();
    if shown < users.len() && room > 0 {
        lines.push((format!("→ {} more", users.len() - shown), None));
    }
    let kind = Type::new(FaceName::Regular, SIZE);
    let width = g.text - g.left - 8.0;
    let mut lines = lines.into_iter();
    // Lines follow each other evenly, whatever strip they fall on: the strips of a step stay together.
    let (mut y, mut top) = (0.0_f32, 0.0_f32);
    for slab in below {
        top += slab.before;
        let end = top + slab.height;
        while y + SIZE <= end {
            let Some((text, to)) = lines.next() else { return };
            let baseline = y - top + SIZE;
            fitted(&text, kind, width, setter, &mut slab.frame, [g.left, baseline]);
            if let Some(to) = to {
                let (y, height) = (baseline - 0.85 * SIZE, 1.1 * SIZE);
                slab.frame.links.push(Link { x: g.left, y, width, height, to: to.into() });
            }
            y += LEADING;
        }
        top = end;
    }
}
