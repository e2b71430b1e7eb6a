//! Surface files: what is written reads back the same, foreign variants read right, and damage is named.

mod meshes;

use std::fs;
use std::path::Path;

use proptest::prelude::*;
use slowmote::surface::{
    FileError, FormatError, Point, RawSurface, SurfaceFormat, TriangleMesh, WriteError, read_surface,
    read_surface_bytes, surface_bytes, weld, weld_tolerance, write_surface,
};

fn read(bytes: &[u8], format: SurfaceFormat) -> RawSurface {
    read_surface_bytes(bytes, format).expect("a sound file")
}

fn fault(bytes: &[u8], format: SurfaceFormat) -> FormatError {
    read_surface_bytes(bytes, format).expect_err("a damaged file")
}

/// A body with coordinates that single precision can't hold.
fn body() -> TriangleMesh {
    meshes::map(&meshes::icosphere(2), |x| x * 1.2345678901 + Point::new(0.1, 200.0, -3.0e-7))
}

#[test]
fn formats_with_double_precision_give_the_same_mesh_back() {
    for format in [SurfaceFormat::Obj, SurfaceFormat::Ply, SurfaceFormat::Off, SurfaceFormat::Msh] {
        let surface = read(&surface_bytes(&body(), format).unwrap(), format);
        assert_eq!(surface.mesh, body(), "{format}");
        assert_eq!(surface.notes, Vec::<String>::new(), "{format}");
    }
}

#[test]
fn stl_gives_the_welded_mesh_back_in_single_precision() {
    let surface = read(&surface_bytes(&body(), SurfaceFormat::Stl).unwrap(), SurfaceFormat::Stl);
    assert_eq!(surface.mesh.vertices().len(), 3 * body().facets().len());
    let welded = weld(&surface.mesh, 0.0);
    assert_eq!(welded.mesh.vertices().len(), body().vertices().len());
    assert!(welded.collapsed.is_empty());
    for facet in 0..body().facets().len() {
        for (x, y) in welded.mesh.corners(facet).iter().zip(body().corners(facet)) {
            assert_eq!(*x, y.map(|c| f64::from(c as f32)));
        }
    }
}

#[test]
fn writing_is_deterministic_and_goes_through_files() {
    let folder = tempfile::tempdir().unwrap();
    for format in SurfaceFormat::ALL {
        let path = folder.path().join(format!("body.{}", format.extension().to_uppercase()));
        write_surface(&body(), &path).unwrap();
        assert_eq!(fs::read(&path).unwrap(), surface_bytes(&body(), format).unwrap());
        let surface = read_surface(&path).unwrap();
        assert_eq!(surface.format, format);
        assert_eq!(surface.mesh.facets().len(), 320);
    }
}

#[test]
fn groups_survive_in_obj_and_msh() {
    let cube = meshes::cuboid([1.0; 3]);
    let groups = (0..12).map(|facet| facet / 6).collect::<Vec<_>>();
    let grouped = TriangleMesh::with_groups(cube.vertices().to_vec(), cube.facets().to_vec(), groups).unwrap();
    for format in [SurfaceFormat::Obj, SurfaceFormat::Msh] {
        let surface = read(&surface_bytes(&grouped, format).unwrap(), format);
        assert_eq!(surface.mesh, grouped, "{format}");
        assert_eq!(surface.group_names.len(), 2);
    }
}

#[test]
fn content_decides_where_the_name_is_wrong() {
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("really_ply.stl");
    fs::write(&path, surface_bytes(&body(), SurfaceFormat::Ply).unwrap()).unwrap();
    let surface = read_surface(&path).unwrap();
    assert_eq!(surface.format, SurfaceFormat::Ply);
    assert_eq!(surface.notes, ["The name says STL, but the content is PLY and was read as such."]);
    let path = folder.path().join("no_extension");
    fs::write(&path, surface_bytes(&body(), SurfaceFormat::Stl).unwrap()).unwrap();
    assert_eq!(read_surface(&path).unwrap().format, SurfaceFormat::Stl);
}

