//! Named shapes as flat facets: fit to be written in every format, read back, and used.

use slowmote::surface::shapes::{CATALOGUE, Shape};
use slowmote::surface::{
    Geometry, Orientation, SurfaceFormat, TriangleMesh, examine, read_surface_bytes, surface_bytes, usable, weld,
    weld_tolerance,
};

/// Numbers of triangles that are asked for.
const SIZES: [usize; 5] = [4, 50, 300, 1000, 5000];

/// Long, thin and flat ones beside the catalogue's examples.
const EXTREME: [&str; 14] = [
    "rod:60x1um",
    "rod:2.01x2um",
    "cylinder:60x1um",
    "cylinder:2x2um",
    "disc:100x1um",
    "disc:4x2um",
    "cone:4x2um",
    "cone:1x10um",
    "cone:50x1um",
    "ring:10x9um",
    "ellipsoid:100x1x1um",
    "ellipsoid:10x10x0.1um",
    "box:10x10x0.1um",
    "helix:turns=2.5,pitch=0.5um,diameter=3um,thickness=0.4um,hand=left",
];

fn facets(shape: &Shape, elements: usize) -> TriangleMesh {
    let blueprint = shape.blueprint().ungraded();
    TriangleMesh::of_panels(&blueprint.subdivide(blueprint.cuts_for(elements), Geometry::Flat), 1e6)
}

/// The mesh as a file of this format gives it back.
fn through(mesh: &TriangleMesh, format: SurfaceFormat) -> TriangleMesh {
    let raw = read_surface_bytes(&surface_bytes(mesh, format).unwrap(), format).unwrap();
    weld(&raw.mesh, weld_tolerance(&raw.mesh)).mesh
}

#[test]
fn every_shape_in_every_size_and_format_is_closed_outward_and_free_of_crossings() {
    let examples = CATALOGUE.iter().map(|entry| entry.example);
    assert_eq!(examples.len(), 14);
    for text in examples.chain(EXTREME) {
        let shape = Shape::parse(text).unwrap();
        for elements in SIZES {
            let mesh = facets(&shape, elements);
            for format in SurfaceFormat::ALL {
                let back = through(&mesh, format);
                let seen = examine(&back);
                let what = format!("{text}, {elements}, {format}");
                assert!(seen.is_closed() && seen.orientation == Orientation::Outward, "{what}");
                assert!(seen.intersections.pairs.is_empty() && seen.intersections.complete, "{what}");
                assert!(usable(&back, &seen).is_ok(), "{what}: {:?}", usable(&back, &seen));
                assert_eq!((seen.facets, seen.vertices), (mesh.facets().len(), mesh.vertices().len()), "{what}");
                let pieces = if text.starts_with("doublet") { 2 } else { 1 };
                assert_eq!(seen.shells.len(), pieces, "{what}");
                assert_eq!(seen.genus, Some(usize::from(text.starts_with("ring"))), "{what}");
            }
        }
    }
}

#[test]
fn facets_are_no_needles_and_enclose_the_shape() {
    for entry in CATALOGUE {
        let shape = Shape::parse(entry.example).unwrap();
        let seen = examine(&facets(&shape, 5000));
        assert!(seen.slivers.is_empty(), "{}", entry.example);
        // Polygons inside circles lose (2 pi / n)^2 / 6 of the area. The helix has the fewest sides around, 20: 1.6 %, and
        // something along its bend.
        let exact = shape.exact_measure().volume * 1e18;
        let lost = 1.0 - seen.volume / exact;
        assert!((-1e-6..0.025).contains(&lost), "{}: {lost}", entry.example);
    }
}

#[test]
fn grids_for_the_solver_stay_graded() {
    // What is written has even grids; what is solved must not, or the drag of sharp bodies would converge slowly.
    let blueprint = Shape::parse("cube:5um").unwrap().blueprint();
    let shortest = |even: bool| {
        let blueprint = if even { blueprint.ungraded() } else { blueprint.clone() };
        let panels = blueprint.subdivide(4, Geometry::Flat);
        examine(&TriangleMesh::of_panels(&panels, 1e6)).edge_lengths.0
    };
    assert!(shortest(true) > 5.0 * shortest(false));
}
