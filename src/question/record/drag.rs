//! Two answers of `drag`: tensors against the errors that both state.
//!
//! Differences count as fractions of the quantity's size, which for a coupling is `sqrt(R_tt R_rr)`, as in the errors
//! themselves. Inputs are the same in both, so their uncertainty allows nothing; nor does the regime.

use super::Comparison;
use crate::question::answer::{BodyAnswer, DragAnswer, OneBody, RelativeErrorAnswer, Tensor};

/// What the verdict's own numbers may differ by besides the drag's error, since they are quotients of it.
const QUOTIENT: f64 = 2.0;

/// Compares all that was asked for.
pub(super) fn compare_drag(found: &mut Comparison, then: &DragAnswer, now: &DragAnswer) {
    found.words("schema", &then.schema, &now.schema);
    let fluids = [&then.fluid, &now.fluid];
    found.words("fluid.name", &fluids[0].name, &fluids[1].name);
    for (key, [a, b]) in [
        ("fluid.temperature_c", fluids.map(|fluid| fluid.temperature_c)),
        ("fluid.viscosity_pa_s", fluids.map(|fluid| fluid.viscosity_pa_s)),
        ("fluid.density_kg_m3", fluids.map(|fluid| fluid.density_kg_m3)),
        ("fluid.relative_uncertainty", fluids.map(|fluid| fluid.relative_uncertainty)),
    ] {
        found.numbers(key, &[a], &[b], a.abs(), 0.0);
    }
    let bodies = |answer: &DragAnswer| match (&answer.body, &answer.bodies) {
        (Some(one), _) => vec![one.clone()],
        (None, several) => several.clone().unwrap_or_default(),
    };
    let (before, after) = (bodies(then), bodies(now));
    found.words("bodies", &before.len(), &after.len());
    for (a, b) in before.iter().zip(&after) {
        compare_body(found, a, b);
    }
    let allowed = Allowed::of(&then.relative_error, &now.relative_error);
    match (then.one(), now.one()) {
        (Some(a), Some(b)) => compare_one(found, &a, &b, &allowed),
        (None, None) => compare_several(found, then, now, &allowed),
        _ => {}
    }
    compare_motion(found, then, now, &allowed);
    let (a, b) = (&then.validity, &now.validity);
    found.words("validity.verdict", &a.verdict, &b.verdict);
    found.words("validity.decided_by", &a.decided_by, &b.decided_by);
    for (key, a, b) in [
        ("validity.reynolds", a.reynolds, b.reynolds),
        ("validity.inertial_drag_excess", a.inertial_drag_excess, b.inertial_drag_excess),
        ("validity.speed_limit_m_per_s", a.speed_limit_m_per_s, b.speed_limit_m_per_s),
    ] {
        found.words(key, &a.is_some(), &b.is_some());
        if let (Some(a), Some(b)) = (a, b) {
            found.numbers(key, &[a], &[b], a.abs(), QUOTIENT * allowed.force);
        }
    }
    found.words(
        "relative_error.accuracy_reached",
        &then.relative_error.accuracy_reached,
        &now.relative_error.accuracy_reached,
    );
}

/// What the errors of both answers allow together; without an estimate everything.
struct Allowed {
    force: f64,
    torque: f64,
    coupling: f64,
}

impl Allowed {
    fn of(then: &RelativeErrorAnswer, now: &RelativeErrorAnswer) -> Self {
        // Both read the same surface in the same way, so the geometry's error is the same in both; but a changed rule may not be.
        let sum = |pick: fn(&RelativeErrorAnswer) -> Option<f64>| {
            pick(then).zip(pick(now)).map_or(f64::INFINITY, |(a, b)| a + b)
        };
        Self { force: sum(|e| e.force), torque: sum(|e| e.torque), coupling: sum(|e| e.coupling) }
    }

    fn worst(&self) -> f64 {
        self.force.max(self.torque).max(self.coupling)
    }
}

fn compare_body(found: &mut Comparison, then: &BodyAnswer, now: &BodyAnswer) {
    let size = then.size_m.into_iter().fold(0.0, f64::max);
    found.words("body.name", &then.name, &now.name);
    found.numbers("body.volume_m3", &[then.volume_m3], &[now.volume_m3], then.volume_m3, 0.0);
    found.numbers("body.area_m2", &[then.area_m2], &[now.area_m2], then.area_m2, 0.0);
    found.numbers("body.size_m", &then.size_m, &now.size_m, size, 0.0);
    let away = then.centroid_m.iter().fold(size, |most, x| most.max(x.abs()));
    found.numbers("body.centroid_m", &then.centroid_m, &now.centroid_m, away, 0.0);
}

