//! The Stokeslet in unbounded fluid.

use crate::surface::Point;

/// `G(r) = I/|r| + r r^T/|r|^3` as its six different entries: xx, xy, xz, yy, yz, zz.
///
/// The velocity at `x` of a point force `F` at `y` in a fluid of viscosity 1 is `G(x - y) F / (8 pi)` (Stokes 1851;
/// Oseen 1927). `r` must not be zero.
#[inline(always)]
pub fn stokeslet(r: &Point) -> [f64; 6] {
    let inverse_square = 1.0 / r.norm_squared();
    let inverse = inverse_square.sqrt();
    let cube = inverse * inverse_square;
    [
        inverse + r.x * r.x * cube,
        r.x * r.y * cube,
        r.x * r.z * cube,
        inverse + r.y * r.y * cube,
        r.y * r.z * cube,
        inverse + r.z * r.z * cube,
    ]
}
