//! The closed-form inner integral over a flat triangle with linear basis functions.
//!
//! ```text
//! T_ij[b] = int phi_b(y) (delta_ij/R + r_i r_j/R^3) dS(y),   r = y - x,  R = |r|
//! ```
//!
//! Let `h` be the height of `x` over the plane, `s` the in-plane vector from its foot to `y`, so `r = s - h n` and
//! `R^2 = s^2 + h^2`. Because `grad R = s/R` and `grad (1/R) = -s/R^3` in the plane, Gauss's theorem turns all moments of
//! `1/R` and `1/R^3` into line integrals over the edges, but for the solid angle `Omega`. On an edge with outward normal
//! `m`, direction `t`, distance `d = s . m` and arc length `l` from the foot's projection:
//!
//! | symbol | integral | closed form |
//! |---|---|---|
//! | `L` | `int dl/R` | `ln((R+ + l+)/(R- + l-))` |
//! | `E1` | `int l dl/R` | `R+ - R-` |
//! | `E2` | `int l^2 dl/R` | `(l+ R+ - l- R- - (d^2 + h^2) L)/2` |
//! | `ER` | `int R dl` | `(l+ R+ - l- R- + (d^2 + h^2) L)/2` |
//!
//! | moment over the triangle | value |
//! |---|---|
//! | `A = int 1/R` | `sum d L - |h| Omega` |
//! | `A_k = int s_k/R` | `sum m_k ER` |
//! | `h^2 int 1/R^3` | `|h| Omega` |
//! | `B_k = int s_k/R^3` | `-sum m_k L` |
//! | `C_ij = int s_i s_j/R^3` | `delta_ij A - sum m_i (d m_j L + t_j E1)` |
//! | `D_ijk = int s_i s_j s_k/R^3` | `delta_ij A_k + delta_ik A_j - sum m_i (d^2 m_j m_k L + d (m_j t_k + t_j m_k) E1 + t_j t_k E2)` |
//!
//! The solid angle is that of Van Oosterom & Strackee (1983), IEEE Trans. Biomed. Eng. 30, 125.

use nalgebra::Vector2;

use crate::surface::Point;

type Plane = Vector2<f64>;

/// A flat triangle, ready for many points.
#[derive(Debug, Clone)]
pub struct FlatTriangle {
    corners: [Point; 3],
    /// In-plane axes and the normal.
    axes: [Point; 3],
    /// Corners in the plane, from corner 0.
    flat: [Plane; 3],
    /// For each edge `k` to `k + 1`: outward normal and direction.
    edges: [(Plane, Plane); 3],
    /// In-plane gradients of the basis functions.
    gradients: [Plane; 3],
}

impl FlatTriangle {
    /// A triangle of non-zero area.
    pub fn new(corners: &[Point; 3]) -> Self {
        let [a, b, c] = corners;
        let first = (b - a).normalize();
        let area_normal = (b - a).cross(&(c - a));
        let double_area = area_normal.norm();
        let normal = area_normal / double_area;
        let second = normal.cross(&first);
        let flat = corners.map(|x| Plane::new((x - a).dot(&first), (x - a).dot(&second)));
        let edges = [0, 1, 2].map(|k| {
            let along = (flat[(k + 1) % 3] - flat[k]).normalize();
            (Plane::new(along.y, -along.x), along)
        });
        let gradients = [0, 1, 2].map(|k| {
            let opposite = flat[(k + 2) % 3] - flat[(k + 1) % 3];
            Plane::new(-opposite.y, opposite.x) / double_area
        });
        Self { corners: *corners, axes: [first, second, normal], flat, edges, gradients }
    }

