//! Distributes what is set over sheets: nothing is cut that fits on one, headings stay with what they head.
use super::frame::Frame;
use super::geometry::Geometry;
use std::sync::Arc;

/// A strip that is never cut, as wide as the sheet.
#[derive(Debug, Default)]
pub(super) struct Slab {
    /// What is placed; y counts from the slab's top, x from the sheet's left edge.
    pub(super) frame: Frame,
    pub(super) height: f32,
    /// Space above, left out at the top of a sheet; the larger of two neighbours' spaces counts.
    pub(super) before: f32,
    /// Space below.
    pub(super) after: f32,
    /// Whether the next slab must stand on the same sheet.
    pub(super) keep: bool,
    /// What is repeated above it where it comes first on a sheet.
    pub(super) head: Option<Arc<Slab>>,
}

/// A strip with its place on a sheet.
#[derive(Debug)]
pub(super) struct Placed {
    pub(super) frame: Frame,
    /// Distance of its top from that of the sheet.
    pub(super) y: f32,
}

/// Sheets being filled.
#[derive(Debug)]
pub(super) struct Flow {
    geometry: Geometry,
    pub(super) sheets: Vec<Vec<Placed>>,
    y: f32,
    /// Space asked for below the last slab.
    after: f32,
    waiting: Vec<Slab>,
}

impl Flow {
    pub(super) fn new(geometry: Geometry) -> Self {
        Self { geometry, sheets: Vec::new(), y: geometry.bottom, after: 0.0, waiting: Vec::new() }
    }

    /// Adds a slab below what stands.
    pub(super) fn push(&mut self, slab: Slab) {
        let keep = slab.keep;
        self.waiting.push(slab);
        if !keep {
            self.settle();
        }
    }

    /// What follows begins a new sheet.
    pub(super) fn new_sheet(&mut self) {
        self.settle();
        self.y = self.geometry.bottom;
    }

    /// Places what waits for company.
    pub(super) fn settle(&mut self) {
        let group = std::mem::take(&mut self.waiting);
        let mut height = 0.0;
        let mut after = self.after;
        for slab in &group {
            height += slab.before.max(after) + slab.height;
            after = slab.after;
        }
        // A group taller than a sheet is cut where it must be, from where it stands.
        let whole = height <= self.geometry.body();
        if whole && self.y + height > self.geometry.bottom + 0.01 {
            self.y = self.geometry.bottom;
        }
        for slab in group {
            self.place(slab);
        }
    }

    fn place(&mut self, slab: Slab) {
        let gap = slab.before.max(self.after);
        let full = self.sheets.is_empty() || self.y >= self.geometry.bottom;
        if full || self.y + gap + slab.height > self.geometry.bottom + 0.01 {
            self.sheets.push(Vec::new());
            self.y = self.geometry.top;
            if let Some(head) = &slab.head {
                self.put(head.frame.clone(), head.height);
            }
        } else {
            self.y += gap;
        }
        self.after = slab.after;
        self.put(slab.frame, slab.height);
    }

    fn put(&mut self, frame: Frame, height: f32) {
        if let Some(sheet) = self.sheets.last_mut() {
            sheet.push(Placed { frame, y: self.y });
        }
        self.y += height;
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::model::Paper;

    fn flow_of(slabs: Vec<Slab>) -> Flow {
        let mut flow = Flow::new(Geometry::of(Paper::A4));
        slabs.into_iter().for_each(|slab| flow.push(slab));
        flow.settle();
        flow
    }

    fn slab(height: f32, keep: bool) -> Slab {
        let mut frame = Frame::default();
        frame.rule(60.0, 0.0, 10.0, height);
        Slab { frame, height, keep, ..Slab::default() }
    }

    #[test]
    fn a_heading_goes_with_what_follows() {
        let flow = flow_of(vec![slab(660.0, false), slab(20.0, true), slab(60.0, false)]);
        assert_eq!(flow.sheets.iter().map(Vec::len).collect::<Vec<_>>(), [1, 2]);
    }

    #[test]
    fn a_head_is_repeated_on_the_next_sheet() {
        let head = Arc::new(slab(15.0, false));
        let rows = (0..100).map(|_| Slab { head: Some(Arc::clone(&head)), ..slab(12.0, false) });
        let flow = flow_of(rows.collect());
        assert!(flow.sheets.len() > 1);
        let total: usize = flow.sheets.iter().map(Vec::len).sum();
        assert_eq!(total, 100 + flow.sheets.len());
    }
}
