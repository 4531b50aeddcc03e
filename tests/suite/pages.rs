//! Every sheet of every example and of random structures: text within its box, nothing over anything else, no glyph
//! missing from the fonts.
use crate::packages::many;
use calcsheaf::model::Paper;
use calcsheaf::typeset::{FaceName, Fonts, Frame, Item, Pages, Run, typeset};

/// Margins of a sheet, points: left, right, top of the head, below the body.
const LEFT: f32 = 48.0;
const RIGHT: f32 = 36.0;
const HEAD: f32 = 30.0;
const FOOT: f32 = 22.0;
/// Top of the body, and the room that body and checker's column keep free at its bottom and right.
const TOP: f32 = 98.0;
const BELOW: f32 = 44.0;
const CHECK: f32 = 52.0;
const GAP: f32 = 14.0;

fn runs(frame: &Frame) -> impl Iterator<Item = &Run> {
    frame.items.iter().filter_map(|item| if let Item::Run(run) = item { Some(run) } else { None })
}

fn words(frame: &Frame, run: &Run, fonts: &Fonts) -> String {
    frame.glyphs_of(run).iter().map(|glyph| fonts.face(run.face).character(glyph.id)).collect()
}

/// Text and rules that leave the sheet's margins or the measure.
fn outside(frame: &Frame, pages: &Pages, fonts: &Fonts) -> Vec<String> {
    let edge = pages.width - RIGHT;
    let measure = edge - CHECK - GAP;
    let mut faults = Vec::new();
    for run in runs(frame) {
        let right = run.x + run.width;
        let on_sheet = run.x >= LEFT - 0.1 && right <= edge + 0.1 && run.y > HEAD && run.y <= pages.height - FOOT;
        let in_body = run.y > TOP && run.y < pages.height - BELOW && run.x < edge - CHECK;
        if !on_sheet || in_body && right > measure + 0.6 {
            faults.push(format!("`{}` at {}, {} is outside", words(frame, run, fonts), run.x, run.y));
        }
    }
    for item in &frame.items {
        let leaves =
            |x: f32, y: f32| x < LEFT - 0.2 || x > edge + 0.2 || y < HEAD - 0.2 || y > pages.height - FOOT + 0.6;
        let out = match item {
            Item::Rule(rule) => leaves(rule.x, rule.y) || leaves(rule.x + rule.width, rule.y + rule.height),
            Item::Path(path) => path.points.iter().any(|[x, y]| leaves(*x, *y)),
            _ => false,
        };
        if out {
            faults.push(format!("a line is outside: {item:?}"));
        }
    }
    faults
}

/// Texts over other texts: the middle bands of their letters meet.
fn covered(frame: &Frame, fonts: &Fonts) -> Vec<String> {
    let boxes: Vec<(&Run, [f32; 4])> = runs(frame)
        .filter(|run| {
            // Parts of one tall bracket overlap by design.
            let first = fonts.face(run.face).character(frame.glyphs_of(run)[0].id);
            run.width > 1.0 && !(run.face == FaceName::Math && run.count == 1 && "()|√⎛⎜⎝⎞⎟⎠⎷⏐".contains(first))
        })
        .map(|run| (run, [run.x + 0.4, run.x + run.width - 0.4, run.y - 0.42 * run.size, run.y - 0.05 * run.size]))
        .collect();
    let mut faults = Vec::new();
    for (at, (run, a)) in boxes.iter().enumerate() {
        for (other, b) in &boxes[at + 1..] {
            if a[1] > b[0] && b[1] > a[0] && a[3] > b[2] && b[3] > a[2] {
                let [one, two] = [run, other].map(|run| words(frame, run, fonts));
                faults.push(format!("`{one}` and `{two}` overlap at {}, {}", run.x, run.y));
            }
        }
    }
    faults
}

#[test]
fn every_sheet_of_every_package_is_clean() {
    let fonts = Fonts::built_in();
    let (mut sheets, mut faults) = (0, Vec::new());
    for (at, (name, package)) in many().iter().enumerate() {
        let paper = if at % 2 == 0 { Paper::A4 } else { Paper::Letter };
        let pages = typeset(&package.document, &package.sheet, paper, &fonts);
        if !pages.missing.is_empty() {
            faults.push(format!("{name}: no glyphs for {:?}", pages.missing));
        }
        for (number, frame) in pages.sheets.iter().enumerate() {
            let mut found = outside(frame, &pages, &fonts);
            found.extend(covered(frame, &fonts));
            faults.extend(found.into_iter().map(|fault| format!("{name} sheet {}: {fault}", number + 1)));
            let lost = frame.links.iter().filter(|link| pages.spot(&link.to).is_none());
            faults.extend(lost.map(|link| format!("{name} sheet {}: nothing stands at {}", number + 1, link.to)));
        }
        sheets += pages.sheets.len();
    }
    assert!(sheets > 2000, "only {sheets} sheets");
    assert!(faults.is_empty(), "{} faults:\n{}", faults.len(), faults[..faults.len().min(40)].join("\n"));
}