    /// The integrals for the point `x`, which may lie anywhere, on the triangle too.
    pub fn integrals(&self, x: &Point) -> [[f64; 6]; 3] {
        let from_corner = x - self.corners[0];
        let height = from_corner.dot(&self.axes[2]);
        let foot = Plane::new(from_corner.dot(&self.axes[0]), from_corner.dot(&self.axes[1]));
        let to_corners = self.flat.map(|corner| corner - foot);
        let distances = to_corners.map(|s| (s.norm_squared() + height * height).sqrt());
        let mut a = 0.0;
        let mut a1 = Plane::zeros();
        let mut b1 = Plane::zeros();
        // C as xx, xy, yy; D as xxx, xxy, xyy, yyy: both are symmetric.
        let mut c = [0.0; 3];
        let mut d3 = [0.0; 4];
        for (k, (m, t)) in self.edges.iter().enumerate() {
            let (from, to) = (to_corners[k], to_corners[(k + 1) % 3]);
            let (r_from, r_to) = (distances[k], distances[(k + 1) % 3]);
            let (l_from, l_to, d) = (from.dot(t), to.dot(t), from.dot(m));
            let square = d * d + height * height;
            let log = log_ratio(l_from, l_to, r_from, r_to, square);
            let e1 = r_to - r_from;
            let ends = l_to * r_to - l_from * r_from;
            let e2 = 0.5 * (ends - square * log);
            let er = 0.5 * (ends + square * log);
            a += d * log;
            a1 += m * er;
            b1 -= m * log;
            let row = m * (d * log) + t * e1;
            c[0] -= m.x * row.x;
            c[1] -= m.x * row.y;
            c[2] -= m.y * row.y;
            let square_log = d * d * log;
            let mixed = d * e1;
            let xx = square_log * m.x * m.x + 2.0 * mixed * m.x * t.x + e2 * t.x * t.x;
            let xy = square_log * m.x * m.y + mixed * (m.x * t.y + t.x * m.y) + e2 * t.x * t.y;
            let yy = square_log * m.y * m.y + 2.0 * mixed * m.y * t.y + e2 * t.y * t.y;
            d3[0] -= m.x * xx;
            d3[1] -= m.x * xy;
            d3[2] -= m.x * yy;
            d3[3] -= m.y * yy;
        }
        let angle_term = height.abs() * self.solid_angle(x, &distances);
        a -= angle_term;
        c[0] += a;
        c[2] += a;
        d3[0] += 2.0 * a1.x;
        d3[1] += a1.y;
        d3[3] += 2.0 * a1.y;
        let global = |local: [f64; 6]| self.to_space(local);
        // Kernel entries xx, xy, xn, yy, yn, nn in the triangle's frame, for the weight 1 and for the weights s_x, s_y.
        let plain = [a + c[0], c[1], -height * b1.x, a + c[2], -height * b1.y, a + angle_term];
        let squared = height * height;
        let along_x = [a1.x + d3[0], d3[1], -height * c[0], a1.x + d3[2], -height * c[1], a1.x + squared * b1.x];
        let along_y = [a1.y + d3[1], d3[2], -height * c[1], a1.y + d3[3], -height * c[2], a1.y + squared * b1.y];
        [0, 1, 2].map(|k| {
            let gradient = self.gradients[k];
            let at_foot = gradient.dot(&(foot - self.flat[(k + 1) % 3]));
            global(std::array::from_fn(|entry| {
                at_foot * plain[entry] + gradient.x * along_x[entry] + gradient.y * along_y[entry]
            }))
        })
    }

    fn solid_angle(&self, x: &Point, distances: &[f64; 3]) -> f64 {
        let [p, q, r] = self.corners.map(|corner| corner - x);
        let [dp, dq, dr] = *distances;
        let volume = p.dot(&q.cross(&r)).abs();
        let denominator = dp * dq * dr + p.dot(&q) * dr + q.dot(&r) * dp + r.dot(&p) * dq;
        2.0 * volume.atan2(denominator)
    }

    /// A symmetric tensor from the triangle's frame to space.
    fn to_space(&self, [xx, xy, xn, yy, yn, nn]: [f64; 6]) -> [f64; 6] {
        let [e, f, n] = &self.axes;
        let column_e = e * xx + f * xy + n * xn;
        let column_f = e * xy + f * yy + n * yn;
        let column_n = e * xn + f * yn + n * nn;
        let entry = |i: usize, j: usize| column_e[i] * e[j] + column_f[i] * f[j] + column_n[i] * n[j];
        [entry(0, 0), entry(0, 1), entry(0, 2), entry(1, 1), entry(1, 2), entry(2, 2)]
    }
}

