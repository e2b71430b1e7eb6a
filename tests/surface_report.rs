//! What the program says of a surface: places, units, creases, what mending would do, and what is written.

mod meshes;

use meshes::{cuboid, globe, icosphere, mesh, moved, prism, together, torus, turned_inside_out};
use slowmote::question::{LengthUnit, Surface, SurfaceReport};
use slowmote::show::{Style, surface_text};
use slowmote::surface::{FacetedGeometry, FacetedOptions, MendOptions, SurfaceFormat, TriangleMesh, mend};

fn surface(mesh: &TriangleMesh, unit: Option<(&str, f64)>) -> Surface {
    let unit = unit.map(|(symbol, metres)| LengthUnit { symbol: symbol.to_owned(), metres });
    Surface { name: "body".to_owned(), format: None, mesh: mesh.clone(), unit, mended: None, notes: Vec::new() }
}

fn report(mesh: &TriangleMesh) -> SurfaceReport {
    surface(mesh, Some(("um", 1e-6))).report(&FacetedOptions::default())
}

fn text(report: &SurfaceReport) -> String {
    // One line, so that breaks don't matter.
    surface_text(report, Style::PLAIN).split_whitespace().collect::<Vec<_>>().join(" ")
}

#[track_caller]
fn says(report: &SurfaceReport, pieces: &[&str]) {
    let text = text(report);
    for piece in pieces {
        assert!(text.contains(piece), "`{piece}` is missing in\n{}", surface_text(report, Style::PLAIN));
    }
}

fn with(body: &TriangleMesh, more: &[[usize; 3]]) -> TriangleMesh {
    let facets = body.facets().iter().chain(more).copied().collect();
    mesh(body.vertices().to_vec(), facets)
}

fn without(body: &TriangleMesh, dropped: &[usize]) -> TriangleMesh {
    body.filtered(|facet| !dropped.contains(&facet))
}

#[test]
fn every_length_is_there_in_si_or_null() {
    let open = without(&cuboid([2.0, 3.0, 5.0]), &[0]);
    let two = together(&[open, moved(&cuboid([1.0; 3]), [9.0, 0.0, 0.0])]);
    for (unit, metres) in [(None, None), (Some(("mm", 1e-3)), Some(1e-3_f64))] {
        let report = surface(&two, unit).report(&FacetedOptions::default());
        let value = serde_json::to_value(&report).unwrap();
        let mut pairs = 0;
        check_units(&value, metres, &mut pairs);
        assert!(pairs > 20, "{pairs}");
    }
}

/// Beside each key in file units stands one in SI, which agrees.
fn check_units(value: &serde_json::Value, metres: Option<f64>, pairs: &mut usize) {
    let flat = |value: &serde_json::Value| match value {
        serde_json::Value::Array(entries) => entries.iter().filter_map(|entry| entry.as_f64()).collect(),
        other => vec![other.as_f64().unwrap()],
    };
    if let serde_json::Value::Array(entries) = value {
        entries.iter().for_each(|entry| check_units(entry, metres, pairs));
    }
    let Some(object) = value.as_object() else { return };
    for (key, value) in object {
        check_units(value, metres, pairs);
        let Some(name) = key.strip_suffix("_in_file_units") else { continue };
        let (suffix, power) = [("m", 1), ("m2", 2), ("m3", 3)]
            .into_iter()
            .find(|(suffix, _)| object.contains_key(&format!("{name}_{suffix}")))
            .unwrap_or_else(|| panic!("{name} has no SI"));
        let si = &object[&format!("{name}_{suffix}")];
        match metres {
            None => assert!(si.is_null(), "{name}"),
            Some(metres) => {
                for (si, file) in flat(si).iter().zip(flat(value)) {
                    let expected = file * metres.powi(power);
                    assert!((si - expected).abs() <= 1e-12 * expected.abs(), "{name}: {si} {expected}");
                }
            }
        }
        *pairs += 1;
    }
}

#[test]
fn numbers_below_rounding_are_zero_in_the_text() {
    let seen = report(&icosphere(2));
    assert!(seen.centroid_in_file_units.iter().any(|x| *x != 0.0), "rounding is there");
    says(&seen, &["centroid at (0, 0, 0) um"]);
    says(&report(&moved(&cuboid([2.0; 3]), [-1.00001, 0.0, 0.0])), &["centroid at (0.000, 1.000, 1.000) um"]);
    // Far from the origin a place needs all its digits.
    says(&report(&moved(&cuboid([2.0; 3]), [1e6, 0.0, 0.5])), &["centroid at (1000001.000, 1.000, 1.500) um"]);
}

