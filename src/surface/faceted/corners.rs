//! Where the creases of a body begin, end and turn.

use crate::surface::Point;

/// A crease that turns by more than this in one vertex has a corner there. A rim of twelve edges turns by 30 degrees at
/// each and is a circle; the corners of a hexagon, 60 degrees, are true ones.
pub(super) const CORNER_TURN_DEG: f64 = 40.0;

/// What a vertex is to the creases of a body.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum CreaseRole {
    /// No crease touches it.
    Off,
    /// One crease passes through it.
    Along,
    /// A crease ends here or turns sharply, or three or more meet.
    Corner,
}

/// The role of a vertex at `place` from the other ends of the creases at it.
pub(super) fn crease_role(place: &Point, other_ends: &[Point]) -> CreaseRole {
    match other_ends {
        [] => CreaseRole::Off,
        [before, after] => {
            let (a, b) = (place - before, after - place);
            let turn = a.cross(&b).norm().atan2(a.dot(&b));
            if turn > CORNER_TURN_DEG.to_radians() { CreaseRole::Corner } else { CreaseRole::Along }
        }
        _ => CreaseRole::Corner,
    }
}