#[test]
fn paths_that_are_no_surface_files() {
    let folder = tempfile::tempdir().unwrap();
    let at = |name: &str| folder.path().join(name);
    assert!(matches!(read_surface(at("missing.stl")), Err(FileError::NotFound { .. })));
    assert!(matches!(read_surface(folder.path()), Err(FileError::Folder { .. })));
    fs::write(at("notes.txt"), "hello").unwrap();
    assert!(matches!(read_surface(at("notes.txt")), Err(FileError::UnknownFormat { .. })));
    fs::write(at("empty.stl"), "").unwrap();
    let error = read_surface(at("empty.stl")).unwrap_err();
    assert!(matches!(error, FileError::Content { source: FormatError::Empty, .. }));
    assert!(error.hint().contains("cut off"));
    fs::write(at("blank.obj"), " \n\t").unwrap();
    assert!(matches!(read_surface(at("blank.obj")), Err(FileError::Content { source: FormatError::Empty, .. })));
}

#[test]
fn writing_refuses_what_a_format_cannot_hold() {
    let cube = meshes::cuboid([1.0; 3]);
    assert!(matches!(write_surface(&cube, Path::new("cube.xyz")), Err(WriteError::UnknownFormat { .. })));
    let nowhere = Path::new("/no/such/folder/cube.stl");
    assert!(matches!(write_surface(&cube, nowhere), Err(WriteError::Unwritable { .. })));
    let far = meshes::map(&cube, |x| x * 1e39);
    assert!(matches!(surface_bytes(&far, SurfaceFormat::Stl), Err(WriteError::OutOfRange { .. })));
    let lost = meshes::moved(&cube, [1e9, 0.0, 0.0]);
    assert!(matches!(surface_bytes(&lost, SurfaceFormat::Stl), Err(WriteError::FacetLost { .. })));
    assert!(surface_bytes(&lost, SurfaceFormat::Ply).is_ok());
}

mod stl {
    use super::*;

    const STL: SurfaceFormat = SurfaceFormat::Stl;

    fn text(name: &str) -> String {
        let facet =
            "facet normal 0 0 1\n outer loop\n  vertex 0 0 0\n  vertex 1e0 0 0\n  vertex 0 1.0 0\n endloop\nendfacet\n";
        format!("solid {name}\n{facet}{facet}endsolid {name}\n")
    }

    fn binary() -> Vec<u8> {
        surface_bytes(&meshes::cuboid([1.0; 3]), STL).unwrap()
    }

    #[test]
    fn text_with_one_or_several_solids() {
        let one = read(text("part").as_bytes(), STL);
        assert_eq!((one.mesh.facets().len(), one.variant.as_str()), (2, "text"));
        assert!(one.mesh.groups().is_empty());
        let two = read((text("one") + &text("two words")).as_bytes(), STL);
        assert_eq!(two.mesh.groups(), [0, 0, 1, 1]);
        assert_eq!(two.group_names, ["one", "two words"]);
    }

    #[test]
    fn text_in_upper_case_without_names_and_with_carriage_returns() {
        let surface = read(text("").to_uppercase().replace('\n', "\r\n").as_bytes(), STL);
        assert_eq!(surface.mesh.facets().len(), 2);
    }

    #[test]
    fn names_need_not_be_utf8() {
        let mut bytes = text("x").into_bytes();
        bytes[6] = 0xFF;
        assert_eq!(read(&bytes, STL).mesh.facets().len(), 2);
    }

    #[test]
    fn binary_may_begin_with_the_word_solid() {
        let mut bytes = binary();
        bytes[..14].copy_from_slice(b"solid exported");
        assert_eq!(read(&bytes, STL).variant, "binary");
    }

    #[test]
    fn counts_that_lie_are_found_before_memory_is_taken() {
        let mut bytes = binary();
        bytes[80..84].copy_from_slice(&u32::MAX.to_le_bytes());
        let expected = FormatError::CountTooLarge { what: "facets", stated: u64::from(u32::MAX), room: 12 };
        assert_eq!(fault(&bytes, STL), expected);
        bytes[80..84].copy_from_slice(&3_u32.to_le_bytes());
        assert_eq!(fault(&bytes, STL), FormatError::CountTooSmall { stated: 3, held: 12 });
        bytes[80..84].copy_from_slice(&0_u32.to_le_bytes());
        assert_eq!(fault(&bytes[..84], STL), FormatError::NoFacets);
    }

