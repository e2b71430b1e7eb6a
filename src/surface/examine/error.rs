//! Why a surface can't be used. Numbers in fields count from 0; the texts count from 1.

use crate::surface::Point;

/// Why the solver refuses a surface: the first flaw of its kind, where it is, and how many there are.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[non_exhaustive]
pub enum SurfaceError {
    /// There are no facets.
    #[error("the surface has no facets")]
    Empty,
    /// The examination is of a mesh with another number of facets.
    #[error("the examination is of {examined} facets, but the mesh has {facets}")]
    OtherMesh {
        /// Facets examined.
        examined: usize,
        /// Facets of the mesh.
        facets: usize,
    },
    /// The surface is a point, or so large or small that its volume can't be computed.
    #[error("the surface measures {size:e} file units across")]
    AbsurdSize {
        /// Diagonal of the box around it, file units.
        size: f64,
    },
    /// Facets without area.
    #[error("facet {} at {} has no area{}", .facet + 1, At(.place), Such(*.count, "facets"))]
    DegenerateFacet {
        /// The first such facet.
        facet: usize,
        /// Its centre, in file units.
        place: Point,
        /// How many there are.
        count: usize,
    },
    /// Facets that are there twice.
    #[error("facets {} and {} at {} have the same corners{}", .facets[0] + 1, .facets[1] + 1, At(.place), Such(*.count, "pairs"))]
    DuplicateFacet {
        /// The first pair.
        facets: [usize; 2],
        /// Its centre, in file units.
        place: Point,
        /// How many there are.
        count: usize,
    },
    /// Edges with more than two facets.
    #[error("the edge at {} belongs to {facets} facets instead of two{}", At(.place), Such(*.count, "edges"))]
    NonManifoldEdge {
        /// The middle of the first such edge, in file units.
        place: Point,
        /// How many facets share it.
        facets: usize,
        /// How many such edges there are.
        count: usize,
    },
    /// The surface is open.
    #[error("the surface is open: a hole of {edges} edges, {} long around, near {}, beside facet {}{}", short(*.length), At(.place), .facet + 1, Such(*.count, "holes"))]
    Open {
        /// The centre of the longest hole, in file units.
        place: Point,
        /// Its number of edges.
        edges: usize,
        /// Its length around, in file units.
        length: f64,
        /// A facet beside it.
        facet: usize,
        /// How many holes there are.
        count: usize,
    },
    /// The surface has one side only.
    #[error("facets can't agree on an outside, as on a Moebius strip (the piece that begins with facet {})", .facet + 1)]
    OneSided {
        /// The first facet of the piece.
        facet: usize,
    },
    /// Facets face different ways.
    #[error("facet {} at {} faces inward while others face outward{}", .facet + 1, At(.place), Such(*.count, "facets"))]
    MixedOrientation {
        /// The first facet that faces inward.
        facet: usize,
        /// Its centre, in file units.
        place: Point,
        /// How many there are.
        count: usize,
    },
    /// All facets face inward.
    #[error("all facets face inward: the surface is inside out")]
    InsideOut,
    /// The enclosed volume is nothing compared with the area.
    #[error("the surface encloses no volume (volume {volume:e}, area {area:e}, file units)")]
    NoVolume {
        /// Volume, file units cubed.
        volume: f64,
        /// Area, file units squared.
        area: f64,
    },
    /// Two pieces of the same surface touch in a vertex.
    #[error("the surface touches itself in the vertex at {}{}", At(.place), Such(*.count, "vertices"))]
    PinchedVertex {
        /// The first such vertex, in file units.
        place: Point,
        /// How many there are.
        count: usize,
    },
    /// The surface passes through itself.
    #[error("facets {} and {} pass through each other or touch at {}{}", .facets[0] + 1, .facets[1] + 1, At(.place), Such(*.count, if *.complete { "pairs" } else { "pairs or more" }))]
    SelfIntersecting {
        /// The first pair.
        facets: [usize; 2],
        /// A place where they meet, in file units.
        place: Point,
        /// How many pairs were found.
        count: usize,
        /// `false` if the search stopped early.
        complete: bool,
    },
    /// One piece lies inside another.
    #[error("the piece that begins with facet {} lies inside the piece that begins with facet {}{}", .inner_facet + 1, .outer_facet + 1, Such(*.count, "pieces"))]
    Nested {
        /// First facet of the inner piece.
        inner_facet: usize,
        /// First facet of the outer piece.
        outer_facet: usize,
        /// How many inner pieces there are.
        count: usize,
    },
    /// Facets so thin that their normals are noise.
    #[error("facet {} at {} is {aspect:.0} times longer than high{}", .facet + 1, At(.place), Such(*.count, "facets"))]
    AbsurdSliver {
        /// The worst facet.
        facet: usize,
        /// Its centre, in file units.
        place: Point,
        /// Longest edge over height.
        aspect: f64,
        /// How many there are beyond the limit.
        count: usize,
    },
}