#[test]
fn volume_and_area_have_readable_units() {
    let body = cuboid([10.0, 8.0, 5.0]);
    says(&report(&body), &["volume 400.0 fL; surface 340.0 um2", "10.00 x 8.000 x 5.000 um"]);
    let plain = surface(&body, None).report(&FacetedOptions::default());
    says(&plain, &["volume 400.0 file units cubed; surface 340.0 file units squared", "add `--unit um`"]);
}

#[test]
fn each_flaw_is_listed_with_facet_and_place() {
    let cube = cuboid([1.0; 3]);
    let [a, b, c] = cube.facets()[3];
    let twice = report(&with(&cube, &[[c, a, b]]));
    assert_eq!((twice.duplicate_facets, &twice.duplicate_facet_places[0].facets), (1, &vec![4, 13]));
    assert_eq!(twice.non_manifold_edges, 3);
    says(&twice, &["1 facet is there twice", "facets 4 and 13 at (0.333, 0.667, 1.000) are the same", "has 3 facets:"]);

    let flat = report(&with(&cube, &[[a, a, b]]));
    assert_eq!(flat.degenerate_facet_places[0].facets, [13]);
    says(&flat, &["facet 13 at", "has no area"]);

    let thin = report(&cuboid([1.0, 1.0, 1e-3]));
    assert_eq!((thin.slivers, thin.sliver_places.len()), (8, 8));
    assert!(thin.sliver_places[0].aspect.unwrap() > 999.0 && thin.usable);
    says(&thin, &["8 facets are more than a hundred times longer than high", "and 4 more"]);

    let edge = together(&[cube.clone(), moved(&cube, [1.0, 1.0, 0.0])]);
    let edge = report(&mend(&edge, &MendOptions::default()).0);
    says(&edge, &["the edge at (1.000, 1.000, 0.500) has 4 facets", "no: there is no hole, but edges"]);

    let pinched = mend(&torus(1.0, 1.0, 12, 8), &MendOptions { close_holes: false, ..MendOptions::default() }).0;
    let pinched = report(&pinched);
    assert!(!pinched.usable && pinched.pinched_vertices > pinched.touching_vertices);
    says(&pinched, &["vertex pinches the surface", "belong to parts that touch only in (0, 0, 0)"]);

    let mut facets = cube.facets().to_vec();
    facets[6].swap(0, 1);
    let mixed = report(&mesh(cube.vertices().to_vec(), facets));
    assert_eq!((mixed.wrong_facing, &mixed.wrong_facing_places[0].facets), (1, &vec![7]));
    says(&mixed, &["facet 7 at", "faces the wrong way"]);

    let crossing = report(&together(&[cube.clone(), moved(&cube, [0.5, 0.25, 0.125])]));
    assert!(crossing.intersections > 4);
    says(&crossing, &["pairs of facets cross or touch", "cross or touch at (", "more"]);
}

#[test]
fn pieces_have_a_line_each_up_to_ten() {
    let nested = together(&[icosphere(2), turned_inside_out(&meshes::map(&icosphere(1), |x| 0.5 * x))]);
    let seen = report(&nested);
    assert_eq!((seen.shell_count, seen.shells[1].inside_shell, seen.wrong_facing), (2, Some(1), 0));
    assert_eq!((seen.shells[1].first_facet, seen.shells[1].orientation.as_str()), (321, "inward"));
    says(&seen, &["2, one of them inside another", "facing inward, inside piece 1", "outward, and hollows inward"]);

    let many = (0..25).map(|k| moved(&cuboid([1.0; 3]), [2.0 * f64::from(k), 0.0, 0.0])).collect::<Vec<_>>();
    let seen = report(&together(&many));
    assert!(seen.usable && seen.shell_count == 25 && seen.shells.len() == 20);
    says(&seen, &["10: 12 facets from facet 109 on", "and 15 more pieces"]);
    assert!(!text(&seen).contains("11: 12 facets"));
}

#[test]
fn pieces_that_touch_in_a_vertex_are_told_and_taken() {
    let two = together(&[globe(8, 6), moved(&globe(8, 6), [0.0, 0.0, 2.0])]);
    let seen = report(&mend(&two, &MendOptions::default()).0);
    assert!(seen.usable && seen.touching_vertices == 1);
    says(&seen, &["pieces touch in one vertex", "meet in (0, 0, 1.000)", "flaws none"]);
}

