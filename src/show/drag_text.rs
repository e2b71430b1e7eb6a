//! The answer to `drag` as text: the body said back, the drags, whether they hold, and how far to trust them.

use super::numbers::{GLUE, digits_for, percent, plus_minus, si, temperature, vector};
use super::sheet::{Sheet, Style, Tone, sentence};
use super::tensor_text::{TensorText, side_by_side};
use crate::physical::quantity::{DisplayUnit, format_number};
use crate::question::{DragAnswer, LengthUnit, MotionAnswer, SPEED_LIMIT_REYNOLDS, Vector, Verdict};

/// Digits of sizes said back.
const SIZE_DIGITS: usize = 3;

/// Units of area are a million apart: the larger one is taken from a fiftieth of it on.
const AREA_UNIT_LEAD: f64 = 50.0;

/// Digits of temperature, viscosity and density.
const FLUID_DIGITS: usize = 4;

/// An axis within this angle of a laboratory axis, in cosine, goes by its name.
const NAMED_AXIS_COSINE: f64 = 0.999_95;

/// A body that keeps its orientation for longer than this, s, does not care for Brownian motion: two weeks.
const LONGEST_MEMORY_S: f64 = 1.2e6;

/// What was taken for granted because nothing was said, and is said aloud.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Assumed {
    /// The fluid.
    pub fluid: bool,
    /// Its temperature.
    pub temperature: bool,
    /// The direction of the motion.
    pub direction: bool,
    /// The axis of the spin.
    pub axis: bool,
    /// The unit of the body's file, in which its size is said back as well.
    pub file_unit: Option<LengthUnit>,
}

impl Assumed {
    /// What was taken for granted of the fluid, to be put behind it.
    pub(super) fn fluid_words(&self) -> &'static str {
        match (self.fluid, self.temperature) {
            (true, true) => "; taken as water at 20 degC, since no fluid was given",
            (true, false) => "; taken as water, since no fluid was given",
            (false, true) => "; taken at 20 degC, since no temperature was given",
            (false, false) => "",
        }
    }
}

/// The whole answer as text, for eyes.
pub fn drag_text(answer: &DragAnswer, assumed: &Assumed, style: Style) -> String {
    let mut sheet = Sheet::new(style);
    let temperature = temperature(answer.fluid.temperature_c);
    sheet.title(&format!("{} in {} at {temperature}", answer.body.name, fluid_name(answer)));
    sheet.gap();
    body_and_fluid(&mut sheet, answer, assumed);
    sheet.gap();
    drags(&mut sheet, answer);
    if let Some(motion) = &answer.motion {
        sheet.gap();
        motion_lines(&mut sheet, answer, motion, assumed);
    }
    sheet.gap();
    regime(&mut sheet, answer);
    trust(&mut sheet, answer);
    let solver = &answer.solver;
    sheet.item(
        "solved",
        &format!(
            "{} triangles, {} unknowns, {}, in {} s",
            solver.triangles,
            solver.unknowns,
            solver.method,
            format_number(solver.seconds, 2)
        ),
    );
    for caution in &answer.cautions {
        sheet.item("beware", &sentence(caution));
    }
    sheet.gap();
    tensors(&mut sheet, answer);
    sheet.finish()
}

fn fluid_name(answer: &DragAnswer) -> &str {
    if answer.fluid.name.starts_with("given") { "a fluid given by numbers" } else { &answer.fluid.name }
}

fn body_and_fluid(sheet: &mut Sheet, answer: &DragAnswer, assumed: &Assumed) {
    let body = &answer.body;
    let length = DisplayUnit::LENGTH.choose(body.size_m.into_iter().fold(0.0, f64::max), SIZE_DIGITS);
    let edges = |unit: &dyn Fn(f64) -> f64| body.size_m.map(|x| format_number(unit(x), SIZE_DIGITS)).join(" x ");
    let mut size = format!("{} {} along x, y, z", edges(&|x| length.value(x)), length.symbol());
    if let Some(file) = assumed.file_unit.as_ref().filter(|file| file.symbol != length.symbol()) {
        size += &format!(" ({} in the file's {})", edges(&|x| x / file.metres), file.symbol);
    }
    sheet.item("size", &size);
    let equal_sphere = (6.0 * body.volume_m3 / std::f64::consts::PI).cbrt();
    // Chosen a little early, so that 0.88 mm2 is not 880000 um2.
    let area = DisplayUnit::AREA.choose(AREA_UNIT_LEAD * body.area_m2, SIZE_DIGITS);
    sheet.item(
        "",
        &format!(
            "volume {}, that of a sphere {} across; surface {}{GLUE}{}",
            si(body.volume_m3, DisplayUnit::VOLUME, SIZE_DIGITS),
            si(equal_sphere, DisplayUnit::LENGTH, SIZE_DIGITS),
            area.number(body.area_m2, SIZE_DIGITS),
            area.symbol(),
        ),
    );
    for note in &body.notes {
        sheet.item("", &sentence(note));
    }
    let mut fluid = format!(
        "{} ± {}, {}",
        si(answer.fluid.viscosity_pa_s, DisplayUnit::VISCOSITY, FLUID_DIGITS),
        percent(answer.fluid.relative_uncertainty),
        si(answer.fluid.density_kg_m3, DisplayUnit::DENSITY, FLUID_DIGITS),
    );
    fluid += assumed.fluid_words();
    sheet.item("fluid", &fluid);
    sheet.item("around it", "open fluid, no walls");
}