    #[test]
    fn cut_off_at_every_byte() {
        let bytes = binary();
        for length in 1..bytes.len() {
            let error = fault(&bytes[..length], STL);
            let cut = matches!(error, FormatError::Truncated { .. } | FormatError::CountTooLarge { .. });
            assert!(cut, "{length}: {error}");
        }
        let text = text("part");
        for length in 6..text.len() - 15 {
            let error = fault(&text.as_bytes()[..length], STL);
            let cut = matches!(error, FormatError::Truncated { .. } | FormatError::Unexpected { .. });
            assert!(cut, "{length}: {error}");
        }
    }

    #[test]
    fn trailing_bytes_are_ignored_and_noted() {
        let mut bytes = binary();
        bytes.extend(b"made on Tuesday");
        let surface = read(&bytes, STL);
        assert_eq!(surface.notes, ["15 bytes after the last facet were ignored."]);
    }

    #[test]
    fn coordinates_that_are_no_numbers_are_named_by_facet() {
        let mut bytes = binary();
        let second_facet_third_vertex = 84 + 50 + 12 + 24;
        for bad in [f32::NAN, f32::INFINITY] {
            bytes[second_facet_third_vertex..second_facet_third_vertex + 4].copy_from_slice(&bad.to_le_bytes());
            assert_eq!(fault(&bytes, STL), FormatError::NotFiniteFacet { facet: 1 });
        }
        for bad in ["nan", "inf", "-1e999"] {
            assert_eq!(
                fault(text("p").replacen("1e0", bad, 1).as_bytes(), STL),
                FormatError::NotFiniteFacet { facet: 0 }
            );
        }
    }

    #[test]
    fn text_errors_name_the_line() {
        let error = fault(text("p").replacen("1e0", "one", 1).as_bytes(), STL);
        let expected = FormatError::Unexpected { line: 5, expected: "a coordinate", found: "one".to_owned() };
        assert_eq!(error, expected);
        assert_eq!(error.to_string(), "line 5: expected a coordinate, found 'one'");
        assert!(matches!(fault(b"solid empty\nendsolid", STL), FormatError::NoFacets));
        let four = text("p").replacen("endloop", "vertex 0 0 1\nendloop", 1);
        assert!(matches!(fault(four.as_bytes(), STL), FormatError::Unexpected { line: 7, expected: "endloop", .. }));
    }
}

mod obj {
    use super::*;

    const OBJ: SurfaceFormat = SurfaceFormat::Obj;

    #[test]
    fn quads_relative_numbers_and_textures() {
        let text = "# a comment\nmtllib x.mtl\nv 0 0 0\nv 1 0 0 # here too\nv 1 1 0 1.0\nv 0 1 0\nvt 0 0\nvn 0 0 1\n\
                    usemtl red\ns off\nf 1/1/1 2//1 3/1 \\\n 4\nf -4 -2 -1\n";
        let surface = read(text.as_bytes(), OBJ);
        assert_eq!(surface.mesh.facets(), [[0, 1, 2], [0, 2, 3], [0, 2, 3]]);
        assert_eq!(
            surface.notes,
            ["1 of 2 facets have more than three corners and were cut into triangles, which count as facets."]
        );
    }

    #[test]
    fn a_hollow_polygon_is_cut_inside_its_outline() {
        // An L of area 3.
        let text = "v 0 0 0\nv 2 0 0\nv 2 1 0\nv 1 1 0\nv 1 2 0\nv 0 2 0\nf 1 2 3 4 5 6\n";
        let mesh = read(text.as_bytes(), OBJ).mesh;
        assert_eq!(mesh.facets().len(), 4);
        let areas = (0..4).map(|facet| 0.5 * mesh.area_normal(facet).z).collect::<Vec<_>>();
        assert!(areas.iter().all(|area| *area > 0.0));
        assert!((areas.iter().sum::<f64>() - 3.0).abs() < 1e-12);
    }

