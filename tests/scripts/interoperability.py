"""Surface files of other programs read back to the same drag, and ours are read by them.

    python -m venv target/venv && target/venv/bin/pip install -r tests/scripts/requirements.txt
    target/venv/bin/python tests/scripts/interoperability.py

Bodies are written by general-purpose packages in every format and variant that they have, solved by the program on the
same mesh, and compared with the same body written by this script alone (text STL, all digits). Then the program writes,
and the packages read. Ends with 1 at any difference beyond the tolerance of the format.
"""

import argparse
import importlib
import json
import os
import subprocess
import sys
import tempfile

import numpy as np

# Coordinates in single precision are off by 6e-8 of the body's span (and more for the body far from its origin); the
# quadrature decides between equal edges by rounding, which moves a resistance by 1e-6.
TOLERANCE = 5e-6
# Volume and area in double precision, by the packages' own sums, and in single precision.
SIZE_TOLERANCE = 2e-6

results = []
failures = []


def sphere():
    """An icosphere of 320 facets, not quite round so that no axis is like another."""
    g = (1 + 5**0.5) / 2
    points = [(s * a, t * b, 0) for s, t in ((-1, -1), (-1, 1), (1, -1), (1, 1)) for a, b in ((1, g),)]
    vertices = np.array([np.roll(p, k) for p in points for k in range(3)], float)
    vertices /= np.linalg.norm(vertices[0])
    near = lambda a, b: np.linalg.norm(vertices[a] - vertices[b]) < 1.1  # noqa: E731
    faces = [(a, b, c) for a in range(12) for b in range(a) for c in range(b) if near(a, b) and near(b, c) and near(c, a)]
    for _ in range(2):
        finer, middles = [], {}
        vertices = list(map(tuple, vertices))
        for face in faces:
            mid = []
            for i in range(3):
                key = frozenset((face[i], face[(i + 1) % 3]))
                if key not in middles:
                    x = np.mean([vertices[k] for k in key], axis=0)
                    middles[key] = len(vertices)
                    vertices.append(tuple(x / np.linalg.norm(x)))
                mid.append(middles[key])
            a, b, c = face
            finer += [(a, mid[0], mid[2]), (b, mid[1], mid[0]), (c, mid[2], mid[1]), tuple(mid)]
        faces, vertices = finer, np.array(vertices)
    return outward(vertices * (3.0, 2.5, 2.0), faces)


def outward(vertices, faces):
    turned = []
    for a, b, c in faces:
        up = np.dot(np.cross(vertices[b] - vertices[a], vertices[c] - vertices[a]), vertices[a])
        turned.append((a, b, c) if up > 0 else (a, c, b))
    return vertices, turned


def bracket():
    """An L-shaped bracket: quadrilaterals and two hexagons."""
    outline = [(0, 0), (5, 0), (5, 2), (2, 2), (2, 4), (0, 4)]
    vertices = np.array([(x, y, z) for z in (0.0, 3.0) for x, y in outline])
    sides = [(i, (i + 1) % 6, (i + 1) % 6 + 6, i + 6) for i in range(6)]
    return vertices, sides + [tuple(range(5, -1, -1)), tuple(range(6, 12))]


def block():
    """A block of quadrilaterals, away from the origin."""
    vertices = np.array([(x, y, z) for x in (10.0, 16.0) for y in (-7.0, -3.0) for z in (2.5, 5.0)])
    return vertices, [(0, 1, 3, 2), (4, 6, 7, 5), (0, 4, 5, 1), (2, 3, 7, 6), (0, 2, 6, 4), (1, 5, 7, 3)]


def ears(vertices, face):
    """A polygon as triangles; the bracket's hexagons are not convex."""
    face = list(face)
    if len(face) == 3:
        return [tuple(face)]
    normal = sum(np.cross(vertices[face[i]], vertices[face[(i + 1) % len(face)]]) for i in range(len(face)))
    for i in range(len(face)):
        a, b, c = (face[(i + k - 1) % len(face)] for k in range(3))
        if np.dot(np.cross(vertices[b] - vertices[a], vertices[c] - vertices[b]), normal) <= 0:
            continue
        inside = lambda p: all(  # noqa: E731
            np.dot(np.cross(vertices[t] - vertices[s], p - vertices[s]), normal) > 0 for s, t in ((a, b), (b, c), (c, a))
        )
        if not any(inside(vertices[k]) for k in face if k not in (a, b, c)):
            return [(a, b, c)] + ears(vertices, face[:i] + face[i + 1 :])
    raise ValueError("no ear")