fn drags(sheet: &mut Sheet, answer: &DragAnswer) {
    let error = &answer.relative_error;
    let force_error = error.of_force();
    let digits = digits_for(force_error);
    let drag = |value: f64| si(value, DisplayUnit::RESISTANCE, digits);
    if let Some(mean) = &answer.principal.mean {
        let (speed_si, speed) = everyday_speed(&answer.body.size_m);
        let force = si(mean.drag_n_s_per_m * speed_si, DisplayUnit::FORCE, digits);
        let headline = format!(" {}, the mean of a tumbling body: {force} at {speed}", plus_minus(force_error));
        sheet.toned_item("drag", Tone::Title, &drag(mean.drag_n_s_per_m), &headline);
    }
    let label = if answer.principal.mean.is_some() { "" } else { "drag" };
    extremes(sheet, label, &answer.principal.drag_n_s_per_m, &answer.principal.drag_axes, force_error, &drag);
    if let (Some(mean), Some(radius)) = (&answer.principal.mean, answer.hydrodynamic_radius_m) {
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
    let rotation = &answer.principal.rotation_n_m_s;
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
                format!(", least, about {}", line_name(&answer.principal.rotation_axes[0]))
            }
        ),
    );
    if !all_equal(rotation, torque_error) {
        let most = line_name(&answer.principal.rotation_axes[2]);
        sheet.item("", &format!("{}, most, about {most}", turning(rotation[2])));
    }
    diffusion(sheet, answer, digits_for(force_error), digits);
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

