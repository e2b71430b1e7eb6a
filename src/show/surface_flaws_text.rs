//! The pieces of a surface and what is wrong with them, each with its place.

use super::sheet::{Sheet, Tone};
use super::surface_units::{Units, area, volume};
use crate::physical::quantity::format_number;
use crate::question::{FlawPlace, ShellReport, SurfaceReport};

/// Places of each kind of flaw that are shown; JSON has more.
const MOST_PLACES: usize = 4;

/// Pieces that are shown.
const MOST_PIECES: usize = 10;

/// Facets of one place that are named.
const MOST_FACETS: usize = 6;

/// Pieces, whether they are closed, and which way they face.
pub(super) fn pieces(sheet: &mut Sheet, report: &SurfaceReport, units: &Units) {
    match report.shells.as_slice() {
        [one] => sheet.item("pieces", &format!("one{}", handles(one.genus))),
        shells => {
            let inside = shells.iter().filter(|shell| shell.inside_shell.is_some()).count();
            let inside = match inside {
                0 => "",
                1 => ", one of them inside another",
                _ => ", some of them inside others",
            };
            sheet.item("pieces", &format!("{}{inside}", report.shell_count));
            for (number, shell) in shells.iter().enumerate().take(MOST_PIECES) {
                sheet.item("", &format!("{}: {}", number + 1, piece(shell, units)));
            }
            and_more(sheet, report.shell_count, MOST_PIECES, "piece", "pieces");
        }
    }
    match (report.closed, report.hole_count) {
        (true, _) => sheet.item("closed", "yes"),
        (false, 0) => sheet.item("closed", "no: there is no hole, but edges with more than two facets"),
        (false, 1) => sheet.item("closed", "no: there is one hole"),
        (false, count) => sheet.item("closed", &format!("no: there are {count} holes")),
    }
    for hole in report.holes.iter().take(MOST_PLACES) {
        sheet.item(
            "",
            &format!(
                "hole of {} edges, {} {} around, near {}, beside facet {}",
                hole.edges,
                units.length(hole.length_in_file_units),
                units.name,
                units.place(&hole.place_in_file_units),
                hole.facet
            ),
        );
    }
    and_more(sheet, report.hole_count, MOST_PLACES, "hole, smaller than these", "holes, smaller than these");
    sheet.item("facing", facing(report));
    if report.orientation == "mixed" {
        places(sheet, report.wrong_facing, &report.wrong_facing_places, units, &|flaw, at| {
            format!("facet {} at {at} faces the wrong way", numbers(&flaw.facets))
        });
    }
}

fn piece(shell: &ShellReport, units: &Units) -> String {
    let closed = if shell.closed {
        format!("closed, volume {}", volume(shell.volume_in_file_units, shell.volume_m3))
    } else {
        format!("open, surface {}", area(shell.area_in_file_units, shell.area_m2))
    };
    let count = if shell.facets == 1 { "1 facet".to_owned() } else { format!("{} facets", shell.facets) };
    let facing = match shell.orientation.as_str() {
        "inward" => ", facing inward",
        "mixed" => ", facing both ways",
        "impossible" => ", one-sided",
        _ => "",
    };
    let inside = shell.inside_shell.map(|outer| format!(", inside piece {outer}")).unwrap_or_default();
    format!(
        "{count} from facet {} on, {closed}{}{facing}{inside}, about {}",
        shell.first_facet,
        handles(shell.genus),
        units.place(&shell.centroid_in_file_units)
    )
}

fn handles(genus: Option<usize>) -> String {
    match genus {
        None | Some(0) => String::new(),
        Some(1) => ", with one hole through it like a ring".to_owned(),
        Some(count) => format!(", with {count} holes through it"),
    }
}

fn facing(report: &SurfaceReport) -> &'static str {
    match report.orientation.as_str() {
        "outward" => "outward, as it must",
        "inward" => "inward: the surface is inside out",
        "mixed" if report.wrong_facing == 0 => "outward, and hollows inward",
        "mixed" => "mixed: some facets face the other way than the rest",
        "impossible" => "no choice of directions makes all neighbours agree",
        _ => "neighbours agree, but what is not closed has no outside",
    }
}