    #[test]
    fn damage() {
        let corners = "v 0 0 0\nv 1 0 0\nv 0 1 0\n";
        let with = |line: &str| fault(format!("{corners}{line}\n").as_bytes(), OBJ);
        assert_eq!(with("f 1 2 9"), FormatError::NoSuchVertex { facet: 0, vertex: 8 });
        assert_eq!(with("f 1 2 0"), FormatError::NoSuchVertex { facet: 0, vertex: 0 });
        assert_eq!(with("f 1 2 -9"), FormatError::NoSuchVertex { facet: 0, vertex: -9 });
        assert_eq!(with("f 1 2"), FormatError::CornerCount { facet: 0, corners: 2 });
        assert!(matches!(with("f 1 2 x"), FormatError::Unexpected { line: 4, .. }));
        assert_eq!(with("v 1 nan 0"), FormatError::NotFiniteVertex { vertex: 3 });
        assert_eq!(with(""), FormatError::NoFacets);
        assert!(matches!(fault(b"\x00\x01\x02 binary", OBJ), FormatError::Unexpected { .. }));
        let many = format!("{corners}f{}\n", " 1 2 3".repeat(4000));
        assert!(matches!(fault(many.as_bytes(), OBJ), FormatError::CornerCount { corners: 12000, .. }));
    }
}

mod ply {
    use super::*;

    const PLY: SurfaceFormat = SurfaceFormat::Ply;

    fn header(format: &str, vertices: u64, faces: u64) -> String {
        format!(
            "ply\nformat {format} 1.0\ncomment with words\nelement vertex {vertices}\nproperty float x\nproperty float y\n\
             property float z\nproperty uchar red\nelement face {faces}\nproperty list uchar int vertex_index\n\
             property list uchar float texcoord\nend_header\n"
        )
    }

    #[test]
    fn text_with_colours_and_lists_that_nobody_needs() {
        let text =
            header("ascii", 4, 2) + "0 0 0 255\n1 0 0 255\n1 1 0 255\n0 1 0 255\n4 0 1 2 3 2 0.5 0.5\n3 0 1 2 0\n";
        let mesh = read(text.as_bytes(), PLY).mesh;
        assert_eq!(mesh.facets(), [[0, 1, 2], [0, 2, 3], [0, 1, 2]]);
    }

    #[test]
    fn big_endian() {
        let mut bytes = header("binary_big_endian", 3, 1).into_bytes();
        for x in [[0.0_f32, 0.0, 0.0], [1.5, 0.0, 0.0], [0.0, 1.0, 0.0]] {
            bytes.extend(x.iter().flat_map(|c| c.to_be_bytes()).chain([7]));
        }
        bytes.push(3);
        bytes.extend([0_i32, 1, 2].iter().flat_map(|i| i.to_be_bytes()));
        bytes.extend([1, 0, 0, 0, 0]);
        let surface = read(&bytes, PLY);
        assert_eq!(surface.variant, "binary, big endian");
        assert_eq!(surface.mesh.vertices()[1].x, 1.5);
        for length in header("binary_big_endian", 3, 1).len()..bytes.len() {
            let error = fault(&bytes[..length], PLY);
            assert!(matches!(error, FormatError::Truncated { .. } | FormatError::CountTooLarge { .. }), "{error}");
        }
    }

    #[test]
    fn damage() {
        let lying = header("binary_little_endian", u64::MAX, 1);
        assert!(matches!(fault(lying.as_bytes(), PLY), FormatError::CountTooLarge { .. }));
        let lying = header("ascii", u64::MAX, 1);
        assert!(matches!(fault(lying.as_bytes(), PLY), FormatError::Truncated { .. }));
        let text = header("ascii", 3, 1) + "0 0 0 1\n1 0 0 1\n0 1 0 1\n";
        let with = |face: &str| fault((text.clone() + face).as_bytes(), PLY);
        assert_eq!(with("3 0 1 5 0"), FormatError::NoSuchVertex { facet: 0, vertex: 5 });
        assert_eq!(with("3 0 1 -2 0"), FormatError::NoSuchVertex { facet: 0, vertex: -2 });
        assert_eq!(with("2 0 1 0"), FormatError::CornerCount { facet: 0, corners: 2 });
        assert!(matches!(with("3 0 1 1.5 0"), FormatError::Unexpected { .. }));
        assert!(matches!(fault(b"ply\nformat ascii 2.0\n", PLY), FormatError::Variant { .. }));
        assert!(matches!(fault(b"ply\nformat latin 1.0\n", PLY), FormatError::Unexpected { line: 2, .. }));
        assert!(matches!(fault(b"ply\nformat ascii 1.0\nproperty int x\n", PLY), FormatError::Unexpected { .. }));
        let no_z = "ply\nformat ascii 1.0\nelement vertex 1\nproperty int x\nend_header\n1\n";
        assert!(matches!(fault(no_z.as_bytes(), PLY), FormatError::Variant { .. }));
        // An element without properties takes no bytes, however often it is said to be there.
        let idle = "ply\nformat ascii 1.0\nelement idle 18446744073709551615\nend_header\n";
        assert_eq!(fault(idle.as_bytes(), PLY), FormatError::NoFacets);
    }
}

