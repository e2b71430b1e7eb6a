//! The answer to `regime` as text: the verdict and what decides it, what follows on the way, and every number.

use super::drag::Assumed;
use super::numbers::{GLUE, digits_for, percent, plus_minus, si, temperature};
use super::sheet::{Sheet, Style, Tone, sentence};
use crate::physical::quantity::{DisplayUnit, format_number};
use crate::question::{
    ChannelAnswer, Concern, RegimeAnswer, RegimeBodyAnswer, RegimeMotion, RegimeNumber, SPEED_LIMIT_REYNOLDS, Verdict,
};

/// Digits of sizes and of results.
const DIGITS: usize = 3;

/// Digits of viscosity and density.
const FLUID_DIGITS: usize = 4;

/// Digits of dimensionless numbers.
const NUMBER_DIGITS: usize = 2;

/// The whole answer as text, for eyes.
pub fn regime_text(answer: &RegimeAnswer, assumed: &Assumed, style: Style) -> String {
    let mut sheet = Sheet::new(style);
    sheet.title(&title(answer));
    sheet.gap();
    verdict(&mut sheet, answer);
    sheet.gap();
    if let Some(body) = &answer.body {
        body_lines(&mut sheet, body);
    }
    fluid_line(&mut sheet, answer, assumed);
    if let Some(channel) = &answer.channel {
        channel_lines(&mut sheet, channel);
    }
    for motion in &answer.motions {
        let number = answer.validity.numbers.iter().find(|number| number.name == motion.reynolds_name);
        motion_line(&mut sheet, motion, number.map(|number| number.verdict));
    }
    let mut numbers: Vec<&RegimeNumber> = answer.validity.numbers.iter().collect();
    if !numbers.is_empty() {
        sheet.gap();
        // Stable, so that equally bad ones keep their order.
        numbers.sort_by_key(|number| (number.concerns == Concern::Path, std::cmp::Reverse(number.verdict)));
        for number in numbers {
            number_line(&mut sheet, number);
        }
    }
    let notes = &answer.validity.notes;
    if !(notes.is_empty() && answer.cautions.is_empty() && answer.questions_left.is_empty()) {
        sheet.gap();
    }
    for (index, note) in notes.iter().enumerate() {
        sheet.item(if index == 0 { "note" } else { "" }, &sentence(note));
    }
    for caution in &answer.cautions {
        sheet.item("beware", &sentence(caution));
    }
    let left =
        answer.questions_left.iter().map(|left| format!("{} ({})", left.what.replace(' ', GLUE), left.would_tell));
    let left = left.collect::<Vec<_>>().join("; ");
    if !left.is_empty() {
        sheet.item("not told", &left);
    }
    sheet.finish()
}

fn title(answer: &RegimeAnswer) -> String {
    let fluid = if answer.fluid.name.starts_with("given") { "a fluid given by numbers" } else { &answer.fluid.name };
    let temperature = temperature(answer.fluid.temperature_c);
    match (&answer.body, &answer.channel) {
        (Some(body), Some(channel)) => format!("{} in a {}, in {fluid} at {temperature}", body.name, channel.section),
        (Some(body), None) => format!("{} in {fluid} at {temperature}", body.name),
        (None, Some(channel)) => format!("a {} with {fluid} at {temperature}", channel.section),
        (None, None) => format!("any body in {fluid} at {temperature}"),
    }
}

fn tone(verdict: Verdict) -> Tone {
    match verdict {
        Verdict::Creeping => Tone::Good,
        Verdict::Corrected | Verdict::Doubtful => Tone::Middling,
        Verdict::Outside => Tone::Bad,
    }
}

fn verdict(sheet: &mut Sheet, answer: &RegimeAnswer) {
    let validity = &answer.validity;
    let find = |name: &Option<String>| validity.numbers.iter().find(|number| Some(&number.name) == name.as_ref());
    let what = |number: &RegimeNumber| {
        let value = format_number(number.value, NUMBER_DIGITS);
        format!("{}{GLUE}{value} ({}); {}", number.name, limit(number), number.meaning)
    };
    match (validity.verdict, find(&validity.decided_by)) {
        (Some(verdict), Some(number)) => {
            let lead = if verdict == Verdict::Creeping { "nearest to its limit is the" } else { "the" };
            sheet.toned_item("verdict", tone(verdict), verdict.word(), &format!(": {lead} {}", what(number)));
        }
        _ => sheet.item("verdict", "none: nothing that moves was told (see below)"),
    }
    let path = find(&validity.path_decided_by).filter(|number| number.verdict > Verdict::Creeping);
    if let Some(number) = path {
        sheet.item("path", &format!("the {}", what(number)));
    }
    let force = si(validity.force_limit_n, DisplayUnit::FORCE, NUMBER_DIGITS);
    let at = format!("a particle Reynolds number of {SPEED_LIMIT_REYNOLDS}");
    match validity.speed_limit_m_per_s {
        Some(speed) => {
            let speed = si(speed, DisplayUnit::SPEED, 2);
            sheet.item("limits", &format!("it creeps up to {speed}, or to a force of {force} ({at})"));
        }
        None => sheet.item("limits", &format!("a body of any shape creeps up to a force of {force} ({at})")),
    }
}

