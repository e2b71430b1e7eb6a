//! Draws the panels that the solver works on, in parallel projection, as an SVG.
//!
//! ```text
//! cargo run --release --example draw_panels -- figures/panels.svg
//! ```

use std::error::Error;
use std::fmt::Write as _;
use std::path::PathBuf;

use nalgebra::Rotation3;
use slowmote::surface::shapes::Shape;
use slowmote::surface::{Geometry, Patch, Point};

/// Width of the figure: two columns of a page.
const WIDTH_MM: f64 = 170.0;

/// Side of the square that each body is drawn in.
const CELL_MM: f64 = 40.0;

/// Bodies: name, cuts of each macro edge, caption.
const BODIES: [(&str, usize, &str); 4] = [
    ("cube:5um", 4, "cube"),
    ("redcell:7.82um", 3, "red cell"),
    ("cylinder:6x4um", 3, "cylinder"),
    ("helix:turns=2,pitch=2um,diameter=1.4um,thickness=0.4um", 2, "helix"),
];

fn main() -> Result<(), Box<dyn Error>> {
    let path = std::env::args().nth(1).map(PathBuf::from).ok_or("usage: draw_panels FILE")?;
    std::fs::write(path, figure()?)?;
    Ok(())
}

fn figure() -> Result<String, Box<dyn Error>> {
    let height = CELL_MM + 9.0;
    let mut svg = format!(
        "<svg xmlns=\"http://www.w3.org/2000/svg\" width=\"{WIDTH_MM}mm\" height=\"{height}mm\" viewBox=\"0 0 {WIDTH_MM} {height}\">\n\
         <title>Panels of four bodies</title>\n<rect width=\"100%\" height=\"100%\" fill=\"#ffffff\"/>\n\
         <g stroke=\"#1d3038\" stroke-width=\"0.09\" stroke-linejoin=\"round\">\n"
    );
    let step = (WIDTH_MM - CELL_MM) / (BODIES.len() - 1) as f64;
    for (k, (name, cuts, _)) in BODIES.iter().enumerate() {
        draw(&mut svg, name, *cuts, [step * k as f64 + 0.5 * CELL_MM, 0.5 * CELL_MM + 1.0])?;
    }
    svg.push_str("</g>\n<g font-family=\"sans-serif\" font-size=\"3.1\" text-anchor=\"middle\" fill=\"#1d3038\">\n");
    for (k, (_, _, caption)) in BODIES.iter().enumerate() {
        writeln!(svg, "<text x=\"{:.2}\" y=\"{:.2}\">{caption}</text>", step * k as f64 + 0.5 * CELL_MM, height - 2.5)?;
    }
    svg.push_str("</g>\n</svg>\n");
    Ok(svg)
}

/// One body, farthest panels first: on bodies as smooth as these the order of the centres hides what is behind.
fn draw(svg: &mut String, name: &str, cuts: usize, middle: [f64; 2]) -> Result<(), Box<dyn Error>> {
    let panels = Shape::parse(name)?.blueprint().subdivide(cuts, Geometry::Exact);
    let (low, high) = panels.bounding_box();
    let scale = 0.56 * CELL_MM / (0.5 * (high - low).norm()).max(f64::MIN_POSITIVE) * 0.9;
    // The view is along -z of the turned body.
    let turn = Rotation3::from_axis_angle(&Point::x_axis(), -1.0) * Rotation3::from_axis_angle(&Point::z_axis(), -0.6);
    let light = Point::new(-0.35, 0.55, 0.76).normalize();
    let mut drawn = panels
        .panels
        .iter()
        .filter_map(|panel| {
            let at = panel.patch.at(1.0 / 3.0, 1.0 / 3.0);
            let normal = turn * at.area_normal().normalize();
            (normal.z > 0.0).then(|| ((turn * at.position).z, 0.5 + 0.5 * normal.dot(&light), &panel.patch))
        })
        .collect::<Vec<_>>();
    drawn.sort_by(|a, b| a.0.total_cmp(&b.0));
    for (_, shade, patch) in drawn {
        let outline = outline(patch).iter().fold(String::new(), |mut text, x| {
            let x = turn * x * scale;
            let separator = if text.is_empty() { "" } else { " " };
            let _ = write!(text, "{separator}{:.2},{:.2}", middle[0] + x.x, middle[1] - x.y);
            text
        });
        // From deep teal to pale sand.
        let mix = |dark: f64, pale: f64| (dark + shade * (pale - dark)).round() as u8;
        let colour = format!("#{:02x}{:02x}{:02x}", mix(38.0, 244.0), mix(92.0, 236.0), mix(104.0, 214.0));
        writeln!(svg, "<polygon points=\"{outline}\" fill=\"{colour}\"/>")?;
    }
    Ok(())
}

/// The edges of a patch, curved ones by four chords each.
fn outline(patch: &Patch) -> Vec<Point> {
    let corners = [[0.0, 0.0], [1.0, 0.0], [0.0, 1.0], [0.0, 0.0]];
    let parts = if patch.as_flat().is_some() { 1 } else { 4 };
    corners
        .windows(2)
        .flat_map(|ends| {
            (0..parts).map(move |step| {
                let share = f64::from(step) / f64::from(parts);
                [0, 1].map(|k| ends[0][k] + share * (ends[1][k] - ends[0][k]))
            })
        })
        .map(|[u, v]| patch.at(u, v).position)
        .collect()
}