def triangles(vertices, faces):
    return np.array([t for face in faces for t in ears(vertices, face)])


def measure(vertices, faces):
    a, b, c = (vertices[triangles(vertices, faces)[:, k]] for k in range(3))
    cross = np.cross(b - a, c - a)
    origin = vertices[0]
    return np.sum(np.einsum("ij,ij->i", a - origin, cross)) / 6, np.sum(np.linalg.norm(cross, axis=1)) / 2


def text_stl(path, vertices, faces):
    with open(path, "w") as file:
        print("solid body", file=file)
        for triangle in triangles(vertices, faces):
            print("facet normal 0 0 0\nouter loop", file=file)
            for k in triangle:
                print("vertex", *(repr(float(x)) for x in vertices[k]), file=file)
            print("endloop\nendfacet", file=file)
        print("endsolid body", file=file)


def run(arguments):
    done = subprocess.run([options.binary, *arguments], capture_output=True, text=True)
    if done.returncode != 0 and not (done.returncode == 3 and arguments[0] == "drag"):
        raise RuntimeError(f"slowmote {' '.join(arguments)} ended with {done.returncode}: {done.stderr.strip()}")
    return json.loads(done.stdout)


def resistance(path, facets):
    answer = run(["drag", path, "--unit", "um", "--elements", str(facets), "--json", "--quiet"])
    blocks = answer["resistance"]
    keys = ("force_velocity_n_s_per_m", "force_rotation_n_s", "torque_velocity_n_s", "torque_rotation_n_m_s")
    tt, rr = (np.max(np.abs(blocks[k])) for k in (keys[0], keys[3]))
    scales = (tt, (tt * rr) ** 0.5, (tt * rr) ** 0.5, rr)
    return np.concatenate([np.ravel(blocks[k]) / s for k, s in zip(keys, scales)]), scales, answer


def check(package, what, body, difference, tolerance):
    results.append((package, what, body, difference, tolerance))
    if not difference <= tolerance:
        failures.append(f"{package}, {what}, {body}: {difference:.1e} beyond {tolerance:.0e}")


def read_back(package, what, name, path, vertices, faces, expected):
    """The program reads what the package wrote: the same size and the same resistance."""
    volume, area = measure(vertices, faces)
    try:
        report = run(["surface", path, "--unit", "um", "--json"])
        check(package, what + ", volume", name, abs(report["volume_in_file_units"] / volume - 1), SIZE_TOLERANCE)
        check(package, what + ", area", name, abs(report["area_in_file_units"] / area - 1), SIZE_TOLERANCE)
        numbers, _, _ = resistance(path, expected["elements"])
        check(package, what, name, float(np.max(np.abs(numbers - expected["numbers"]))), TOLERANCE)
    except (RuntimeError, KeyError) as error:
        failures.append(f"{package}, {what}, {name}: {error}")


def by_trimesh(folder, vertices, faces):
    trimesh = importlib.import_module("trimesh")
    mesh = trimesh.Trimesh(vertices, triangles(vertices, faces), process=False)
    for what, extension, more in [
        ("STL binary", "stl", {}),
        ("STL text", "stl", {"file_type": "stl_ascii"}),
        ("PLY binary", "ply", {"encoding": "binary"}),
        ("PLY text", "ply", {"encoding": "ascii"}),
        ("OFF", "off", {}),
        ("OBJ with normals", "obj", {"include_normals": True}),
        ("OBJ", "obj", {"include_normals": False}),
    ]:
        path = os.path.join(folder, what.replace(" ", "-") + "." + extension)
        mesh.export(path, **more)
        yield what, path