fn limit(number: &RegimeNumber) -> String {
    let threshold = format_number(number.threshold, NUMBER_DIGITS).trim_end_matches(".0").to_owned();
    let threshold = if threshold.contains('.') && !threshold.contains('e') {
        threshold.trim_end_matches('0').trim_end_matches('.').to_owned()
    } else {
        threshold
    };
    match (number.concerns, number.wants_large()) {
        (Concern::Path, true) => format!("no matter above {threshold}"),
        (Concern::Path, false) => format!("no matter below {threshold}"),
        _ => format!("creeping below {threshold}"),
    }
}

/// What follows the speed by a law that does not hold at this verdict.
fn reservation(verdict: Option<Verdict>) -> &'static str {
    match verdict {
        Some(Verdict::Outside) => ", which is far too fast here",
        Some(Verdict::Doubtful) => ", which is too fast here",
        _ => "",
    }
}

fn number_line(sheet: &mut Sheet, number: &RegimeNumber) {
    let value = format_number(number.value, NUMBER_DIGITS);
    let error = match number.relative_uncertainty {
        Some(relative) if relative > 0.0 => format!(" {}", plus_minus(Some(relative))),
        Some(_) => String::new(),
        None => " (uncertain beyond its size)".to_owned(),
    };
    let best = number.value_at_best.map_or_else(String::new, |best| {
        let word = if best < number.value { "down to" } else { "up to" };
        format!(", {word} {} by the shape", format_number(best, NUMBER_DIGITS))
    });
    let text = format!("{}{GLUE}{value}{error}{best} ({}): {}", number.name, limit(number), number.meaning);
    match number.concerns {
        Concern::Path => sheet.item("path", &text),
        _ => sheet.judged_item(tone(number.verdict), number.verdict.word(), &text),
    }
}

fn body_lines(sheet: &mut Sheet, body: &RegimeBodyAnswer) {
    let length = DisplayUnit::LENGTH.choose(body.size_m.into_iter().fold(0.0, f64::max), DIGITS);
    let (least, most) = (body.hydrodynamic_radius_at_least_m, body.hydrodynamic_radius_at_most_m);
    let sphere = least == most;
    let edges = match sphere {
        true => format!("{}{GLUE}{} across", length.number(body.size_m[0], DIGITS), length.symbol()),
        false => {
            format!("{}{GLUE}{}", body.size_m.map(|edge| length.number(edge, DIGITS)).join(" x "), length.symbol())
        }
    };
    let error = if body.size_relative_uncertainty > 0.0 {
        format!(" {}", plus_minus(Some(body.size_relative_uncertainty)))
    } else {
        String::new()
    };
    let density =
        body.density_kg_m3.map_or_else(String::new, |density| format!(", {}", si(density, DisplayUnit::DENSITY, 4)));
    let volume = si(body.volume_m3, DisplayUnit::VOLUME, DIGITS);
    sheet.item("size", &format!("{edges}{error}, volume {volume}{density}"));
    if !sphere {
        let unit = DisplayUnit::LENGTH.choose(least, DIGITS);
        sheet.item(
            "feels like",
            &format!(
                "a sphere of radius {} to {}{GLUE}{}, that of its volume and what its outline allows; `slowmote drag` \
                 tells exactly",
                unit.number(least, DIGITS),
                unit.number(most, DIGITS),
                unit.symbol()
            ),
        );
    }
    for note in &body.notes {
        sheet.item("", &sentence(note));
    }
}

fn fluid_line(sheet: &mut Sheet, answer: &RegimeAnswer, assumed: &Assumed) {
    let error = answer.fluid.relative_uncertainty;
    let error = if error > 0.0 { format!(" {}", plus_minus(Some(error))) } else { String::new() };
    sheet.item(
        "fluid",
        &format!(
            "{}{error}, {}{}",
            si(answer.fluid.viscosity_pa_s, DisplayUnit::VISCOSITY, FLUID_DIGITS),
            si(answer.fluid.density_kg_m3, DisplayUnit::DENSITY, FLUID_DIGITS),
            assumed.fluid_words()
        ),
    );
}

