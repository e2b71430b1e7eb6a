//! One body: its drags, its diffusion, its tensors.

use super::axes::line_name;
use super::bodies::SIZE_DIGITS;
use crate::physical::quantity::{DisplayUnit, format_number};
use crate::question::{DragAnswer, OneBody, Vector};
use crate::show::numbers::{digits_for, plus_minus, si, vector};
use crate::show::sheet::{Sheet, Tone};
use crate::show::tensor_text::{TensorText, side_by_side};

/// A body that keeps its orientation for longer than this, s, does not care for Brownian motion: two weeks.
const LONGEST_MEMORY_S: f64 = 1.2e6;

/// Mean, least and most drag, the torque of turning, diffusion.
pub(super) fn drags(sheet: &mut Sheet, answer: &DragAnswer, one: &OneBody) {
    let error = &answer.relative_error;
    let force_error = error.of_force();
    let digits = digits_for(force_error);
    let drag = |value: f64| si(value, DisplayUnit::RESISTANCE, digits);
    if let Some(mean) = &one.principal.mean {
        let (speed_si, speed) = everyday_speed(&one.body.size_m);
        let force = si(mean.drag_n_s_per_m * speed_si, DisplayUnit::FORCE, digits);
        let headline = format!(" {}, the mean of a tumbling body: {force} at {speed}", plus_minus(force_error));
        sheet.toned_item("drag", Tone::Title, &drag(mean.drag_n_s_per_m), &headline);
    }
    let label = if one.principal.mean.is_some() { "" } else { "drag" };
    extremes(sheet, label, &one.principal.drag_n_s_per_m, &one.principal.drag_axes, force_error, &drag);
    if let (Some(mean), Some(radius)) = (&one.principal.mean, answer.hydrodynamic_radius_m) {
        sheet.item(
            "feels like",
            &format!(
                "a sphere of radius {} (hydrodynamic), with {} times the drag of one of its volume",
                si(radius, DisplayUnit::LENGTH, digits),
                format_number(mean.dynamic_shape_factor, digits)
            ),
        );
    }
    let torque_error = error.of_torque();
    let digits = digits_for(torque_error);
    let turning = |value: f64| si(value, DisplayUnit::ROTATIONAL_RESISTANCE, digits);
    let rotation = &one.principal.rotation_n_m_s;
    sheet.toned_item(
        "turning",
        Tone::Title,
        &turning(rotation[0]),
        &format!(
            " {}{}",
            plus_minus(torque_error),
            if all_equal(rotation, torque_error) {
                ", about any axis".to_owned()
            } else {
                format!(", least, about {}", line_name(&one.principal.rotation_axes[0]))
            }
        ),
    );
    if !all_equal(rotation, torque_error) {
        let most = line_name(&one.principal.rotation_axes[2]);
        sheet.item("", &format!("{}, most, about {most}", turning(rotation[2])));
    }
    diffusion(sheet, one, digits_for(force_error), digits);
}

/// Least and most of the principal drags, or that they are all the same.
fn extremes(
    sheet: &mut Sheet,
    label: &str,
    values: &Vector,
    axes: &[Vector; 3],
    error: Option<f64>,
    text: &dyn Fn(f64) -> String,
) {
    if all_equal(values, error) {
        sheet.item(label, "the same in every direction");
        return;
    }
    sheet.item(label, &format!("{} least, along {}", text(values[0]), line_name(&axes[0])));
    sheet.item("", &format!("{} most, along {}", text(values[2]), line_name(&axes[2])));
}

fn diffusion(sheet: &mut Sheet, one: &OneBody, digits: usize, turning_digits: usize) {
    let trace = |tensor: &[Vector; 3]| tensor[0][0] + tensor[1][1] + tensor[2][2];
    let translation = trace(&one.diffusion.translation_m2_per_s) / 3.0;
    // In the mean over axes an orientation is forgotten at twice the mean coefficient.
    let forgetting = 1.0 / (2.0 * trace(&one.diffusion.rotation_per_s) / 3.0);
    let translation = si(translation, DisplayUnit::DIFFUSION, digits);
    let turning = if forgetting < LONGEST_MEMORY_S {
        format!(
            "forgets its orientation in about {}",
            si(forgetting, DisplayUnit::TIME, turning_digits.min(SIZE_DIGITS))
        )
    } else {
        "keeps its orientation for weeks and longer".to_owned()
    };
    sheet.item("diffuses", &format!("{translation} in the mean, and {turning}"));
}