mod off {
    use super::*;

    const OFF: SurfaceFormat = SurfaceFormat::Off;

    #[test]
    fn variants() {
        let plain = "OFF # comment\n4 2 0\n0 0 0 1 0 0\n1 1 0\n0 1 0\n4 0 1 2 3 255 0 0\n3 0 1 2\n";
        assert_eq!(read(plain.as_bytes(), OFF).mesh.facets().len(), 3);
        let coloured = "COFF 3 1 0\n0 0 0 255 0 0 1\n1 0 0 0 0 0 1\n0 1 0 0 0 0 1\n3 0 1 2\n";
        assert_eq!(read(coloured.as_bytes(), OFF).mesh.facets(), [[0, 1, 2]]);
    }

    #[test]
    fn damage() {
        assert!(matches!(fault(b"OFF BINARY\n", OFF), FormatError::Variant { .. }));
        assert!(matches!(fault(b"4OFF\n1 1 1\n", OFF), FormatError::Variant { .. }));
        assert!(matches!(fault(b"OOF\n1 1 1\n", OFF), FormatError::Unexpected { line: 1, .. }));
        assert!(matches!(fault(b"OFF\n99999999999999 1 1\n0 0 0", OFF), FormatError::Truncated { .. }));
        assert!(matches!(fault(b"OFF\n-3 1 1\n0 0 0", OFF), FormatError::Unexpected { .. }));
        let corners = "OFF\n3 1 0\n0 0 0\n1 0 0\n0 1 0\n";
        let with = |face: &str| fault(format!("{corners}{face}").as_bytes(), OFF);
        assert_eq!(with("3 0 1 3"), FormatError::NoSuchVertex { facet: 0, vertex: 3 });
        assert_eq!(with("1 0"), FormatError::CornerCount { facet: 0, corners: 1 });
        assert!(matches!(with("3 0 1"), FormatError::Truncated { .. }));
        assert_eq!(fault(b"OFF\n1 0 0\n0 0 0\n", OFF), FormatError::NoFacets);
        assert_eq!(fault(b"OFF\n1 0 0\n0 0 inf\n", OFF), FormatError::NotFiniteVertex { vertex: 0 });
    }
}

mod msh {
    use super::*;

    const MSH: SurfaceFormat = SurfaceFormat::Msh;

    const NODES_2: &str = "$MeshFormat\n2.2 0 8\n$EndMeshFormat\n$PhysicalNames\n1\n2 7 \"skin\"\n$EndPhysicalNames\n\
                           $Nodes\n4\n10 0 0 0\n20 1 0 0\n30 1 1 0\n40 0 1 0\n$EndNodes\n";

    #[test]
    fn version_2_text_with_volume_elements_and_quads() {
        let text = format!(
            "{NODES_2}$Elements\n4\n1 15 2 0 1 10\n2 3 2 7 1 10 20 30 40\n3 2 2 0 9 10 20 30\n4 4 2 0 1 10 20 30 40\n$EndElements\n"
        );
        let surface = read(text.as_bytes(), MSH);
        assert_eq!(surface.mesh.facets(), [[0, 1, 2], [0, 2, 3], [0, 1, 2]]);
        assert_eq!(surface.group_names, ["surface 7", "surface 9"]);
        assert!(surface.notes.contains(&"2 elements that are no surface facets were left out.".to_owned()));
    }