def by_meshio(folder, vertices, faces):
    meshio = importlib.import_module("meshio")
    cut = triangles(vertices, faces)
    quads = [face for face in faces if len(face) == 4]
    mixed = [("quad", np.array(quads))] if quads else []
    others = [t for face in faces if len(face) != 4 for t in ears(vertices, face)]
    mixed += [("triangle", np.array(others))] if others else []
    cases = [
        ("STL binary", "stl", [("triangle", cut)], {"file_format": "stl", "binary": True}),
        ("STL text", "stl", [("triangle", cut)], {"file_format": "stl", "binary": False}),
        ("PLY binary", "ply", [("triangle", cut)], {"file_format": "ply", "binary": True}),
        ("PLY text", "ply", [("triangle", cut)], {"file_format": "ply", "binary": False}),
        ("OBJ of quads", "obj", mixed, {"file_format": "obj"}),
        ("OFF", "off", [("triangle", cut)], {"file_format": "off"}),
        ("MSH 2.2 binary", "msh", mixed, {"file_format": "gmsh22", "binary": True}),
        ("MSH 2.2 text", "msh", mixed, {"file_format": "gmsh22", "binary": False}),
        # Of one cell type: for more it wants entities that a surface does not have.
        ("MSH 4.1 binary", "msh", [("triangle", cut)], {"file_format": "gmsh", "binary": True}),
        ("MSH 4.1 text", "msh", [("triangle", cut)], {"file_format": "gmsh", "binary": False}),
    ]
    for what, extension, cells, more in cases:
        path = os.path.join(folder, what.replace(" ", "-") + "." + extension)
        meshio.write(path, meshio.Mesh(vertices, cells), **more)
        yield what, path


def by_pyvista(folder, vertices, faces):
    pyvista = importlib.import_module("pyvista")
    cut = triangles(vertices, faces)
    mesh = pyvista.PolyData(vertices, np.hstack([np.full((len(cut), 1), 3), cut]).ravel())
    for what, extension, binary in [
        ("STL binary", "stl", True),
        ("STL text", "stl", False),
        ("PLY binary", "ply", True),
        ("PLY text", "ply", False),
        ("OBJ", "obj", False),
    ]:
        path = os.path.join(folder, what.replace(" ", "-") + "." + extension)
        mesh.save(path, binary=binary)
        yield what, path


def by_gmsh(folder, vertices, faces):
    gmsh = importlib.import_module("gmsh")
    gmsh.initialize()
    gmsh.option.setNumber("General.Terminal", 0)
    gmsh.model.add("body")
    tag = gmsh.model.addDiscreteEntity(2)
    gmsh.model.mesh.addNodes(2, tag, list(range(1, len(vertices) + 1)), np.ravel(vertices))
    count = 0
    for kind, size in ((2, 3), (3, 4)):
        cells = [f for face in faces for f in ([face] if len(face) == 4 else ears(vertices, face)) if len(f) == size]
        if cells:
            numbers = list(range(count + 1, count + len(cells) + 1))
            gmsh.model.mesh.addElementsByType(tag, kind, numbers, np.ravel(cells) + 1)
            count += len(cells)
    for what, extension, version, binary in [
        ("MSH 2.2 binary", "msh", 2.2, 1),
        ("MSH 2.2 text", "msh", 2.2, 0),
        ("MSH 4.1 binary", "msh", 4.1, 1),
        ("MSH 4.1 text", "msh", 4.1, 0),
        ("STL binary", "stl", 4.1, 1),
        ("STL text", "stl", 4.1, 0),
        ("OFF", "off", 4.1, 0),
    ]:
        gmsh.option.setNumber("Mesh.MshFileVersion", version)
        gmsh.option.setNumber("Mesh.Binary", binary)
        gmsh.option.setNumber("Mesh.SaveAll", 1)
        path = os.path.join(folder, what.replace(" ", "-") + "." + extension)
        gmsh.write(path)
        yield what, path
    gmsh.finalize()


def big_endian_ply(folder, vertices, faces):
    """No package here writes the other byte order, so this script does, with polygons as they are."""
    path = os.path.join(folder, "PLY-big-endian.ply")
    header = (
        "ply\nformat binary_big_endian 1.0\ncomment polygons\n"
        f"element vertex {len(vertices)}\nproperty double x\nproperty double y\nproperty double z\n"
        f"element face {len(faces)}\nproperty list uchar int vertex_indices\nend_header\n"
    )
    with open(path, "wb") as file:
        file.write(header.encode())
        file.write(np.asarray(vertices, ">f8").tobytes())
        for face in faces:
            file.write(bytes([len(face)]) + np.asarray(face, ">i4").tobytes())
    yield "PLY big-endian, polygons", path


