//! A motion that was asked for, with its force and torque.

use super::axes::{axis_name, norm};
use super::bodies::SIZE_DIGITS;
use super::one::reference_name;
use super::text::Assumed;
use super::trust::correction_matters;
use crate::physical::quantity::DisplayUnit;
use crate::question::{DragAnswer, MotionAnswer, OneBody, Vector};
use crate::show::numbers::{digits_for, plus_minus, si, vector};
use crate::show::sheet::Sheet;

/// The motion that was asked for, and what the fluid does to the body in it.
pub(super) fn motion_lines(
    sheet: &mut Sheet,
    answer: &DragAnswer,
    one: &OneBody,
    motion: &MotionAnswer,
    assumed: &Assumed,
) {
    let digits = digits_for(answer.relative_error.of_force());
    let mut parts = Vec::new();
    let speed = norm(&motion.velocity_m_per_s);
    if speed > 0.0 {
        let taken = if assumed.direction { ", as no direction was given" } else { "" };
        let along = axis_name(&motion.velocity_m_per_s.map(|x| x / speed));
        parts.push(format!("{} along {along}{taken}", si(speed, DisplayUnit::SPEED, SIZE_DIGITS)));
    }
    let spin = norm(&motion.rotation_per_s);
    if spin > 0.0 {
        let taken = if assumed.axis { ", as no axis was given" } else { "" };
        let about = axis_name(&motion.rotation_per_s.map(|x| x / spin));
        parts.push(format!("{} about {about}{taken}", si(spin, DisplayUnit::ANGULAR_SPEED, SIZE_DIGITS)));
    }
    if parts.is_empty() {
        parts.push("none, so that force and torque are zero".to_owned());
    }
    sheet.item("motion", &parts.join("; "));
    load(sheet, "force", &motion.force_n, motion.force_error_n, DisplayUnit::FORCE, digits);
    if let Some(corrected) = motion.force_with_inertia_n.filter(|_| correction_matters(answer)) {
        let least = motion.force_error_n.unwrap_or(0.0);
        let text = vector(corrected, DisplayUnit::FORCE, digits, least, norm(&corrected));
        sheet.item("", &format!("{text} with the first effect of inertia"));
    }
    load(sheet, "torque", &motion.torque_n_m, motion.torque_error_n_m, DisplayUnit::TORQUE, digits);
    sheet.item("", &format!("by the fluid on the body, x, y, z; torque about {}", reference_name(one)));
}

fn load(sheet: &mut Sheet, label: &str, components: &Vector, error: Option<f64>, unit: DisplayUnit, digits: usize) {
    let size = norm(components);
    let least = error.unwrap_or(0.0);
    if size <= least {
        let bound = if least > 0.0 { format!(" (less than {})", si(least, unit, 2)) } else { String::new() };
        sheet.item(label, &format!("0{bound}"));
        return;
    }
    let bound = error.map_or_else(String::new, |error| format!(" {}", plus_minus(Some(error / size))));
    sheet.item(label, &format!("{}{bound}", vector(*components, unit, digits, least, size)));
}
