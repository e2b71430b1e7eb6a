//! Whether creeping flow holds, and how far to trust the numbers.

use crate::physical::quantity::{DisplayUnit, format_number};
use crate::question::{DragAnswer, SPEED_LIMIT_REYNOLDS, Verdict};
use crate::show::numbers::{percent, plus_minus, si};
use crate::show::sheet::{Sheet, Tone, sentence};

/// The verdict, with all numbers that go into it.
pub(super) fn regime(sheet: &mut Sheet, answer: &DragAnswer) {
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
        let whence = match (&answer.motion, &answer.bodies) {
            (Some(_), _) => "in this direction",
            (None, None) => "in any direction",
            (None, Some(_)) => "in any direction, all bodies moving together",
        };
        sheet
            .item(label, &format!("creeping up to {limit} {whence} (particle Reynolds number {SPEED_LIMIT_REYNOLDS})"));
    }
    for note in &validity.notes {
        sheet.item("", &sentence(note));
    }
}

/// The error of the numbers, and what it consists of.
pub(super) fn trust(sheet: &mut Sheet, answer: &DragAnswer) {
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
    sheet.item(
        "trust",
        &format!("{} on every number without a ± of its own{condition}: {}", plus_minus(error.total), parts.join(", ")),
    );
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

/// Whether inertia or slip changes the numbers.
pub(super) fn correction_matters(answer: &DragAnswer) -> bool {
    answer.validity.verdict.is_some_and(|verdict| verdict > Verdict::Creeping)
}