/// `ln((R+ + l+)/(R- + l-))`, by the form that does not cancel; zero where the point lies on the edge itself, since there
/// every factor of `L` vanishes faster.
fn log_ratio(l_from: f64, l_to: f64, r_from: f64, r_to: f64, square: f64) -> f64 {
    let length = l_to - l_from;
    if l_from >= 0.0 {
        let below = r_from + l_from;
        if below > 0.0 { ((r_to + l_to) / below).ln() } else { 0.0 }
    } else if l_to <= 0.0 {
        let below = r_to - l_to;
        if below > 0.0 { ((r_from - l_from) / below).ln() } else { 0.0 }
    } else if square > 1e-28 * length * length {
        ((r_to + l_to) * (r_from - l_from) / square).ln()
    } else {
        0.0
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::stokes::green::stokeslet;
    use crate::surface::triangle_rule;

    /// Brute force: the triangle cut into `4^depth`, twice the midpoint of each cut in a different way (degree 8).
    fn by_quadrature(corners: &[Point; 3], x: &Point, depth: usize) -> [[f64; 6]; 3] {
        let mut sum = [[0.0; 6]; 3];
        let n = 1 << depth;
        let (u_axis, v_axis) = (corners[1] - corners[0], corners[2] - corners[0]);
        let area = u_axis.cross(&v_axis).norm();
        for i in 0..n {
            for j in 0..n - i {
                for turned in [false, true] {
                    if turned && i + j + 1 >= n {
                        continue;
                    }
                    for point in triangle_rule::degree_8() {
                        let (p, q) = if turned { (1.0 - point.u, 1.0 - point.v) } else { (point.u, point.v) };
                        let (u, v) = ((i as f64 + p) / n as f64, (j as f64 + q) / n as f64);
                        let y = corners[0] + u_axis * u + v_axis * v;
                        let weight = point.weight * area / (n * n) as f64;
                        for (row, value) in sum.iter_mut().zip([1.0 - u - v, u, v]) {
                            for (entry, g) in row.iter_mut().zip(stokeslet(&(x - y))) {
                                *entry += weight * value * g;
                            }
                        }
                    }
                }
            }
        }
        sum
    }

    #[test]
    fn closed_form_agrees_with_quadrature_off_the_triangle() {
        let corners = [Point::new(0.3, -0.2, 0.1), Point::new(1.4, 0.3, 0.5), Point::new(0.2, 1.1, -0.3)];
        let triangle = FlatTriangle::new(&corners);
        let normal = (corners[1] - corners[0]).cross(&(corners[2] - corners[0])).normalize();
        let inside = (corners[0] + corners[1] + corners[2]) / 3.0;
        let beside = 2.0 * corners[1] - corners[0];
        for x in [inside + 0.4 * normal, inside - 0.4 * normal, beside, corners[2] + 0.5 * normal, beside - normal] {
            let exact = by_quadrature(&corners, &x, 6);
            for (row, expected) in triangle.integrals(&x).iter().zip(exact) {
                for (entry, expected) in row.iter().zip(expected) {
                    // Degree 8 on pieces of 1/64 at distance 0.4 leaves rounding alone.
                    assert!((entry - expected).abs() < 1e-12, "{entry} {expected}");
                }
            }
        }
    }

    #[test]
    fn closed_form_is_continuous_onto_the_triangle_its_edges_and_corners() {
        let corners = [Point::zeros(), Point::new(1.0, 0.0, 0.0), Point::new(0.2, 0.7, 0.0)];
        let triangle = FlatTriangle::new(&corners);
        let places = [
            (corners[0] + corners[1] + corners[2]) / 3.0,
            0.5 * (corners[0] + corners[1]),
            corners[2],
            1.5 * corners[1],
            0.3 * corners[1] + 0.7 * corners[2],
        ];
        for x in places {
            let on = triangle.integrals(&x);
            let off = triangle.integrals(&(x + Point::new(2e-9, -3e-9, 1e-9)));
            for (a, b) in on.iter().flatten().zip(off.iter().flatten()) {
                // The potential varies like d ln d: a step of 4e-9 changes it by about 1e-7.
                assert!((a - b).abs() < 3e-7, "at {x:?}: {a} {b}");
            }
        }
    }
}
