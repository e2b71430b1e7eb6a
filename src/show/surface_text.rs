//! A surface as text: what it is, what is wrong with it, and whether the solver can trust it.

use super::numbers::percent;
use super::sheet::{Sheet, Style, Tone, sentence};
use crate::physical::quantity::format_number;
use crate::question::SurfaceReport;

/// Digits of lengths and sizes.
const DIGITS: usize = 4;

/// The report as text.
pub fn surface_text(report: &SurfaceReport, style: Style) -> String {
    let mut sheet = Sheet::new(style);
    let unit = report.unit.as_deref().unwrap_or("file units");
    let number = |value: f64| format_number(value, DIGITS);
    let place = |x: &[f64; 3]| x.map(number).join(", ");
    sheet.title(&report.name);
    sheet.gap();
    match (report.usable, &report.refusal) {
        (true, _) => sheet.toned_item("verdict", Tone::Good, "usable", ": the solver takes this surface as it is"),
        (false, refusal) => {
            let why = refusal.as_deref().unwrap_or("the surface can't be used");
            sheet.toned_item("verdict", Tone::Bad, "refused", &format!(": {why}"));
            if let Some(step) = &report.next_step {
                sheet.item("next", &sentence(step));
            }
        }
    }
    for done in &report.mended {
        sheet.item("mended", &sentence(done));
    }
    sheet.gap();
    let [x, y, z] = report.size_in_file_units.map(number);
    sheet.item("size", &format!("{x} x {y} x {z} {unit} along x, y, z"));
    sheet.item(
        "",
        &format!(
            "volume {} and surface {} in {unit} cubed and squared; centroid at {}",
            number(report.volume_in_file_units),
            number(report.area_in_file_units),
            place(&report.centroid_in_file_units),
        ),
    );
    if report.unit.is_none() {
        sheet.item("", "the file does not tell its unit, and none was given");
    }
    sheet.item(
        "made of",
        &format!(
            "{} facets on {} vertices, edges from {} to {} {unit}",
            report.facets,
            report.vertices,
            number(report.shortest_edge_in_file_units),
            number(report.longest_edge_in_file_units)
        ),
    );
    if let Some(format) = &report.format {
        sheet.item("", &format!("read from {format}"));
    }
    sheet.item("pieces", &pieces(report));
    sheet.item("closed", &closed(report, unit));
    for hole in &report.holes {
        sheet.item(
            "",
            &format!(
                "a hole of {} edges, {} {unit} around, near {}",
                hole.edges,
                number(hole.length_in_file_units),
                place(&hole.place_in_file_units)
            ),
        );
    }
    sheet.item("facing", facing(&report.orientation));
    sheet.item("flaws", &flaws(report));
    for x in &report.intersection_places_in_file_units {
        sheet.item("", &format!("it crosses itself near {}", place(x)));
    }
    sheet.item(
        "creases",
        &format!(
            "{} edges of 40 degrees or more, {} {unit} long in all; the sharpest turns by {:.0} degrees",
            report.crease_count,
            number(report.crease_length_in_file_units),
            report.sharpest_turn_deg
        ),
    );
    sheet.item("looks", &sentence(&report.kind_reason));
    if let (Some(geometry), Some(error), Some(count)) =
        (&report.geometry, report.relative_geometry_error, report.macro_triangles)
    {
        sheet.item(
            "solved as",
            &format!(
                "{geometry} triangles, {count} to begin with; {}",
                if error < 1e-9 {
                    "they are the body itself".to_owned()
                } else {
                    format!(
                        "they differ from the smooth body by {} of its drag, at a guess on the safe side",
                        percent(error)
                    )
                }
            ),
        );
    }
    for note in &report.notes {
        sheet.item("note", &sentence(note));
    }
    sheet.finish()
}

fn pieces(report: &SurfaceReport) -> String {
    let holes_through = |genus: Option<usize>| match genus {
        Some(0) => String::new(),
        Some(1) => ", with one hole through it like a ring".to_owned(),
        Some(count) => format!(", with {count} holes through it"),
        None => String::new(),
    };
    match report.shells.as_slice() {
        [one] => format!("one{}", holes_through(one.genus)),
        shells => {
            let inside = shells.iter().filter(|shell| shell.inside_shell.is_some()).count();
            let inside = if inside > 0 { format!(", {inside} of them inside others") } else { String::new() };
            format!("{}{inside}", shells.len())
        }
    }
}

fn closed(report: &SurfaceReport, unit: &str) -> String {
    match (report.closed, report.hole_count) {
        (true, _) => "yes".to_owned(),
        (false, 0) => "no".to_owned(),
        (false, 1) => format!("no: one hole, place in {unit}"),
        (false, count) => format!("no: {count} holes, places in {unit}"),
    }
}

fn facing(orientation: &str) -> &'static str {
    match orientation {
        "outward" => "outward, as it must",
        "inward" => "inward: the surface is inside out",
        "mixed" => "mixed: some facets face the other way than their neighbours",
        "impossible" => "no choice of directions makes all neighbours agree",
        _ => "neighbours agree, but an open surface has no outside",
    }
}

fn flaws(report: &SurfaceReport) -> String {
    let more = if report.intersections_complete { "" } else { " or more" };
    let counts = [
        (report.duplicate_facets, "facets are there twice"),
        (report.degenerate_facets, "facets have no area"),
        (report.slivers, "facets are slivers"),
        (report.non_manifold_edges, "edges belong to more than two facets"),
        (report.pinched_vertices, "vertices pinch the surface"),
        (report.intersections, "pairs of facets cross"),
    ];
    let found = counts.iter().filter(|(count, _)| *count > 0).map(|(count, what)| {
        let more = if what.contains("cross") { more } else { "" };
        format!("{count}{more} {what}")
    });
    let found = found.collect::<Vec<_>>();
    if found.is_empty() { "none".to_owned() } else { found.join("; ") }
}