fn channel_lines(sheet: &mut Sheet, channel: &ChannelAnswer) {
    let length = |metres: f64| si(metres, DisplayUnit::LENGTH, DIGITS);
    let size = match (channel.section.as_str(), channel.width_m) {
        ("duct", Some(width)) => format!("{} wide, {} high", length(width), length(channel.height_m)),
        ("slot", _) => format!("{} high", length(channel.height_m)),
        _ => format!("{} across", length(channel.height_m)),
    };
    let long = channel.length_m.map_or_else(String::new, |metres| format!(", {} long", length(metres)));
    let hydraulic = length(channel.hydraulic_diameter_m);
    sheet.item("channel", &format!("{} {size}{long}; hydraulic diameter {hydraulic}", channel.section));
    let (Some(mean), Some(largest), Some(gradient), Some(shear), Some(mean_shear), Some(stress), Some(entry)) = (
        channel.mean_speed_m_per_s,
        channel.largest_speed_m_per_s,
        channel.pressure_gradient_pa_per_m,
        channel.wall_shear_rate_per_s,
        channel.mean_wall_shear_rate_per_s,
        channel.wall_shear_stress_pa,
        channel.entry_length_m,
    ) else {
        return;
    };
    let digits =
        |error: Option<f64>| if error == Some(0.0) { FLUID_DIGITS } else { digits_for(error).min(FLUID_DIGITS) };
    let bound = |error: Option<f64>| match error {
        Some(error) if error > 0.0 => format!(" {}", plus_minus(Some(error))),
        _ => String::new(),
    };
    let error = channel.speed_relative_uncertainty;
    let speed = |value: f64| si(value, DisplayUnit::SPEED, digits(error));
    let rate = channel
        .flow_rate_m3_per_s
        .map_or_else(String::new, |rate| format!("; {}", si(rate, DisplayUnit::FLOW_RATE, digits(error))));
    sheet.item("flow", &format!("{} in the mean{}, {} in the middle{rate}", speed(mean), bound(error), speed(largest)));
    let error = channel.pressure_relative_uncertainty;
    let per_length = si(gradient, DisplayUnit::PRESSURE_GRADIENT, digits(error));
    let drop = match channel.pressure_drop_pa {
        Some(drop) => {
            let drop = si(drop, DisplayUnit::PRESSURE, digits(error));
            format!("falls by {drop}{}, {per_length}, without ends and bends", bound(error))
        }
        None => format!("falls by {per_length}{}", bound(error)),
    };
    sheet.item("pressure", &drop);
    let error = channel.shear_relative_uncertainty;
    let where_most = if channel.section == "duct" {
        let mean = si(mean_shear, DisplayUnit::RATE, digits(error));
        format!(", in the middle of the long side; {mean} in the mean")
    } else {
        String::new()
    };
    sheet.item(
        "wall shear",
        &format!(
            "{}{}{where_most}; stress {}",
            si(shear, DisplayUnit::RATE, digits(error)),
            bound(error),
            si(stress, DisplayUnit::PRESSURE, DIGITS)
        ),
    );
    sheet.item("entry", &format!("developed after {}", length(entry)));
}

fn motion_line(sheet: &mut Sheet, motion: &RegimeMotion, verdict: Option<Verdict>) {
    let speed = |value: f64| si(value, DisplayUnit::SPEED, DIGITS);
    let error = match motion.speed_relative_uncertainty {
        Some(relative) if relative > 0.0 => format!(" ± {}", percent(relative)),
        _ => String::new(),
    };
    let range = match (motion.speed_at_least_m_per_s, motion.speed_at_most_m_per_s) {
        (Some(least), Some(most)) if least == most => format!("{}{error}", speed(most)),
        (Some(least), Some(most)) => format!("{} to {}{error}", speed(least), speed(most)),
        _ => String::new(),
    };
    let force = motion.force_n.map(|force| si(force.abs(), DisplayUnit::FORCE, DIGITS)).unwrap_or_default();
    let law = format!("by Stokes's law in open fluid{}", reservation(verdict));
    match motion.cause.as_str() {
        "speed" => sheet.item("moves", &format!("at {range} through the fluid, as given")),
        "flow" => sheet.item("held", &format!("in a uniform flow of {range}")),
        "force" if range.is_empty() => sheet.item("pulled", &format!("by {force}; its speed needs its size")),
        "force" => sheet.item("pulled", &format!("by {force}: at {range}, {law}")),
        _ if motion.force_n == Some(0.0) => sheet.item("floats", "as it is just as dense as the fluid"),
        _ => {
            let label = if motion.force_n.is_some_and(|force| force < 0.0) { "rises" } else { "settles" };
            sheet.item(label, &format!("at {range}, {law}; its weight in the fluid is {force}"));
        }
    }
}
