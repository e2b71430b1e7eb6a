//! A surface as text: whether the solver can trust it, what is wrong with it and where, and what it is like.

use super::numbers::percent;
use super::sheet::{Sheet, Style, Tone, sentence};
use super::surface_flaws_text::{flaws, pieces};
use super::surface_units::{Units, area, volume};
use crate::question::{CreaseReport, SurfaceReport};
use crate::surface::SMOOTH_SURFACE_CREASE_DEG;

/// Geometry errors below this are rounding.
const NO_ERROR: f64 = 1e-9;

/// Width of a column in the table of angles, and of what stands before its rows.
const BAND_COLUMN: usize = 9;
const BAND_LABEL: usize = 14;

/// The report as text.
pub fn surface_text(report: &SurfaceReport, style: Style) -> String {
    let mut sheet = Sheet::new(style);
    let units = Units::of(report);
    sheet.title(&report.name);
    sheet.gap();
    verdict(&mut sheet, report);
    sheet.gap();
    size(&mut sheet, report, &units);
    sheet.gap();
    pieces(&mut sheet, report, &units);
    flaws(&mut sheet, report, &units);
    sheet.gap();
    creases(&mut sheet, &report.creases, &units);
    sheet.item("looks like", &format!("{}.", report.kind_reason));
    solved_as(&mut sheet, report);
    for note in &report.notes {
        sheet.item("note", &sentence(note));
    }
    sheet.finish()
}

fn verdict(sheet: &mut Sheet, report: &SurfaceReport) {
    let as_it_is = match &report.mended {
        Some(done) if !done.is_empty() => "mended as told below",
        _ => "as it is",
    };
    match &report.refusal {
        None => {
            sheet.toned_item("verdict", Tone::Good, "usable", &format!(": the solver takes this surface {as_it_is}"));
            if report.unit.is_none() {
                sheet.item(
                    "",
                    "The file doesn't tell its unit, and `drag` must be told: add `--unit um`, or what it is.",
                );
            }
        }
        Some(why) => {
            let still = if report.mended.is_some() { ", still" } else { "" };
            sheet.toned_item("verdict", Tone::Bad, "refused", &format!("{still}: {why}"));
            if let Some(step) = &report.next_step {
                match &report.next_command {
                    None => sheet.item("next", &sentence(step)),
                    Some(command) => {
                        sheet.item("next", &format!("{} Here mending suffices:", sentence(step)));
                        // Not wrapped, so that it can be copied.
                        sheet.line("", command);
                    }
                }
            }
        }
    }
    match report.mended.as_deref() {
        None => {}
        Some([]) => sheet.item("mended", "nothing: there was nothing that mending could change"),
        Some(done) => {
            for done in done {
                sheet.item("mended", &sentence(done));
            }
        }
    }
    if let Some(written) = &report.written {
        let file = format!("{}, {} facets as {}", written.path, written.facets, written.format);
        match (&written.refusal, report.usable) {
            (None, _) => sheet.item("written", &format!("{file}; read back, the solver takes it")),
            (Some(_), false) => {
                let flaws =
                    if report.mended.is_some() { "with what mending left" } else { "with its flaws, not mended" };
                sheet.item("written", &format!("{file}, {flaws}: the solver refuses it too"));
            }
            (Some(why), true) => {
                let file = format!(": {file} loses digits that matter: read back, {why}");
                sheet.toned_item("written", Tone::Bad, "spoiled", &file);
                sheet.item(
                    "next",
                    "Write .obj, .ply, .off or .msh, which keep all digits, or move the body to the origin.",
                );
            }
        }
    }
}

fn size(sheet: &mut Sheet, report: &SurfaceReport, units: &Units) {
    let [x, y, z] = report.size_in_file_units.map(|edge| units.length(edge));
    sheet.item("size", &format!("{x} x {y} x {z} {} along x, y, z", units.name));
    let area = area(report.area_in_file_units, report.area_m2);
    let volume = match report.volume_in_file_units {
        0.0 if !report.closed => "no volume, since it is not closed".to_owned(),
        in_file_units => format!("volume {}", volume(in_file_units, report.volume_m3)),
    };
    sheet.item("", &format!("{volume}; surface {area}"));
    let of_what = if report.volume_in_file_units > 0.0 { "centroid" } else { "centroid of the surface" };
    sheet.item("", &format!("{of_what} at {} {}", units.place(&report.centroid_in_file_units), units.name));
    sheet.item(
        "made of",
        &format!(
            "{} facets on {} vertices, edges from {} to {} {}",
            report.facets,
            report.vertices,
            units.length(report.shortest_edge_in_file_units),
            units.length(report.longest_edge_in_file_units),
            units.name
        ),
    );
    if let Some(format) = &report.format {
        sheet.item("", &format!("read from {format}"));
    }
}

fn creases(sheet: &mut Sheet, creases: &CreaseReport, units: &Units) {
    let from = angle(creases.from_deg);
    let sharpest = format!("the sharpest edge turns by {:.0} degrees", creases.sharpest_turn_deg);
    sheet.item(
        "creases",
        &match creases.count {
            0 => format!("none of {from} degrees or more; {sharpest}"),
            count => format!(
                "{count} {} of {from} degrees or more, {} {} in all; {sharpest}",
                if count == 1 { "edge" } else { "edges" },
                units.length(creases.length_in_file_units),
                units.name
            ),
        },
    );
    let row = |label: &str, entry: &dyn Fn(usize) -> String| {
        let entries = (0..creases.by_angle.len()).map(|k| format!("{:>BAND_COLUMN$}", entry(k)));
        format!("{label:<BAND_LABEL$}{}", entries.collect::<String>())
    };
    let last = creases.by_angle.len().saturating_sub(1);
    let band = |k: usize| {
        let band = &creases.by_angle[k];
        if k == last { format!("> {}", band.from_deg) } else { format!("{}-{}", band.from_deg, band.to_deg) }
    };
    sheet.line("", &row("degrees", &band));
    sheet.line("", &row("edges", &|k| creases.by_angle[k].edges.to_string()));
    sheet.line("", &row(&units.length_heading, &|k| units.length(creases.by_angle[k].length_in_file_units)));
}

/// Degrees without needless digits.
fn angle(degrees: f64) -> String {
    format!("{}", (100.0 * degrees).round() / 100.0)
}

fn solved_as(sheet: &mut Sheet, report: &SurfaceReport) {
    let Some(solved) = &report.solved_as else { return };
    let error = solved.relative_geometry_error;
    let difference = if error < NO_ERROR {
        "they are the body itself".to_owned()
    } else {
        format!("they differ from the smooth body by {} of its drag, at a guess on the safe side", percent(error))
    };
    sheet.item(
        "solved as",
        &format!("{} triangles, {} to begin with; {difference}", solved.geometry, solved.macro_triangles),
    );
    let (asked, kept) = (report.creases.from_deg, solved.creases_from_deg);
    if asked != SMOOTH_SURFACE_CREASE_DEG {
        let kept = angle(kept);
        sheet.item(
            "",
            &format!("For study, edges of {kept} degrees or more are kept sharp here; `drag` decides itself."),
        );
    }
}