fn compare_one(found: &mut Comparison, then: &OneBody, now: &OneBody, allowed: &Allowed) {
    let (r, s) = (then.resistance, now.resistance);
    let (tt, rr) = (size(&r.force_velocity_n_s_per_m), size(&r.torque_rotation_n_m_s));
    let mixed = (tt * rr).sqrt();
    for (key, a, b, size, allowed) in [
        ("force_velocity_n_s_per_m", &r.force_velocity_n_s_per_m, &s.force_velocity_n_s_per_m, tt, allowed.force),
        ("force_rotation_n_s", &r.force_rotation_n_s, &s.force_rotation_n_s, mixed, allowed.coupling),
        ("torque_velocity_n_s", &r.torque_velocity_n_s, &s.torque_velocity_n_s, mixed, allowed.coupling),
        ("torque_rotation_n_m_s", &r.torque_rotation_n_m_s, &s.torque_rotation_n_m_s, rr, allowed.torque),
    ] {
        found.numbers(&format!("resistance.{key}"), a.as_flattened(), b.as_flattened(), size, allowed);
    }
    // An inverse differs by as much as the matrix; each block by what the worst of them does.
    let (m, n) = (then.mobility, now.mobility);
    let (tt, rr) = (size(&m.velocity_force_m_per_n_s), size(&m.rotation_torque_per_n_m_s));
    let mixed = (tt * rr).sqrt();
    for (key, a, b, size) in [
        ("velocity_force_m_per_n_s", &m.velocity_force_m_per_n_s, &n.velocity_force_m_per_n_s, tt),
        ("velocity_torque_per_n_s", &m.velocity_torque_per_n_s, &n.velocity_torque_per_n_s, mixed),
        ("rotation_force_per_n_s", &m.rotation_force_per_n_s, &n.rotation_force_per_n_s, mixed),
        ("rotation_torque_per_n_m_s", &m.rotation_torque_per_n_m_s, &n.rotation_torque_per_n_m_s, rr),
    ] {
        found.numbers(&format!("mobility.{key}"), a.as_flattened(), b.as_flattened(), size, QUOTIENT * allowed.worst());
    }
    let (d, e) = (then.diffusion, now.diffusion);
    for (key, a, b) in [
        ("diffusion.translation_m2_per_s", &d.translation_m2_per_s, &e.translation_m2_per_s),
        ("diffusion.rotation_per_s", &d.rotation_per_s, &e.rotation_per_s),
    ] {
        found.numbers(key, a.as_flattened(), b.as_flattened(), size(a), QUOTIENT * allowed.worst());
    }
    let body = then.body.size_m.into_iter().fold(0.0, f64::max);
    let away = then.reference_point_m.iter().fold(body, |most, x| most.max(x.abs()));
    found.numbers("reference_point_m", &then.reference_point_m, &now.reference_point_m, away, 0.0);
    for (key, a, b) in [
        ("centre_of_resistance_m", &then.centre_of_resistance_m, &now.centre_of_resistance_m),
        ("centre_of_mobility_m", &then.centre_of_mobility_m, &now.centre_of_mobility_m),
    ] {
        found.numbers(key, a, b, away, QUOTIENT * allowed.worst());
    }
}

fn compare_several(found: &mut Comparison, then: &DragAnswer, now: &DragAnswer, allowed: &Allowed) {
    for (key, a, b) in [
        ("grand_resistance", &then.grand_resistance, &now.grand_resistance),
        ("grand_mobility", &then.grand_mobility, &now.grand_mobility),
    ] {
        let (Some(a), Some(b)) = (a, b) else { continue };
        // Rows and columns of unlike units are made alike by the diagonal.
        let scaled = |matrix: &[Vec<f64>]| {
            let diagonal = (0..a.len()).map(|k| a[k].get(k).copied().unwrap_or(f64::NAN)).collect::<Vec<_>>();
            let entry = |(i, row): (usize, &Vec<f64>)| {
                row.iter().zip(&diagonal).map(|(x, d)| x / (d * diagonal[i]).sqrt()).collect::<Vec<_>>()
            };
            matrix.iter().enumerate().flat_map(entry).collect::<Vec<_>>()
        };
        if a.len() == b.len() {
            found.numbers(key, &scaled(a), &scaled(b), 1.0, QUOTIENT * allowed.worst());
        } else {
            found.words(key, &a.len(), &b.len());
        }
    }
}

fn compare_motion(found: &mut Comparison, then: &DragAnswer, now: &DragAnswer, allowed: &Allowed) {
    found.words("motion", &then.motion.is_some(), &now.motion.is_some());
    let (Some(a), Some(b), Some(one)) = (&then.motion, &now.motion, then.one()) else { return };
    found.numbers("motion.velocity_m_per_s", &a.velocity_m_per_s, &b.velocity_m_per_s, norm(&a.velocity_m_per_s), 0.0);
    found.numbers("motion.rotation_per_s", &a.rotation_per_s, &b.rotation_per_s, norm(&a.rotation_per_s), 0.0);
    // The load's size by the tensors, since a single component may vanish.
    let (tt, rr) = (size(&one.resistance.force_velocity_n_s_per_m), size(&one.resistance.torque_rotation_n_m_s));
    let (speed, spin) = (norm(&a.velocity_m_per_s), norm(&a.rotation_per_s));
    let mixed = (tt * rr).sqrt();
    let force = tt * speed + mixed * spin;
    let torque = mixed * speed + rr * spin;
    found.numbers("motion.force_n", &a.force_n, &b.force_n, force, allowed.worst());
    found.numbers("motion.torque_n_m", &a.torque_n_m, &b.torque_n_m, torque, allowed.worst());
}

fn size(tensor: &Tensor) -> f64 {
    tensor.iter().flatten().fold(0.0_f64, |largest, x| largest.max(x.abs()))
}

fn norm(vector: &[f64; 3]) -> f64 {
    vector.iter().map(|x| x * x).sum::<f64>().sqrt()
}