    #[test]
    fn version_2_binary() {
        let mut bytes = b"$MeshFormat\n2.2 1 8\n".to_vec();
        bytes.extend(1_i32.to_le_bytes());
        bytes.extend(b"\n$EndMeshFormat\n$Nodes\n3\n");
        for (number, x) in [(1_i32, [0.0_f64, 0.0, 0.0]), (2, [1.0, 0.0, 0.0]), (3, [0.0, 1.0, 0.0])] {
            bytes.extend(number.to_le_bytes());
            bytes.extend(x.iter().flat_map(|c| c.to_le_bytes()));
        }
        bytes.extend(b"\n$EndNodes\n$Elements\n2\n");
        for number in [2_i32, 2, 2, 1, 5, 5, 1, 2, 3, 2, 5, 5, 1, 3, 2] {
            bytes.extend(number.to_le_bytes());
        }
        bytes.extend(b"\n$EndElements\n");
        let surface = read(&bytes, MSH);
        assert_eq!(surface.mesh.facets(), [[0, 1, 2], [0, 2, 1]]);
        assert_eq!(surface.variant, "2.2, binary");
    }

    #[test]
    fn version_4_text_and_binary() {
        let text = "$MeshFormat\n4.1 0 8\n$EndMeshFormat\n$Nodes\n2 3 1 3\n0 1 0 1\n1\n0 0 0\n2 1 1 2\n2\n3\n\
                    1 0 0 0.5 0.5\n0 1 0 0.1 0.2\n$EndNodes\n$Elements\n2 2 1 2\n1 1 1 1\n1 1 2\n2 1 2 1\n2 1 2 3\n$EndElements\n";
        let surface = read(text.as_bytes(), MSH);
        assert_eq!(surface.mesh.facets(), [[0, 1, 2]]);
        assert_eq!(surface.mesh.vertices()[2], Point::new(0.0, 1.0, 0.0));

        let mut bytes = b"$MeshFormat\n4.1 1 8\n".to_vec();
        bytes.extend(1_i32.to_be_bytes());
        bytes.extend(b"\n$EndMeshFormat\n$Nodes\n");
        let (long, int) = (|n: u64| n.to_be_bytes(), |n: i32| n.to_be_bytes());
        bytes.extend([1, 3, 1, 3].map(long).concat());
        bytes.extend([2, 1, 0].map(int).concat());
        bytes.extend([3, 1, 2, 3].map(long).concat());
        bytes.extend([0.0_f64, 0.0, 0.0, 1.0, 0.0, 0.0, 0.0, 1.0, 0.0].map(f64::to_be_bytes).concat());
        bytes.extend(b"\n$EndNodes\n$Elements\n");
        bytes.extend([1, 1, 1, 1].map(long).concat());
        bytes.extend([2, 1, 2].map(int).concat());
        bytes.extend([1, 1, 1, 2, 3].map(long).concat());
        bytes.extend(b"\n$EndElements\n");
        let surface = read(&bytes, MSH);
        assert_eq!(surface.mesh.facets(), [[0, 1, 2]]);
        assert_eq!(surface.variant, "4.1, binary");
    }

    #[test]
    fn damage() {
        let with = |elements: &str| fault(format!("{NODES_2}$Elements\n{elements}\n$EndElements\n").as_bytes(), MSH);
        assert_eq!(with("1\n1 2 2 0 1 10 20 99"), FormatError::NoSuchVertex { facet: 0, vertex: 99 });
        assert!(matches!(with("1\n1 77 2 0 1 10 20 99"), FormatError::Variant { .. }));
        assert!(matches!(with("9\n1 2 2 0 1 10 20 30"), FormatError::Truncated { .. }));
        assert!(matches!(with("1\n1 two 2 0 1 10 20 30"), FormatError::Unexpected { line: 17, .. }));
        assert_eq!(with("1\n1 15 2 0 1 10"), FormatError::NoFacets);
        assert!(matches!(fault(&NODES_2.as_bytes()[..NODES_2.len() - 20], MSH), FormatError::Truncated { .. }));
        assert!(matches!(fault(b"$MeshFormat\n4.0 0 8\n$EndMeshFormat\n", MSH), FormatError::Variant { .. }));
        assert!(matches!(fault(b"$MeshFormat\n4.1 0 4\n$EndMeshFormat\n", MSH), FormatError::Variant { .. }));
        assert!(matches!(fault(b"$Nodes\n$EndNodes\n", MSH), FormatError::Unexpected { .. }));
        let lying = "$MeshFormat\n4.1 0 8\n$EndMeshFormat\n$Nodes\n1 1 1 1\n2 1 0 999999999999\n$EndNodes\n";
        assert!(matches!(fault(lying.as_bytes(), MSH), FormatError::CountTooLarge { .. }));
    }
}

