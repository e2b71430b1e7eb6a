//! The channel around the body, the flow in it, and the centrifuge: texts of the form `name:key=value,key=value`.

use std::f64::consts::PI;

use slowmote::physical::constants::STANDARD_GRAVITY_M_PER_S2;
use slowmote::physical::quantity::{parse_flow_rate, parse_fraction, parse_length, parse_shear_rate, parse_speed};
use slowmote::physical::{Dimension, Quantity, QuantityError};
use slowmote::question::{Flow, Input, Section};

/// A channel with its sizes.
#[derive(Debug, Clone, PartialEq)]
pub struct ChannelOption {
    /// Its cross-section.
    pub section: Section,
    /// Its sizes.
    pub sizes: Vec<(Input, Quantity)>,
}

/// A background flow with its speed.
#[derive(Debug, Clone, PartialEq)]
pub struct FlowOption {
    /// Which flow.
    pub flow: Flow,
    /// What drives it.
    pub given: Input,
    /// How much.
    pub quantity: Quantity,
}

type Read = fn(&str) -> Result<Quantity, QuantityError>;

/// A channel such as `tube:diameter=50um`, `slot:height=20um` or `duct:width=100um,height=40um,length=2cm`.
pub fn channel(text: &str) -> Result<ChannelOption, String> {
    const EXAMPLES: &str = "`tube:diameter=50um`, `slot:height=20um` or `duct:width=100um,height=40um`";
    let wrong = || format!("`{text}` is no channel such as {EXAMPLES}");
    let (name, rest) = text.split_once(':').ok_or_else(wrong)?;
    let section = section(name).ok_or_else(wrong)?;
    let (required, example): (&[(&str, Input)], &str) = match section {
        Section::Tube => (&[("diameter", Input::Diameter)], "tube:diameter=50um"),
        Section::Slot => (&[("height", Input::Height)], "slot:height=20um"),
        Section::Duct => (&[("width", Input::Width), ("height", Input::Height)], "duct:width=100um,height=40um"),
    };
    let also = [("length", Input::Length), ("bend-radius", Input::BendRadius)];
    let mut sizes: Vec<(Input, Quantity)> = Vec::new();
    for (key, value) in pairs(rest)? {
        if key == "offset" || key == "middle" {
            return Err(format!("`{key}` says where the body is, which no number here depends on; leave it out"));
        }
        let known = required.iter().chain(&also).find(|(name, _)| *name == key);
        let Some((_, input)) = known else {
            let names: Vec<&str> = required.iter().chain(&also).map(|(name, _)| *name).collect();
            return Err(format!("a {} has no `{key}`; it has {}", section.word(), names.join(", ")));
        };
        once(&sizes, *input, key)?;
        sizes.push((*input, read(key, value, parse_length)?));
    }
    for (key, input) in required {
        if !sizes.iter().any(|(known, _)| known == input) {
            return Err(format!("the {key} of the {} is missing, as in `{example}`", section.word()));
        }
    }
    Ok(ChannelOption { section, sizes })
}

/// A flow such as `tube:mean=1mm/s`, `duct:rate=10uL/min`, `shear:10/s` or `uniform:1mm/s`.
pub fn flow(text: &str) -> Result<FlowOption, String> {
    const EXAMPLES: &str = "`tube:mean=1mm/s`, `duct:rate=10uL/min`, `shear:10/s` or `uniform:1mm/s`";
    let wrong = || format!("`{text}` is no flow such as {EXAMPLES}");
    let (name, rest) = text.split_once(':').ok_or_else(wrong)?;
    match name.trim().to_lowercase().as_str() {
        "shear" => {
            let quantity = read("shear rate", rest, parse_shear_rate)?;
            return Ok(FlowOption { flow: Flow::Shear, given: Input::ShearRate, quantity });
        }
        "uniform" => {
            let quantity = read("speed", rest, parse_speed)?;
            return Ok(FlowOption { flow: Flow::Uniform, given: Input::UniformSpeed, quantity });
        }
        _ => {}
    }
    let section = section(name).ok_or_else(wrong)?;
    let flow = Flow::Through(section);
    let pairs = pairs(rest)?;
    let [(key, value)] = pairs.as_slice() else {
        return Err("a flow has either `mean=` or `rate=`, and not both".to_owned());
    };
    let (given, parse): (Input, Read) = match *key {
        "mean" => (Input::MeanSpeed, parse_speed),
        "rate" => (Input::FlowRate, parse_flow_rate),
        _ => return Err(format!("a flow has no `{key}`; it has `mean=1mm/s` or `rate=10uL/min`")),
    };
    Ok(FlowOption { flow, given, quantity: read(key, value, parse)? })
}