#[test]
fn edges_are_counted_by_their_angle() {
    // A hexagonal prism of side 1 and height 1: 6 edges of 60 degrees, 12 of 90, and 12 diagonals in planes.
    let corner = |k: usize| {
        let (sine, cosine) = (std::f64::consts::TAU * k as f64 / 6.0).sin_cos();
        [cosine, sine]
    };
    let outline = (0..6).map(corner).collect::<Vec<_>>();
    let seen = report(&prism(&outline, &[[0, 1, 2], [0, 2, 3], [0, 3, 4], [0, 4, 5]]));
    let counts = seen.creases.by_angle.iter().map(|band| band.edges).collect::<Vec<_>>();
    assert_eq!(counts, [12, 0, 0, 0, 18, 0]);
    assert!((seen.creases.by_angle[4].length_in_file_units - 18.0).abs() < 1e-9);
    assert_eq!((seen.creases.count, seen.creases.from_deg), (18, 40.0));
    says(&seen, &["0-10 10-20 20-40 40-60 60-90 > 90", "18 edges of 40 degrees or more, 18.00 um in all"]);

    // A regular tetrahedron turns by 180 - 70.53 degrees at its edges.
    let counts = report(&meshes::tetrahedron()).creases.by_angle.iter().map(|band| band.edges).collect::<Vec<_>>();
    assert_eq!(counts, [0, 0, 0, 0, 0, 6]);

    let from_70 = FacetedOptions { crease_deg: Some(70.0), ..FacetedOptions::default() };
    let seen = surface(&prism(&outline, &[[0, 1, 2], [0, 2, 3], [0, 3, 4], [0, 4, 5]]), None).report(&from_70);
    assert_eq!(seen.creases.count, 12);
}

#[test]
fn mending_is_offered_only_where_it_helps() {
    let cube = cuboid([1.0; 3]);
    let suffices = |mesh: &TriangleMesh| report(mesh).mending_suffices;
    assert_eq!(suffices(&cube), None);
    assert_eq!(suffices(&turned_inside_out(&cube)), Some(true));
    assert_eq!(suffices(&without(&icosphere(2), &[3, 4])), Some(true));
    // Half a box: its hole is longer than the box's diagonal.
    let half = report(&without(&cube, &[2, 3]));
    assert_eq!(half.mending_suffices, Some(false));
    says(&half, &["export the body with the missing part"]);
    assert!(!text(&half).contains("mending"), "{}", text(&half));
    // Inside out and crossing: mending turns it, and the crossing stays.
    let both = together(&[cube.clone(), moved(&cube, [0.5, 0.25, 0.125])]);
    let both = report(&turned_inside_out(&both));
    assert_eq!(both.mending_suffices, Some(false));
    says(&both, &["all facets face inward", "Mending would not do: then facets", "Boolean union"]);
    // Once mended, mending is not offered again.
    let left = surface(&without(&cube, &[2, 3]), None).mended().report(&FacetedOptions::default());
    assert_eq!((left.mending_suffices, left.usable), (None, false));
    says(&left, &["refused, still: the surface is open", "Left the hole near (0.5, 0.5, 1.0) open"]);
}

#[test]
fn what_is_solved_follows_the_options() {
    let ball = surface(&icosphere(3), None);
    let error = |geometry| {
        let options = FacetedOptions { geometry, ..FacetedOptions::default() };
        ball.report(&options).solved_as.unwrap()
    };
    let (own, flat) = (error(None), error(Some(FacetedGeometry::Flat)));
    assert_eq!((own.geometry.as_str(), flat.geometry.as_str()), ("curved", "flat"));
    assert!(flat.relative_geometry_error > 5.0 * own.relative_geometry_error);
    assert!(flat.reason.contains("as asked for"));
}

#[test]
fn what_a_format_spoils_is_told() {
    // Ten nanometres at ten thousand: the single precision of STL moves vertices by a tenth of the body.
    let far = moved(&cuboid([0.010, 0.008, 0.005]), [1e4; 3]);
    let surface = surface(&far, None);
    let seen = surface.report(&FacetedOptions::default());
    assert!(seen.usable);
    for format in SurfaceFormat::ALL {
        let (bytes, written) = surface.written(format, &seen).unwrap();
        assert!(!bytes.is_empty() && written.facets == 12);
        assert_eq!(written.usable, format != SurfaceFormat::Stl, "{format}: {:?}", written.refusal);
    }
    let (_, written) = surface.written(SurfaceFormat::Stl, &seen).unwrap();
    says(&SurfaceReport { written: Some(written), ..seen }, &["spoiled", "loses digits that matter", "Write .obj"]);
}
