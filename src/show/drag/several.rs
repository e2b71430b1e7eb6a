//! Several bodies: who they are, and what the motion of each does to all.

use super::bodies::SIZE_DIGITS;
use crate::physical::quantity::{DisplayUnit, format_number};
use crate::question::{BodyAnswer, DragAnswer, Tensor, Vector};
use crate::show::numbers::{digits_for, si, vector};
use crate::show::sheet::{Sheet, sentence};
use crate::show::tensor_text::{TensorText, side_by_side};

/// Of more bodies the blocks would fill pages; they are in the JSON.
const MOST_PRINTED: usize = 3;

/// Rows of one body.
const ROWS: usize = 6;

/// Each body with its size and place, numbered as in the tensors.
pub(super) fn list_of_bodies(sheet: &mut Sheet, bodies: &[BodyAnswer]) {
    for (number, body) in bodies.iter().enumerate() {
        let largest = body.size_m.into_iter().fold(0.0, f64::max);
        let length = DisplayUnit::LENGTH.choose(largest, SIZE_DIGITS);
        let edges = body.size_m.map(|x| format_number(length.value(x), SIZE_DIGITS)).join(" x ");
        let away = body.centroid_m.iter().fold(largest, |most, x| most.max(x.abs()));
        let place = vector(body.centroid_m, DisplayUnit::LENGTH, SIZE_DIGITS + 1, 1e-6 * largest, away);
        sheet.item(&format!("body {}", number + 1), &body.name);
        sheet.item("", &format!("{edges} {}, volume {}; centroid at {place}", length.symbol(), volume(body)));
        for note in &body.notes {
            sheet.item("", &sentence(note));
        }
    }
}

fn volume(body: &BodyAnswer) -> String {
    si(body.volume_m3, DisplayUnit::VOLUME, SIZE_DIGITS)
}

/// The blocks of the grand resistance and of the grand mobility that pair body with body.
pub(super) fn grand_tensors(sheet: &mut Sheet, answer: &DragAnswer, bodies: &[BodyAnswer]) {
    let (Some(resistance), Some(mobility)) = (&answer.grand_resistance, &answer.grand_mobility) else { return };
    if bodies.len() > MOST_PRINTED {
        let size = ROWS * bodies.len();
        sheet.item("resistance", &format!("and mobility of all together are {size} x {size}: see --json"));
        return;
    }
    let digits = digits_for(answer.relative_error.force).max(4);
    let error = answer.relative_error.force.unwrap_or(0.0);
    let blocks = |matrix: &[Vec<f64>], unit: DisplayUnit, what: &dyn Fn(usize, usize) -> String, sheet: &mut Sheet| {
        for i in 0..bodies.len() {
            let row = (0..bodies.len()).map(|j| {
                let scale = (largest(&block(matrix, i, i)) * largest(&block(matrix, j, j))).sqrt();
                TensorText { what: what(i, j), tensor: block(matrix, i, j), unit, digits, least: error * scale }
            });
            for pair in row.collect::<Vec<_>>().chunks(2) {
                for line in side_by_side(&pair[0], pair.get(1)) {
                    sheet.line("", &line);
                }
            }
        }
    };
    sheet.item("resistance", "force of one body on the fluid for the velocity of one, the others held, in x, y, z");
    let force = |i: usize, j: usize| format!("on {} for {}", i + 1, j + 1);
    blocks(resistance, DisplayUnit::RESISTANCE, &force, sheet);
    sheet.gap();
    sheet.item("mobility", "velocity of one body for the force on one, all free to move and turn, in x, y, z");
    let velocity = |i: usize, j: usize| format!("of {} for {}", i + 1, j + 1);
    blocks(mobility, DisplayUnit::MOBILITY, &velocity, sheet);
    sheet.item(
        "",
        "torques and rotations about each body's centroid are in the JSON, as rows and columns 4 to 6 of each",
    );
}

/// Force for velocity, or velocity for force, of bodies `i` and `j`.
fn block(matrix: &[Vec<f64>], i: usize, j: usize) -> Tensor {
    let row = |k: usize| -> Vector { [0, 1, 2].map(|l| matrix[ROWS * i + k][ROWS * j + l]) };
    [0, 1, 2].map(row)
}

fn largest(tensor: &Tensor) -> f64 {
    tensor.iter().flatten().fold(0.0_f64, |largest, x| largest.max(x.abs()))
}