/// What is wrong with single facets, edges and vertices.
pub(super) fn flaws(sheet: &mut Sheet, report: &SurfaceReport, units: &Units) {
    let harmful = report.pinched_vertices - report.touching_vertices.min(report.pinched_vertices);
    let kinds = [
        (report.degenerate_facets, "facet has no area", "facets have no area"),
        (report.duplicate_facets, "facet is there twice", "facets are there twice"),
        (report.non_manifold_edges, "edge has more than two facets", "edges have more than two facets"),
        (harmful, "vertex pinches the surface", "vertices pinch the surface"),
        (report.intersections, "pair of facets crosses or touches", "pairs of facets cross or touch"),
    ];
    let more = if report.intersections_complete { "" } else { ", or more (the search was ended)" };
    let found = kinds.iter().filter(|(count, ..)| *count > 0);
    let found = found.map(|(count, one, several)| format!("{count} {}", if *count == 1 { one } else { several }));
    let found = found.collect::<Vec<_>>().join("; ") + more;
    if found.is_empty() {
        sheet.item("flaws", "none");
    } else {
        sheet.toned_item("flaws", Tone::Bad, "found", &format!(": {found}"));
    }
    places(sheet, report.degenerate_facets, &report.degenerate_facet_places, units, &|flaw, at| {
        format!("facet {} at {at} has no area", numbers(&flaw.facets))
    });
    places(sheet, report.duplicate_facets, &report.duplicate_facet_places, units, &|flaw, at| {
        format!("facets {} at {at} are the same", numbers(&flaw.facets))
    });
    places(sheet, report.non_manifold_edges, &report.non_manifold_edge_places, units, &|flaw, at| {
        format!("the edge at {at} has {} facets: {}", flaw.facets.len(), numbers(&flaw.facets))
    });
    places(sheet, harmful, &report.pinched_vertex_places, units, &|flaw, at| {
        format!("facets {} belong to parts that touch only in {at}", numbers(&flaw.facets))
    });
    places(sheet, report.intersections, &report.intersection_places, units, &|flaw, at| {
        format!("facets {} cross or touch at {at}", numbers(&flaw.facets))
    });
    if report.slivers > 0 {
        let what = if report.slivers == 1 { "facet is" } else { "facets are" };
        sheet.item("slivers", &format!("{} {what} more than a hundred times longer than high", report.slivers));
        places(sheet, report.slivers, &report.sliver_places, units, &|flaw, at| {
            let aspect = format_number(flaw.aspect.unwrap_or_default(), 3);
            format!("facet {} at {at}: {aspect} times", numbers(&flaw.facets))
        });
    }
    if report.touching_vertices > 0 {
        let what = if report.touching_vertices == 1 { "one vertex" } else { "some vertices" };
        sheet.item("touching", &format!("pieces touch in {what}; they count as rigidly joined there"));
        let joining = report.pinched_vertex_places.iter().skip(harmful).cloned().collect::<Vec<_>>();
        places(sheet, report.touching_vertices, &joining, units, &|flaw, at| {
            format!("facets {} meet in {at}", numbers(&flaw.facets))
        });
    }
}

/// The first places of one kind of flaw, and how many more there are.
fn places(
    sheet: &mut Sheet,
    count: usize,
    flaws: &[FlawPlace],
    units: &Units,
    told: &dyn Fn(&FlawPlace, String) -> String,
) {
    for flaw in flaws.iter().take(MOST_PLACES.min(count)) {
        sheet.item("", &told(flaw, units.place(&flaw.place_in_file_units)));
    }
    and_more(sheet, count, MOST_PLACES, "more", "more");
}

fn and_more(sheet: &mut Sheet, count: usize, shown: usize, one: &str, several: &str) {
    match count.saturating_sub(shown) {
        0 => {}
        1 => sheet.item("", &format!("and 1 {}", more(one))),
        left => sheet.item("", &format!("and {left} {}", more(several))),
    }
}

/// `more`, or `more pieces`.
fn more(what: &str) -> String {
    if what == "more" { what.to_owned() } else { format!("more {what}") }
}

/// `3, 7 and 12`.
fn numbers(facets: &[usize]) -> String {
    let shown = facets.iter().take(MOST_FACETS).map(ToString::to_string).collect::<Vec<_>>();
    match (shown.as_slice(), facets.len().saturating_sub(MOST_FACETS)) {
        ([most @ .., last], 0) if !most.is_empty() => format!("{} and {last}", most.join(", ")),
        (_, 0) => shown.join(", "),
        (_, left) => format!("{} and {left} more", shown.join(", ")),
    }
}
