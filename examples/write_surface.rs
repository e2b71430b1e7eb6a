//! Writes a named shape as a surface file of flat triangles, or one of the polyhedra below.
//!
//! ```text
//! cargo run --release --example write_surface -- sphere:10um 320 bead.stl
//! cargo run --release --example write_surface -- bracket 20 bracket.stl
//! ```
//!
//! The first argument is a shape in any length unit the program knows, or `block`, `bracket` or `pin`; the file is in
//! micrometres, and doesn't say so, since surface files carry no unit. The second is about how many facets.

use std::error::Error;
use std::path::Path;

use slowmote::surface::shapes::Shape;
use slowmote::surface::{Geometry, Point, TriangleMesh, write_surface};

fn main() -> Result<(), Box<dyn Error>> {
    let arguments = std::env::args().skip(1).collect::<Vec<_>>();
    let [shape, triangles, path] = arguments.as_slice() else {
        return Err("usage: write_surface SHAPE TRIANGLES FILE".into());
    };
    write_surface(&mesh(shape, triangles.parse()?)?, Path::new(path))?;
    Ok(())
}

/// The mesh, in micrometres.
fn mesh(shape: &str, triangles: usize) -> Result<TriangleMesh, Box<dyn Error>> {
    match shape {
        "block" => extruded(&[[0.0, 0.0], [12.0, 0.0], [12.0, 8.0], [0.0, 8.0]], 5.0),
        "bracket" => extruded(&[[0.0, 0.0], [20.0, 0.0], [20.0, 6.0], [6.0, 6.0], [6.0, 16.0], [0.0, 16.0]], 8.0),
        "pin" => extruded(&polygon(triangles / 4 + 1, 2.0), 12.0),
        name => facets_of(name, triangles),
    }
}

fn facets_of(name: &str, triangles: usize) -> Result<TriangleMesh, Box<dyn Error>> {
    const MICROMETRE: f64 = 1e-6;
    let blueprint = Shape::parse(name)?.blueprint().ungraded();
    let panels = blueprint.subdivide(blueprint.cuts_for(triangles), Geometry::Flat);
    Ok(TriangleMesh::of_panels(&panels, 1.0 / MICROMETRE))
}

/// The corners of a regular polygon, as a CAD program stands it in for a circle of that radius.
fn polygon(count: usize, radius: f64) -> Vec<[f64; 2]> {
    (0..count)
        .map(|k| {
            let (sine, cosine) = (std::f64::consts::TAU * k as f64 / count as f64).sin_cos();
            [radius * cosine, radius * sine]
        })
        .collect()
}

/// A polygon in the x-y plane, corners counter-clockwise and all of them seen from corner 0, drawn out along z.
fn extruded(outline: &[[f64; 2]], height: f64) -> Result<TriangleMesh, Box<dyn Error>> {
    let count = outline.len();
    let at = |z: f64| outline.iter().map(move |[x, y]| Point::new(*x, *y, z));
    let vertices = at(0.0).chain(at(height)).collect();
    let mut facets = Vec::new();
    for k in 1..count - 1 {
        facets.push([0, k + 1, k]);
        facets.push([count, count + k, count + k + 1]);
    }
    for k in 0..count {
        let next = (k + 1) % count;
        facets.push([k, next, count + next]);
        facets.push([k, count + next, count + k]);
    }
    Ok(TriangleMesh::new(vertices, facets)?)
}
