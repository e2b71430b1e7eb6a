//! Where the bodies stand: from their own coordinates to the laboratory's, and to those of the solver.

use super::DragError;
use crate::question::body::{Body, Extent};
use crate::question::placing::Placing;
use crate::stokes::solve::Part;
use crate::surface::{Blueprint, Geometry, Panels, Placement, Point, TriangleMesh, examine};

/// Panels of each body on which overlaps are looked for.
const LOOKING_PANELS: usize = 1500;

/// A body and how it stands.
#[derive(Debug, Clone)]
pub struct StandingBody {
    /// The body.
    pub body: Body,
    /// Its turns, and the place of its centroid.
    pub placing: Placing,
}

impl StandingBody {
    /// Pieces of one file, turned and moved together: turns are about the centroid of all, which `placing` moves.
    pub fn together(pieces: Vec<Body>, placing: &Placing) -> Vec<Self> {
        let measures = pieces.iter().map(|piece| piece.extent().measure).collect::<Vec<_>>();
        let volume = measures.iter().map(|measure| measure.volume).sum::<f64>();
        let middle = measures.iter().map(|measure| measure.centroid * (measure.volume / volume)).sum::<Point>();
        let (turn, place) = (placing.turn(), placing.at.unwrap_or(middle));
        let standing = pieces.into_iter().zip(measures).map(|(body, measure)| {
            let at = place + turn * (measure.centroid - middle);
            // A body that is not moved keeps its coordinates to the last digit.
            let still = placing.turns.is_empty() && placing.at.is_none();
            let at = if still { None } else { Some(at) };
            Self { body, placing: Placing { turns: placing.turns.clone(), at } }
        });
        standing.collect()
    }
}

/// All bodies where they stand.
pub(super) struct Scene<'a> {
    /// The bodies.
    pub bodies: Vec<Standing<'a>>,
    /// Half the longest edge of the box around them, m: the solver's unit of length.
    pub length: f64,
    /// The solver's origin, m: the centroid of one body, the middle of the box around several.
    pub origin: Point,
}

/// One body where it stands.
pub(super) struct Standing<'a> {
    /// The body.
    pub body: &'a Body,
    /// Its size in its own coordinates, m.
    given: Extent,
    /// From its own coordinates to the laboratory's.
    stand: Placement,
    /// Its size in the laboratory, m.
    pub extent: Extent,
}

impl<'a> Scene<'a> {
    /// The scene of these bodies.
    ///
    /// # Errors
    /// No body, or one that encloses nothing.
    pub fn new(bodies: &'a [StandingBody]) -> Result<Self, DragError> {
        let standing = bodies.iter().map(Standing::new).collect::<Result<Vec<_>, _>>()?;
        let boxes = standing.iter().map(|standing| standing.extent.bounds());
        let (low, high) = boxes.reduce(|(a, b), (c, d)| (a.inf(&c), b.sup(&d))).ok_or(DragError::NoBody)?;
        let origin = match standing.as_slice() {
            [one] => one.centroid(),
            _ => 0.5 * (low + high),
        };
        Ok(Self { bodies: standing, length: 0.5 * (high - low).max(), origin })
    }

    /// What they are called, in one line.
    pub fn name(&self) -> String {
        self.bodies.iter().map(|standing| standing.body.name.as_str()).collect::<Vec<_>>().join(" and ")
    }

    /// The surfaces in the solver's coordinates, each body `growth` times as large about its own centroid.
    pub fn blueprints(&self, growth: &[f64]) -> Vec<Blueprint> {
        let reduced = self.bodies.iter().zip(growth).map(|(standing, growth)| {
            let (turn, scale) = (standing.stand.turn, growth / self.length);
            // Straight from the body's own coordinates: by way of a far place digits would be lost.
            let offset = (standing.centroid() - self.origin) / self.length;
            let shift = offset - turn * standing.given.measure.centroid * scale;
            standing.body.blueprint.placed(&Placement { scale, turn, shift })
        });
        reduced.collect()
    }

    /// What the solver asks of each body, with torques about these points, m.
    pub fn parts<'b>(&self, blueprints: &'b [Blueprint], references: &[Point]) -> Vec<Part<'b>> {
        let parts = self.bodies.iter().zip(blueprints).zip(references);
        parts
            .map(|((standing, blueprint), reference)| Part {
                blueprint,
                geometry: standing.body.geometry,
                reference: (reference - self.origin) / self.length,
            })
            .collect()
    }

    /// Two bodies that overlap, touch, or lie inside each other, each grown about its centroid, and where.
    pub fn overlap(&self, growth: &[f64]) -> Option<(usize, usize, Option<Point>)> {
        if self.bodies.len() < 2 {
            return None;
        }
        let mut body_of_facet = Vec::new();
        let mut pieces = Vec::new();
        for (body, blueprint) in self.blueprints(growth).iter().enumerate() {
            let panels = blueprint.subdivide(blueprint.cuts_for(LOOKING_PANELS), Geometry::Flat);
            body_of_facet.extend(std::iter::repeat_n(body, panels.panels.len()));
            pieces.push(panels);
        }
        let seen = examine(&TriangleMesh::of_panels(&Panels::joined(pieces), 1.0));
        let crossing = seen.intersections.pairs.iter().find_map(|pair| {
            let [a, b] = pair.facets.map(|facet| body_of_facet[facet]);
            (a != b).then(|| (a.min(b), a.max(b), Some(self.origin + pair.place * self.length)))
        });
        let nested = || {
            seen.shells.iter().find_map(|shell| {
                let [a, b] = [shell.first_facet, seen.shells[shell.inside?].first_facet].map(|f| body_of_facet[f]);
                (a != b).then(|| (a.min(b), a.max(b), None))
            })
        };
        crossing.or_else(nested)
    }
}

impl<'a> Standing<'a> {
    fn new(standing: &'a StandingBody) -> Result<Self, DragError> {
        let body = &standing.body;
        let given = body.extent();
        let (volume_m3, centroid) = (given.measure.volume, given.measure.centroid);
        let encloses = volume_m3 > 0.0 && centroid.iter().all(|x| x.is_finite());
        if !encloses {
            return Err(DragError::NoVolume { name: body.name.clone(), volume_m3 });
        }
        let turn = standing.placing.turn();
        let place = standing.placing.at.unwrap_or(centroid);
        let stand = Placement { scale: 1.0, turn, shift: place - turn * centroid };
        let mut extent = given.placed(&stand);
        extent.measure.centroid = place;
        Ok(Self { body, given, stand, extent })
    }

    /// Its volume centroid in the laboratory, m.
    pub fn centroid(&self) -> Point {
        self.extent.measure.centroid
    }
}