fn diffusion(sheet: &mut Sheet, answer: &DragAnswer, digits: usize, turning_digits: usize) {
    let trace = |tensor: &[Vector; 3]| tensor[0][0] + tensor[1][1] + tensor[2][2];
    let translation = trace(&answer.diffusion.translation_m2_per_s) / 3.0;
    // In the mean over axes an orientation is forgotten at twice the mean coefficient.
    let forgetting = 1.0 / (2.0 * trace(&answer.diffusion.rotation_per_s) / 3.0);
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

fn motion_lines(sheet: &mut Sheet, answer: &DragAnswer, motion: &MotionAnswer, assumed: &Assumed) {
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
    sheet.item("", &format!("by the fluid on the body, x, y, z; torque about {}", reference_name(answer)));
}

fn correction_matters(answer: &DragAnswer) -> bool {
    answer.validity.verdict.is_some_and(|verdict| verdict > Verdict::Creeping)
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

fn regime(sheet: &mut Sheet, answer: &DragAnswer) {
    let validity = &answer.validity;
    if let Some(verdict) = validity.verdict {
        let tone = match verdict {
            Verdict::Creeping => Tone::Good,
            Verdict::Corrected | Verdict::Doubtful => Tone::Middling,
            Verdict::Outside => Tone::Bad,
        };
        let decisive = validity.numbers.iter().find(|number| Some(&number.name) == validity.decided_by.as_ref());
        let because = decisive.map_or_else(String::new, |number| {
            format!(
                ": {} {} (creeping below {}); {}",
                number.name,
                format_number(number.value, 2),
                number.threshold,
                number.meaning
            )
        });
        sheet.toned_item("regime", tone, verdict.word(), &because);
        for number in validity.numbers.iter().filter(|number| Some(&number.name) != validity.decided_by.as_ref()) {
            let value = format_number(number.value, 2);
            sheet.item("", &format!("{} {value}, {}: {}", number.name, number.verdict.word(), number.meaning));
        }
    }
    if let Some(limit) = validity.speed_limit_m_per_s {
        let label = if validity.verdict.is_some() { "" } else { "regime" };
        let limit = si(limit, DisplayUnit::SPEED, 2);
        let whence = if answer.motion.is_some() { "in this direction" } else { "in any direction" };
        sheet
            .item(label, &format!("creeping up to {limit} {whence} (particle Reynolds number {SPEED_LIMIT_REYNOLDS})"));
    }
    for note in &validity.notes {
        sheet.item("", &sentence(note));
    }
}

fn trust(sheet: &mut Sheet, answer: &DragAnswer) {
    let error = &answer.relative_error;
    let solver = error.solver_worst();
    let mut parts = vec![match solver {
        Some(solver) => format!("solver {}", percent(solver)),
        None => "solver without an estimate".to_owned(),
    }];
    parts.extend(error.geometry.filter(|geometry| *geometry > 0.0).map(|part| format!("geometry {}", percent(part))));
    for share in &error.input_shares {
        let (force, torque) = (percent(share.force), percent(share.torque));
        let size = if force == torque { force } else { format!("{force} of drags and {torque} of torques") };
        parts.push(format!("{} {size}", share.name));
    }
    // No error bound covers what the equations leave out.
    let condition = if correction_matters(answer) { ", as far as the regime allows" } else { "" };
    sheet.item("trust", &format!("{} on every number{condition}: {}", plus_minus(error.total), parts.join(", ")));
    if let Some(asked) = error.accuracy_asked {
        if error.accuracy_reached {
            sheet.item("", &format!("the solver was asked for {} and reached it", percent(asked)));
        } else {
            sheet.toned_item(
                "",
                Tone::Bad,
                "accuracy not reached",
                &format!(": {} was asked of the solver, see above for what it got", percent(asked)),
            );
        }
    }
}

fn tensors(sheet: &mut Sheet, answer: &DragAnswer) {
    let error = &answer.relative_error;
    let digits = digits_for(error.solver_worst()).max(4);
    let geometry = error.geometry.unwrap_or(0.0);
    let largest = |tensor: &[Vector; 3]| tensor.iter().flatten().fold(0.0_f64, |largest, x| largest.max(x.abs()));
    let blocks = &answer.resistance;
    let (tt, rr) = (&blocks.force_velocity_n_s_per_m, &blocks.torque_rotation_n_m_s);
    let least = |own: Option<f64>, scale: f64| (own.unwrap_or(0.0) + geometry) * scale;
    let force = TensorText {
        what: "force for velocity",
        tensor: *tt,
        unit: DisplayUnit::RESISTANCE,
        digits,
        least: least(error.force, largest(tt)),
    };
    let torque = TensorText {
        what: "torque for rotation",
        tensor: *rr,
        unit: DisplayUnit::ROTATIONAL_RESISTANCE,
        digits,
        least: least(error.torque, largest(rr)),
    };
    let coupling = TensorText {
        what: "torque for velocity",
        tensor: blocks.torque_velocity_n_s,
        unit: DisplayUnit::COUPLING_RESISTANCE,
        digits,
        least: least(error.coupling, (largest(tt) * largest(rr)).sqrt()),
    };
    sheet.item(
        "resistance",
        &format!("about {}, in x, y, z: what the body exerts on the fluid", reference_name(answer)),
    );
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
        centres(sheet, answer);
    }
}

/// Where the centres are, which matters only if the body couples.
fn centres(sheet: &mut Sheet, answer: &DragAnswer) {
    let size = answer.body.size_m.into_iter().fold(0.0, f64::max);
    let least = answer.relative_error.coupling.unwrap_or(0.0) * size;
    let place = |point: Vector| vector(point, DisplayUnit::LENGTH, SIZE_DIGITS + 1, least, size);
    sheet.item("centres", &format!("of resistance at {}", place(answer.centre_of_resistance_m)));
    sheet.item("", &format!("of mobility at {} (diffusion is about it)", place(answer.centre_of_mobility_m)));
}

fn reference_name(answer: &DragAnswer) -> String {
    let point = answer.reference_point_m;
    let size = answer.body.size_m.into_iter().fold(0.0, f64::max);
    let place = vector(point, DisplayUnit::LENGTH, SIZE_DIGITS + 1, 1e-6 * size, size);
    if point == answer.body.centroid_m { format!("the centroid ({place})") } else { format!("the point {place}") }
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

/// `x`, `-y`, or the components of a unit vector.
fn axis_name(axis: &Vector) -> String {
    for (component, name) in axis.iter().zip(["x", "y", "z"]) {
        if component.abs() > NAMED_AXIS_COSINE {
            return if *component > 0.0 { name.to_owned() } else { format!("-{name}") };
        }
    }
    let parts = axis.map(|x| format!("{x:.3}")).map(|part| if part == "-0.000" { "0.000".to_owned() } else { part });
    format!("({})", parts.join(", "))
}

/// An axis that has no sense of its own, told with its largest component positive.
fn line_name(axis: &Vector) -> String {
    let largest = axis.iter().fold(0.0_f64, |largest, x| if x.abs() > largest.abs() { *x } else { largest });
    axis_name(&axis.map(|x| if largest < 0.0 { -x } else { x }))
}

fn norm(vector: &Vector) -> f64 {
    vector.iter().map(|x| x * x).sum::<f64>().sqrt()
}
