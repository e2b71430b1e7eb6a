//! Shapes as text: what is read, what is refused and with what words.

use proptest::prelude::*;
use slowmote::surface::shapes::{CATALOGUE, Hand, Shape, ShapeError, ShapeSpec};

fn refusal(text: &str) -> String {
    match Shape::parse(text) {
        Ok(shape) => panic!("{text} is read as {}", shape.name()),
        Err(error) => error.to_string(),
    }
}

fn assert_says(text: &str, parts: &[&str]) {
    let sentence = refusal(text);
    for part in parts {
        assert!(sentence.contains(part), "{text}: \"{sentence}\" does not say \"{part}\"");
    }
}

#[test]
fn the_texts_of_the_manual_are_read() {
    for (text, dimensions) in [
        ("sphere:10um", vec![10e-6]),
        ("ellipsoid:6x4x2um", vec![6e-6, 4e-6, 2e-6]),
        ("rod:12x2um", vec![12e-6, 2e-6]),
        ("cylinder:10x2um", vec![10e-6, 2e-6]),
        ("disc:8x1um", vec![8e-6, 1e-6]),
        ("box:6x4x2um", vec![6e-6, 4e-6, 2e-6]),
        ("cube:5um", vec![5e-6]),
        ("ring:10x2um", vec![10e-6, 2e-6]),
        ("redcell:7.82um", vec![7.82e-6]),
        ("helix:turns=4,pitch=2um,diameter=1um,thickness=0.2um", vec![4.0, 2e-6, 1e-6, 0.2e-6]),
        ("doublet:2um", vec![2e-6]),
        ("cone:6x4um", vec![6e-6, 4e-6]),
    ] {
        let shape = Shape::parse(text).unwrap();
        assert_eq!(shape.name(), text);
        assert_eq!(shape.dimensions().len(), dimensions.len());
        for (read, meant) in shape.dimensions().iter().zip(dimensions) {
            assert!((read / meant - 1.0).abs() < 1e-14, "{text}: {read}");
        }
    }
}

#[test]
fn every_example_of_the_catalogue_is_read_back() {
    for entry in CATALOGUE {
        let shape = Shape::parse(entry.example).unwrap();
        assert_eq!(shape.name(), entry.example);
        assert_eq!(shape.with_dimensions(&shape.dimensions()), Ok(shape));
        assert!(shape.with_dimensions(&[]).is_err());
        for alias in entry.aliases {
            let text = entry.example.replacen(entry.keyword, alias, 1);
            assert_eq!(Shape::parse(&text), Ok(shape), "{text}");
        }
    }
}

#[test]
fn spaces_case_units_and_signs_do_not_matter() {
    for text in
        ["rod:12x2um", " Rod : 12 x 2 um ", "rod:12um x 2um", "rod:12000x2000nm", "ROD:12×2µm", "rod:0.012x0.002mm"]
    {
        assert_eq!(Shape::parse(text).unwrap().name(), "rod:12x2um", "{text}");
    }
    let helix = Shape::parse("helix: hand=left, thickness=200nm, turns=4, diameter=1um, pitch=2um").unwrap();
    assert_eq!(helix.name(), "helix:turns=4,pitch=2um,diameter=1um,thickness=0.2um,hand=left");
    let Shape::Helix(helix) = helix else { panic!("not a helix") };
    assert_eq!(helix.sizes().hand, Hand::Left);
}

#[test]
fn names_use_a_readable_unit() {
    for (metres, text) in [
        (1e-9, "sphere:1nm"),
        (50e-9, "sphere:50nm"),
        (0.25e-6, "sphere:0.25um"),
        (0.1 + 0.2, "sphere:300mm"),
        (999e-6, "sphere:999um"),
        (2e-3, "sphere:2mm"),
        (2.0, "sphere:2m"),
        (1e-5 / 3.0, "sphere:3.33333333333um"),
    ] {
        assert_eq!(Shape::sphere(metres).unwrap().name(), text);
    }
}

#[test]
fn uncertainties_are_kept_with_their_dimension() {
    let spec = ShapeSpec::parse("rod:12±0.6x2um").unwrap();
    assert!((spec.size_uncertainties[0] - 0.05).abs() < 1e-12);
    assert_eq!(spec.size_uncertainties[1], 0.0);
    let spec = ShapeSpec::parse("sphere:10±0.3um").unwrap();
    assert!((spec.size_uncertainties[0] - 0.03).abs() < 1e-12);
    let spec = ShapeSpec::parse("helix:turns=4,pitch=2±0.1um,diameter=1um,thickness=0.2um±10%").unwrap();
    let expected = [0.0, 0.05, 0.0, 0.1];
    assert!(spec.size_uncertainties.iter().zip(expected).all(|(read, meant)| (read - meant).abs() < 1e-12));
    assert!(ShapeSpec::parse("sphere:10±11um").is_err());
}