def read_by(package, path):
    """Volume, area and whether it is closed, of a file of ours, by a package."""
    if package == "trimesh":
        mesh = importlib.import_module("trimesh").load_mesh(path, merge_tex=True, merge_norm=True)
        mesh.merge_vertices()
        return mesh.volume, mesh.area, mesh.is_watertight
    if package == "pyvista":
        mesh = importlib.import_module("pyvista").read(path).triangulate().clean()
        return mesh.volume, mesh.area, mesh.is_manifold
    if package == "meshio":
        mesh = importlib.import_module("meshio").read(path)
        faces = np.concatenate([block.data for block in mesh.cells if block.type == "triangle"])
        volume, area = measure(np.asarray(mesh.points, float), [tuple(face) for face in faces])
        return volume, area, True
    gmsh = importlib.import_module("gmsh")
    gmsh.initialize()
    gmsh.option.setNumber("General.Terminal", 0)
    gmsh.open(path)
    tags, points, _ = gmsh.model.mesh.getNodes()
    place = {tag: k for k, tag in enumerate(tags)}
    _, nodes = gmsh.model.mesh.getElementsByType(2)
    faces = [tuple(place[n] for n in nodes[k : k + 3]) for k in range(0, len(nodes), 3)]
    gmsh.finalize()
    volume, area = measure(np.reshape(points, (-1, 3)), faces)
    return volume, area, True


READERS = {
    "trimesh": ("stl", "ply", "off", "obj"),
    "pyvista": ("stl", "ply", "obj"),
    "meshio": ("stl", "ply", "off", "obj", "msh"),
    "gmsh": ("stl", "off", "msh"),
}


def available(package):
    try:
        importlib.import_module(package)
        return True
    except (ImportError, OSError) as error:
        print(f"SKIPPED: {package} can't be imported here ({error})")
        return False


def main():
    writers = {"trimesh": by_trimesh, "meshio": by_meshio, "pyvista": by_pyvista, "gmsh": by_gmsh}
    packages = [package for package in writers if available(package)]
    bodies = {"scan": sphere(), "bracket": bracket(), "block": block()}
    with tempfile.TemporaryDirectory() as folder:
        for name, (vertices, faces) in bodies.items():
            own = os.path.join(folder, "own.stl")
            text_stl(own, vertices, faces)
            elements = 320
            numbers, _, _ = resistance(own, elements)
            expected = {"numbers": numbers, "elements": elements}
            sources = [("this script", big_endian_ply)] + [(package, writers[package]) for package in packages]
            for package, write in sources:
                for what, path in write(folder, vertices, faces):
                    read_back(package, what, name, path, vertices, faces, expected)
        for shape in ("redcell:7.82um", "box:6x4x2um", "ring:10x2um"):
            for extension in ("stl", "ply", "off", "obj", "msh"):
                path = os.path.join(folder, "ours." + extension)
                written = run(["surface", shape, "--elements", "400", "--write", path, "--json"])
                for package in packages:
                    if extension not in READERS[package]:
                        continue
                    what = f"reads our {extension.upper()}"
                    volume, area, closed = read_by(package, path)
                    check(package, what, shape, abs(volume / written["volume_in_file_units"] - 1), SIZE_TOLERANCE)
                    check(package, what, shape, abs(area / written["area_in_file_units"] - 1), SIZE_TOLERANCE)
                    if not closed:
                        failures.append(f"{package}, {what}, {shape}: not closed")
    worst = {}
    for package, what, _, difference, tolerance in results:
        worst[(package, what)] = max(worst.get((package, what), 0.0), difference / tolerance)
    print(f"{'package':12} {'what':28} largest difference over what is allowed")
    for (package, what), share in worst.items():
        if not what.endswith((", volume", ", area")):
            print(f"{package:12} {what:28} {share:.1e}")
    for failure in failures:
        print("FAILED:", failure)
    print(f"interoperability: {len(results)} comparisons, {len(failures)} failed")
    return 1 if failures or not results else 0


parser = argparse.ArgumentParser(description=__doc__)
parser.add_argument("--binary", default="target/release/slowmote")
options = parser.parse_args()
sys.exit(main())
