//! Meshes of known bodies for the tests of surface files, examination and faceted bodies.
// Each test file uses a part of these.
#![allow(dead_code)]

use std::collections::HashMap;
use std::f64::consts::{PI, TAU};

use slowmote::surface::{Point, TriangleMesh};

pub fn mesh(vertices: Vec<Point>, facets: Vec<[usize; 3]>) -> TriangleMesh {
    TriangleMesh::new(vertices, facets).expect("a valid mesh")
}

/// A box with one corner at the origin, each side two facets.
pub fn cuboid([x, y, z]: [f64; 3]) -> TriangleMesh {
    let vertices =
        (0..8).map(|k| Point::new(x * (k & 1) as f64, y * (k >> 1 & 1) as f64, z * (k >> 2) as f64)).collect();
    let quads = [[0, 2, 3, 1], [4, 5, 7, 6], [0, 1, 5, 4], [2, 6, 7, 3], [0, 4, 6, 2], [1, 3, 7, 5]];
    mesh(vertices, quads.iter().flat_map(|[a, b, c, d]| [[*a, *b, *c], [*a, *c, *d]]).collect())
}

/// A box with each side cut into a grid of `n` by `n` squares.
pub fn gridded_cuboid(sides: [f64; 3], n: usize) -> TriangleMesh {
    let mut numbers = HashMap::new();
    let mut vertices = Vec::new();
    let mut facets = Vec::new();
    for axis in 0..3 {
        for end in [0, n] {
            for i in 0..n {
                for j in 0..n {
                    let mut corner = |di: usize, dj: usize| {
                        let mut index = [end; 3];
                        index[(axis + 1) % 3] = i + di;
                        index[(axis + 2) % 3] = j + dj;
                        *numbers.entry(index).or_insert_with(|| {
                            let x = |k: usize| sides[k] * index[k] as f64 / n as f64;
                            vertices.push(Point::new(x(0), x(1), x(2)));
                            vertices.len() - 1
                        })
                    };
                    let [a, b, c, d] = [corner(0, 0), corner(1, 0), corner(1, 1), corner(0, 1)];
                    let pair = if end == 0 { [[a, c, b], [a, d, c]] } else { [[a, b, c], [a, c, d]] };
                    facets.extend(pair);
                }
            }
        }
    }
    mesh(vertices, facets)
}

pub fn tetrahedron() -> TriangleMesh {
    let vertices = [[1.0, 1.0, 1.0], [1.0, -1.0, -1.0], [-1.0, 1.0, -1.0], [-1.0, -1.0, 1.0]].map(Point::from).to_vec();
    mesh(vertices, vec![[1, 3, 2], [0, 2, 3], [0, 3, 1], [0, 1, 2]])
}

pub fn icosahedron() -> TriangleMesh {
    let g = (1.0 + 5.0_f64.sqrt()) / 2.0;
    let mut vertices = Vec::new();
    for s in [-1.0, 1.0] {
        for t in [-g, g] {
            vertices.extend([[0.0, s, t], [s, t, 0.0], [t, 0.0, s]].map(|x| Point::from(x).normalize()));
        }
    }
    let near = |a: usize, b: usize| (vertices[a] - vertices[b]).norm() < 1.1;
    let mut facets = Vec::new();
    for a in 0..12 {
        for b in a + 1..12 {
            for c in b + 1..12 {
                if near(a, b) && near(b, c) && near(c, a) {
                    let outward = vertices[a].dot(&vertices[b].cross(&vertices[c])) > 0.0;
                    facets.push(if outward { [a, b, c] } else { [a, c, b] });
                }
            }
        }
    }
    mesh(vertices, facets)
}

/// Unit sphere: an icosahedron with each facet cut into four, `levels` times; 20 * 4^levels facets.
pub fn icosphere(levels: usize) -> TriangleMesh {
    let mut sphere = icosahedron();
    for _ in 0..levels {
        let mut vertices = sphere.vertices().to_vec();
        let mut middles = HashMap::new();
        let mut facets = Vec::new();
        for [a, b, c] in sphere.facets() {
            let mut middle = |i: usize, j: usize| {
                *middles.entry((i.min(j), i.max(j))).or_insert_with(|| {
                    vertices.push((vertices[i] + vertices[j]).normalize());
                    vertices.len() - 1
                })
            };
            let [ab, bc, ca] = [middle(*a, *b), middle(*b, *c), middle(*c, *a)];
            facets.extend([[*a, ab, ca], [*b, bc, ab], [*c, ca, bc], [ab, bc, ca]]);
        }
        sphere = mesh(vertices, facets);
    }
    sphere
}

pub fn map(body: &TriangleMesh, f: impl Fn(&Point) -> Point) -> TriangleMesh {
    mesh(body.vertices().iter().map(f).collect(), body.facets().to_vec())
}

pub fn turned_inside_out(body: &TriangleMesh) -> TriangleMesh {
    mesh(body.vertices().to_vec(), body.facets().iter().map(|[a, b, c]| [*a, *c, *b]).collect())
}

/// All bodies in one mesh.
pub fn together(bodies: &[TriangleMesh]) -> TriangleMesh {
    let (mut vertices, mut facets) = (Vec::new(), Vec::new());
    for body in bodies {
        let offset = vertices.len();
        vertices.extend_from_slice(body.vertices());
        facets.extend(body.facets().iter().map(|corners| corners.map(|v| v + offset)));
    }
    mesh(vertices, facets)
}