/// The acceleration in a centrifuge, m/s2: `g=1000`, or `rpm=3000,radius=80mm`.
pub fn centrifuge(text: &str) -> Result<Quantity, String> {
    const EXAMPLES: &str = "`g=1000` or `rpm=3000,radius=80mm`";
    let pairs = pairs(text).map_err(|error| format!("{error}; a centrifuge is written {EXAMPLES}"))?;
    let find = |name: &str| pairs.iter().find(|(key, _)| *key == name).map(|(_, value)| *value);
    let (value, relative) = match (pairs.len(), find("g"), find("rpm"), find("radius")) {
        (1, Some(times), ..) => {
            let times = read("g", times, parse_fraction)?;
            (times.value_si() * STANDARD_GRAVITY_M_PER_S2, times.relative_uncertainty())
        }
        (2, None, Some(turns), Some(radius)) => {
            let (turns, radius) = (read("rpm", turns, parse_fraction)?, read("radius", radius, parse_length)?);
            let spin = turns.value_si() * PI / 30.0;
            let relative = f64::hypot(2.0 * turns.relative_uncertainty(), radius.relative_uncertainty());
            (spin * spin * radius.value_si(), relative)
        }
        _ => return Err(format!("a centrifuge is written {EXAMPLES}, not `{text}`")),
    };
    Quantity::with_uncertainty(value, relative * value, Dimension::ACCELERATION).map_err(|error| error.to_string())
}

fn section(name: &str) -> Option<Section> {
    [Section::Tube, Section::Slot, Section::Duct]
        .into_iter()
        .find(|section| section.word().eq_ignore_ascii_case(name.trim()))
}

/// Texts of the form `key=value`, joined by commas.
fn pairs(text: &str) -> Result<Vec<(&str, &str)>, String> {
    let pair = |part: &str| format!("`{}` is not of the form `key=value`", part.trim());
    text.split(',')
        .map(|part| part.split_once('=').map(|(key, value)| (key.trim(), value.trim())).ok_or_else(|| pair(part)))
        .collect()
}

fn once(known: &[(Input, Quantity)], input: Input, key: &str) -> Result<(), String> {
    match known.iter().any(|(before, _)| *before == input) {
        true => Err(format!("`{key}` is given twice")),
        false => Ok(()),
    }
}

fn read(what: &str, value: &str, parse: Read) -> Result<Quantity, String> {
    parse(value).and_then(|quantity| quantity.positive()).map_err(|error| format!("the {what} can't be used: {error}"))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn channels_have_their_sizes() {
        let duct = channel("duct: width=100um, height=40±2um, length=2cm").unwrap();
        assert_eq!((duct.section, duct.sizes.len()), (Section::Duct, 3));
        assert_eq!(duct.sizes[1].1.uncertainty_si(), 2e-6);
        for (wrong, why) in [
            ("tube", "is no channel"),
            ("pipe:diameter=1mm", "is no channel"),
            ("tube:50um", "key=value"),
            ("tube:height=50um", "has no `height`"),
            ("duct:width=1mm", "the height of the duct is missing"),
            ("slot:height=50", "no unit"),
            ("slot:height=-50um", "greater than zero"),
            ("slot:height=1um,height=2um", "twice"),
            ("slot:height=1um,offset=2um", "leave it out"),
        ] {
            let error = channel(wrong).unwrap_err();
            assert!(error.contains(why), "{wrong}: {error}");
        }
    }

    #[test]
    fn flows_have_one_speed() {
        assert_eq!(flow("tube:mean=1mm/s").unwrap().flow, Flow::Through(Section::Tube));
        assert!((flow("duct:rate=6uL/min").unwrap().quantity.value_si() / 1e-10 - 1.0).abs() < 1e-12);
        assert_eq!(flow("shear:10/s").unwrap().given, Input::ShearRate);
        for (wrong, why) in [
            ("shear", "is no flow"),
            ("shear:10", "no unit"),
            ("uniform:10/s", "a speed"),
            ("tube:1mm/s", "key=value"),
            ("tube:mean=1mm/s,rate=1uL/s", "not both"),
            ("tube:rate=1mm/s", "a flow rate"),
            ("tube:max=1mm/s", "has no `max`"),
        ] {
            let error = flow(wrong).unwrap_err();
            assert!(error.contains(why), "{wrong}: {error}");
        }
    }

    #[test]
    fn a_centrifuge_has_an_acceleration() {
        assert!((centrifuge("g=1000").unwrap().value_si() - 9806.65).abs() < 1e-9);
        // (3000 2 pi / 60)^2 0.08 = 7895.68 m/s2, by hand.
        let spun = centrifuge("rpm=3000±30,radius=80mm").unwrap();
        assert!((spun.value_si() - 7895.68).abs() < 0.01 && (spun.relative_uncertainty() - 0.02).abs() < 1e-12);
        for wrong in ["1000", "g=0", "rpm=3000", "rpm=3000,radius=80", "g=1,rpm=2", "rpm=1Hz,radius=1mm"] {
            assert!(centrifuge(wrong).is_err(), "{wrong}");
        }
    }
}