/// The resistance as tensors, and the centres.
pub(super) fn tensors(sheet: &mut Sheet, answer: &DragAnswer, one: &OneBody) {
    let error = &answer.relative_error;
    let digits = digits_for(error.solver_worst()).max(4);
    let geometry = error.geometry.unwrap_or(0.0);
    let largest = |tensor: &[Vector; 3]| tensor.iter().flatten().fold(0.0_f64, |largest, x| largest.max(x.abs()));
    let blocks = one.resistance;
    let (tt, rr) = (&blocks.force_velocity_n_s_per_m, &blocks.torque_rotation_n_m_s);
    let least = |own: Option<f64>, scale: f64| (own.unwrap_or(0.0) + geometry) * scale;
    let force = TensorText {
        what: "force for velocity".to_owned(),
        tensor: *tt,
        unit: DisplayUnit::RESISTANCE,
        digits,
        least: least(error.force, largest(tt)),
    };
    let torque = TensorText {
        what: "torque for rotation".to_owned(),
        tensor: *rr,
        unit: DisplayUnit::ROTATIONAL_RESISTANCE,
        digits,
        least: least(error.torque, largest(rr)),
    };
    let coupling = TensorText {
        what: "torque for velocity".to_owned(),
        tensor: blocks.torque_velocity_n_s,
        unit: DisplayUnit::COUPLING_RESISTANCE,
        digits,
        least: least(error.coupling, (largest(tt) * largest(rr)).sqrt()),
    };
    sheet.item("resistance", &format!("about {}, in x, y, z: what the body exerts on the fluid", reference_name(one)));
    for line in side_by_side(&force, Some(&torque)) {
        sheet.line("", &line);
    }
    if coupling.vanishes() {
        sheet.item("", "no coupling of turning and moving, within the error");
    } else {
        for line in side_by_side(&coupling, None) {
            sheet.line("", &line);
        }
        sheet.item("", "force for rotation is its transpose");
        centres(sheet, answer, one);
    }
}

/// Where the centres are, which matters only if the body couples.
fn centres(sheet: &mut Sheet, answer: &DragAnswer, one: &OneBody) {
    let size = one.body.size_m.into_iter().fold(0.0, f64::max);
    let least = answer.relative_error.coupling.unwrap_or(0.0) * size;
    let place = |point: Vector| vector(point, DisplayUnit::LENGTH, SIZE_DIGITS + 1, least, size);
    sheet.item("centres", &format!("of resistance at {}", place(one.centre_of_resistance_m)));
    sheet.item("", &format!("of mobility at {} (diffusion is about it)", place(one.centre_of_mobility_m)));
}

pub(super) fn reference_name(one: &OneBody) -> String {
    let point = one.reference_point_m;
    let size = one.body.size_m.into_iter().fold(0.0, f64::max);
    let place = vector(point, DisplayUnit::LENGTH, SIZE_DIGITS + 1, 1e-6 * size, size);
    if point == one.body.centroid_m { format!("the centroid ({place})") } else { format!("the point {place}") }
}

/// A speed that fits the body: 1 um/s for what needs a microscope, 1 mm/s for the rest.
fn everyday_speed(size_m: &Vector) -> (f64, &'static str) {
    let largest = size_m.iter().fold(0.0_f64, |largest, x| largest.max(*x));
    if largest < 3e-4 { (1e-6, "1 um/s") } else { (1e-3, "1 mm/s") }
}

fn all_equal(values: &Vector, error: Option<f64>) -> bool {
    let (least, most) = values.iter().fold((f64::INFINITY, 0.0_f64), |(l, m), x| (l.min(*x), m.max(*x)));
    most - least <= error.unwrap_or(0.0).max(1e-9) * most
}