pub fn moved(body: &TriangleMesh, shift: [f64; 3]) -> TriangleMesh {
    map(body, |x| x + Point::from(shift))
}

/// A ring around z; `n` facets pairs around the centre line, `m` around the tube.
pub fn torus(big: f64, small: f64, n: usize, m: usize) -> TriangleMesh {
    let place = |i: usize, j: usize| {
        let (u, v) = (TAU * i as f64 / n as f64, TAU * j as f64 / m as f64);
        let r = big + small * v.cos();
        Point::new(r * u.cos(), r * u.sin(), small * v.sin())
    };
    let vertices = (0..n * m).map(|k| place(k / m, k % m)).collect();
    let at = |i: usize, j: usize| (i % n) * m + j % m;
    let cells = (0..n * m).map(|k| (k / m, k % m));
    let facets = cells.flat_map(|(i, j)| {
        let [a, b, c, d] = [at(i, j), at(i + 1, j), at(i + 1, j + 1), at(i, j + 1)];
        [[a, b, c], [a, c, d]]
    });
    mesh(vertices, facets.collect())
}

/// A drawn cylinder along z with its foot at the origin: `n` sides, caps as fans of the rim, `rows` along its length.
pub fn cylinder(radius: f64, length: f64, n: usize, rows: usize) -> TriangleMesh {
    let mut vertices = Vec::new();
    for row in 0..=rows {
        for i in 0..n {
            let (sin, cos) = (TAU * i as f64 / n as f64).sin_cos();
            vertices.push(Point::new(radius * cos, radius * sin, length * row as f64 / rows as f64));
        }
    }
    let mut facets = Vec::new();
    for row in 0..rows {
        for i in 0..n {
            let (a, b) = (row * n + i, row * n + (i + 1) % n);
            facets.extend([[a, b, b + n], [a, b + n, a + n]]);
        }
    }
    let top = rows * n;
    for i in 1..n - 1 {
        facets.extend([[0, i + 1, i], [top, top + i, top + i + 1]]);
    }
    mesh(vertices, facets)
}

/// A sphere by longitude and latitude, unit radius.
pub fn globe(n: usize, m: usize) -> TriangleMesh {
    let mut vertices = vec![-Point::z()];
    for j in 1..m {
        for i in 0..n {
            let (u, v) = (TAU * i as f64 / n as f64, PI * j as f64 / m as f64);
            vertices.push(Point::new(v.sin() * u.cos(), v.sin() * u.sin(), -v.cos()));
        }
    }
    vertices.push(Point::z());
    let top = vertices.len() - 1;
    let at = |i: usize, j: usize| 1 + (j - 1) * n + i % n;
    let mut facets = Vec::new();
    for i in 0..n {
        facets.push([0, at(i + 1, 1), at(i, 1)]);
        facets.push([top, at(i, m - 1), at(i + 1, m - 1)]);
        for j in 1..m - 1 {
            let [a, b, c, d] = [at(i, j), at(i + 1, j), at(i + 1, j + 1), at(i, j + 1)];
            facets.extend([[a, b, c], [a, c, d]]);
        }
    }
    mesh(vertices, facets)
}

/// A prism over a plane polygon in x, y (counter-clockwise, cut into `triangles`), of height 1.
pub fn prism(outline: &[[f64; 2]], triangles: &[[usize; 3]]) -> TriangleMesh {
    let n = outline.len();
    let vertices = [0.0, 1.0].iter().flat_map(|z| outline.iter().map(|[x, y]| Point::new(*x, *y, *z))).collect();
    let mut facets = Vec::new();
    for [a, b, c] in triangles {
        facets.extend([[*a, *c, *b], [a + n, b + n, c + n]]);
    }
    for i in 0..n {
        let j = (i + 1) % n;
        facets.extend([[i, j, j + n], [i, j + n, i + n]]);
    }
    mesh(vertices, facets)
}

/// A cube of side 2 whose edges are rounded with the radius `r`, each rounding cut into `n`: a globe pulled apart.
pub fn rounded_cube(r: f64, n: usize) -> TriangleMesh {
    // The sphere's vertices by octants, each moved to its own corner of the inner cube.
    let side = 2 * n;
    let k = 1.0 - r;
    let grid = gridded_cuboid([2.0; 3], side + 1);
    // Grid lines 0..=n belong to the low corner, n+1..=2n+1 to the high one; equal angles along each arc.
    let step = 2.0 / (side + 1) as f64;
    let angle = |x: f64| {
        let index = (x / step).round() as usize;
        if index <= n {
            -(PI / 4.0) * (1.0 - index as f64 / n as f64)
        } else {
            (PI / 4.0) * ((index - n - 1) as f64 / n as f64)
        }
    };
    map(&grid, |x| {
        let index = [x.x, x.y, x.z].map(|c| (c / step).round() as usize);
        let centre = Point::from(index.map(|i| if i <= n { -k } else { k }));
        // The direction: tangents of the angles on the cube around the sphere.
        let direction = Point::new(angle(x.x).tan(), angle(x.y).tan(), angle(x.z).tan());
        centre + direction.normalize() * r
    })
}
