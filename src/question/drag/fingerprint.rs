//! A short name for a mesh: equal meshes have equal ones, others hardly ever.

use sha2::{Digest, Sha256};

use crate::question::record::hexadecimal;
use crate::surface::Panels;

/// Coordinates are told apart on this grid, in the solver's unit of length: far coarser than rounding.
const GRID: f64 = 1e-6;

/// Bytes of the digest that are kept.
const BYTES: usize = 8;

/// The fingerprint of panels in the solver's coordinates: their vertices' numbers and corners.
pub(super) fn fingerprint(panels: &Panels) -> String {
    let mut digest = Sha256::new();
    for panel in &panels.panels {
        for (vertex, corner) in panel.vertices.iter().zip(panel.patch.corners()) {
            digest.update((*vertex as u64).to_le_bytes());
            for x in corner.iter() {
                digest.update(((x / GRID).round() as i64).to_le_bytes());
            }
        }
    }
    hexadecimal(&digest.finalize()[..BYTES])
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::surface::shapes::Shape;
    use crate::surface::{Geometry, Placement, Point};

    #[test]
    fn another_mesh_has_another_name() {
        let cut = |shape: &str, cuts| Shape::parse(shape).unwrap().blueprint().subdivide(cuts, Geometry::Exact);
        let (one, same) = (fingerprint(&cut("cube:1m", 2)), fingerprint(&cut("cube:1m", 2)));
        assert_eq!(one, same);
        assert_eq!(one.len(), 2 * BYTES);
        assert_ne!(one, fingerprint(&cut("cube:1m", 4)));
        let nudge = Placement { shift: Point::x() * 1e-3, ..Placement::identity() };
        let nudged = Shape::parse("cube:1m").unwrap().blueprint().placed(&nudge).subdivide(2, Geometry::Exact);
        assert_ne!(one, fingerprint(&nudged));
    }
}