impl SurfaceError {
    /// What the user can do next, where mending was not tried.
    pub fn hint(&self) -> &'static str {
        match self {
            Self::OtherMesh { .. } => "examine the mesh again after changing it",
            Self::AbsurdSize { .. } => {
                "export the body in a unit in which it measures between a thousandth and a thousand"
            }
            Self::Empty => "export the boundary of the body as triangles",
            Self::DegenerateFacet { .. } | Self::DuplicateFacet { .. } => {
                "mending drops such facets; look at the result before using it"
            }
            Self::Open { .. } => "mending closes small holes; a large one needs the missing part, exported again",
            Self::MixedOrientation { .. } | Self::InsideOut => {
                "mending turns facets outward; check that the body, not its surroundings, is meant"
            }
            Self::Nested { .. } => {
                "the fluid does not reach inner pieces: mending drops them, or export the outer skin alone"
            }
            Self::NonManifoldEdge { .. } | Self::PinchedVertex { .. } => {
                "separate the parts that touch there, or unite them in the modelling program, and export again"
            }
            Self::OneSided { .. } | Self::NoVolume { .. } => "export a closed surface around the solid body",
            Self::SelfIntersecting { .. } => {
                "unite overlapping parts in the modelling program (a Boolean union), and export again"
            }
            Self::AbsurdSliver { .. } => "mesh the body again with a limit on the facets' aspect, and export again",
        }
    }

    /// What the user can do next where mending was tried, or can't help.
    pub fn hint_beyond_mending(&self) -> &'static str {
        match self {
            Self::DegenerateFacet { .. } | Self::DuplicateFacet { .. } => {
                "mesh the body again in the modelling program, and export again"
            }
            Self::Open { .. } => {
                "the hole can't be closed without guessing what belongs there: export the body with the missing part"
            }
            Self::MixedOrientation { .. } | Self::InsideOut => {
                "turn the facets outward in the modelling program, and export again"
            }
            Self::Nested { .. } => "the fluid does not reach inner pieces: export the outer skin alone",
            other => other.hint(),
        }
    }
}

/// The count of flaws of one kind, if there are more than the one that is named.
struct Such(usize, &'static str);

impl std::fmt::Display for Such {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        let Self(count, what) = self;
        if *count > 1 { write!(f, " ({count} such {what})") } else { Ok(()) }
    }
}

pub(super) struct At<'a>(pub &'a Point);

impl std::fmt::Display for At<'_> {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        write!(f, "({}, {}, {})", short(self.0.x), short(self.0.y), short(self.0.z))
    }
}

/// From here on a coordinate that finds a place needs more digits.
const LARGE_COORDINATE: f64 = 1000.0;

/// Six significant digits, or ten of a large number: enough to find the place, far from the origin too.
pub(super) fn short(number: f64) -> String {
    let rounded = if number.abs() < LARGE_COORDINATE { format!("{number:.5e}") } else { format!("{number:.9e}") };
    let rounded: f64 = rounded.parse().unwrap_or(number);
    // Adding zero turns -0.0 into 0.0.
    format!("{:?}", rounded + 0.0)
}