/// Seeds that get a reader past its header, so that random bytes reach its depths.
fn seeds() -> Vec<(SurfaceFormat, Vec<u8>)> {
    let cube = meshes::cuboid([1.0; 3]);
    let mut seeds = SurfaceFormat::ALL.map(|format| (format, surface_bytes(&cube, format).unwrap())).to_vec();
    let mut text = String::from("solid x\n");
    for _ in 0..3 {
        text += "facet normal 0 0 1\nouter loop\nvertex 0 0 0\nvertex 1 0 0\nvertex 0 1 0\nendloop\nendfacet\n";
    }
    seeds.push((SurfaceFormat::Stl, (text + "endsolid x\n").into_bytes()));
    let mut msh = b"$MeshFormat\n4.1 1 8\n\x01\0\0\0\n$EndMeshFormat\n$Nodes\n".to_vec();
    msh.extend([1_u64, 1, 1, 1].map(u64::to_le_bytes).concat());
    msh.extend([0; 120]);
    msh.extend(b"\n$EndNodes\n$Elements\n");
    msh.extend([1_u64, 1, 1, 1].map(u64::to_le_bytes).concat());
    msh.extend([0; 80]);
    msh.extend(b"\n$EndElements\n");
    seeds.push((SurfaceFormat::Msh, msh));
    seeds
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(300))]

    #[test]
    fn random_bytes_never_panic(bytes in prop::collection::vec(any::<u8>(), 0..2000)) {
        for format in SurfaceFormat::ALL {
            let _ = read_surface_bytes(&bytes, format);
            let _ = SurfaceFormat::of_content(&bytes);
        }
    }

    #[test]
    fn damaged_files_never_panic_and_stay_bounded(
        damage in prop::collection::vec((any::<prop::sample::Index>(), any::<u8>()), 1..6),
        cut in any::<prop::sample::Index>(),
        whole in any::<bool>(),
    ) {
        for (format, mut bytes) in seeds() {
            for (at, byte) in &damage {
                let at = at.index(bytes.len());
                bytes[at] = *byte;
            }
            if !whole {
                bytes.truncate(cut.index(bytes.len()));
            }
            if let Ok(surface) = read_surface_bytes(&bytes, format) {
                // A facet takes six bytes at least ("f1 1 1" and the like).
                prop_assert!(surface.mesh.facets().len() <= bytes.len());
                prop_assert!(surface.mesh.vertices().len() <= bytes.len());
            }
        }
    }

    #[test]
    fn any_mesh_survives_writing_and_reading(
        vertices in prop::collection::vec(prop::array::uniform3(-1e6..1e6_f64), 3..30),
        facets in prop::collection::vec(prop::array::uniform3(any::<prop::sample::Index>()), 1..40),
    ) {
        let count = vertices.len();
        let vertices = vertices.into_iter().map(Point::from).collect::<Vec<_>>();
        let facets = facets.iter().map(|corners| corners.map(|corner| corner.index(count))).collect::<Vec<_>>();
        let mesh = TriangleMesh::new(vertices, facets).unwrap();
        for format in [SurfaceFormat::Obj, SurfaceFormat::Ply, SurfaceFormat::Off, SurfaceFormat::Msh] {
            prop_assert_eq!(&read(&surface_bytes(&mesh, format).unwrap(), format).mesh, &mesh);
        }
    }

    #[test]
    fn welding_undoes_single_precision_noise(shift in prop::array::uniform3(-300.0..300.0_f64), size in 0.01..1000.0_f64) {
        let sphere = meshes::map(&meshes::icosphere(1), |x| size * x + size * Point::from(shift));
        // Every facet computes its own corners, in single precision.
        let noisy = sphere.facets().iter().enumerate().flat_map(|(facet, corners)| {
            let third = corners.map(|v| sphere.vertices()[v]);
            third.map(|x| x.map(|c| f64::from((c as f32) * (1.0 + f32::EPSILON * (facet % 3) as f32 / 2.0))))
        });
        let soup = TriangleMesh::new(noisy.collect(), (0..80).map(|k| [3 * k, 3 * k + 1, 3 * k + 2]).collect()).unwrap();
        let welded = weld(&soup, weld_tolerance(&soup));
        prop_assert_eq!(welded.mesh.vertices().len(), 42);
        prop_assert!(welded.collapsed.is_empty());
    }
}
