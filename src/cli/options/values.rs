//! How single values are read; what they say when they can't be is part of the usage error.

use slowmote::physical::quantity::{Dimension, Quantity, parse_time};
use slowmote::surface::Point;

/// Makes a parser for clap of one that fails with a displayable error.
pub fn parse_with<T, E: std::fmt::Display>(
    parse: impl Fn(&str) -> Result<T, E> + Clone + Send + Sync + 'static,
) -> impl Fn(&str) -> Result<T, String> + Clone + Send + Sync + 'static {
    move |text| parse(text).map_err(|error| error.to_string())
}

/// A direction: `x`, `-z`, or components such as `1,1,0`; normalised.
pub fn direction(text: &str) -> Result<Point, String> {
    let (sign, name) = match text.strip_prefix('-') {
        Some(name) => (-1.0, name),
        None => (1.0, text.strip_prefix('+').unwrap_or(text)),
    };
    match name {
        "x" | "X" => return Ok(Point::x() * sign),
        "y" | "Y" => return Ok(Point::y() * sign),
        "z" | "Z" => return Ok(Point::z() * sign),
        _ => {}
    }
    let wrong = || format!("`{text}` is no direction such as `x`, `-z` or `1,1,0`");
    let components = three(text).ok_or_else(wrong)?;
    let mut vector = Point::zeros();
    for (component, text) in vector.iter_mut().zip(components) {
        *component = text.trim().parse().ok().filter(|x: &f64| x.is_finite()).ok_or_else(wrong)?;
    }
    // Scaled first, so that the squares neither overflow nor vanish.
    let largest = vector.amax();
    if largest == 0.0 {
        return Err(format!("`{text}` is no direction, since all its components are zero"));
    }
    Ok((vector / largest).normalize())
}

/// A place: three lengths such as `0um,0um,12um`.
pub fn place(text: &str) -> Result<Point, String> {
    let parts = three(text).ok_or_else(|| format!("`{text}` is no place such as `0um,0um,12um`"))?;
    let mut place = Point::zeros();
    for (coordinate, part) in place.iter_mut().zip(parts) {
        let length = Quantity::parse(part, Dimension::LENGTH).map_err(|error| error.to_string())?;
        if length.uncertainty_si() > 0.0 {
            return Err(format!("`{part}` has an uncertainty, which a place in open fluid can't have"));
        }
        *coordinate = length.value_si();
    }
    Ok(place)
}

/// A time to wait, s.
pub fn time(text: &str) -> Result<f64, String> {
    let time = parse_time(text).and_then(|time| time.positive()).map_err(|error| error.to_string())?;
    Ok(time.value_si())
}

/// A size of memory, bytes: `4GB`, `512MiB`.
pub fn memory(text: &str) -> Result<u64, String> {
    const UNITS: [(&str, f64); 8] = [
        ("KIB", 1024.0),
        ("MIB", 1_048_576.0),
        ("GIB", 1_073_741_824.0),
        ("TIB", 1_099_511_627_776.0),
        ("KB", 1e3),
        ("MB", 1e6),
        ("GB", 1e9),
        ("TB", 1e12),
    ];
    let upper = text.trim().to_ascii_uppercase();
    let read = UNITS.iter().find_map(|(unit, bytes)| Some((upper.strip_suffix(unit)?, bytes)));
    let bytes = read.and_then(|(number, bytes)| Some(number.trim().parse::<f64>().ok()? * bytes));
    match bytes {
        Some(bytes) if (1.0..1e18).contains(&bytes) => Ok(bytes as u64),
        _ => Err(format!("`{text}` is no size of memory such as `4GB` or `512MiB`")),
    }
}

fn three(text: &str) -> Option<[&str; 3]> {
    let parts: Vec<&str> = text.split(',').collect();
    parts.try_into().ok()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn directions_have_names_or_components() {
        assert_eq!(direction("x"), Ok(Point::x()));
        assert_eq!(direction("-z"), Ok(-Point::z()));
        assert!((direction("1,1,0").unwrap() - Point::new(0.5_f64.sqrt(), 0.5_f64.sqrt(), 0.0)).norm() < 1e-15);
        assert!((direction("-1e300,0,1e300").unwrap().norm() - 1.0).abs() < 1e-15);
        for wrong in ["", "w", "1,1", "1,1,0,0", "0,0,0", "nan,0,1", "inf,0,0", "1um,0,0", "-"] {
            assert!(direction(wrong).is_err(), "{wrong}");
        }
    }

    #[test]
    fn places_have_units() {
        assert_eq!(place("0um,-1mm,12um"), Ok(Point::new(0.0, -1e-3, 12e-6)));
        for wrong in ["0,0,0", "1um", "1um,2um", "1um,2um,3s", "1±0.1um,0um,0um"] {
            assert!(place(wrong).is_err(), "{wrong}");
        }
    }

    #[test]
    fn memory_has_a_unit() {
        assert_eq!(memory("4GB"), Ok(4_000_000_000));
        assert_eq!(memory("0.5 GiB"), Ok(536_870_912));
        for wrong in ["", "4", "GB", "-1GB", "4G", "nanGB", "1e30TB", "0MB"] {
            assert!(memory(wrong).is_err(), "{wrong}");
        }
    }
}