#[test]
fn impossible_bodies_are_refused_with_a_sentence() {
    assert_says("rod:1x2um", &["round ends", "length 1um", "diameter 2um", "disc"]);
    assert_says("ring:2x2um", &["hole closes", "tube 2um"]);
    assert_says("ring:2x3um", &["hole closes"]);
    assert_says("helix:turns=4,pitch=0.1um,diameter=1um,thickness=0.2um", &["run into each other", "larger pitch"]);
    assert_says("helix:turns=4,pitch=9um,diameter=1um,thickness=1um", &["thinner than the diameter"]);
    assert_says("helix:turns=1000,pitch=2um,diameter=1um,thickness=0.2um", &["turns", "1000"]);
    assert_says("disc:2mx1um", &["factor of 2000000", "1000"]);
    assert_says("box:1x1x1001um", &["factor of 1001"]);
    assert_says("sphere:0um", &["greater than zero"]);
    assert_says("sphere:-3um", &["greater than zero"]);
    assert_says("sphere:1e-30m", &["the diameter is", "lengths from 0.1nm to 1000m"]);
    assert_says("cube:2km", &["the side is 2000m"]);
    assert!(matches!(Shape::sphere(f64::NAN), Err(ShapeError::NotPositive { .. })));
    assert!(matches!(Shape::cuboid([1.0, f64::INFINITY, 1.0]), Err(ShapeError::NotPositive { .. })));
}

/// Two turns closer than the wire is thick although the pitch is not: steep turns lean towards each other.
#[test]
fn leaning_turns_are_told_apart_from_the_pitch() {
    assert_says("helix:turns=2,pitch=1um,diameter=1um,thickness=0.97um", &["run into each other"]);
    assert!(Shape::parse("helix:turns=2,pitch=1um,diameter=1um,thickness=0.8um").is_ok());
    // Half a turn has no neighbour.
    assert!(Shape::parse("helix:turns=0.5,pitch=0.1um,diameter=1um,thickness=0.2um").is_ok());
}

#[test]
fn unknown_names_get_a_guess_and_the_list() {
    assert_says("spere:10um", &["\"spere\"", "did you mean sphere?", "known are sphere, ellipsoid, rod"]);
    assert_says("cylindre:10x2um", &["did you mean cylinder?"]);
    assert_says("tours:10x2um", &["did you mean ring?"]);
    assert_says("banana:10um", &["no shape named \"banana\"; known are"]);
    assert_says("", &["known are"]);
    assert_says(":", &["known are"]);
}

#[test]
fn a_wrong_number_of_dimensions_gets_an_example() {
    assert_says("sphere", &["sphere takes a diameter", "sphere:10um", "none is given"]);
    assert_says("sphere:", &["none is given"]);
    assert_says("sphere:1x2um", &["2 are given"]);
    assert_says("rod:12um", &["an overall length and a diameter", "rod:12x2um", "one is given"]);
    assert_says("box:1x2um", &["three sides", "2 are given"]);
    assert_says("ellipsoid:1x2x3x4um", &["4 are given"]);
}

#[test]
fn unreadable_sizes_say_why() {
    assert_says("sphere:10", &["no unit", "sphere:10um"]);
    assert_says("sphere:10kg", &["mass", "length"]);
    assert_says("sphere:ten um", &["does not begin with a number"]);
    assert_says("rod:12,5x2um", &["comma"]);
    assert_says("helix:4x2x1x0.2um", &["not of the form key=value", "helix:turns=4"]);
    assert_says("helix:turns=4", &["missing: pitch, diameter, thickness"]);
    assert_says("helix:turns=4,turns=5", &["\"turns\" is given twice"]);
    assert_says("helix:turns=4,hand=up", &["left or right"]);
    assert_says("helix:turns=4,length=3um", &["none of turns, pitch"]);
    assert_says("helix:turns=4um", &["length"]);
}

#[test]
fn hostile_texts_never_panic() {
    let long = format!("sphere:{}um", "9".repeat(100_000));
    let many = format!("box:{}um", "1x".repeat(50_000));
    let name = format!("{}:1um", "s".repeat(100_000));
    let keys = format!("helix:{}", "turns=1,".repeat(10_000));
    let texts = [long, many, name, keys, "sphere:1e999um".into(), "sphere:nanum".into(), "sphere:infm".into()];
    for text in &texts {
        assert!(refusal(text).len() < 1000, "the whole text is said back");
    }
    for text in [
        "::::",
        "sphere:::1um",
        "\u{0}:\u{0}",
        "sphere:1um\n",
        "盒:1um",
        "sphere:١um",
        "helix:=,=,=",
        "rod:x",
        "rod:xx",
        "𝕣𝕠𝕕:1x1um",
    ] {
        let _ = Shape::parse(text);
    }
}

proptest! {
    #[test]
    fn any_text_is_read_or_refused(text in "\\PC*") {
        let _ = Shape::parse(&text);
    }

    #[test]
    fn almost_shapes_are_read_or_refused(
        name in prop::sample::select(CATALOGUE.iter().map(|entry| entry.keyword).collect::<Vec<_>>()),
        sizes in "[-0-9.ex×±%, umk=]{0,24}",
    ) {
        let _ = Shape::parse(&format!("{name}:{sizes}"));
    }

    #[test]
    fn any_numbers_are_accepted_or_refused(a in any::<f64>(), b in any::<f64>(), c in any::<f64>()) {
        for entry in CATALOGUE {
            let shape = Shape::parse(entry.example).unwrap();
            for dimensions in [&[a][..], &[a, b], &[a, b, c], &[a, b, c, a]] {
                if let Ok(shape) = shape.with_dimensions(dimensions) {
                    prop_assert!(shape.exact_measure().volume > 0.0);
                }
            }
        }
    }
}
